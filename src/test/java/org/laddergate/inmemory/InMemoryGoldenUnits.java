package org.laddergate.inmemory;

import java.util.List;
import java.util.concurrent.ConcurrentSkipListMap;
import org.laddergate.golden.DuplicateGoldenUnitException;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.GoldenUnit;

public final class InMemoryGoldenUnits implements GoldenStore {
    private final ConcurrentSkipListMap<String, GoldenUnit> units = new ConcurrentSkipListMap<>();

    @Override
    public List<GoldenUnit> units(String product) {
        return units.values().stream().filter(unit -> unit.measurement().product().equals(product)).toList();
    }

    @Override
    public boolean add(GoldenUnit unit) {
        GoldenUnit earlier = units.putIfAbsent(unit.measurement().measurementId(), unit);
        if (earlier != null && !earlier.equals(unit)) {
            throw new DuplicateGoldenUnitException(unit.measurement().measurementId());
        }
        return earlier == null;
    }
}

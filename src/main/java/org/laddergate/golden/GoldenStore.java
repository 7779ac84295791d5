package org.laddergate.golden;

import java.util.List;

/** Golden and known-bad units of all products. Safe for use from many threads. */
public interface GoldenStore {

    /** All units of a product, ordered by measurement id. */
    List<GoldenUnit> units(String product);

    /**
     * Adds a unit; the same measurement id with the same content again changes nothing. Durable when it returns.
     *
     * @return true if it was new
     * @throws DuplicateGoldenUnitException if the measurement id exists with another content
     */
    boolean add(GoldenUnit unit);
}

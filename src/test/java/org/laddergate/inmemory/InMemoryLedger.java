package org.laddergate.inmemory;

import java.time.Clock;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionStage;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.LedgerUnavailableException;
import org.laddergate.screening.MeasurementConflictException;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.VerdictLedger;

public final class InMemoryLedger implements VerdictLedger {
    private final List<StoredVerdict> verdicts = new ArrayList<>();
    private final Clock clock;
    private String outage = "";

    public InMemoryLedger(Clock clock) {
        this.clock = clock;
    }

    /** From now on nothing can be stored, for this reason; empty: everything can again. */
    public synchronized void breakDown(String reason) {
        outage = reason;
    }

    public synchronized int size() {
        return verdicts.size();
    }

    @Override
    public synchronized Optional<StoredVerdict> find(String measurementId) {
        return verdicts.stream().filter(v -> v.measurementId().equals(measurementId)).findFirst();
    }

    @Override
    public synchronized List<StoredVerdict> findBySerial(String product, String serial) {
        return verdicts.stream().filter(v -> v.product().equals(product) && v.serial().equals(serial)).toList();
    }

    @Override
    public synchronized CompletionStage<StoredVerdict> append(Measurement m, String contentSha256,
            Judgement judgement) {
        if (!outage.isEmpty()) {
            return CompletableFuture.failedFuture(
                    new LedgerUnavailableException(outage, new IllegalStateException(outage)));
        }
        Optional<StoredVerdict> earlier = find(m.measurementId());
        if (earlier.isPresent()) {
            return earlier.get().contentSha256().equals(contentSha256)
                    ? CompletableFuture.completedFuture(earlier.get())
                    : CompletableFuture.failedFuture(new MeasurementConflictException(m.measurementId()));
        }
        StoredVerdict stored = new StoredVerdict(verdicts.size() + 1, m.measurementId(), contentSha256, m.product(),
                m.serial(), m.lot(), m.station(), m.measuredAt(), m.curveKind(), m.heatingPowerWatts(),
                m.heatingSeconds(), findBySerial(m.product(), m.serial()).size() + 1, clock.instant(), judgement);
        verdicts.add(stored);
        return CompletableFuture.completedFuture(stored);
    }

    @Override
    public synchronized Optional<String> whyNotWritable() {
        return outage.isEmpty() ? Optional.empty() : Optional.of(outage);
    }
}

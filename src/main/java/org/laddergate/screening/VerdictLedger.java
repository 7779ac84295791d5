package org.laddergate.screening;

import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletionStage;
import org.laddergate.measurement.Measurement;

/**
 * Where verdicts are kept for ever. Safe for use from many threads.
 */
public interface VerdictLedger {

    /** The stored verdict of a measurement, with its trace. */
    Optional<StoredVerdict> find(String measurementId);

    /** All verdicts of a part in commit order. */
    List<StoredVerdict> findBySerial(String product, String serial);

    /**
     * Stores a judgement. The stage completes only after the commit is on disk.
     *
     * <p>Same measurement id and same content hash as an earlier one: completes with the earlier stored verdict and
     * stores nothing. Same id and another hash: completes exceptionally with {@link MeasurementConflictException}.
     * When the store cannot take it (disk full, locked, queue full): completes exceptionally with
     * {@link LedgerUnavailableException}, and nothing is stored.
     *
     * @param measurement   what was measured
     * @param contentSha256 hash of what the tester sent
     * @param judgement     what was decided
     */
    CompletionStage<StoredVerdict> append(Measurement measurement, String contentSha256, Judgement judgement);

    /** Whether a write would be taken now; the reason if not. */
    Optional<String> whyNotWritable();
}

package org.laddergate.records;

import java.nio.file.Path;
import java.time.Clock;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.Executor;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.VerdictLedger;

/**
 * The ledger in one SQLite file, {@code laddergate.db} in the data folder. One thread writes with group commit, a few
 * connections read; see docs/decisions/0004-sqlite-durability.md for what is promised and what it costs.
 *
 * <p>Look-ups fail with {@link org.laddergate.screening.LedgerUnavailableException} when the file cannot be read. A
 * failed commit stores nothing as far as the running program can tell; if the disk then loses power at that moment,
 * a verdict that was answered as unavailable may still be found later, and a repeat of the request gets it.
 */
public final class SqliteLedger implements VerdictLedger, AutoCloseable {
    private final LedgerWriter writer;
    private final ReaderPool readers;

    private SqliteLedger(LedgerWriter writer, ReaderPool readers) {
        this.writer = writer;
        this.readers = readers;
    }

    /** Opens with default settings; answers arrive on the common pool of the JVM. */
    public static SqliteLedger open(Path dataFolder, Clock clock) {
        return open(dataFolder, clock, LedgerSettings.defaults(), new CompletableFuture<Void>().defaultExecutor());
    }

    /**
     * Opens the ledger of a data folder, creating folder and file if missing and migrating an older file.
     *
     * @param dataFolder     on a local disk; a network file system breaks the promises
     * @param clock          for {@link StoredVerdict#storedAt()}
     * @param settings       sizes and patience
     * @param answerExecutor where the stages of {@link #append} complete, never the writer thread; stays the caller's
     * @throws LedgerOpenException if the file is from a newer version, not a ledger, or cannot be opened
     */
    public static SqliteLedger open(Path dataFolder, Clock clock, LedgerSettings settings, Executor answerExecutor) {
        LedgerFile file = LedgerFile.in(dataFolder, settings.busyTimeoutMillis());
        LedgerWriter writer = new LedgerWriter(SessionKeeper.open(file), settings, clock, answerExecutor);
        writer.start();
        return new SqliteLedger(writer, new ReaderPool(file, settings.readers()));
    }

    /**
     * {@inheritDoc}
     *
     * <p>Also completes exceptionally with {@link InvalidInputException} if a text of the measurement contains half a
     * surrogate pair or its time lies outside the years 1678 to 2261. The sign of a zero among the scalars of the
     * judgement is not kept.
     */
    @Override
    public CompletionStage<StoredVerdict> append(Measurement measurement, String contentSha256, Judgement judgement) {
        AppendRequest request;
        try {
            request = AppendRequest.of(measurement, contentSha256, judgement);
        } catch (InvalidInputException e) {
            return CompletableFuture.failedFuture(e);
        }
        writer.submit(request);
        return request.answer();
    }

    @Override
    public Optional<StoredVerdict> find(String measurementId) {
        if (!AppendRequest.isUnicode(measurementId)) {
            return Optional.empty();
        }
        return readers.read(reader -> reader.find(measurementId));
    }

    @Override
    public List<StoredVerdict> findBySerial(String product, String serial) {
        if (!AppendRequest.isUnicode(product) || !AppendRequest.isUnicode(serial)) {
            return List.of();
        }
        return readers.read(reader -> reader.findBySerial(product, serial));
    }

    /** {@inheritDoc} Costs no disk access; while the ledger fails, the writer tries out writing by itself. */
    @Override
    public Optional<String> whyNotWritable() {
        return writer.whyNotWritable();
    }

    public LedgerStatistics statistics() {
        return writer.statistics();
    }

    /** Runs something on the writer connection, between two commits. */
    CompletableFuture<Void> onWriter(Errand.Work work) throws InterruptedException {
        Errand errand = new Errand(work);
        writer.run(errand);
        return errand.done();
    }

    /** Stores what is queued, then closes; later calls fail as unavailable. Closing twice is harmless. */
    @Override
    public void close() {
        try {
            // First, because SQLite clears the write-ahead log when the last connection closes, and a reader cannot.
            readers.close();
        } finally {
            writer.close();
        }
    }
}

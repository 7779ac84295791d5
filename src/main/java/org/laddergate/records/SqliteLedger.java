package org.laddergate.records;

import java.nio.file.Path;
import java.sql.Connection;
import java.sql.SQLException;
import java.sql.Statement;
import java.time.Clock;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.ArrayBlockingQueue;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.LinkedBlockingQueue;
import java.util.concurrent.TimeUnit;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.LedgerUnavailableException;
import org.laddergate.screening.MeasurementConflictException;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.VerdictLedger;

/**
 * The ledger in one SQLite file.
 *
 * <p>One thread writes. It takes whatever requests wait, up to a number, into one transaction and answers them after its
 * commit: under load the cost of forcing the disk is shared, when idle nobody waits for company. Readers have connections of
 * their own and never wait for the writer.
 *
 * <p>When the disk is full or the file locked, the whole batch is rolled back and answered with
 * {@link LedgerUnavailableException}; the next batch tries again, so the ledger recovers by itself.
 */
public final class SqliteLedger implements VerdictLedger, AutoCloseable {
    private static final int LONGEST_QUEUE = 1024;
    private static final int LARGEST_BATCH = 64;
    private static final int READERS = 4;
    private static final long PROBE_MILLIS = 1000;

    private final Clock clock;
    private final CommitListener listener;
    private final BlockingQueue<Request> queue = new ArrayBlockingQueue<>(LONGEST_QUEUE);
    private final BlockingQueue<Reader> readers = new LinkedBlockingQueue<>();
    private final Connection connection;
    private final Inserter inserter;
    private final Reader own;
    private final Thread writer;
    private volatile boolean closing;
    private volatile Optional<String> trouble = Optional.empty();
    private volatile long probedAtMillis;

    private record Request(Measurement measurement, String contentSha256, Judgement judgement,
            CompletableFuture<StoredVerdict> answer) {}

    /** Told about every commit. */
    public interface CommitListener {
        /**
         * @param verdicts verdicts in the transaction
         * @param nanos    time from its begin to the end of its commit [ns]
         */
        void committed(int verdicts, long nanos);
    }

    private SqliteLedger(Path folder, Clock clock, CommitListener listener) throws SQLException {
        this.clock = clock;
        this.listener = listener;
        this.connection = Database.openWriter(folder);
        this.inserter = new Inserter(connection);
        this.own = new Reader(connection, false);
        for (int i = 0; i < READERS; i++) {
            readers.add(new Reader(Database.openReader(folder), true));
        }
        this.writer = new Thread(this::write, "ledger-writer");
        writer.start();
    }

    /** Opens or creates the ledger in a folder. */
    public static SqliteLedger open(Path folder, Clock clock, CommitListener listener) {
        try {
            return new SqliteLedger(folder, clock, listener);
        } catch (SQLException e) {
            throw new IllegalStateException("cannot open the ledger in " + folder + ": " + e.getMessage(), e);
        }
    }

    /** Requests waiting for the writer. */
    public int queueLength() {
        return queue.size();
    }

    @Override
    public Optional<StoredVerdict> find(String measurementId) {
        return reading(r -> r.find(measurementId));
    }

    @Override
    public List<StoredVerdict> findBySerial(String product, String serial) {
        return reading(r -> r.findBySerial(product, serial));
    }

    private interface Query<T> {
        T run(Reader reader) throws SQLException;
    }

    private <T> T reading(Query<T> query) {
        Reader reader;
        try {
            reader = readers.take();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new LedgerUnavailableException("interrupted while waiting to read", e);
        }
        try {
            return query.run(reader);
        } catch (SQLException e) {
            throw new LedgerUnavailableException("cannot read: " + e.getMessage(), e);
        } finally {
            readers.add(reader);
        }
    }

    @Override
    public CompletionStage<StoredVerdict> append(Measurement measurement, String contentSha256, Judgement judgement) {
        CompletableFuture<StoredVerdict> answer = new CompletableFuture<>();
        if (closing || !queue.offer(new Request(measurement, contentSha256, judgement, answer))) {
            answer.completeExceptionally(new LedgerUnavailableException(
                    closing ? "the ledger is closing" : "more than " + LONGEST_QUEUE + " verdicts wait to be stored", null));
        }
        return answer;
    }

    @Override
    public Optional<String> whyNotWritable() {
        if (queue.remainingCapacity() == 0) {
            return Optional.of("the queue of verdicts to store is full");
        }
        if (trouble.isPresent() && System.currentTimeMillis() - probedAtMillis > PROBE_MILLIS) {
            probedAtMillis = System.currentTimeMillis();
            // A probe without a request: the writer tries a small write and clears or renews the trouble.
            queue.offer(new Request(null, "", null, new CompletableFuture<>()));
        }
        return trouble;
    }

    private void write() {
        List<Request> batch = new ArrayList<>(LARGEST_BATCH);
        while (!closing || !queue.isEmpty()) {
            try {
                Request first = queue.poll(100, TimeUnit.MILLISECONDS);
                if (first != null) {
                    batch.add(first);
                    queue.drainTo(batch, LARGEST_BATCH - 1);
                    store(batch);
                }
            } catch (InterruptedException e) {
                closing = true;
            } finally {
                batch.clear();
            }
        }
    }

    private void store(List<Request> batch) {
        Map<Request, StoredVerdict> answers = new HashMap<>();
        Map<Request, RuntimeException> refusals = new HashMap<>();
        long start = System.nanoTime();
        int inserted;
        try {
            run("BEGIN IMMEDIATE");
            inserted = insertAll(batch, answers, refusals);
            run("COMMIT");
        } catch (SQLException | RuntimeException e) {
            rollBack();
            trouble = Optional.of(describe(e));
            probedAtMillis = System.currentTimeMillis();
            LedgerUnavailableException failure = new LedgerUnavailableException("cannot store: " + describe(e), e);
            batch.forEach(r -> r.answer().completeExceptionally(failure));
            return;
        }
        trouble = Optional.empty();
        if (inserted > 0) {
            listener.committed(inserted, System.nanoTime() - start);
        }
        answers.forEach((request, stored) -> request.answer().complete(stored));
        refusals.forEach((request, refusal) -> request.answer().completeExceptionally(refusal));
    }

    private int insertAll(List<Request> batch, Map<Request, StoredVerdict> answers,
            Map<Request, RuntimeException> refusals) throws SQLException {
        long sequence = inserter.lastSequence();
        int inserted = 0;
        for (Request r : batch) {
            if (r.measurement() == null) {
                probe();
                continue;
            }
            Optional<StoredVerdict> earlier = own.find(r.measurement().measurementId());
            if (earlier.isEmpty()) {
                answers.put(r, inserter.insert(++sequence, r.measurement(), r.contentSha256(), r.judgement(),
                        clock.instant()));
                inserted++;
            } else if (earlier.get().contentSha256().equals(r.contentSha256())) {
                answers.put(r, earlier.get());
            } else {
                refusals.put(r, new MeasurementConflictException(r.measurement().measurementId()));
            }
        }
        return inserted;
    }

    /** Writes and takes back a page, which needs space on the disk and the write lock. */
    private void probe() throws SQLException {
        run("SAVEPOINT probe");
        run("CREATE TABLE probe (filler BLOB NOT NULL) STRICT");
        run("INSERT INTO probe VALUES (zeroblob(8192))");
        run("ROLLBACK TO probe");
        run("RELEASE probe");
    }

    private void run(String sql) throws SQLException {
        try (Statement s = connection.createStatement()) {
            s.execute(sql);
        }
    }

    private void rollBack() {
        try {
            run("ROLLBACK");
        } catch (SQLException e) {
            // SQLite may have rolled back by itself, as after a full disk; then there is nothing left to undo.
            if (trouble.isEmpty()) {
                trouble = Optional.of(describe(e));
            }
        }
    }

    /** By result code, never by the wording of a message. */
    private static String describe(Exception e) {
        if (e instanceof org.sqlite.SQLiteException sqlite) {
            return switch (sqlite.getResultCode()) {
                case SQLITE_FULL -> "the disk is full";
                case SQLITE_BUSY, SQLITE_BUSY_SNAPSHOT, SQLITE_LOCKED -> "the database is locked by another program";
                case SQLITE_READONLY -> "the database is read-only";
                default -> "database error " + sqlite.getResultCode().name();
            };
        }
        return e.getClass().getSimpleName();
    }

    /** The connection that writes, for tests that provoke faults. */
    Connection writerConnection() {
        return connection;
    }

    /** Stores what waits, then closes the file. */
    @Override
    public void close() {
        closing = true;
        try {
            writer.join();
            for (Reader r : readers) {
                r.close();
            }
            own.close();
            connection.close();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
        } catch (SQLException e) {
            throw new IllegalStateException("cannot close the ledger", e);
        }
    }
}

package org.laddergate.records;

import java.sql.SQLException;
import java.time.Clock;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.ArrayBlockingQueue;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.Executor;
import java.util.concurrent.RejectedExecutionException;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.LongAdder;
import org.laddergate.screening.LedgerUnavailableException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * The one thread that writes. It takes what is queued, up to a limit, commits it at once and only then answers; while a
 * commit waits for the disk the next batch gathers, so batches grow with the load and an idle ledger adds no delay.
 *
 * <p>After a failure it goes on with the next batch, on a new connection if need be. While nobody appends it tries out
 * writing from time to time, so that the reason disappears soon after its cause. Safe for use from many threads.
 */
final class LedgerWriter implements AutoCloseable {
    private static final Logger LOG = LoggerFactory.getLogger(LedgerWriter.class);

    private final SessionKeeper sessions;
    private final LedgerSettings settings;
    private final Clock clock;
    private final Executor answerExecutor;
    private final BlockingQueue<WriterRequest> queue;
    private final Thread thread;
    private final LongAdder refused = new LongAdder();
    private final Object gate = new Object();
    private volatile boolean closing;
    private volatile Optional<String> failure = Optional.empty();
    private volatile LedgerStatistics statistics = LedgerStatistics.NONE;

    LedgerWriter(SessionKeeper sessions, LedgerSettings settings, Clock clock, Executor answerExecutor) {
        this.sessions = sessions;
        this.settings = settings;
        this.clock = clock;
        this.answerExecutor = answerExecutor;
        this.queue = new ArrayBlockingQueue<>(settings.queueCapacity());
        this.thread = new Thread(this::run, "ledger-writer");
        thread.setDaemon(true);
    }

    void start() {
        thread.start();
    }

    /** Queues a request, or refuses it at once when the queue is full or the ledger closed. */
    void submit(AppendRequest request) {
        boolean taken;
        synchronized (gate) {
            taken = !closing && queue.offer(request);
        }
        if (!taken) {
            refused.increment();
            request.answer().completeExceptionally(new LedgerUnavailableException(
                    whyNotWritable().orElse("too many measurements are waiting to be stored"), null));
        }
    }

    /** Runs something on the writer connection after everything queued so far. */
    void run(Errand errand) throws InterruptedException {
        queue.put(errand);
    }

    Optional<String> whyNotWritable() {
        if (closing) {
            return Optional.of("the ledger is closed");
        }
        if (failure.isEmpty() && queue.remainingCapacity() == 0) {
            return Optional.of("too many measurements are waiting to be stored");
        }
        return failure;
    }

    LedgerStatistics statistics() {
        return statistics.now(refused.sum(), queue.size());
    }

    private void run() {
        List<WriterRequest> taken = new ArrayList<>(settings.batchLimit());
        while (!closing || !queue.isEmpty()) {
            try {
                take(taken);
            } catch (InterruptedException e) {
                LOG.warn("the ledger writer ignores an interrupt; it ends when the ledger is closed");
            }
            work(taken);
            taken.clear();
        }
        sessions.discard();
    }

    private void take(List<WriterRequest> taken) throws InterruptedException {
        WriterRequest first = failure.isEmpty() ? queue.take()
                : queue.poll(settings.probeInterval().toNanos(), TimeUnit.NANOSECONDS);
        if (first == null) {
            probe();
        } else {
            taken.add(first);
            queue.drainTo(taken, settings.batchLimit() - 1);
        }
    }

    private void work(List<WriterRequest> taken) {
        List<AppendRequest> batch = new ArrayList<>(taken.size());
        for (WriterRequest request : taken) {
            if (request instanceof AppendRequest append) {
                batch.add(append);
            } else if (request instanceof Errand errand) {
                commit(batch);
                batch.clear();
                perform(errand);
            }
        }
        commit(batch);
    }

    /** Commits the batch, without those of its requests that could never be stored. */
    private void commit(List<AppendRequest> batch) {
        List<AppendRequest> rest = new ArrayList<>(batch);
        while (!rest.isEmpty()) {
            try {
                long start = System.nanoTime();
                BatchResult result = sessions.current().store(rest, clock.instant());
                statistics = statistics.plusCommit(rest.size(), result.storedVerdicts(), System.nanoTime() - start);
                recovered();
                result.answers().forEach(this::answer);
                return;
            } catch (RowFaultException e) {
                refuse(rest.remove(e.index()), e.getCause());
                sessions.renewStatements();
            } catch (SQLException e) {
                failed(SqlFaults.reason(e), e);
                sessions.repairAfter(e);
                refuseAll(rest, e);
                return;
            } catch (RuntimeException | Error e) {
                failed(crash(e), e);
                sessions.discard();
                refuseAll(rest, e);
                return;
            }
        }
    }

    private void refuse(AppendRequest request, Throwable cause) {
        LOG.error("a verdict cannot be stored", cause);
        answer(() -> request.answer().completeExceptionally(
                new IllegalStateException("measurement " + request.measurementId() + " cannot be stored", cause)));
    }

    private void refuseAll(List<AppendRequest> requests, Throwable cause) {
        statistics = statistics.plusFailedBatch();
        refused.add(requests.size());
        String reason = failure.orElse("the database does not work");
        requests.forEach(r -> answer(
                () -> r.answer().completeExceptionally(new LedgerUnavailableException(reason, cause))));
    }

    /** Whoever waits for an answer runs elsewhere: a slow client must not hold up the next commit. */
    private void answer(Runnable completion) {
        try {
            answerExecutor.execute(completion);
        } catch (RejectedExecutionException e) {
            completion.run();
        }
    }

    private void probe() {
        try {
            sessions.current().probe();
            recovered();
        } catch (SQLException e) {
            failed(SqlFaults.reason(e), e);
            sessions.repairAfter(e);
        } catch (RuntimeException e) {
            failed(crash(e), e);
            sessions.discard();
        }
    }

    private void perform(Errand errand) {
        try {
            errand.run(sessions.current().connection());
        } catch (SQLException | RuntimeException e) {
            errand.fail(e);
        }
    }

    private void failed(String reason, Throwable cause) {
        if (!failure.equals(Optional.of(reason))) {
            LOG.error("the ledger cannot store: {}", reason, cause);
        }
        failure = Optional.of(reason);
    }

    private static String crash(Throwable e) {
        return "the ledger writer failed (" + e.getClass().getSimpleName() + ")";
    }

    private void recovered() {
        if (failure.isPresent()) {
            LOG.info("the ledger stores again");
            failure = Optional.empty();
        }
    }

    /** Refuses new requests, stores what is queued and ends the thread. */
    @Override
    public void close() {
        synchronized (gate) {
            closing = true;
        }
        boolean interrupted = false;
        while (thread.isAlive()) {
            try {
                queue.offer(new Errand(connection -> { }), 100, TimeUnit.MILLISECONDS);
                thread.join(100);
            } catch (InterruptedException e) {
                interrupted = true;
            }
        }
        if (interrupted) {
            Thread.currentThread().interrupt();
        }
    }
}

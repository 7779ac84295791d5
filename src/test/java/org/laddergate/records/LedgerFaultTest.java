package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.sql.Connection;
import java.time.Duration;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.CountDownLatch;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.LedgerUnavailableException;
import org.laddergate.screening.StoredVerdict;

/** Faults provoked for real; after each the same open ledger goes on by itself. */
@Tag("storage")
class LedgerFaultTest {
    private static final String SHA = "a".repeat(64);

    @TempDir
    Path folder;
    private SqliteLedger ledger;
    private int appended;
    private final Judgement judgement = new RandomVerdicts(1).typicalJudgement();

    @BeforeEach
    void open() {
        ledger = Ledgers.open(folder);
    }

    @AfterEach
    void close() {
        ledger.close();
    }

    private CompletionStage<StoredVerdict> append() {
        return ledger.append(measurement(++appended), SHA, judgement);
    }

    private static Measurement measurement(int n) {
        return RandomVerdicts.measurement("m" + n, "hb40", "s" + n % 3);
    }

    /** Lets the file grow by some pages only; the limit belongs to the connection. */
    private void limitPages(int more) throws Exception {
        ledger.onWriter(connection -> {
            int limit = Migrations.integer(connection, "PRAGMA page_count") + more;
            Ledgers.execute(connection, "PRAGMA max_page_count = " + limit);
        }).get();
    }

    @Test
    void fullDisk_failsTheWholeBatch_andTheLedgerRecoversByItself() throws Exception {
        Ledgers.await(append());
        limitPages(8);
        CountDownLatch release = Ledgers.holdWriter(ledger);
        List<CompletionStage<StoredVerdict>> batch = new ArrayList<>();
        for (int i = 0; i < 10; i++) {
            batch.add(append());
        }
        release.countDown();
        for (CompletionStage<StoredVerdict> answer : batch) {
            Ledgers.failureOf(LedgerUnavailableException.class, answer);
        }
        assertEquals(1, ledger.statistics().failedBatches());
        assertEquals(10, ledger.statistics().refusedRequests());
        for (int n = 2; n <= appended; n++) {
            assertEquals(Optional.empty(), ledger.find("m" + n));
        }

        limitPages(100_000);
        Ledgers.waitUntil(() -> ledger.whyNotWritable().isEmpty());
        assertEquals(2, Ledgers.await(append()).sequence());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void fullDisk_isReportedAsLongAsItLasts_andEarlierVerdictsStayReadable() throws Exception {
        StoredVerdict first = Ledgers.await(append());
        limitPages(0);
        Ledgers.failureOf(LedgerUnavailableException.class, append());
        for (int i = 0; i < 5; i++) {
            assertTrue(ledger.whyNotWritable().orElseThrow().contains("SQLITE_FULL"));
            Ledgers.failureOf(LedgerUnavailableException.class, append());
            Thread.sleep(30);
        }
        Ledgers.assertSame(first, ledger.find("m1").orElseThrow());

        limitPages(100_000);
        assertEquals(2, Ledgers.await(append()).sequence());
        assertEquals(Optional.empty(), ledger.whyNotWritable());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void lockHeldByAnotherProcess_isWaitedForAndThenReported() throws Exception {
        Ledgers.await(append());
        try (Connection other = Ledgers.foreignConnection(folder)) {
            Ledgers.execute(other, "BEGIN IMMEDIATE");
            Ledgers.failureOf(LedgerUnavailableException.class, append());
            assertTrue(ledger.whyNotWritable().orElseThrow().contains("SQLITE_BUSY"));
            assertTrue(ledger.find("m1").isPresent(), "readers do not wait for writers");
            Ledgers.execute(other, "ROLLBACK");
        }
        Ledgers.waitUntil(() -> ledger.whyNotWritable().isEmpty());
        assertEquals(2, Ledgers.await(append()).sequence());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void faultThatMayHaveSpoiltTheConnection_isFollowedByANewConnection() throws Exception {
        Ledgers.await(append());
        ledger.onWriter(connection -> Ledgers.execute(connection, "PRAGMA query_only = ON")).get();
        Ledgers.failureOf(LedgerUnavailableException.class, append());
        assertEquals(2, Ledgers.await(append()).sequence());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void transactionLeftOpenOnTheWriter_costsOneBatch_notTheLedger() throws Exception {
        ledger.onWriter(connection -> Ledgers.execute(connection, "BEGIN IMMEDIATE")).get();
        Ledgers.failureOf(LedgerUnavailableException.class, append());
        assertEquals(1, Ledgers.await(append()).sequence());
        Ledgers.assertGapless(folder, 1);
    }

    @Test
    void fullQueue_refusesAtOnce_andLosesNothingItTook() throws Exception {
        ledger.close();
        ledger = Ledgers.open(folder, new LedgerSettings(64, 4, 100, 1, Duration.ofMillis(20)));
        CountDownLatch release = Ledgers.holdWriter(ledger);
        List<CompletionStage<StoredVerdict>> taken = new ArrayList<>();
        for (int i = 0; i < 4; i++) {
            taken.add(append());
        }
        CompletionStage<StoredVerdict> refused = append();
        assertTrue(refused.toCompletableFuture().isCompletedExceptionally());
        Ledgers.failureOf(LedgerUnavailableException.class, refused);
        assertTrue(ledger.whyNotWritable().isPresent());
        assertEquals(4, ledger.statistics().queueDepth());
        release.countDown();

        taken.forEach(Ledgers::await);
        assertEquals(Optional.empty(), ledger.whyNotWritable());
        Ledgers.assertGapless(folder, 4);
    }

    @Test
    void closing_storesWhatIsQueued_andRefusesTheRest() throws Exception {
        CountDownLatch release = Ledgers.holdWriter(ledger);
        CompletionStage<StoredVerdict> queued = append();
        Thread closer = new Thread(ledger::close);
        closer.start();
        Ledgers.waitUntil(() -> ledger.whyNotWritable().isPresent());
        Ledgers.failureOf(LedgerUnavailableException.class, append());
        release.countDown();
        closer.join();

        assertEquals(1, Ledgers.await(queued).sequence());
        Ledgers.assertGapless(folder, 1);
        ledger.close();
    }

    @Test
    void slowReceiverOfAnAnswer_doesNotHoldUpTheNextCommit() throws Exception {
        ledger.close();
        CountDownLatch slow = new CountDownLatch(1);
        ledger = SqliteLedger.open(folder, Ledgers.CLOCK);
        // Held until the receiver is attached: on a completed stage it would run, and wait, in this thread.
        CountDownLatch release = Ledgers.holdWriter(ledger);
        append().thenAccept(verdict -> {
            try {
                slow.await();
            } catch (InterruptedException e) {
                throw new IllegalStateException(e);
            }
        });
        release.countDown();
        append();
        Ledgers.waitUntil(() -> ledger.find("m2").isPresent());
        slow.countDown();
    }
}

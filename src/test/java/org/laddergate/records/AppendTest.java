package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.TimeUnit;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.MeasurementConflictException;
import org.laddergate.screening.StoredVerdict;

@Tag("storage")
class AppendTest {
    private static final String SHA_A = "a".repeat(64);
    private static final String SHA_B = "b".repeat(64);

    @TempDir
    Path folder;
    private SqliteLedger ledger;
    private final Judgement judgement = new RandomVerdicts(1).typicalJudgement();
    private final Judgement otherJudgement = new RandomVerdicts(2).typicalJudgement();

    @BeforeEach
    void open() {
        ledger = Ledgers.open(folder);
    }

    @AfterEach
    void close() {
        ledger.close();
    }

    private static Measurement measurement(String id) {
        return RandomVerdicts.measurement(id, "hb40", "serial of " + id);
    }

    @Test
    void sameIdAndContent_getsTheEarlierVerdict_andStoresNothing() throws Exception {
        StoredVerdict first = Ledgers.await(ledger.append(measurement("m"), SHA_A, judgement));
        StoredVerdict again = Ledgers.await(ledger.append(measurement("m"), SHA_A, otherJudgement));
        Ledgers.assertSame(first, again);
        Ledgers.assertGapless(folder, 1);
    }

    @Test
    void sameIdAndOtherContent_isAConflict_andTheEarlierVerdictStays() throws Exception {
        StoredVerdict first = Ledgers.await(ledger.append(measurement("m"), SHA_A, judgement));
        Ledgers.failureOf(MeasurementConflictException.class, ledger.append(measurement("m"), SHA_B, judgement));
        Ledgers.assertSame(first, ledger.find("m").orElseThrow());
        Ledgers.assertGapless(folder, 1);
    }

    @Test
    void repeatsAndConflicts_withinOneBatch_leaveTheNeighboursAlone() throws Exception {
        CountDownLatch release = Ledgers.holdWriter(ledger);
        CompletionStage<StoredVerdict> first = ledger.append(measurement("1"), SHA_A, judgement);
        CompletionStage<StoredVerdict> repeat = ledger.append(measurement("1"), SHA_A, otherJudgement);
        CompletionStage<StoredVerdict> conflict = ledger.append(measurement("1"), SHA_B, judgement);
        CompletionStage<StoredVerdict> neighbour = ledger.append(measurement("2"), SHA_A, judgement);
        release.countDown();

        Ledgers.assertSame(Ledgers.await(first), Ledgers.await(repeat));
        Ledgers.failureOf(MeasurementConflictException.class, conflict);
        assertEquals(2, Ledgers.await(neighbour).sequence());
        assertEquals(4, ledger.statistics().lastBatchSize());
        assertEquals(2, ledger.statistics().storedVerdicts());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void aRowTheSchemaRefuses_failsAlone() throws Exception {
        CountDownLatch release = Ledgers.holdWriter(ledger);
        CompletionStage<StoredVerdict> before = ledger.append(measurement("1"), SHA_A, judgement);
        CompletionStage<StoredVerdict> bad = ledger.append(measurement("2"), "not a hash", judgement);
        CompletionStage<StoredVerdict> after = ledger.append(measurement("3"), SHA_A, judgement);
        release.countDown();

        assertEquals(1, Ledgers.await(before).sequence());
        Ledgers.failureOf(IllegalStateException.class, bad);
        assertEquals(2, Ledgers.await(after).sequence());
        assertEquals(true, ledger.whyNotWritable().isEmpty());
        Ledgers.assertGapless(folder, 2);
    }

    @Test
    void attempts_countTheMeasurementsOfOnePart_inOneBatchAndOverBatches() throws Exception {
        CountDownLatch release = Ledgers.holdWriter(ledger);
        List<CompletionStage<StoredVerdict>> answers = new ArrayList<>();
        for (String[] part : new String[][] {{"p", "s"}, {"p", "s"}, {"q", "s"}, {"p", "t"}}) {
            answers.add(ledger.append(RandomVerdicts.measurement("m" + answers.size(), part[0], part[1]), SHA_A,
                    judgement));
        }
        release.countDown();
        answers.add(ledger.append(RandomVerdicts.measurement("m4", "p", "s"), SHA_A, judgement));

        assertEquals(List.of(1, 2, 1, 1, 3), answers.stream().map(a -> Ledgers.await(a).attempt()).toList());
        assertEquals(List.of("m0", "m1", "m4"),
                ledger.findBySerial("p", "s").stream().map(StoredVerdict::measurementId).toList());
        assertEquals(List.of(), ledger.findBySerial("p", "unknown"));
    }

    @Test
    void eightThreads_racingWithTheSameIds_storeEachOnce() throws Exception {
        int threads = 8;
        int ids = 100;
        ExecutorService pool = Executors.newFixedThreadPool(threads);
        CountDownLatch start = new CountDownLatch(1);
        List<Future<List<Long>>> runs = new ArrayList<>();
        for (int t = 0; t < threads; t++) {
            runs.add(pool.submit(() -> {
                start.await();
                List<Long> sequences = new ArrayList<>();
                for (int i = 0; i < ids; i++) {
                    sequences.add(Ledgers.await(ledger.append(measurement("m" + i), SHA_A, judgement)).sequence());
                }
                return sequences;
            }));
        }
        start.countDown();
        Set<List<Long>> distinct = new HashSet<>();
        for (Future<List<Long>> run : runs) {
            distinct.add(run.get(60, TimeUnit.SECONDS));
        }
        pool.shutdown();
        assertEquals(1, distinct.size(), "every thread was told the same sequences");
        Ledgers.assertGapless(folder, ids);
    }

    /** The ledger of these tests answers on the writer thread, so a look-up here happens right at the answer. */
    @Test
    void answer_isGivenOnlyWhenOtherConnectionsSeeTheVerdict() throws Exception {
        CountDownLatch release = Ledgers.holdWriter(ledger);
        CompletableFuture<Boolean> seen = ledger.append(measurement("1"), SHA_A, judgement)
                .thenApply(verdict -> ledger.find("1").isPresent()).toCompletableFuture();
        release.countDown();
        assertEquals(true, seen.get(30, TimeUnit.SECONDS));
    }

    @Test
    void statistics_addUp() {
        for (int i = 0; i < 5; i++) {
            Ledgers.await(ledger.append(measurement("m" + i % 3), SHA_A, judgement));
        }
        LedgerStatistics statistics = ledger.statistics();
        assertEquals(5, statistics.committedRequests());
        assertEquals(3, statistics.storedVerdicts());
        assertEquals(5.0, statistics.meanBatchSize() * statistics.commits(), 1e-12);
        assertEquals(0, statistics.queueDepth());
        assertEquals(0, statistics.failedBatches() + statistics.refusedRequests());
    }
}

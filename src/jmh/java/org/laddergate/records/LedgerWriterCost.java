package org.laddergate.records;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.lang.management.ThreadInfo;
import java.lang.management.ThreadMXBean;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.Comparator;
import java.util.List;
import java.util.concurrent.Semaphore;
import java.util.stream.Stream;
import org.laddergate.screening.Judgement;

/**
 * Processor time of the writer thread per append, which a busy machine disturbs less than elapsed time. Arguments: how
 * many appends are under way at once, and how many to make (a third of them warms up).
 */
final class LedgerWriterCost {
    private LedgerWriterCost() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        int underWay = Integer.parseInt(args[0]);
        int appends = Integer.parseInt(args[1]);
        Path folder = Files.createTempDirectory("ledger-cost");
        try (SqliteLedger ledger = SqliteLedger.open(folder, Clock.systemUTC(), LedgerSettings.defaults(),
                Runnable::run)) {
            run(ledger, underWay, 0, appends / 3);
            LedgerStatistics before = ledger.statistics();
            long cpuNanos = -writerCpuNanos();
            long nanos = -System.nanoTime();
            run(ledger, underWay, appends / 3, appends);
            cpuNanos += writerCpuNanos();
            nanos += System.nanoTime();
            LedgerStatistics after = ledger.statistics();
            double verdicts = after.storedVerdicts() - before.storedVerdicts();
            System.out.printf("%d under way: %.0f verdicts/s, batch %.1f, writer CPU %.0f us, %.1f KiB/verdict%n",
                    underWay, verdicts / nanos * 1e9, verdicts / (after.commits() - before.commits()),
                    cpuNanos / verdicts / 1e3, Files.size(folder.resolve(LedgerFile.NAME)) / 1024.0 / appends);
        }
        try (Stream<Path> files = Files.walk(folder)) {
            for (Path file : files.sorted(Comparator.reverseOrder()).toList()) {
                Files.delete(file);
            }
        }
    }

    private static void run(SqliteLedger ledger, int underWay, int from, int to) throws InterruptedException {
        RandomVerdicts random = new RandomVerdicts(1);
        List<Judgement> judgements = Stream.generate(random::typicalJudgement).limit(64).toList();
        Semaphore free = new Semaphore(underWay);
        for (int n = from; n < to; n++) {
            free.acquire();
            ledger.append(RandomVerdicts.measurement("eol3-20261201-" + n, "hb40", "24A7-" + n), "a".repeat(64),
                    judgements.get(n % judgements.size())).whenComplete((verdict, failure) -> free.release());
        }
        free.acquire(underWay);
    }

    private static long writerCpuNanos() {
        ThreadMXBean threads = ManagementFactory.getThreadMXBean();
        for (ThreadInfo thread : threads.dumpAllThreads(false, false)) {
            if (thread.getThreadName().equals("ledger-writer")) {
                return threads.getThreadCpuTime(thread.getThreadId());
            }
        }
        throw new IllegalStateException("no ledger writer runs");
    }
}

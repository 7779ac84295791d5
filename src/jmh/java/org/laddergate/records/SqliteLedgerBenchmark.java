package org.laddergate.records;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.Comparator;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.atomic.AtomicLong;
import java.util.stream.Stream;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.StoredVerdict;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Level;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.TearDown;
import org.openjdk.jmh.annotations.Warmup;

/**
 * Durable appends of typical verdicts (six regions, 250 bins, 100 rungs); every client waits for its answer. Choose the
 * number of clients with {@code -t 1}, {@code -t 4}, {@code -t 16}. The file lies in {@code java.io.tmpdir}: point it
 * at the disk in question.
 */
@State(Scope.Benchmark)
@BenchmarkMode({Mode.Throughput, Mode.SampleTime})
@OutputTimeUnit(TimeUnit.SECONDS)
@Warmup(iterations = 3, time = 3)
@Measurement(iterations = 5, time = 4)
@Fork(2)
public class SqliteLedgerBenchmark {
    private final AtomicLong next = new AtomicLong();
    private Path folder;
    private SqliteLedger ledger;
    private List<Judgement> judgements;

    @Setup(Level.Trial)
    public void open() throws IOException {
        folder = Files.createTempDirectory("ledger-benchmark");
        ledger = SqliteLedger.open(folder, Clock.systemUTC());
        RandomVerdicts random = new RandomVerdicts(1);
        judgements = Stream.generate(random::typicalJudgement).limit(64).toList();
    }

    @TearDown(Level.Trial)
    public void close() throws IOException {
        System.out.println(ledger.statistics() + " mean batch " + ledger.statistics().meanBatchSize());
        ledger.close();
        try (Stream<Path> files = Files.walk(folder)) {
            for (Path file : files.sorted(Comparator.reverseOrder()).toList()) {
                Files.delete(file);
            }
        }
    }

    @Benchmark
    public StoredVerdict append() {
        long n = next.incrementAndGet();
        return ledger.append(RandomVerdicts.measurement("eol3-20261201-" + n, "hb40", "24A7-" + n), "a".repeat(64),
                judgements.get((int) (n % judgements.size()))).toCompletableFuture().join();
    }

    @Benchmark
    public StoredVerdict find() {
        if (next.get() == 0) {
            append();
        }
        return ledger.find("eol3-20261201-1").orElseThrow();
    }
}

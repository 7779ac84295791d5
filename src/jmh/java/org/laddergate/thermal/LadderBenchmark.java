package org.laddergate.thermal;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** Foster to Cauer by the subtraction-free recursion. */
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@State(Scope.Thread)
@Fork(2)
@Warmup(iterations = 5, time = 1)
@Measurement(iterations = 5, time = 1)
public class LadderBenchmark {
    @Param({"85", "120"})
    private int stages;

    private double[] r;
    private double[] tau;
    private double[] outR;
    private double[] outC;
    private FosterToCauer.Workspace work;

    @Setup
    public void prepare() {
        r = new double[stages];
        tau = new double[stages];
        for (int j = 0; j < stages; j++) {
            tau[j] = 1e-7 * Math.pow(10, 8.0 * j / stages);
            r[j] = 0.01 * (1 + 0.5 * Math.sin(0.3 * j));
        }
        outR = new double[stages];
        outC = new double[stages];
        work = new FosterToCauer.Workspace(stages);
    }

    @Benchmark
    public int fosterToCauer() {
        return FosterToCauer.computeLadderInto(r, tau, stages, outR, outC, work);
    }
}

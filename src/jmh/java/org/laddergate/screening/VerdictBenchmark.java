package org.laddergate.screening;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.time.Clock;
import java.util.concurrent.TimeUnit;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.files.DurableFiles;
import org.laddergate.limits.files.LimitFiles;
import org.laddergate.measurement.CurveFile;
import org.laddergate.measurement.CurveRules;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.SampledCurve;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** One verdict in memory, from samples to judgement, on the released limits of an invented product. */
@BenchmarkMode({Mode.AverageTime, Mode.SampleTime})
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@State(Scope.Thread)
@Fork(2)
@Warmup(iterations = 5, time = 1)
@org.openjdk.jmh.annotations.Measurement(iterations = 5, time = 1)
public class VerdictBenchmark {
    private Screener screener;
    private Measurement healthy;
    private Measurement faulty;

    @Setup
    public void prepare() {
        LimitSet limits = new LimitFiles(Path.of("limits"), Clock.systemUTC()).released("hb40").orElseThrow();
        screener = new Screener(Plan.of(limits));
        healthy = dense(read("golden-hb40-001", limits));
        faulty = dense(read("known-bad-hb40-01", limits));
    }

    private static Measurement read(String id, LimitSet limits) {
        byte[] text = DurableFiles.read(Path.of("golden-units", "hb40", id + ".csv")).getBytes(StandardCharsets.UTF_8);
        CurveRules rules = new CurveRules(CurveRules.DEFAULT_MAXIMUM_SAMPLES, Clock.systemUTC());
        return rules.measurement(CurveFile.read(text, rules.maximumSamples()).submission(), limits.recipe());
    }

    /** The demo curves have 25 points a decade; testers send about 250 points. */
    private static Measurement dense(Measurement m) {
        int n = 2 * m.curve().size() - 1;
        double[] t = new double[n];
        double[] v = new double[n];
        for (int i = 0; i < n; i++) {
            int k = i / 2;
            t[i] = i % 2 == 0 ? m.curve().timeSeconds(k) : Math.sqrt(m.curve().timeSeconds(k) * m.curve().timeSeconds(k + 1));
            v[i] = i % 2 == 0 ? m.curve().value(k) : 0.5 * (m.curve().value(k) + m.curve().value(k + 1));
        }
        return new Measurement(m.measurementId(), m.product(), m.serial(), m.lot(), m.station(), m.measuredAt(),
                m.curveKind(), m.heatingPowerWatts(), m.heatingSeconds(), SampledCurve.ofUnsafe(t, v));
    }

    @Benchmark
    public Judgement passingPart() {
        return screener.judge(healthy);
    }

    @Benchmark
    public Judgement failingPart() {
        return screener.judge(faulty);
    }
}

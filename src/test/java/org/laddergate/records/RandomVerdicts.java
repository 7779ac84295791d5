package org.laddergate.records;

import java.time.OffsetDateTime;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.Supplier;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.SampledCurve;
import org.laddergate.screening.Disposition;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.Trace;

/** Invented measurements and judgements from a seed: {@code any…} are hostile, {@code typical…} of real size. */
final class RandomVerdicts {
    private static final List<String> HOSTILE = List.of("", "'); DROP TABLE verdict; --", "\"", "a\0b", "\0", "\n\r\t",
            "µΩ·K/W", "日本語", "\ud83d\udd25", "e\u0301", "\u202eabc", "%s%n", "?", "NULL", "1e999", " x ", "\uffff",
            "x".repeat(5000));
    private static final double[] EDGES = {Double.NaN, Double.POSITIVE_INFINITY, Double.NEGATIVE_INFINITY, 0.0, 1.0,
        Double.MIN_VALUE, Double.MAX_VALUE, -Double.MAX_VALUE, 0.1, 1e15, 9007199254740993.0, -1.0};
    private static final SampledCurve NO_CURVE = SampledCurve.copyOf(new double[0], new double[0]);

    private final Random random;

    RandomVerdicts(long seed) {
        random = new Random(seed);
    }

    static Measurement measurement(String id, String product, String serial) {
        return new Measurement(id, product, serial, "L1", "eol3", OffsetDateTime.parse("2026-12-01T08:15:30.123+01:00"),
                CurveKind.COOLING, 80.0, 4.0, NO_CURVE);
    }

    Measurement anyMeasurement(String id) {
        OffsetDateTime at = OffsetDateTime.ofInstant(EpochNanos.instant(random.nextLong()),
                ZoneOffset.ofTotalSeconds(random.nextInt(2 * 64_800 + 1) - 64_800));
        return new Measurement(id, "p" + text(), "s" + text(), text(), text(), at, any(CurveKind.values()),
                Double.MIN_VALUE + random.nextDouble() * 1e6, random.nextBoolean() ? Double.POSITIVE_INFINITY : 4.0,
                NO_CURVE);
    }

    String sha256() {
        StringBuilder hex = new StringBuilder();
        while (hex.length() < 64) {
            hex.append(Character.forDigit(random.nextInt(16), 16));
        }
        return hex.toString();
    }

    Judgement anyJudgement() {
        return new Judgement(any(Outcome.values()), any(Disposition.values()), text(), several(this::text),
                probability(), several(this::region), random.nextBoolean(), real(), real(), real(),
                several(() -> new Reason(text(), text(), real(), real())), random.nextInt(Integer.MAX_VALUE), sha256(),
                text(), new Trace(reals(300), reals(300), integers(300), reals(200), reals(200)));
    }

    /** Six regions, 250 bins, 100 rungs: about 7 KiB of curves. */
    Judgement typicalJudgement() {
        List<RegionResult> regions = new ArrayList<>();
        for (int i = 0; i < 6; i++) {
            regions.add(new RegionResult("region-" + i, RegionRole.PART, true, random.nextDouble(),
                    random.nextDouble(), 0.01, 0.02, random.nextDouble(), random.nextDouble()));
        }
        return new Judgement(Outcome.PASS, Disposition.ACCEPT, "", List.of(), 0.99, regions, true, Double.NaN, 3.5,
                12.0, List.of(), 3, sha256(), "1", new Trace(uniform(250), uniform(250), new int[250], uniform(100),
                        uniform(100)));
    }

    String text() {
        if (random.nextBoolean()) {
            return HOSTILE.get(random.nextInt(HOSTILE.size()));
        }
        return random.ints(random.nextInt(20), 0, Character.MAX_CODE_POINT + 1)
                .filter(c -> c < Character.MIN_SURROGATE || c > Character.MAX_SURROGATE)
                .collect(StringBuilder::new, StringBuilder::appendCodePoint, StringBuilder::append).toString();
    }

    private RegionResult region() {
        return new RegionResult(text(), any(RegionRole.values()), random.nextBoolean(), real(), real(), real(), real(),
                probability(), probability());
    }

    private double real() {
        return random.nextBoolean() ? EDGES[random.nextInt(EDGES.length)] : Math.scalb(random.nextDouble(),
                random.nextInt(200) - 100);
    }

    private double probability() {
        return random.nextInt(4) == 0 ? Double.NaN : random.nextDouble();
    }

    /** Arbitrary bit patterns: NaN payloads, infinities, both zeros, subnormal numbers. */
    private double[] reals(int atMost) {
        return random.longs(length(atMost)).mapToDouble(bits -> bits % 7 == 0 ? -0.0 : Double.longBitsToDouble(bits))
                .toArray();
    }

    private double[] uniform(int length) {
        return random.doubles(length).toArray();
    }

    private int[] integers(int atMost) {
        return random.ints(length(atMost)).toArray();
    }

    private int length(int atMost) {
        return random.nextInt(4) == 0 ? 0 : random.nextInt(atMost);
    }

    private <T> List<T> several(Supplier<T> one) {
        List<T> list = new ArrayList<>();
        for (int n = random.nextInt(5); n > 0; n--) {
            list.add(one.get());
        }
        return list;
    }

    private <T> T any(T[] values) {
        return values[random.nextInt(values.length)];
    }
}

package org.laddergate.limits.evidence;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.DoubleUnaryOperator;
import java.util.stream.DoubleStream;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.FaultSignature.Shape;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.Recipe;

/**
 * Lists everything a deviation may be put down to: the regions with the faults their signatures describe, the usual
 * errors of a measurement worked out from the golden network, and smooth deviations that are neither.
 *
 * <p>The constants here are priors, the same for every product; they were checked on populations of different geometry
 * (docs/accuracy.md), none of them was fitted to one.
 */
final class SubjectCatalogue {
    /** Smooth relative error granted to a signature of the conduction model, and its length in ln t. */
    private static final double MODEL_BEND = 0.1;
    private static final double MODEL_BEND_LENGTH = 1.0;
    /** The same for a fault of unknown shape: only its start is certain. */
    private static final double UNKNOWN_SHAPE_BEND = 0.5;
    private static final double UNKNOWN_SHAPE_BEND_LENGTH = 1.5;
    private static final double SIZE_SPREAD = 0.25;
    private static final double WEIGHT_UNKNOWN_SHAPE = 0.1;
    private static final double WEIGHT_UNKNOWN_SHAPE_WITHOUT_LAYERS = 0.6;
    private static final double WEIGHT_THINNER = 0.05;

    private static final double HEATED_LAYER_WEIGHT = 0.1;
    private static final double PRIOR_EACH_MEASUREMENT_ERROR = 2e-4;
    private static final double PRIOR_OTHER_PRODUCT = 2e-4;
    private static final double PRIOR_UNEXPLAINED_OF_FAULTS = 0.05;

    private final GoldenModel model;
    private final Recipe recipe;
    private final FamilyModel family;
    private final ComparisonBins bins;
    private final double[] fineTimes;
    private final double[] logTimes;
    private final double[] golden;

    SubjectCatalogue(GoldenModel model, Recipe recipe, FamilyModel family) {
        this.model = model;
        this.recipe = recipe;
        this.family = family;
        LogTimeBins fine =
                LogTimeBins.spanning(model.firstEdgeSeconds(), model.lastEdgeSeconds(), model.binsPerDecade());
        this.bins = ComparisonBins.of(fine);
        this.fineTimes = fine.centresSeconds();
        this.logTimes = Arrays.stream(bins.centresSeconds()).map(Math::log).toArray();
        this.golden = reduce(model.goldenKelvin());
    }

    List<Subject> subjects(List<Region> regions, DecisionSettings settings) {
        List<Subject> all = new ArrayList<>();
        double weights = regions.stream().mapToDouble(this::priorWeight).sum();
        for (Region region : regions) {
            double each = settings.priorFaultRate() * priorWeight(region) / weights;
            Subject.Kind kind = region.role() == RegionRole.FIXTURE ? Subject.Kind.FIXTURE_REGION
                    : Subject.Kind.PART_REGION;
            all.add(new Subject(region.name(), kind, Math.log(each), faultsOf(region.name())));
        }
        double span = golden[0] - golden[golden.length - 1];
        all.add(new Subject("unexplained", Subject.Kind.UNEXPLAINED,
                Math.log(PRIOR_UNEXPLAINED_OF_FAULTS * settings.priorFaultRate()),
                free(1.2, 0.003 * span, 0.01 * span, 0.03 * span)));
        all.add(measurement("late_trigger", lateTriggers()));
        all.add(measurement("power_inconsistent", powerErrors(span)));
        all.add(measurement("timebase_inconsistent", timebaseErrors()));
        all.add(measurement("pulse_length_inconsistent", pulseErrors()));
        all.add(measurement("base_drift", drifts(span)));
        all.add(new Subject("unlike_product", Subject.Kind.MEASUREMENT, Math.log(PRIOR_OTHER_PRODUCT),
                free(1.2, 0.05 * span, 0.1 * span, 0.2 * span, 0.5 * span, span)));
        return all;
    }

    /**
     * Joints go wrong, crystals hardly ever: the region of the heated layer alone, which has no void signatures, gets
     * a tenth of a joint's prior (common practice, no source).
     */
    private double priorWeight(Region region) {
        boolean joint = !model.fromLayers() || model.signatures().stream()
                .anyMatch(s -> s.region().equals(region.name()) && !isEven(s));
        return joint ? 1 : HEATED_LAYER_WEIGHT;
    }

    private static boolean isEven(FaultSignature s) {
        return s.shape() == Shape.UNIFORM || s.shape() == Shape.THICKER;
    }

    private static Subject measurement(String code, List<Explanation> explanations) {
        return new Subject(code, Subject.Kind.MEASUREMENT, Math.log(PRIOR_EACH_MEASUREMENT_ERROR), explanations);
    }

    private List<Explanation> faultsOf(String region) {
        List<FaultSignature> own = model.signatures().stream().filter(s -> s.region().equals(region)).toList();
        long shapes = own.stream().map(FaultSignature::shape).distinct().count();
        double unknown = model.fromLayers() ? WEIGHT_UNKNOWN_SHAPE : WEIGHT_UNKNOWN_SHAPE_WITHOUT_LAYERS;
        double known = 1 - unknown - WEIGHT_THINNER;
        List<Explanation> all = new ArrayList<>();
        for (FaultSignature s : own) {
            long alike = own.stream().filter(o -> o.shape() == s.shape()).count();
            double[] sizes = isEven(s) ? new double[] {0.5, 1, 2} : new double[] {1};
            all.add(shaped(s).signature(s).weight(known / shapes / alike).sizes(sizes).spread(SIZE_SPREAD)
                    .bend(MODEL_BEND, MODEL_BEND_LENGTH).build(family));
        }
        FaultSignature slight = own.stream().filter(s -> s.shape() == Shape.UNIFORM)
                .min((a, b) -> Double.compare(a.severity(), b.severity())).orElseThrow();
        double unit = 1 / slight.severity();
        all.add(shaped(slight).signature(slight).weight(WEIGHT_THINNER).spread(SIZE_SPREAD)
                .sizes(-0.15 * unit, -0.3 * unit, -0.6 * unit).bend(MODEL_BEND, MODEL_BEND_LENGTH).build(family));
        all.add(shaped(slight).signature(slight).weight(unknown).spread(SIZE_SPREAD)
                .sizes(unknownSizes(slight))
                .bend(UNKNOWN_SHAPE_BEND, UNKNOWN_SHAPE_BEND_LENGTH).build(family));
        return all;
    }

    /**
     * Sizes of a fault of unknown shape: from an eighth of the region's resistance to four times; without a layer
     * table, where a thin region's resistance is known badly, on to a deviation of a third of the golden drop.
     */
    private double[] unknownSizes(FaultSignature slight) {
        double unit = 1 / slight.severity();
        double largest = 4 * unit;
        if (!model.fromLayers()) {
            double peak = 0;
            for (double d : slight.deviationKelvin()) {
                peak = Math.max(peak, Math.abs(d - slight.deviationKelvin()[0]));
            }
            largest = Math.max(largest, (golden[0] - golden[golden.length - 1]) / 3 / peak);
        }
        int steps = (int) Math.ceil(Math.log(largest / (0.125 * unit)) / Math.log(2)) + 1;
        double[] sizes = new double[steps];
        for (int k = 0; k < steps; k++) {
            sizes[k] = 0.125 * unit * Math.pow(2, k);
        }
        return sizes;
    }

    /** Deviations count from the start of the curve, so that bending cannot start before the fault is seen. */
    private Explanation.Builder shaped(FaultSignature s) {
        double start = s.deviationKelvin()[0];
        return new Explanation.Builder(logTimes, Arrays.stream(s.deviationKelvin()).map(d -> d - start).toArray());
    }

    private List<Explanation> free(double length, double... sigmasKelvin) {
        return DoubleStream.of(sigmasKelvin)
                .mapToObj(s -> new Explanation.Builder(logTimes, new double[logTimes.length])
                        .weight(1.0 / sigmasKelvin.length).free(s, length).build(family))
                .toList();
    }

    private List<Explanation> lateTriggers() {
        double cut = model.firstEdgeSeconds();
        double end = model.lastEdgeSeconds();
        int steps = (int) Math.ceil(Math.log(0.1 * end / (cut / 8)) / Math.log(1.5));
        List<Explanation> all = new ArrayList<>();
        for (int i = 0; i < steps; i++) {
            double delay = cut / 8 * Math.pow(1.5, i);
            all.add(response(t -> rise(t + delay, recipe.pulseSeconds()), 1.0 / steps, 0.25, 0.03, 1));
        }
        return all;
    }

    private List<Explanation> powerErrors(double span) {
        double[] shape = golden.clone();
        return List.of(new Explanation.Builder(logTimes, shape).spread(0.3).bend(0.02, MODEL_BEND_LENGTH)
                .sizes(0.03, 0.05, 0.1, 0.2, 0.5, -0.03, -0.05, -0.1, -0.2, -0.5, -0.9).build(family));
    }

    private List<Explanation> timebaseErrors() {
        double[] errors = {0.01, 0.03, 0.1, 0.3, -0.01, -0.03, -0.1, -0.3};
        return DoubleStream.of(errors).mapToObj(
                e -> response(t -> rise(t * (1 + e), recipe.pulseSeconds()), 1.0 / errors.length, 0.5, 0.03, 1))
                .toList();
    }

    private List<Explanation> pulseErrors() {
        double nominal = recipe.pulseSeconds();
        double base = Double.isInfinite(nominal) ? 10 * model.lastEdgeSeconds() : nominal;
        double[] factors = {0.02, 0.05, 0.1, 0.2, 0.35, 0.5, 0.7, 0.85, 1.15, 1.5, 2.5};
        return DoubleStream.of(factors)
                .mapToObj(f -> response(t -> rise(t, base * f), 1.0 / factors.length, 0.4, 0.05, 1)).toList();
    }

    private List<Explanation> drifts(double span) {
        double end = model.lastEdgeSeconds();
        double[] lengths = {0.07 * end, 0.2 * end, 0.7 * end, 2 * end, 1000 * end};
        List<Explanation> all = new ArrayList<>();
        for (double length : lengths) {
            double full = -Math.expm1(-end / length);
            double[] shape = reduce(DoubleStream.of(fineTimes).map(t -> -Math.expm1(-t / length) / full).toArray());
            double[] sizes = DoubleStream.of(0.003, 0.01, 0.03, 0.1, 0.3).flatMap(s -> DoubleStream.of(s, -s))
                    .map(s -> s * span).toArray();
            all.add(new Explanation.Builder(logTimes, shape).weight(1.0 / lengths.length).spread(0.5)
                    .bend(0.05, MODEL_BEND_LENGTH).sizes(sizes).build(family));
        }
        return all;
    }

    private Explanation response(DoubleUnaryOperator wrong, double weight, double spread, double bend, double size) {
        double[] right = DoubleStream.of(fineTimes).map(t -> rise(t, recipe.pulseSeconds())).toArray();
        double[] shape = new double[right.length];
        for (int i = 0; i < shape.length; i++) {
            shape[i] = wrong.applyAsDouble(fineTimes[i]) - right[i];
        }
        return new Explanation.Builder(logTimes, reduce(shape)).weight(weight).spread(spread)
                .bend(bend, MODEL_BEND_LENGTH).sizes(size).build(family);
    }

    /** Golden temperature rise [K] above the heat sink a time after switch-off of a pulse. */
    private double rise(double timeSeconds, double heatingSeconds) {
        double sum = 0;
        double[] tau = model.networkTimeConstants();
        for (int j = 0; j < tau.length; j++) {
            sum += model.networkResistances()[j] * Math.exp(-timeSeconds / tau[j])
                    * (Double.isInfinite(heatingSeconds) ? 1 : -Math.expm1(-heatingSeconds / tau[j]));
        }
        return recipe.heatingPowerWatts() * sum;
    }

    private double[] reduce(double[] fine) {
        double[] out = new double[bins.size()];
        bins.reduceInto(fine, out);
        return out;
    }
}

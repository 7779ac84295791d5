package org.laddergate.golden;

import java.time.Clock;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import org.laddergate.golden.GoldenUnit.Condition;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.FaultSignature.Shape;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.evidence.FamilyModel;
import org.laddergate.measurement.Recipe;

/**
 * Learns a limit set from golden units: what healthy parts look like, how they differ, what faults would do, and how far
 * out a healthy part may lie.
 *
 * <p>Limits on a region's resistance are a two-sided normal tolerance interval from the golden units, each judged against
 * the others. Content and confidence are promised for the part: with k judged regions each gets the content
 * 1 - (1 - content)/k (Bonferroni), so that a healthy part is inside all of them.
 *
 * <p>Thread-safe.
 */
public final class GoldenLearner implements LimitLearning {
    /** A region is judged only if doubling its resistance would be seen: shift in sigmas of its estimate. */
    private static final double LEAST_SHIFT = 4.6;

    private final Clock clock;

    public GoldenLearner(Clock clock) {
        this.clock = clock;
    }

    @Override
    public LimitSet learn(Product product, List<GoldenUnit> units) {
        List<String> remarks = new ArrayList<>();
        List<GoldenUnit> golden = GoldenRules.usable(product, units, remarks);
        Recipe recipe = product.recipe();
        GoldenCurves curves = GoldenCurves.of(recipe, golden);
        FaultModel faults = FaultModel.of(product, curves);
        remarks.addAll(faults.remarks());
        double[] mean = new double[curves.comparison().size()];
        curves.comparison().reduceInto(curves.mean(), mean);
        List<double[]> deviations = new ArrayList<>();
        for (int u = 0; u < curves.units(); u++) {
            deviations.add(curves.deviation(u));
        }
        double[][] factors = FamilyFactors.of(deviations, curves.comparisonNoise(), mean);
        List<FaultSignature> slight = faults.regions().stream().map(r -> slightest(faults.signatures(), r)).toList();
        LeaveOneOut leaveOneOut = LeaveOneOut.of(curves, mean, slight);
        FamilyModel family = FamilyModel.of(curves.comparisonNoise(), factors, mean);
        List<RegionLimit> limits = regionLimits(product.settings(), faults, slight, leaveOneOut, family,
                OwnSpread.variances(factors, curves.comparisonNoise(), slight));
        double inFamilyLimit = inFamilyLimit(leaveOneOut.tSquared(), product.settings().falseRejectRisk() / 2);
        GoldenModel model = new GoldenModel(curves.bins().firstEdgeSeconds(), curves.bins().lastEdgeSeconds(),
                curves.bins().perDecade(), curves.mean(), curves.noise(), curves.comparisonNoise(), factors,
                inFamilyLimit, Double.POSITIVE_INFINITY, faults.networkResistances(), faults.networkTimeConstants(),
                faults.signatures(), faults.fromLayers(), new double[0], StructureBand.none());
        GoldenModel complete = StructureBand.addTo(model, recipe, curves, product.settings());
        complete = ShapeLimit.addTo(complete, recipe, judged(limits), product.settings(), curves.units());
        return new LimitSet(product.name(), 0, LimitState.DRAFT, "", clock.instant(), recipe, product.settings(),
                curves.units(), limits, complete, remarks);
    }

    private static List<Region> judged(List<RegionLimit> limits) {
        return limits.stream().filter(RegionLimit::assessed).map(RegionLimit::region).toList();
    }

    static FaultSignature slightest(List<FaultSignature> signatures, Region region) {
        return signatures.stream().filter(s -> s.region().equals(region.name()) && s.shape() == Shape.UNIFORM)
                .min(Comparator.comparingDouble(FaultSignature::severity)).orElseThrow();
    }

    private static List<RegionLimit> regionLimits(DecisionSettings settings, FaultModel faults,
            List<FaultSignature> slight, LeaveOneOut leaveOneOut, FamilyModel family, double[] own) {
        int regions = slight.size();
        boolean[] seen = new boolean[regions];
        int judged = 0;
        for (int r = 0; r < regions; r++) {
            FaultSignature s = slight.get(r);
            double shift = Math.sqrt(FamilyModel.tSquared(family.whiten(s.deviationKelvin()))) / s.severity();
            seen[r] = shift >= LEAST_SHIFT;
            judged += seen[r] ? 1 : 0;
        }
        double content = 1 - (1 - settings.content()) / Math.max(1, judged);
        int n = leaveOneOut.tSquared().length;
        double factor = Tolerance.twoSidedFactor(n, content, settings.confidenceLevel());
        List<RegionLimit> limits = new ArrayList<>();
        for (int r = 0; r < regions; r++) {
            double[] excess = leaveOneOut.excessKelvinPerWatt(r);
            double mean = Arrays.stream(excess).average().orElseThrow();
            double sigma = Math.sqrt(Arrays.stream(excess).map(x -> (x - mean) * (x - mean)).sum() / (n - 1));
            double[] whitened = family.whiten(slight.get(r).deviationKelvin());
            double total = Math.pow(slight.get(r).addedResistanceKelvinPerWatt(), 2) / FamilyModel.tSquared(whitened);
            double uncertainty = Math.sqrt(Math.max(0.05 * total, total - own[r]));
            double centre = faults.goldenResistance(r) + mean;
            limits.add(new RegionLimit(faults.regions().get(r), seen[r], centre, sigma, uncertainty, factor,
                    centre - factor * sigma, centre + factor * sigma, "learnt"));
        }
        return limits;
    }

    /**
     * Limit of T-squared from the golden units judged against each other: the quantile of a scaled chi-square
     * distribution with their mean and variance (Satterthwaite, 1946), which allows for the finite family.
     */
    static double inFamilyLimit(double[] tSquared, double risk) {
        int n = tSquared.length;
        double mean = Arrays.stream(tSquared).average().orElseThrow();
        double variance = Arrays.stream(tSquared).map(x -> (x - mean) * (x - mean)).sum() / (n - 1);
        // The variance of a few dozen values is soft; a chi-square's own 2 x mean is the least it can be.
        double scale = Math.max(variance / (2 * mean), 1);
        double freedom = mean / scale;
        // One prediction step: the next value scatters by the mean's own uncertainty as well.
        double quantile = ChiSquaredDistribution.of(freedom).inverseSurvivalProbability(risk);
        return scale * quantile * (1 + 1.0 / n);
    }

    static String format(String pattern, Object... values) {
        return String.format(Locale.ROOT, pattern, values);
    }

    static long count(List<GoldenUnit> units, Condition condition) {
        return units.stream().filter(u -> u.condition() == condition).count();
    }
}

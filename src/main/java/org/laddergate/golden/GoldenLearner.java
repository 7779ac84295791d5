package org.laddergate.golden;

import java.time.Clock;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.SpreadDirection;
import org.laddergate.limits.evidence.FamilyModel;
import org.laddergate.measurement.Recipe;

/**
 * Learns a limit set from golden units: what healthy parts look like, how they differ, what faults would do, and how
 * far out a healthy part may lie.
 *
 * <p>Limits on a region's resistance are a two-sided normal tolerance interval from the golden units, each judged
 * against the others. Content and confidence are promised for the part: with k judged regions each gets the content 1
 * - (1 - content)/k (Bonferroni), so that a healthy part is inside all of them.
 *
 * <p>Thread-safe.
 */
public final class GoldenLearner implements LimitLearning {
    /**
     * Share of the false-reject risk spent on T-squared. It is small because T-squared names nothing: what it alone
     * finds is atypical rather than faulty.
     */
    private static final double IN_FAMILY_SHARE = 0.1;

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
        double[] logTimes = curves.comparison().logCentres();
        List<double[]> deviations = new ArrayList<>();
        for (int u = 0; u < curves.units(); u++) {
            deviations.add(curves.deviation(u));
        }
        double[][] factors = FamilyFactors.of(deviations, curves.comparisonNoise(), mean, logTimes);
        LeaveOneOut leaveOneOut = LeaveOneOut.of(curves, mean);
        List<SpreadDirection> spread = OwnSpread.learn(directions(faults, curves), factors, curves.comparisonNoise());
        double[][] base = FamilyModel.base(curves.comparisonNoise(), mean, logTimes);
        List<RegionLimit> limits = RegionLimits.learn(product.settings(), faults, spread, base, curves);
        double inFamilyLimit = inFamilyLimit(leaveOneOut.tSquared(),
                product.settings().falseRejectRisk() * IN_FAMILY_SHARE);
        GoldenModel model = new GoldenModel(curves.bins().firstEdgeSeconds(), curves.bins().lastEdgeSeconds(),
                curves.bins().perDecade(), curves.mean(), curves.noise(), curves.comparisonNoise(), factors,
                leaveOneOut.bend(), inFamilyLimit, Double.POSITIVE_INFINITY, faults.networkResistances(),
                faults.networkTimeConstants(), faults.signatures(), spread, faults.fromLayers(), new double[0],
                StructureBand.none());
        GoldenModel complete = StructureBand.addTo(model, recipe, curves, product.settings());
        remarks.add(StructureBand.remark(complete, recipe));
        complete = ShapeLimit.addTo(complete, recipe, judged(limits), product.settings(), curves.units());
        return new LimitSet(product.name(), 0, LimitState.DRAFT, "", clock.instant(), recipe, product.settings(),
                curves.units(), limits, complete, remarks);
    }

    private static List<Region> judged(List<RegionLimit> limits) {
        return limits.stream().filter(RegionLimit::assessed).map(RegionLimit::region).toList();
    }

    /** Ways to differ that the product's model knows, and the drift of the heat sink, 1 K over the record. */
    private static List<SpreadDirection> directions(FaultModel faults, GoldenCurves curves) {
        List<SpreadDirection> all = new ArrayList<>(faults.spread());
        double[] times = curves.bins().centresSeconds();
        double[] line = Arrays.stream(times).map(t -> t / times[times.length - 1]).toArray();
        double[] drift = new double[curves.comparison().size()];
        curves.comparison().reduceInto(line, drift);
        all.add(new SpreadDirection("drift of the heat sink", "", 0, drift));
        return all;
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
}

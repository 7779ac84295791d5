package org.laddergate.golden;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.FaultSignature.Shape;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionEstimator;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.SpreadDirection;

/**
 * Tolerance intervals of the regions' resistances.
 *
 * <p>Content and confidence are promised for the part: with k judged regions each gets the content 1 - (1 - content)/k
 * (Bonferroni), so that a healthy part is inside all of them.
 */
final class RegionLimits {
    /** A region is judged only if doubling its resistance would be seen: shift in sigmas of its reading. */
    private static final double LEAST_SHIFT = 4.6;

    private RegionLimits() {}

    static List<RegionLimit> learn(DecisionSettings settings, FaultModel faults, List<SpreadDirection> spread,
            double[][] base, GoldenCurves curves) {
        List<RegionEstimator> estimators = new ArrayList<>();
        boolean[] seen = new boolean[faults.regions().size()];
        int judged = 0;
        for (int r = 0; r < seen.length; r++) {
            Region region = faults.regions().get(r);
            RegionEstimator estimator =
                    RegionEstimator.of(region.name(), slightest(faults.signatures(), region), spread, base);
            estimators.add(estimator);
            seen[r] = faults.goldenResistance(r) >= LEAST_SHIFT * estimator.uncertaintyKelvinPerWatt();
            judged += seen[r] ? 1 : 0;
        }
        double content = 1 - (1 - settings.content()) / Math.max(1, judged);
        int n = curves.units();
        double factor = Tolerance.twoSidedFactor(n, content, settings.confidenceLevel());
        List<RegionLimit> limits = new ArrayList<>();
        for (int r = 0; r < seen.length; r++) {
            double[] excess = new double[n];
            for (int u = 0; u < n; u++) {
                excess[u] = estimators.get(r).excessKelvinPerWatt(curves.deviation(u));
            }
            double mean = Arrays.stream(excess).average().orElseThrow();
            double sigma = Math.sqrt(Arrays.stream(excess).map(x -> (x - mean) * (x - mean)).sum() / (n - 1));
            double centre = faults.goldenResistance(r) + mean;
            limits.add(new RegionLimit(faults.regions().get(r), seen[r], centre, sigma,
                    estimators.get(r).uncertaintyKelvinPerWatt(), factor, centre - factor * sigma,
                    centre + factor * sigma, "learnt"));
        }
        return limits;
    }

    private static FaultSignature slightest(List<FaultSignature> signatures, Region region) {
        return signatures.stream().filter(s -> s.region().equals(region.name()) && s.shape() == Shape.UNIFORM)
                .min(Comparator.comparingDouble(FaultSignature::severity)).orElseThrow();
    }
}

package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.evidence.FamilyModel;

/**
 * Judges every golden unit against the family of all the others: what a healthy new part will look like.
 *
 * <p>Why: measured against a family that they helped to define, golden units look closer than new parts do; limits from
 * such figures reject too many good parts.
 */
final class LeaveOneOut {
    private final double[] tSquared;
    private final double[][] excess;

    private LeaveOneOut(double[] tSquared, double[][] excess) {
        this.tSquared = tSquared;
        this.excess = excess;
    }

    /**
     * @param curves    golden curves
     * @param golden    golden mean in comparison bins [K]
     * @param slight    for each region the uniform signature of smallest severity
     */
    static LeaveOneOut of(GoldenCurves curves, double[] golden, List<FaultSignature> slight) {
        int n = curves.units();
        double[] tSquared = new double[n];
        double[][] excess = new double[slight.size()][n];
        IntStream.range(0, n).parallel().forEach(u -> {
            List<double[]> others = new ArrayList<>();
            for (int v = 0; v < n; v++) {
                if (v != u) {
                    others.add(curves.deviation(v));
                }
            }
            double[] mean = FamilyFactors.mean(others);
            double[] d = curves.deviation(u).clone();
            for (int i = 0; i < d.length; i++) {
                d[i] -= mean[i];
            }
            FamilyModel family = FamilyModel.of(curves.comparisonNoise(),
                    FamilyFactors.of(others, curves.comparisonNoise(), golden), golden);
            double[] z = family.whiten(d);
            tSquared[u] = FamilyModel.tSquared(z);
            for (int r = 0; r < slight.size(); r++) {
                FaultSignature s = slight.get(r);
                excess[r][u] = FamilyModel.amplitude(family.whiten(s.deviationKelvin()), z)
                        * s.addedResistanceKelvinPerWatt();
            }
        });
        return new LeaveOneOut(tSquared, excess);
    }

    /** T-squared of each unit against the others. */
    double[] tSquared() {
        return tSquared;
    }

    /** Excess resistance of a region over the mean of the others, for each unit [K/W]. */
    double[] excessKelvinPerWatt(int region) {
        return excess[region];
    }
}

package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.IntStream;
import org.laddergate.limits.evidence.FamilyModel;

/**
 * Judges every golden unit against the family of all the others: what a healthy new part will look like.
 *
 * <p>Why: measured against a family that they helped to define, golden units look closer than new parts do; limits from
 * such figures reject too many good parts.
 */
final class LeaveOneOut {
    private static final double[] BENDS = {0, 0.01, 0.02, 0.04, 0.08, 0.15};

    private final double[] tSquared;
    private final double bend;
    private final double logDensity;

    private LeaveOneOut(double[] tSquared, double bend, double logDensity) {
        this.tSquared = tSquared;
        this.bend = bend;
        this.logDensity = logDensity;
    }

    /**
     * @param curves    golden curves
     * @param golden    golden mean in comparison bins [K]
     */
    static LeaveOneOut of(GoldenCurves curves, double[] golden) {
        return java.util.Arrays.stream(BENDS).mapToObj(b -> of(curves, golden, b))
                .max(java.util.Comparator.comparingDouble(l -> l.logDensity)).orElseThrow();
    }

    private static LeaveOneOut of(GoldenCurves curves, double[] golden, double bend) {
        int n = curves.units();
        double[] tSquared = new double[n];
        double[] density = new double[n];
        double[] logTimes = curves.comparison().logCentres();
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
                    FamilyFactors.of(others, curves.comparisonNoise(), golden, logTimes), golden, bend, logTimes);
            double[] z = family.whiten(d);
            tSquared[u] = FamilyModel.tSquared(z);
            density[u] = family.logDensity(z);
        });
        return new LeaveOneOut(tSquared, bend, java.util.Arrays.stream(density).sum());
    }

    /** Bending of the family's factors under which the units left out were most probable [1]. */
    double bend() {
        return bend;
    }

    /** T-squared of each unit against the others. */
    double[] tSquared() {
        return tSquared;
    }
}

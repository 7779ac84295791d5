package org.laddergate.thermal;

/**
 * Finds the smoothest spectrum that still meets a curve within its noise.
 *
 * <p>Method: the smoothing weight is lowered from large by factors of two until the misfit comes within a given factor
 * of the best that any weight reaches (discrepancy principle with the reachable misfit instead of one, since a grid of
 * time constants meets no curve exactly).
 */
public final class SpectrumSearch {
    private static final int STEPS = 26;
    private static final double ENOUGH = 1.15;

    /** A plan and what it found. */
    public record Found(SpectrumPlan plan, double[] amplitudes, double smoothing, double misfit) {}

    private SpectrumSearch() {}

    /**
     * @param timesSeconds  times since switch-off [s], not modified
     * @param curve         temperatures [K], not modified
     * @param sigmaKelvin   standard deviations [K], not modified
     */
    public static Found smoothest(double[] timesSeconds, double[] curve, double[] sigmaKelvin, double powerWatts,
            double heatingSeconds) {
        Found[] all = new Found[STEPS];
        double drop = Math.abs(curve[0] - curve[curve.length - 1]);
        double typical = 0;
        for (double s : sigmaKelvin) {
            typical += s / sigmaKelvin.length;
        }
        double largest = drop / typical * 4;
        double best = Double.POSITIVE_INFINITY;
        for (int k = 0; k < STEPS; k++) {
            double smoothing = largest * Math.pow(0.5, k);
            SpectrumPlan plan = SpectrumPlan.smooth(timesSeconds, sigmaKelvin, powerWatts, heatingSeconds, smoothing);
            double[] a = new double[plan.size()];
            plan.solveInto(curve, a, plan.newWorkspace());
            all[k] = new Found(plan, a, smoothing, plan.misfit(curve, a));
            best = Math.min(best, all[k].misfit());
        }
        for (Found f : all) {
            if (f.misfit() <= Math.max(1, ENOUGH * best)) {
                return f;
            }
        }
        return all[STEPS - 1];
    }
}

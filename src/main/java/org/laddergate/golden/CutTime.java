package org.laddergate.golden;

import java.util.List;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.SampledCurve;

/**
 * Finds from when on the golden curves are thermal.
 *
 * <p>Definition: early heat flow out of an evenly heated face follows T = T0 - b sqrt(t) with a slow correction; an
 * electrical switching transient does not. The cut time is the first bin from which on the mean golden curve over the
 * next eightfold of time agrees with T0 - b sqrt(t) + c t within its own noise.
 *
 * <p>Source: square-root law, Carslaw and Jaeger, Conduction of Heat in Solids (1959), section 2.9; used for the early
 * transient in JESD51-14.
 *
 * <p>Degenerate input: if no bin qualifies in the first two decades, the first sample time counts as the cut time.
 */
final class CutTime {
    private static final int PER_DECADE = 25;
    private static final double SPAN = 8;
    private static final double WORST_MISFIT = 1.6;

    private CutTime() {}

    static double find(List<SampledCurve> curves) {
        double first = 0;
        double last = Double.POSITIVE_INFINITY;
        for (SampledCurve c : curves) {
            first = Math.max(first, c.timeSeconds(0));
            last = Math.min(last, c.timeSeconds(c.size() - 1));
        }
        LogTimeBins bins = LogTimeBins.spanning(first, last, PER_DECADE);
        int size = bins.size();
        double[] mean = new double[size];
        double[] square = new double[size];
        double[] binned = new double[size];
        int[] counts = new int[size];
        double[] previous = null;
        for (SampledCurve c : curves) {
            bins.binInto(c.timesSecondsUnsafe(), c.valuesUnsafe(), binned, counts);
            for (int i = 0; i < size; i++) {
                mean[i] += binned[i] / curves.size();
            }
            if (previous != null) {
                addNoise(binned, previous, square, curves.size() - 1);
            }
            previous = binned.clone();
        }
        int window = (int) Math.round(Math.log10(SPAN) * PER_DECADE);
        for (int i = 0; i < Math.min(2 * PER_DECADE, size - window); i++) {
            if (misfit(bins, mean, square, curves.size(), i, window) < WORST_MISFIT) {
                return bins.centreSeconds(i);
            }
        }
        return first;
    }

    /** Variance of single bins from third differences of the difference of two units. */
    private static void addNoise(double[] a, double[] b, double[] square, int pairs) {
        for (int i = 1; i + 2 < a.length; i++) {
            double e = (a[i - 1] - b[i - 1]) - 3 * (a[i] - b[i]) + 3 * (a[i + 1] - b[i + 1]) - (a[i + 2] - b[i + 2]);
            square[i] += e * e / 40 / pairs;
        }
    }

    /** Root mean square residual of the fit over the window in units of the noise of the mean. */
    private static double misfit(LogTimeBins bins, double[] mean, double[] square, int curves, int from, int count) {
        double[][] x = new double[count][];
        double[] y = new double[count];
        double noise = 0;
        for (int k = 0; k < count; k++) {
            double t = bins.centreSeconds(from + k) / bins.centreSeconds(from);
            x[k] = new double[] {Math.sqrt(t), t, t * Math.sqrt(t)};
            y[k] = mean[from + k];
            noise += square[Math.max(1, Math.min(square.length - 3, from + k))] / count;
        }
        var fit = new org.apache.commons.math3.stat.regression.OLSMultipleLinearRegression();
        fit.newSampleData(y, x);
        double rms = Math.sqrt(fit.calculateResidualSumOfSquares() / (count - 4));
        // The switching transient differs from unit to unit, so a real mean keeps a floor of systematic misfit.
        double sigma = Math.sqrt(noise / curves) + 1e-5 * Math.abs(mean[0] - mean[mean.length - 1]);
        return rms / sigma;
    }
}

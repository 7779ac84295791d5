package org.laddergate.measurement;

/**
 * Noise of a binned curve from its own third differences.
 *
 * <p>Definition: e_i = T_(i-1) - 3 T_i + 3 T_(i+1) - T_(i+2); for independent noise of equal size Var e = 20 sigma^2,
 * and a smooth curve leaves nothing: a deviation of amplitude A over one decade adds about A (2.3/n)^3 at n bins a
 * decade.
 *
 * <p>Method: for one curve against a known noise profile the median of |e|/(sqrt(20) sigma), scaled to one for normal
 * noise, so that spikes and the corner of a fault do not count; for a population the pooled mean square.
 *
 * <p>Source: difference estimators of noise, e.g. von Neumann et al., Ann. Math. Stat. 12 (1941) 153, third order.
 *
 * <p>Cost: one pass; the median sorts a scratch array.
 */
public final class NoiseEstimate {
    static final double THIRD_DIFFERENCE_GAIN = Math.sqrt(20);
    /** Median of |z| of a standard normal. */
    private static final double MEDIAN_ABSOLUTE_NORMAL = 0.6744897501960817;

    private NoiseEstimate() {}

    /** Third difference at bins i-1 .. i+2, in units of one sigma of a single bin. */
    static double thirdDifference(double[] values, int i) {
        return (values[i - 1] - 3 * values[i] + 3 * values[i + 1] - values[i + 2]) / THIRD_DIFFERENCE_GAIN;
    }

    /**
     * Ratio of a curve's noise to a profile.
     *
     * @param deviation curve minus golden curve in fine bins [K], not modified
     * @param sigma     noise profile [K], not modified
     * @param scratch   same length, overwritten
     * @return 1 for a curve with exactly the profile's noise
     */
    public static double ratio(double[] deviation, double[] sigma, double[] scratch) {
        int count = 0;
        for (int i = 1; i + 2 < deviation.length; i++) {
            double e = thirdDifference(deviation, i) / sigma[i];
            if (!Double.isNaN(e)) {
                scratch[count++] = Math.abs(e);
            }
        }
        if (count == 0) {
            return Double.NaN;
        }
        java.util.Arrays.sort(scratch, 0, count);
        return scratch[count / 2] / MEDIAN_ABSOLUTE_NORMAL;
    }

    /**
     * Noise profile of a population of deviations from its mean.
     *
     * @param deviations one row per curve, fine bins [K]
     * @return one sigma per fine bin [K], smoothed over a third of a decade, never zero
     */
    public static double[] profile(double[][] deviations, int binsPerDecade) {
        int bins = deviations[0].length;
        double[] square = new double[bins];
        for (double[] d : deviations) {
            for (int i = 1; i + 2 < bins; i++) {
                double e = thirdDifference(d, i);
                square[i] += e * e / deviations.length;
            }
        }
        square[0] = square[Math.min(1, bins - 1)];
        for (int i = Math.max(1, bins - 2); i < bins; i++) {
            square[i] = square[Math.max(0, bins - 3)];
        }
        int half = Math.max(1, binsPerDecade / 6);
        double[] sigma = new double[bins];
        double smallest = 1e-9;
        for (int i = 0; i < bins; i++) {
            double sum = 0;
            int n = 0;
            for (int j = Math.max(0, i - half); j <= Math.min(bins - 1, i + half); j++) {
                sum += Math.log(Math.max(square[j], smallest * smallest));
                n++;
            }
            sigma[i] = Math.exp(0.5 * sum / n);
        }
        return sigma;
    }
}

package org.laddergate.measurement;

/**
 * About six wide bins a decade on which parts are compared, each the straight-line fit in ln t over a run of fine bins,
 * taken at the middle of the run.
 *
 * <p>Definition: value_j = sum_i w_ji fine_i with the weights of an unweighted least-squares line evaluated at the mean
 * of ln t of the run: for an equidistant run that is its plain mean.
 *
 * <p>Why: six a decade follow any heat-conduction curve (the step response of one time constant is more than a decade
 * wide) and average the noise; a smaller vector keeps the golden covariance well determined by 30 units.
 *
 * <p>Cost: one pass over the fine bins, no allocation. Immutable.
 */
public final class ComparisonBins {
    /** Bins per decade. */
    public static final int PER_DECADE = 6;

    private final int[] firstFine;
    private final double[] centresSeconds;

    private ComparisonBins(int[] firstFine, double[] centresSeconds) {
        this.firstFine = firstFine;
        this.centresSeconds = centresSeconds;
    }

    /** Groups the fine bins; a short last run joins its neighbour. */
    public static ComparisonBins of(LogTimeBins fine) {
        int perGroup10 = Math.max(10, (int) Math.round(10.0 * fine.perDecade() / PER_DECADE));
        int groups = Math.max(1, (int) Math.round(10.0 * fine.size() / perGroup10));
        int[] first = new int[groups + 1];
        double[] centres = new double[groups];
        for (int j = 0; j <= groups; j++) {
            first[j] = (int) Math.round((double) j * fine.size() / groups);
        }
        for (int j = 0; j < groups; j++) {
            centres[j] = Math.sqrt(fine.centreSeconds(first[j]) * fine.centreSeconds(first[j + 1] - 1));
        }
        return new ComparisonBins(first, centres);
    }

    public int size() {
        return centresSeconds.length;
    }

    public double centreSeconds(int j) {
        return centresSeconds[j];
    }

    public double[] centresSeconds() {
        return centresSeconds.clone();
    }

    /** Natural logarithms of the centres [ln s]. */
    public double[] logCentres() {
        double[] out = new double[centresSeconds.length];
        for (int j = 0; j < out.length; j++) {
            out[j] = Math.log(centresSeconds[j]);
        }
        return out;
    }

    /** Index of the first fine bin of a run; {@code firstFine(size())} is the number of fine bins. */
    public int firstFine(int j) {
        return firstFine[j];
    }

    /**
     * Averages fine bins into comparison bins; a NaN in a run makes that bin NaN.
     *
     * @param fine values in the fine bins, not modified
     * @param out  length {@link #size()}, overwritten
     */
    public void reduceInto(double[] fine, double[] out) {
        for (int j = 0; j < out.length; j++) {
            double sum = 0;
            for (int i = firstFine[j]; i < firstFine[j + 1]; i++) {
                sum += fine[i];
            }
            out[j] = sum / (firstFine[j + 1] - firstFine[j]);
        }
    }
}

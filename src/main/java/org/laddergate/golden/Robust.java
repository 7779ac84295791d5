package org.laddergate.golden;

import java.util.Arrays;

/** Median and median absolute deviation. */
final class Robust {
    private static final double NORMAL_CONSISTENCY = 1.4826;

    private Robust() {}

    static double median(double[] values) {
        double[] sorted = values.clone();
        Arrays.sort(sorted);
        int n = sorted.length;
        return n % 2 == 1 ? sorted[n / 2] : 0.5 * (sorted[n / 2 - 1] + sorted[n / 2]);
    }

    /** Median absolute deviation times 1.4826: the standard deviation of a normal sample. */
    static double scaledMad(double[] values) {
        double median = median(values);
        return NORMAL_CONSISTENCY * median(Arrays.stream(values).map(v -> Math.abs(v - median)).toArray());
    }
}

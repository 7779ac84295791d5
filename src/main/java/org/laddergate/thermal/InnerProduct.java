package org.laddergate.thermal;

/**
 * Inner product of two arrays in four interleaved partial sums.
 *
 * <p>Why: a single running sum waits for each addition; four let the processor work ahead, which halves the time of a
 * verdict. The order of summation is fixed, so results stay the same bit for bit.
 */
public final class InnerProduct {
    private InnerProduct() {}

    /** Sum of a_i b_i over the length of {@code a}; {@code b} may be longer. */
    public static double of(double[] a, double[] b) {
        int n = a.length;
        double s0 = 0;
        double s1 = 0;
        double s2 = 0;
        double s3 = 0;
        int i = 0;
        for (; i + 3 < n; i += 4) {
            s0 += a[i] * b[i];
            s1 += a[i + 1] * b[i + 1];
            s2 += a[i + 2] * b[i + 2];
            s3 += a[i + 3] * b[i + 3];
        }
        for (; i < n; i++) {
            s0 += a[i] * b[i];
        }
        return (s0 + s1) + (s2 + s3);
    }
}

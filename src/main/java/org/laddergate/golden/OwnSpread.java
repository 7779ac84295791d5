package org.laddergate.golden;

import java.util.List;
import org.laddergate.limits.FaultSignature;

/**
 * How much of the family's spread each region itself is responsible for.
 *
 * <p>Definition: non-negative v_r with sum_r v_r s_r s_r' closest, in the noise-whitened Frobenius norm, to the covariance
 * spanned by the family factors; s_r is the deviation of 1 K/W more in region r.
 *
 * <p>Method: coordinate descent on the non-negative quadratic form, which converges for any positive semidefinite matrix.
 *
 * <p>Why: the scatter of a region's estimate is its own spread plus what noise and the other regions leave in it; only the
 * latter is measurement uncertainty.
 */
final class OwnSpread {
    private static final int SWEEPS = 500;

    private OwnSpread() {}

    /**
     * @param factors family factors [K]
     * @param noise   noise in comparison bins [K]
     * @param slight  for each region the uniform signature of smallest severity
     * @return variance of each region's resistance in the family [(K/W)^2]
     */
    static double[] variances(double[][] factors, double[] noise, List<FaultSignature> slight) {
        int regions = slight.size();
        double[][] shape = new double[regions][];
        for (int r = 0; r < regions; r++) {
            shape[r] = scaled(slight.get(r).deviationKelvin(), noise, 1 / slight.get(r).addedResistanceKelvinPerWatt());
        }
        double[][] gram = new double[regions][regions];
        double[] target = new double[regions];
        for (int r = 0; r < regions; r++) {
            for (int q = 0; q < regions; q++) {
                double c = dot(shape[r], shape[q]);
                gram[r][q] = c * c;
            }
            for (double[] f : factors) {
                double c = dot(shape[r], scaled(f, noise, 1));
                target[r] += c * c;
            }
        }
        double[] v = new double[regions];
        for (int sweep = 0; sweep < SWEEPS; sweep++) {
            for (int r = 0; r < regions; r++) {
                double rest = target[r];
                for (int q = 0; q < regions; q++) {
                    rest -= q == r ? 0 : gram[r][q] * v[q];
                }
                v[r] = Math.max(0, rest / gram[r][r]);
            }
        }
        return v;
    }

    /** Offset removed, since the heat sink's temperature is free, and divided by the noise. */
    private static double[] scaled(double[] v, double[] noise, double factor) {
        double weight = 0;
        double mean = 0;
        for (int i = 0; i < v.length; i++) {
            double w = 1 / (noise[i] * noise[i]);
            weight += w;
            mean += w * v[i];
        }
        mean /= weight;
        double[] out = new double[v.length];
        for (int i = 0; i < v.length; i++) {
            out[i] = (v[i] - mean) * factor / noise[i];
        }
        return out;
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }
}

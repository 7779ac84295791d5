package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import org.laddergate.limits.SpreadDirection;

/**
 * How much of the family's spread each direction is responsible for.
 *
 * <p>Definition: non-negative v_p with sum_p v_p s_p s_p' closest, in the noise-weighted Frobenius norm, to the
 * covariance spanned by the family factors; s_p is the deviation of one unit in direction p.
 *
 * <p>Method: coordinate descent on the non-negative quadratic form, which converges for any positive semidefinite
 * matrix; directions that look alike share the spread in one of the equally good ways.
 *
 * <p>Why: a region's reading scatters by its own spread and by what noise and all other directions leave in it; only
 * the latter is measurement uncertainty.
 */
final class OwnSpread {
    private static final int SWEEPS = 2000;

    private OwnSpread() {}

    /**
     * @param directions ways to differ
     * @param factors    family factors [K]
     * @param noise      noise in comparison bins [K]
     * @return the directions with their standard deviations in the family
     */
    static List<SpreadDirection> learn(List<SpreadDirection> directions, double[][] factors, double[] noise) {
        int count = directions.size();
        double[][] shape = new double[count][];
        for (int p = 0; p < count; p++) {
            shape[p] = weighted(directions.get(p).deviationKelvin(), noise);
        }
        double[][] gram = new double[count][count];
        double[] target = new double[count];
        for (int p = 0; p < count; p++) {
            for (int q = 0; q < count; q++) {
                double c = dot(shape[p], shape[q]);
                gram[p][q] = c * c;
            }
            for (double[] f : factors) {
                double c = dot(shape[p], weighted(f, noise));
                target[p] += c * c;
            }
        }
        double[] v = new double[count];
        for (int sweep = 0; sweep < SWEEPS; sweep++) {
            for (int p = 0; p < count; p++) {
                double rest = target[p];
                for (int q = 0; q < count; q++) {
                    rest -= q == p ? 0 : gram[p][q] * v[q];
                }
                v[p] = gram[p][p] > 0 ? Math.max(0, rest / gram[p][p]) : 0;
            }
        }
        List<SpreadDirection> out = new ArrayList<>();
        for (int p = 0; p < count; p++) {
            out.add(directions.get(p).withSigma(Math.sqrt(v[p])));
        }
        return out;
    }

    /** Offset removed, since the heat sink's temperature is free, and divided by the noise. */
    private static double[] weighted(double[] v, double[] noise) {
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
            out[i] = (v[i] - mean) / noise[i];
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

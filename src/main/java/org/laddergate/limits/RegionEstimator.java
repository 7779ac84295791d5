package org.laddergate.limits;

import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.laddergate.limits.evidence.FamilyModel;

/**
 * Reads one region's excess resistance off a deviation from golden.
 *
 * <p>Definition: R - R_golden = s'S^-1 d / s'S^-1 s with s the deviation of 1 K/W more in the region and S the covariance
 * of everything else: noise, power, drift, and the spread of all other directions in the golden family; its variance is
 * 1 / s'S^-1 s. An offset of the curve is free.
 *
 * <p>Source: generalised least squares (Aitken, Proc. R. Soc. Edinburgh 55 (1935) 42).
 *
 * <p>Why not the family's own covariance: the family varies in the region's own direction too, only not exactly along s;
 * weighting with its inverse looks at nothing but that small difference and reads half the truth.
 *
 * <p>Cost: one product of length m for a reading. Immutable.
 */
public final class RegionEstimator {
    private final double[][] whitening;
    private final double[] weights;
    private final double uncertainty;
    private final double[][] otherCovariance;

    private RegionEstimator(double[][] otherCovariance, double[] perKelvinPerWatt) {
        this.otherCovariance = otherCovariance;
        RealMatrix contrasts = FamilyModel.contrasts(perKelvinPerWatt.length);
        RealMatrix reduced = contrasts.multiply(new Array2DRowRealMatrix(otherCovariance, false))
                .multiply(contrasts.transpose());
        var solver = new CholeskyDecomposition(FamilyModel.symmetrised(reduced)).getSolver();
        double[] s = contrasts.operate(perKelvinPerWatt);
        double[] image = solver.solve(new ArrayRealVector(s, false)).toArray();
        double information = 0;
        for (int i = 0; i < s.length; i++) {
            information += s[i] * image[i];
        }
        double[] w = contrasts.transpose().operate(image);
        for (int i = 0; i < w.length; i++) {
            w[i] /= information;
        }
        this.weights = w;
        this.uncertainty = 1 / Math.sqrt(information);
        this.whitening = solver.solve(contrasts).getData();
    }

    /**
     * @param region        region to read; its own directions are left out of the covariance
     * @param slight        uniform signature of small severity of the region
     * @param directions    spread of the golden family
     * @param base          covariance of noise, power and unmodelled deviation, m by m [K^2], not modified
     */
    public static RegionEstimator of(String region, FaultSignature slight, List<SpreadDirection> directions,
            double[][] base) {
        return new RegionEstimator(otherCovariance(region, directions, base), perKelvinPerWatt(slight));
    }

    /** The same reading when something else may have happened as well, with the given covariance [K^2]. */
    public RegionEstimator allowing(double[][] covariance, FaultSignature slight) {
        int m = covariance.length;
        double[][] sum = new double[m][m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                sum[i][j] = otherCovariance[i][j] + covariance[i][j];
            }
        }
        return new RegionEstimator(sum, perKelvinPerWatt(slight));
    }

    private static double[][] otherCovariance(String region, List<SpreadDirection> directions, double[][] base) {
        int m = base.length;
        double[][] s = new double[m][];
        for (int i = 0; i < m; i++) {
            s[i] = base[i].clone();
        }
        for (SpreadDirection d : directions) {
            if (d.region().equals(region)) {
                continue;
            }
            double v = d.sigma() * d.sigma();
            for (int i = 0; i < m; i++) {
                for (int j = 0; j < m; j++) {
                    s[i][j] += v * d.deviationKelvin()[i] * d.deviationKelvin()[j];
                }
            }
        }
        return s;
    }

    private static double[] perKelvinPerWatt(FaultSignature slight) {
        return Arrays.stream(slight.deviationKelvin()).map(x -> x / slight.addedResistanceKelvinPerWatt()).toArray();
    }

    /** Excess over the golden resistance [K/W]. */
    public double excessKelvinPerWatt(double[] deviationKelvin) {
        double sum = 0;
        for (int i = 0; i < weights.length; i++) {
            sum += weights[i] * deviationKelvin[i];
        }
        return sum;
    }

    /** Standard uncertainty of a reading [K/W]. */
    public double uncertaintyKelvinPerWatt() {
        return uncertainty;
    }

    /** Size of any signature in a deviation under the same covariance, in units of the signature, and its variance. */
    public double[] size(double[] signatureKelvin, double[] deviationKelvin) {
        int n = whitening.length;
        RealMatrix contrasts = FamilyModel.contrasts(n + 1);
        double[] s = contrasts.operate(signatureKelvin);
        double along = 0;
        double information = 0;
        for (int i = 0; i < n; i++) {
            double d = 0;
            double k = 0;
            for (int j = 0; j <= n; j++) {
                d += whitening[i][j] * deviationKelvin[j];
                k += whitening[i][j] * signatureKelvin[j];
            }
            along += s[i] * d;
            information += s[i] * k;
        }
        return new double[] {along / information, 1 / information};
    }
}

package org.laddergate.limits;

import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.DecompositionSolver;
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
    private final double[][] otherCovariance;
    private final double[] perKelvinPerWatt;
    private final RealMatrix precision;
    private final Weights weights;

    /**
     * A reading.
     *
     * @param excessKelvinPerWatt       excess over the golden resistance [K/W]
     * @param uncertaintyKelvinPerWatt  its standard uncertainty [K/W]
     */
    public record Reading(double excessKelvinPerWatt, double uncertaintyKelvinPerWatt) {}

    private record Weights(double[] values, double uncertainty) {}

    private RegionEstimator(double[][] otherCovariance, double[] perKelvinPerWatt) {
        this.otherCovariance = otherCovariance;
        this.perKelvinPerWatt = perKelvinPerWatt;
        RealMatrix contrasts = FamilyModel.contrasts(perKelvinPerWatt.length);
        DecompositionSolver solver = solver(contrasts, otherCovariance);
        this.weights = weights(contrasts, solver, perKelvinPerWatt);
        this.precision = contrasts.transpose().multiply(solver.solve(contrasts));
    }

    private static DecompositionSolver solver(RealMatrix contrasts, double[][] covariance) {
        RealMatrix reduced = contrasts.multiply(new Array2DRowRealMatrix(covariance, false))
                .multiply(contrasts.transpose());
        return new CholeskyDecomposition(FamilyModel.symmetrised(reduced)).getSolver();
    }

    private static Weights weights(RealMatrix contrasts, DecompositionSolver solver, double[] shape) {
        double[] s = contrasts.operate(shape);
        double[] image = solver.solve(new ArrayRealVector(s, false)).toArray();
        double information = 0;
        for (int i = 0; i < s.length; i++) {
            information += s[i] * image[i];
        }
        double[] w = contrasts.preMultiply(image);
        for (int i = 0; i < w.length; i++) {
            w[i] /= information;
        }
        return new Weights(w, 1 / Math.sqrt(information));
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

    /** Reads when something else may have happened to the curve as well, with the given covariance [K^2]. */
    public Reading readAllowing(double[][] covariance, double[] deviationKelvin) {
        int m = covariance.length;
        double[][] sum = new double[m][m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                sum[i][j] = otherCovariance[i][j] + covariance[i][j];
            }
        }
        RealMatrix contrasts = FamilyModel.contrasts(m);
        Weights lenient = weights(contrasts, solver(contrasts, sum), perKelvinPerWatt);
        return new Reading(product(lenient.values(), deviationKelvin), lenient.uncertainty());
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
        return product(weights.values(), deviationKelvin);
    }

    /** Standard uncertainty of a reading [K/W]. */
    public double uncertaintyKelvinPerWatt() {
        return weights.uncertainty();
    }

    /** Size of any signature in a deviation under the same covariance, in units of the signature. */
    public double size(double[] signatureKelvin, double[] deviationKelvin) {
        double[] image = precision.operate(signatureKelvin);
        return product(image, deviationKelvin) / product(image, signatureKelvin);
    }

    private static double product(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }
}

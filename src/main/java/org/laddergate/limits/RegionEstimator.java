package org.laddergate.limits;

import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.DecompositionSolver;
import org.apache.commons.math3.linear.RealMatrix;
import org.laddergate.limits.evidence.FamilyModel;
import org.laddergate.thermal.InnerProduct;

/**
 * Reads one region's excess resistance off a deviation from golden.
 *
 * <p>Definition: R - R_golden = s'S^-1 d / s'S^-1 s with s the deviation of 1 K/W more in the region and S the
 * covariance of everything else: noise, power, drift, and the spread of all other directions in the golden family; its
 * variance is 1 / s'S^-1 s. An offset of the curve is free.
 *
 * <p>Source: generalised least squares (Aitken, Proc. R. Soc. Edinburgh 55 (1935) 42).
 *
 * <p>Why not the family's own covariance: the family varies in the region's own direction too, only not exactly along
 * s; weighting with its inverse looks at nothing but that small difference and reads half the truth.
 *
 * <p>Cost: one product of length m for a reading. Immutable.
 */
public final class RegionEstimator {
    private final RealMatrix contrasts;
    private final double[][] others;
    private final double[] shape;
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
        this.contrasts = FamilyModel.contrasts(perKelvinPerWatt.length);
        RealMatrix reduced = FamilyModel.symmetrised(contrasts
                .multiply(new Array2DRowRealMatrix(otherCovariance, false)).multiply(contrasts.transpose()));
        this.others = reduced.getData();
        this.shape = contrasts.operate(perKelvinPerWatt);
        DecompositionSolver solver = new CholeskyDecomposition(reduced).getSolver();
        this.weights = weights(solver);
        this.precision = contrasts.transpose().multiply(solver.solve(contrasts));
    }

    private Weights weights(DecompositionSolver solver) {
        double[] image = solver.solve(new ArrayRealVector(shape, false)).toArray();
        double information = InnerProduct.of(shape, image);
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

    /**
     * Reads when something else may have happened to the curve as well.
     *
     * @param allowed covariance of it in the coordinates of {@link FamilyModel#contrasts} [K^2], symmetric, not modified
     */
    public Reading readAllowing(double[][] allowed, double[] deviationKelvin) {
        int n = others.length;
        double[][] sum = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                sum[i][j] = others[i][j] + allowed[i][j];
                sum[j][i] = sum[i][j];
            }
        }
        Weights lenient = weights(new CholeskyDecomposition(new Array2DRowRealMatrix(sum, false)).getSolver());
        return new Reading(InnerProduct.of(lenient.values(), deviationKelvin), lenient.uncertainty());
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
        return InnerProduct.of(weights.values(), deviationKelvin);
    }

    /** Standard uncertainty of a reading [K/W]. */
    public double uncertaintyKelvinPerWatt() {
        return weights.uncertainty();
    }

    /** Size of any signature in a deviation under the same covariance, in units of the signature. */
    public double size(double[] signatureKelvin, double[] deviationKelvin) {
        double[] image = precision.operate(signatureKelvin);
        return InnerProduct.of(image, deviationKelvin) / InnerProduct.of(image, signatureKelvin);
    }
}

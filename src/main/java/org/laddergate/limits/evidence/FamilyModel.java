package org.laddergate.limits.evidence;

import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.laddergate.thermal.InnerProduct;

/**
 * The golden family as a normal distribution of deviations from the golden mean, in comparison bins.
 *
 * <p>Definition: d ~ N(c 1, S0) with an arbitrary offset c (the temperature of the heat sink is nobody's business) and
 * S0 = F F' + b^2 sum |f f'| o G + N (1 + f) + (g h)(g h)', where F holds the leading factors f of the golden
 * covariance, b lets each of them bend smoothly (G(t,t') = exp(-(ln t - ln t')^2/2)), because a unit three sigma out
 * is not three times a unit one sigma out, N is diagonal with the measurement noise, f is a floor against a noise
 * estimate that is too good, and g h is the golden drop scaled by the uncertainty of the power step.
 *
 * <p>Method: the offset is removed by m - 1 orthonormal contrasts (Helmert), S0 is factored once, and deviations are
 * then whitened by one matrix product: z = L^-1 B d, so that z ~ N(0, I) for a member of the family.
 *
 * <p>Source: factor model of a covariance as in Tipping and Bishop, Probabilistic principal component analysis, J. R.
 * Statist. Soc. B 61 (1999) 611; the rest is ordinary multivariate normal theory.
 *
 * <p>Domain: at least 3 bins; noise positive; all finite.
 *
 * <p>Identities: whitening a constant gives zero; the whitened family covariance is the identity.
 *
 * <p>Cost: (m - 1) m multiplications for one whitening, no allocation in the Into form. Immutable.
 */
public final class FamilyModel {
    /** Share of noise variance added against an optimistic noise estimate (chosen by measurement, docs/decisions). */
    static final double NOISE_FLOOR = 0.5;
    /** Relative standard uncertainty of the power step that every tester is granted (common practice, no source). */
    static final double POWER_UNCERTAINTY = 0.001;

    /** Smooth deviation that every part is granted, as a share of the golden drop, one sigma. */
    static final double UNMODELLED = 1e-4;

    private final int bins;
    private final double[][] whitening;
    private final double logRootDeterminant;

    private FamilyModel(int bins, double[][] whitening) {
        this.bins = bins;
        this.whitening = whitening;
        RealMatrix square = new Array2DRowRealMatrix(whitening, false).multiply(contrasts(bins).transpose());
        this.logRootDeterminant = Math.log(Math.abs(new LUDecomposition(square, 0).getDeterminant()));
    }

    /**
     * @param noiseKelvin  noise of each bin, one sigma [K], length m, not modified
     * @param factors      factors [K], each of length m, not modified; may be none
     * @param goldenKelvin golden mean curve in the bins [K], length m, not modified
     * @param bend         relative bending b of the factors [1]
     * @param logTimes     ln of the bin centres, length m, not modified
     */
    public static FamilyModel of(double[] noiseKelvin, double[][] factors, double[] goldenKelvin, double bend,
            double[] logTimes) {
        double[][] s = base(noiseKelvin, goldenKelvin, logTimes);
        int m = s.length;
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                double distance = logTimes[i] - logTimes[j];
                double smooth = bend * bend * Math.exp(-0.5 * distance * distance);
                for (double[] f : factors) {
                    s[i][j] += f[i] * f[j];
                }
                for (double[] f : factors) {
                    s[i][j] += smooth * Math.abs((f[i] - f[0]) * (f[j] - f[0]));
                }
            }
        }
        return new FamilyModel(m, inverseRootOf(s));
    }

    /** Logarithm of the density of a whitened deviation, up to a constant that depends only on m. */
    public double logDensity(double[] whitened) {
        return logRootDeterminant - 0.5 * tSquared(whitened);
    }

    /** The contrast-space matrix L^-1 B for any bin covariance; fails if it is not positive definite. */
    static double[][] inverseRootOf(double[][] covariance) {
        RealMatrix contrasts = contrasts(covariance.length);
        RealMatrix reduced = contrasts.multiply(new Array2DRowRealMatrix(covariance, false))
                .multiply(contrasts.transpose());
        RealMatrix root = new CholeskyDecomposition(symmetrised(reduced)).getL();
        return new LUDecomposition(root, 0).getSolver().solve(contrasts).getData();
    }

    /** Covariance of what is no difference between parts: noise, power, and what no model describes [K^2], m by m. */
    public static double[][] base(double[] noiseKelvin, double[] goldenKelvin, double[] logTimes) {
        int m = noiseKelvin.length;
        double[][] s = new double[m][m];
        double unmodelled = UNMODELLED * (goldenKelvin[0] - goldenKelvin[m - 1]);
        for (int i = 0; i < m; i++) {
            s[i][i] = noiseKelvin[i] * noiseKelvin[i] * (1 + NOISE_FLOOR);
            for (int j = 0; j < m; j++) {
                double hi = POWER_UNCERTAINTY * (goldenKelvin[i] - goldenKelvin[0]);
                double hj = POWER_UNCERTAINTY * (goldenKelvin[j] - goldenKelvin[0]);
                double distance = logTimes[i] - logTimes[j];
                s[i][j] += hi * hj + unmodelled * unmodelled * Math.exp(-0.5 * distance * distance);
            }
        }
        return s;
    }

    /**
     * The same matrix with its lower half copied from the upper: products differ in rounding, which Commons Math
     * refuses.
     */
    public static RealMatrix symmetrised(RealMatrix matrix) {
        for (int i = 0; i < matrix.getRowDimension(); i++) {
            for (int j = 0; j < i; j++) {
                matrix.setEntry(i, j, matrix.getEntry(j, i));
            }
        }
        return matrix;
    }

    /** Orthonormal contrasts (Helmert), (m - 1) by m: rows orthogonal to a constant. */
    public static RealMatrix contrasts(int m) {
        double[][] b = new double[m - 1][m];
        for (int i = 0; i < m - 1; i++) {
            double norm = Math.sqrt((i + 1.0) * (i + 2.0));
            for (int j = 0; j <= i; j++) {
                b[i][j] = 1 / norm;
            }
            b[i][i + 1] = -(i + 1.0) / norm;
        }
        return new Array2DRowRealMatrix(b, false);
    }

    /**
     * A bin covariance seen in whitened coordinates: L^-1 B K B' L^-T, (m - 1) by (m - 1).
     *
     * @param binCovariance m by m [K^2], symmetric, not modified
     */
    public double[][] whitenCovariance(double[][] binCovariance) {
        RealMatrix w = new Array2DRowRealMatrix(whitening, false);
        return w.multiply(new Array2DRowRealMatrix(binCovariance, false)).multiply(w.transpose()).getData();
    }

    /** Number of comparison bins m. */
    public int bins() {
        return bins;
    }

    /** Degrees of freedom m - 1: length of a whitened deviation. */
    public int freedom() {
        return bins - 1;
    }

    /**
     * Whitens a deviation.
     *
     * @param deviationKelvin length m [K], not modified
     * @param out             length m - 1, overwritten, must not alias the input
     */
    public void whitenInto(double[] deviationKelvin, double[] out) {
        for (int i = 0; i < out.length; i++) {
            out[i] = InnerProduct.of(whitening[i], deviationKelvin);
        }
    }

    /** As {@link #whitenInto} with a new array. */
    public double[] whiten(double[] deviationKelvin) {
        double[] out = new double[freedom()];
        whitenInto(deviationKelvin, out);
        return out;
    }

    /** Squared length of a whitened deviation, Hotelling's T-squared with the family's own covariance. */
    public static double tSquared(double[] whitened) {
        double sum = 0;
        for (double z : whitened) {
            sum += z * z;
        }
        return sum;
    }

    /**
     * Generalised least squares amplitude of a whitened shape in a whitened deviation, with its standard error
     * 1/|shape|: Aitken's estimator.
     */
    public static double amplitude(double[] whitenedShape, double[] whitened) {
        double along = 0;
        double norm = 0;
        for (int i = 0; i < whitened.length; i++) {
            along += whitenedShape[i] * whitened[i];
            norm += whitenedShape[i] * whitenedShape[i];
        }
        return along / norm;
    }
}

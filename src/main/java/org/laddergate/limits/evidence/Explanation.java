package org.laddergate.limits.evidence;

import java.util.Optional;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.laddergate.limits.FaultSignature;
import org.laddergate.thermal.InnerProduct;

/**
 * One way to explain a deviation from the golden family: a signature of uncertain size whose later shape may bend.
 *
 * <p>Definition: d ~ N(a s, S0 + a^2 (v^2 s s' + b^2 |s s'| o G)), o the element-wise product, G(t,t') = exp(-(ln t -
 * ln t')^2 / (2 l^2)): size a (1 +- v) times the signature s, with a smooth relative error b of correlation length l
 * in ln t. Where s is still zero nothing may happen: heat cannot report a fault before it gets there. The evidence is
 * the mean over a short list of sizes a of the likelihood ratio to the family N(0, S0).
 *
 * <p>Method: in whitened coordinates K = v^2 s s' + b^2 |s s'| o G has the eigenpairs (l_i, u_i); with y = U'z, c =
 * U's, ln L(a) = a s'z - a^2 s's/2 + sum (q/(1+q)) (y - a c)^2 / 2 - sum ln(1+q) / 2, q = a^2 l. All but y and s'z is
 * prepared.
 *
 * <p>Source: Gaussian likelihood ratio with the matrix inversion and determinant lemmas; the causal bending kernel is
 * our own and described in docs/numerics.md.
 *
 * <p>Error: directions whose variance is below 1e-6 of the family's are dropped, which changes ln L by less than 1e-6
 * z^2.
 *
 * <p>Cost: rank times (m - 1) multiplications plus sizes times rank, no allocation. Immutable.
 */
public final class Explanation {
    private static final double SMALLEST_VARIANCE = 1e-6;
    private static final double ALLOWED_BENDING = 0.16;

    private final Optional<FaultSignature> signature;
    private final double logWeight;
    private final double spread;
    private final double[] contrastShape;
    private final double[][] contrastBending;
    private final double[] whitenedShape;
    private final double shapeSquared;
    private final double[][] directions;
    private final double[] along;
    private final double[] sizes;
    private final double[][] shrink;
    private final double[] constant;

    private Explanation(Builder b, FamilyModel family) {
        this.signature = b.signature;
        this.logWeight = Math.log(b.weight);
        this.spread = b.spread;
        double[][] bending = b.bending();
        RealMatrix contrasts = FamilyModel.contrasts(b.shape.length);
        this.contrastShape = contrasts.operate(b.shape);
        this.contrastBending = contrasts.multiply(new Array2DRowRealMatrix(bending, false))
                .multiply(contrasts.transpose()).getData();
        this.whitenedShape = family.whiten(b.shape);
        this.shapeSquared = FamilyModel.tSquared(whitenedShape);
        this.sizes = b.sizes.clone();
        EigenDecomposition eigen = new EigenDecomposition(
                new Array2DRowRealMatrix(symmetric(family.whitenCovariance(bending), b.spread, whitenedShape), false));
        double[] values = eigen.getRealEigenvalues();
        int rank = 0;
        while (rank < values.length && values[rank] > SMALLEST_VARIANCE) {
            rank++;
        }
        directions = new double[rank][];
        along = new double[rank];
        for (int i = 0; i < rank; i++) {
            directions[i] = eigen.getEigenvector(i).toArray();
            along[i] = InnerProduct.of(directions[i], whitenedShape);
        }
        shrink = new double[sizes.length][rank];
        constant = new double[sizes.length];
        for (int k = 0; k < sizes.length; k++) {
            double a2 = sizes[k] * sizes[k];
            double logDeterminant = 0;
            for (int i = 0; i < rank; i++) {
                double q = a2 * values[i];
                shrink[k][i] = 0.5 * q / (1 + q);
                logDeterminant += Math.log1p(q);
            }
            constant[k] = -0.5 * a2 * shapeSquared - 0.5 * logDeterminant - Math.log(sizes.length);
        }
    }

    private static double[][] symmetric(double[][] bending, double spread, double[] shape) {
        double[][] out = new double[shape.length][shape.length];
        for (int i = 0; i < shape.length; i++) {
            for (int j = 0; j < shape.length; j++) {
                out[i][j] = 0.5 * (bending[i][j] + bending[j][i]) + spread * spread * shape[i] * shape[j];
            }
        }
        return out;
    }

    /** The fault signature behind this explanation, if it is a fault of a region. */
    public Optional<FaultSignature> signature() {
        return signature;
    }

    /** Logarithm of the prior weight among the explanations of the same subject. */
    public double logWeight() {
        return logWeight;
    }

    /** Longest scratch array {@link #logEvidence} needs. */
    int rank() {
        return directions.length;
    }

    /**
     * Logarithm of the likelihood ratio of this explanation to the family, averaged over the sizes.
     *
     * @param whitened whitened deviation, length m - 1, not modified
     * @param scratch  length at least m - 1, overwritten
     */
    public double logEvidence(double[] whitened, double[] scratch) {
        int rank = directions.length;
        for (int i = 0; i < rank; i++) {
            scratch[i] = InnerProduct.of(directions[i], whitened);
        }
        double projected = InnerProduct.of(whitenedShape, whitened);
        double best = Double.NEGATIVE_INFINITY;
        double sum = 0;
        for (int k = 0; k < sizes.length; k++) {
            double a = sizes[k];
            double log = constant[k] + a * projected;
            double[] h = shrink[k];
            for (int i = 0; i < rank; i++) {
                double r = scratch[i] - a * along[i];
                log += h[i] * r * r;
            }
            if (log > best) {
                sum = sum * Math.exp(best - log) + 1;
                best = log;
            } else {
                sum += Math.exp(log - best);
            }
        }
        return best + Math.log(sum);
    }

    /**
     * What this explanation at a given size may have done to the curve: a^2 ((1 + v^2) s s' + 0.16 b^2 |s s'| o G)
     * [K^2]. Once a fault is named its signature is known better than while all were weighed; with the full bending no
     * second fault could ever be seen behind a large first one.
     *
     * @return covariance in the coordinates of {@link FamilyModel#contrasts}, (m - 1) by (m - 1)
     */
    public double[][] allowance(double size) {
        int n = contrastShape.length;
        double[][] out = new double[n][n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                out[i][j] = size * size * (ALLOWED_BENDING * contrastBending[i][j]
                        + (1 + spread * spread) * contrastShape[i] * contrastShape[j]);
            }
        }
        return out;
    }

    /**
     * Generalised least squares size of the signature in a deviation, in units of the signature; 1 for a free
     * explanation [1].
     */
    public double size(double[] whitened) {
        return shapeSquared > 0 ? InnerProduct.of(whitenedShape, whitened) / shapeSquared : 1;
    }

    /** Collects what an explanation needs. */
    static final class Builder {
        private final double[] logTimes;
        private final double[] shape;
        private Optional<FaultSignature> signature = Optional.empty();
        private double weight = 1;
        private double[] sizes = {1};
        private double spread;
        private double bend;
        private double bendLength = 1;
        private double[][] free;

        /**
         * @param logTimes ln of the bin centres [ln s], length m
         * @param shape    mean deviation [K], length m; zero for a purely free explanation
         */
        Builder(double[] logTimes, double[] shape) {
            this.logTimes = logTimes;
            this.shape = shape;
        }

        Builder signature(FaultSignature s) {
            signature = Optional.of(s);
            return this;
        }

        /** Prior weight among the explanations of the same subject [1]. */
        Builder weight(double w) {
            weight = w;
            return this;
        }

        /** Sizes a, in units of the shape, averaged with equal weight; negative: the opposite deviation. */
        Builder sizes(double... a) {
            sizes = a;
            return this;
        }

        /** Relative spread v of the size [1]. */
        Builder spread(double v) {
            spread = v;
            return this;
        }

        /** Relative smooth error b and its correlation length l in ln t [1]. */
        Builder bend(double b, double l) {
            bend = b;
            bendLength = l;
            return this;
        }

        /** A smooth free deviation of this standard deviation [K] and correlation length in ln t instead of a shape. */
        Builder free(double sigmaKelvin, double length) {
            int m = logTimes.length;
            free = new double[m][m];
            for (int i = 0; i < m; i++) {
                for (int j = 0; j < m; j++) {
                    free[i][j] = sigmaKelvin * sigmaKelvin * correlation(i, j, length);
                }
            }
            return this;
        }

        Explanation build(FamilyModel family) {
            return new Explanation(this, family);
        }

        private double correlation(int i, int j, double length) {
            double d = (logTimes[i] - logTimes[j]) / length;
            return Math.exp(-0.5 * d * d);
        }

        double[][] bending() {
            if (free != null) {
                return free;
            }
            int m = logTimes.length;
            double[][] k = new double[m][m];
            for (int i = 0; i < m; i++) {
                for (int j = 0; j < m; j++) {
                    k[i][j] = bend * bend * Math.abs(shape[i] * shape[j]) * correlation(i, j, bendLength);
                }
            }
            return k;
        }
    }
}

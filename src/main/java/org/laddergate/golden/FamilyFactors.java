package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.laddergate.limits.evidence.FamilyModel;

/**
 * Leading factors of how golden units differ, beyond their noise.
 *
 * <p>Definition: in coordinates whitened by noise and power uncertainty alone, the sample covariance of the deviations
 * has eigenvalues l_i; those above the bulk that pure noise of n units in m dimensions would give are factors, with
 * variance (l_i - 1)(n + 1)/n: the mean is itself estimated from n units.
 *
 * <p>Source: probabilistic principal components, Tipping and Bishop (1999); edge of the noise bulk (1 + sqrt(m/n))^2,
 * Marchenko and Pastur (1967).
 *
 * <p>Degenerate input: units that differ by less than noise have no factor.
 */
final class FamilyFactors {
    private FamilyFactors() {}

    /**
     * @param deviations golden units' deviations from a golden mean in comparison bins [K]; their own mean is removed
     * @param noise      noise in comparison bins [K]
     * @param golden     golden mean in comparison bins [K]
     * @param logTimes   ln of the comparison bin centres
     * @return factors [K], each of length m
     */
    static double[][] of(List<double[]> deviations, double[] noise, double[] golden, double[] logTimes) {
        int m = noise.length;
        int n = deviations.size();
        RealMatrix contrasts = FamilyModel.contrasts(m);
        RealMatrix reduced = contrasts.multiply(
                new Array2DRowRealMatrix(FamilyModel.base(noise, golden, logTimes), false))
                .multiply(contrasts.transpose());
        RealMatrix root = new CholeskyDecomposition(FamilyModel.symmetrised(reduced)).getL();
        RealMatrix whitening = new LUDecomposition(root, 0).getSolver().solve(contrasts);
        double[] mean = mean(deviations);
        double[][] covariance = new double[m - 1][m - 1];
        for (double[] d : deviations) {
            double[] centred = new double[m];
            for (int i = 0; i < m; i++) {
                centred[i] = d[i] - mean[i];
            }
            double[] z = whitening.operate(centred);
            for (int i = 0; i < m - 1; i++) {
                for (int j = 0; j < m - 1; j++) {
                    covariance[i][j] += z[i] * z[j] / (n - 1);
                }
            }
        }
        EigenDecomposition eigen = new EigenDecomposition(new Array2DRowRealMatrix(covariance, false));
        double edge = Math.pow(1 + Math.sqrt((m - 1.0) / n), 2);
        List<double[]> factors = new ArrayList<>();
        for (int k = 0; k < m - 1 && k < n - 2; k++) {
            double value = eigen.getRealEigenvalue(k);
            if (value <= edge) {
                break;
            }
            double scale = Math.sqrt((value - 1) * (n + 1.0) / n);
            double[] inContrasts = root.operate(eigen.getEigenvector(k).toArray());
            double[] factor = contrasts.transpose().operate(inContrasts);
            for (int i = 0; i < m; i++) {
                factor[i] *= scale;
            }
            factors.add(factor);
        }
        return factors.toArray(new double[0][]);
    }

    static double[] mean(List<double[]> rows) {
        double[] mean = new double[rows.get(0).length];
        for (double[] r : rows) {
            for (int i = 0; i < mean.length; i++) {
                mean[i] += r[i] / rows.size();
            }
        }
        return mean;
    }
}

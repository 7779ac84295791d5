package org.laddergate.limits.evidence;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Arrays;
import java.util.Random;
import org.apache.commons.math3.distribution.MultivariateNormalDistribution;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.junit.jupiter.api.Test;

class ExplanationTest {

    /** Referee: densities of Commons Math's multivariate normal distribution, in coordinates without the free offset. */
    @Test
    void logEvidence_randomCases_ratioOfNormalDensities() {
        Random random = new Random(9);
        for (int trial = 0; trial < 20; trial++) {
            int m = 4 + random.nextInt(6);
            double[] noise = random.doubles(m, 0.5, 2).toArray();
            double[] golden = new double[m];
            double[] logTimes = new double[m];
            for (int i = 0; i < m; i++) {
                golden[i] = 3 * (m - i);
                logTimes[i] = 0.4 * i;
            }
            double[][] factors = {random.doubles(m, -2, 2).toArray()};
            FamilyModel family = FamilyModel.of(noise, factors, golden, 0.1, logTimes);
            double[] shape = random.doubles(m, -3, 3).toArray();
            double size = 0.5 + random.nextDouble();
            Explanation explanation = new Explanation.Builder(logTimes, shape).spread(0.3).bend(0.2, 1).sizes(size)
                    .build(family);
            double[] d = random.doubles(m, -4, 4).toArray();
            double ours = explanation.logEvidence(family.whiten(d), new double[family.freedom()]);
            assertEquals(referee(family, shape, size, logTimes, d), ours, 2e-5 * (1 + Math.abs(ours)));
        }
    }

    private static double referee(FamilyModel family, double[] shape, double size, double[] logTimes, double[] d) {
        int m = shape.length;
        double[][] extra = new double[m][m];
        for (int i = 0; i < m; i++) {
            for (int j = 0; j < m; j++) {
                double distance = logTimes[i] - logTimes[j];
                extra[i][j] = size * size * (0.09 * shape[i] * shape[j]
                        + 0.04 * Math.abs(shape[i] * shape[j]) * Math.exp(-0.5 * distance * distance));
            }
        }
        RealMatrix covariance = new Array2DRowRealMatrix(family.whitenCovariance(extra));
        for (int i = 0; i < m - 1; i++) {
            covariance.addToEntry(i, i, 1);
            for (int j = 0; j < i; j++) {
                covariance.setEntry(i, j, covariance.getEntry(j, i));
            }
        }
        double[] z = family.whiten(d);
        double[] mean = Arrays.stream(family.whiten(shape)).map(v -> size * v).toArray();
        double with = new MultivariateNormalDistribution(mean, covariance.getData()).density(z);
        double[][] unit = new double[m - 1][m - 1];
        for (int i = 0; i < m - 1; i++) {
            unit[i][i] = 1;
        }
        return Math.log(with / new MultivariateNormalDistribution(new double[m - 1], unit).density(z));
    }

    @Test
    void whiten_constantCurve_isZero() {
        FamilyModel family = FamilyModel.of(new double[] {1, 1, 1, 2}, new double[][] {{0, 1, 2, 3}},
                new double[] {4, 3, 2, 1}, 0, new double[] {0, 1, 2, 3});
        for (double z : family.whiten(new double[] {7, 7, 7, 7})) {
            assertEquals(0, z, 1e-12);
        }
    }
}

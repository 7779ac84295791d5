package org.laddergate.limits;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.laddergate.limits.evidence.FamilyModel;

class RegionEstimatorTest {
    private static final int M = 12;
    private static final double[] OWN = step(3);
    private static final double[] OTHER = step(7);

    private static double[] step(int at) {
        double[] s = new double[M];
        for (int i = 0; i < M; i++) {
            s[i] = -1 / (1 + Math.exp(-(i - at)));
        }
        return s;
    }

    private static RegionEstimator estimator() {
        double[][] base = new double[M][M];
        for (int i = 0; i < M; i++) {
            base[i][i] = 0.01 * 0.01;
        }
        return RegionEstimator.of("own", new FaultSignature("own", FaultSignature.Shape.UNIFORM, 0.5, 0.02, OWN),
                List.of(new SpreadDirection("own", "own", 0.3, OWN), new SpreadDirection("other", "other", 0.2, OTHER)),
                base);
    }

    /** A planted excess is read back, whatever the offset; other regions and noise scatter the reading as it says itself. */
    @Test
    void excess_plantedDeviation_unbiasedWithTheStatedUncertainty() {
        RegionEstimator estimator = estimator();
        Random random = new Random(2);
        int draws = 4000;
        double mean = 0;
        double square = 0;
        for (int k = 0; k < draws; k++) {
            double other = 0.2 * random.nextGaussian();
            double offset = 50 * random.nextGaussian();
            double[] d = new double[M];
            for (int i = 0; i < M; i++) {
                d[i] = offset + 1.5 * OWN[i] + other * OTHER[i] + 0.01 * random.nextGaussian();
            }
            double e = estimator.excessKelvinPerWatt(d);
            mean += e / draws;
            square += e * e / draws;
        }
        double scatter = Math.sqrt(square - mean * mean);
        // 4 standard errors of mean and scatter.
        assertEquals(1.5 * 0.02, mean, 4 * scatter / Math.sqrt(draws));
        assertEquals(1, scatter / estimator.uncertaintyKelvinPerWatt(), 4 / Math.sqrt(2.0 * draws));
    }

    @Test
    void readAllowing_somethingElse_isLessCertain() {
        double[] like = step(4);
        double[] contrasted = FamilyModel.contrasts(M).operate(like);
        double[][] allowed = new double[M - 1][M - 1];
        for (int i = 0; i < M - 1; i++) {
            for (int j = 0; j < M - 1; j++) {
                allowed[i][j] = 100 * contrasted[i] * contrasted[j];
            }
        }
        RegionEstimator.Reading reading = estimator().readAllowing(allowed, like);
        assertTrue(reading.uncertaintyKelvinPerWatt() > estimator().uncertaintyKelvinPerWatt());
        assertEquals(0, reading.excessKelvinPerWatt(), 1e-4, "what is allowed for is not read");
    }
}

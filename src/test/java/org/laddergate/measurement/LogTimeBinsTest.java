package org.laddergate.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;

class LogTimeBinsTest {

    @Test
    void binInto_straightLineInLogTime_exactAtTheCentres() {
        LogTimeBins bins = LogTimeBins.spanning(1e-4, 1, 20);
        double[] t = new double[150];
        double[] v = new double[150];
        for (int i = 0; i < t.length; i++) {
            t[i] = 0.5e-4 * Math.pow(10, i / 33.0);
            v[i] = 40 - 3 * Math.log(t[i]);
        }
        double[] out = new double[bins.size()];
        bins.binInto(t, v, out, new int[bins.size()]);
        for (int i = 0; i < out.length; i++) {
            // Mean time instead of mean ln t: second order in the bin width, (ln 10 / 20)^2 / 24 of the slope.
            assertEquals(40 - 3 * Math.log(bins.centreSeconds(i)), out[i], 3 * 0.0133 / 12 + 1e-9, "bin " + i);
        }
    }

    @Test
    void binInto_hundredThousandRawSamples_agreeWithTheSmoothCurveWithinTheirNoise() {
        LogTimeBins bins = LogTimeBins.spanning(1e-3, 1, 25);
        Random random = new Random(1);
        int n = 100_000;
        double[] t = new double[n];
        double[] v = new double[n];
        for (int i = 0; i < n; i++) {
            t[i] = (i + 1) * 1e-5;
            v[i] = curve(t[i]) + 0.05 * random.nextGaussian();
        }
        double[] out = new double[bins.size()];
        int[] counts = new int[bins.size()];
        assertEquals(bins.size(), bins.binInto(t, v, out, counts));
        for (int i = 0; i < out.length; i++) {
            assertEquals(curve(bins.centreSeconds(i)), out[i], 5 * 0.05 / Math.sqrt(counts[i]) + 2e-3, "bin " + i);
        }
    }

    private static double curve(double t) {
        return 20 * Math.exp(-t / 0.2) + 5 * Math.exp(-t / 0.004);
    }

    @Test
    void binInto_shortGapsBridged_longEndsStayEmpty() {
        LogTimeBins bins = LogTimeBins.spanning(1e-3, 1, 20);
        double[] t = {2e-3, 3e-3, 5e-3, 9e-3, 2e-2, 4e-2, 6e-2};
        double[] v = {7, 6, 5, 4, 3, 2, 1};
        double[] out = new double[bins.size()];
        int filled = bins.binInto(t, v, out, new int[bins.size()]);
        assertEquals(7, filled);
        assertTrue(Double.isNaN(out[0]), "a third of a decade is too much to continue");
        assertTrue(Double.isNaN(out[out.length - 1]));
        assertTrue(!Double.isNaN(out[20]));
    }
}

package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

/**
 * Source: curves-2000.csv, exact step response of a four-layer stack (die 0.1, attach 0.04, base 0.0513, TIM 0.25 K/W), good and
 * with the attach doubled. Regions are read between capacitances in the middle of the steep stretches, where a structure
 * function says something: half the die at 0.00623 J/K, inside the base at 0.05 and 0.2 J/K.
 */
class StructureSolverTest {
    private static final double POWER = 100;
    private static final double TOTAL = 0.4413;
    private static final int POINTS = 250;

    @Test
    void smoothest_exactCurve_partsWithinTwoPercentAndTotalWithinHalf() {
        double[] t = column(0);
        double[] y = cooling(1, TOTAL);
        SpectrumSearch.Found found = SpectrumSearch.smoothest(t, y, sigma(1e-3), POWER, Double.POSITIVE_INFINITY);
        StructureFunction f = StructureFunction.of(FosterToCauer.computeLadder(
                FosterNetwork.of(found.amplitudes(), found.plan().timeConstantsSeconds())));
        assertEquals(TOTAL, f.totalResistanceKelvinPerWatt(), 0.005 * TOTAL);
        assertEquals(0.0500, f.resistanceAt(0.00623), 0.02 * 0.0500, "to the middle of the die");
        assertEquals(0.0927, f.resistanceAt(0.05) - f.resistanceAt(0.00623), 0.02 * 0.0927, "attach");
        assertEquals(0.2875, f.totalResistanceKelvinPerWatt() - f.resistanceAt(0.2), 0.02 * 0.2875, "TIM");
        for (int i = 1; i < f.size(); i++) {
            assertTrue(f.resistanceKelvinPerWatt(i) >= f.resistanceKelvinPerWatt(i - 1)
                    && f.capacitanceJoulesPerKelvin(i) >= f.capacitanceJoulesPerKelvin(i - 1), "never falls");
        }
    }

    /** At 0.01 K noise: bias below 2 %, scatter below 0.5 % of the attach; a doubled attach found within 3 %. */
    @Test
    void drawnTowards_noisyCurves_smallBiasAndSmallScatter() {
        double[] t = column(0);
        double[] y = cooling(1, TOTAL);
        double[] doubled = cooling(2, 0.4813);
        SpectrumSearch.Found golden = SpectrumSearch.smoothest(t, y, sigma(1.25e-3), POWER, Double.POSITIVE_INFINITY);
        StructureSolver solver = new StructureSolver(SpectrumPlan.drawnTowards(golden.amplitudes(), t, sigma(0.01), POWER,
                Double.POSITIVE_INFINITY, 30, 3));
        Random random = new Random(3);
        int draws = 60;
        double mean = 0;
        double square = 0;
        double meanDoubled = 0;
        for (int k = 0; k < draws; k++) {
            solver.solve(noisy(y, random));
            double attach = solver.resistanceAt(0.05) - solver.resistanceAt(0.00623);
            mean += attach / draws;
            square += attach * attach / draws;
            solver.solve(noisy(doubled, random));
            meanDoubled += (solver.resistanceAt(0.05) - solver.resistanceAt(0.00623)) / draws;
        }
        assertEquals(0.0927, mean, 0.02 * 0.0927);
        assertTrue(Math.sqrt(square - mean * mean) < 0.005 * 0.0927, "scatter " + Math.sqrt(square - mean * mean));
        assertEquals(0.1327, meanDoubled, 0.03 * 0.1327);
    }

    /** At 0.01 K noise the truth lies within twice the uncertainty we report, for every part that can be read. */
    @Test
    void uncertainty_noisyCurve_coversTheTruth() {
        double[] t = column(0);
        double[] y = cooling(1, TOTAL);
        SpectrumSearch.Found golden = SpectrumSearch.smoothest(t, y, sigma(1.25e-3), POWER, Double.POSITIVE_INFINITY);
        SpectrumPlan plan = SpectrumPlan.drawnTowards(golden.amplitudes(), t, sigma(0.01), POWER, Double.POSITIVE_INFINITY, 30,
                3);
        StructureSolver solver = new StructureSolver(plan);
        solver.solve(noisy(y, new Random(8)));
        double[][] parts = {{0, 0.00623, 0.0500}, {0.00623, 0.05, 0.0927}, {0, 0.05, 0.1427}, {0, 0.2, 0.1538}};
        for (double[] part : parts) {
            double u = StructureUncertainty.between(plan, y, sigma(0.01), part[0], part[1]);
            double read = solver.resistanceAt(part[1]) - solver.resistanceAt(part[0]);
            assertEquals(part[2], read, 2 * u, "between " + part[0] + " and " + part[1] + " J/K, u = " + u);
            assertTrue(u < 0.03 * part[2], "an uncertainty that says something: " + u);
        }
    }

    /** Lawson and Hanson, chapter 23: conditions of the constrained minimum, on random problems. */
    @Test
    void minimise_randomProblems_meetTheOptimalityConditions() {
        Random random = new Random(5);
        for (int trial = 0; trial < 60; trial++) {
            int n = 2 + random.nextInt(40);
            double[][] h = new double[n][n];
            double[][] a = new double[n + 5][n];
            for (double[] row : a) {
                Arrays.setAll(row, i -> random.nextGaussian());
            }
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    for (double[] row : a) {
                        h[i][j] += row[i] * row[j];
                    }
                }
                h[i][i] += 0.1;
            }
            double[] f = random.doubles(n, -5, 5).toArray();
            double[] x = new double[n];
            new NonNegativeQuadratic(h, new boolean[n]).minimiseInto(f, x, new NonNegativeQuadratic.Workspace(n));
            for (int i = 0; i < n; i++) {
                double gradient = -f[i];
                for (int j = 0; j < n; j++) {
                    gradient += h[i][j] * x[j];
                }
                assertTrue(x[i] >= 0);
                assertTrue(gradient >= -1e-8, "gradient " + gradient);
                assertEquals(0, gradient * x[i], 1e-8);
            }
        }
    }

    private static double[] noisy(double[] y, Random random) {
        return Arrays.stream(y).map(v -> v + 0.01 * random.nextGaussian()).toArray();
    }

    private static double[] sigma(double value) {
        double[] s = new double[POINTS];
        Arrays.fill(s, value);
        return s;
    }

    private static double[] cooling(int column, double total) {
        return Arrays.stream(column(column)).map(z -> POWER * (total - z)).toArray();
    }

    private static double[] column(int column) {
        List<String> lines = ReferenceData.lines("curves-2000.csv");
        double[] out = new double[POINTS];
        for (int i = 0; i < POINTS; i++) {
            int row = 1 + (int) Math.round(i * (lines.size() - 2.0) / (POINTS - 1));
            out[i] = Double.parseDouble(lines.get(row).split(",")[column]);
        }
        return out;
    }
}

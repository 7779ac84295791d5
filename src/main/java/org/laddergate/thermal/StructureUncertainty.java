package org.laddergate.thermal;

import java.util.Random;

/**
 * How far a structure function read off one curve may be from the truth.
 *
 * <p>Definition: u^2 = s^2 + (0.015 r)^2, s the scatter of the reading under the curve's noise, found by adding
 * simulated noise to a clean curve, r the reading: the part of the path between two capacitances. The second term is
 * what a finite number of time constants leaves; it is the bias found on exact curves (StructureSolverTest), not
 * learnt from the product.
 *
 * <p>Domain: readings between steep stretches; inside a vertical step of the structure function no figure holds.
 *
 * <p>Cost: 40 solutions of the plan; a fixed seed makes it repeatable.
 */
public final class StructureUncertainty {
    private static final double RESOLUTION = 0.015;
    private static final int DRAWS = 40;

    private StructureUncertainty() {}

    /**
     * Standard uncertainty of the resistance between two capacitances [K/W].
     *
     * @param clean         curve without noise at the plan's times [K], not modified
     * @param sigmaKelvin   noise of one curve at each time [K], not modified
     * @param fromJoulesPerKelvin 0: from the junction
     */
    public static double between(SpectrumPlan plan, double[] clean, double[] sigmaKelvin, double fromJoulesPerKelvin,
            double toJoulesPerKelvin) {
        StructureSolver solver = new StructureSolver(plan);
        Random random = new Random(1);
        double[] noisy = new double[clean.length];
        double mean = 0;
        double square = 0;
        for (int k = 0; k < DRAWS; k++) {
            for (int i = 0; i < noisy.length; i++) {
                noisy[i] = clean[i] + sigmaKelvin[i] * random.nextGaussian();
            }
            solver.solve(noisy);
            double r = solver.resistanceAt(toJoulesPerKelvin) - solver.resistanceAt(fromJoulesPerKelvin);
            mean += r / DRAWS;
            square += r * r / DRAWS;
        }
        double scatter = Math.sqrt(Math.max(0, square - mean * mean) * DRAWS / (DRAWS - 1));
        return Math.hypot(scatter, RESOLUTION * mean);
    }
}

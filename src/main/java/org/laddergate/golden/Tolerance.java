package org.laddergate.golden;

import org.apache.commons.math3.analysis.UnivariateFunction;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;
import org.apache.commons.math3.analysis.solvers.BrentSolver;
import org.apache.commons.statistics.distribution.ChiSquaredDistribution;
import org.apache.commons.statistics.distribution.NormalDistribution;

/** Placeholder room for the exact factor until the statistics package holds it. */
final class Tolerance {
    private static final NormalDistribution NORMAL = NormalDistribution.of(0, 1);

    private Tolerance() {}

    static double twoSidedFactor(int n, double content, double confidence) {
        ChiSquaredDistribution chi = ChiSquaredDistribution.of(n - 1);
        double root = Math.sqrt(n);
        GaussIntegrator rule = new GaussIntegratorFactory().legendre(60, 0, 8 / root);
        double howe = Math.sqrt((n - 1) * (1 + 1.0 / n)
                * Math.pow(NORMAL.inverseCumulativeProbability((1 + content) / 2), 2)
                / chi.inverseCumulativeProbability(1 - confidence));
        UnivariateFunction f = k -> 2 * rule.integrate(x -> {
            double r = halfWidth(x, content);
            return chi.survivalProbability((n - 1) * r * r / (k * k)) * root * NORMAL.density(root * x);
        }) - confidence;
        return new BrentSolver(1e-12, 1e-12).solve(200, f, 0.7 * howe, 1.4 * howe, howe);
    }

    private static double halfWidth(double x, double content) {
        double r = NORMAL.inverseCumulativeProbability((1 + content) / 2) + x * 0.5;
        for (int i = 0; i < 60; i++) {
            double g = NORMAL.probability(x - r, x + r) - content;
            double step = g / (NORMAL.density(x + r) + NORMAL.density(x - r));
            r -= Math.max(-0.5, Math.min(0.5, step));
            if (Math.abs(step) < 1e-14) {
                break;
            }
        }
        return r;
    }
}

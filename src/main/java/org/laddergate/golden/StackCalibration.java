package org.laddergate.golden;

import java.util.List;
import java.util.stream.IntStream;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.laddergate.measurement.Recipe;
import org.laddergate.thermal.FosterNetwork;

/**
 * Fits the material values of a layer table to the golden mean curve, within what is known of them.
 *
 * <p>Definition: minimises |W (y - y_model(p))|^2 + sum ((p - p_0)/s)^2 with offset and linear drift of y free; the
 * second term is the prior of the layer table, so parameters the curve says nothing about stay where they are.
 *
 * <p>Method: Gauss-Newton with halved steps; the Jacobian by forward differences, one model each, in parallel.
 *
 * <p>Source: Bayesian (maximum a posteriori) least squares, e.g. Tarantola, Inverse Problem Theory (2005), chapter 3.
 *
 * <p>Error: what matters is not the parameters but that fault signatures come out right, see docs/accuracy.md.
 *
 * <p>Cost: about five times the number of parameters in conduction models.
 */
final class StackCalibration {
    private static final int MOST_STEPS = 8;
    private static final double ENOUGH = 0.01;
    private static final double STEP = 0.02;

    private final StackModel stack;
    private final Recipe recipe;
    private final double[] timesSeconds;
    private final double[] weights;
    private final double[] golden;

    /**
     * @param golden        golden mean curve at the recipe's power [K], cooling
     * @param sigmaKelvin   what the model may be off by at each time [K]
     */
    StackCalibration(StackModel stack, Recipe recipe, double[] timesSeconds, double[] golden, double[] sigmaKelvin) {
        this.stack = stack;
        this.recipe = recipe;
        this.timesSeconds = timesSeconds;
        this.golden = golden;
        this.weights = new double[sigmaKelvin.length];
        for (int i = 0; i < weights.length; i++) {
            weights[i] = 1 / sigmaKelvin[i];
        }
    }

    /** Result of a fit: parameters, and the weighted root mean square misfit [1]. */
    record Fit(double[] parameters, double misfit) {}

    Fit fit() {
        double[] nominal = stack.nominal();
        double[] spread = stack.spread();
        double[] p = nominal.clone();
        double[] residual = residual(p);
        double cost = cost(residual, p, nominal, spread);
        for (int step = 0; step < MOST_STEPS; step++) {
            double[] direction = direction(p, residual, nominal, spread);
            double before = cost;
            for (double length = 1; length > 0.02; length /= 2) {
                double[] trial = p.clone();
                for (int i = 0; i < p.length; i++) {
                    trial[i] += length * Math.max(-1, Math.min(1, direction[i]));
                }
                double[] trialResidual = residual(trial);
                double trialCost = cost(trialResidual, trial, nominal, spread);
                if (trialCost < cost) {
                    p = trial;
                    residual = trialResidual;
                    cost = trialCost;
                    break;
                }
            }
            if (before - cost < ENOUGH * before) {
                break;
            }
        }
        return new Fit(p, Math.sqrt(square(residual) / residual.length));
    }

    private double[] direction(double[] p, double[] residual, double[] nominal, double[] spread) {
        int n = p.length;
        double[][] jacobian = new double[n][];
        IntStream.range(0, n).parallel().forEach(i -> {
            double[] moved = p.clone();
            double step = i >= 2 * stack.layerCount() ? 5 * STEP : STEP;
            moved[i] += step;
            double[] r = residual(moved);
            for (int k = 0; k < r.length; k++) {
                r[k] = (residual[k] - r[k]) / step;
            }
            jacobian[i] = r;
        });
        double[][] normal = new double[n][n];
        double[] right = new double[n];
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                for (int k = 0; k < residual.length; k++) {
                    normal[i][j] += jacobian[i][k] * jacobian[j][k];
                }
            }
            normal[i][i] += 1 / (spread[i] * spread[i]);
            for (int k = 0; k < residual.length; k++) {
                right[i] += jacobian[i][k] * residual[k];
            }
            right[i] -= (p[i] - nominal[i]) / (spread[i] * spread[i]);
        }
        return new CholeskyDecomposition(new Array2DRowRealMatrix(normal, false), 1e-9, 0).getSolver()
                .solve(new ArrayRealVector(right, false)).toArray();
    }

    /** Weighted misfit with offset and linear drift taken out. */
    private double[] residual(double[] p) {
        FosterNetwork network = stack.build(p, stack.noChange(), List.of()).network();
        double[] model = new double[timesSeconds.length];
        network.coolingInto(recipe.heatingPowerWatts(), recipe.pulseSeconds(), timesSeconds, model);
        double[] r = new double[model.length];
        for (int i = 0; i < r.length; i++) {
            r[i] = golden[i] - model[i];
        }
        return withoutLine(r);
    }

    private double[] withoutLine(double[] r) {
        double sw = 0;
        double st = 0;
        double stt = 0;
        double sr = 0;
        double str = 0;
        for (int i = 0; i < r.length; i++) {
            double w = weights[i] * weights[i];
            double t = timesSeconds[i];
            sw += w;
            st += w * t;
            stt += w * t * t;
            sr += w * r[i];
            str += w * t * r[i];
        }
        double determinant = sw * stt - st * st;
        double offset = (sr * stt - str * st) / determinant;
        double slope = (sw * str - st * sr) / determinant;
        double[] out = new double[r.length];
        for (int i = 0; i < r.length; i++) {
            out[i] = weights[i] * (r[i] - offset - slope * timesSeconds[i]);
        }
        return out;
    }

    private static double cost(double[] residual, double[] p, double[] nominal, double[] spread) {
        double sum = square(residual);
        for (int i = 0; i < p.length; i++) {
            double d = (p[i] - nominal[i]) / spread[i];
            sum += d * d;
        }
        return sum;
    }

    private static double square(double[] v) {
        double sum = 0;
        for (double x : v) {
            sum += x * x;
        }
        return sum;
    }
}

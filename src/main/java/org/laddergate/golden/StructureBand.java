package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Envelope;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.StructurePlans;
import org.laddergate.measurement.Recipe;
import org.laddergate.thermal.SpectrumSearch;
import org.laddergate.thermal.StructureSolver;
import org.laddergate.thermal.StructureUncertainty;

/**
 * Golden spectrum and the band that holds the golden family's structure functions.
 *
 * <p>Definition: at cumulative capacitances spread evenly over the golden path's resistance, mean +- k standard
 * deviations of the cumulative resistance, k the two-sided tolerance factor for the content 1 - risk/points: by
 * Bonferroni a healthy part leaves the band anywhere with at most the stated risk.
 */
final class StructureBand {
    private static final int POINTS = 24;
    private static final double FIRST_SHARE = 0.04;
    private static final double LAST_SHARE = 0.94;
    /** Share of the false-reject risk spent on the envelope. */
    private static final double RISK_SHARE = 0.2;

    private StructureBand() {}

    static Envelope none() {
        return new Envelope(new double[0], new double[0], new double[0]);
    }

    static GoldenModel addTo(GoldenModel model, Recipe recipe, GoldenCurves curves, DecisionSettings settings) {
        double[] sigma = new double[model.noiseKelvin().length];
        double drop = model.goldenKelvin()[0];
        for (int i = 0; i < sigma.length; i++) {
            sigma[i] = Math.max(model.noiseKelvin()[i] / Math.sqrt(curves.units()), 2e-5 * drop);
        }
        SpectrumSearch.Found golden = SpectrumSearch.smoothest(curves.bins().centresSeconds(), model.goldenKelvin(),
                sigma, recipe.heatingPowerWatts(), recipe.pulseSeconds());
        GoldenModel withSpectrum = model.withStructure(golden.amplitudes(), none());
        StructureSolver solver = new StructureSolver(StructurePlans.of(withSpectrum, recipe));
        solver.solve(model.goldenKelvin());
        double[] capacitances = capacitances(solver.resistances(), solver.capacitances());
        int n = curves.units();
        double[][] resistance = new double[capacitances.length][n];
        for (int u = 0; u < n; u++) {
            solver.solve(curves.fine(u));
            for (int i = 0; i < capacitances.length; i++) {
                resistance[i][u] = solver.resistanceAt(capacitances[i]);
            }
        }
        return model.withStructure(golden.amplitudes(), band(capacitances, resistance, settings));
    }

    /** How well one part's structure function is read, for the remarks of a limit set. */
    static String remark(GoldenModel model, Recipe recipe) {
        double[] c = model.envelope().capacitancesJoulesPerKelvin();
        double to = c[c.length / 2];
        double u = StructureUncertainty.between(StructurePlans.of(model, recipe), model.goldenKelvin(),
                model.noiseKelvin(), 0, to);
        return String.format(Locale.ROOT, "From the junction to %.3g J/K one part's structure function is read with a "
                + "standard uncertainty of %.2g K/W.", to, u);
    }

    private static double[] capacitances(double[] r, double[] c) {
        double total = r[r.length - 1];
        List<Double> out = new ArrayList<>();
        for (int i = 0; i < POINTS; i++) {
            double target = total * (FIRST_SHARE + (LAST_SHARE - FIRST_SHARE) * i / (POINTS - 1));
            int above = 1;
            while (r[above] < target) {
                above++;
            }
            double share = (target - r[above - 1]) / (r[above] - r[above - 1]);
            double capacitance = c[above - 1] * Math.pow(c[above] / c[above - 1], share);
            if (out.isEmpty() || capacitance > out.get(out.size() - 1) * (1 + 1e-6)) {
                out.add(capacitance);
            }
        }
        return out.stream().mapToDouble(Double::doubleValue).toArray();
    }

    private static Envelope band(double[] capacitances, double[][] resistance, DecisionSettings settings) {
        int points = capacitances.length;
        double content = 1 - RISK_SHARE * settings.falseRejectRisk() / points;
        double factor = Tolerance.twoSidedFactor(resistance[0].length, content, settings.confidenceLevel());
        double[] lower = new double[points];
        double[] upper = new double[points];
        for (int i = 0; i < points; i++) {
            double mean = 0;
            for (double x : resistance[i]) {
                mean += x / resistance[i].length;
            }
            double square = 0;
            for (double x : resistance[i]) {
                square += (x - mean) * (x - mean);
            }
            double half = factor * Math.sqrt(square / (resistance[i].length - 1));
            lower[i] = Math.max(0, mean - half);
            upper[i] = mean + half;
        }
        return new Envelope(capacitances, lower, upper);
    }
}

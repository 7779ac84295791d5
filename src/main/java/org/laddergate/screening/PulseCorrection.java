package org.laddergate.screening;

import org.laddergate.limits.GoldenModel;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;

/**
 * Makes curves after a slightly other heating time comparable: adds what the golden network would cool differently.
 *
 * <p>Definition: P sum R_j (exp(-t_h/tau_j) - exp(-t_n/tau_j)) (-1) exp(-t/tau_j), t_h the actual and t_n the nominal
 * heating time: exact for a golden part by superposition, first order for others.
 */
final class PulseCorrection {
    private PulseCorrection() {}

    static void addInto(Measurement m, Recipe recipe, GoldenModel model, LogTimeBins bins, Workspace work) {
        java.util.Arrays.fill(work.correction, 0);
        double actual = m.heatingSeconds();
        double nominal = recipe.heatingSeconds();
        if (recipe.curve() == CurveKind.HEATING || actual == nominal) {
            return;
        }
        for (int j = 0; j < model.networkTimeConstants().length; j++) {
            double tau = model.networkTimeConstants()[j];
            double amplitude = recipe.heatingPowerWatts() * model.networkResistances()[j]
                    * (Math.exp(-actual / tau) - Math.exp(-nominal / tau));
            for (int i = 0; i < work.correction.length; i++) {
                work.correction[i] += amplitude * Math.exp(-bins.centreSeconds(i) / tau);
            }
        }
    }
}

package org.laddergate.screening;

import java.util.List;
import java.util.Locale;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Finding;
import org.laddergate.measurement.InvalidReason;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;

/** Compares what the tester reports about a measurement with the recipe. */
final class ReportedRules {
    /** Pulse lengths off by at most this are corrected by superposition; beyond, regions are heated too differently. */
    static final double PULSE_TOLERANCE = 0.05;

    private ReportedRules() {}

    static void check(Measurement m, Recipe recipe, List<Finding> found) {
        double power = m.heatingPowerWatts() / recipe.heatingPowerWatts() - 1;
        if (!(Math.abs(power) <= recipe.powerTolerance())) {
            found.add(new Finding(InvalidReason.POWER_OFF_NOMINAL, String.format(Locale.ROOT,
                    "The reported heating power of %.6g W is off the recipe's %.6g W by more than %.3g %%.",
                    m.heatingPowerWatts(), recipe.heatingPowerWatts(), 100 * recipe.powerTolerance()),
                    m.heatingPowerWatts(), recipe.heatingPowerWatts()));
        }
        if (recipe.curve() == CurveKind.COOLING && pulseOff(m.heatingSeconds(), recipe.heatingSeconds())) {
            found.add(new Finding(InvalidReason.PULSE_LENGTH_OFF_NOMINAL, String.format(Locale.ROOT,
                    "The reported heating time of %.6g s is off the recipe's %.6g s by more than %.3g %%.",
                    m.heatingSeconds(), recipe.heatingSeconds(), 100 * PULSE_TOLERANCE),
                    m.heatingSeconds(), recipe.heatingSeconds()));
        }
    }

    private static boolean pulseOff(double actual, double nominal) {
        return Double.isInfinite(nominal) ? !Double.isInfinite(actual)
                : !(Math.abs(actual / nominal - 1) <= PULSE_TOLERANCE);
    }
}

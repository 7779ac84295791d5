package org.laddergate.golden;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.laddergate.golden.GoldenUnit.Condition;
import org.laddergate.limits.Product;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Recipe;

/** Which golden units may be learnt from: right product, right recipe, no duplicates, enough of them. */
final class GoldenRules {
    private static final int NOTE_BELOW = 50;
    private static final int WARN_BELOW = 30;
    private static final double PULSE_TOLERANCE = 0.02;

    private GoldenRules() {}

    /** The golden units, or an exception that names every unit that does not fit. */
    static List<GoldenUnit> usable(Product product, List<GoldenUnit> units, List<String> remarks) {
        List<InputFault> faults = new ArrayList<>();
        List<GoldenUnit> golden = new ArrayList<>();
        Map<String, String> serials = new HashMap<>();
        for (GoldenUnit unit : units) {
            if (unit.condition() != Condition.GOLDEN) {
                continue;
            }
            Measurement m = unit.measurement();
            String id = m.measurementId();
            if (!m.product().equals(product.name())) {
                faults.add(fault(id, "other_product", "belongs to product " + m.product()));
            }
            check(m, product.recipe(), faults);
            String earlier = serials.putIfAbsent(m.serial(), id);
            if (earlier != null) {
                remarks.add("Serial " + m.serial() + " was measured more than once (" + earlier + ", " + id
                        + "); repeats count as units of their own.");
            }
            golden.add(unit);
        }
        if (golden.size() < GoldenCurves.FEWEST_UNITS) {
            faults.add(new InputFault("/goldenUnits", "too_few_units", "limits need at least "
                    + GoldenCurves.FEWEST_UNITS + " golden units (30 or more advised), there are " + golden.size()));
        }
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        if (golden.size() < WARN_BELOW) {
            remarks.add("Only " + golden.size() + " golden units: limits from fewer than 30 are soft.");
        } else if (golden.size() < NOTE_BELOW) {
            remarks.add(golden.size() + " golden units: more than 50 would narrow the limits.");
        }
        if (golden.stream().map(u -> u.measurement().lot()).filter(l -> !l.isEmpty()).distinct().count() == 1) {
            remarks.add("All golden units come from one lot; they do not show how lots differ.");
        }
        return golden;
    }

    private static void check(Measurement m, Recipe recipe, List<InputFault> faults) {
        if (m.curveKind() != recipe.curve()) {
            faults.add(fault(m.measurementId(), "other_curve_kind", "is a " + m.curveKind().word()
                    + " curve, the recipe says " + recipe.curve().word()));
        }
        double power = m.heatingPowerWatts() / recipe.heatingPowerWatts() - 1;
        if (!(Math.abs(power) <= recipe.powerTolerance())) {
            faults.add(fault(m.measurementId(), "power_off_nominal", "was heated with " + m.heatingPowerWatts()
                    + " W, the recipe says " + recipe.heatingPowerWatts() + " W"));
        }
        boolean samePulse = Double.isInfinite(recipe.heatingSeconds()) ? Double.isInfinite(m.heatingSeconds())
                : Math.abs(m.heatingSeconds() / recipe.heatingSeconds() - 1) <= PULSE_TOLERANCE;
        if (recipe.curve() == org.laddergate.measurement.CurveKind.COOLING && !samePulse) {
            faults.add(fault(m.measurementId(), "pulse_length_off_nominal", "was heated for " + m.heatingSeconds()
                    + " s, the recipe says " + recipe.heatingSeconds() + " s"));
        }
    }

    private static InputFault fault(String id, String code, String what) {
        return new InputFault("/goldenUnits/" + id, code, "golden unit " + id + " " + what);
    }
}

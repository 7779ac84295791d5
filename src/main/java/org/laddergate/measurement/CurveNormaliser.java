package org.laddergate.measurement;

/**
 * Brings a measurement to the recipe's nominal power and to a falling curve, so that all curves of a product compare.
 *
 * <p>A heating curve is mirrored: minus its temperature is a cooling curve after an infinite pulse, up to an offset.
 */
public final class CurveNormaliser {
    private CurveNormaliser() {}

    /** The curve scaled by nominal over reported power, and mirrored if it is a heating curve. */
    public static SampledCurve normalise(Measurement measurement, Recipe recipe) {
        double factor = factor(measurement, recipe);
        if (factor == 1) {
            return measurement.curve();
        }
        double[] values = measurement.curve().valuesUnsafe().clone();
        for (int i = 0; i < values.length; i++) {
            values[i] *= factor;
        }
        return SampledCurve.ofUnsafe(measurement.curve().timesSecondsUnsafe(), values);
    }

    /** Factor from measured temperature to normalised curve. */
    public static double factor(Measurement measurement, Recipe recipe) {
        double factor = recipe.heatingPowerWatts() / measurement.heatingPowerWatts();
        return measurement.curveKind() == CurveKind.HEATING ? -factor : factor;
    }
}

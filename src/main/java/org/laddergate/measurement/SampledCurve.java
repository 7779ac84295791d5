package org.laddergate.measurement;

import java.util.Arrays;

/**
 * A sampled transient: times since the power step and one value per time, immutable.
 *
 * <p>The values are junction temperatures [deg C] or sensor voltages [V]; the holder knows which. No physical check is
 * made here: {@link CurveRules} refuses impossible curves, {@link Believability} judges the rest.
 */
public final class SampledCurve {
    private final double[] timesSeconds;
    private final double[] values;

    private SampledCurve(double[] timesSeconds, double[] values) {
        if (timesSeconds.length != values.length) {
            throw new IllegalArgumentException("times (" + timesSeconds.length + ") and values (" + values.length
                    + ") differ in length");
        }
        this.timesSeconds = timesSeconds;
        this.values = values;
    }

    /** Copies both arrays. */
    public static SampledCurve copyOf(double[] timesSeconds, double[] values) {
        return new SampledCurve(timesSeconds.clone(), values.clone());
    }

    /** Takes both arrays over without copying; the caller must not touch them again. */
    public static SampledCurve ofUnsafe(double[] timesSeconds, double[] values) {
        return new SampledCurve(timesSeconds, values);
    }

    public int size() {
        return timesSeconds.length;
    }

    /** Time since the power step [s]. */
    public double timeSeconds(int i) {
        return timesSeconds[i];
    }

    /** Temperature [deg C] or voltage [V], as the holder says. */
    public double value(int i) {
        return values[i];
    }

    /** The array itself, for kernels; must not be modified. */
    public double[] timesSecondsUnsafe() {
        return timesSeconds;
    }

    /** The array itself, for kernels; must not be modified. */
    public double[] valuesUnsafe() {
        return values;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof SampledCurve that && Arrays.equals(timesSeconds, that.timesSeconds)
                && Arrays.equals(values, that.values);
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.hashCode(timesSeconds) + Arrays.hashCode(values);
    }

    @Override
    public String toString() {
        return "SampledCurve[" + size() + " samples]";
    }
}

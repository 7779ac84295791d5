package org.laddergate.measurement;

import java.util.Optional;

/**
 * How a product is measured; the nominal values every curve is compared with.
 *
 * @param curve                 cooling or heating
 * @param heatingPowerWatts     nominal power step [W]
 * @param heatingSeconds        nominal heating pulse before a cooling curve [s]; may be infinite
 * @param cutSeconds            samples before this time are electrical, not thermal [s]; NaN: found from the golden units
 * @param recordSeconds         samples after this time are not used [s]
 * @param powerTolerance        largest accepted relative deviation of the reported power from nominal [1]
 * @param maximumNoiseKelvin    largest accepted noise of one log-time bin [K]; NaN: bound learnt from the golden units
 * @param sensor                calibration for voltage input, if the product has a common one
 */
public record Recipe(CurveKind curve, double heatingPowerWatts, double heatingSeconds, double cutSeconds,
        double recordSeconds, double powerTolerance, double maximumNoiseKelvin, Optional<TemperatureSensor> sensor) {

    /** Accepted relative deviation of the reported power where a product states none (common practice, no source). */
    public static final double DEFAULT_POWER_TOLERANCE = 0.05;

    public Recipe {
        require(heatingPowerWatts > 0 && heatingPowerWatts < 1e6, "heatingPowerWatts", heatingPowerWatts);
        require(heatingSeconds > 0, "heatingSeconds", heatingSeconds);
        require(Double.isNaN(cutSeconds) || cutSeconds > 0 && cutSeconds < recordSeconds, "cutSeconds", cutSeconds);
        require(recordSeconds > 0 && recordSeconds < 1e5, "recordSeconds", recordSeconds);
        require(powerTolerance > 0 && powerTolerance <= 0.5, "powerTolerance", powerTolerance);
        require(Double.isNaN(maximumNoiseKelvin) || maximumNoiseKelvin > 0, "maximumNoiseKelvin", maximumNoiseKelvin);
    }

    private static void require(boolean good, String field, double value) {
        if (!good) {
            throw new IllegalArgumentException(field + " " + value + " is out of range");
        }
    }

    /**
     * Heating pulse before the cooling curve that a measurement is brought to [s]: a heating curve is mirrored into the
     * cooling curve after an infinite pulse.
     */
    public double pulseSeconds() {
        return curve == CurveKind.HEATING ? Double.POSITIVE_INFINITY : heatingSeconds;
    }

    public static Recipe of(CurveKind curve, double heatingPowerWatts, double heatingSeconds, double cutSeconds,
            double recordSeconds) {
        return new Recipe(curve, heatingPowerWatts, heatingSeconds, cutSeconds, recordSeconds,
                DEFAULT_POWER_TOLERANCE, Double.NaN, Optional.empty());
    }
}

package org.laddergate.measurement;

import java.util.Arrays;

/**
 * Calibration of the temperature-sensitive parameter: temperature as a polynomial of the sensor voltage,
 * T = c0 + c1 V + c2 V^2 + ... [deg C, V]. A K factor [K/V] (JESD51-1: K = dT/dV at the sensing current) is the linear
 * case, c1 = K.
 */
public final class TemperatureSensor {
    private final double[] coefficients;

    private TemperatureSensor(double[] coefficients) {
        if (coefficients.length < 2 || coefficients.length > 6) {
            throw new IllegalArgumentException("a sensor polynomial has 2 to 6 coefficients, not " + coefficients.length);
        }
        for (double c : coefficients) {
            if (!Double.isFinite(c)) {
                throw new IllegalArgumentException("sensor coefficient " + c + " is not finite");
            }
        }
        this.coefficients = coefficients;
    }

    /**
     * Linear sensor: K factor [K/V], negative for a forward voltage, and the temperature that 0 V would mean [deg C].
     */
    public static TemperatureSensor linear(double kFactorKelvinPerVolt, double celsiusAtZeroVolts) {
        if (!(Math.abs(kFactorKelvinPerVolt) > 0)) {
            throw new IllegalArgumentException("a K factor of " + kFactorKelvinPerVolt + " K/V measures nothing");
        }
        return new TemperatureSensor(new double[] {celsiusAtZeroVolts, kFactorKelvinPerVolt});
    }

    /** Polynomial sensor; coefficients in ascending order [deg C/V^i]. */
    public static TemperatureSensor polynomial(double... coefficients) {
        return new TemperatureSensor(coefficients.clone());
    }

    public double[] coefficients() {
        return coefficients.clone();
    }

    /** Temperature [deg C] at a sensor voltage [V]. */
    public double temperatureCelsius(double volts) {
        double t = 0;
        for (int i = coefficients.length - 1; i >= 0; i--) {
            t = t * volts + coefficients[i];
        }
        return t;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof TemperatureSensor that && Arrays.equals(coefficients, that.coefficients);
    }

    @Override
    public int hashCode() {
        return Arrays.hashCode(coefficients);
    }
}

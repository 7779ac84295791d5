package org.laddergate.thermal;

/**
 * A thermal step response as a sum of exponentials: stages of resistance R_j and time constant tau_j in series.
 *
 * <p>Definition: Z_th(t) = sum R_j (1 - exp(-t/tau_j)) [K/W]; after a heating pulse of length t_h the junction is
 * sum R_j (1 - exp(-t_h/tau_j)) exp(-t/tau_j) [K/W] above the heat sink, t after switch-off, by superposition.
 *
 * <p>Source: Foster, A reactance theorem, Bell Syst. Tech. J. 3 (1924) 259; thermal use as in JESD51-14 annex.
 *
 * <p>Domain: resistances non-negative, time constants positive, both finite; any order, repeated time constants
 * allowed.
 *
 * <p>Error: one rounding per stage; the differences are formed by expm1, so that short times lose nothing.
 *
 * <p>Identities: Z_th(infinity) is the sum of the resistances; a pulse of infinite length gives the total minus Z_th.
 *
 * <p>Cost: one exponential per stage and time; no allocation in the Into forms. Immutable.
 */
public final class FosterNetwork {
    private final double[] resistances;
    private final double[] timeConstants;

    private FosterNetwork(double[] resistances, double[] timeConstants) {
        if (resistances.length != timeConstants.length || resistances.length == 0) {
            throw new IllegalArgumentException(resistances.length + " resistances and " + timeConstants.length
                    + " time constants do not make a network");
        }
        for (int i = 0; i < resistances.length; i++) {
            if (!(resistances[i] >= 0 && resistances[i] < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("resistance " + resistances[i] + " of stage " + i + " is negative");
            }
            if (!(timeConstants[i] > 0 && timeConstants[i] < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("time constant " + timeConstants[i] + " of stage " + i
                        + " is not positive");
            }
        }
        this.resistances = resistances;
        this.timeConstants = timeConstants;
    }

    /** Copies both arrays [K/W], [s]. */
    public static FosterNetwork of(double[] resistancesKelvinPerWatt, double[] timeConstantsSeconds) {
        return new FosterNetwork(resistancesKelvinPerWatt.clone(), timeConstantsSeconds.clone());
    }

    public int size() {
        return resistances.length;
    }

    public double resistanceKelvinPerWatt(int i) {
        return resistances[i];
    }

    public double timeConstantSeconds(int i) {
        return timeConstants[i];
    }

    public double[] resistancesKelvinPerWatt() {
        return resistances.clone();
    }

    public double[] timeConstantsSeconds() {
        return timeConstants.clone();
    }

    /** Steady thermal resistance [K/W]. */
    public double totalResistanceKelvinPerWatt() {
        double sum = 0;
        for (double r : resistances) {
            sum += r;
        }
        return sum;
    }

    /** Thermal impedance a time after switch-on [K/W]. */
    public double impedanceKelvinPerWatt(double timeSeconds) {
        double sum = 0;
        for (int j = 0; j < resistances.length; j++) {
            sum -= resistances[j] * Math.expm1(-timeSeconds / timeConstants[j]);
        }
        return sum;
    }

    /** Derivative of the impedance with respect to ln t [K/W]. */
    public double impedanceSlopeKelvinPerWatt(double timeSeconds) {
        double sum = 0;
        for (int j = 0; j < resistances.length; j++) {
            double x = timeSeconds / timeConstants[j];
            sum += resistances[j] * x * Math.exp(-x);
        }
        return sum;
    }

    /**
     * Rise above the heat sink after a heating pulse, per watt.
     *
     * @param timeSeconds       time since switch-off [s]
     * @param heatingSeconds    length of the pulse [s]; infinite for steady state
     * @return [K/W]
     */
    public double coolingKelvinPerWatt(double timeSeconds, double heatingSeconds) {
        double sum = 0;
        for (int j = 0; j < resistances.length; j++) {
            sum += resistances[j] * heated(heatingSeconds, j) * Math.exp(-timeSeconds / timeConstants[j]);
        }
        return sum;
    }

    /**
     * Rise above the heat sink after a heating pulse at many times.
     *
     * @param powerWatts        power step [W]
     * @param heatingSeconds    length of the pulse [s]; infinite for steady state
     * @param timesSeconds      times since switch-off [s], not modified
     * @param out               [K], same length, overwritten
     */
    public void coolingInto(double powerWatts, double heatingSeconds, double[] timesSeconds, double[] out) {
        java.util.Arrays.fill(out, 0);
        for (int j = 0; j < resistances.length; j++) {
            double r = powerWatts * resistances[j] * heated(heatingSeconds, j);
            for (int i = 0; i < out.length; i++) {
                out[i] += r * Math.exp(-timesSeconds[i] / timeConstants[j]);
            }
        }
    }

    private double heated(double heatingSeconds, int j) {
        return Double.isInfinite(heatingSeconds) ? 1 : -Math.expm1(-heatingSeconds / timeConstants[j]);
    }
}

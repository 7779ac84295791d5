package org.laddergate.thermal;

/**
 * A heat path as a ladder: from the junction a capacitance to the reference, a resistance to the next node, a
 * capacitance there, and so on; the last resistance ends at the isothermal heat sink.
 *
 * <p>Definition: Z(s) = 1/(s C_1 + 1/(R_1 + 1/(s C_2 + ... + 1/(s C_n + 1/R_n)))) [K/W].
 *
 * <p>Source: Cauer form of a driving-point impedance, e.g. Guillemin, Synthesis of Passive Networks (1957).
 *
 * <p>Domain: all elements positive and finite. Immutable.
 */
public final class CauerLadder {
    private final double[] resistances;
    private final double[] capacitances;

    private CauerLadder(double[] resistances, double[] capacitances) {
        if (resistances.length != capacitances.length || resistances.length == 0) {
            throw new IllegalArgumentException(resistances.length + " resistances and " + capacitances.length
                    + " capacitances do not make a ladder");
        }
        for (int i = 0; i < resistances.length; i++) {
            if (!(resistances[i] > 0 && resistances[i] < Double.POSITIVE_INFINITY && capacitances[i] > 0
                    && capacitances[i] < Double.POSITIVE_INFINITY)) {
                throw new IllegalArgumentException("rung " + i + " has resistance " + resistances[i]
                        + " K/W and capacitance " + capacitances[i] + " J/K; both must be positive");
            }
        }
        this.resistances = resistances;
        this.capacitances = capacitances;
    }

    /** Copies both arrays [K/W], [J/K]. */
    public static CauerLadder of(double[] resistancesKelvinPerWatt, double[] capacitancesJoulesPerKelvin) {
        return new CauerLadder(resistancesKelvinPerWatt.clone(), capacitancesJoulesPerKelvin.clone());
    }

    public int size() {
        return resistances.length;
    }

    public double resistanceKelvinPerWatt(int k) {
        return resistances[k];
    }

    public double capacitanceJoulesPerKelvin(int k) {
        return capacitances[k];
    }

    public double[] resistancesKelvinPerWatt() {
        return resistances.clone();
    }

    public double[] capacitancesJoulesPerKelvin() {
        return capacitances.clone();
    }

    /** The same ladder with one resistance multiplied where the factor is not one. */
    public CauerLadder withResistancesScaled(double[] factors) {
        double[] r = resistances.clone();
        for (int k = 0; k < r.length; k++) {
            r[k] *= factors[k];
        }
        return new CauerLadder(r, capacitances);
    }
}

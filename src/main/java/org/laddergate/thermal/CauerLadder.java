package org.laddergate.thermal;

/** Skeleton: the thermal room fills this in. Immutable Cauer ladder from the junction out, C_k [J/K] then R_k [K/W]. */
public final class CauerLadder {
    private final double[] resistancesKelvinPerWatt;
    private final double[] capacitancesJoulesPerKelvin;

    private CauerLadder(double[] r, double[] c) {
        this.resistancesKelvinPerWatt = r;
        this.capacitancesJoulesPerKelvin = c;
    }

    /** Copies; all values positive and finite. */
    public static CauerLadder of(double[] resistancesKelvinPerWatt, double[] capacitancesJoulesPerKelvin) {
        return new CauerLadder(resistancesKelvinPerWatt.clone(), capacitancesJoulesPerKelvin.clone());
    }

    public int size() {
        return resistancesKelvinPerWatt.length;
    }

    public double resistanceKelvinPerWatt(int k) {
        return resistancesKelvinPerWatt[k];
    }

    public double capacitanceJoulesPerKelvin(int k) {
        return capacitancesJoulesPerKelvin[k];
    }
}

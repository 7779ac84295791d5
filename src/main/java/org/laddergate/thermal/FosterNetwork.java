package org.laddergate.thermal;

/** Skeleton: the thermal room fills this in. Immutable Foster network, R_i [K/W] and tau_i [s]. */
public final class FosterNetwork {
    private final double[] resistancesKelvinPerWatt;
    private final double[] timeConstantsSeconds;

    private FosterNetwork(double[] r, double[] tau) {
        this.resistancesKelvinPerWatt = r;
        this.timeConstantsSeconds = tau;
    }

    /** Copies; all values positive and finite, any order. */
    public static FosterNetwork of(double[] resistancesKelvinPerWatt, double[] timeConstantsSeconds) {
        return new FosterNetwork(resistancesKelvinPerWatt.clone(), timeConstantsSeconds.clone());
    }

    public int size() {
        return resistancesKelvinPerWatt.length;
    }

    public double resistanceKelvinPerWatt(int i) {
        return resistancesKelvinPerWatt[i];
    }

    public double timeConstantSeconds(int i) {
        return timeConstantsSeconds[i];
    }
}

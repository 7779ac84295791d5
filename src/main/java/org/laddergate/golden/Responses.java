package org.laddergate.golden;

import org.laddergate.thermal.FosterNetwork;

/** Cooling curves of Foster networks as they are measured. */
final class Responses {
    private Responses() {}

    /**
     * Temperature above the heat sink after the end of a heating pulse that started from equilibrium:
     * P sum R_j (1 - exp(-t_h/tau_j)) exp(-t/tau_j).
     *
     * @param heatingSeconds pulse length [s]; infinite for steady state
     * @param out            [K], same length as {@code timesSeconds}, overwritten
     */
    static void coolingInto(FosterNetwork network, double powerWatts, double heatingSeconds, double[] timesSeconds,
            double[] out) {
        java.util.Arrays.fill(out, 0);
        for (int j = 0; j < network.size(); j++) {
            double tau = network.timeConstantSeconds(j);
            double r = powerWatts * network.resistanceKelvinPerWatt(j)
                    * (Double.isInfinite(heatingSeconds) ? 1 : -Math.expm1(-heatingSeconds / tau));
            for (int i = 0; i < out.length; i++) {
                out[i] += r * Math.exp(-timesSeconds[i] / tau);
            }
        }
    }
}

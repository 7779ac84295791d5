package org.laddergate.demo;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.laddergate.thermal.FosterNetwork;

/**
 * A simulated tester: samples a cooling part every microsecond, averages into log-time bins, adds noise, the electrical
 * switching transient and a slow drift of the base.
 *
 * <p>Definition: T(t) = T_0 + P sum R_j (1 - exp(-t_h/tau_j)) exp(-t/tau_j) + E exp(-t/tau_e) + drift t / t_end +
 * noise; a bin holds the mean over its samples and is stamped with their mean time.
 *
 * <p>Method: bin edges are 10 microseconds times 10^(i/50) rounded to whole samples, empty bins dropped; the mean of an
 * exponential over equally spaced samples is a geometric series, summed in closed form. White noise falls with the
 * square root of the samples in the bin, of which at most a thousand count, and never below a floor.
 *
 * <p>Source: none; the model of an invented tester, the same as that of the reference population kestrel.
 *
 * <p>Cost: one exponential per stage and bin. Immutable.
 */
final class RawRecorder {
    static final double SAMPLE_SECONDS = 1e-6;
    static final double FIRST_SECONDS = 1e-5;
    static final int BINS_PER_DECADE = 50;
    static final int AVERAGED_AT_MOST = 1000;

    private final Setup setup;
    private final long[] firstSample;
    private final long[] samples;
    private final double[] times;

    /**
     * What is measured and how well.
     *
     * @param powerWatts          power step [W]
     * @param heatingSeconds      pulse [s]
     * @param recordSeconds       record, of which only whole bins are kept [s]
     * @param coolantCelsius      temperature of the coolant and of the part before the pulse [deg C]
     * @param noiseKelvin         white noise of a raw sample, one sigma [K]
     * @param noiseFloorKelvin    least noise of a bin, one sigma [K]
     * @param switchingKelvin     electrical transient at switch-off, mean [K]
     * @param switchingSpread     its relative one-sigma spread from record to record [1]
     * @param switchingSeconds    its time constant [s]
     * @param driftKelvin         largest drift at the end of the record, evenly drawn from both signs [K]
     */
    record Setup(double powerWatts, double heatingSeconds, double recordSeconds, double coolantCelsius,
            double noiseKelvin, double noiseFloorKelvin, double switchingKelvin, double switchingSpread,
            double switchingSeconds, double driftKelvin) {}

    RawRecorder(Setup setup) {
        this.setup = setup;
        List<long[]> bins = new ArrayList<>();
        for (int i = 0; edge(i + 1) <= setup.recordSeconds(); i++) {
            long from = Math.round(edge(i) / SAMPLE_SECONDS);
            long to = Math.round(edge(i + 1) / SAMPLE_SECONDS);
            if (to > from) {
                bins.add(new long[] {from, to - from});
            }
        }
        this.firstSample = bins.stream().mapToLong(b -> b[0]).toArray();
        this.samples = bins.stream().mapToLong(b -> b[1]).toArray();
        this.times = bins.stream().mapToDouble(b -> (b[0] + 0.5 * (b[1] - 1)) * SAMPLE_SECONDS).toArray();
    }

    private static double edge(int i) {
        return FIRST_SECONDS * Math.pow(10, (double) i / BINS_PER_DECADE);
    }

    Setup setup() {
        return setup;
    }

    int size() {
        return times.length;
    }

    /** Stamp of a bin [s]. */
    double timeSeconds(int bin) {
        return times[bin];
    }

    /** One-sigma noise of a bin [K]. */
    double noiseKelvin(int bin) {
        return Math.max(setup.noiseKelvin() / Math.sqrt(Math.min(samples[bin], AVERAGED_AT_MOST)),
                setup.noiseFloorKelvin());
    }

    /** What the part does, without tester: temperature [deg C] of every bin. */
    double[] clean(FosterNetwork network) {
        double[] out = new double[times.length];
        java.util.Arrays.fill(out, setup.coolantCelsius());
        for (int j = 0; j < network.size(); j++) {
            double tau = network.timeConstantSeconds(j);
            double size = -setup.powerWatts() * network.resistanceKelvinPerWatt(j)
                    * Math.expm1(-setup.heatingSeconds() / tau);
            addDecay(size, tau, out);
        }
        return out;
    }

    /** One record with everything a tester adds [deg C]. */
    double[] record(FosterNetwork network, Random random) {
        double[] out = clean(network);
        addDecay(setup.switchingKelvin() * (1 + setup.switchingSpread() * random.nextGaussian()),
                setup.switchingSeconds(), out);
        double drift = setup.driftKelvin() * (2 * random.nextDouble() - 1) / setup.recordSeconds();
        for (int i = 0; i < out.length; i++) {
            out[i] += drift * times[i] + noiseKelvin(i) * random.nextGaussian();
        }
        return out;
    }

    private void addDecay(double size, double tau, double[] out) {
        double step = SAMPLE_SECONDS / tau;
        for (int i = 0; i < out.length; i++) {
            double mean = Math.expm1(-step * samples[i]) / (samples[i] * Math.expm1(-step));
            out[i] += size * Math.exp(-firstSample[i] * step) * mean;
        }
    }
}

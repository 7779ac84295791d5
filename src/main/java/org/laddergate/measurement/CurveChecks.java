package org.laddergate.measurement;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * First look at a binned curve: is it a measurement at all? What shape it has compared with the family is weighed
 * later, together with the faults.
 *
 * <p>Domain: a golden curve and noise profile on the same fine bins; cooling curves or mirrored heating curves.
 * Thread-safe: no state but what it is built with.
 */
public final class CurveChecks {
    /** Share of fine bins that must hold samples. */
    static final double FILLED_SHARE = 0.5;
    /** Longest stretch of the time axis without a sample [decades]. */
    static final double LONGEST_GAP_DECADES = 0.25;
    /** Drop below this share of golden is no heating. A fault only ever makes the drop larger. */
    static final double SMALLEST_DROP_SHARE = 0.2;
    /** Noise ratio that is too much, and the one at which the sensor line must be open. */
    static final double LARGEST_NOISE_RATIO = 2.5;
    static final double OPEN_NOISE_RATIO = 40;
    /** A single bin off its neighbours by this many sigma is a spike. */
    static final double SPIKE_SIGMAS = 12;
    private static final int LOCAL_BINS = 12;
    /** Step between neighbouring bins, as a share of the golden drop, that heat cannot make. */
    static final double LARGEST_STEP_SHARE = 0.4;

    private final double[] goldenKelvin;
    private final double[] noiseKelvin;
    private final double maximumNoiseKelvin;
    private final double goldenDrop;
    private final double largestGoldenStep;

    /**
     * @param goldenKelvin        golden curve in fine bins [K], falling
     * @param noiseKelvin         noise of one curve in fine bins, one sigma [K]
     * @param maximumNoiseKelvin  recipe's bound on the noise of a bin [K]; NaN: a multiple of the golden noise
     */
    public CurveChecks(double[] goldenKelvin, double[] noiseKelvin, double maximumNoiseKelvin) {
        this.goldenKelvin = goldenKelvin;
        this.noiseKelvin = noiseKelvin;
        this.maximumNoiseKelvin = maximumNoiseKelvin;
        this.goldenDrop = goldenKelvin[0] - goldenKelvin[goldenKelvin.length - 1];
        double step = 0;
        for (int i = 1; i < goldenKelvin.length; i++) {
            step = Math.max(step, Math.abs(goldenKelvin[i] - goldenKelvin[i - 1]));
        }
        this.largestGoldenStep = step;
    }

    /** Checks that the record covers the bins; with findings here the curve must not be looked at further. */
    public List<Finding> coverage(double[] binned, int filledBins) {
        List<Finding> found = new ArrayList<>(0);
        int first = 0;
        while (first < binned.length && Double.isNaN(binned[first])) {
            first++;
        }
        int last = binned.length - 1;
        while (last >= 0 && Double.isNaN(binned[last])) {
            last--;
        }
        int bins = binned.length;
        if (first > 0) {
            add(found, InvalidReason.RECORD_STARTS_LATE, "The first %.0f of %.0f time bins after the cut time hold no "
                    + "sample.", first, bins, first, 0);
        }
        if (last < bins - 1) {
            add(found, InvalidReason.RECORD_TOO_SHORT, "The last %.0f of %.0f time bins of the record are missing.",
                    bins - 1 - last, bins, bins - 1 - last, 0);
        }
        if (filledBins < FILLED_SHARE * bins) {
            add(found, InvalidReason.TOO_FEW_SAMPLES, "Only %.0f of %.0f time bins hold a sample.", filledBins, bins,
                    filledBins, FILLED_SHARE * bins);
        }
        return found;
    }

    /** Checks that no long stretch between the samples had to be bridged. */
    public List<Finding> gaps(int[] counts, int binsPerDecade) {
        List<Finding> found = new ArrayList<>(0);
        int bound = (int) Math.max(3, LONGEST_GAP_DECADES * binsPerDecade);
        int run = 0;
        int longest = 0;
        for (int count : counts) {
            run = count == 0 ? run + 1 : 0;
            longest = Math.max(longest, run);
        }
        if (longest > bound) {
            add(found, InvalidReason.TOO_FEW_SAMPLES, "There is no sample for %.0f time bins in a row (at most %.0f).",
                    longest, bound, longest, bound);
        }
        return found;
    }

    /**
     * Checks that the curve moves like heat.
     *
     * @param binned     complete binned curve [K]
     * @param counts     samples in each bin; bridged bins cannot show a spike
     * @param noiseRatio noise of the curve in units of the golden noise
     */
    public List<Finding> signal(double[] binned, int[] counts, double noiseRatio) {
        List<Finding> found = new ArrayList<>(0);
        double drop = binned[0] - binned[binned.length - 1];
        double step = largestStep(binned);
        double stepBound = LARGEST_STEP_SHARE * goldenDrop + 3 * largestGoldenStep;
        if (noiseRatio > OPEN_NOISE_RATIO) {
            add(found, InvalidReason.SENSOR_OPEN_OR_SHORT,
                    "The signal floats: its noise is %.1f times that of the golden units (at most %.1f).", noiseRatio,
                    OPEN_NOISE_RATIO, noiseRatio, OPEN_NOISE_RATIO);
        } else if (step > stepBound && !isSpike(binned)) {
            add(found, InvalidReason.SENSOR_OPEN_OR_SHORT,
                    "The signal jumps by %.3g K between neighbouring time bins; heat moves it by at most %.3g K.",
                    step, stepBound, step, stepBound);
        } else if (constant(binned)) {
            add(found, InvalidReason.SENSOR_OPEN_OR_SHORT, "The signal stands still at %.6g (golden drop %.4g K).",
                    binned[0], goldenDrop, 0, goldenDrop);
        } else if (drop < -SMALLEST_DROP_SHARE * goldenDrop) {
            add(found, InvalidReason.REVERSED_POLARITY,
                    "The temperature changes by %.4g K the wrong way (golden: %.4g K).", -drop, goldenDrop, drop, 0);
        } else if (drop < SMALLEST_DROP_SHARE * goldenDrop) {
            add(found, InvalidReason.NO_HEATING, "The temperature changes by only %.4g K (golden: %.4g K).", drop,
                    goldenDrop, drop, SMALLEST_DROP_SHARE * goldenDrop);
        }
        if (found.isEmpty()) {
            plateau(binned, found);
        }
        if (found.isEmpty()) {
            spikes(binned, counts, noiseRatio, found);
        }
        if (found.isEmpty()) {
            noise(noiseRatio, found);
        }
        return found;
    }

    private void noise(double ratio, List<Finding> found) {
        double bound = LARGEST_NOISE_RATIO;
        if (!Double.isNaN(maximumNoiseKelvin)) {
            double typical = noiseKelvin[noiseKelvin.length / 2];
            bound = maximumNoiseKelvin / typical;
        }
        if (ratio > bound) {
            add(found, InvalidReason.NOISE_TOO_HIGH,
                    "The noise is %.2f times that of the golden units; at most %.2f times is accepted.", ratio, bound,
                    ratio, bound);
        }
    }

    private void plateau(double[] binned, List<Finding> found) {
        int start = 0;
        for (int i = 1; i <= binned.length; i++) {
            if (i < binned.length && binned[i] == binned[start]) {
                continue;
            }
            if (i - start >= 4) {
                double golden = goldenKelvin[start] - goldenKelvin[i - 1];
                double bound = Math.max(20 * noiseKelvin[start], 0.005 * goldenDrop);
                if (golden > bound) {
                    add(found, InvalidReason.SATURATED, "The signal stands still at %.5g where a golden unit moves by "
                            + "%.4g K.", binned[start], golden, golden, bound);
                    return;
                }
            }
            start = i;
        }
    }

    private void spikes(double[] binned, int[] counts, double noiseRatio, List<Finding> found) {
        int spikes = 0;
        double worst = 0;
        for (int i = 1; i + 2 < binned.length; i++) {
            double e = spikeSigmas(binned, i) / Math.max(1, noiseRatio);
            boolean sampled = counts[i - 1] > 0 && counts[i] > 0 && counts[i + 1] > 0 && counts[i + 2] > 0;
            if (sampled && e > SPIKE_SIGMAS) {
                e = spikeSigmas(binned, i) / Math.max(1, localNoiseRatio(binned, i));
                spikes += e > SPIKE_SIGMAS ? 1 : 0;
                worst = Math.max(worst, e);
            }
        }
        if (spikes > 0) {
            add(found, InvalidReason.SPIKES, "Single samples stand out of their neighbours by up to %.0f sigma (at most "
                    + "%.0f).", worst, SPIKE_SIGMAS, worst, SPIKE_SIGMAS);
        }
    }

    /** Noise around a bin in units of the golden noise: a record with few samples early on is noisier there. */
    private double localNoiseRatio(double[] binned, int at) {
        int from = Math.max(1, at - LOCAL_BINS);
        int to = Math.min(binned.length - 2, at + LOCAL_BINS);
        double[] around = new double[to - from];
        for (int i = from; i < to; i++) {
            around[i - from] = spikeSigmas(binned, i);
        }
        java.util.Arrays.sort(around);
        return around[around.length / 2] / 0.6745;
    }

    /** Third difference of the deviation from golden [sigma]: a lone sample off by x sigma gives 3x/sqrt(20). */
    private double spikeSigmas(double[] binned, int i) {
        double e = (binned[i - 1] - goldenKelvin[i - 1]) - 3 * (binned[i] - goldenKelvin[i])
                + 3 * (binned[i + 1] - goldenKelvin[i + 1]) - (binned[i + 2] - goldenKelvin[i + 2]);
        return Math.abs(e) / (NoiseEstimate.THIRD_DIFFERENCE_GAIN * noiseKelvin[i]);
    }

    /** Whether the largest jump comes straight back: then it is a spike and not an opened contact. */
    private boolean isSpike(double[] binned) {
        int at = 1;
        for (int i = 1; i < binned.length; i++) {
            if (Math.abs(binned[i] - binned[i - 1]) > Math.abs(binned[at] - binned[at - 1])) {
                at = i;
            }
        }
        double jump = binned[at] - binned[at - 1];
        for (int back = at + 1; back < Math.min(binned.length, at + 4); back++) {
            if (Math.abs(binned[back] - binned[at - 1]) < 0.5 * Math.abs(jump)) {
                return true;
            }
        }
        for (int before = at - 2; before >= Math.max(0, at - 4); before--) {
            if (Math.abs(binned[before] - binned[at]) < 0.5 * Math.abs(jump)) {
                return true;
            }
        }
        return false;
    }

    private static double largestStep(double[] binned) {
        double step = 0;
        for (int i = 1; i < binned.length; i++) {
            step = Math.max(step, Math.abs(binned[i] - binned[i - 1]));
        }
        return step;
    }

    private static boolean constant(double[] binned) {
        for (double v : binned) {
            if (v != binned[0]) {
                return false;
            }
        }
        return true;
    }

    private static void add(List<Finding> found, InvalidReason reason, String format, double first, double second,
            double value, double bound) {
        found.add(new Finding(reason, String.format(Locale.ROOT, format, first, second), value, bound));
    }
}

package org.laddergate.demo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Map;
import java.util.Random;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.laddergate.thermal.FosterNetwork;

class RawRecorderTest {
    private final Population kestrel = KestrelReference.population();
    private final RawRecorder recorder = new RawRecorder(kestrel.setup());

    /** Source: header of production.csv.gz of the reference population kestrel, the same binning by another program. */
    @Test
    @Tag("reference")
    void times_kestrelRecipe_sameStamps() {
        String[] head = KestrelReference.rows("production.csv.gz").get(0);
        assertEquals(head.length - 1, recorder.size());
        for (int i = 0; i < recorder.size(); i++) {
            double expected = Double.parseDouble(head[i + 1]);
            assertEquals(expected, recorder.timeSeconds(i), 1e-6 * expected, "stamp " + i);
        }
    }

    /** Source: README of the reference population kestrel, "Noise model": 0.020 K, from 40 us 0.014, then 0.003. */
    @Test
    @Tag("reference")
    void noise_kestrelRecipe_asPrinted() {
        assertEquals(0.020, recorder.noiseKelvin(0), 5e-4);
        for (int i = 0; i < recorder.size(); i++) {
            if (recorder.timeSeconds(i) > 4.0e-5 && recorder.timeSeconds(i) < 4.3e-5) {
                assertEquals(0.014, recorder.noiseKelvin(i), 5e-4);
            } else if (recorder.timeSeconds(i) > 1.0e-3) {
                assertEquals(0.003, recorder.noiseKelvin(i), 2e-4, "at " + recorder.timeSeconds(i));
            }
        }
    }

    /** Identity: the closed geometric series is the mean over the raw samples. */
    @Test
    @Tag("identity")
    void clean_bins_meansOfRawSamples() {
        FosterNetwork network = FosterNetwork.of(new double[] {0.02, 0.1, 0.4}, new double[] {3e-5, 2e-3, 0.7});
        double[] binned = recorder.clean(network);
        for (int i : new int[] {0, 16, 60, 120, 180}) {
            long samples = i == 0 ? 1 : Math.round(2 * (recorder.timeSeconds(i) - lastBefore(i)) * 1e6 - 1);
            double first = recorder.timeSeconds(i) - 0.5e-6 * (samples - 1);
            double sum = 0;
            for (long s = 0; s < samples; s++) {
                sum += 60 * network.coolingKelvinPerWatt(first + s * 1e-6, 2);
            }
            assertEquals(30 + sum / samples, binned[i], 1e-9, "bin " + i);
        }
    }

    /** Last raw sample of the bin before: bins follow each other without gaps. */
    private double lastBefore(int bin) {
        double last = recorder.timeSeconds(0);
        double from = last + 1e-6;
        for (int i = 1; i < bin; i++) {
            last = 2 * recorder.timeSeconds(i) - from;
            from = last + 1e-6;
        }
        return last;
    }

    /**
     * Source: records and truth of the reference population kestrel, every 83rd unit. From 60 us on, where the
     * electrical transient is over, a record differs from ours by its drift (a line of at most 0.05 K), its noise and
     * the two programs' disagreement, for which 0.3 % of the rise is allowed.
     */
    @Test
    @Tag("reference")
    void clean_kestrelUnits_asRecorded() {
        List<Map<String, String>> truth = KestrelReference.truth();
        for (String set : List.of("golden", "production", "faulty")) {
            List<String[]> rows = KestrelReference.rows(set + ".csv.gz");
            for (int n = 1; n < rows.size(); n += 83) {
                String id = rows.get(n)[0];
                Map<String, String> row = truth.stream().filter(r -> r.get("unit_id").equals(id)).findFirst()
                        .orElseThrow();
                double[] ours = recorder.clean(KestrelReference.unit(kestrel, row).model().network());
                for (int i = 0; i < ours.length; i++) {
                    double theirs = Double.parseDouble(rows.get(n)[i + 1]);
                    double t = recorder.timeSeconds(i);
                    if (t > 6e-5) {
                        double allowed = 0.05 * t / 1.5 + 5 * recorder.noiseKelvin(i) + 0.003 * (theirs - 30)
                                + 2.6 * Math.exp(-t / 8e-6);
                        assertEquals(theirs, ours[i], allowed, id + " at " + t + " s");
                    }
                }
            }
        }
    }

    @Test
    @Tag("identity")
    void record_sameSeed_sameCurve() {
        FosterNetwork network = FosterNetwork.of(new double[] {0.5}, new double[] {0.01});
        double[] first = recorder.record(network, new Random(1));
        assertArrayEquals(first, recorder.record(network, new Random(1)), 0);
        assertTrue(Math.abs(first[0] - recorder.record(network, new Random(2))[0]) > 0);
    }
}

package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import java.util.Arrays;
import java.util.Random;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Referee: continued fractions worked out with 600 digits (foster-cauer.json, see its "source"). */
class FosterToCauerTest {
    /** Ten times the worst error seen in double precision; the textbook recursion has no correct digit for many stages. */
    private static final double TOLERANCE = 1e-12;

    static Stream<JsonNode> cases() {
        JsonNode file = ReferenceData.json("foster-cauer.json");
        return Stream.concat(StreamSupport.stream(file.get("cases").spliterator(), false),
                StreamSupport.stream(file.get("edge_cases").spliterator(), false));
    }

    @ParameterizedTest
    @MethodSource("cases")
    void computeLadder_exactReference_everyElement(JsonNode reference) {
        CauerLadder ladder = FosterToCauer.computeLadder(network(reference));
        double[] r = ReferenceData.array(reference.get("cauer_R"));
        double[] c = ReferenceData.array(reference.get("cauer_C"));
        assertEquals(r.length, ladder.size(), reference.get("name").asText());
        for (int k = 0; k < r.length; k++) {
            assertRelative(r[k], ladder.resistanceKelvinPerWatt(k), reference.get("name").asText() + " R" + k);
            assertRelative(c[k], ladder.capacitanceJoulesPerKelvin(k), reference.get("name").asText() + " C" + k);
        }
    }

    @Test
    void computeLadder_textbookRecursion_losesEverything() {
        JsonNode reference = StreamSupport.stream(ReferenceData.json("foster-cauer.json").get("cases").spliterator(), false)
                .filter(c -> c.get("name").asText().equals("n120-random")).findFirst().orElseThrow();
        double[] exact = ReferenceData.array(reference.get("cauer_R"));
        double[] naive = TextbookRecursion.resistances(ReferenceData.array(reference.get("foster_R")),
                ReferenceData.array(reference.get("foster_tau")));
        double worst = 0;
        for (int k = 0; k < exact.length; k++) {
            worst = Math.max(worst, Math.abs(naive[k] / exact[k] - 1));
        }
        assertTrue(!(worst < 0.1), "the care taken here buys nothing: textbook error is only " + worst);
    }

    @Test
    void computeLadder_anyNetwork_keepsTotalResistanceAndFirstCapacitance() {
        Random random = new Random(7);
        for (int trial = 0; trial < 200; trial++) {
            int n = 1 + random.nextInt(60);
            double[] r = new double[n];
            double[] tau = new double[n];
            double rates = 0;
            double total = 0;
            for (int i = 0; i < n; i++) {
                r[i] = Math.exp(3 * random.nextGaussian());
                tau[i] = Math.pow(10, -6 + 8 * random.nextDouble());
                rates += r[i] / tau[i];
                total += r[i];
            }
            CauerLadder ladder = FosterToCauer.computeLadder(FosterNetwork.of(r, tau));
            double sum = Arrays.stream(ladder.resistancesKelvinPerWatt()).sum();
            assertEquals(1, sum / total, 1e-11);
            assertEquals(1, ladder.capacitanceJoulesPerKelvin(0) * rates, 1e-12);
        }
    }

    @Test
    void computeLadder_powerOrTimeScaled_scalesTheLadder() {
        double[] r = {0.1, 0.3, 0.2};
        double[] tau = {1e-4, 3e-2, 2};
        CauerLadder once = FosterToCauer.computeLadder(FosterNetwork.of(r, tau));
        CauerLadder slow = FosterToCauer.computeLadder(FosterNetwork.of(r, new double[] {4e-4, 12e-2, 8}));
        for (int k = 0; k < 3; k++) {
            assertEquals(1, slow.resistanceKelvinPerWatt(k) / once.resistanceKelvinPerWatt(k), 1e-13);
            assertEquals(4, slow.capacitanceJoulesPerKelvin(k) / once.capacitanceJoulesPerKelvin(k), 1e-12);
        }
    }

    @Test
    void computeLadder_noResistance_isRefused() {
        FosterNetwork nothing = FosterNetwork.of(new double[] {0, 0}, new double[] {1, 2});
        assertThrows(IllegalArgumentException.class, () -> FosterToCauer.computeLadder(nothing));
    }

    static FosterNetwork network(JsonNode reference) {
        return FosterNetwork.of(ReferenceData.array(reference.get("foster_R")),
                ReferenceData.array(reference.get("foster_tau")));
    }

    private static void assertRelative(double expected, double actual, String what) {
        double error = Math.abs(actual / expected - 1);
        assertTrue(error <= TOLERANCE, what + ": expected " + expected + ", got " + actual + ", relative error " + error);
    }

    /** The recursion of the textbooks on polynomial coefficients, for comparison only. */
    private static final class TextbookRecursion {
        static double[] resistances(double[] r, double[] tau) {
            int n = r.length;
            double[] denominator = {1};
            double[] numerator = {0};
            for (int i = 0; i < n; i++) {
                double[] factor = {1, tau[i]};
                numerator = add(times(numerator, factor), scale(denominator, r[i]));
                denominator = times(denominator, factor);
            }
            double[] out = new double[n];
            for (int k = 0; k < n; k++) {
                int d = n - k;
                double c = denominator[d] / numerator[d - 1];
                double[] rest = new double[d];
                for (int i = 0; i < d; i++) {
                    rest[i] = denominator[i] - (i == 0 ? 0 : c * numerator[i - 1]);
                }
                out[k] = numerator[d - 1] / rest[d - 1];
                double[] next = new double[Math.max(1, d - 1)];
                for (int i = 0; i < d - 1; i++) {
                    next[i] = numerator[i] - out[k] * rest[i];
                }
                denominator = rest;
                numerator = next;
            }
            return out;
        }

        private static double[] times(double[] a, double[] b) {
            double[] out = new double[a.length + b.length - 1];
            for (int i = 0; i < a.length; i++) {
                for (int j = 0; j < b.length; j++) {
                    out[i + j] += a[i] * b[j];
                }
            }
            return out;
        }

        private static double[] add(double[] a, double[] b) {
            double[] out = Arrays.copyOf(a.length >= b.length ? a : b, Math.max(a.length, b.length));
            double[] other = a.length >= b.length ? b : a;
            for (int i = 0; i < other.length; i++) {
                out[i] += other[i];
            }
            return out;
        }

        private static double[] scale(double[] a, double f) {
            return Arrays.stream(a).map(x -> x * f).toArray();
        }
    }
}

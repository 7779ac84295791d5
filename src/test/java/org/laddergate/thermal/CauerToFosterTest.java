package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;

import com.fasterxml.jackson.databind.JsonNode;
import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class CauerToFosterTest {

    /** Source: ladder.json, exact modes with 60 digits. */
    @Test
    void computeNetwork_eightStageLadder_exactModes() {
        JsonNode ladder = ReferenceData.json("ladder.json");
        FosterNetwork network = CauerToFoster.computeNetwork(CauerLadder.of(ReferenceData.array(ladder.get("cauer_R")),
                ReferenceData.array(ladder.get("cauer_C"))));
        double[] r = ReferenceData.array(ladder.get("foster_R"));
        double[] tau = ReferenceData.array(ladder.get("foster_tau"));
        for (int j = 0; j < r.length; j++) {
            assertEquals(1, network.timeConstantSeconds(j) / tau[j], 1e-13);
            assertEquals(1, network.resistanceKelvinPerWatt(j) / r[j], 1e-12);
        }
    }

    /** Source: ladder-ngspice.csv, a circuit simulator's transient analysis, six printed digits. */
    @Test
    void response_eightStageLadder_circuitSimulatorToItsPrintedDigits() {
        JsonNode ladder = ReferenceData.json("ladder.json");
        FosterNetwork network = CauerToFoster.computeNetwork(CauerLadder.of(ReferenceData.array(ladder.get("cauer_R")),
                ReferenceData.array(ladder.get("cauer_C"))));
        double heating = ladder.get("heating_s_of_the_cooling_rows").asDouble();
        int rows = 0;
        for (String line : ReferenceData.lines("ladder-ngspice.csv")) {
            String[] cells = line.split(",");
            if (cells[0].equals("run")) {
                continue;
            }
            double t = Double.parseDouble(cells[1]);
            double printed = Double.parseDouble(cells[2]);
            double ours = cells[0].equals("step") ? network.impedanceKelvinPerWatt(t)
                    : network.coolingKelvinPerWatt(t, heating);
            // Half a unit of the sixth digit, and the simulator's own error of 5.8e-7 of the rise at switch-off.
            double tolerance = 0.5 * Math.pow(10, Math.floor(Math.log10(printed)) - 5)
                    + 6e-7 * network.coolingKelvinPerWatt(0, heating);
            assertEquals(printed, ours, tolerance, line);
            rows++;
        }
        assertEquals(true, rows > 50, "rows compared: " + rows);
    }

    /** Going to the ladder and back must give the network that the ladder came from, all sizes and spreads. */
    @ParameterizedTest
    @MethodSource("org.laddergate.thermal.FosterToCauerTest#cases")
    void computeNetwork_ladderOfANetwork_isTheNetwork(JsonNode reference) {
        double[] r = ReferenceData.array(reference.get("foster_R"));
        double[] tau = ReferenceData.array(reference.get("foster_tau"));
        FosterNetwork network = CauerToFoster.computeNetwork(CauerLadder.of(
                ReferenceData.array(reference.get("cauer_R")), ReferenceData.array(reference.get("cauer_C"))));
        double total = Arrays.stream(r).sum();
        double condition = reference.has("condition") ? reference.get("condition").asDouble() : 10;
        double longest = Arrays.stream(tau).max().orElseThrow();
        for (double t = 1e-3 * Arrays.stream(tau).min().orElseThrow(); t < 20 * longest; t *= 3) {
            double exact = FosterNetwork.of(r, tau).impedanceKelvinPerWatt(t);
            assertEquals(1, network.impedanceKelvinPerWatt(t) / exact, 1e-12 * Math.max(1, condition),
                    reference.get("name").asText() + " at " + t + " s");
        }
        assertEquals(1, network.totalResistanceKelvinPerWatt() / total, 1e-12);
    }

    @Test
    void computeNetwork_anyLadder_sumsOfResistancesAgree() {
        Random random = new Random(11);
        for (int trial = 0; trial < 50; trial++) {
            int n = 1 + random.nextInt(80);
            double[] r = random.doubles(n, -6, 2).map(Math::exp).toArray();
            double[] c = random.doubles(n, -9, 2).map(Math::exp).toArray();
            FosterNetwork network = CauerToFoster.computeNetwork(CauerLadder.of(r, c));
            assertEquals(1, network.totalResistanceKelvinPerWatt() / Arrays.stream(r).sum(), 1e-11);
        }
    }
}

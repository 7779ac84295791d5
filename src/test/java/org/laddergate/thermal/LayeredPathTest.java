package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import java.util.HashMap;
import java.util.Map;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Source: analytic-structures.json and pulse.json, closed-form line impedances and exact modes with 50 digits. */
class LayeredPathTest {
    private static final Map<String, FosterNetwork> NETWORKS = new HashMap<>();

    static Stream<JsonNode> structures() {
        return StreamSupport.stream(ReferenceData.json("analytic-structures.json").get("structures").spliterator(), false);
    }

    static Stream<JsonNode> pulses() {
        return StreamSupport.stream(ReferenceData.json("pulse.json").get("pulses").spliterator(), false);
    }

    @ParameterizedTest
    @MethodSource("structures")
    void ladder_continuousStack_responseToOneInTenThousand(JsonNode structure) {
        FosterNetwork network = network(structure);
        double[] t = ReferenceData.array(structure.get("t"));
        double[] z = ReferenceData.array(structure.get("Zth"));
        double[] slope = ReferenceData.array(structure.get("dZth_dlnt"));
        double largest = 0;
        for (double s : slope) {
            largest = Math.max(largest, s);
        }
        for (int i = 0; i < t.length; i++) {
            assertEquals(1, network.impedanceKelvinPerWatt(t[i]) / z[i], 1e-4,
                    structure.get("name").asText() + " Zth at " + t[i] + " s");
            // Late on the slope itself dies away; there it is compared with its largest value.
            double allowed = 1e-4 * Math.max(slope[i], 0.01 * largest) * 3;
            assertEquals(slope[i], network.impedanceSlopeKelvinPerWatt(t[i]), allowed,
                    structure.get("name").asText() + " slope at " + t[i] + " s");
        }
    }

    @ParameterizedTest
    @MethodSource("structures")
    void response_exactModes_totalAndTimeConstants(JsonNode structure) {
        FosterNetwork network = network(structure);
        double[] tau = ReferenceData.array(structure.get("tau_n"));
        double[] r = ReferenceData.array(structure.get("R_n"));
        int last = network.size() - 1;
        for (int j = 0; j < 5; j++) {
            assertEquals(1, network.timeConstantSeconds(last - j) / tau[j], 2e-4, structure.get("name").asText());
            assertEquals(r[j], network.resistanceKelvinPerWatt(last - j), 1e-4 * structure.get("R_total").asDouble());
        }
        assertEquals(1, network.totalResistanceKelvinPerWatt() / structure.get("R_total").asDouble(), 1e-9);
    }

    @ParameterizedTest
    @MethodSource("pulses")
    void cooling_finitePulse_toOneInTenThousandOfTheRise(JsonNode pulse) {
        if (!pulse.has("heating_s")) {
            return;
        }
        JsonNode structure = structures().filter(s -> s.get("name").equals(pulse.get("structure"))).findFirst().orElseThrow();
        FosterNetwork network = network(structure);
        double[] t = ReferenceData.array(pulse.get("t_after_switch_off"));
        double[] rise = ReferenceData.array(pulse.get("T_rise"));
        double start = pulse.get("T_rise_at_switch_off").asDouble();
        double[] ours = new double[t.length];
        network.coolingInto(pulse.get("power_W").asDouble(), pulse.get("heating_s").asDouble(), t, ours);
        for (int i = 0; i < t.length; i++) {
            assertEquals(rise[i], ours[i], 1e-4 * start, structure.get("name").asText() + " at " + t[i] + " s");
        }
    }

    @ParameterizedTest
    @MethodSource("structures")
    void structureFunction_continuousStack_readsCapacitanceBetweenSteps(JsonNode structure) {
        StructureFunction found = StructureFunction.of(path(structure).computeLadder());
        double[] r = ReferenceData.array(structure.get("structure_function").get("R_sigma"));
        double[] c = ReferenceData.array(structure.get("structure_function").get("C_sigma"));
        double total = structure.get("R_total").asDouble();
        for (int i = 1; i < r.length; i++) {
            if (c[i] > c[i - 1] * 1.0001 && r[i] > r[i - 1]) {
                double mid = 0.5 * (c[i] + c[i - 1]);
                double exact = structure.get("name").asText().contains("cone") ? Double.NaN
                        : r[i - 1] + 0.5 * (r[i] - r[i - 1]);
                if (!Double.isNaN(exact)) {
                    assertEquals(exact, found.resistanceAt(mid), 0.005 * total, structure.get("name").asText());
                }
            }
        }
        assertTrue(found.totalCapacitanceJoulesPerKelvin() <= structure.get("C_total").asDouble() * 1.000001);
    }

    private static FosterNetwork network(JsonNode structure) {
        return NETWORKS.computeIfAbsent(structure.get("name").asText(),
                n -> CauerToFoster.computeNetwork(path(structure).computeLadder()));
    }

    static LayeredPath path(JsonNode structure) {
        LayeredPath path = new LayeredPath(structure.get("elements_from_junction").size() == 1 ? 1600 : 500);
        for (JsonNode e : structure.get("elements_from_junction")) {
            switch (e.get("type").asText()) {
                case "layer" -> path.layer(e.get("R").asDouble(), e.get("C").asDouble());
                case "resistance" -> path.resistance(e.get("R").asDouble());
                case "capacitance" -> path.capacitance(e.get("C").asDouble());
                case "cone" -> path.cone(e.get("r0_m").asDouble(), e.get("r1_m").asDouble(),
                        e.get("k_W_per_mK").asDouble(), e.get("cv_J_per_m3K").asDouble(),
                        e.get("solid_angle_sr").asDouble());
                default -> throw new IllegalStateException(e.toString());
            }
        }
        return path;
    }
}

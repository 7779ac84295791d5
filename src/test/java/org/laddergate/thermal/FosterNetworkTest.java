package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;

import com.fasterxml.jackson.databind.JsonNode;
import java.util.stream.Stream;
import java.util.stream.StreamSupport;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Source: analytic-structures.json and pulse.json: exact modes and exact responses with 50 digits. */
class FosterNetworkTest {

    static Stream<JsonNode> structures() {
        return LayeredPathTest.structures();
    }

    static Stream<JsonNode> pulses() {
        return StreamSupport.stream(ReferenceData.json("pulse.json").get("pulses").spliterator(), false);
    }

    /** Of the given modes, at times when the 25 listed ones are all that is left: 1e-9 relative. */
    @ParameterizedTest
    @MethodSource("structures")
    void impedance_exactModes_exactResponse(JsonNode structure) {
        FosterNetwork modes = modes(structure);
        double total = structure.get("R_total").asDouble();
        double[] t = ReferenceData.array(structure.get("t"));
        double[] z = ReferenceData.array(structure.get("Zth"));
        double shortest = modes.timeConstantSeconds(modes.size() - 1);
        int compared = 0;
        for (int i = 0; i < t.length; i++) {
            if (t[i] > 25 * shortest) {
                double cooling = modes.coolingKelvinPerWatt(t[i], Double.POSITIVE_INFINITY);
                assertEquals(1, (total - cooling) / z[i], 1e-9, structure.get("name").asText() + " at " + t[i]);
                compared++;
            }
        }
        assertEquals(true, compared > 10, "times compared: " + compared);
    }

    /** After a finite pulse and after trains of pulses, by superposition: 1e-9 of the rise at switch-off. */
    @ParameterizedTest
    @MethodSource("pulses")
    void cooling_exactModes_exactResponse(JsonNode pulse) {
        JsonNode structure = structures().filter(s -> s.get("name").equals(pulse.get("structure"))).findFirst().orElseThrow();
        FosterNetwork modes = modes(structure);
        double shortest = modes.timeConstantSeconds(modes.size() - 1);
        double[] t = ReferenceData.array(pulse.get("t_after_switch_off"));
        double[] rise = ReferenceData.array(pulse.get("T_rise"));
        double start = pulse.get("T_rise_at_switch_off").asDouble();
        for (int i = 0; i < t.length; i++) {
            if (t[i] > 25 * shortest) {
                assertEquals(rise[i], response(modes, pulse, t[i]), 1e-9 * start, pulse.get("structure") + " at " + t[i]);
            }
        }
    }

    private static double response(FosterNetwork network, JsonNode pulse, double t) {
        if (pulse.has("heating_s")) {
            return pulse.get("power_W").asDouble() * network.coolingKelvinPerWatt(t, pulse.get("heating_s").asDouble());
        }
        double end = pulse.get("last_switch_off_s").asDouble();
        double sum = 0;
        for (JsonNode part : pulse.get("train")) {
            double since = end + t - part.get("start_s").asDouble() - part.get("width_s").asDouble();
            sum += part.get("power_W").asDouble() * network.coolingKelvinPerWatt(since, part.get("width_s").asDouble());
        }
        return sum;
    }

    private static FosterNetwork modes(JsonNode structure) {
        return FosterNetwork.of(ReferenceData.array(structure.get("R_n")), ReferenceData.array(structure.get("tau_n")));
    }
}

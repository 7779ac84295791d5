package org.laddergate.measurement;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Source: analytic-structures.json, exact step responses; cooling from steady state starts at the total resistance. */
class SquareRootStartTest {

    @Test
    void extrapolate_exactStacksFromFortyMicroseconds_totalRise() throws IOException {
        int compared = 0;
        try (InputStream in = SquareRootStartTest.class.getResourceAsStream("/reference/thermal/analytic-structures.json")) {
            for (JsonNode structure : new ObjectMapper().readTree(in).get("structures")) {
                if (!structure.has("short_time")) {
                    continue;
                }
                double total = structure.get("R_total").asDouble();
                List<double[]> points = new ArrayList<>();
                for (int i = 0; i < structure.get("t").size(); i++) {
                    double t = structure.get("t").get(i).asDouble();
                    if (t > 4e-5) {
                        points.add(new double[] {t, total - structure.get("Zth").get(i).asDouble()});
                    }
                }
                double start = SquareRootStart.extrapolate(points.stream().mapToDouble(p -> p[0]).toArray(),
                        points.stream().mapToDouble(p -> p[1]).toArray());
                assertEquals(total, start, 1e-3 * total, structure.get("name").asText());
                compared++;
            }
        }
        assertTrue(compared >= 5, "structures compared: " + compared);
    }

    @Test
    void extrapolate_tooFewSamples_isNotANumber() {
        assertTrue(Double.isNaN(SquareRootStart.extrapolate(new double[] {1, 2, 50}, new double[] {3, 2, 1})));
    }
}

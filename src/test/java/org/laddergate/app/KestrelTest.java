package org.laddergate.app;

import static io.restassured.RestAssured.given;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import com.fasterxml.jackson.databind.node.ArrayNode;
import com.fasterxml.jackson.databind.node.ObjectNode;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeMap;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestInstance;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.http.HttpService;
import org.laddergate.http.Tokens;

/**
 * The main job on a population that another program made: learn from golden units, judge production and faulty units and
 * broken measurements, all over HTTP. It is one of five populations of different geometry that were looked at when the
 * priors were set (docs/accuracy.md); bounds are those the project promises, not what was measured.
 */
@TestInstance(TestInstance.Lifecycle.PER_CLASS)
class KestrelTest {
    private static final Set<String> REGIONS = Set.of("die", "attach", "solder", "tim");
    private static final ObjectMapper JSON = new ObjectMapper();

    private Wiring wiring;
    private HttpService service;

    @BeforeAll
    void learnAndRelease(@TempDir Path folder) throws IOException {
        Settings settings = Settings.of(Map.of(Setting.PORT, "0", Setting.DATA, folder.resolve("data").toString(),
                Setting.GOLDEN_UNITS, folder.resolve("golden").toString(), Setting.LIMITS,
                folder.resolve("limits").toString()), Map.of());
        wiring = new Wiring(settings);
        service = HttpService.start(settings.http(), wiring.services(), Tokens.none());
        given().port(service.port()).contentType("application/json").body(product().toString())
                .put("/v1/products/kestrel").then().statusCode(201);
        for (KestrelPopulation.Curve curve : KestrelPopulation.curves("golden.csv.gz", 1)) {
            given().port(service.port()).contentType("application/json")
                    .body(body(curve).put("condition", "golden").toString())
                    .post("/v1/products/kestrel/golden-units").then().statusCode(201);
        }
        int revision = given().port(service.port()).contentType("application/json").body("{}")
                .post("/v1/products/kestrel/limits").then().statusCode(201).extract().path("revision");
        given().port(service.port()).contentType("application/json").body("{\"reason\":\"first limits\"}")
                .post("/v1/products/kestrel/limits/" + revision + "/release").then().statusCode(200);
    }

    @AfterAll
    void stop() {
        service.close();
        wiring.close();
    }

    /** At most 2 % of healthy parts rejected, fewer than 0.5 % called invalid. */
    @Test
    void production_healthyParts_pass() throws IOException {
        int rejected = 0;
        int invalid = 0;
        List<KestrelPopulation.Curve> parts = KestrelPopulation.curves("production.csv.gz", 1);
        for (KestrelPopulation.Curve part : parts) {
            String verdict = judge(part).get("verdict").asText();
            rejected += verdict.equals("fail") ? 1 : 0;
            invalid += verdict.equals("invalid") ? 1 : 0;
        }
        assertTrue(rejected <= 0.02 * parts.size(), rejected + " of " + parts.size() + " healthy parts rejected");
        assertTrue(invalid <= 0.005 * parts.size(), invalid + " of " + parts.size() + " healthy parts called invalid");
    }

    /**
     * Right region in 97 % of detected single faults; of double faults the named one is one of the two. Detected must be
     * 280 of the 320: the data's README lists as hardly detectable 16 TIM edges of 15 % and as borderline 4 classes of 16.
     */
    @Test
    void faulty_partsWithKnownFaults_failInTheRightRegion() throws IOException {
        Map<String, Map<String, String>> truth = KestrelPopulation.truth();
        Map<String, Integer> wrong = new TreeMap<>();
        int detected = 0;
        int invalid = 0;
        List<KestrelPopulation.Curve> parts = KestrelPopulation.curves("faulty.csv.gz", 1);
        for (KestrelPopulation.Curve part : parts) {
            Map<String, String> t = truth.get(part.id());
            JsonNode answer = judge(part);
            if (answer.get("verdict").asText().equals("invalid")) {
                invalid++;
            } else if (answer.get("verdict").asText().equals("fail")) {
                detected += t.get("region_2").isEmpty() ? 1 : 0;
                String named = answer.get("failingRegion").asText();
                if (!named.equals(t.get("region")) && !named.equals(t.get("region_2"))) {
                    wrong.merge(t.get("region") + " " + t.get("kind") + " called " + named, 1, Integer::sum);
                }
            }
        }
        int misnamed = wrong.values().stream().mapToInt(Integer::intValue).sum();
        assertTrue(detected >= 280, "only " + detected + " of 320 single faults detected");
        assertTrue(misnamed <= 0.03 * detected, "misnamed " + wrong + " of " + detected);
        assertTrue(invalid <= 0.005 * parts.size(), invalid + " faulty parts called invalid measurements");
    }

    @Test
    void badMeasurements_areInvalidWithTheReason() throws IOException {
        Map<String, Set<String>> expected = Map.of("open_sensor", Set.of("sensor_open_or_short"), "no_heating",
                Set.of("no_heating"), "late_trigger", Set.of("late_trigger"), "noise_5x", Set.of("noise_too_high"),
                "strong_drift", Set.of("base_drift"), "power_10_percent_low", Set.of("power_inconsistent"), "pulse_1_s",
                // A pulse half as long leaves out what a decaying start would add: one record cannot tell them apart.
                Set.of("pulse_length_inconsistent", "base_drift"), "spikes", Set.of("spikes"), "saturated_adc",
                Set.of("saturated"), "truncated_0_2_s", Set.of("record_too_short"));
        List<String> wrong = new ArrayList<>();
        int checked = 0;
        for (KestrelPopulation.Curve record : KestrelPopulation.curves("bad-measurements.csv.gz", 3)) {
            if (!expected.containsKey(record.label())) {
                continue;
            }
            checked++;
            JsonNode answer = judge(record);
            String code = answer.get("reasons").isEmpty() ? "" : answer.get("reasons").get(0).get("code").asText();
            if (!answer.get("verdict").asText().equals("invalid") || !expected.get(record.label()).contains(code)) {
                wrong.add(record.label() + ": " + answer.get("verdict").asText() + " " + code);
            }
        }
        assertEquals(List.of(), wrong);
        assertEquals(27, checked);
    }

    private JsonNode judge(KestrelPopulation.Curve curve) throws IOException {
        return JSON.readTree(given().port(service.port()).contentType("application/json").body(body(curve).toString())
                .post("/v1/transients").then().statusCode(200).extract().asByteArray());
    }

    private static ObjectNode body(KestrelPopulation.Curve curve) {
        ObjectNode body = JSON.createObjectNode().put("measurementId", curve.id()).put("product", "kestrel")
                .put("serial", curve.id()).put("measuredAt", "2026-11-30T08:00:00Z").put("curve", "cooling")
                .put("heatingPowerWatts", 60.0).put("heatingSeconds", 2.0);
        ArrayNode times = body.putArray("timeSeconds");
        ArrayNode celsius = body.putArray("temperatureCelsius");
        for (int i = 0; i < curve.timesSeconds().length; i++) {
            times.add(curve.timesSeconds()[i]);
            celsius.add(curve.celsius()[i]);
        }
        return body;
    }

    private static ObjectNode product() {
        ObjectNode product = JSON.createObjectNode();
        product.putObject("recipe").put("curve", "cooling").put("heatingPowerWatts", 60.0).put("heatingSeconds", 2.0)
                .put("cutSeconds", 4e-5).put("recordSeconds", 1.5);
        ArrayNode layers = product.putArray("layers");
        List<String[]> rows = KestrelPopulation.rows("layers.csv");
        for (String[] row : rows.subList(1, rows.size())) {
            if (row[1].isEmpty()) {
                continue;
            }
            ObjectNode layer = layers.addObject().put("name", row[0]).put("thicknessMetres", Double.parseDouble(row[1]))
                    .put("conductivityWattsPerMetreKelvin", Double.parseDouble(row[2]))
                    .put("heatCapacityJoulesPerCubicMetreKelvin", Double.parseDouble(row[3]))
                    .put("areaSquareMetres", Double.parseDouble(row[4]));
            if (REGIONS.contains(row[0])) {
                layer.put("region", row[0]).put("role", "part");
            }
        }
        return product;
    }
}

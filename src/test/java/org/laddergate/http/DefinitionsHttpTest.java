package org.laddergate.http;

import static org.hamcrest.Matchers.equalTo;
import static org.hamcrest.Matchers.hasSize;
import static org.junit.jupiter.api.Assertions.assertEquals;

import io.restassured.response.ValidatableResponse;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.laddergate.measurement.TemperatureSensor;

/** Products, golden units and limits. */
@Tag("http")
class DefinitionsHttpTest {
    private TestService service;

    @BeforeEach
    void start() {
        service = TestService.open();
    }

    @AfterEach
    void stop() {
        service.close();
    }

    private ValidatableResponse put(String body) {
        return service.request().contentType("application/json").body(body).put("/v1/products/hb40").then();
    }

    private ValidatableResponse post(String path, String body) {
        return service.request().contentType("application/json").body(body).post("/v1/products/hb40" + path).then();
    }

    private static String golden(String id, double kelvin, String condition) {
        return TestService.curve(id, kelvin).replace("{\"measurementId\"", "{" + condition + "\"measurementId\"");
    }

    private static Map<String, String> faults(ValidatableResponse response) {
        List<Map<String, String>> errors = response.statusCode(422).extract().path("errors");
        return errors.stream().collect(Collectors.toMap(e -> e.get("pointer"), e -> e.get("code"), (a, b) -> a));
    }

    @Test
    void product_isCreatedThenReplacedAndReadBack() throws Exception {
        String created = put(TestService.PRODUCT).statusCode(201).header("Location", "/v1/products/hb40").extract()
                .asString();
        String expected = TestService.PRODUCT.replace("\"recordSeconds\":2.0",
                "\"recordSeconds\":2.0,\"powerTolerance\":0.05").replaceFirst("\\{", "{\"product\":\"hb40\",")
                .replaceAll("]\\}\\s*$", "],\"decision\":{\"content\":0.99,\"confidenceLevel\":0.95,"
                        + "\"rule\":\"simple_acceptance\",\"specificRisk\":0.05,\"falseRejectRisk\":0.005,"
                        + "\"priorFaultRate\":0.02}}");
        assertEquals(Json.MAPPER.readTree(expected), Json.MAPPER.readTree(created));
        put(created).statusCode(200);
        assertEquals(created, service.request().get("/v1/products/hb40").then().statusCode(200).extract().asString());
        service.request().get("/v1/products").then().statusCode(200).body("products", equalTo(List.of("hb40")));
    }

    @Test
    void product_ofRegionsAndSensor_isReadBack() {
        put("{\"recipe\":{\"curve\":\"heating\",\"heatingPowerWatts\":5,\"recordSeconds\":10,"
                + "\"sensor\":{\"kFactorKelvinPerVolt\":-450,\"celsiusAtZeroVolts\":310}},"
                + "\"regions\":[{\"name\":\"attach\",\"role\":\"part\",\"fromJoulesPerKelvin\":0.03,"
                + "\"toJoulesPerKelvin\":0.05},{\"name\":\"plate\",\"role\":\"fixture\",\"fromJoulesPerKelvin\":1,"
                + "\"toJoulesPerKelvin\":5}],\"decision\":{\"rule\":\"guarded_acceptance\",\"content\":0.95}}")
                .statusCode(201).body("recipe.heatingSeconds", equalTo("steady-state"))
                .body("regions[1].role", equalTo("fixture")).body("decision.rule", equalTo("guarded_acceptance"))
                .body("decision.content", equalTo(0.95f));
        assertEquals(TemperatureSensor.linear(-450, 310),
                service.products.find("hb40").orElseThrow().recipe().sensor().orElseThrow());
    }

    @Test
    void productFaults_areAllListedWithTheirPlace() {
        assertEquals(Map.of("/recipe/curve", "unknown_word", "/recipe/heatingPowerWatts", "out_of_range",
                "/recipe/heatingSeconds", "missing", "/recipe/powerTolerance", "out_of_range", "/recipe/colour",
                "unknown_field", "/layers/0/thicknessMetres", "out_of_range", "/layers/0/areaSquareMetres",
                "wrong_type", "/layers/0/role", "unknown_word", "/decision/content", "out_of_range"),
                faults(put("{\"recipe\":{\"curve\":\"warming\",\"heatingPowerWatts\":-1,\"recordSeconds\":2,"
                        + "\"powerTolerance\":0.9,\"colour\":1},\"layers\":[{\"name\":\"die\",\"region\":\"die\","
                        + "\"role\":\"boss\",\"thicknessMetres\":-1,\"areaSquareMetres\":\"big\","
                        + "\"conductivityWattsPerMetreKelvin\":1,\"heatCapacityJoulesPerCubicMetreKelvin\":1e6}],"
                        + "\"decision\":{\"content\":1.5}}")));
        assertEquals(Map.of("/recipe", "missing", "/layer", "unknown_field"), faults(put("{\"layer\":[]}")));
        assertEquals(Map.of("", "impossible_product"), faults(put(
                TestService.PRODUCT.replaceFirst("\"layers\":", "\"regions\":[{\"name\":\"a\","
                        + "\"fromJoulesPerKelvin\":0,\"toJoulesPerKelvin\":1}],\"layers\":"))));
        assertEquals(Map.of("/regions/0/fromJoulesPerKelvin", "out_of_range"), faults(put(TestService.PRODUCT
                .replaceAll("(?s)\"layers\":.*", "\"regions\":[{\"name\":\"a\",\"fromJoulesPerKelvin\":2,"
                        + "\"toJoulesPerKelvin\":1}]}"))));
        assertEquals(Map.of("/layers", "wrong_type"), faults(put(TestService.PRODUCT
                .replaceAll("(?s)\"layers\":.*", "\"layers\":{}}"))));
        service.request().contentType("application/json").body(TestService.PRODUCT).put("/v1/products/-bad").then()
                .statusCode(422);
        assertEquals(List.of(), service.products.names());
    }

    @Test
    void goldenUnit_isKeptOnceAndNeverReplaced() {
        put(TestService.PRODUCT);
        post("/golden-units", golden("g1", 80, "\"condition\":\"golden\",")).statusCode(201)
                .body("condition", equalTo("golden")).body("samples", equalTo(10));
        post("/golden-units", golden("g1", 80, "\"condition\":\"golden\",")).statusCode(200);
        post("/golden-units", golden("g1", 90, "\"condition\":\"golden\",")).statusCode(409)
                .body("type", equalTo("/problems/golden_unit_conflict"));
        post("/golden-units", golden("b1", 90, "\"condition\":\"known-bad\",\"faultRegion\":\"die\",")).statusCode(201)
                .body("faultRegion", equalTo("die"));
        service.request().get("/v1/products/hb40/golden-units").then().statusCode(200)
                .body("goldenUnits.measurementId", equalTo(List.of("b1", "g1")));
        service.request().get("/v1/products/none/golden-units").then().statusCode(404);
    }

    @Test
    void goldenUnit_mustSayWhatItIs() {
        put(TestService.PRODUCT);
        assertEquals(Map.of("/condition", "missing"), faults(post("/golden-units", golden("g1", 80, ""))));
        assertEquals(Map.of("/condition", "unknown_word", "/heatingPowerWatts", "out_of_range"),
                faults(post("/golden-units", golden("g1", 80, "\"condition\":\"good\",")
                        .replace("Watts\":80.0", "Watts\":0"))));
        assertEquals(Map.of("/faultRegion", "contradiction"), faults(post("/golden-units",
                golden("g1", 80, "\"condition\":\"golden\",\"faultRegion\":\"die\","))));
        assertEquals(Map.of("/faultRegion", "unknown_region"), faults(post("/golden-units",
                golden("g1", 80, "\"condition\":\"known-bad\",\"faultRegion\":\"lid\","))));
        assertEquals(Map.of("/product", "differs"), faults(post("/golden-units",
                golden("g1", 80, "\"condition\":\"golden\",").replace("hb40", "hb41"))));
        assertEquals(List.of(), service.goldenUnits.units("hb40"));
    }

    @Test
    void goldenUnit_asCsv() {
        put(TestService.PRODUCT);
        String csv = "# condition: golden\n# measurementId: g1\n# serial: s1\ntimeSeconds,temperatureCelsius\n"
                + IntStream.rangeClosed(1, 9).mapToObj(i -> i + "," + (100 - i)).collect(Collectors.joining("\n"));
        service.request().contentType("text/csv").body(csv).post("/v1/products/hb40/golden-units").then()
                .statusCode(201).body("serial", equalTo("s1")).body("product", equalTo("hb40"));
    }

    @Test
    void limits_areLearntListedAndReleasedOnce() {
        put(TestService.PRODUCT);
        post("/limits", "{}").statusCode(422).body("errors[0].code", equalTo("too_few_units"));
        post("/golden-units", golden("g1", 80, "\"condition\":\"golden\","));
        post("/limits", "{\"settings\":{\"confidenceLevel\":0.9}}").statusCode(201)
                .header("Location", "/v1/products/hb40/limits/1").body("state", equalTo("draft"))
                .body("decision.confidenceLevel", equalTo(0.9f)).body("decision.content", equalTo(0.99f))
                .body("regions[0].lowerLimit", equalTo(0.8f)).body("regions[0].toJoulesPerKelvin", equalTo(null));
        service.request().post("/v1/products/hb40/limits").then().statusCode(201).body("revision", equalTo(2));
        service.request().get("/v1/products/hb40/limits").then().statusCode(200).body("limits", hasSize(2));
        post("/limits/2/release", "{}").statusCode(422).body("errors[0].pointer", equalTo("/reason"));
        post("/limits/2/release", "{\"reason\":\"line opens\",\"releasedBy\":\"the engineer\"}").statusCode(200)
                .body("state", equalTo("released"));
        post("/limits/2/release", "{\"reason\":\"again\"}").statusCode(409)
                .body("type", equalTo("/problems/not_a_draft"));
        post("/limits/1/release", "{\"reason\":\"back\"}").statusCode(200);
        service.request().get("/v1/products/hb40/limits/2").then().body("state", equalTo("withdrawn"));
        assertEquals(List.of("hb40 2 by the engineer: line opens", "hb40 1 by unnamed: back"),
                service.limits.releases());
    }

    @Test
    void limitRequests_refuseUnknownFields() {
        put(TestService.PRODUCT);
        post("/golden-units", golden("g1", 80, "\"condition\":\"golden\","));
        assertEquals(Map.of("/setings", "unknown_field"), faults(post("/limits", "{\"setings\":{}}")));
        assertEquals(Map.of("/settings/rule", "unknown_word", "/settings/specificRisk", "out_of_range",
                "/settings/risk", "unknown_field"), faults(post("/limits",
                        "{\"settings\":{\"rule\":\"none\",\"specificRisk\":0.7,\"risk\":1}}")));
        assertEquals(List.of(), service.limits.revisions("hb40"));
    }
}

package org.laddergate.http;

import static org.hamcrest.Matchers.containsString;
import static org.hamcrest.Matchers.equalTo;
import static org.hamcrest.Matchers.hasItem;
import static org.hamcrest.Matchers.hasSize;
import static org.hamcrest.Matchers.not;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import io.restassured.response.ValidatableResponse;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.zip.GZIPOutputStream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

@Tag("http")
class JudgingHttpTest {
    private TestService service;

    @BeforeEach
    void start() {
        service = TestService.ready();
    }

    @AfterEach
    void stop() {
        service.close();
    }

    private ValidatableResponse post(String body) {
        return service.request().contentType("application/json").body(body).post("/v1/transients").then();
    }

    static byte[] gzip(String text) throws IOException {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        try (GZIPOutputStream gzip = new GZIPOutputStream(out)) {
            gzip.write(text.getBytes(StandardCharsets.UTF_8));
        }
        return out.toByteArray();
    }

    @Test
    void failingPart_isAnsweredWithTheWholeVerdict() throws IOException {
        String body = post(TestService.curve("m1", 160)).statusCode(200).contentType("application/json").extract()
                .asString();
        String expected = """
                {"measurementId":"m1","product":"hb40","serial":"24A7-0193","lot":"L2411","station":"eol3",
                 "measuredAt":"2026-12-01T08:15:30.123+01:00",
                 "limits":{"revision":1,
                  "sha256":"0000000000000000000000000000000000000000000000000000000000000001"},
                 "verdict":"fail","disposition":"reject","failingRegion":"stack","otherSuspects":[],"confidence":0.99,
                 "regions":[{"region":"stack","role":"part","assessed":true,"resistanceKelvinPerWatt":2.0,
                  "uncertaintyKelvinPerWatt":0.02,"lowerLimit":0.8,"upperLimit":1.2,"probabilityConforming":0.01,
                  "faultProbability":0.99}],
                 "envelope":{"inside":false,"firstExitJoulesPerKelvin":null},"inFamily":{"statistic":null,"limit":null},
                 "reasons":[],"attempt":1,"algorithmVersion":"total-resistance-1","storedAt":"2026-12-01T08:00:00Z"}
                """;
        assertEquals(Json.MAPPER.readTree(expected), Json.MAPPER.readTree(body));
    }

    @Test
    void passAndInvalid_nameNoFailingRegion() {
        post(TestService.curve("m1", 80)).statusCode(200).body("verdict", equalTo("pass"))
                .body("disposition", equalTo("accept")).body("$", not(org.hamcrest.Matchers.hasKey("failingRegion")));
        post(TestService.curve("m2", 0)).statusCode(200).body("verdict", equalTo("invalid"))
                .body("confidence", equalTo(null)).body("reasons.code", equalTo(List.of("no_heating_seen")))
                .body("reasons[0].bound", equalTo(null)).body("attempt", equalTo(2));
    }

    @Test
    void sameContentAgain_isTheStoredAnswerHoweverItIsWritten() throws IOException {
        String first = post(TestService.curve("m1", 80)).statusCode(200).extract().asString();
        assertEquals(first, post(TestService.curve("m1", 80)).statusCode(200).extract().asString());
        assertEquals(first, post(TestService.curve("m1", 80).replace(",", " ,\n ")).statusCode(200).extract()
                .asString());
        String zipped = service.request().contentType("application/json").header("Content-Encoding", "gzip")
                .body(gzip(TestService.curve("m1", 80))).post("/v1/transients").then().statusCode(200).extract()
                .asString();
        assertEquals(first, zipped);
        assertEquals(1, service.ledger.size());
    }

    @Test
    void sameIdOtherContent_isAConflict() {
        post(TestService.curve("m1", 80)).statusCode(200);
        post(TestService.curve("m1", 81)).statusCode(409).contentType("application/problem+json")
                .body("type", equalTo("/problems/measurement_conflict"))
                .body("errors[0].pointer", equalTo("/measurementId"));
        assertEquals(1, service.ledger.size());
    }

    @Test
    void csv_isTheSameMeasurementAsJson() {
        StringBuilder csv = new StringBuilder("# serial: 24A7-0193\r\n# lot: L2411\r\n");
        csv.append("timeSeconds,temperatureCelsius\r\n");
        StringBuilder times = new StringBuilder();
        StringBuilder values = new StringBuilder();
        for (int i = 1; i <= 10; i++) {
            csv.append(i).append(',').append(100 - 8 * i).append("\r\n");
            times.append(i > 1 ? "," : "").append(i);
            values.append(i > 1 ? "," : "").append(100 - 8 * i);
        }
        String json = "{\"measurementId\":\"c1\",\"product\":\"hb40\",\"serial\":\"24A7-0193\",\"lot\":\"L2411\","
                + "\"timeSeconds\":[" + times + "],\"temperatureCelsius\":[" + values + "]}";
        String first = service.request().contentType("text/csv; charset=utf-8").body(csv.toString())
                .queryParam("measurementId", "c1").queryParam("product", "hb40").post("/v1/transients").then()
                .statusCode(200).body("verdict", equalTo("pass")).extract().asString();
        assertEquals(first, post(json).statusCode(200).extract().asString());
        service.request().contentType("text/csv").body(csv.toString()).queryParam("measurementId", "c2")
                .queryParam("product", "hb40").queryParam("serial", "other").queryParam("heatingPowerWatts", "0x50")
                .queryParam("colour", "red").post("/v1/transients").then().statusCode(422)
                .body("errors.pointer", equalTo(List.of("/serial", "/heatingPowerWatts")));
    }

    @Test
    void voltages_needASensorAndTakeThePartsOwn() {
        String volts = TestService.curve("v1", 80).replaceAll("\"temperatureCelsius\":\\[.*]",
                "\"voltageVolts\":[0.5,0.52,0.54,0.56,0.58,0.60,0.62,0.64,0.66,0.70]");
        post(volts).statusCode(422).body("errors[0].code", equalTo("no_sensor"));
        post(volts.replace("\"lot\"", "\"sensor\":{\"kFactorKelvinPerVolt\":-400,\"celsiusAtZeroVolts\":300},\"lot\""))
                .statusCode(200).body("verdict", equalTo("pass"));
        post(volts.replace("v1", "v2").replace("\"lot\"", "\"sensor\":{\"polynomialCelsius\":[300,-400,0]},\"lot\""))
                .statusCode(200).body("verdict", equalTo("pass"));
        post(volts.replace("v1", "v3").replace("\"lot\"", "\"sensor\":{\"kFactorKelvinPerVolt\":0},\"lot\""))
                .statusCode(422).body("errors.pointer", hasItem("/sensor/celsiusAtZeroVolts"));
    }

    @Test
    void unknownFields_areIgnoredWithAWarning() {
        post(TestService.curve("m1", 80).replace("\"lot\"", "\"colour\":{\"a\":[1,2]},\"operator\":\"x\",\"lot\""))
                .statusCode(200).body("warnings", equalTo(List.of("field 'colour' is unknown and was ignored",
                        "field 'operator' is unknown and was ignored")));
    }

    @Test
    void structureFunction_isIncludedOnRequest() {
        service.request().contentType("application/json").body(TestService.curve("m1", 80))
                .queryParam("include", "structure-function").post("/v1/transients").then().statusCode(200)
                .body("structureFunction.resistanceKelvinPerWatt", equalTo(List.of(0.5f, 1.0f)));
        service.request().queryParam("include", "structure-function").get("/v1/transients/m1").then().statusCode(200)
                .body("structureFunction.capacitanceJoulesPerKelvin", equalTo(List.of(0.1f, 10.0f)));
        service.request().queryParam("include", "everything").get("/v1/transients/m1").then().statusCode(422)
                .body("errors[0].pointer", equalTo("include"));
    }

    @Test
    void storedVerdict_isReadBackWithItsCurves() {
        String posted = post(TestService.curve("m1", 80)).extract().asString();
        assertEquals(posted, service.request().get("/v1/transients/m1").then().statusCode(200).extract().asString());
        service.request().get("/v1/transients/m1/curve").then().statusCode(200).body("timeSeconds", hasSize(7))
                .body("samples", equalTo(List.of(1, 1, 1, 1, 1, 1, 1)));
        service.request().header("Accept", "text/csv").get("/v1/transients/m1/curve").then().statusCode(200)
                .contentType(containsString("text/csv"))
                .body(containsString("timeSeconds,temperatureCelsius,samples\r\n1.0E-5,105.0,1\r\n"));
        service.request().header("Accept", "application/json;q=0.5, text/csv").get(
                "/v1/transients/m1/structure-function").then().statusCode(200)
                .body(equalTo("resistanceKelvinPerWatt,capacitanceJoulesPerKelvin\r\n0.5,0.1\r\n1.0,10.0\r\n"));
        service.request().header("Accept", "application/json, text/csv;q=0.5").get(
                "/v1/transients/m1/structure-function").then().statusCode(200)
                .body("resistanceKelvinPerWatt", hasSize(2));
        service.request().get("/v1/transients/m2").then().statusCode(404)
                .body("type", equalTo("/problems/unknown_measurement"));
    }

    @Test
    void idWithSlashesAndOtherLetters_canBeAddressed() {
        post(TestService.curve("line 1/\u00E4%2F;x", 80)).statusCode(200);
        service.request().get("/v1/transients/{id}", "line 1/\u00E4%2F;x").then().statusCode(200)
                .body("measurementId", equalTo("line 1/\u00E4%2F;x"));
    }

    @Test
    void batch_answersEveryLineInOrder() throws IOException {
        String lines = TestService.curve("b1", 80) + "\n" + "{\"measurementId\":\"b2\",\"timeSeconds\":[1,\n\n"
                + TestService.curve("b3", 160) + "\r\n" + TestService.curve("b4", 80).replace("hb40", "hb41") + "\n"
                + TestService.curve("b1", 99) + "\n" + TestService.curve("b5", 0);
        List<String> answers = service.request().contentType("application/x-ndjson")
                .body(lines.getBytes(StandardCharsets.UTF_8))
                .post("/v1/transients/batch").then().statusCode(200).contentType("application/x-ndjson").extract()
                .asString().lines().toList();
        assertEquals(6, answers.size());
        JsonNode[] a = new JsonNode[6];
        for (int i = 0; i < 6; i++) {
            a[i] = Json.MAPPER.readTree(answers.get(i));
        }
        assertEquals("pass", a[0].path("verdict").asText());
        assertEquals(400, a[1].path("status").asInt());
        assertEquals(2, a[1].path("line").asInt());
        assertEquals("fail", a[2].path("verdict").asText());
        assertEquals("/problems/unknown_product", a[3].path("type").asText());
        assertEquals("b4", a[3].path("measurementId").asText());
        assertEquals("/problems/measurement_conflict", a[4].path("type").asText());
        assertEquals(6, a[4].path("line").asInt());
        assertEquals("invalid", a[5].path("verdict").asText());
        assertEquals(3, service.ledger.size());
    }

    @Test
    void batch_inGzipOfManyLines_isAnsweredCompletely() throws IOException {
        StringBuilder lines = new StringBuilder();
        for (int i = 0; i < 500; i++) {
            lines.append(TestService.curve("n" + i, 80)).append('\n');
        }
        List<String> answers = service.request().contentType("application/x-ndjson")
                .header("Content-Encoding", "gzip").body(gzip(lines.toString())).post("/v1/transients/batch").then()
                .statusCode(200).extract().asString().lines().toList();
        assertEquals(500, answers.size());
        for (int i = 0; i < 500; i++) {
            assertEquals("n" + i, Json.MAPPER.readTree(answers.get(i)).path("measurementId").asText());
        }
        assertEquals(500, service.ledger.size());
    }

    @Test
    void batch_lineOverTheLimit_spoilsNoOther() throws IOException {
        String huge = "{\"measurementId\":\"" + "x".repeat(TestService.BODY_LIMIT) + "\"}";
        List<String> answers = service.request().contentType("application/x-ndjson")
                .body((huge + "\n" + TestService.curve("b1", 80)).getBytes(StandardCharsets.UTF_8))
                .post("/v1/transients/batch").then().statusCode(200)
                .extract().asString().lines().toList();
        assertEquals(413, Json.MAPPER.readTree(answers.get(0)).path("status").asInt());
        assertEquals("pass", Json.MAPPER.readTree(answers.get(1)).path("verdict").asText());
    }

    @Test
    void ledgerThatCannotStore_givesNoVerdict() {
        service.ledger.breakDown("the disk is full");
        post(TestService.curve("m1", 80)).statusCode(503).header("Retry-After", "2")
                .body("type", equalTo("/problems/storage_unavailable"));
        service.request().get("/readyz").then().statusCode(503).body("reasons", equalTo(List.of("the disk is full")));
        service.request().get("/livez").then().statusCode(200);
        service.ledger.breakDown("");
        post(TestService.curve("m1", 80)).statusCode(200).body("verdict", equalTo("pass"));
        service.request().get("/readyz").then().statusCode(200).body("ready", equalTo(true));
    }

    @Test
    void metrics_countVerdictsAndTimeRoutes() {
        post(TestService.curve("m1", 80));
        post(TestService.curve("m2", 160));
        service.request().get("/v1/transients/nobody");
        service.request().get("/no/such/place");
        String scrape = service.request().get("/metrics").then().statusCode(200).extract().asString();
        assertTrue(scrape.contains("laddergate_verdicts_total{product=\"hb40\",region=\"stack\",verdict=\"fail\"} 1.0"),
                scrape);
        assertTrue(scrape.contains("http_server_requests_seconds_count{method=\"POST\",status=\"200\","
                + "uri=\"/v1/transients\"} 2"), scrape);
        assertTrue(scrape.contains("status=\"404\",uri=\"/v1/transients/{measurementId}\""), scrape);
        assertTrue(scrape.contains("status=\"404\",uri=\"unmatched\""), scrape);
        assertTrue(!scrape.contains("nobody") && !scrape.contains("24A7"), scrape);
    }
}

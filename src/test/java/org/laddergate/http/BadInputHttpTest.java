package org.laddergate.http;

import static org.hamcrest.Matchers.containsString;
import static org.hamcrest.Matchers.equalTo;
import static org.hamcrest.Matchers.not;
import static org.hamcrest.Matchers.startsWith;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.restassured.response.ValidatableResponse;
import io.restassured.specification.RequestSpecification;
import java.io.IOException;
import java.net.Socket;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Whatever is sent: the answer names field and reason, nothing is stored, and the service goes on. */
@Tag("http")
class BadInputHttpTest {
    private static TestService service;
    private static final String GOOD = TestService.curve("bad", 80);
    private static final String FIRST_TIME = "1.000000000e-05";
    private static final String FIRST_VALUE = "105.000000";

    @BeforeAll
    static void start() {
        service = TestService.ready();
    }

    @AfterAll
    static void stop() {
        service.close();
    }

    /** Nothing was stored, and a good curve is still judged. */
    @AfterEach
    void nothingStoredAndStillServing() {
        int before = service.ledger.size();
        assertTrue(service.ledger.find("bad").isEmpty());
        service.request().contentType("application/json").body(TestService.curve("good" + before, 80))
                .post("/v1/transients").then().statusCode(200);
        assertEquals(before + 1, service.ledger.size());
    }

    private static RequestSpecification json() {
        return service.request().contentType("application/json");
    }

    private static ValidatableResponse post(String body) {
        return problem(json().body(body).post("/v1/transients").then());
    }

    private static ValidatableResponse problem(ValidatableResponse response) {
        String body = response.extract().asString();
        assertTrue(!body.contains("Exception") && !body.contains("\tat ") && !body.contains("org.laddergate"), body);
        int status = response.extract().statusCode();
        return response.contentType("application/problem+json").body("type", startsWith("/problems/"))
                .body("title", not(equalTo(""))).body("status", equalTo(status)).body("detail", not(equalTo("")))
                .body("instance", startsWith("/requests/"));
    }

    private static void assertInvalid(String body, String pointer, String code, String inDetail) {
        post(body).statusCode(422).body("type", equalTo("/problems/invalid_input"))
                .body("errors[0].pointer", equalTo(pointer)).body("errors[0].code", equalTo(code))
                .body("errors[0].detail", containsString(inDetail));
    }

    @ParameterizedTest
    @CsvSource({"NaN", "Infinity", "-Infinity", "1e999", "-1e999"})
    void notFiniteSample_isNamed(String number) {
        assertInvalid(GOOD.replace("78.333333", number), "/temperatureCelsius/3", "not_finite",
                "temperatureCelsius[3]");
        assertInvalid(GOOD.replace("4.641588834e-04", number), "/timeSeconds/3", "not_finite", "timeSeconds[3]");
    }

    @ParameterizedTest
    @CsvSource(value = {"'\"78.3\"' | text '78.3'", "null | null", "true | true", "[78.3] | an array",
        "{\"a\":1} | an object"}, delimiter = '|')
    void sampleThatIsNoNumber_isNamed(String sample, String described) {
        assertInvalid(GOOD.replace("78.333333", sample), "/temperatureCelsius/3", "not_a_number", described);
    }

    @Test
    void unequalLengths_areNamed() {
        assertInvalid(GOOD.replace(FIRST_VALUE + ",", ""), "/temperatureCelsius", "length_differs",
                "9 samples and timeSeconds has 10");
    }

    @Test
    void missingAndEmptyArrays_areNamed() {
        String empty = "{\"measurementId\":\"bad\",\"product\":\"hb40\",\"serial\":\"s\",\"timeSeconds\":[],"
                + "\"temperatureCelsius\":[]}";
        assertInvalid(empty, "/timeSeconds", "empty", "no samples");
        post("{}").statusCode(422).body("errors.pointer", equalTo(List.of("/measurementId", "/product", "/serial",
                "/timeSeconds", "/temperatureCelsius")));
        assertInvalid(GOOD.replaceAll("\"timeSeconds\":\\[[^]]*]", "\"timeSeconds\":7"), "/timeSeconds", "wrong_type",
                "array of numbers");
    }

    @Test
    void timesThatDoNotIncrease_areNamed() {
        assertInvalid(GOOD.replace("3.593813664e-05", FIRST_TIME), "/timeSeconds/1", "not_increasing",
                "1.0E-5 after 1.0E-5");
        assertInvalid(GOOD.replace(FIRST_TIME, "0"), "/timeSeconds/0", "not_positive", "0.0");
    }

    @Test
    void absurdValues_areNamed() {
        assertInvalid(GOOD.replace("Watts\":80.0", "Watts\":-80.0"), "/heatingPowerWatts", "out_of_range", "-80.0");
        assertInvalid(GOOD.replace("Watts\":80.0", "Watts\":\"80\""), "/heatingPowerWatts", "wrong_type", "'80'");
        assertInvalid(GOOD.replace("Watts\":80.0", "Watts\":1e999"), "/heatingPowerWatts", "out_of_range", "NaN");
        assertInvalid(GOOD.replace("Seconds\":4.0", "Seconds\":0"), "/heatingSeconds", "out_of_range", "0.0");
        assertInvalid(GOOD.replace(FIRST_VALUE, "-300"), "/temperatureCelsius/0", "out_of_range", "-300.0");
        assertInvalid(GOOD.replace(FIRST_VALUE, "1e5"), "/temperatureCelsius/0", "out_of_range", "100000.0");
        assertInvalid(GOOD.replace("1.000000000e+00", "1e6"), "/timeSeconds/9", "out_of_range", "1000000.0");
        assertInvalid(GOOD.replace("2026-12-01T08:15", "2027-12-01T08:15"), "/measuredAt", "in_the_future", "2027");
        assertInvalid(GOOD.replace("24A7-0193", "x".repeat(129)), "/serial", "too_long", "129");
        assertInvalid(GOOD.replace("24A7-0193", "a\\u0000b"), "/serial", "bad_character", "U+0000");
        assertInvalid(GOOD.replace("\"24A7-0193\"", "17"), "/serial", "wrong_type", "a text, not 17");
        assertInvalid(GOOD.replace("\"temperatureCelsius\"", "\"voltageVolts\":[1],\"temperatureCelsius\""),
                "/temperatureCelsius", "both_given", "either");
    }

    @Test
    void everyFault_isListedOnce() {
        post(GOOD.replace("Watts\":80.0", "Watts\":-1").replace("\"24A7-0193\"", "[1]").replace("78.333333", "null"))
                .statusCode(422).body("errors.pointer", equalTo(List.of("/serial", "/temperatureCelsius/3",
                        "/heatingPowerWatts")));
    }

    @Test
    void unknownProductAndMissingLimits_areToldApart() {
        post(GOOD.replace("hb40", "hb41")).statusCode(404).body("type", equalTo("/problems/unknown_product"))
                .body("errors[0].pointer", equalTo("/product")).body("detail", containsString("hb41"));
        json().body(TestService.PRODUCT).put("/v1/products/fresh").then().statusCode(201);
        post(GOOD.replace("hb40", "fresh")).statusCode(409).body("type", equalTo("/problems/no_released_limits"));
    }

    @Test
    void curveOfTheOtherKind_isRefused() {
        assertInvalid(GOOD.replace("\"cooling\"", "\"heating\""), "/curve", "other_curve", "other kind");
    }

    @Test
    void fieldGivenTwice_isRefusedAnywhere() {
        post(GOOD.replace("\"serial\"", "\"serial\":\"a\",\"serial\"")).statusCode(400)
                .body("type", equalTo("/problems/malformed_json")).body("errors[0].code", equalTo("duplicate_field"))
                .body("errors[0].detail", containsString("serial"));
        post(GOOD.replace("\"lot\"", "\"x\":{\"y\":1,\"y\":2},\"lot\"")).statusCode(400)
                .body("errors[0].code", equalTo("duplicate_field"));
        problem(json().body(TestService.PRODUCT.replace("\"recipe\"", "\"recipe\":{},\"recipe\""))
                .put("/v1/products/hb40").then()).statusCode(400);
    }

    @Test
    void brokenJson_isPlaced() {
        post("{\n\"serial\": tru}").statusCode(400).body("detail", startsWith("line 2, column "));
        post("").statusCode(400);
        post("[]").statusCode(422).body("errors[0].code", equalTo("not_an_object"));
        post(GOOD + "x").statusCode(400);
        post(GOOD + "{}").statusCode(400).body("detail", containsString("follows"));
        post(GOOD.substring(0, GOOD.length() - 40)).statusCode(400);
    }

    @Test
    void deepNesting_isRefused() {
        String deep = "[".repeat(100_000) + "]".repeat(100_000);
        post(GOOD.replace("\"lot\"", "\"x\":" + deep + ",\"lot\"")).statusCode(400)
                .body("type", equalTo("/problems/malformed_json"));
        post(GOOD.replace("78.333333", deep)).statusCode(400);
        problem(json().body(deep).put("/v1/products/hb40").then()).statusCode(400);
    }

    @Test
    void bytesThatAreNoText_areRefused() {
        byte[] body = GOOD.getBytes(StandardCharsets.UTF_8);
        body[30] = (byte) 0xFF;
        problem(json().body(body).post("/v1/transients").then()).statusCode(400);
        problem(json().body(new byte[1000]).post("/v1/transients").then()).statusCode(400);
    }

    @Test
    void otherContentTypes_areRefused() {
        problem(service.request().contentType("text/plain").body(GOOD).post("/v1/transients").then()).statusCode(415)
                .body("detail", containsString("text/plain")).body("detail", containsString("application/json"));
        problem(service.request().body(GOOD.getBytes(StandardCharsets.UTF_8)).contentType("").post("/v1/transients")
                .then()).statusCode(415);
        problem(json().header("Content-Encoding", "br").body(GOOD).post("/v1/transients").then()).statusCode(415)
                .body("type", equalTo("/problems/unsupported_content_encoding"));
        problem(json().body(GOOD).post("/v1/transients/batch").then()).statusCode(415);
    }

    @Test
    void gzipThatIsCutOffOrIsNone_isRefused() throws IOException {
        byte[] whole = JudgingHttpTest.gzip(GOOD);
        for (byte[] body : List.of(Arrays.copyOf(whole, whole.length / 2), Arrays.copyOf(whole, 5),
                GOOD.getBytes(StandardCharsets.UTF_8), new byte[0])) {
            problem(json().header("Content-Encoding", "gzip").body(body).post("/v1/transients").then())
                    .statusCode(400).body("type", equalTo("/problems/malformed_body"));
        }
    }

    @Test
    void bodyOverTheLimit_isRefusedPlainAndInflated() throws IOException {
        String huge = GOOD.replace("\"lot\"", "\"x\":\"" + " ".repeat(TestService.BODY_LIMIT) + "\",\"lot\"");
        post(huge).statusCode(413).body("detail", containsString("4000000"));
        byte[] bomb = JudgingHttpTest.gzip(huge);
        assertTrue(bomb.length < 10_000);
        problem(json().header("Content-Encoding", "gzip").body(bomb).post("/v1/transients").then()).statusCode(413);
    }

    @Test
    void hundredThousandSamples_areAccepted() {
        json().body(TestService.curve("long" + service.ledger.size(), 80, 100_000)).post("/v1/transients").then()
                .statusCode(200).body("verdict", equalTo("pass"));
        post(TestService.curve("bad", 80, 200_001).replaceAll("(\\d\\.\\d)\\d{5}", "$1")).statusCode(422)
                .body("errors.code", org.hamcrest.Matchers.hasItem("too_many_samples"));
    }

    @Test
    void wrongAddressesAndMethods_areProblemsToo() {
        problem(service.request().get("/nothing").then()).statusCode(404);
        problem(service.request().get("/v1/products/none").then()).statusCode(404);
        problem(service.request().get("/v1/products/hb40/limits/99").then()).statusCode(404);
        problem(service.request().get("/v1/products/hb40/limits/first").then()).statusCode(404)
                .body("type", equalTo("/problems/unknown_revision"));
        problem(service.request().delete("/v1/products/hb40").then()).statusCode(405).header("Allow", "GET, PUT");
        problem(service.request().patch("/v1/transients").then()).statusCode(405).header("Allow", "POST");
        problem(service.request().get("/problems/none").then()).statusCode(404);
    }

    @Test
    void brokenHttp_isAProblemToo() throws IOException {
        assertTrue(raw("GET /%zz HTTP/1.1\r\nHost: x\r\n\r\n").contains("application/problem+json"));
        assertTrue(raw("GET / HTTP/1.1\r\nHost: x\r\nA: " + "a".repeat(20_000) + "\r\n\r\n").contains("431"));
        assertTrue(raw("nonsense\r\n\r\n").contains("400"));
    }

    private static String raw(String request) throws IOException {
        try (Socket socket = new Socket("127.0.0.1", service.http.port())) {
            socket.setSoTimeout(10_000);
            socket.getOutputStream().write(request.getBytes(StandardCharsets.ISO_8859_1));
            socket.shutdownOutput();
            return new String(socket.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        }
    }

    @Test
    void requestId_isTheCallersTraceIfThereIsOne() {
        problem(service.request().header("traceparent", "00-4bf92f3577b34da6a3ce929d0e0e4736-00f067aa0ba902b7-01")
                .get("/nothing").then()).body("instance", equalTo("/requests/4bf92f3577b34da6a3ce929d0e0e4736"));
        problem(service.request().header("traceparent", "broken").header("X-Request-Id", "abc-1").get("/nothing")
                .then()).body("instance", equalTo("/requests/abc-1"));
    }
}

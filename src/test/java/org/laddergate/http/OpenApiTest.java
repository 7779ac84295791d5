package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.node.JsonNodeFactory;
import com.fasterxml.jackson.databind.node.ObjectNode;
import com.networknt.schema.Error;
import com.networknt.schema.Schema;
import com.networknt.schema.SchemaLocation;
import com.networknt.schema.SchemaRegistry;
import com.networknt.schema.SpecificationVersion;
import io.restassured.response.Response;
import io.restassured.specification.RequestSpecification;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** The served document against real traffic: every documented response of every route is provoked and checked. */
@Tag("http")
class OpenApiTest {
    private static final String BASE = "https://openapi.test/document";
    private static final String JSON = "application/json";

    private final String text = document();
    private final SchemaRegistry schemas = SchemaRegistry.withDefaultDialect(SpecificationVersion.DRAFT_2020_12,
            builder -> builder.schemas(Map.of(BASE, text)));
    private final JsonNode document = parsed(text);
    private final Set<String> seen = new TreeSet<>();

    private static String document() {
        try (var in = OpenApiTest.class.getResourceAsStream("/openapi/openapi.json")) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new AssertionError(e);
        }
    }

    private static JsonNode parsed(String json) {
        try {
            return Json.MAPPER.readTree(json);
        } catch (IOException e) {
            throw new AssertionError(json, e);
        }
    }

    private Schema schema(String pointer) {
        return schemas.getSchema(SchemaLocation.of(BASE + "#" + pointer));
    }

    private static String escaped(String token) {
        return token.replace("~", "~0").replace("/", "~1");
    }

    /** Performs a request and checks its answer against what is documented for it. */
    private Response check(RequestSpecification request, String method, String path, String address, int status) {
        Response response = request.request(method, address);
        String what = method + " " + address + ": " + response.statusCode() + " " + response.asString();
        assertEquals(status, response.statusCode(), what);
        String responses = "/paths/" + escaped(path) + "/" + method.toLowerCase() + "/responses/";
        String key = document.at(responses + status).isMissingNode() ? "default" : Integer.toString(status);
        JsonNode documented = document.at(responses + key);
        assertFalse(documented.isMissingNode(), what + " is not documented");
        String at = documented.has("$ref") ? documented.path("$ref").asText().substring(1) : responses + key;
        String type = response.contentType().split(";")[0];
        String schema = at + "/content/" + escaped(type) + "/schema";
        assertFalse(document.at(schema).isMissingNode(), what + ": " + type + " is not documented");
        for (JsonNode body : bodies(response, type)) {
            List<Error> errors = schema(schema).validate(body);
            assertEquals(List.of(), errors, what);
        }
        seen.add(method + " " + path + " " + key + " " + type);
        return response;
    }

    private static List<JsonNode> bodies(Response response, String type) {
        if (type.startsWith("text/")) {
            return List.of(JsonNodeFactory.instance.textNode(response.asString()));
        }
        return type.equals(Bodies.NDJSON) ? response.asString().lines().map(OpenApiTest::parsed).toList()
                : List.of(parsed(response.asString()));
    }

    private Set<String> documented() {
        Set<String> all = new TreeSet<>();
        document.path("paths").fields().forEachRemaining(path -> path.getValue().fields().forEachRemaining(method -> {
            if (!method.getKey().equals("parameters")) {
                method.getValue().path("responses").fields().forEachRemaining(response -> {
                    JsonNode content = response.getValue().has("$ref")
                            ? document.at(response.getValue().path("$ref").asText().substring(1) + "/content")
                            : response.getValue().path("content");
                    content.fieldNames().forEachRemaining(type -> all.add(method.getKey().toUpperCase() + " "
                            + path.getKey() + " " + response.getKey() + " " + type));
                });
            }
        }));
        return all;
    }

    @Test
    void everyRoute_isDocumentedAndNothingElse() {
        Set<String> documented = new TreeSet<>();
        documented().forEach(line -> documented.add(line.substring(0, line.indexOf(' ', line.indexOf(' ') + 1))));
        Set<String> served = new TreeSet<>();
        try (TestService service = TestService.open()) {
            service.http.table().forEach(route -> served.add(route.method().name() + " " + route.path()));
            assertEquals(document, parsed(service.request().get("/openapi.json").asString()));
        }
        assertEquals(served, documented);
    }

    @Test
    @Tag("docs")
    void everyRoute_isInTheManual() throws IOException {
        String manual = Files.readString(Path.of("docs/http-api.md"));
        try (TestService service = TestService.open()) {
            for (Route route : service.http.table()) {
                assertTrue(manual.contains("`" + route.method().name() + " " + route.path() + "`"), route.path());
            }
        }
    }

    @Test
    void everyDocumentedResponse_isGivenAsDocumented() {
        try (TestService service = TestService.ready()) {
            definitions(service);
            limits(service);
            transients(service);
            health(service);
        }
        try (TestService service = new TestService(Tokens.parse(List.of(
                Tokens.line(Tokens.Role.MES, "mes", "mes-token"))))) {
            documented().stream().filter(line -> line.contains(" default ")).forEach(line -> {
                String[] words = line.split(" ");
                String address = words[1].replace("{product}", "p").replace("{revision}", "1")
                        .replace("{measurementId}", "m");
                check(service.request(), words[0], words[1], address, 401);
            });
        }
        assertEquals(documented(), seen);
    }

    private static RequestSpecification json(TestService service, String body) {
        return service.request().contentType(JSON).body(body);
    }

    private void definitions(TestService service) {
        String one = "/v1/products/{product}";
        check(service.request(), "GET", "/v1/products", "/v1/products", 200);
        check(json(service, TestService.PRODUCT), "PUT", one, "/v1/products/hb40", 200);
        check(json(service, TestService.PRODUCT), "PUT", one, "/v1/products/new", 201);
        check(json(service, "{}"), "PUT", one, "/v1/products/new", 422);
        check(json(service, "{\"recipe\":{\"curve\":\"heating\",\"heatingPowerWatts\":5,\"recordSeconds\":10,"
                + "\"cutSeconds\":1e-5,\"maximumNoiseKelvin\":0.1,\"sensor\":{\"polynomialCelsius\":[1,2,3]}},"
                + "\"regions\":[{\"name\":\"a\",\"fromJoulesPerKelvin\":0,\"toJoulesPerKelvin\":1}]}"), "PUT", one,
                "/v1/products/regions", 201);
        check(service.request(), "GET", one, "/v1/products/hb40", 200);
        check(service.request(), "GET", one, "/v1/products/none", 404);
        String units = one + "/golden-units";
        String golden = TestService.curve("g2", 80).replace("{\"m", "{\"condition\":\"golden\",\"m");
        check(json(service, golden), "POST", units, "/v1/products/hb40/golden-units", 201);
        check(json(service, golden), "POST", units, "/v1/products/hb40/golden-units", 200);
        check(json(service, golden.replace("105.0", "104.0")), "POST", units, "/v1/products/hb40/golden-units", 409);
        check(json(service, "{}"), "POST", units, "/v1/products/hb40/golden-units", 422);
        check(json(service, golden), "POST", units, "/v1/products/none/golden-units", 404);
        check(service.request(), "GET", units, "/v1/products/hb40/golden-units", 200);
        check(service.request(), "GET", units, "/v1/products/none/golden-units", 404);
    }

    private void limits(TestService service) {
        String path = "/v1/products/{product}/limits";
        check(service.request(), "POST", path, "/v1/products/hb40/limits", 201);
        check(service.request(), "POST", path, "/v1/products/none/limits", 404);
        check(service.request(), "POST", path, "/v1/products/new/limits", 422);
        check(service.request(), "GET", path, "/v1/products/hb40/limits", 200);
        check(service.request(), "GET", path, "/v1/products/none/limits", 404);
        String one = path + "/{revision}";
        check(service.request(), "GET", one, "/v1/products/hb40/limits/2", 200);
        check(service.request(), "GET", one, "/v1/products/hb40/limits/9", 404);
        String release = one + "/release";
        check(json(service, "{}"), "POST", release, "/v1/products/hb40/limits/2/release", 422);
        check(json(service, "{\"reason\":\"r\"}"), "POST", release, "/v1/products/hb40/limits/2/release", 200);
        check(json(service, "{\"reason\":\"r\"}"), "POST", release, "/v1/products/hb40/limits/2/release", 409);
        check(json(service, "{\"reason\":\"r\"}"), "POST", release, "/v1/products/hb40/limits/9/release", 404);
    }

    private void transients(TestService service) {
        String path = "/v1/transients";
        for (String body : List.of(TestService.curve("m1", 80), TestService.curve("m2", 160),
                TestService.curve("m3", 0), TestService.curve("m4", 80).replace("\"lot\"", "\"colour\":1,\"lot\""))) {
            check(json(service, body), "POST", path, path + "?include=structure-function", 200);
        }
        check(json(service, "{"), "POST", path, path, 400);
        check(json(service, TestService.curve("m5", 80).replace("hb40", "none")), "POST", path, path, 404);
        check(json(service, TestService.curve("m1", 90)), "POST", path, path, 409);
        check(json(service, " ".repeat(TestService.BODY_LIMIT + 1)), "POST", path, path, 413);
        check(service.request().contentType("text/plain").body("x"), "POST", path, path, 415);
        check(json(service, "{}"), "POST", path, path, 422);
        service.ledger.breakDown("disk full");
        check(json(service, TestService.curve("m6", 80)), "POST", path, path, 503);
        service.ledger.breakDown("");
        String batch = path + "/batch";
        check(service.request().contentType(Bodies.NDJSON).body((TestService.curve("b1", 80) + "\n{\n"
                + TestService.curve("b2", 160).replace("\"timeSeconds\":[", "\"timeSeconds\":[null,") + "\n")
                .getBytes(StandardCharsets.UTF_8)), "POST", batch, batch, 200);
        check(json(service, "{}"), "POST", batch, batch, 415);
        String one = path + "/{measurementId}";
        check(service.request(), "GET", one, path + "/m1", 200);
        check(service.request(), "GET", one, path + "/none", 404);
        check(service.request(), "GET", one, path + "/m1?include=all", 422);
        for (String part : List.of("/curve", "/structure-function")) {
            check(service.request(), "GET", one + part, path + "/m1" + part, 200);
            check(service.request().header("Accept", "text/csv"), "GET", one + part, path + "/m1" + part, 200);
            check(service.request(), "GET", one + part, path + "/none" + part, 404);
        }
    }

    private void health(TestService service) {
        check(service.request(), "GET", "/livez", "/livez", 200);
        check(service.request(), "GET", "/readyz", "/readyz", 200);
        service.ledger.breakDown("disk full");
        check(service.request(), "GET", "/readyz", "/readyz", 503);
        check(service.request(), "GET", "/metrics", "/metrics", 200);
        check(service.request(), "GET", "/openapi.json", "/openapi.json", 200);
        check(service.request(), "GET", "/problems/{code}", "/problems/overloaded", 200);
        check(service.request(), "GET", "/problems/{code}", "/problems/none", 404);
    }

    /** Guards the check itself: a validator that accepts everything would pass every test above. */
    @Test
    void schemas_refuseWhatIsNotDocumented() {
        Schema verdict = schema("/components/schemas/Verdict");
        String body;
        try (TestService service = TestService.ready()) {
            body = json(service, TestService.curve("m1", 160)).post("/v1/transients").asString();
        }
        assertEquals(List.of(), verdict.validate(parsed(body)));
        List<String> damaged = new ArrayList<>(List.of(body.replace("\"verdict\":\"fail\"", "\"verdict\":\"failed\""),
                body.replace("\"failingRegion\":\"stack\",", ""), body.replace("\"attempt\":1", "\"attempt\":0"),
                body.replace("\"confidence\":0.99", "\"confidence\":\"0.99\""),
                body.replace("\"upperLimit\":1.2,", ""), body.replace("\"revision\":1", "\"revision\":1.5"),
                body.replace("\"verdict\":\"fail\"", "\"verdict\":\"pass\"")));
        ObjectNode more = (ObjectNode) parsed(body);
        more.put("extra", 1);
        damaged.add(more.toString());
        for (String bad : damaged) {
            assertFalse(verdict.validate(parsed(bad)).isEmpty(), bad);
        }
    }

    /** Requests in the manual's form satisfy the documented request schema too. */
    @Test
    void requests_satisfyTheirSchema() {
        assertEquals(List.of(), schema("/components/schemas/Transient").validate(parsed(TestService.curve("m", 80))));
        assertEquals(List.of(), schema("/components/schemas/Product").validate(parsed(TestService.PRODUCT)));
    }
}

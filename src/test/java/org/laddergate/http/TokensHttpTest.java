package org.laddergate.http;

import static org.hamcrest.Matchers.equalTo;
import static org.hamcrest.Matchers.startsWith;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.restassured.specification.RequestSpecification;
import java.util.List;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

@Tag("http")
class TokensHttpTest {
    private TestService service;

    @BeforeEach
    void start() {
        service = new TestService(Tokens.parse(List.of("# who may call", "",
                Tokens.line(Tokens.Role.TESTER, "eol3", "tester-token"),
                Tokens.line(Tokens.Role.ENGINEER, "process", "engineer-token"),
                Tokens.line(Tokens.Role.MES, "mes", "mes-token"))));
    }

    @AfterEach
    void stop() {
        service.close();
    }

    private RequestSpecification with(String token) {
        return service.request().header("Authorization", "Bearer " + token).contentType("application/json");
    }

    @Test
    void noOrWrongToken_isNotAuthenticated() {
        service.request().get("/v1/products").then().statusCode(401)
                .header("WWW-Authenticate", "Bearer realm=\"laddergate\"")
                .contentType("application/problem+json").body("type", equalTo("/problems/not_authenticated"));
        with("guess").get("/v1/products").then().statusCode(401);
        service.request().header("Authorization", "Basic dGVzdGVyLXRva2Vu").get("/v1/products").then().statusCode(401);
    }

    @Test
    void healthAndDocuments_needNoToken() {
        service.request().get("/livez").then().statusCode(200);
        service.request().get("/readyz").then().statusCode(200);
        service.request().get("/openapi.json").then().statusCode(200);
        service.request().get("/metrics").then().statusCode(401);
        with("mes-token").get("/metrics").then().statusCode(200);
    }

    @Test
    void rolesMayDoWhatTheyShouldAndNoMore() {
        for (String token : List.of("tester-token", "mes-token")) {
            with(token).body(TestService.PRODUCT).put("/v1/products/hb40").then().statusCode(403)
                    .header("WWW-Authenticate", startsWith("Bearer")).body("type", equalTo("/problems/not_allowed"));
            with(token).post("/v1/products/hb40/limits").then().statusCode(403);
        }
        assertEquals(List.of(), service.products.names());
        with("engineer-token").body(TestService.PRODUCT).put("/v1/products/hb40").then().statusCode(201);
        with("engineer-token").body(TestService.curve("g1", 80).replace("{\"m", "{\"condition\":\"golden\",\"m"))
                .post("/v1/products/hb40/golden-units").then().statusCode(201);
        with("engineer-token").post("/v1/products/hb40/limits").then().statusCode(201);
        with("engineer-token").body("{\"reason\":\"r\",\"releasedBy\":\"somebody\"}")
                .post("/v1/products/hb40/limits/1/release").then().statusCode(200);
        assertEquals(List.of("hb40 1 by somebody (token process): r"), service.limits.releases());
        with("mes-token").body(TestService.curve("m1", 80)).post("/v1/transients").then().statusCode(403);
        with("tester-token").body(TestService.curve("m1", 80)).post("/v1/transients").then().statusCode(200);
        with("mes-token").get("/v1/transients/m1").then().statusCode(200);
    }

    @Test
    void tokenFile_isRefusedWithAllItsFaults() {
        String hash = "0".repeat(64);
        IllegalArgumentException e = assertThrows(IllegalArgumentException.class, () -> Tokens.parse(List.of(
                "tester eol3 " + hash, "boss x " + hash, "mes y 12", "engineer")));
        assertTrue(e.getMessage().contains("line 2") && e.getMessage().contains("line 3")
                && e.getMessage().contains("line 4"), e.getMessage());
        assertThrows(IllegalArgumentException.class, () -> Tokens.parse(List.of("# nobody")));
    }

    /** SHA-256 of "abc": FIPS 180-4 example, value from memory. */
    @Test
    void tokenFile_holdsPlainSha256() {
        assertEquals("mes m ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
                Tokens.line(Tokens.Role.MES, "m", "abc"));
    }
}

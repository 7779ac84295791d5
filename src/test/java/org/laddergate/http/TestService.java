package org.laddergate.http;

import static io.restassured.RestAssured.given;

import io.micrometer.prometheusmetrics.PrometheusConfig;
import io.micrometer.prometheusmetrics.PrometheusMeterRegistry;
import io.restassured.config.DecoderConfig;
import io.restassured.config.EncoderConfig;
import io.restassured.config.RestAssuredConfig;
import io.restassured.specification.RequestSpecification;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.List;
import java.util.Locale;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.laddergate.inmemory.InMemoryGoldenUnits;
import org.laddergate.inmemory.InMemoryLedger;
import org.laddergate.inmemory.InMemoryLimits;
import org.laddergate.inmemory.InMemoryProducts;
import org.laddergate.inmemory.TotalResistance;

/** A real service on a free port over stores in memory, and the bodies that tests send to it. */
final class TestService implements AutoCloseable {
    static final Instant NOW = Instant.parse("2026-12-01T08:00:00Z");
    static final int BODY_LIMIT = 4_000_000;
    static final String PRODUCT = """
            {"recipe":{"curve":"cooling","heatingPowerWatts":80.0,"heatingSeconds":4.0,"cutSeconds":4e-5,
              "recordSeconds":2.0},
             "layers":[{"name":"die","region":"die","role":"part","thicknessMetres":2.5e-4,"areaSquareMetres":8.1e-5,
              "conductivityWattsPerMetreKelvin":130.0,"heatCapacityJoulesPerCubicMetreKelvin":1.66e6},
             {"name":"top copper","thicknessMetres":3.0e-4,"areaSquareMetres":8.1e-5,
              "conductivityWattsPerMetreKelvin":390.0,"heatCapacityJoulesPerCubicMetreKelvin":3.4e6}]}
            """;

    final Clock clock = Clock.fixed(NOW, ZoneOffset.UTC);
    final InMemoryProducts products = new InMemoryProducts();
    final InMemoryLimits limits = new InMemoryLimits();
    final InMemoryGoldenUnits goldenUnits = new InMemoryGoldenUnits();
    final InMemoryLedger ledger = new InMemoryLedger(clock);
    final TotalResistance judge = new TotalResistance(products, limits, ledger);
    final PrometheusMeterRegistry registry = new PrometheusMeterRegistry(PrometheusConfig.DEFAULT);
    final HttpService http;

    TestService(Tokens tokens) {
        HttpSettings settings = new HttpSettings("127.0.0.1", 0, BODY_LIMIT, 200_000, 16, 2, Duration.ofSeconds(5));
        http = HttpService.start(settings, new Services(products, limits, goldenUnits, judge, judge, ledger, clock,
                registry, List::of), tokens);
    }

    static TestService open() {
        return new TestService(Tokens.none());
    }

    /** With product hb40 and released limits of 1 K/W +- 20 %. */
    static TestService ready() {
        TestService service = open();
        service.request().contentType("application/json").body(PRODUCT).put("/v1/products/hb40").then().statusCode(201);
        service.request().contentType("application/json")
                .body(curve("g1", 80).replace("{\"measurementId\"", "{\"condition\":\"golden\",\"measurementId\""))
                .post("/v1/products/hb40/golden-units").then().statusCode(201);
        service.request().post("/v1/products/hb40/limits").then().statusCode(201);
        service.request().contentType("application/json").body("{\"reason\":\"first limits\"}")
                .post("/v1/products/hb40/limits/1/release").then().statusCode(200);
        return service;
    }

    RequestSpecification request() {
        // A connection kept open would hold up the end of the service for a second.
        return given().port(http.port()).header("Connection", "close").config(RestAssuredConfig.config()
                .encoderConfig(EncoderConfig.encoderConfig()
                        .appendDefaultContentCharsetToContentTypeIfUndefined(false))
                .decoderConfig(DecoderConfig.decoderConfig().noContentDecoders()));
    }

    /** A cooling curve of ten samples that falls by so many kelvin. */
    static String curve(String id, double kelvin) {
        return curve(id, kelvin, 10);
    }

    static String curve(String id, double kelvin, int samples) {
        String times = IntStream.range(0, samples).mapToObj(i -> String.format(Locale.ROOT, "%.9e",
                1e-5 * Math.pow(10, 5.0 * i / (samples - 1)))).collect(Collectors.joining(","));
        String values = IntStream.range(0, samples).mapToObj(i -> String.format(Locale.ROOT, "%.6f",
                25 + kelvin * (1 - (double) i / (samples - 1)))).collect(Collectors.joining(","));
        return "{\"measurementId\":\"" + id + "\",\"product\":\"hb40\",\"serial\":\"24A7-0193\",\"lot\":\"L2411\","
                + "\"station\":\"eol3\",\"measuredAt\":\"2026-12-01T08:15:30.123+01:00\",\"curve\":\"cooling\","
                + "\"heatingPowerWatts\":80.0,\"heatingSeconds\":4.0,\"timeSeconds\":[" + times
                + "],\"temperatureCelsius\":[" + values + "]}";
    }

    @Override
    public void close() {
        http.close();
    }
}

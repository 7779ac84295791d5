package org.laddergate.http;

import io.javalin.http.Context;
import io.micrometer.prometheusmetrics.PrometheusMeterRegistry;
import java.io.IOException;
import java.io.InputStream;
import java.util.List;
import java.util.function.Supplier;

/** Health, metrics and documents about the service itself. */
final class ServiceHandlers {
    private static final String OPENAPI = "/openapi/openapi.json";

    private final PrometheusMeterRegistry registry;
    private final Supplier<List<String>> notReady;
    private final byte[] openApi;

    /** @param notReady reasons why the service cannot judge now; empty if it can */
    ServiceHandlers(PrometheusMeterRegistry registry, Supplier<List<String>> notReady) {
        this.registry = registry;
        this.notReady = notReady;
        this.openApi = resource(OPENAPI);
    }

    /** The process runs and answers; says nothing about disk or limits. */
    void livez(Context ctx) {
        TransientHandlers.json(ctx, Json.bytes(g -> {
            g.writeStartObject();
            g.writeBooleanField("live", true);
            g.writeEndObject();
        }));
    }

    void readyz(Context ctx) {
        List<String> reasons = notReady.get();
        ctx.status(reasons.isEmpty() ? 200 : 503);
        TransientHandlers.json(ctx, Json.bytes(g -> {
            g.writeStartObject();
            g.writeBooleanField("ready", reasons.isEmpty());
            Json.texts(g, "reasons", reasons);
            g.writeEndObject();
        }));
    }

    void metrics(Context ctx) {
        ctx.contentType("text/plain; version=0.0.4; charset=utf-8").result(registry.scrape());
    }

    void openApi(Context ctx) {
        TransientHandlers.json(ctx, openApi);
    }

    void problem(Context ctx) {
        ProblemCode code = ProblemCode.find(ctx.pathParam("code")).orElseThrow(() -> Problem.of(
                ProblemCode.UNKNOWN_ROUTE, "there is no problem type of this name").asException());
        ctx.contentType("text/plain; charset=utf-8").result(code.word() + " (" + code.status() + ")\n" + code.title()
                + ".\n\n" + code.advice() + "\n");
    }

    private static byte[] resource(String name) {
        try (InputStream in = ServiceHandlers.class.getResourceAsStream(name)) {
            if (in == null) {
                throw new IllegalStateException("the program lacks its resource " + name);
            }
            return in.readAllBytes();
        } catch (IOException e) {
            throw new IllegalStateException("the program's resource " + name + " cannot be read", e);
        }
    }
}

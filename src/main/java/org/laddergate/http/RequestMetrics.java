package org.laddergate.http;

import io.javalin.http.Context;
import io.javalin.router.Endpoint;
import io.micrometer.core.instrument.MeterRegistry;
import io.micrometer.core.instrument.Timer;
import java.time.Duration;

/**
 * Times every request. The tags are bounded: path templates, never addresses.
 *
 * @param registry where to
 */
record RequestMetrics(MeterRegistry registry) {
    private static final Duration[] BUCKETS = {Duration.ofMillis(1), Duration.ofMillis(2), Duration.ofMillis(5),
        Duration.ofMillis(10), Duration.ofMillis(25), Duration.ofMillis(100), Duration.ofMillis(500),
        Duration.ofSeconds(2)};

    void record(Context ctx, float milliseconds) {
        Endpoint endpoint = ctx.endpoints().matchedHttpEndpoint();
        Timer.builder("http.server.requests")
                .description("Requests by route template")
                .tag("method", endpoint == null ? "other" : endpoint.method.name())
                .tag("uri", endpoint == null ? "unmatched" : endpoint.path)
                .tag("status", Integer.toString(ctx.statusCode()))
                .serviceLevelObjectives(BUCKETS)
                .register(registry)
                .record(Duration.ofNanos((long) (milliseconds * 1e6)));
    }
}

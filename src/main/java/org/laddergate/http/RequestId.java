package org.laddergate.http;

import io.javalin.http.Context;
import java.security.SecureRandom;
import java.util.HexFormat;
import java.util.concurrent.atomic.AtomicLong;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Name of a request in answers and in the log: the trace id of a W3C {@code traceparent} header if there is a valid
 * one, else a valid {@code X-Request-Id}, else a new one.
 */
final class RequestId {
    private static final String ATTRIBUTE = "laddergate.request-id";
    private static final Pattern TRACE_PARENT = Pattern.compile("[0-9a-f]{2}-([0-9a-f]{32})-[0-9a-f]{16}-[0-9a-f]{2}");
    private static final Pattern GIVEN = Pattern.compile("[A-Za-z0-9._-]{1,64}");
    private static final AtomicLong COUNTER = new AtomicLong();
    private static final String START = start();

    private RequestId() {}

    static String of(Context ctx) {
        String known = ctx.attribute(ATTRIBUTE);
        if (known != null) {
            return known;
        }
        String id = choose(ctx.header("traceparent"), ctx.header("X-Request-Id"));
        ctx.attribute(ATTRIBUTE, id);
        return id;
    }

    /** A name for a request that never reached a handler. */
    static String next() {
        return START + "-" + COUNTER.incrementAndGet();
    }

    private static String choose(String traceParent, String given) {
        if (traceParent != null) {
            Matcher matcher = TRACE_PARENT.matcher(traceParent);
            if (matcher.matches() && !matcher.group(1).equals("0".repeat(32))) {
                return matcher.group(1);
            }
        }
        return given != null && GIVEN.matcher(given).matches() ? given : next();
    }

    private static String start() {
        byte[] random = new byte[6];
        new SecureRandom().nextBytes(random);
        return HexFormat.of().formatHex(random);
    }
}

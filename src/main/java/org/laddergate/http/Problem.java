package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import java.io.IOException;
import java.util.List;
import java.util.Map;
import org.laddergate.measurement.InputFault;

/**
 * One problem, ready to be answered.
 *
 * @param code      kind
 * @param detail    one sentence about this case
 * @param faults    single faults of the input, possibly none
 * @param headers   response headers that belong to it
 */
record Problem(ProblemCode code, String detail, List<InputFault> faults, Map<String, String> headers) {
    /** More would not help anybody. */
    private static final int MAXIMUM_FAULTS = 50;
    static final String CONTENT_TYPE = "application/problem+json";

    Problem {
        faults = List.copyOf(faults.subList(0, Math.min(faults.size(), MAXIMUM_FAULTS)));
        headers = Map.copyOf(headers);
    }

    static Problem of(ProblemCode code, String detail) {
        return new Problem(code, detail, List.of(), Map.of());
    }

    static Problem of(ProblemCode code, InputFault fault) {
        return new Problem(code, fault.detail(), List.of(fault), Map.of());
    }

    static Problem retry(ProblemCode code, String detail) {
        return new Problem(code, detail, List.of(), Map.of("Retry-After", "2"));
    }

    static Problem invalid(List<InputFault> faults) {
        String detail = faults.size() == 1 ? faults.get(0).detail()
                : faults.size() + " faults; the first: " + faults.get(0).detail();
        return new Problem(ProblemCode.INVALID_INPUT, detail, faults, Map.of());
    }

    ProblemException asException() {
        return new ProblemException(this);
    }

    /** As bytes on the wire. */
    byte[] json(String requestId) {
        return Json.bytes(g -> writeTo(g, requestId, 0, ""));
    }

    /** One line of a batch answer. */
    byte[] json(String requestId, long line, String measurementId) {
        return Json.bytes(g -> writeTo(g, requestId, line, measurementId));
    }

    private void writeTo(JsonGenerator g, String requestId, long line, String measurementId)
            throws IOException {
        g.writeStartObject();
        g.writeStringField("type", code.type());
        g.writeStringField("title", code.title());
        g.writeNumberField("status", code.status());
        g.writeStringField("detail", detail);
        g.writeStringField("instance", "/requests/" + requestId);
        if (line > 0) {
            g.writeNumberField("line", line);
            Json.text(g, "measurementId", measurementId);
        }
        if (!faults.isEmpty()) {
            g.writeArrayFieldStart("errors");
            for (InputFault fault : faults) {
                g.writeStartObject();
                g.writeStringField("pointer", fault.pointer());
                g.writeStringField("code", fault.code());
                g.writeStringField("detail", fault.detail());
                g.writeEndObject();
            }
            g.writeEndArray();
        }
        g.writeEndObject();
    }
}

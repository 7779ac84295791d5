package org.laddergate.http;

import com.fasterxml.jackson.core.JsonProcessingException;
import io.javalin.http.Context;
import io.javalin.http.HttpResponseException;
import java.util.List;
import java.util.Map;
import java.util.concurrent.CompletionException;
import java.util.concurrent.TimeoutException;
import org.eclipse.jetty.http.HttpException;
import org.laddergate.golden.DuplicateGoldenUnitException;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.screening.LedgerUnavailableException;
import org.laddergate.screening.MeasurementConflictException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/** The one table from what went wrong to what is answered. Whatever is not in it is a fault of ours. */
final class Problems {
    private static final Logger LOG = LoggerFactory.getLogger(Problems.class);
    private static final String NEUTRAL =
            "The request could not be served. The fault was logged under this request id.";

    private Problems() {}

    static Problem of(Throwable failure, String requestId) {
        Throwable cause = failure instanceof CompletionException && failure.getCause() != null
                ? failure.getCause() : failure;
        if (cause instanceof ProblemException e) {
            return e.problem();
        }
        if (cause instanceof InvalidInputException e) {
            return Problem.invalid(e.faults());
        }
        if (cause instanceof LimitNotFoundException e) {
            return ofMissingLimits(e);
        }
        if (cause instanceof MeasurementConflictException e) {
            return Problem.of(ProblemCode.MEASUREMENT_CONFLICT,
                    new InputFault("/measurementId", "measurement_conflict", e.getMessage()));
        }
        if (cause instanceof DuplicateGoldenUnitException e) {
            return Problem.of(ProblemCode.GOLDEN_UNIT_CONFLICT,
                    new InputFault("/measurementId", "golden_unit_conflict", e.getMessage()));
        }
        if (cause instanceof LedgerUnavailableException || cause instanceof TimeoutException) {
            LOG.warn("request {}: nothing stored: {}", requestId, cause.toString());
            return Problem.retry(ProblemCode.STORAGE_UNAVAILABLE, "The verdict could not be stored; try again.");
        }
        if (cause instanceof HttpException e && e.getCode() < 500) {
            return Problem.of(ProblemCode.ofServerStatus(e.getCode()), "The server could not read the request.");
        }
        if (cause instanceof HttpResponseException e && e.getStatus() < 500) {
            return Problem.of(ProblemCode.ofServerStatus(e.getStatus()), "The server could not accept the request.");
        }
        LOG.error("request {} failed", requestId, cause);
        return Problem.of(ProblemCode.INTERNAL_FAULT, NEUTRAL);
    }

    /** JSON that cannot be read, with its place. */
    static Problem malformedJson(JsonProcessingException e, String pointer) {
        String place = e.getLocation() == null ? "" : "line " + e.getLocation().getLineNr() + ", column "
                + e.getLocation().getColumnNr() + ": ";
        String message = firstLine(e.getOriginalMessage());
        boolean duplicate = message.startsWith("Duplicate");
        InputFault fault = new InputFault(pointer, duplicate ? "duplicate_field" : "malformed_json", place + message);
        return new Problem(ProblemCode.MALFORMED_JSON, fault.detail(), List.of(fault), Map.of());
    }

    static void answer(Context ctx, Problem problem) {
        problem.headers().forEach(ctx::header);
        ctx.status(problem.code().status()).contentType(Problem.CONTENT_TYPE)
                .result(problem.json(RequestId.of(ctx)));
    }

    private static Problem ofMissingLimits(LimitNotFoundException e) {
        ProblemCode code = ProblemCode.find(e.code()).orElse(ProblemCode.UNKNOWN_REVISION);
        return Problem.of(code, new InputFault("/product", code.word(), e.getMessage()));
    }

    private static String firstLine(String message) {
        String line = message == null ? "unreadable" : message.lines().findFirst().orElse("unreadable");
        return line.length() <= 200 ? line : line.substring(0, 200) + "...";
    }
}

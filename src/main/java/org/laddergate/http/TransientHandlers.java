package org.laddergate.http;

import io.javalin.http.Context;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Executor;
import java.util.function.Supplier;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.VerdictLedger;

/** Measurements: posting one, and reading what is stored. */
final class TransientHandlers {
    private final Bodies bodies;
    private final Judging judging;
    private final VerdictLedger ledger;
    private final Executor answering;

    /** @param answering where answers are written once the disk is done; not the thread that writes the disk */
    TransientHandlers(Bodies bodies, Judging judging, VerdictLedger ledger, Executor answering) {
        this.bodies = bodies;
        this.judging = judging;
        this.ledger = ledger;
        this.answering = answering;
    }

    void post(Context ctx) {
        String type = bodies.requireType(ctx, Bodies.JSON, Bodies.CSV);
        VerdictJson.Extra extra = extra(ctx);
        byte[] body = bodies.read(ctx);
        Supplier<SubmissionJson.Parsed> parsing = type.equals(Bodies.CSV)
                ? () -> SubmissionCsv.parse(body, firstValues(ctx), judging.maximumSamples())
                : () -> SubmissionJson.parse(body, judging.maximumSamples());
        ctx.future(() -> judging.judge(parsing).thenAcceptAsync(
                judged -> json(ctx, VerdictJson.bytes(judged.verdict(), judged.warnings(), extra)), answering));
    }

    void get(Context ctx) {
        json(ctx, VerdictJson.bytes(stored(ctx), List.of(), extra(ctx)));
    }

    void curve(Context ctx) {
        StoredVerdict verdict = stored(ctx);
        if (Accept.prefersCsv(ctx)) {
            csv(ctx, VerdictJson.curveCsv(verdict));
        } else {
            json(ctx, VerdictJson.curve(verdict));
        }
    }

    void structureFunction(Context ctx) {
        StoredVerdict verdict = stored(ctx);
        if (Accept.prefersCsv(ctx)) {
            csv(ctx, VerdictJson.structureFunctionCsv(verdict));
        } else {
            json(ctx, VerdictJson.structureFunction(verdict));
        }
    }

    private StoredVerdict stored(Context ctx) {
        String id = ctx.pathParam("measurementId");
        return ledger.find(id).orElseThrow(() -> Problem.of(ProblemCode.UNKNOWN_MEASUREMENT, new InputFault(
                "/measurementId", "unknown_measurement", "no measurement '"
                        + (id.length() <= 128 ? id : id.substring(0, 128) + "...") + "' is stored")).asException());
    }

    static VerdictJson.Extra extra(Context ctx) {
        String include = ctx.queryParam("include");
        if (include == null || include.isEmpty()) {
            return VerdictJson.Extra.NOTHING;
        }
        if (include.equals("structure-function")) {
            return VerdictJson.Extra.STRUCTURE_FUNCTION;
        }
        throw new InvalidInputException("include", "unknown_word", "include is '"
                + (include.length() <= 40 ? include : include.substring(0, 40) + "...")
                + "'; only 'structure-function' can be included");
    }

    static Map<String, String> firstValues(Context ctx) {
        Map<String, String> first = new HashMap<>();
        ctx.queryParamMap().forEach((name, values) -> first.put(name, values.get(0)));
        return first;
    }

    static void json(Context ctx, byte[] body) {
        ctx.contentType(Bodies.JSON).result(body);
    }

    private static void csv(Context ctx, String body) {
        ctx.contentType("text/csv; charset=utf-8; header=present").result(body);
    }
}

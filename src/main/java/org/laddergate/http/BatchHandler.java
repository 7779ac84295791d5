package org.laddergate.http;

import io.javalin.http.Context;
import jakarta.servlet.ServletOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.concurrent.CompletableFuture;
import org.laddergate.measurement.Submission;

/**
 * Many transients in one request, one JSON object a line; one line of answer for every line, in the same order, either a
 * verdict or a problem. A bad line spoils no other. Answers are written while lines still come in, so a client that sends
 * much should read while it writes.
 *
 * @param bodies    size limits; one line may be as large as one body
 * @param judging   what happens to a line
 */
record BatchHandler(Bodies bodies, Judging judging) {
    /** Lines judged but not yet on disk; lets the ledger commit many at once. */
    private static final int WINDOW = 64;

    void post(Context ctx) throws IOException {
        bodies.requireType(ctx, Bodies.NDJSON);
        LineReader lines = new LineReader(open(ctx), bodies.maximumBytes());
        ctx.status(200).contentType(Bodies.NDJSON);
        new Run(RequestId.of(ctx), lines, ctx.res().getOutputStream()).all();
    }

    private InputStream open(Context ctx) {
        try {
            return bodies.stream(ctx);
        } catch (IOException e) {
            throw Problem.of(ProblemCode.MALFORMED_BODY, "the body is not gzip data").asException();
        }
    }

    /** One batch. */
    private final class Run {
        private final String requestId;
        private final LineReader lines;
        private final ServletOutputStream out;
        private final Deque<CompletableFuture<byte[]>> waiting = new ArrayDeque<>();
        private boolean ended;
        private long line;

        Run(String requestId, LineReader lines, ServletOutputStream out) {
            this.requestId = requestId;
            this.lines = lines;
            this.out = out;
        }

        void all() throws IOException {
            while (!ended) {
                line++;
                CompletableFuture<byte[]> answer = next();
                if (answer != null) {
                    waiting.add(answer);
                }
                // Nothing more to read at the moment: the client may be waiting for its answers.
                boolean idle = ended || lines.mustWait();
                while (!waiting.isEmpty() && (idle || waiting.size() >= WINDOW || waiting.peek().isDone())) {
                    out.write(waiting.remove().join());
                    out.write('\n');
                }
                if (idle) {
                    out.flush();
                }
            }
        }

        /** The answer to the next line; null if the line is blank. */
        private CompletableFuture<byte[]> next() {
            try {
                byte[] text = lines.read();
                ended = lines.isAtEnd();
                if (lines.wasTooLong()) {
                    return failed(bodies.tooLarge(), line, "");
                }
                return isBlank(text) ? null : answer(text, line);
            } catch (IOException e) {
                ended = true;
                return failed(Bodies.cutOff(e), line, "");
            }
        }

        private CompletableFuture<byte[]> answer(byte[] text, long number) {
            Submission[] seen = new Submission[1];
            try {
                return judging.judge(() -> {
                    SubmissionJson.Parsed parsed = SubmissionJson.parse(text, judging.maximumSamples());
                    seen[0] = parsed.submission();
                    return parsed;
                }).handle((judged, failure) -> failure == null
                        ? VerdictJson.bytes(judged.verdict(), judged.warnings(), VerdictJson.Extra.NOTHING)
                        : problem(failure, number, seen[0].measurementId()));
            } catch (RuntimeException e) {
                return failed(e, number, seen[0] == null ? "" : seen[0].measurementId());
            }
        }

        private CompletableFuture<byte[]> failed(RuntimeException e, long number, String measurementId) {
            return CompletableFuture.completedFuture(problem(e, number, measurementId));
        }

        private byte[] problem(Throwable failure, long number, String measurementId) {
            String id = measurementId.length() <= 128 ? measurementId : "";
            return Problems.of(failure, requestId).json(requestId, number, id);
        }

        private boolean isBlank(byte[] text) {
            for (byte c : text) {
                if (c != ' ' && c != '\t' && c != '\r') {
                    return false;
                }
            }
            return true;
        }
    }
}

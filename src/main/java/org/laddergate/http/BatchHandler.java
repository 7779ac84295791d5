package org.laddergate.http;

import io.javalin.http.Context;
import jakarta.servlet.ServletOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayDeque;
import java.util.Deque;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionException;

/**
 * Many transients in one request, one JSON object a line; one line of answer for every line, in the same order, either
 * a verdict or a problem. A bad line spoils no other. Answers are written while lines still come in, so a client that
 * sends much should read while it writes.
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

    /**
     * A line on its way.
     *
     * @param number        from 1
     * @param measurementId as far as it could be read
     * @param judged        completes when the verdict is on disk
     */
    private record Pending(long number, String measurementId, CompletableFuture<Judging.Judged> judged) {}

    /** One batch. */
    private final class Run {
        private final String requestId;
        private final LineReader lines;
        private final ServletOutputStream out;
        private final Deque<Pending> waiting = new ArrayDeque<>();
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
                next();
                // Nothing more to read at the moment: the client may be waiting for its answers.
                boolean idle = ended || lines.mustWait();
                while (!waiting.isEmpty()
                        && (idle || waiting.size() >= WINDOW || waiting.peek().judged().isDone())) {
                    out.write(answer(waiting.remove()));
                    out.write('\n');
                }
                if (idle) {
                    out.flush();
                }
            }
        }

        /** Reads a line and sends it on its way, unless it is blank. */
        private void next() {
            try {
                byte[] text = lines.read();
                ended = lines.isAtEnd();
                if (lines.wasTooLong()) {
                    waiting.add(refused(bodies.tooLarge(), ""));
                } else if (!isBlank(text)) {
                    waiting.add(judge(text));
                }
            } catch (IOException e) {
                ended = true;
                waiting.add(refused(Bodies.cutOff(e), ""));
            }
        }

        private Pending judge(byte[] text) {
            String[] id = {""};
            try {
                CompletableFuture<Judging.Judged> judged = judging.judge(() -> {
                    SubmissionJson.Parsed parsed = SubmissionJson.parse(text, judging.maximumSamples());
                    id[0] = parsed.submission().measurementId();
                    return parsed;
                });
                return new Pending(line, id[0], judged);
            } catch (RuntimeException e) {
                return refused(e, id[0]);
            }
        }

        private Pending refused(RuntimeException e, String measurementId) {
            return new Pending(line, measurementId, CompletableFuture.failedFuture(e));
        }

        /** Waits for the disk here, so that the thread that writes it does nothing else. */
        private byte[] answer(Pending pending) {
            try {
                Judging.Judged judged = pending.judged().join();
                return VerdictJson.bytes(judged.verdict(), judged.warnings(), VerdictJson.Extra.NOTHING);
            } catch (CompletionException e) {
                String id = pending.measurementId();
                return Problems.of(e, requestId).json(requestId, pending.number(), id.length() <= 128 ? id : "");
            }
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

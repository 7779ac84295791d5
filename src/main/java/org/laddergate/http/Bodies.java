package org.laddergate.http;

import io.javalin.http.Context;
import java.io.ByteArrayInputStream;
import java.io.FilterInputStream;
import java.io.IOException;
import java.io.InputStream;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.TimeoutException;
import java.util.zip.GZIPInputStream;

/**
 * Reads request bodies within the size limit, which counts decompressed bytes.
 *
 * @param maximumBytes  largest accepted body [byte]
 */
record Bodies(int maximumBytes) {
    static final String JSON = "application/json";
    static final String CSV = "text/csv";
    static final String NDJSON = "application/x-ndjson";
    /** What is read and dropped of a body that is too large, so that the client gets to see the answer. */
    private static final int DRAIN_FACTOR = 4;
    /** A batch may be larger than one body by this factor; it is never in memory as a whole. */
    private static final int BATCH_FACTOR = 64;

    /** The media type, one of those given. */
    String requireType(Context ctx, String... accepted) {
        String type = ctx.contentType() == null ? "" : ctx.contentType();
        String essence = type.split(";", 2)[0].strip().toLowerCase(Locale.ROOT);
        if (!List.of(accepted).contains(essence)) {
            throw Problem.of(ProblemCode.UNSUPPORTED_CONTENT_TYPE, "Content-Type is '" + shown(type)
                    + "'; this address takes " + String.join(" or ", accepted)).asException();
        }
        return essence;
    }

    /** The whole body, decompressed. */
    byte[] read(Context ctx) {
        boolean gzip = isGzip(ctx);
        if (ctx.req().getContentLengthLong() > maximumBytes) {
            drain(ctx);
            throw tooLarge();
        }
        byte[] sent = receive(ctx);
        return gzip ? inflate(sent) : sent;
    }

    /** A body that may be empty, and then needs no content type. */
    byte[] readOptionalJson(Context ctx) {
        boolean announced = ctx.req().getContentLengthLong() != 0 && ctx.contentType() != null;
        if (announced) {
            requireType(ctx, JSON);
            return read(ctx);
        }
        byte[] body = read(ctx);
        if (body.length > 0) {
            requireType(ctx, JSON);
        }
        return body;
    }

    /** The body as a stream of decompressed bytes, for batches. */
    InputStream stream(Context ctx) throws IOException {
        InputStream raw = ctx.req().getInputStream();
        InputStream plain = isGzip(ctx) ? new GZIPInputStream(raw, 8192) : raw;
        return new CappedStream(plain, (long) BATCH_FACTOR * maximumBytes);
    }

    private boolean isGzip(Context ctx) {
        String encoding = ctx.header("Content-Encoding");
        if (encoding == null || encoding.isBlank() || encoding.equalsIgnoreCase("identity")) {
            return false;
        }
        if (encoding.strip().equalsIgnoreCase("gzip")) {
            return true;
        }
        throw Problem.of(ProblemCode.UNSUPPORTED_CONTENT_ENCODING,
                "Content-Encoding is '" + shown(encoding) + "'; only gzip is accepted").asException();
    }

    private byte[] receive(Context ctx) {
        try {
            byte[] sent = ctx.req().getInputStream().readNBytes(maximumBytes + 1);
            if (sent.length > maximumBytes) {
                drain(ctx);
                throw tooLarge();
            }
            return sent;
        } catch (IOException e) {
            throw cutOff(e);
        }
    }

    private byte[] inflate(byte[] sent) {
        try (InputStream in = new GZIPInputStream(new ByteArrayInputStream(sent), 8192)) {
            byte[] plain = in.readNBytes(maximumBytes + 1);
            if (plain.length > maximumBytes) {
                throw tooLarge();
            }
            return plain;
        } catch (IOException e) {
            throw Problem.of(ProblemCode.MALFORMED_BODY, "the body is not complete gzip data: " + e.getMessage())
                    .asException();
        }
    }

    private void drain(Context ctx) {
        try {
            ctx.req().getInputStream().skip((long) DRAIN_FACTOR * maximumBytes);
        } catch (IOException e) {
            throw cutOff(e);
        }
    }

    static ProblemException cutOff(IOException e) {
        if (e instanceof TooLargeException) {
            return Problem.of(ProblemCode.BODY_TOO_LARGE, "the batch is too large; split it").asException();
        }
        if (e.getCause() instanceof TimeoutException || e.getMessage() != null && e.getMessage().contains("timeout")) {
            return Problem.of(ProblemCode.REQUEST_TIMEOUT, "the body did not arrive in time").asException();
        }
        return Problem.of(ProblemCode.MALFORMED_BODY, "the body was cut off").asException();
    }

    ProblemException tooLarge() {
        return Problem.of(ProblemCode.BODY_TOO_LARGE,
                "the body has more than the " + maximumBytes + " decompressed bytes that are accepted").asException();
    }

    private static String shown(String text) {
        return text.length() <= 60 ? text : text.substring(0, 60) + "...";
    }

    private static final class TooLargeException extends IOException {
        private static final long serialVersionUID = 1L;
    }

    /** Ends with an exception where a batch has gone too far. */
    private static final class CappedStream extends FilterInputStream {
        private long left;

        CappedStream(InputStream in, long limit) {
            super(in);
            left = limit;
        }

        @Override
        public int read() throws IOException {
            byte[] one = new byte[1];
            return read(one, 0, 1) < 0 ? -1 : one[0] & 0xFF;
        }

        @Override
        public int read(byte[] target, int offset, int length) throws IOException {
            int count = super.read(target, offset, length);
            left -= Math.max(count, 0);
            if (left < 0) {
                throw new TooLargeException();
            }
            return count;
        }
    }
}

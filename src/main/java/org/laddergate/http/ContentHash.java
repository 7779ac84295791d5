package org.laddergate.http;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.time.OffsetDateTime;
import java.util.HexFormat;
import java.util.OptionalDouble;
import org.laddergate.measurement.Submission;
import org.laddergate.measurement.TemperatureSensor;

/**
 * SHA-256 over everything a tester said about a measurement: white space, field order, compression and the choice
 * between JSON and CSV do not matter, every bit of every number does. Nothing that the service filled in goes into it,
 * so that a request without a time, sent again, is the same request.
 *
 * <p>The form of the hashed bytes is part of what is stored and never changes; a new form gets a new first line.
 */
final class ContentHash {
    private static final String FORM = "laddergate-submission-1";
    private static final int CHUNK = 8192;

    private final MessageDigest digest = sha256();
    private final ByteBuffer buffer = ByteBuffer.allocate(CHUNK);

    private ContentHash() {}

    /** 64 hex digits. The submission must have passed the rules. */
    static String of(Submission sent) {
        ContentHash hash = new ContentHash();
        hash.text(FORM);
        for (String field : Submission.TEXT_FIELDS) {
            String value = sent.text(field);
            hash.text(field.equals("measuredAt") && !value.isEmpty() ? Times.text(OffsetDateTime.parse(value)) : value);
        }
        hash.optional(sent.heatingPowerWatts());
        hash.optional(sent.heatingSeconds());
        hash.array(sent.sensor().map(TemperatureSensor::coefficients).orElse(new double[0]));
        hash.text(sent.valueField());
        hash.array(sent.timesSeconds());
        hash.array(sent.values());
        hash.flush();
        return HexFormat.of().formatHex(hash.digest.digest());
    }

    private void text(String value) {
        byte[] bytes = value.getBytes(StandardCharsets.UTF_8);
        room(Integer.BYTES);
        buffer.putInt(bytes.length);
        flush();
        digest.update(bytes);
    }

    private void optional(OptionalDouble value) {
        array(value.isPresent() ? new double[] {value.getAsDouble()} : new double[0]);
    }

    private void array(double[] values) {
        room(Integer.BYTES);
        buffer.putInt(values.length);
        for (double value : values) {
            room(Double.BYTES);
            buffer.putDouble(value);
        }
    }

    private void room(int bytes) {
        if (buffer.remaining() < bytes) {
            flush();
        }
    }

    private void flush() {
        digest.update(buffer.array(), 0, buffer.position());
        buffer.clear();
    }

    private static MessageDigest sha256() {
        try {
            return MessageDigest.getInstance("SHA-256");
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java platform has SHA-256", e);
        }
    }
}

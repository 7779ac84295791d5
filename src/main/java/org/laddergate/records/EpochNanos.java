package org.laddergate.records;

import java.time.Instant;

/** Instants as one sortable integer: nanoseconds since 1970-01-01T00:00Z, good for the years 1678 to 2261. */
final class EpochNanos {
    private static final long NANOS_PER_SECOND = 1_000_000_000L;

    private EpochNanos() {}

    /** @throws ArithmeticException if the instant is outside the range */
    static long of(Instant instant) {
        return Math.addExact(Math.multiplyExact(instant.getEpochSecond(), NANOS_PER_SECOND), instant.getNano());
    }

    static Instant instant(long epochNanos) {
        return Instant.ofEpochSecond(Math.floorDiv(epochNanos, NANOS_PER_SECOND),
                Math.floorMod(epochNanos, NANOS_PER_SECOND));
    }
}

package org.laddergate.records;

import java.time.Duration;

/**
 * Sizes and patience of the ledger.
 *
 * @param batchLimit        most appends in one commit
 * @param queueCapacity     most appends waiting for a commit; further ones are refused at once
 * @param busyTimeoutMillis how long to wait for another process that holds the write lock [ms]
 * @param readers           read-only connections, and so the most look-ups at the same time
 * @param probeInterval     how often writing is tried out while the ledger cannot store and nobody appends
 */
public record LedgerSettings(int batchLimit, int queueCapacity, int busyTimeoutMillis, int readers,
        Duration probeInterval) {

    public LedgerSettings {
        requireRange("batchLimit", batchLimit, 1, 4096);
        requireRange("queueCapacity", queueCapacity, 1, 65_536);
        requireRange("busyTimeoutMillis", busyTimeoutMillis, 0, 60_000);
        requireRange("readers", readers, 1, 64);
        if (probeInterval.isNegative() || probeInterval.isZero()) {
            throw new IllegalArgumentException("probeInterval " + probeInterval + " must be positive");
        }
    }

    /** 64 appends a commit, 1024 waiting, 1 s for a foreign lock, 2 readers, one probe a second. */
    public static LedgerSettings defaults() {
        return new LedgerSettings(64, 1024, 1000, 2, Duration.ofSeconds(1));
    }

    private static void requireRange(String name, int value, int lowest, int highest) {
        if (value < lowest || value > highest) {
            throw new IllegalArgumentException(name + " " + value + " is outside " + lowest + " to " + highest);
        }
    }
}

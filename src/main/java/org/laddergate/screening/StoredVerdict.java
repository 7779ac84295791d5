package org.laddergate.screening;

import java.time.Instant;
import java.time.OffsetDateTime;
import org.laddergate.measurement.CurveKind;

/**
 * A judgement that is on disk.
 *
 * @param sequence          position in commit order, from 1, without gaps
 * @param measurementId     the tester's name for the measurement
 * @param contentSha256     hash of what the tester sent, 64 hex digits
 * @param product           product name
 * @param serial            serial number
 * @param lot               lot, empty if not given
 * @param station           station, empty if not given
 * @param measuredAt        as told by the tester, offset kept
 * @param curveKind         cooling or heating
 * @param heatingPowerWatts [W]
 * @param heatingSeconds    [s]
 * @param attempt           1 for the first measurement of this product and serial, 2 for the next, ...
 * @param storedAt          when it was committed
 * @param judgement         what was decided
 */
public record StoredVerdict(long sequence, String measurementId, String contentSha256, String product, String serial,
        String lot, String station, OffsetDateTime measuredAt, CurveKind curveKind, double heatingPowerWatts,
        double heatingSeconds, int attempt, Instant storedAt, Judgement judgement) {}

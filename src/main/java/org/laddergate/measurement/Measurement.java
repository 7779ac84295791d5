package org.laddergate.measurement;

import java.time.OffsetDateTime;

/**
 * One transient as a tester delivered it, already in temperature.
 *
 * @param measurementId      the tester's own unique name for this measurement, never empty
 * @param product            product name, never empty
 * @param serial             serial number of the part, never empty
 * @param lot                production lot, empty if not given
 * @param station            test station, empty if not given
 * @param measuredAt         when the curve was recorded, with the tester's own offset
 * @param curveKind          cooling or heating
 * @param heatingPowerWatts  size of the power step [W], positive
 * @param heatingSeconds     length of the heating pulse before a cooling curve [s], positive; infinite for a heating
 *                           curve or when the part was in thermal steady state
 * @param curve              junction temperature [deg C] over time since the power step [s]
 */
public record Measurement(String measurementId, String product, String serial, String lot, String station,
        OffsetDateTime measuredAt, CurveKind curveKind, double heatingPowerWatts, double heatingSeconds,
        SampledCurve curve) {}

package org.laddergate.screening;

import java.time.OffsetDateTime;
import java.time.ZoneOffset;
import org.laddergate.limits.LimitSet;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.SampledCurve;

/** The golden mean curve of a limit set as if it had been measured; it is never stored. */
final class GoldenCurve {
    private GoldenCurve() {}

    static Measurement of(LimitSet set) {
        LogTimeBins bins = LogTimeBins.spanning(set.model().firstEdgeSeconds(), set.model().lastEdgeSeconds(),
                set.model().binsPerDecade());
        double[] values = set.model().goldenKelvin().clone();
        if (set.recipe().curve() == CurveKind.HEATING) {
            for (int i = 0; i < values.length; i++) {
                values[i] = -values[i];
            }
        }
        return new Measurement("golden", set.product(), "golden", "", "", OffsetDateTime.of(2000, 1, 1, 0, 0, 0, 0,
                ZoneOffset.UTC), set.recipe().curve(), set.recipe().heatingPowerWatts(), set.recipe().pulseSeconds(),
                SampledCurve.ofUnsafe(bins.centresSeconds(), values));
    }
}

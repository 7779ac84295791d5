package org.laddergate.screening;

import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.RegionEstimator;
import org.laddergate.limits.RegionLimit;

/**
 * How one region's resistance is read and judged.
 */
final class RegionPlan {
    private final RegionLimit limit;
    private final FaultSignature slight;
    private final RegionEstimator estimator;

    /** @param slight the uniform signature of smallest severity of this region */
    RegionPlan(RegionLimit limit, FaultSignature slight, RegionEstimator estimator) {
        this.limit = limit;
        this.slight = slight;
        this.estimator = estimator;
    }

    RegionLimit limit() {
        return limit;
    }

    String name() {
        return limit.region().name();
    }

    FaultSignature slight() {
        return slight;
    }

    RegionEstimator estimator() {
        return estimator;
    }

    /** Estimated resistance [K/W] with everything else in family. */
    double resistanceKelvinPerWatt(double[] deviationKelvin) {
        return limit.goldenMeanKelvinPerWatt() + estimator.excessKelvinPerWatt(deviationKelvin);
    }
}

package org.laddergate.screening;

import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.evidence.FamilyModel;

/**
 * How one region's resistance is read off a whitened deviation.
 *
 * <p>Definition: R = R_golden + (s'z)/(s's), s the whitened deviation that 1 K/W more in the region makes: the generalised
 * least squares estimate with everything else in family (Aitken). The region's own spread in the family does not change
 * this estimate (Sherman-Morrison), so it holds for a faulty region as well; larger faults are read off the named fault's
 * own signature instead.
 */
final class RegionPlan {
    private final RegionLimit limit;
    private final double[] whitenedPerKelvinPerWatt;
    private final double ownVariance;

    /**
     * @param slight the uniform signature of smallest severity of this region
     */
    RegionPlan(RegionLimit limit, FaultSignature slight, FamilyModel family) {
        this.limit = limit;
        double added = slight.addedResistanceKelvinPerWatt();
        double[] perUnit = new double[slight.deviationKelvin().length];
        for (int i = 0; i < perUnit.length; i++) {
            perUnit[i] = slight.deviationKelvin()[i] / added;
        }
        this.whitenedPerKelvinPerWatt = family.whiten(perUnit);
        double total = 1 / FamilyModel.tSquared(whitenedPerKelvinPerWatt);
        double own = total - limit.uncertaintyKelvinPerWatt() * limit.uncertaintyKelvinPerWatt();
        this.ownVariance = Math.max(0, own);
    }

    RegionLimit limit() {
        return limit;
    }

    String name() {
        return limit.region().name();
    }

    /** Whitened deviation that 1 K/W more in the region makes. */
    double[] whitenedPerKelvinPerWatt() {
        return whitenedPerKelvinPerWatt;
    }

    /** Variance of the region's own spread in the family [(K/W)^2]. */
    double ownVariance() {
        return ownVariance;
    }

    /** Estimated resistance [K/W] with everything else in family. */
    double resistanceKelvinPerWatt(double[] whitened) {
        return limit.goldenMeanKelvinPerWatt() + FamilyModel.amplitude(whitenedPerKelvinPerWatt, whitened);
    }
}

package org.laddergate.limits;

import java.util.Locale;

/**
 * How one kind of fault in one region changes the binned curve, at the recipe's power.
 *
 * @param region                        region at fault
 * @param shape                         how the fault is shaped
 * @param severity                      {@link Shape#UNIFORM} and {@link Shape#THICKER}: relative growth; otherwise the
 *                                      fraction of the region's area that is lost [1]
 * @param addedResistanceKelvinPerWatt  steady resistance the fault adds between junction and heat sink [K/W]
 * @param deviationKelvin               faulty minus golden temperature in each comparison bin, relative to an arbitrary
 *                                      offset [K]
 */
public record FaultSignature(String region, Shape shape, double severity, double addedResistanceKelvinPerWatt,
        double[] deviationKelvin) {

    /** Shape of a fault within its layer. */
    public enum Shape {
        /** The layer conducts less everywhere. */
        UNIFORM,
        /** The layer is thicker everywhere: it resists and stores more. */
        THICKER,
        /** A disc around the axis is missing. */
        CENTRE,
        /** A ring at the rim is missing. */
        EDGE;

        /** Lower-case word used in files. */
        public String word() {
            return name().toLowerCase(Locale.ROOT);
        }
    }
}

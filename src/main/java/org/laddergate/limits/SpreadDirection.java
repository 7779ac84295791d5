package org.laddergate.limits;

/**
 * One way in which healthy parts of a product differ.
 *
 * @param name              what varies, for people
 * @param region            region whose resistance it is; empty if it is none's
 * @param sigma             standard deviation in the golden family, in units of the deviation [1]
 * @param deviationKelvin   change of each comparison bin for one unit [K], relative to an arbitrary offset
 */
public record SpreadDirection(String name, String region, double sigma, double[] deviationKelvin) {

    /** The same direction with another standard deviation. */
    public SpreadDirection withSigma(double other) {
        return new SpreadDirection(name, region, other, deviationKelvin);
    }
}

package org.laddergate.limits;

/**
 * Limits of one region's resistance, learnt from the golden units.
 *
 * @param region                        the region
 * @param assessed                      whether pulse and record are long enough to judge it
 * @param goldenMeanKelvinPerWatt       mean of the golden units [K/W]
 * @param goldenSigmaKelvinPerWatt      standard deviation of the golden units, measurement noise included [K/W]
 * @param uncertaintyKelvinPerWatt      standard uncertainty of one measurement of the region: noise and what other
 *                                      regions' spread leaves in it [K/W]
 * @param factor                        two-sided normal tolerance factor used [1]
 * @param lowerKelvinPerWatt            lower tolerance limit [K/W]
 * @param upperKelvinPerWatt            upper tolerance limit [K/W]
 * @param origin                        how the limits came about: "learnt", or who set them and how
 */
public record RegionLimit(Region region, boolean assessed, double goldenMeanKelvinPerWatt,
        double goldenSigmaKelvinPerWatt, double uncertaintyKelvinPerWatt, double factor, double lowerKelvinPerWatt,
        double upperKelvinPerWatt, String origin) {}

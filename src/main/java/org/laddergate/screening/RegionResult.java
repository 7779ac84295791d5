package org.laddergate.screening;

import org.laddergate.limits.RegionRole;

/**
 * One region of one part against its limits. When not assessed, the numbers other than the limits are NaN.
 *
 * @param region                        region name
 * @param role                          whose resistance it is
 * @param assessed                      false: the pulse or the record is too short to see it
 * @param resistanceKelvinPerWatt       estimated resistance [K/W]
 * @param uncertaintyKelvinPerWatt      standard uncertainty of that estimate [K/W]
 * @param lowerLimitKelvinPerWatt       acceptance limit [K/W]; -infinity if there is none
 * @param upperLimitKelvinPerWatt       acceptance limit [K/W]; +infinity if there is none
 * @param probabilityConforming         conformance probability of JCGM 106 within the tolerance limits, flat prior [1]
 * @param faultProbability              posterior probability that this region is at fault [1]
 */
public record RegionResult(String region, RegionRole role, boolean assessed, double resistanceKelvinPerWatt,
        double uncertaintyKelvinPerWatt, double lowerLimitKelvinPerWatt, double upperLimitKelvinPerWatt,
        double probabilityConforming, double faultProbability) {}

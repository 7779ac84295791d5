package org.laddergate.screening;

import java.util.List;

/**
 * Everything that was decided about one measurement, and what it was decided on.
 *
 * @param outcome               pass, fail or invalid
 * @param disposition           what the line should do
 * @param failingRegion         most probable region at fault; "unexplained" if no region explains the curve; empty
 *                              unless the outcome is fail
 * @param otherSuspects         further regions the evidence supports, most probable first
 * @param decisionConfidence    fail: probability that {@code failingRegion} is at fault; pass: probability that every
 *                              assessed region is inside its limits; invalid: NaN [1]
 * @param regions               one result per region of the product, in the order of the heat path
 * @param envelopeInside        whether the structure function stayed in the golden envelope
 * @param envelopeFirstExitJoulesPerKelvin  where it first left [J/K]; NaN if it stayed inside
 * @param inFamilyStatistic     Hotelling T-squared of the binned curve [1]; NaN if not computed
 * @param inFamilyLimit         its limit [1]
 * @param reasons               reasons of an invalid or failed verdict, and remarks on a passed one
 * @param limitRevision         revision of the limit set used
 * @param limitSha256           its content hash, 64 hex digits
 * @param algorithmVersion      version of the screening algorithm
 * @param trace                 the curves behind the verdict
 */
public record Judgement(Outcome outcome, Disposition disposition, String failingRegion, List<String> otherSuspects,
        double decisionConfidence, List<RegionResult> regions, boolean envelopeInside,
        double envelopeFirstExitJoulesPerKelvin, double inFamilyStatistic, double inFamilyLimit, List<Reason> reasons,
        int limitRevision, String limitSha256, String algorithmVersion, Trace trace) {

    /** Name given when no region explains the deviation. */
    public static final String UNEXPLAINED = "unexplained";

    public Judgement {
        otherSuspects = List.copyOf(otherSuspects);
        regions = List.copyOf(regions);
        reasons = List.copyOf(reasons);
    }
}

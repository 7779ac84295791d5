package org.laddergate.limits.evidence;

import java.util.List;

/**
 * What a deviation may be put down to, with all the ways it could come about.
 *
 * @param name          region name, reason code of a measurement error, or "unexplained"
 * @param kind          what sort of thing it is
 * @param logPrior      logarithm of its prior probability
 * @param explanations  ways it could come about; their weights add up to one
 */
public record Subject(String name, Kind kind, double logPrior, List<Explanation> explanations) {

    /** Sorts of subjects; they decide what becomes of the part. */
    public enum Kind {
        /** A region of the part: a fault. */
        PART_REGION,
        /** A region of the tester: measure again and look at the station. */
        FIXTURE_REGION,
        /** A smooth deviation that no region explains: still the part's. */
        UNEXPLAINED,
        /** The measurement, not the part. */
        MEASUREMENT
    }

    public Subject {
        explanations = List.copyOf(explanations);
    }
}

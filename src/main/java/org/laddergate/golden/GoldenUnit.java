package org.laddergate.golden;

import org.laddergate.measurement.Measurement;

/**
 * A reference measurement with known truth.
 *
 * @param measurement   the curve and where it comes from
 * @param condition     golden, or known to be bad
 * @param faultRegion   region at fault of a known-bad unit; empty if not stated or golden
 */
public record GoldenUnit(Measurement measurement, Condition condition, String faultRegion) {

    /** What is known of the unit. */
    public enum Condition {
        GOLDEN("golden"), KNOWN_BAD("known-bad");

        private final String word;

        Condition(String word) {
            this.word = word;
        }

        /** Word used in files and on the wire. */
        public String word() {
            return word;
        }
    }
}

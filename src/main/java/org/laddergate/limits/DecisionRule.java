package org.laddergate.limits;

import java.util.Locale;

/** Decision rules in the terms of JCGM 106:2012, section 8. */
public enum DecisionRule {
    /** Accept inside the tolerance limits. */
    SIMPLE_ACCEPTANCE,
    /** Accept only inside the tolerance limits drawn in by the guard band. */
    GUARDED_ACCEPTANCE,
    /** Reject only outside the tolerance limits pushed out by the guard band. */
    GUARDED_REJECTION;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

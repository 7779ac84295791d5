package org.laddergate.limits;

import java.util.Locale;

/** Life of a limit set. */
public enum LimitState {
    DRAFT, RELEASED, WITHDRAWN;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

package org.laddergate.screening;

import java.util.Locale;

/** The verdict on one measurement. */
public enum Outcome {
    PASS, FAIL,
    /** No statement of conformity: the measurement is not to be believed. */
    INVALID;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

package org.laddergate.screening;

import java.util.Locale;

/** What the line should do with the part. */
public enum Disposition {
    ACCEPT, REJECT, RETEST, HOLD;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

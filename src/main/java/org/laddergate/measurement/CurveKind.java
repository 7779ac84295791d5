package org.laddergate.measurement;

import java.util.Locale;

/** Which side of the power step was recorded. */
public enum CurveKind {
    /** Time counts from switch-off; the part was heated for the recipe's heating time before. */
    COOLING,
    /** Time counts from switch-on; the part was in equilibrium before. */
    HEATING;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

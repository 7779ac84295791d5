package org.laddergate.limits;

import java.util.Locale;

/** Whose resistance a region is. */
public enum RegionRole {
    /** Belongs to the part: a fault here fails the part. */
    PART,
    /**
     * Belongs to the tester (clamping, cold plate): a shift here makes the measurement invalid and warns the station.
     */
    FIXTURE;

    /** Lower-case word used in files and on the wire. */
    public String word() {
        return name().toLowerCase(Locale.ROOT);
    }
}

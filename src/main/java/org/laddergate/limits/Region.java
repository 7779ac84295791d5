package org.laddergate.limits;

/**
 * A named interval of cumulative capacitance on the golden structure function.
 *
 * @param name                  what people call it
 * @param role                  whose resistance it is
 * @param fromJoulesPerKelvin   lower end, exclusive [J/K]
 * @param toJoulesPerKelvin     upper end, inclusive [J/K]
 */
public record Region(String name, RegionRole role, double fromJoulesPerKelvin, double toJoulesPerKelvin) {

    public Region {
        if (name.isBlank()) {
            throw new IllegalArgumentException("a region needs a name");
        }
        if (!(fromJoulesPerKelvin >= 0 && toJoulesPerKelvin > fromJoulesPerKelvin)) {
            throw new IllegalArgumentException("region " + name + " must have 0 <= fromJoulesPerKelvin < "
                    + "toJoulesPerKelvin, got " + fromJoulesPerKelvin + " to " + toJoulesPerKelvin);
        }
    }
}

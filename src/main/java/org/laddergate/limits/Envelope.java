package org.laddergate.limits;

/**
 * Band of cumulative resistance at fixed cumulative capacitance that holds the golden family's structure functions.
 *
 * @param capacitancesJoulesPerKelvin   where it is checked, ascending [J/K]
 * @param lowerKelvinPerWatt            lower edge [K/W]
 * @param upperKelvinPerWatt            upper edge [K/W]
 */
public record Envelope(double[] capacitancesJoulesPerKelvin, double[] lowerKelvinPerWatt,
        double[] upperKelvinPerWatt) {}

package org.laddergate.screening;

/**
 * The curves a verdict was decided on, kept so that it can be explained and recomputed. Arrays are owned by this object
 * and must not be modified; any of them may be empty when the measurement was too broken to get that far.
 *
 * @param binTimesSeconds       centres of the log-time bins [s]
 * @param binTemperaturesCelsius mean temperature of each bin [deg C]; NaN where a bin is empty
 * @param binCounts             raw samples in each bin
 * @param structureResistancesKelvinPerWatt cumulative resistance at the rungs of the ladder [K/W]
 * @param structureCapacitancesJoulesPerKelvin cumulative capacitance there [J/K]
 */
public record Trace(double[] binTimesSeconds, double[] binTemperaturesCelsius, int[] binCounts,
        double[] structureResistancesKelvinPerWatt, double[] structureCapacitancesJoulesPerKelvin) {}

package org.laddergate.thermal;

/**
 * One disc of an axisymmetric stack.
 *
 * @param thicknessMetres                         [m], positive
 * @param radiusMetres                            radius of the disc; a square part is a disc of equal area [m], positive
 * @param conductivityWattsPerMetreKelvin         [W/(m K)], positive
 * @param heatCapacityJoulesPerCubicMetreKelvin   [J/(m^3 K)], positive
 */
public record StackSlab(double thicknessMetres, double radiusMetres, double conductivityWattsPerMetreKelvin,
        double heatCapacityJoulesPerCubicMetreKelvin) {

    public StackSlab {
        positive(thicknessMetres, "thicknessMetres");
        positive(radiusMetres, "radiusMetres");
        positive(conductivityWattsPerMetreKelvin, "conductivityWattsPerMetreKelvin");
        positive(heatCapacityJoulesPerCubicMetreKelvin, "heatCapacityJoulesPerCubicMetreKelvin");
    }

    private static void positive(double value, String name) {
        if (!(value > 0 && value < Double.POSITIVE_INFINITY)) {
            throw new IllegalArgumentException(name + " must be positive, got " + value);
        }
    }

    /** The same slab with its conductivity and heat capacity multiplied. */
    public StackSlab scaled(double conductivityFactor, double heatCapacityFactor) {
        return new StackSlab(thicknessMetres, radiusMetres, conductivityWattsPerMetreKelvin * conductivityFactor,
                heatCapacityJoulesPerCubicMetreKelvin * heatCapacityFactor);
    }
}

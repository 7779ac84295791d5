package org.laddergate.limits;

/**
 * One layer of the heat path, from the heated surface outwards.
 *
 * @param name                   what people call it
 * @param region                 region it belongs to; empty: the heat passes through it, it is not judged
 * @param role                   role of that region
 * @param thicknessMetres        [m]
 * @param areaSquareMetres       full area of the layer [m^2]
 * @param conductivityWattsPerMetreKelvin           [W/(m K)]
 * @param heatCapacityJoulesPerCubicMetreKelvin     volumetric heat capacity [J/(m^3 K)]
 */
public record Layer(String name, String region, RegionRole role, double thicknessMetres, double areaSquareMetres,
        double conductivityWattsPerMetreKelvin, double heatCapacityJoulesPerCubicMetreKelvin) {

    public Layer {
        require(!name.isBlank(), "name", Double.NaN);
        require(thicknessMetres > 0 && thicknessMetres < 1, "thicknessMetres", thicknessMetres);
        require(areaSquareMetres > 0 && areaSquareMetres < 10, "areaSquareMetres", areaSquareMetres);
        require(conductivityWattsPerMetreKelvin > 0 && conductivityWattsPerMetreKelvin < 1e5,
                "conductivityWattsPerMetreKelvin", conductivityWattsPerMetreKelvin);
        require(heatCapacityJoulesPerCubicMetreKelvin > 0 && heatCapacityJoulesPerCubicMetreKelvin < 1e9,
                "heatCapacityJoulesPerCubicMetreKelvin", heatCapacityJoulesPerCubicMetreKelvin);
    }

    private static void require(boolean good, String field, double value) {
        if (!good) {
            throw new IllegalArgumentException(field + " " + value + " is out of range");
        }
    }
}

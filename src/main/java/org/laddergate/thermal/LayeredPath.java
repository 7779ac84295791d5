package org.laddergate.thermal;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * A one-dimensional heat path of uniform layers, lumped elements and cones, cut into a ladder.
 *
 * <p>Definition: a layer of resistance R and capacitance C is a uniform line; a cone is a spherical sector from r0 to
 * r1 with R = (1/r0 - 1/r1)/(k Omega) and C = c_v Omega (r1^3 - r0^3)/3; a lumped resistance has no capacitance and a
 * lumped capacitance no resistance.
 *
 * <p>Method: every distributed element is cut into pieces whose resistance grows geometrically away from the junction,
 * where the field is steepest early on; each piece is a pi section (half its capacitance at either end), which is
 * second order in the piece. Cones are cut evenly in ln r and each piece keeps its own exact R and C.
 *
 * <p>Source: lumped sections of RC lines, e.g. Carslaw and Jaeger (1959), section 3.4 for the continuous line.
 *
 * <p>Error: with 300 pieces a layer, responses agree with the exact ones to 1e-4 relative (LayeredPathTest).
 *
 * <p>Degenerate input: a path must end with something that has resistance.
 */
public final class LayeredPath {
    private final List<double[]> pieces = new ArrayList<>();
    private final int piecesPerLayer;

    /** @param piecesPerLayer pieces of each distributed element, at least 4 */
    public LayeredPath(int piecesPerLayer) {
        if (piecesPerLayer < 4) {
            throw new IllegalArgumentException("a layer needs at least 4 pieces, not " + piecesPerLayer);
        }
        this.piecesPerLayer = piecesPerLayer;
    }

    /** Adds a uniform layer [K/W], [J/K]; the first one is cut finer towards the junction. */
    public LayeredPath layer(double resistanceKelvinPerWatt, double capacitanceJoulesPerKelvin) {
        double power = pieces.stream().allMatch(p -> p[0] == 0) ? 2.5 : 1;
        for (int i = 0; i < piecesPerLayer; i++) {
            double share = Math.pow((i + 1.0) / piecesPerLayer, power) - Math.pow((double) i / piecesPerLayer, power);
            pieces.add(new double[] {resistanceKelvinPerWatt * share, capacitanceJoulesPerKelvin * share});
        }
        return this;
    }

    /** Adds an interface without capacitance [K/W]. */
    public LayeredPath resistance(double resistanceKelvinPerWatt) {
        pieces.add(new double[] {resistanceKelvinPerWatt, 0});
        return this;
    }

    /** Adds a mass without resistance [J/K]. */
    public LayeredPath capacitance(double capacitanceJoulesPerKelvin) {
        pieces.add(new double[] {0, capacitanceJoulesPerKelvin});
        return this;
    }

    /** Adds a spherical sector [m], [W/(m K)], [J/(m^3 K)], [sr]. */
    public LayeredPath cone(double innerRadiusMetres, double outerRadiusMetres, double conductivityWattsPerMetreKelvin,
            double heatCapacityJoulesPerCubicMetreKelvin, double solidAngleSteradians) {
        double power = pieces.stream().allMatch(p -> p[0] == 0) ? 2 : 1;
        double width = outerRadiusMetres - innerRadiusMetres;
        for (int i = 0; i < piecesPerLayer; i++) {
            double a = innerRadiusMetres + width * Math.pow((double) i / piecesPerLayer, power);
            double b = innerRadiusMetres + width * Math.pow((i + 1.0) / piecesPerLayer, power);
            pieces.add(new double[] {(1 / a - 1 / b) / (conductivityWattsPerMetreKelvin * solidAngleSteradians),
                heatCapacityJoulesPerCubicMetreKelvin * solidAngleSteradians * (b * b * b - a * a * a) / 3});
        }
        return this;
    }

    /** The ladder of the path. */
    public CauerLadder computeLadder() {
        double[] r = new double[pieces.size()];
        double[] c = new double[pieces.size() + 1];
        int nodes = 0;
        for (double[] piece : pieces) {
            c[nodes] += piece[1] / 2;
            if (piece[0] > 0) {
                if (c[nodes] == 0) {
                    // A resistance straight on another: one resistance.
                    r[nodes - 1] += piece[0];
                    continue;
                }
                r[nodes++] = piece[0];
            }
            c[nodes] += piece[1] / 2;
        }
        // What is left at the last node sits on the heat sink and stores nothing.
        return CauerLadder.of(Arrays.copyOf(r, nodes), Arrays.copyOf(c, nodes));
    }
}

package org.laddergate.thermal;

import java.util.Arrays;

/**
 * Cumulative structure function of a ladder: cumulative thermal capacitance over cumulative thermal resistance along
 * the heat path.
 *
 * <p>Definition: the ladder's C_k sits in the middle of the piece of the heat path that it stands for. Point k of the
 * function therefore lies at R_(k) = R_1 + ... + R_(k-1), C_(k) = C_1 + ... + C_(k-1) + C_k/2; the last point is the
 * end of the ladder. Between points ln C is linear in R, as for a path that spreads; below the first point the
 * function starts at R = 0.
 *
 * <p>Source: Protonotarios and Wing, Theory of nonuniform RC lines, IEEE Trans. Circuit Theory 14 (1967) 2; cumulative
 * and differential structure functions as in JESD51-14.
 *
 * <p>Error: of the ladder it is made from. At a vertical step (a thick metal) no finite ladder is right pointwise in C;
 * read R there.
 *
 * <p>Identities: both coordinates never decrease; the last point holds the ladder's total resistance and capacitance;
 * resistanceAt and capacitanceAt are inverse to each other between the points.
 *
 * <p>Cost: one pass to build, a binary search to read. Immutable.
 */
public final class StructureFunction {
    private final double[] resistances;
    private final double[] capacitances;

    private StructureFunction(double[] resistances, double[] capacitances) {
        this.resistances = resistances;
        this.capacitances = capacitances;
    }

    /** Structure function of a ladder. */
    public static StructureFunction of(CauerLadder ladder) {
        int n = ladder.size();
        double[] r = new double[n + 1];
        double[] c = new double[n + 1];
        cumulateInto(ladder.resistancesKelvinPerWatt(), ladder.capacitancesJoulesPerKelvin(), n, r, c);
        return new StructureFunction(r, c);
    }

    /** Of points already cumulated, taken over without copying. */
    static StructureFunction ofPoints(double[] resistances, double[] capacitances) {
        return new StructureFunction(resistances, capacitances);
    }

    /**
     * Points of the structure function.
     *
     * @param rungR rung resistances [K/W], first n used, not modified
     * @param rungC rung capacitances [J/K], not modified
     * @param outR  cumulative resistance [K/W], n + 1 points, overwritten
     * @param outC  cumulative capacitance [J/K], n + 1 points, overwritten
     */
    public static void cumulateInto(double[] rungR, double[] rungC, int n, double[] outR, double[] outC) {
        double r = 0;
        double c = 0;
        for (int k = 0; k < n; k++) {
            outR[k] = r;
            outC[k] = c + 0.5 * rungC[k];
            r += rungR[k];
            c += rungC[k];
        }
        outR[n] = r;
        outC[n] = c;
    }

    /** Number of points. */
    public int size() {
        return resistances.length;
    }

    /** Cumulative resistance of a point [K/W]. */
    public double resistanceKelvinPerWatt(int i) {
        return resistances[i];
    }

    /** Cumulative capacitance of a point [J/K]. */
    public double capacitanceJoulesPerKelvin(int i) {
        return capacitances[i];
    }

    public double totalResistanceKelvinPerWatt() {
        return resistances[resistances.length - 1];
    }

    public double totalCapacitanceJoulesPerKelvin() {
        return capacitances[capacitances.length - 1];
    }

    /**
     * Cumulative resistance where the path has gathered a capacitance [K/W]; 0 below the first point, the total above
     * the last. A bad joint adds resistance but hardly any capacitance: this is the reading to compare parts by.
     */
    public double resistanceAt(double capacitanceJoulesPerKelvin) {
        return resistanceAt(resistances, capacitances, resistances.length, capacitanceJoulesPerKelvin);
    }

    /** As {@link #resistanceAt(double)} on bare points. */
    public static double resistanceAt(double[] r, double[] c, int points, double capacitance) {
        if (!(capacitance > c[0])) {
            return 0;
        }
        if (capacitance >= c[points - 1]) {
            return r[points - 1];
        }
        int i = Arrays.binarySearch(c, 0, points, capacitance);
        if (i >= 0) {
            return r[i];
        }
        int above = -i - 1;
        double share = Math.log(capacitance / c[above - 1]) / Math.log(c[above] / c[above - 1]);
        return r[above - 1] + share * (r[above] - r[above - 1]);
    }

    /** Cumulative capacitance at a cumulative resistance [J/K]; the first and last point's beyond the ends. */
    public double capacitanceAt(double resistanceKelvinPerWatt) {
        int last = resistances.length - 1;
        if (!(resistanceKelvinPerWatt > 0)) {
            return capacitances[0];
        }
        if (resistanceKelvinPerWatt >= resistances[last]) {
            return capacitances[last];
        }
        int i = Arrays.binarySearch(resistances, resistanceKelvinPerWatt);
        if (i >= 0) {
            return capacitances[i];
        }
        int above = -i - 1;
        double share = (resistanceKelvinPerWatt - resistances[above - 1]) / (resistances[above] - resistances[above - 1]);
        return capacitances[above - 1] * Math.pow(capacitances[above] / capacitances[above - 1], share);
    }

    /**
     * Differential structure function between points i and i + 1: K = dC/dR = C ln-slope at the middle [W^2 s/K^2],
     * that is conductivity times heat capacity times the square of the cross-section.
     */
    public double differential(int i) {
        double slope = Math.log(capacitances[i + 1] / capacitances[i]) / (resistances[i + 1] - resistances[i]);
        return Math.sqrt(capacitances[i] * capacitances[i + 1]) * slope;
    }
}

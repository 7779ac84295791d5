package org.laddergate.measurement;

import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.QRDecomposition;
import org.apache.commons.math3.linear.SingularMatrixException;

/**
 * Junction temperature at the power step itself, which no sensor can see behind the switching transient.
 *
 * <p>Definition: early heat flow from an evenly heated face follows T(t) = T0 - b sqrt(t), b = 2 P/(A sqrt(pi k rho
 * c)); the next term is linear in t. T0, b and the linear term are fitted to the first part of the record, up to six
 * times its first time.
 *
 * <p>Source: Carslaw and Jaeger, Conduction of Heat in Solids (1959), section 2.9; JESD51-14 corrects the early
 * transient by the same law.
 *
 * <p>Domain: times ascending from the cut time on; valid while the heat is inside the first layer, t below about
 * d^2 rho c/(2 k).
 *
 * <p>Error: 0.1 % of the total rise on a silicon die from 40 us on (SquareRootStartTest); noise grows by about three.
 *
 * <p>Degenerate input: fewer than five samples in that stretch give NaN.
 */
public final class SquareRootStart {
    private static final double SPAN = 6;
    private static final int FEWEST = 5;

    private SquareRootStart() {}

    /**
     * Extrapolated temperature at time zero, in the unit of the values.
     *
     * @param timesSeconds since the power step [s], ascending, not modified
     * @param values       temperatures; NaN are left out
     */
    public static double extrapolate(double[] timesSeconds, double[] values) {
        int first = 0;
        while (first < values.length && Double.isNaN(values[first])) {
            first++;
        }
        int count = 0;
        for (int i = first; i < values.length && timesSeconds[i] <= SPAN * timesSeconds[first]; i++) {
            count += Double.isNaN(values[i]) ? 0 : 1;
        }
        if (count < FEWEST) {
            return Double.NaN;
        }
        double[][] x = new double[count][];
        double[] y = new double[count];
        int row = 0;
        for (int i = first; row < count; i++) {
            if (!Double.isNaN(values[i])) {
                double t = timesSeconds[i] / timesSeconds[first];
                x[row] = new double[] {1, Math.sqrt(t), t};
                y[row++] = values[i];
            }
        }
        try {
            return new QRDecomposition(new Array2DRowRealMatrix(x, false)).getSolver()
                    .solve(new ArrayRealVector(y, false)).getEntry(0);
        } catch (SingularMatrixException e) {
            return Double.NaN;
        }
    }
}

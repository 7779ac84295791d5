package org.laddergate.demo;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.laddergate.limits.Layer;
import org.laddergate.thermal.FosterNetwork;

/**
 * The true physics of an invented part: heat conduction in a stack of discs, reduced to a Foster network of the mean
 * temperature of the heated disc.
 *
 * <p>It shares no code with the conduction model that fault signatures are worked out with, on purpose: a screener must
 * not be tried on parts made by the model it has learnt from.
 *
 * <p>Definition: rho c dT/dt = div(k grad T) in r and z; every layer is a disc of its area; 1 W enters evenly through a
 * disc in the middle of the top; side walls and shoulders are adiabatic; the bottom gives heat to a coolant through a
 * film, or is isothermal. Voids are rings of still air.
 *
 * <p>Method: {@link ConductionGrid}; Galerkin projection of C dT/dt = -A T + f P on the solutions of (A + s C) x = f
 * for s = 0 and shifts s evenly spaced in log s (rational Krylov subspace, real shifts), orthonormal in the capacity
 * product; the small symmetric problem is diagonalised. The shifts reach from a tenth of the slowest rate the stack can
 * have to 1e7 / s, 2.2 a decade.
 *
 * <p>Source: Antoulas, Approximation of Large-Scale Dynamical Systems (2005), chapter 11.
 *
 * <p>Domain: at least one layer; heated area at most that of the first layer; film coefficient positive or infinite.
 *
 * <p>Error: see ConductionModelTest for the figures from 10 microseconds on, against exact one-dimensional solutions
 * and an independent two-dimensional program.
 *
 * <p>Identities: all stages are positive; the resistances, and the layer shares with the film, add up to the steady
 * resistance of the grid; in steady state all heat leaves through the bottom.
 *
 * <p>Cost: some twenty band factorisations of 1,000 to 3,000 cells. Immutable.
 */
final class ConductionModel {
    private static final double SHIFTS_PER_DECADE = 2.2;
    private static final double FASTEST_RATE = 1e7;
    private static final double NEGLIGIBLE = 1e-13;

    private final ConductionGrid grid;
    private final double[] steady;
    private final double[] shares;
    private final double slowestRate;

    private ConductionModel(List<Layer> layers, ConductionGrid grid) {
        this.grid = grid;
        this.steady = grid.conductance(0).solve(grid.source());
        this.shares = grid.dissipation(steady);
        double capacity = Arrays.stream(grid.capacity()).sum();
        this.slowestRate = 1 / (capacity * steadyResistanceKelvinPerWatt());
    }

    /**
     * @param layers                 from the heated face down; regions and roles do not matter here
     * @param heatedAreaSquareMetres [m^2]
     * @param film                   film coefficient under the last layer [W/(m^2 K)]; infinite for an isothermal face
     * @param rings                  voids
     */
    static ConductionModel of(List<Layer> layers, double heatedAreaSquareMetres, double film, List<AirRing> rings) {
        return of(layers, heatedAreaSquareMetres, film, rings, 1);
    }

    static ConductionModel of(List<Layer> layers, double heatedAreaSquareMetres, double film, List<AirRing> rings,
            double refinement) {
        if (layers.isEmpty() || !(heatedAreaSquareMetres > 0)
                || heatedAreaSquareMetres > layers.get(0).areaSquareMetres() * (1 + 1e-9)) {
            throw new IllegalArgumentException("the heated " + heatedAreaSquareMetres
                    + " m2 must lie on the first layer");
        }
        if (!(film > 0)) {
            throw new IllegalArgumentException("film coefficient " + film + " is not positive");
        }
        return new ConductionModel(layers, new ConductionGrid(layers, heatedAreaSquareMetres, film, rings, refinement));
    }

    /** Steady resistance from the mean of the heated disc to the coolant [K/W]. */
    double steadyResistanceKelvinPerWatt() {
        return dot(steady, grid.source());
    }

    /** Share of a layer in the steady resistance: its dissipation for 1 W [K/W]. */
    double shareKelvinPerWatt(int layer) {
        return shares[layer];
    }

    /** Share of the film [K/W]; zero for an isothermal bottom. */
    double filmShareKelvinPerWatt() {
        return shares[shares.length - 1];
    }

    /** Heat that leaves in steady state for each watt that enters [1]. */
    double steadyHeatOut() {
        return grid.heatOut(steady);
    }

    int cells() {
        return grid.cells();
    }

    /** Step response of the mean temperature of the heated disc. */
    FosterNetwork network() {
        return network(SHIFTS_PER_DECADE);
    }

    FosterNetwork network(double shiftsPerDecade) {
        double[] source = grid.source();
        List<double[]> basis = basis(shiftsPerDecade);
        int n = basis.size();
        double[][] reduced = new double[n][n];
        double[] load = new double[n];
        for (int i = 0; i < n; i++) {
            double[] image = grid.apply(basis.get(i));
            load[i] = dot(basis.get(i), source);
            for (int j = 0; j <= i; j++) {
                reduced[i][j] = dot(basis.get(j), image);
                reduced[j][i] = reduced[i][j];
            }
        }
        EigenDecomposition modes = new EigenDecomposition(new Array2DRowRealMatrix(reduced, false));
        double total = steadyResistanceKelvinPerWatt();
        double[] resistances = new double[n];
        double[] timeConstants = new double[n];
        int kept = 0;
        for (int k = 0; k < n; k++) {
            double rate = modes.getRealEigenvalue(k);
            double gain = dot(modes.getEigenvector(k).toArray(), load);
            if (rate > 0 && gain * gain / rate > NEGLIGIBLE * total) {
                resistances[kept] = gain * gain / rate;
                timeConstants[kept++] = 1 / rate;
            }
        }
        return FosterNetwork.of(Arrays.copyOf(resistances, kept), Arrays.copyOf(timeConstants, kept));
    }

    private List<double[]> basis(double shiftsPerDecade) {
        List<double[]> basis = new ArrayList<>();
        append(basis, steady.clone());
        double lowest = 0.1 * slowestRate;
        int count = (int) Math.ceil(shiftsPerDecade * Math.log10(FASTEST_RATE / lowest));
        for (int k = 0; k <= count; k++) {
            double shift = lowest * Math.pow(FASTEST_RATE / lowest, (double) k / count);
            append(basis, grid.conductance(shift).solve(grid.source()));
        }
        return basis;
    }

    /** Appends orthonormally in the capacity product; two passes make it orthogonal to rounding (Kahan and Parlett). */
    private void append(List<double[]> basis, double[] v) {
        double[] capacity = grid.capacity();
        double before = Math.sqrt(weighted(v, v, capacity));
        for (int pass = 0; pass < 2; pass++) {
            for (double[] b : basis) {
                double c = weighted(b, v, capacity);
                for (int i = 0; i < v.length; i++) {
                    v[i] -= c * b[i];
                }
            }
        }
        double norm = Math.sqrt(weighted(v, v, capacity));
        if (norm > 1e-10 * before) {
            for (int i = 0; i < v.length; i++) {
                v[i] /= norm;
            }
            basis.add(v);
        }
    }

    private static double weighted(double[] a, double[] b, double[] weights) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i] * weights[i];
        }
        return sum;
    }

    private static double dot(double[] a, double[] b) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i];
        }
        return sum;
    }
}

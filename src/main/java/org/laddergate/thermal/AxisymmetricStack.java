package org.laddergate.thermal;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;

/**
 * Heat conduction in a stack of discs heated evenly on a disc of the top face: the step response as a Foster network.
 *
 * <p>Definition: rho c dT/dt = div(k grad T) in r and z; adiabatic walls and shoulders; the bottom face loses heat
 * through a film coefficient; the temperature answered for is the mean over the heated disc. A void is a ring of one
 * slab filled with still air through its whole thickness.
 *
 * <p>Method: finite volumes on a tensor grid with lines on every interface, radius and void edge; the resulting C
 * dT/dt = -A T + f P (C diagonal, A symmetric positive definite) is projected onto the solutions of (A + s C) x = f
 * for s = 0 and shifts spread over all time scales (rational Krylov, a Galerkin projection), and the small problem is
 * diagonalised. All stages are positive, and the steady state is exactly that of the grid.
 *
 * <p>Source: finite volumes as in Patankar, Numerical Heat Transfer and Fluid Flow (1980), chapter 4, with the harmonic
 * mean at interfaces; projection as in Antoulas, Approximation of Large-Scale Dynamical Systems (2005), chapter 11.
 *
 * <p>Domain: at least one slab, heated radius at most that of the first slab, film coefficient positive.
 *
 * <p>Error: measured in AxisymmetricStackTest against exact one-dimensional solutions and an independent
 * two-dimensional program. Voids: shapes hold better than sizes.
 *
 * <p>Identities: the resistances of the network add up to the steady resistance, and so do the slab shares and the
 * film.
 *
 * <p>Cost: about a thousand cells, some twenty banded Cholesky factorisations; tens of milliseconds. Immutable.
 */
public final class AxisymmetricStack {
    /** Still air: handbook values at room temperature, from memory [W/(m K)], [J/(m^3 K)]. */
    static final double AIR_CONDUCTIVITY = 0.026;
    static final double AIR_HEAT_CAPACITY = 1.2e3;

    private static final int SHIFTS = 20;

    private final FosterNetwork network;
    private final double[] shares;
    private final double filmShare;
    private final int cells;

    /**
     * A ring of a slab that conducts like still air.
     *
     * @param slab              index of the slab; -1 for a ring that only shapes the grid
     * @param innerRadiusMetres inner radius [m]
     * @param outerRadiusMetres outer radius [m]
     */
    public record Void(int slab, double innerRadiusMetres, double outerRadiusMetres) {}

    private AxisymmetricStack(StackGrid grid) {
        this.cells = grid.cells();
        double[] capacity = grid.capacity();
        double[] source = grid.source();
        List<double[]> basis = new ArrayList<>();
        double[] steady = grid.conductance(0).solve(source);
        append(basis, steady.clone(), capacity);
        double[] shifts = grid.shifts(SHIFTS);
        for (double s : shifts) {
            append(basis, grid.conductance(s).solve(source), capacity);
        }
        int n = basis.size();
        double[][] reduced = new double[n][n];
        double[] load = new double[n];
        for (int i = 0; i < n; i++) {
            double[] image = grid.apply(basis.get(i));
            load[i] = InnerProduct.of(basis.get(i), source);
            for (int j = 0; j <= i; j++) {
                reduced[i][j] = InnerProduct.of(basis.get(j), image);
                reduced[j][i] = reduced[i][j];
            }
        }
        EigenDecomposition eigen = new EigenDecomposition(new Array2DRowRealMatrix(reduced, false));
        double[] r = new double[n];
        double[] tau = new double[n];
        int kept = 0;
        for (int k = 0; k < n; k++) {
            double rate = eigen.getRealEigenvalue(k);
            double[] v = eigen.getEigenvector(k).toArray();
            double gain = InnerProduct.of(v, load);
            double resistance = gain * gain / rate;
            if (rate > 0 && resistance > 1e-12 * InnerProduct.of(steady, source)) {
                r[kept] = resistance;
                tau[kept++] = 1 / rate;
            }
        }
        this.network = FosterNetwork.of(java.util.Arrays.copyOf(r, kept), java.util.Arrays.copyOf(tau, kept));
        this.shares = grid.dissipation(steady);
        this.filmShare = grid.filmDissipation(steady);
    }

    /**
     * @param slabs                       from the heated face down
     * @param heatedRadiusMetres          radius of the heated disc [m]
     * @param filmWattsPerSquareMetreKelvin film coefficient under the last slab [W/(m^2 K)]
     * @param voids                       rings of still air; may be empty
     */
    public static AxisymmetricStack of(List<StackSlab> slabs, double heatedRadiusMetres,
            double filmWattsPerSquareMetreKelvin, List<Void> voids) {
        if (slabs.isEmpty() || !(heatedRadiusMetres > 0)
                || heatedRadiusMetres > slabs.get(0).radiusMetres() * (1 + 1e-9)) {
            throw new IllegalArgumentException("the heated disc of " + heatedRadiusMetres
                    + " m must lie on the first slab");
        }
        if (!(filmWattsPerSquareMetreKelvin > 0 && Double.isFinite(filmWattsPerSquareMetreKelvin))) {
            throw new IllegalArgumentException("film coefficient " + filmWattsPerSquareMetreKelvin + " is not positive");
        }
        return new AxisymmetricStack(new StackGrid(slabs, heatedRadiusMetres, filmWattsPerSquareMetreKelvin, voids));
    }

    /** Step response of the mean temperature of the heated disc. */
    public FosterNetwork network() {
        return network;
    }

    /** Share of the steady resistance that lies in a slab, its dissipation integral of k |grad T|^2 over P^2 [K/W]. */
    public double shareKelvinPerWatt(int slab) {
        return shares[slab];
    }

    /** Share of the film under the last slab [K/W]. */
    public double filmShareKelvinPerWatt() {
        return filmShare;
    }

    /** Number of finite volumes. */
    public int cells() {
        return cells;
    }

    /** Appends v to the basis, orthonormal in the capacity inner product; twice is enough (Kahan and Parlett). */
    private static void append(List<double[]> basis, double[] v, double[] capacity) {
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
        if (norm > 1e-9 * before) {
            for (int i = 0; i < v.length; i++) {
                v[i] /= norm;
            }
            basis.add(v);
        }
    }

    private static double weighted(double[] a, double[] b, double[] w) {
        double sum = 0;
        for (int i = 0; i < a.length; i++) {
            sum += a[i] * b[i] * w[i];
        }
        return sum;
    }
}

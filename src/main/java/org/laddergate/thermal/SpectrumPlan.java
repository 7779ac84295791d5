package org.laddergate.thermal;

import java.util.Arrays;

/**
 * Non-negative time constant spectrum straight from a cooling curve.
 *
 * <p>Definition: T(t) = T_end + drift t + P sum a_j (1 - exp(-t_h/tau_j)) exp(-t/tau_j) with a_j &gt;= 0 on a fixed
 * grid of tau_j, twelve a decade from a thousandth of the first time to ten times the last. Minimised is sum ((T_i -
 * model_i)/sigma_i)^2 + weight^2 |D2 u|^2 + ridge^2 |u|^2, offset and drift free, D2 second differences:
 * <ul>
 * <li>without a reference u_j = a_j/s_j, s_j = sqrt(tau_j/(tau_j + tau_0)): early heat flow makes a spectrum that
 * falls as sqrt(tau) towards short times, and so does the penalty;</li>
 * <li>with a reference spectrum b, u_j = (a_j - b_j)/(b_j + floor): a part is drawn towards its golden family as far
 * as the noise leaves it open, so that healthy parts scatter little and a fault still shows.</li>
 * </ul>
 *
 * <p>Why not a numerical derivative and iterative deconvolution: they smear plateaus; figures in
 * docs/decisions/0003-spectrum-smoothing.md.
 *
 * <p>Source: regularised non-negative inversion, e.g. Provencher, Comput. Phys. Commun. 27 (1982) 213; smoothing
 * weight by the discrepancy principle, Morozov (1966).
 *
 * <p>Domain: times strictly increasing, at least 8; sigmas positive.
 *
 * <p>Cost: a plan costs n^3; a solution costs n (times) + n^2 and allocates nothing. Immutable; the workspace is not.
 */
public final class SpectrumPlan {
    /** Grid density per decade. */
    public static final int PER_DECADE = 12;
    private static final double EARLIEST = 1e-3;
    private static final double LATEST = 10;
    /** Relative size of the parts of a reference spectrum below which all count alike. */
    private static final double FLOOR = 0.02;

    private static final double LEAST_RIDGE = 1e-11;
    private static final double UNSEEN_WEIGHT = 10;

    private final double[] tau;
    private final double[] scale;
    private final double[] base;
    private final double[][] reduced;
    private final double[] pull;
    private final NonNegativeQuadratic quadratic;
    private final double[][] kernel;
    private final double[] weights;
    private final double[][] freeDirections;

    private SpectrumPlan(double[] times, double[] sigma, double powerWatts, double heatingSeconds, double[] reference,
            double weight, double ridge) {
        this.tau = grid(times[0], times[times.length - 1]);
        int n = tau.length;
        int m = times.length;
        this.scale = new double[n];
        boolean referred = reference.length > 0;
        double largest = Arrays.stream(reference).max().orElse(0);
        for (int j = 0; j < n; j++) {
            scale[j] = referred ? reference[j] + FLOOR * largest * shape(times, j) : shape(times, j);
        }
        this.base = referred ? reference.clone() : new double[n];
        this.weights = Arrays.stream(sigma).map(s -> 1 / s).toArray();
        this.kernel = new double[n][m];
        for (int j = 0; j < n; j++) {
            double heated = Double.isInfinite(heatingSeconds) ? 1 : -Math.expm1(-heatingSeconds / tau[j]);
            for (int i = 0; i < m; i++) {
                kernel[j][i] = powerWatts * heated * Math.exp(-times[i] / tau[j]);
            }
        }
        this.freeDirections = orthonormalLine(times, weights);
        this.reduced = new double[n][];
        for (int j = 0; j < n; j++) {
            double[] row = new double[m];
            for (int i = 0; i < m; i++) {
                row[i] = kernel[j][i] * weights[i] * scale[j];
            }
            removeLine(row);
            reduced[j] = row;
        }
        double[][] h = new double[n][n];
        for (int j = 0; j < n; j++) {
            for (int k = 0; k <= j; k++) {
                h[j][k] = InnerProduct.of(reduced[j], reduced[k]);
                h[k][j] = h[j][k];
            }
        }
        double steepest = 0;
        for (int j = 0; j < n; j++) {
            steepest = Math.max(steepest, h[j][j]);
        }
        // Neighbouring time constants are nearly the same curve: without a least ridge H is singular in double precision.
        double[][] penalty = penalty(n, referred ? 0 : unseen(times[0]), weight,
                Math.max(ridge, Math.sqrt(LEAST_RIDGE * steepest)));
        for (int j = 0; j < n; j++) {
            for (int k = 0; k < n; k++) {
                h[j][k] += penalty[j][k];
            }
        }
        // x = a/scale >= 0; the penalty acts on x - base/scale.
        this.pull = new double[n];
        for (int j = 0; j < n; j++) {
            for (int k = 0; k < n; k++) {
                pull[j] += penalty[j][k] * base[k] / scale[k];
            }
        }
        this.quadratic = new NonNegativeQuadratic(h, probablyZero(referred));
        // Weighted rows are orthogonal to offset and drift already; one more weight makes them act on a bare curve.
        for (int j = 0; j < n; j++) {
            for (int i = 0; i < m; i++) {
                reduced[j][i] *= weights[i];
            }
        }
    }

    /**
     * Plan without a reference, for the golden mean curve.
     *
     * @param timesSeconds      times since switch-off [s], not modified
     * @param sigmaKelvin       standard deviation of each value [K], not modified
     * @param powerWatts        power step [W]
     * @param heatingSeconds    heating pulse before [s]; may be infinite
     * @param smoothing         weight of the second differences [1]
     */
    public static SpectrumPlan smooth(double[] timesSeconds, double[] sigmaKelvin, double powerWatts,
            double heatingSeconds, double smoothing) {
        return new SpectrumPlan(timesSeconds, sigmaKelvin, powerWatts, heatingSeconds, new double[0], smoothing,
                1e-6 * smoothing);
    }

    /**
     * Plan that draws towards a reference spectrum, for single parts.
     *
     * @param reference amplitudes on this grid [K/W], from a plan with the same first and last time; empty: none
     * @param smoothing weight of the second differences of the relative deviation [1]
     * @param ridge     weight of the relative deviation itself [1]
     */
    public static SpectrumPlan drawnTowards(double[] reference, double[] timesSeconds, double[] sigmaKelvin,
            double powerWatts, double heatingSeconds, double smoothing, double ridge) {
        return new SpectrumPlan(timesSeconds, sigmaKelvin, powerWatts, heatingSeconds, reference, smoothing, ridge);
    }

    private static double[] grid(double first, double last) {
        int n = (int) Math.ceil(Math.log10(LATEST * last / (EARLIEST * first)) * PER_DECADE) + 1;
        double[] out = new double[n];
        for (int j = 0; j < n; j++) {
            out[j] = EARLIEST * first * Math.pow(10, (double) j / PER_DECADE);
        }
        return out;
    }

    private double shape(double[] times, int j) {
        double turn = 30 * times[0];
        return Math.sqrt(tau[j] / (tau[j] + turn));
    }

    private boolean[] probablyZero(boolean referred) {
        boolean[] zero = new boolean[tau.length];
        for (int j = 0; j < zero.length; j++) {
            zero[j] = referred && base[j] == 0;
        }
        return zero;
    }

    /**
     * Number of time constants that have died away before the first sample: only the square-root law speaks for them.
     */
    private int unseen(double firstSeconds) {
        int count = 0;
        while (count < tau.length && tau[count] < firstSeconds / 4) {
            count++;
        }
        return count;
    }

    /** Second differences, a ridge, and first differences among the unseen time constants. */
    private static double[][] penalty(int n, int unseen, double weight, double ridge) {
        double[][] p = new double[n][n];
        for (int j = 0; j < unseen; j++) {
            double w = UNSEEN_WEIGHT * weight * weight;
            p[j][j] += w;
            p[j + 1][j + 1] += w;
            p[j][j + 1] -= w;
            p[j + 1][j] -= w;
        }
        for (int j = 1; j + 1 < n; j++) {
            int[] at = {j - 1, j, j + 1};
            double[] d = {1, -2, 1};
            for (int a = 0; a < 3; a++) {
                for (int b = 0; b < 3; b++) {
                    p[at[a]][at[b]] += weight * weight * d[a] * d[b];
                }
            }
        }
        for (int j = 0; j < n; j++) {
            p[j][j] += ridge * ridge;
        }
        return p;
    }

    /** Weighted constant and line, orthonormal. */
    private static double[][] orthonormalLine(double[] times, double[] weights) {
        int m = times.length;
        double[] one = weights.clone();
        double[] line = new double[m];
        for (int i = 0; i < m; i++) {
            line[i] = weights[i] * times[i];
        }
        normalise(one);
        double c = InnerProduct.of(one, line);
        for (int i = 0; i < m; i++) {
            line[i] -= c * one[i];
        }
        normalise(line);
        return new double[][] {one, line};
    }

    private static void normalise(double[] v) {
        double norm = Math.sqrt(InnerProduct.of(v, v));
        for (int i = 0; i < v.length; i++) {
            v[i] /= norm;
        }
    }

    private void removeLine(double[] row) {
        for (double[] d : freeDirections) {
            double c = InnerProduct.of(row, d);
            for (int i = 0; i < row.length; i++) {
                row[i] -= c * d[i];
            }
        }
    }

    /** Scratch arrays of one caller. */
    public static final class Workspace {
        private final double[] linear;
        private final double[] x;
        private final NonNegativeQuadratic.Workspace inner;

        Workspace(int size) {
            linear = new double[size];
            x = new double[size];
            inner = new NonNegativeQuadratic.Workspace(size);
        }
    }

    public Workspace newWorkspace() {
        return new Workspace(tau.length);
    }

    /** Number of time constants. */
    public int size() {
        return tau.length;
    }

    /** Time constants, ascending [s]. */
    public double[] timeConstantsSeconds() {
        return tau.clone();
    }

    /**
     * Solves for the spectrum of one curve.
     *
     * @param temperatures  curve at the plan's times [K or deg C], not modified
     * @param out           amplitudes a_j [K/W], length {@link #size()}, overwritten
     * @return exchanges of the active set
     */
    public int solveInto(double[] temperatures, double[] out, Workspace work) {
        for (int j = 0; j < tau.length; j++) {
            work.linear[j] = InnerProduct.of(reduced[j], temperatures) + pull[j];
        }
        int rounds = quadratic.minimiseInto(work.linear, work.x, work.inner);
        for (int j = 0; j < tau.length; j++) {
            out[j] = work.x[j] * scale[j];
        }
        return rounds;
    }

    /** Root mean square misfit of a spectrum in units of sigma, offset and drift taken out [1]. */
    public double misfit(double[] temperatures, double[] amplitudes) {
        double[] r = new double[temperatures.length];
        for (int i = 0; i < r.length; i++) {
            r[i] = temperatures[i];
            for (int j = 0; j < tau.length; j++) {
                r[i] -= amplitudes[j] * kernel[j][i];
            }
            r[i] *= weights[i];
        }
        removeLine(r);
        return Math.sqrt(InnerProduct.of(r, r) / r.length);
    }
}

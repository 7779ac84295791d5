package org.laddergate.thermal;

import java.util.Arrays;

/**
 * Converts a Foster network into the Cauer ladder of the same impedance.
 *
 * <p>Definition: Z(s) = sum R_j/(1 + s tau_j) = sum w_j/(s + lambda_j), lambda = 1/tau, w = R/tau, is developed into
 * the continued fraction of {@link CauerLadder}.
 *
 * <p>Method: the array (q_k, e_k) of the Stieltjes continued fraction is built by adding one pole after the other,
 * largest lambda first. Before a pole is added at the origin, the origin is moved to it by delta = (tau_new -
 * tau_old)/(tau_new tau_old); both steps only add, multiply and divide positive numbers, so every element keeps full
 * relative accuracy. The textbook recursion subtracts and needs hundreds of digits for a hundred stages. Stages of
 * zero resistance are left out and equal time constants are merged: they have no ladder of their own.
 *
 * <p>Source: differential quotient-difference steps, Fernando and Parlett, Numer. Math. 67 (1994) 191; recovering
 * recursion coefficients by adding nodes, Laurie, J. Comput. Appl. Math. 112 (1999) 165.
 *
 * <p>Domain: as {@link FosterNetwork}, at least one stage of positive resistance.
 *
 * <p>Error: below 1e-12 relative on every element up to 200 stages over 12 decades (FosterToCauerTest).
 *
 * <p>Identities: the ladder's resistances add up to those of the network; C_1 = 1/sum w.
 *
 * <p>Cost: about 3 n^2/2 divisions; no allocation with a {@link Workspace}. Stateless.
 */
public final class FosterToCauer {

    /** Scratch arrays for networks of up to a number of stages. Not thread-safe. */
    public static final class Workspace {
        private final double[] q;
        private final double[] e;
        private final double[] tau;
        private final double[] r;

        public Workspace(int maximumStages) {
            q = new double[maximumStages];
            e = new double[maximumStages];
            tau = new double[maximumStages];
            r = new double[maximumStages];
        }
    }

    private FosterToCauer() {}

    /** The ladder of a network. */
    public static CauerLadder computeLadder(FosterNetwork network) {
        int n = network.size();
        Integer[] order = new Integer[n];
        Arrays.setAll(order, i -> i);
        Arrays.sort(order, (a, b) -> Double.compare(network.timeConstantSeconds(a), network.timeConstantSeconds(b)));
        double[] r = new double[n];
        double[] tau = new double[n];
        for (int i = 0; i < n; i++) {
            r[i] = network.resistanceKelvinPerWatt(order[i]);
            tau[i] = network.timeConstantSeconds(order[i]);
        }
        double[] outR = new double[n];
        double[] outC = new double[n];
        int rungs = computeLadderInto(r, tau, n, outR, outC, new Workspace(n));
        return CauerLadder.of(Arrays.copyOf(outR, rungs), Arrays.copyOf(outC, rungs));
    }

    /**
     * The ladder of a network whose time constants ascend.
     *
     * @param resistances   R_j [K/W], first {@code stages} used, not modified; zeros are left out
     * @param timeConstants tau_j [s], ascending, not modified
     * @param stages        number of stages
     * @param outR          rung resistances [K/W], overwritten, must not alias an input
     * @param outC          rung capacitances [J/K], overwritten, must not alias an input
     * @return number of rungs
     * @throws IllegalArgumentException if no stage has a positive resistance
     */
    public static int computeLadderInto(double[] resistances, double[] timeConstants, int stages, double[] outR,
            double[] outC, Workspace work) {
        int n = compact(resistances, timeConstants, stages, work);
        if (n == 0) {
            throw new IllegalArgumentException("no stage has a positive resistance");
        }
        double[] q = work.q;
        double[] e = work.e;
        double[] tau = work.tau;
        double w0 = work.r[0] / tau[0];
        q[0] = 0;
        for (int k = 1; k < n; k++) {
            double shift = (tau[k] - tau[k - 1]) / (tau[k] * tau[k - 1]);
            w0 = addPole(q, e, k, shift, w0, work.r[k] / tau[k]);
        }
        shift(q, e, n, 1 / tau[n - 1]);
        outC[0] = 1 / w0;
        outR[0] = w0 / q[0];
        for (int k = 0; k < n - 1; k++) {
            double c = outR[k] * e[k];
            outC[k + 1] = 1 / c;
            outR[k + 1] = c / q[k + 1];
        }
        return n;
    }

    /**
     * Moves the origin by a shift and adds a pole of a weight there, both in one sweep: the shifted q_k and e_k are
     * used as soon as they are known.
     *
     * @param size number of poles so far
     * @return the new total weight
     */
    private static double addPole(double[] q, double[] e, int size, double shift, double w0, double weight) {
        double sum = w0 + weight;
        double t = shift;
        double d = 0;
        double previous = 0;
        for (int k = 0; k < size; k++) {
            double shifted = q[k] + t;
            double coupling = 0;
            if (k < size - 1) {
                double ratio = e[k] / shifted;
                coupling = ratio * q[k];
                t = shift + ratio * t;
            }
            if (k == 0) {
                d = shifted * weight / sum;
                q[0] = shifted * w0 / sum;
            } else {
                double scale = shifted / e[k - 1];
                q[k] = scale * previous;
                d = scale * d;
            }
            previous = coupling;
            e[k] = coupling + d;
        }
        q[size] = 0;
        return sum;
    }

    private static void shift(double[] q, double[] e, int size, double shift) {
        double t = shift;
        for (int k = 0; k < size; k++) {
            double shifted = q[k] + t;
            if (k < size - 1) {
                double ratio = e[k] / shifted;
                e[k] = ratio * q[k];
                t = shift + ratio * t;
            }
            q[k] = shifted;
        }
    }

    private static int compact(double[] resistances, double[] timeConstants, int stages, Workspace work) {
        int n = 0;
        for (int j = 0; j < stages; j++) {
            if (!(resistances[j] > 0)) {
                continue;
            }
            if (n > 0 && timeConstants[j] == work.tau[n - 1]) {
                work.r[n - 1] += resistances[j];
            } else {
                work.r[n] = resistances[j];
                work.tau[n++] = timeConstants[j];
            }
        }
        return n;
    }
}

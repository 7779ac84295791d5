package org.laddergate.thermal;

import java.util.Arrays;

/**
 * Converts a Cauer ladder into the Foster network of the same impedance.
 *
 * <p>Definition: with node temperatures scaled by sqrt(C) the ladder is x' = -B'B x, B upper bidiagonal with
 * b_kk = 1/sqrt(R_k C_k) and b_k,k+1 = -1/sqrt(R_k C_(k+1)). With B = U S V', 1/tau_j = sigma_j^2 and
 * R_j = v_1j^2/(C_1 sigma_j^2).
 *
 * <p>Method: singular values of the bidiagonal matrix by implicit QR with a shift that falls back to zero where a
 * shift would cost relative accuracy; only the first row of V is carried along. The matrix B'B itself is never formed:
 * its small eigenvalues, the slow time constants that matter most, would be lost below the rounding of the large ones.
 *
 * <p>Source: Demmel and Kahan, Accurate singular values of bidiagonal matrices, SIAM J. Sci. Stat. Comput. 11 (1990)
 * 873.
 *
 * <p>Domain: as {@link CauerLadder}.
 *
 * <p>Error: time constants to some n roundings each whatever their spread (CauerToFosterTest).
 *
 * <p>Identities: inverse of {@link FosterToCauer}; the resistances of both add up to the same.
 *
 * <p>Cost: of order n^2 operations, n some hundred: milliseconds. Stateless.
 */
public final class CauerToFoster {
    private static final double EPSILON = 1.1102230246251565e-16;
    private static final double TOLERANCE = 20 * EPSILON;

    private CauerToFoster() {}

    /** The network of a ladder, time constants ascending. */
    public static FosterNetwork computeNetwork(CauerLadder ladder) {
        int n = ladder.size();
        Bidiagonal b = new Bidiagonal(n);
        for (int k = 0; k < n; k++) {
            b.diagonal[k] = 1 / Math.sqrt(ladder.resistanceKelvinPerWatt(k) * ladder.capacitanceJoulesPerKelvin(k));
            if (k < n - 1) {
                b.above[k] = -1 / Math.sqrt(ladder.resistanceKelvinPerWatt(k) * ladder.capacitanceJoulesPerKelvin(k + 1));
            }
        }
        b.iterate();
        double c1 = ladder.capacitanceJoulesPerKelvin(0);
        Integer[] order = new Integer[n];
        Arrays.setAll(order, i -> i);
        Arrays.sort(order, (x, y) -> Double.compare(Math.abs(b.diagonal[y]), Math.abs(b.diagonal[x])));
        double[] r = new double[n];
        double[] tau = new double[n];
        for (int j = 0; j < n; j++) {
            double sigma = b.diagonal[order[j]];
            double v = b.firstRow[order[j]];
            tau[j] = 1 / (sigma * sigma);
            r[j] = v * v / c1 * tau[j];
        }
        return FosterNetwork.of(r, tau);
    }

    /** The iteration on one upper bidiagonal matrix, after Demmel and Kahan. */
    private static final class Bidiagonal {
        private static final int MOST_SWEEPS_PER_VALUE = 400;

        private final double[] diagonal;
        private final double[] above;
        private final double[] firstRow;
        private double c;
        private double s;
        private double r;

        Bidiagonal(int n) {
            diagonal = new double[n];
            above = new double[Math.max(0, n - 1)];
            firstRow = new double[n];
            firstRow[0] = 1;
        }

        void iterate() {
            int high = diagonal.length - 1;
            long sweeps = 0;
            boolean down = true;
            int lastLow = -1;
            int lastHigh = -1;
            while (high > 0) {
                if (++sweeps > (long) MOST_SWEEPS_PER_VALUE * diagonal.length) {
                    throw new IllegalStateException("singular values did not converge");
                }
                if (negligible(high - 1)) {
                    above[high - 1] = 0;
                    high--;
                    continue;
                }
                int low = high - 1;
                while (low > 0 && !negligible(low - 1)) {
                    low--;
                }
                if (low > 0) {
                    above[low - 1] = 0;
                }
                if (low != lastLow || high != lastHigh) {
                    down = Math.abs(diagonal[low]) >= Math.abs(diagonal[high]);
                    lastLow = low;
                    lastHigh = high;
                }
                if (converged(low, high, down)) {
                    continue;
                }
                double shift = shift(low, high, down);
                if (shift == 0) {
                    if (down) {
                        zeroShiftDown(low, high);
                    } else {
                        zeroShiftUp(low, high);
                    }
                } else if (down) {
                    shiftedDown(low, high, shift);
                } else {
                    shiftedUp(low, high, shift);
                }
            }
        }

        private boolean negligible(int k) {
            return Math.abs(above[k]) <= 0.1 * EPSILON * Math.min(Math.abs(diagonal[k]), Math.abs(diagonal[k + 1]));
        }

        private double smallest;
        private double largest;

        /**
         * Relative criteria of the paper; sets one negligible element to zero. Also bounds the block's singular
         * values.
         */
        private boolean converged(int low, int high, boolean down) {
            largest = 0;
            for (int k = low; k <= high; k++) {
                largest = Math.max(largest, Math.abs(diagonal[k]));
                if (k < high) {
                    largest = Math.max(largest, Math.abs(above[k]));
                }
            }
            if (down) {
                if (Math.abs(above[high - 1]) <= TOLERANCE * Math.abs(diagonal[high])) {
                    above[high - 1] = 0;
                    return true;
                }
                double mu = Math.abs(diagonal[low]);
                smallest = mu;
                for (int k = low; k < high; k++) {
                    if (Math.abs(above[k]) <= TOLERANCE * mu) {
                        above[k] = 0;
                        return true;
                    }
                    mu = Math.abs(diagonal[k + 1]) * (mu / (mu + Math.abs(above[k])));
                    smallest = Math.min(smallest, mu);
                }
            } else {
                if (Math.abs(above[low]) <= TOLERANCE * Math.abs(diagonal[low])) {
                    above[low] = 0;
                    return true;
                }
                double mu = Math.abs(diagonal[high]);
                smallest = mu;
                for (int k = high - 1; k >= low; k--) {
                    if (Math.abs(above[k]) <= TOLERANCE * mu) {
                        above[k] = 0;
                        return true;
                    }
                    mu = Math.abs(diagonal[k]) * (mu / (mu + Math.abs(above[k])));
                    smallest = Math.min(smallest, mu);
                }
            }
            return false;
        }

        private double shift(int low, int high, boolean down) {
            int n = diagonal.length;
            if (n * TOLERANCE * (smallest / largest) <= Math.max(EPSILON, 0.01 * TOLERANCE)) {
                return 0;
            }
            double start = Math.abs(down ? diagonal[low] : diagonal[high]);
            double shift = down ? smallerOf(diagonal[high - 1], above[high - 1], diagonal[high])
                    : smallerOf(diagonal[low], above[low], diagonal[low + 1]);
            return start > 0 && (shift / start) * (shift / start) < EPSILON ? 0 : shift;
        }

        /** Smaller singular value of the triangle (f g; 0 h). */
        private static double smallerOf(double f, double g, double h) {
            double fa = Math.abs(f);
            double ga = Math.abs(g);
            double ha = Math.abs(h);
            double min = Math.min(fa, ha);
            double max = Math.max(fa, ha);
            if (min == 0) {
                return 0;
            }
            if (ga < max) {
                double as = 1 + min / max;
                double at = (max - min) / max;
                double au = (ga / max) * (ga / max);
                double scale = 2 / (Math.sqrt(as * as + au) + Math.sqrt(at * at + au));
                return min * scale;
            }
            double au = max / ga;
            double as = 1 + min / max;
            double at = (max - min) / max;
            double scale = 1 / (Math.sqrt(1 + (as * au) * (as * au)) + Math.sqrt(1 + (at * au) * (at * au)));
            return 2 * (min * scale) * au;
        }

        /** Rotation with c f + s g = r, -s f + c g = 0. */
        private void rotate(double f, double g) {
            if (g == 0) {
                c = 1;
                s = 0;
                r = f;
            } else if (f == 0) {
                c = 0;
                s = 1;
                r = g;
            } else {
                r = Math.copySign(Math.hypot(f, g), f);
                c = f / r;
                s = g / r;
            }
        }

        private void turnRow(int k, double cosine, double sine) {
            double a = firstRow[k];
            double b = firstRow[k + 1];
            firstRow[k] = cosine * a + sine * b;
            firstRow[k + 1] = cosine * b - sine * a;
        }

        private void zeroShiftDown(int low, int high) {
            double cs = 1;
            double oldCs = 1;
            double oldSn = 0;
            for (int k = low; k < high; k++) {
                rotate(diagonal[k] * cs, above[k]);
                cs = c;
                double sn = s;
                if (k > low) {
                    above[k - 1] = oldSn * r;
                }
                turnRow(k, cs, sn);
                rotate(oldCs * r, diagonal[k + 1] * sn);
                oldCs = c;
                oldSn = s;
                diagonal[k] = r;
            }
            double h = diagonal[high] * cs;
            diagonal[high] = h * oldCs;
            above[high - 1] = h * oldSn;
        }

        private void zeroShiftUp(int low, int high) {
            double cs = 1;
            double oldCs = 1;
            double oldSn = 0;
            for (int k = high; k > low; k--) {
                rotate(diagonal[k] * cs, above[k - 1]);
                cs = c;
                double sn = s;
                if (k < high) {
                    above[k] = oldSn * r;
                }
                rotate(oldCs * r, diagonal[k - 1] * sn);
                oldCs = c;
                oldSn = s;
                diagonal[k] = r;
                turnRow(k - 1, oldCs, -oldSn);
            }
            double h = diagonal[low] * cs;
            diagonal[low] = h * oldCs;
            above[low] = h * oldSn;
        }

        private void shiftedDown(int low, int high, double shift) {
            double f = (Math.abs(diagonal[low]) - shift) * (Math.copySign(1, diagonal[low]) + shift / diagonal[low]);
            double g = above[low];
            for (int k = low; k < high; k++) {
                rotate(f, g);
                double cr = c;
                double sr = s;
                if (k > low) {
                    above[k - 1] = r;
                }
                f = cr * diagonal[k] + sr * above[k];
                above[k] = cr * above[k] - sr * diagonal[k];
                g = sr * diagonal[k + 1];
                diagonal[k + 1] = cr * diagonal[k + 1];
                turnRow(k, cr, sr);
                rotate(f, g);
                diagonal[k] = r;
                f = c * above[k] + s * diagonal[k + 1];
                diagonal[k + 1] = c * diagonal[k + 1] - s * above[k];
                if (k < high - 1) {
                    g = s * above[k + 1];
                    above[k + 1] = c * above[k + 1];
                }
            }
            above[high - 1] = f;
        }

        private void shiftedUp(int low, int high, double shift) {
            double f = (Math.abs(diagonal[high]) - shift) * (Math.copySign(1, diagonal[high]) + shift / diagonal[high]);
            double g = above[high - 1];
            for (int k = high; k > low; k--) {
                rotate(f, g);
                double cr = c;
                double sr = s;
                if (k < high) {
                    above[k] = r;
                }
                f = cr * diagonal[k] + sr * above[k - 1];
                above[k - 1] = cr * above[k - 1] - sr * diagonal[k];
                g = sr * diagonal[k - 1];
                diagonal[k - 1] = cr * diagonal[k - 1];
                rotate(f, g);
                diagonal[k] = r;
                f = c * above[k - 1] + s * diagonal[k - 1];
                diagonal[k - 1] = c * diagonal[k - 1] - s * above[k - 1];
                if (k > low + 1) {
                    g = s * above[k - 2];
                    above[k - 2] = c * above[k - 2];
                }
                turnRow(k - 1, c, -s);
            }
            above[low] = f;
        }
    }
}

package org.laddergate.thermal;

import java.util.Arrays;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.CholeskyDecomposition;

/**
 * Minimises x'Hx/2 - f'x over x &gt;= 0 for one positive definite H and many f.
 *
 * <p>Method: the inverse G of H is prepared. The free minimum is x = G f; components that would be negative are held
 * at zero, which changes the others by -G_K G_KK^-1 x_K; held components whose multiplier turns negative are let go
 * again. Each round exchanges all offenders at once, and falls back to one at a time if that does not settle (block
 * principal pivoting).
 *
 * <p>Source: Portugal, Judice and Vicente, Math. Comp. 63 (1994) 625; Lawson and Hanson, Solving Least Squares
 * Problems, chapter 23, for the conditions of the minimum.
 *
 * <p>Domain: H symmetric positive definite, condition below about 1e12.
 *
 * <p>Identities: x &gt;= 0, Hx - f &gt;= 0 and x'(Hx - f) = 0 to rounding; tested.
 *
 * <p>Cost: n^2 for the free minimum, then |K|^3/3 + n |K| for each exchange of the held set K; no allocation. The
 * object is immutable and shared, the workspace is not.
 */
final class NonNegativeQuadratic {
    private static final int MOST_ROUNDS = 400;

    private final int size;
    private final double[][] inverse;
    private final boolean[] probable;

    /**
     * @param h        positive definite, n by n, not modified
     * @param probable components likely to be zero: a good guess saves exchanges, a bad one costs some
     */
    NonNegativeQuadratic(double[][] h, boolean[] probable) {
        this.size = h.length;
        this.probable = probable.clone();
        this.inverse = new CholeskyDecomposition(new Array2DRowRealMatrix(h, true), 1e-6, 0).getSolver().getInverse()
                .getData();
    }

    /** Scratch arrays of one caller. */
    static final class Workspace {
        private final double[] free;
        private final boolean[] held;
        private final int[] index;
        private final double[][] block;
        private final double[] multiplier;

        Workspace(int size) {
            free = new double[size];
            held = new boolean[size];
            index = new int[size];
            block = new double[size][size];
            multiplier = new double[size];
        }
    }

    /**
     * @param f   linear term, length n, not modified
     * @param x   minimiser, length n, overwritten
     * @return exchanges of the held set
     */
    int minimiseInto(double[] f, double[] x, Workspace w) {
        double scale = 0;
        for (int i = 0; i < size; i++) {
            double sum = InnerProduct.of(inverse[i], f);
            w.free[i] = sum;
            w.held[i] = probable[i];
            scale = Math.max(scale, Math.abs(sum));
        }
        double tolerance = 1e-12 * scale;
        int fewest = size + 1;
        int patience = 3;
        for (int round = 0; round < MOST_ROUNDS; round++) {
            int k = hold(x, w);
            int offenders = 0;
            int last = -1;
            for (int i = 0; i < size; i++) {
                if (!w.held[i] && x[i] < -tolerance) {
                    offenders++;
                    last = i;
                }
            }
            for (int j = 0; j < k; j++) {
                if (w.multiplier[j] < 0) {
                    offenders++;
                    last = Math.max(last, w.index[j]);
                }
            }
            if (offenders == 0) {
                for (int i = 0; i < size; i++) {
                    x[i] = Math.max(0, x[i]);
                }
                return round;
            }
            if (offenders < fewest) {
                fewest = offenders;
                patience = 3;
            } else {
                patience--;
            }
            exchange(x, w, k, tolerance, patience > 0 ? -1 : last);
        }
        for (int i = 0; i < size; i++) {
            x[i] = Math.max(0, x[i]);
        }
        return MOST_ROUNDS;
    }

    private void exchange(double[] x, Workspace w, int k, double tolerance, int only) {
        for (int j = 0; j < k; j++) {
            if (w.multiplier[j] < 0 && (only < 0 || only == w.index[j])) {
                w.held[w.index[j]] = false;
            }
        }
        for (int i = 0; i < size; i++) {
            boolean wasHeld = Arrays.binarySearch(w.index, 0, k, i) >= 0;
            if (!wasHeld && x[i] < -tolerance && (only < 0 || only == i)) {
                w.held[i] = true;
            }
        }
    }

    /** Solution with the held components at zero; leaves their multipliers (Hx - f) in the workspace. */
    private int hold(double[] x, Workspace w) {
        int k = 0;
        for (int i = 0; i < size; i++) {
            if (w.held[i]) {
                w.index[k++] = i;
            }
        }
        System.arraycopy(w.free, 0, x, 0, size);
        if (k == 0) {
            return 0;
        }
        for (int a = 0; a < k; a++) {
            for (int b = 0; b <= a; b++) {
                w.block[a][b] = inverse[w.index[a]][w.index[b]];
            }
            w.multiplier[a] = -w.free[w.index[a]];
        }
        solve(w.block, w.multiplier, k);
        for (int a = 0; a < k; a++) {
            double[] row = inverse[w.index[a]];
            double m = w.multiplier[a];
            for (int i = 0; i < size; i++) {
                x[i] += row[i] * m;
            }
        }
        for (int a = 0; a < k; a++) {
            x[w.index[a]] = 0;
        }
        return k;
    }

    /** Cholesky solution in place on the lower half. */
    private static void solve(double[][] a, double[] b, int n) {
        for (int i = 0; i < n; i++) {
            for (int j = 0; j <= i; j++) {
                double sum = a[i][j];
                for (int k = 0; k < j; k++) {
                    sum -= a[i][k] * a[j][k];
                }
                a[i][j] = i == j ? Math.sqrt(Math.max(sum, 1e-300)) : sum / a[j][j];
            }
        }
        for (int i = 0; i < n; i++) {
            double sum = b[i];
            for (int k = 0; k < i; k++) {
                sum -= a[i][k] * b[k];
            }
            b[i] = sum / a[i][i];
        }
        for (int i = n - 1; i >= 0; i--) {
            double sum = b[i];
            for (int k = i + 1; k < n; k++) {
                sum -= a[k][i] * b[k];
            }
            b[i] = sum / a[i][i];
        }
    }
}

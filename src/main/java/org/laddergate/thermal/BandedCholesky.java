package org.laddergate.thermal;

/**
 * Cholesky factorisation of a symmetric positive definite band matrix, A = L L', lower band stored by rows.
 *
 * <p>Source: Golub and Van Loan, Matrix Computations, section on band systems. Cost n b^2 for the factor, 4 n b for a
 * solution. Not thread-safe while being filled; after {@link #factor()} solving is.
 */
final class BandedCholesky {
    private final int size;
    private final int band;
    private final double[][] rows;

    /** @param band half bandwidth: entry (i, j) may be non-zero for |i - j| &lt;= band */
    BandedCholesky(int size, int band) {
        this.size = size;
        this.band = band;
        this.rows = new double[size][band + 1];
    }

    /** Adds to entry (i, j), j &lt;= i. */
    void add(int i, int j, double value) {
        rows[i][j - i + band] += value;
    }

    void factor() {
        for (int i = 0; i < size; i++) {
            double[] ri = rows[i];
            int first = Math.max(0, i - band);
            for (int j = first; j <= i; j++) {
                double[] rj = rows[j];
                double sum = ri[j - i + band];
                int from = Math.max(first, j - band);
                int oi = band - i;
                int oj = band - j;
                for (int k = from; k < j; k++) {
                    sum -= ri[k + oi] * rj[k + oj];
                }
                if (j < i) {
                    ri[j + oi] = sum / rj[band];
                } else {
                    if (!(sum > 0)) {
                        throw new IllegalStateException("matrix is not positive definite at row " + i);
                    }
                    ri[band] = Math.sqrt(sum);
                }
            }
        }
    }

    /** Solves A x = b with a new array; b is not modified. */
    double[] solve(double[] b) {
        double[] x = b.clone();
        for (int i = 0; i < size; i++) {
            double[] r = rows[i];
            double sum = x[i];
            for (int k = Math.max(0, i - band); k < i; k++) {
                sum -= r[k - i + band] * x[k];
            }
            x[i] = sum / r[band];
        }
        for (int i = size - 1; i >= 0; i--) {
            double[] r = rows[i];
            x[i] /= r[band];
            for (int k = Math.max(0, i - band); k < i; k++) {
                x[k] -= r[k - i + band] * x[i];
            }
        }
        return x;
    }
}

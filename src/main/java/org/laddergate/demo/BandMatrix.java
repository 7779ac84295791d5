package org.laddergate.demo;

/**
 * Symmetric positive definite band matrix and its Cholesky factor A = L L', lower band stored by columns.
 *
 * <p>Method: left-looking by columns; the inner loop adds a multiple of one column to another, which the compiler turns
 * into vector instructions (a row-wise dot product it does not).
 *
 * <p>Source: Golub and Van Loan, Matrix Computations (2013), section 4.3.5.
 *
 * <p>Cost: n b^2 additions and multiplications for the factor, 4 n b for a solution. Not thread-safe while being
 * filled.
 */
final class BandMatrix {
    private final int size;
    private final int band;
    private final double[][] columns;

    /** @param band half bandwidth: entry (i, j) may be non-zero for |i - j| &lt;= band */
    BandMatrix(int size, int band) {
        this.size = size;
        this.band = band;
        this.columns = new double[size][band + 1];
    }

    /** Adds to entry (i, j), j &lt;= i &lt;= j + band. */
    void add(int i, int j, double value) {
        columns[j][i - j] += value;
    }

    void factor() {
        for (int j = 0; j < size; j++) {
            double[] column = columns[j];
            for (int k = Math.max(0, j - band); k < j; k++) {
                double[] earlier = columns[k];
                subtract(column, earlier, j - k, earlier[j - k], band + 1 - (j - k));
            }
            if (!(column[0] > 0)) {
                throw new IllegalStateException("matrix is not positive definite at column " + j);
            }
            double pivot = Math.sqrt(column[0]);
            column[0] = pivot;
            for (int i = 1; i <= band; i++) {
                column[i] /= pivot;
            }
        }
    }

    private static void subtract(double[] column, double[] earlier, int offset, double factor, int count) {
        if (factor == 0) {
            return;
        }
        for (int i = 0; i < count; i++) {
            column[i] -= factor * earlier[i + offset];
        }
    }

    /** Solves A x = b with a new array; b is not modified. Call after {@link #factor()}. */
    double[] solve(double[] b) {
        double[] x = b.clone();
        for (int j = 0; j < size; j++) {
            double[] column = columns[j];
            x[j] /= column[0];
            int last = Math.min(band, size - 1 - j);
            for (int i = 1; i <= last; i++) {
                x[j + i] -= column[i] * x[j];
            }
        }
        for (int j = size - 1; j >= 0; j--) {
            double[] column = columns[j];
            int last = Math.min(band, size - 1 - j);
            double sum = x[j];
            for (int i = 1; i <= last; i++) {
                sum -= column[i] * x[j + i];
            }
            x[j] = sum / column[0];
        }
        return x;
    }
}

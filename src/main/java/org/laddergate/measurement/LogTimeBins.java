package org.laddergate.measurement;

/**
 * Fixed bins, equally wide in ln t, onto which every curve of a product is brought.
 *
 * <p>Definition: bin i holds the samples with edge(i) &lt;= t &lt; edge(i+1); its value is the mean of the samples
 * moved to the bin's centre along the local slope dT/d ln t, so that curves sampled at other times stay comparable. An
 * empty bin between filled ones takes the straight line in ln t between its neighbours; an empty bin at either end
 * stays NaN.
 *
 * <p>Domain: times strictly increasing and positive; samples outside the bins are ignored.
 *
 * <p>Error: the second-order term, about (bin width in ln t)^2/24 times d2T/d(ln t)^2; at 50 bins a decade below 1e-4
 * of that second derivative.
 *
 * <p>Cost: one pass over the samples and one over the bins, no allocation in the Into form. Immutable, safe to share.
 */
public final class LogTimeBins {
    private final double firstEdgeSeconds;
    private final double logWidth;
    private final double[] centresSeconds;

    private LogTimeBins(double firstEdgeSeconds, double logWidth, int size) {
        this.firstEdgeSeconds = firstEdgeSeconds;
        this.logWidth = logWidth;
        this.centresSeconds = new double[size];
        for (int i = 0; i < size; i++) {
            centresSeconds[i] = firstEdgeSeconds * Math.exp((i + 0.5) * logWidth);
        }
    }

    /**
     * Bins that start at {@code fromSeconds} and reach at most to {@code toSeconds}.
     *
     * @param fromSeconds first edge [s], positive
     * @param toSeconds   upper bound of the last edge [s], beyond the first
     * @param perDecade   bins per decade, 1 to 200
     */
    public static LogTimeBins spanning(double fromSeconds, double toSeconds, int perDecade) {
        if (!(fromSeconds > 0 && toSeconds > fromSeconds && Double.isFinite(toSeconds))) {
            throw new IllegalArgumentException("bins need 0 < from < to, got " + fromSeconds + " to " + toSeconds);
        }
        if (!(perDecade >= 1 && perDecade <= 200)) {
            throw new IllegalArgumentException("bins per decade " + perDecade + " is not in 1 to 200");
        }
        double width = Math.log(10) / perDecade;
        // A rounding allowance keeps the last bin when the span is a whole number of bins.
        int size = (int) Math.floor(Math.log(toSeconds / fromSeconds) / width + 1e-9);
        if (size < 1) {
            throw new IllegalArgumentException("from " + fromSeconds + " to " + toSeconds + " s is less than one bin");
        }
        return new LogTimeBins(fromSeconds, width, size);
    }

    public int size() {
        return centresSeconds.length;
    }

    public double firstEdgeSeconds() {
        return firstEdgeSeconds;
    }

    public double lastEdgeSeconds() {
        return firstEdgeSeconds * Math.exp(size() * logWidth);
    }

    /** Bins per decade. */
    public int perDecade() {
        return (int) Math.round(Math.log(10) / logWidth);
    }

    /** Geometric centre of a bin [s]. */
    public double centreSeconds(int i) {
        return centresSeconds[i];
    }

    public double[] centresSeconds() {
        return centresSeconds.clone();
    }

    /**
     * Brings a curve onto the bins.
     *
     * @param timesSeconds times [s], strictly increasing, not modified
     * @param values       values, same length, not modified
     * @param out          value at each bin centre, length {@link #size()}, overwritten; NaN where too many end bins
     *                     are empty
     * @param counts       samples in each bin, length {@link #size()}, overwritten
     * @return number of bins that hold at least one sample
     */
    public int binInto(double[] timesSeconds, double[] values, double[] out, int[] counts) {
        int bins = size();
        double[] meanLog = new double[bins];
        return binInto(timesSeconds, values, out, counts, meanLog);
    }

    /** As {@link #binInto(double[], double[], double[], int[])} with a scratch array of length {@link #size()}. */
    public int binInto(double[] timesSeconds, double[] values, double[] out, int[] counts, double[] scratch) {
        int bins = size();
        for (int i = 0; i < bins; i++) {
            out[i] = 0;
            counts[i] = 0;
            scratch[i] = 0;
        }
        double lastEdge = lastEdgeSeconds();
        int bin = 0;
        double nextEdge = firstEdgeSeconds * Math.exp(logWidth);
        for (int j = 0; j < timesSeconds.length; j++) {
            double t = timesSeconds[j];
            if (t < firstEdgeSeconds || t >= lastEdge) {
                continue;
            }
            while (t >= nextEdge && bin < bins - 1) {
                bin++;
                nextEdge = firstEdgeSeconds * Math.exp((bin + 1) * logWidth);
            }
            out[bin] += values[j];
            // The mean of t is cheaper than that of ln t and differs from it in second order only.
            scratch[bin] += t;
            counts[bin]++;
        }
        int filled = 0;
        for (int i = 0; i < bins; i++) {
            if (counts[i] > 0) {
                out[i] /= counts[i];
                scratch[i] = Math.log(scratch[i] / (counts[i] * centresSeconds[i])) + i * logWidth;
                filled++;
            }
        }
        moveToCentres(out, counts, scratch);
        fillGaps(out, counts);
        return filled;
    }

    private void moveToCentres(double[] out, int[] counts, double[] logTimes) {
        int previous = -1;
        double previousRaw = 0;
        for (int i = 0; i < counts.length; i++) {
            if (counts[i] == 0) {
                continue;
            }
            int next = i + 1;
            while (next < counts.length && counts[next] == 0) {
                next++;
            }
            double raw = out[i];
            double slope = 0;
            if (previous >= 0 && next < counts.length) {
                slope = (out[next] - previousRaw) / (logTimes[next] - logTimes[previous]);
            } else if (next < counts.length) {
                slope = (out[next] - raw) / (logTimes[next] - logTimes[i]);
            } else if (previous >= 0) {
                slope = (raw - previousRaw) / (logTimes[i] - logTimes[previous]);
            }
            out[i] = raw + slope * (i * logWidth - logTimes[i]);
            previous = i;
            previousRaw = raw;
        }
    }

    private void fillGaps(double[] out, int[] counts) {
        int previous = -1;
        for (int i = 0; i < counts.length; i++) {
            if (counts[i] > 0) {
                for (int k = previous + 1; k < i; k++) {
                    out[k] = previous < 0 ? Double.NaN
                            : out[previous] + (out[i] - out[previous]) * (k - previous) / (i - previous);
                }
                previous = i;
            }
        }
        for (int k = previous + 1; k < counts.length; k++) {
            out[k] = Double.NaN;
        }
        continueStart(out, counts);
        continueEnd(out, counts, previous);
    }

    private void continueStart(double[] out, int[] counts) {
        int first = 0;
        while (first < counts.length && counts[first] == 0) {
            first++;
        }
        // The line spans a third of a decade, so that the noise of single bins is not blown up.
        int second = first + Math.max(1, perDecade() / 3);
        if (first == 0 || first > perDecade() / 5 || second >= counts.length || Double.isNaN(out[second])) {
            return;
        }
        double slope = (out[second] - out[first]) / (root(second) - root(first));
        for (int k = 0; k < first; k++) {
            out[k] = out[first] + slope * (root(k) - root(first));
        }
    }

    private double root(int bin) {
        return Math.sqrt(centresSeconds[bin]);
    }

    private void continueEnd(double[] out, int[] counts, int last) {
        int earlier = last - Math.max(1, perDecade() / 5);
        if (last == counts.length - 1 || counts.length - 1 - last > perDecade() / 10 || earlier < 0) {
            return;
        }
        double slope = (out[last] - out[earlier]) / (last - earlier);
        for (int k = last + 1; k < counts.length; k++) {
            out[k] = out[last] + slope * (k - last);
        }
    }
}

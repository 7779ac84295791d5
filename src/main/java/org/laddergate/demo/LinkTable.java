package org.laddergate.demo;

import java.util.Arrays;

/** Conductances between cells, each with the layer it lies in. Grows while it is filled; not thread-safe until then. */
final class LinkTable {
    private int[] from;
    private int[] to;
    private int[] layer;
    private double[] wattsPerKelvin;
    private int size;

    LinkTable(int capacity) {
        from = new int[capacity];
        to = new int[capacity];
        layer = new int[capacity];
        wattsPerKelvin = new double[capacity];
    }

    void add(int a, int b, double conductance, int ofLayer) {
        if (size == from.length) {
            from = Arrays.copyOf(from, 2 * size);
            to = Arrays.copyOf(to, 2 * size);
            layer = Arrays.copyOf(layer, 2 * size);
            wattsPerKelvin = Arrays.copyOf(wattsPerKelvin, 2 * size);
        }
        from[size] = Math.min(a, b);
        to[size] = Math.max(a, b);
        layer[size] = ofLayer;
        wattsPerKelvin[size++] = conductance;
    }

    /** Largest distance of two linked cell numbers. */
    int band() {
        int band = 0;
        for (int l = 0; l < size; l++) {
            band = Math.max(band, to[l] - from[l]);
        }
        return band;
    }

    void addTo(BandMatrix matrix) {
        for (int l = 0; l < size; l++) {
            matrix.add(from[l], from[l], wattsPerKelvin[l]);
            matrix.add(to[l], to[l], wattsPerKelvin[l]);
            matrix.add(to[l], from[l], -wattsPerKelvin[l]);
        }
    }

    /** Adds the heat that leaves every cell through its links [W]. */
    void applyTo(double[] v, double[] out) {
        for (int l = 0; l < size; l++) {
            double flow = wattsPerKelvin[l] * (v[from[l]] - v[to[l]]);
            out[from[l]] += flow;
            out[to[l]] -= flow;
        }
    }

    /** Adds conductance times difference squared to the entry of each link's layer. */
    void dissipationInto(double[] v, double[] byLayer) {
        for (int l = 0; l < size; l++) {
            double difference = v[from[l]] - v[to[l]];
            byLayer[layer[l]] += wattsPerKelvin[l] * difference * difference;
        }
    }
}

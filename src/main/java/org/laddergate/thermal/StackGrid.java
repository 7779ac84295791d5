package org.laddergate.thermal;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.TreeSet;

/**
 * Finite-volume grid of an axisymmetric stack: numbering, conductances, capacities, heat source.
 *
 * <p>Cells are numbered plane by plane from the top, so the matrix is banded with the number of radial cells as half
 * bandwidth. Not part of the room's interface; see {@link AxisymmetricStack}.
 */
final class StackGrid {
    private static final double RADIUS_RESOLUTION = 1e-9;

    private final int planes;
    private final int rings;
    private final int[] slabOfPlane;
    private final double[] planeHeight;
    private final double[] ringArea;
    private final double[] ringCentre;
    private final double[] radii;
    private final double[][] conductivity;
    private final int[][] number;
    private final int cells;
    private final int slabs;
    private final double[] capacity;
    private final double[] source;
    private final double[] film;

    private final List<double[]> links = new ArrayList<>();

    StackGrid(List<StackSlab> slabs, double heatedRadius, double filmCoefficient, List<AxisymmetricStack.Void> voids) {
        this.slabs = slabs.size();
        this.radii = radialLines(slabs, heatedRadius, voids);
        this.rings = radii.length - 1;
        this.ringArea = new double[rings];
        this.ringCentre = new double[rings];
        for (int j = 0; j < rings; j++) {
            ringArea[j] = Math.PI * (radii[j + 1] * radii[j + 1] - radii[j] * radii[j]);
            ringCentre[j] = 0.5 * (radii[j] + radii[j + 1]);
        }
        List<Double> heights = new ArrayList<>();
        List<Integer> owners = new ArrayList<>();
        for (int s = 0; s < slabs.size(); s++) {
            for (double h : planeHeights(slabs.get(s).thicknessMetres(), s == 0)) {
                heights.add(h);
                owners.add(s);
            }
        }
        this.planes = heights.size();
        this.planeHeight = heights.stream().mapToDouble(Double::doubleValue).toArray();
        this.slabOfPlane = owners.stream().mapToInt(Integer::intValue).toArray();
        this.conductivity = new double[planes][rings];
        this.number = new int[planes][rings];
        double[] volumes = new double[planes * rings];
        int count = 0;
        for (int i = 0; i < planes; i++) {
            StackSlab slab = slabs.get(slabOfPlane[i]);
            for (int j = 0; j < rings; j++) {
                number[i][j] = -1;
                if (ringCentre[j] < slab.radiusMetres()) {
                    boolean empty = isVoid(voids, slabOfPlane[i], ringCentre[j]);
                    conductivity[i][j] = empty ? AxisymmetricStack.AIR_CONDUCTIVITY
                            : slab.conductivityWattsPerMetreKelvin();
                    volumes[count] = ringArea[j] * planeHeight[i] * (empty ? AxisymmetricStack.AIR_HEAT_CAPACITY
                            : slab.heatCapacityJoulesPerCubicMetreKelvin());
                    number[i][j] = count++;
                }
            }
        }
        this.cells = count;
        this.capacity = Arrays.copyOf(volumes, count);
        this.source = new double[count];
        double heated = 0;
        for (int j = 0; j < rings; j++) {
            heated += ringCentre[j] < heatedRadius ? ringArea[j] : 0;
        }
        for (int j = 0; j < rings; j++) {
            if (ringCentre[j] < heatedRadius) {
                source[number[0][j]] = ringArea[j] / heated;
            }
        }
        this.film = new double[count];
        link(filmCoefficient);
    }

    int cells() {
        return cells;
    }

    double[] capacity() {
        return capacity;
    }

    double[] source() {
        return source;
    }

    /** Shifts s [1/s] from below the slowest to the fastest rate that a record from a microsecond on can show. */
    double[] shifts(int count) {
        double[] out = new double[count];
        for (int k = 0; k < count; k++) {
            out[k] = Math.pow(10, -2.5 + 8.7 * k / (count - 1));
        }
        return out;
    }

    /** A + s C, factored. */
    BandedCholesky conductance(double shift) {
        BandedCholesky matrix = new BandedCholesky(cells, rings);
        for (int i = 0; i < cells; i++) {
            matrix.add(i, i, film[i] + shift * capacity[i]);
        }
        for (double[] l : links) {
            int a = (int) l[0];
            int b = (int) l[1];
            matrix.add(a, a, l[2]);
            matrix.add(b, b, l[2]);
            matrix.add(Math.max(a, b), Math.min(a, b), -l[2]);
        }
        matrix.factor();
        return matrix;
    }

    /** A v. */
    double[] apply(double[] v) {
        double[] out = new double[cells];
        for (int i = 0; i < cells; i++) {
            out[i] = film[i] * v[i];
        }
        for (double[] l : links) {
            int a = (int) l[0];
            int b = (int) l[1];
            double flow = l[2] * (v[a] - v[b]);
            out[a] += flow;
            out[b] -= flow;
        }
        return out;
    }

    /** Dissipation of each slab for a unit power [K/W]. */
    double[] dissipation(double[] steady) {
        double[] out = new double[slabs];
        for (double[] l : links) {
            double difference = steady[(int) l[0]] - steady[(int) l[1]];
            double heat = l[2] * difference * difference;
            out[(int) l[3]] += heat * l[5];
            out[(int) l[4]] += heat * (1 - l[5]);
        }
        int last = slabs - 1;
        for (int j = 0; j < rings; j++) {
            int n = number[planes - 1][j];
            if (n >= 0) {
                out[last] += film[n] * steady[n] * steady[n] * halfPlaneShare(j, film[n]);
            }
        }
        return out;
    }

    /** Dissipation of the film for a unit power [K/W]. */
    double filmDissipation(double[] steady) {
        double sum = 0;
        for (int j = 0; j < rings; j++) {
            int n = number[planes - 1][j];
            if (n >= 0) {
                sum += film[n] * steady[n] * steady[n] * (1 - halfPlaneShare(j, film[n]));
            }
        }
        return sum;
    }

    private double halfPlaneShare(int j, double conductance) {
        return conductance * planeHeight[planes - 1] / 2 / (conductivity[planes - 1][j] * ringArea[j]);
    }

    private void link(double filmCoefficient) {
        for (int i = 0; i < planes; i++) {
            for (int j = 0; j < rings; j++) {
                int n = number[i][j];
                if (n < 0) {
                    continue;
                }
                if (i + 1 < planes && number[i + 1][j] >= 0) {
                    double above = planeHeight[i] / 2 / conductivity[i][j];
                    double below = planeHeight[i + 1] / 2 / conductivity[i + 1][j];
                    links.add(new double[] {n, number[i + 1][j], ringArea[j] / (above + below), slabOfPlane[i],
                        slabOfPlane[i + 1], above / (above + below)});
                }
                if (j + 1 < rings && number[i][j + 1] >= 0) {
                    double inner = Math.log(radii[j + 1] / ringCentre[j]) / conductivity[i][j];
                    double outer = Math.log(ringCentre[j + 1] / radii[j + 1]) / conductivity[i][j + 1];
                    links.add(new double[] {n, number[i][j + 1], 2 * Math.PI * planeHeight[i] / (inner + outer),
                        slabOfPlane[i], slabOfPlane[i], 1});
                }
                if (i == planes - 1) {
                    film[n] = ringArea[j] / (planeHeight[i] / 2 / conductivity[i][j] + 1 / filmCoefficient);
                }
            }
        }
    }

    private static boolean isVoid(List<AxisymmetricStack.Void> voids, int slab, double radius) {
        for (AxisymmetricStack.Void v : voids) {
            if (v.slab() == slab && radius > v.innerRadiusMetres() && radius < v.outerRadiusMetres()) {
                return true;
            }
        }
        return false;
    }

    /** Planes get thicker away from the heated face, where the field is smooth. */
    private static double[] planeHeights(double thickness, boolean heated) {
        int n = heated ? 9 : thickness < 2e-4 ? 5 : thickness < 1e-3 ? 7 : 10;
        double power = heated ? 1.7 : thickness < 1e-3 ? 1 : 1.3;
        double[] out = new double[n];
        for (int i = 0; i < n; i++) {
            out[i] = thickness * (Math.pow((i + 1.0) / n, power) - Math.pow((double) i / n, power));
        }
        return out;
    }

    /** Lines on every radius that matters, and between them cells that get finer towards both ends. */
    private static double[] radialLines(List<StackSlab> slabs, double heatedRadius, List<AxisymmetricStack.Void> voids) {
        TreeSet<Double> marks = new TreeSet<>();
        slabs.forEach(s -> addMark(marks, s.radiusMetres()));
        addMark(marks, heatedRadius);
        double outermost = marks.last();
        for (AxisymmetricStack.Void v : voids) {
            addMark(marks, Math.min(outermost, v.innerRadiusMetres()));
            addMark(marks, Math.min(outermost, v.outerRadiusMetres()));
        }
        List<Double> lines = new ArrayList<>();
        lines.add(0.0);
        double from = 0;
        for (double to : marks) {
            double width = to - from;
            int n = width < 0.02 * to ? 1 : Math.max(3, (int) Math.ceil(8 * width / outermost + 7 * width / to));
            for (int i = 1; i <= n; i++) {
                lines.add(from + width * 0.5 * (1 - Math.cos(Math.PI * i / n)));
            }
            from = to;
        }
        return lines.stream().mapToDouble(Double::doubleValue).toArray();
    }

    private static void addMark(TreeSet<Double> marks, double radius) {
        if (radius <= RADIUS_RESOLUTION) {
            return;
        }
        Double near = marks.ceiling(radius * (1 - 1e-6));
        if (near == null || near > radius * (1 + 1e-6)) {
            marks.add(radius);
        }
    }
}

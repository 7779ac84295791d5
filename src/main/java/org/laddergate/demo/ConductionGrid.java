package org.laddergate.demo;

import java.util.Arrays;
import java.util.List;
import java.util.TreeMap;
import org.laddergate.limits.Layer;

/**
 * Finite volumes in r and z of a stack of discs: temperatures live on planes between the elements of z, so that the
 * heated face and every interface have their own, and in the middle of the rings of r, so that areas are exact.
 *
 * <p>Definition: C dT/dt = -A T + f P, C diagonal, A symmetric positive definite. Half the heat capacity of an element
 * goes to the plane above it and half to the one below; conduction along r lives on the planes in the same way.
 *
 * <p>Method: lines on every interface, radius and ring edge; between them the elements grow from a size set by the
 * detail at hand, see {@link #lines}. Conductances along r are those of the logarithmic profile between the rings' rms
 * radii. Cells are numbered along the shorter side of the grid, which is the half bandwidth.
 *
 * <p>Source: finite volumes as in Patankar, Numerical Heat Transfer and Fluid Flow (1980), chapter 4.
 *
 * <p>Error: see {@link ConductionModel}. Second order in the element size except at the edges of voids and of the
 * heated area, where the field is singular and the lines crowd.
 *
 * <p>Cost: 1,000 to 3,000 cells. Immutable.
 */
final class ConductionGrid {
    /** Still air at room temperature (handbook values, from memory) [W/(m K)], [J/(m^3 K)]. */
    static final double AIR_CONDUCTIVITY = 0.03;
    static final double AIR_HEAT_CAPACITY = 1.2e3;

    private static final double SAME_RADIUS = 1e-6;
    private static final int SAMPLES = 800;

    private final List<Layer> layers;
    private final List<AirRing> rings;
    private final double[] radii;
    private final double[] middles;
    private final double[] heights;
    private final int[] owners;
    private final int[][] numbers;
    private final int cells;
    private final int band;
    private final double[] capacity;
    private final double[] source;
    private final double[] ground;
    private final double[] groundFilmShare;
    private final LinkTable links;

    /**
     * @param film       film coefficient under the last layer [W/(m^2 K)]; infinite for an isothermal face
     * @param refinement factor on the number of elements, 1 for normal work [1]
     */
    ConductionGrid(List<Layer> layers, double heatedAreaSquareMetres, double film, List<AirRing> rings,
            double refinement) {
        this.layers = layers;
        this.rings = rings;
        double heatedRadius = Math.sqrt(heatedAreaSquareMetres / Math.PI);
        this.radii = radialLines(heatedRadius, refinement);
        this.middles = new double[radii.length - 1];
        for (int j = 0; j < middles.length; j++) {
            middles[j] = Math.sqrt((radii[j] * radii[j] + radii[j + 1] * radii[j + 1]) / 2);
        }
        double[][] slices = new double[layers.size()][];
        for (int l = 0; l < slices.length; l++) {
            slices[l] = slices(l, refinement);
        }
        this.heights = Arrays.stream(slices).flatMapToDouble(Arrays::stream).toArray();
        this.owners = new int[heights.length];
        for (int l = 0, i = 0; l < slices.length; i += slices[l].length, l++) {
            Arrays.fill(owners, i, i + slices[l].length, l);
        }
        this.numbers = number(Double.isInfinite(film));
        this.cells = count();
        this.capacity = new double[cells];
        this.source = new double[cells];
        this.ground = new double[cells];
        this.groundFilmShare = new double[cells];
        this.links = new LinkTable(4 * cells);
        fill(film, heatedRadius, heatedAreaSquareMetres);
        this.band = links.band();
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

    /** A + shift C, factored. */
    BandMatrix conductance(double shift) {
        BandMatrix matrix = new BandMatrix(cells, band);
        for (int i = 0; i < cells; i++) {
            matrix.add(i, i, ground[i] + shift * capacity[i]);
        }
        links.addTo(matrix);
        matrix.factor();
        return matrix;
    }

    /** A v. */
    double[] apply(double[] v) {
        double[] out = new double[cells];
        for (int i = 0; i < cells; i++) {
            out[i] = ground[i] * v[i];
        }
        links.applyTo(v, out);
        return out;
    }

    /** Heat that leaves through the bottom [W]. */
    double heatOut(double[] v) {
        double sum = 0;
        for (int i = 0; i < cells; i++) {
            sum += ground[i] * v[i];
        }
        return sum;
    }

    /** Dissipation integral of k |grad T|^2 in each layer and, last, in the film, for 1 W [K/W]. */
    double[] dissipation(double[] steady) {
        double[] out = new double[layers.size() + 1];
        links.dissipationInto(steady, out);
        for (int i = 0; i < cells; i++) {
            double heat = ground[i] * steady[i] * steady[i];
            out[layers.size()] += heat * groundFilmShare[i];
            out[layers.size() - 1] += heat * (1 - groundFilmShare[i]);
        }
        return out;
    }

    private void fill(double film, double heatedRadius, double heatedArea) {
        int planes = heights.length;
        for (int i = 0; i < planes; i++) {
            Layer layer = layers.get(owners[i]);
            for (int j = 0; j < middles.length && middles[j] < radius(layer); j++) {
                double k = conductivity(owners[i], j);
                double half = 0.5 * heights[i] * area(j) * (isAir(owners[i], j) ? AIR_HEAT_CAPACITY
                        : layer.heatCapacityJoulesPerCubicMetreKelvin());
                capacity[numbers[i][j]] += half;
                double along = k * area(j) / heights[i];
                if (i + 1 < planes || Double.isFinite(film)) {
                    capacity[numbers[i + 1][j]] += half;
                    links.add(numbers[i][j], numbers[i + 1][j], along, owners[i]);
                } else {
                    ground[numbers[i][j]] += along;
                }
                if (j + 1 < middles.length && middles[j + 1] < radius(layer)) {
                    sideways(i, j);
                }
            }
        }
        for (int j = 0; j < middles.length; j++) {
            if (middles[j] < heatedRadius) {
                source[numbers[0][j]] = area(j) / heatedArea;
            }
            if (Double.isFinite(film) && numbers[planes][j] >= 0) {
                ground[numbers[planes][j]] = film * area(j);
                groundFilmShare[numbers[planes][j]] = 1;
            }
        }
    }

    private void sideways(int element, int ring) {
        int layer = owners[element];
        double inner = Math.log(radii[ring + 1] / middles[ring]) / conductivity(layer, ring);
        double outer = Math.log(middles[ring + 1] / radii[ring + 1]) / conductivity(layer, ring + 1);
        double half = Math.PI * heights[element] / (inner + outer);
        links.add(numbers[element][ring], numbers[element][ring + 1], half, layer);
        if (numbers[element + 1][ring] >= 0) {
            links.add(numbers[element + 1][ring], numbers[element + 1][ring + 1], half, layer);
        }
    }

    /** Plane by plane or ring by ring, whichever makes the narrower band; an isothermal bottom plane has no numbers. */
    private int[][] number(boolean isothermal) {
        int planes = heights.length + 1;
        int[][] out = new int[planes][middles.length];
        boolean planeByPlane = middles.length <= planes;
        int next = 0;
        for (int n = 0; n < planes * middles.length; n++) {
            int i = planeByPlane ? n / middles.length : n % planes;
            int j = planeByPlane ? n % middles.length : n / planes;
            boolean above = i > 0 && middles[j] < radius(layers.get(owners[i - 1]));
            boolean below = i < planes - 1 && middles[j] < radius(layers.get(owners[i]));
            out[i][j] = (above || below) && !(isothermal && i == planes - 1) ? next++ : -1;
        }
        return out;
    }

    private int count() {
        return 1 + Arrays.stream(numbers).flatMapToInt(Arrays::stream).max().orElseThrow();
    }

    private double area(int ring) {
        return Math.PI * (radii[ring + 1] * radii[ring + 1] - radii[ring] * radii[ring]);
    }

    private double conductivity(int layer, int ring) {
        return isAir(layer, ring) ? AIR_CONDUCTIVITY : layers.get(layer).conductivityWattsPerMetreKelvin();
    }

    private boolean isAir(int layer, int ring) {
        for (AirRing r : rings) {
            if (r.layer() == layer && r.covers(middles[ring])) {
                return true;
            }
        }
        return false;
    }

    static double radius(Layer layer) {
        return Math.sqrt(layer.areaSquareMetres() / Math.PI);
    }

    /**
     * Elements of a layer. The heated layer starts with about a micrometre at the heated face, a small fraction of the
     * diffusion length at 10 microseconds; interfaces, where heat turns sideways, are finer than the inside. A poor
     * conductor between good ones carries heat straight through and needs few. No layer starts with elements longer
     * than a quarter of the diffusion length at the time when heat gets there.
     */
    private double[] slices(int index, double refinement) {
        double t = layers.get(index).thicknessMetres();
        double k = layers.get(index).conductivityWattsPerMetreKelvin();
        boolean bond = index > 0 && index + 1 < layers.size() && t < 3e-4
                && k < 0.7 * layers.get(index - 1).conductivityWattsPerMetreKelvin()
                && k < 0.7 * layers.get(index + 1).conductivityWattsPerMetreKelvin();
        double usual = (index == 0 ? 0.006 : bond ? 0.3 : 0.10) * t;
        boolean early = index == 0 || arrival(index) < usual;
        double top = Math.min(usual, arrival(index)) / refinement;
        double bottom = (bond ? 0.3 : 0.14) * t / refinement;
        double[] lines = lines(0, t, top, bottom, 0.3 * t / refinement,
                (early ? 0.12 : 0.4) / refinement);
        double[] out = new double[lines.length - 1];
        for (int i = 0; i < out.length; i++) {
            out[i] = lines[i + 1] - lines[i];
        }
        return out;
    }

    private double arrival(int index) {
        double depth = 0;
        for (Layer above : layers.subList(0, index)) {
            depth += above.thicknessMetres() / Math.sqrt(diffusivity(above));
        }
        return index == 0 ? Double.MAX_VALUE : 0.25 * depth * Math.sqrt(diffusivity(layers.get(index)));
    }

    private static double diffusivity(Layer layer) {
        return layer.conductivityWattsPerMetreKelvin() / layer.heatCapacityJoulesPerCubicMetreKelvin();
    }

    /** Lines on all edges; the finer the thinner the layers at that edge, and nowhere coarser than a fourteenth. */
    private double[] radialLines(double heatedRadius, double refinement) {
        double first = layers.get(0).thicknessMetres();
        double outermost = layers.stream().mapToDouble(ConductionGrid::radius).max().orElseThrow();
        TreeMap<Double, Double> marks = new TreeMap<>();
        for (int l = 0; l < layers.size(); l++) {
            double near = Math.min(layers.get(l).thicknessMetres(), radius(layers.get(l)) / 10);
            mark(marks, radius(layers.get(l)), Math.max(0.3 * near, radius(layers.get(l)) / 60));
        }
        mark(marks, heatedRadius, Math.min(0.2 * first, heatedRadius / 20));
        for (AirRing r : rings) {
            mark(marks, Math.min(outermost, r.innerRadiusMetres()), voidEdge(r));
            mark(marks, Math.min(outermost, r.outerRadiusMetres()), voidEdge(r));
        }
        double from = 0;
        double fromSize = outermost;
        double[] all = {0};
        for (var mark : marks.entrySet()) {
            double[] part = lines(from, mark.getKey(), fromSize / refinement, mark.getValue() / refinement,
                    outermost / 14 / refinement, 0.25 / refinement);
            int before = all.length;
            all = Arrays.copyOf(all, before + part.length - 1);
            System.arraycopy(part, 1, all, before, part.length - 1);
            from = mark.getKey();
            fromSize = mark.getValue();
        }
        return all;
    }

    /** The heat above a void edge turns within the thickness of its neighbours. */
    private double voidEdge(AirRing ring) {
        double thin = layers.stream().mapToDouble(Layer::thicknessMetres).min().orElseThrow();
        if (ring.layer() >= 0) {
            double above = ring.layer() == 0 ? Double.MAX_VALUE : layers.get(ring.layer() - 1).thicknessMetres();
            thin = 0.5 * Math.min(above, layers.get(Math.min(ring.layer() + 1, layers.size() - 1)).thicknessMetres());
        }
        return Math.max(0.3 * thin, ring.outerRadiusMetres() / 80);
    }

    private static void mark(TreeMap<Double, Double> marks, double radius, double size) {
        if (radius <= 0) {
            return;
        }
        Double near = marks.ceilingKey(radius * (1 - SAME_RADIUS));
        if (near != null && near <= radius * (1 + SAME_RADIUS)) {
            marks.merge(near, size, Math::min);
        } else {
            marks.put(radius, size);
        }
    }

    /**
     * Lines between two marks: the element size is {@code first} and {@code last} at the ends and grows by {@code
     * growth} per length inwards up to {@code largest}; the number is rounded up and the lines follow the integral of 1
     * / size.
     */
    static double[] lines(double from, double to, double first, double last, double largest, double growth) {
        double[] sum = new double[SAMPLES + 1];
        double step = (to - from) / SAMPLES;
        for (int s = 0; s < SAMPLES; s++) {
            double x = (s + 0.5) * step;
            double size = Math.min(largest, Math.min(first + growth * x, last + growth * (to - from - x)));
            sum[s + 1] = sum[s] + step / size;
        }
        int n = (int) Math.ceil(sum[SAMPLES] - 0.1);
        n = Math.max(1, n);
        double[] out = new double[n + 1];
        for (int i = 0, s = 0; i <= n; i++) {
            double goal = sum[SAMPLES] * i / n;
            while (s < SAMPLES - 1 && sum[s + 1] < goal) {
                s++;
            }
            out[i] = from + step * (s + (goal - sum[s]) / (sum[s + 1] - sum[s]));
        }
        out[n] = to;
        return out;
    }
}

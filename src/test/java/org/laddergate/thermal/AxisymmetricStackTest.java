package org.laddergate.thermal;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

class AxisymmetricStackTest {
    private static final double HUGE_FILM = 1e12;

    /** Carslaw and Jaeger (1959), rod with one end held: R_n = 8R/(pi^2 (2n-1)^2), tau_n = 4RC/(pi^2 (2n-1)^2). */
    @Test
    void network_oneSlabHeatedAllOver_rodSeries() {
        double radius = 5e-3;
        double area = Math.PI * radius * radius;
        StackSlab slab = new StackSlab(1e-3, radius, 100, 2e6);
        FosterNetwork network = AxisymmetricStack.of(List.of(slab), radius, HUGE_FILM, List.of()).network();
        double r = 1e-3 / (100 * area);
        double c = 2e6 * 1e-3 * area;
        for (double t = 1e-5; t < 0.1; t *= 2) {
            double exact = 0;
            for (int n = 1; n < 4000; n++) {
                double odd = Math.PI * Math.PI * (2 * n - 1) * (2 * n - 1);
                exact += 8 * r / odd * Math.exp(-t * odd / (4 * r * c));
            }
            // Nine planes a slab: half a cell of the first plane is missing from the resistance, the rest is second order.
            assertEquals(exact, network.coolingKelvinPerWatt(t, Double.POSITIVE_INFINITY), 0.01 * r, "at " + t + " s");
        }
    }

    /** Source: analytic-structures.json, four-layer stack; here as discs of 100 mm^2 heated all over. */
    @Test
    void network_fourLayersOneDimensional_exactCoolingWithinOnePercent() {
        double area = 1e-4;
        double radius = Math.sqrt(area / Math.PI);
        double[] r = {0.1, 0.04, 0.0513, 0.25};
        double[] c = {0.01245, 0.002, 0.688, 0.01};
        double[] thickness = {3e-4, 5e-5, 2e-3, 5e-5};
        List<StackSlab> slabs = new ArrayList<>();
        for (int i = 0; i < 4; i++) {
            slabs.add(new StackSlab(thickness[i], radius, thickness[i] / (r[i] * area), c[i] / (thickness[i] * area)));
        }
        FosterNetwork ours = AxisymmetricStack.of(slabs, radius, HUGE_FILM, List.of()).network();
        LayeredPath path = new LayeredPath(400);
        for (int i = 0; i < 4; i++) {
            path.layer(r[i], c[i]);
        }
        FosterNetwork exact = CauerToFoster.computeNetwork(path.computeLadder());
        for (double t = 4e-5; t < 1; t *= 1.7) {
            assertEquals(exact.coolingKelvinPerWatt(t, 2), ours.coolingKelvinPerWatt(t, 2), 0.01 * 0.4413, "at " + t + " s");
        }
        assertEquals(0.4413, ours.totalResistanceKelvinPerWatt(), 0.002 * 0.4413 + 0.5 * 0.1 * Math.pow(1.0 / 9, 1.7));
    }

    /**
     * Source: README of the reference population kestrel, made by another program with about 10,000 cells: total resistance,
     * layer shares and the resistance that voids add. Ours has a tenth of the cells; shapes matter to us more than sizes.
     */
    @Test
    void network_kestrel_totalSharesAndVoids() {
        List<StackSlab> slabs = new ArrayList<>();
        List<Double> shares = new ArrayList<>();
        for (String line : ReferenceData.lines("kestrel-layers.csv")) {
            String[] f = line.split(",");
            if (f[0].equals("name") || f[1].isEmpty()) {
                continue;
            }
            slabs.add(new StackSlab(Double.parseDouble(f[1]), Math.sqrt(Double.parseDouble(f[4]) / Math.PI),
                    Double.parseDouble(f[2]), Double.parseDouble(f[3])));
            shares.add(Double.parseDouble(f[6]));
        }
        double heated = Math.sqrt(2.209e-5 / Math.PI);
        AxisymmetricStack stack = AxisymmetricStack.of(slabs, heated, 16_000, List.of());
        assertEquals(0.55624, stack.network().totalResistanceKelvinPerWatt(), 0.015 * 0.55624);
        double sum = stack.filmShareKelvinPerWatt();
        for (int i = 0; i < slabs.size(); i++) {
            assertEquals(shares.get(i), stack.shareKelvinPerWatt(i), 0.03 * shares.get(i), "share of layer " + i);
            sum += stack.shareKelvinPerWatt(i);
        }
        assertEquals(1, sum / stack.network().totalResistanceKelvinPerWatt(), 1e-9);
        double attach = slabs.get(1).radiusMetres();
        double solder = slabs.get(5).radiusMetres();
        double tim = slabs.get(7).radiusMetres();
        added(slabs, heated, 1, 0, attach * Math.sqrt(0.15), 0.0418);
        added(slabs, heated, 1, attach * Math.sqrt(0.88), attach, 0.0111);
        added(slabs, heated, 5, 0, solder * Math.sqrt(0.12), 0.1075);
        added(slabs, heated, 7, 0, tim * Math.sqrt(0.4), 0.1455);
    }

    private static void added(List<StackSlab> slabs, double heated, int slab, double inner, double outer, double expected) {
        double faulty = AxisymmetricStack.of(slabs, heated, 16_000,
                List.of(new AxisymmetricStack.Void(slab, inner, outer))).network().totalResistanceKelvinPerWatt();
        double healthy = AxisymmetricStack.of(slabs, heated, 16_000,
                List.of(new AxisymmetricStack.Void(-1, inner, outer))).network().totalResistanceKelvinPerWatt();
        assertEquals(expected, faulty - healthy, 0.12 * expected, "void in layer " + slab);
    }
}

package org.laddergate.demo;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.laddergate.demo.DemoFault.Shape;
import org.laddergate.demo.Population.Spread;
import org.laddergate.limits.Layer;
import org.laddergate.limits.RegionRole;

/**
 * Invented products far from each other in size, build, pulse length and noise. None describes a real part; material
 * values are handbook values from memory, constant with temperature.
 */
final class InventedPopulations {
    /** A large thin silicon die soldered on a ceramic substrate, on a copper baseplate: slow, ample signal. */
    static final Population HERON = new Population("heron", List.of(
            layer("die", "die", 120, 100, 130, 1.65e6),
            layer("attach", "attach", 90, 100, 50, 1.65e6),
            layer("copper_top", "", 300, 26 * 30, 390, 3.44e6),
            layer("ceramic", "substrate", 380, 26 * 30, 24, 3.0e6),
            layer("copper_bottom", "", 300, 26 * 30, 390, 3.44e6),
            layer("solder", "solder", 250, 26 * 30, 50, 1.65e6),
            layer("baseplate", "", 3000, 40 * 40, 390, 3.44e6),
            layer("tim", "tim", 80, 40 * 40, 1.5, 2.2e6),
            layer("plate", "", 8000, 60 * 60, 180, 2.43e6)),
            88e-6, 10_000,
            Map.of("die", new Spread(0.012, 0), "attach", new Spread(0.07, 0.03), "ceramic", new Spread(0.01, 0.015),
                    "solder", new Spread(0.06, 0.02), "tim", new Spread(0.07, 0.03)),
            "tim", 0.02, new RawRecorder.Setup(150, 4, 3, 25, 0.03, 0.005, 2.5, 0.15, 9e-6, 0.06),
            classes(List.of("attach", "solder", "tim"), new DemoFault("substrate", Shape.THICK, 0.15)));

    /** A small die in a discrete package on a clamp block: one-digit watts, fast, low noise. */
    static final Population WREN = new Population("wren", List.of(
            layer("die", "die", 200, 2.2 * 2.2, 130, 1.65e6),
            layer("attach", "attach", 25, 2.2 * 2.2, 30, 2.0e6),
            layer("leadframe", "", 500, 6 * 7, 370, 3.43e6),
            layer("solder", "solder", 100, 6 * 7, 50, 1.65e6),
            layer("block", "", 2000, 12 * 12, 390, 3.44e6),
            layer("tim", "tim", 100, 12 * 12, 3, 2.2e6),
            layer("plate", "", 6000, 30 * 30, 180, 2.43e6)),
            3.9e-6, 8000,
            Map.of("die", new Spread(0.012, 0), "attach", new Spread(0.08, 0.03), "leadframe", new Spread(0.004, 0),
                    "solder", new Spread(0.07, 0.02), "tim", new Spread(0.06, 0.03)),
            "tim", 0.02, new RawRecorder.Setup(10, 0.5, 0.6, 28, 0.015, 0.002, 1.2, 0.15, 7e-6, 0.02),
            classes(List.of("attach", "solder", "tim")));

    /** A small sintered die on a flange, heated on part of its area, after a pulse too short to settle; noisy. */
    static final Population PLOVER = plover("plover", 0.1, 0.25);

    /** The same after a longer pulse. */
    static final Population PLOVER_1S = plover("plover1s", 1, 1);

    static final List<Population> ALL = List.of(HERON, WREN, PLOVER, PLOVER_1S);

    private InventedPopulations() {}

    private static Population plover(String name, double heatingSeconds, double recordSeconds) {
        return new Population(name, List.of(
                layer("die", "die", 100, 3 * 1.5, 350, 2.2e6),
                layer("attach", "attach", 20, 3 * 1.5, 180, 2.0e6),
                layer("flange", "", 1500, 10 * 6, 220, 2.7e6),
                layer("tim", "tim", 50, 10 * 6, 4, 2.2e6),
                layer("plate", "", 6000, 30 * 30, 180, 2.43e6)),
                2.7e-6, 12_000,
                Map.of("die", new Spread(0.015, 0), "attach", new Spread(0.08, 0.04), "flange", new Spread(0.003, 0.01),
                        "tim", new Spread(0.07, 0.03)),
                "tim", 0.02,
                new RawRecorder.Setup(20, heatingSeconds, recordSeconds, 22, 0.05, 0.01, 3, 0.15, 6e-6, 0.04),
                classes(List.of("attach", "tim")));
    }

    /** Faults of every region, from barely to grossly out of family, and two double ones. */
    private static List<List<DemoFault>> classes(List<String> regions, DemoFault... more) {
        List<List<DemoFault>> out = new ArrayList<>();
        for (String region : regions) {
            boolean interfaceMaterial = region.equals("tim");
            double[] centres = interfaceMaterial ? new double[] {0.15, 0.40} : new double[] {0.04, 0.08, 0.15, 0.30};
            double[] edges = interfaceMaterial ? new double[] {0.15, 0.40} : new double[] {0.05, 0.12, 0.25};
            double[] excess = interfaceMaterial ? new double[] {0.5, 1.0} : new double[] {0.3, 0.6};
            add(out, region, Shape.CENTRE_VOID, centres);
            add(out, region, Shape.EDGE_DELAMINATION, edges);
            add(out, region, Shape.THICK, excess);
        }
        for (DemoFault fault : more) {
            out.add(List.of(fault));
        }
        out.add(List.of(new DemoFault("attach", Shape.CENTRE_VOID, 0.08), new DemoFault("tim", Shape.THICK, 0.5)));
        out.add(List.of(new DemoFault("attach", Shape.CENTRE_VOID, 0.15), new DemoFault("tim", Shape.THICK, 1.0)));
        return out;
    }

    private static void add(List<List<DemoFault>> out, String region, Shape shape, double... severities) {
        for (double severity : severities) {
            out.add(List.of(new DemoFault(region, shape, severity)));
        }
    }

    private static Layer layer(String name, String region, double micrometres, double squareMillimetres,
            double conductivity, double heatCapacity) {
        return new Layer(name, region, RegionRole.PART, micrometres * 1e-6, squareMillimetres * 1e-6, conductivity,
                heatCapacity);
    }
}

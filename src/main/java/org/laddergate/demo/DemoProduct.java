package org.laddergate.demo;

import java.util.List;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Layer;
import org.laddergate.limits.Product;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Recipe;

/**
 * An invented product and how its invented parts differ. Nothing here was measured on or describes a real part.
 *
 * @param product           definition as an engineer would post it; its material values are a little wrong, as tables are
 * @param conductivityTruth factor from the table's conductivity to the true one, per layer [1]
 * @param thicknessSpread   relative one-sigma spread of each layer's thickness from part to part [1]
 * @param heatedShare       share of the first layer's area that is heated [1]
 * @param film              film coefficient under the last layer [W/(m^2 K)]
 * @param noiseKelvin       white noise of one raw sample at 1 MHz, one sigma [K]
 * @param noiseFloorKelvin  least noise of a log-time bin [K]
 */
record DemoProduct(Product product, double[] conductivityTruth, double[] thicknessSpread, double heatedShare, double film,
        double noiseKelvin, double noiseFloorKelvin) {

    /** A half-bridge power module with its own interface material, tested on a cold plate. */
    static final DemoProduct HB40 = new DemoProduct(
            new Product("hb40", Recipe.of(CurveKind.COOLING, 80, 4, 4e-5, 2), List.of(
                    layer("die", "die", 2.5e-4, 81, 130, 1.66e6),
                    layer("die attach", "attach", 8e-5, 81, 50, 1.65e6),
                    layer("top copper", "", 3e-4, 28 * 24, 390, 3.45e6),
                    layer("ceramic", "", 3.8e-4, 28 * 24, 24, 3.0e6),
                    layer("bottom copper", "", 3e-4, 28 * 24, 390, 3.45e6),
                    layer("system solder", "solder", 2e-4, 28 * 24, 50, 1.65e6),
                    layer("baseplate", "", 3e-3, 45 * 45, 390, 3.45e6),
                    layer("interface material", "tim", 8e-5, 45 * 45, 1.5, 2.2e6),
                    layer("cold plate", "", 1e-2, 60 * 60, 180, 2.43e6)),
                    List.of(), DecisionSettings.DEFAULT),
            new double[] {0.97, 1.05, 1.0, 0.96, 1.0, 0.95, 0.98, 1.08, 1.03},
            new double[] {0.010, 0.06, 0, 0.005, 0, 0.06, 0, 0.07, 0}, 0.87, 9000, 0.03, 0.004);

    /** A small single-die package, pressed on the tester's plate with the tester's own grease. */
    static final DemoProduct SD3 = new DemoProduct(
            new Product("sd3", Recipe.of(CurveKind.COOLING, 12, 1, 3e-5, 0.6), List.of(
                    layer("die", "die", 2.0e-4, 6.25, 130, 1.66e6),
                    layer("die attach", "attach", 3e-5, 6.25, 35, 1.9e6),
                    layer("leadframe", "", 1.2e-3, 90, 380, 3.45e6),
                    new Layer("grease of the tester", "contact", RegionRole.FIXTURE, 4e-5, 90e-6, 2.0, 2.2e6),
                    layer("tester plate", "", 8e-3, 900, 180, 2.43e6)),
                    List.of(), DecisionSettings.DEFAULT),
            new double[] {1.02, 0.94, 1.0, 1.06, 0.98},
            new double[] {0.010, 0.08, 0.004, 0.08, 0}, 0.80, 9000, 0.02, 0.003);

    static final List<DemoProduct> ALL = List.of(HB40, SD3);

    private static Layer layer(String name, String region, double thicknessMetres, double squareMillimetres,
            double conductivity, double heatCapacity) {
        return new Layer(name, region, RegionRole.PART, thicknessMetres, squareMillimetres * 1e-6, conductivity,
                heatCapacity);
    }

    String name() {
        return product.name();
    }
}

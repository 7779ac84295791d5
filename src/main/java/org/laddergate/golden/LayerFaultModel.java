package org.laddergate.golden;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.Layer;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.thermal.AxisymmetricStack;

/** The heat path of a product with a layer table: a conduction model calibrated to the golden curve. */
final class LayerFaultModel {
    /** Weighted misfit above which the layer table does not describe the product. */
    private static final double POOR_FIT = 5;
    private static final double CURVE_SHARE = 2e-5;

    private LayerFaultModel() {}

    static FaultModel of(Product product, GoldenCurves curves) {
        StackModel stack = new StackModel(product.layers());
        double[] times = curves.bins().centresSeconds();
        double[] sigma = new double[times.length];
        double drop = curves.mean()[0] - curves.mean()[times.length - 1];
        for (int i = 0; i < sigma.length; i++) {
            sigma[i] = 3 * Math.max(curves.noise()[i] / Math.sqrt(curves.units()), CURVE_SHARE * drop);
        }
        StackCalibration.Fit fit =
                new StackCalibration(stack, product.recipe(), times, curves.mean(), sigma).fit();
        FaultLibrary library =
                new FaultLibrary(stack, fit.parameters(), product.recipe(), times, curves.comparison());
        Map<String, Region> regions = regions(product.layers());
        List<FaultSignature> signatures = library.signatures(List.copyOf(regions.keySet()));
        AxisymmetricStack healthy = library.healthy();
        double[] golden = new double[regions.size()];
        int r = 0;
        for (String name : regions.keySet()) {
            for (int i = 0; i < product.layers().size(); i++) {
                if (product.layers().get(i).region().equals(name)) {
                    golden[r] += healthy.shareKelvinPerWatt(i);
                }
            }
            r++;
        }
        List<String> remarks = new ArrayList<>();
        remarks.add(String.format(Locale.ROOT, "The layer table, calibrated, meets the golden mean curve within %.2g "
                + "times what is expected.", fit.misfit()));
        if (fit.misfit() > POOR_FIT) {
            remarks.add("The layer table does not describe the golden curve well: check thicknesses, areas and materials; "
                    + "named regions may be wrong.");
        }
        return new FaultModel(List.copyOf(regions.values()), golden, signatures, library.spread(),
                healthy.network().resistancesKelvinPerWatt(), healthy.network().timeConstantsSeconds(), true, remarks);
    }

    /** Capacitance intervals of the regions by the 45 degree spreading rule (common practice, no source). */
    static Map<String, Region> regions(List<Layer> layers) {
        double side = Math.sqrt(layers.get(0).areaSquareMetres());
        double capacitance = 0;
        Map<String, Region> regions = new LinkedHashMap<>();
        for (Layer layer : layers) {
            double limit = Math.sqrt(layer.areaSquareMetres());
            side = Math.min(side, limit);
            double from = capacitance;
            double deep = Math.min(layer.thicknessMetres(), (limit - side) / 2);
            double wide = side + 2 * deep;
            double volume = deep * (side * side + side * wide + wide * wide) / 3
                    + (layer.thicknessMetres() - deep) * wide * wide;
            capacitance += volume * layer.heatCapacityJoulesPerCubicMetreKelvin();
            side = wide;
            if (!layer.region().isEmpty()) {
                Region earlier = regions.get(layer.region());
                regions.put(layer.region(), new Region(layer.region(), layer.role(),
                        earlier == null ? from : earlier.fromJoulesPerKelvin(), capacitance));
            }
        }
        return regions;
    }
}

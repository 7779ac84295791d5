package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import org.laddergate.limits.Layer;
import org.laddergate.thermal.AxisymmetricStack;
import org.laddergate.thermal.StackSlab;

/**
 * A product's layer table as a conduction model with adjustable material values.
 *
 * <p>Parameters, in this order: ln of a factor on each layer's conductivity; ln of a factor on each layer's heat
 * capacity; ln of the film coefficient under the last layer [W/(m^2 K)]; logit of the heated share of the first
 * layer's area.
 */
final class StackModel {
    private static final double TYPICAL_FILM = 1e4;
    private static final double TYPICAL_HEATED_LOGIT = 2.2;

    private final List<Layer> layers;

    StackModel(List<Layer> layers) {
        this.layers = List.copyOf(layers);
    }

    int layerCount() {
        return layers.size();
    }

    Layer layer(int i) {
        return layers.get(i);
    }

    int parameterCount() {
        return 2 * layers.size() + 2;
    }

    /** Values of the layer table as it stands. */
    double[] nominal() {
        double[] p = new double[parameterCount()];
        p[2 * layers.size()] = Math.log(TYPICAL_FILM);
        p[2 * layers.size() + 1] = TYPICAL_HEATED_LOGIT;
        return p;
    }

    /** How far each parameter may be off its nominal value, one sigma (handbook values of layers: common practice). */
    double[] spread() {
        double[] s = new double[parameterCount()];
        for (int i = 0; i < layers.size(); i++) {
            s[i] = 0.2;
            s[layers.size() + i] = 0.05;
        }
        s[2 * layers.size()] = 1.5;
        s[2 * layers.size() + 1] = 0.7;
        return s;
    }

    /** Radius of the disc of equal area [m]. */
    double radiusMetres(int layer) {
        return Math.sqrt(layers.get(layer).areaSquareMetres() / Math.PI);
    }

    /**
     * @param parameters    see above, not modified
     * @param resistance    factor on each layer's resistivity, 1 for none
     * @param voids         rings of still air
     */
    AxisymmetricStack build(double[] parameters, double[] resistance, List<AxisymmetricStack.Void> voids) {
        return build(parameters, resistance, noChange(), voids);
    }

    /**
     * As {@link #build(double[], double[], List)} with a factor on each layer's thickness.
     *
     * @param thickness factor on each layer's thickness, 1 for none
     */
    AxisymmetricStack build(double[] parameters, double[] resistance, double[] thickness,
            List<AxisymmetricStack.Void> voids) {
        int n = layers.size();
        List<StackSlab> slabs = new ArrayList<>();
        for (int i = 0; i < n; i++) {
            Layer l = layers.get(i);
            slabs.add(new StackSlab(l.thicknessMetres() * thickness[i], radiusMetres(i),
                    l.conductivityWattsPerMetreKelvin(), l.heatCapacityJoulesPerCubicMetreKelvin())
                    .scaled(Math.exp(parameters[i]) / resistance[i], Math.exp(parameters[n + i])));
        }
        double heatedShare = 1 / (1 + Math.exp(-parameters[2 * n + 1]));
        return AxisymmetricStack.of(slabs, radiusMetres(0) * Math.sqrt(heatedShare), Math.exp(parameters[2 * n]), voids);
    }

    double[] noChange() {
        double[] ones = new double[layers.size()];
        java.util.Arrays.fill(ones, 1);
        return ones;
    }
}

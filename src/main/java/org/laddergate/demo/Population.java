package org.laddergate.demo;

import java.util.List;
import java.util.Map;
import org.laddergate.limits.Layer;

/**
 * An invented product as a population of parts: how it is built, how parts differ, how they are measured, what goes
 * wrong.
 *
 * @param name                name of the product and of its folder
 * @param layers              nominal layers from the heated face down
 * @param heatedAreaSquareMetres                heated area on the first layer [m^2]
 * @param filmWattsPerSquareMetreKelvin         film under the last layer [W/(m^2 K)]
 * @param spread              of the layers that vary, by layer name
 * @param clampedLayer        layer whose thickness changes with every clamping
 * @param clampSpread         relative one-sigma spread of that [1]
 * @param setup               tester
 * @param faultClasses        one or two faults each, all in different layers
 */
record Population(String name, List<Layer> layers, double heatedAreaSquareMetres, double filmWattsPerSquareMetreKelvin,
        Map<String, Spread> spread, String clampedLayer, double clampSpread, RawRecorder.Setup setup,
        List<List<DemoFault>> faultClasses) {

    /** Relative one-sigma spread of a layer's thickness and conductivity from part to part [1]. */
    record Spread(double thickness, double conductivity) {
        static final Spread NONE = new Spread(0, 0);
    }

    Population {
        layers = List.copyOf(layers);
        spread = Map.copyOf(spread);
        faultClasses = List.copyOf(faultClasses);
    }

    /** Names of the regions, from the heated face down. */
    List<String> regions() {
        return layers.stream().map(Layer::region).filter(r -> !r.isEmpty()).distinct().toList();
    }

    Spread spreadOf(Layer layer) {
        return spread.getOrDefault(layer.name(), Spread.NONE);
    }

    /** The one layer that a fault of this region sits in. */
    int layerOfRegion(String region) {
        for (int i = 0; i < layers.size(); i++) {
            if (layers.get(i).region().equals(region)) {
                return i;
            }
        }
        throw new IllegalArgumentException("no layer of " + name + " is in region " + region);
    }
}

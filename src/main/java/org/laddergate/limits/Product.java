package org.laddergate.limits;

import java.util.List;
import org.laddergate.measurement.Recipe;

/**
 * What is measured and how it is built. Either {@code layers} or {@code regions} is given, the other is empty.
 *
 * @param name      product name as it appears in file names and addresses: letters, digits, dot, dash, underscore
 * @param recipe    how it is measured
 * @param layers    the heat path from the heated surface outwards, or empty
 * @param regions   explicit capacitance intervals, or empty
 * @param settings  how limits are learnt and verdicts are decided
 */
public record Product(String name, Recipe recipe, List<Layer> layers, List<Region> regions,
        DecisionSettings settings) {

    public Product {
        if (!name.matches("[A-Za-z0-9][A-Za-z0-9._-]{0,63}")) {
            throw new IllegalArgumentException("product name '" + name
                    + "' must be 1 to 64 letters, digits, dots, dashes or underscores and start with a letter or digit");
        }
        layers = List.copyOf(layers);
        regions = List.copyOf(regions);
        if (layers.isEmpty() == regions.isEmpty()) {
            throw new IllegalArgumentException("give either layers or regions");
        }
        if (regions.isEmpty() && layers.stream().allMatch(l -> l.region().isEmpty())) {
            throw new IllegalArgumentException("at least one layer must name a region");
        }
    }
}

package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Layer;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Recipe;

/** Product definition on the wire. Unknown fields are refused: a misspelt one must not be ignored. */
final class ProductJson {
    private static final List<String> LAYER_NUMBERS = List.of("thicknessMetres", "areaSquareMetres",
            "conductivityWattsPerMetreKelvin", "heatCapacityJoulesPerCubicMetreKelvin");
    private static final Map<String, Double> HARMLESS_LAYER = Map.of("thicknessMetres", 1e-3, "areaSquareMetres", 1e-4,
            "conductivityWattsPerMetreKelvin", 1.0, "heatCapacityJoulesPerCubicMetreKelvin", 1e6);

    private ProductJson() {}

    /** @throws InvalidInputException naming every fault */
    static Product read(String name, JsonNode body) {
        List<InputFault> faults = new ArrayList<>();
        JsonFields fields = new JsonFields(body, "", faults);
        if (!fields.has("recipe")) {
            fields.fault("recipe", "missing", "recipe is missing");
        }
        Optional<Recipe> recipe = fields.has("recipe") ? RecipeJson.read(fields.get("recipe"), "/recipe", faults)
                : Optional.empty();
        List<Layer> layers = fields.elements("layers", (node, at) -> layer(node, at, faults));
        List<Region> regions = fields.elements("regions", (node, at) -> region(node, at, faults));
        refuseSameNames(regions, faults);
        Optional<DecisionSettings> decision = fields.has("decision")
                ? DecisionJson.read(fields.get("decision"), "/decision", DecisionSettings.DEFAULT, faults)
                : Optional.of(DecisionSettings.DEFAULT);
        if (fields.has("product") && !fields.optionalText("product").equals(name)) {
            fields.fault("product", "differs", "product must be '" + name + "' as in the address");
        }
        fields.refuseUnknown();
        return product(name, recipe, layers, regions, decision, fields, faults);
    }

    private static Product product(String name, Optional<Recipe> recipe, List<Layer> layers, List<Region> regions,
            Optional<DecisionSettings> decision, JsonFields fields, List<InputFault> faults) {
        if (faults.isEmpty()) {
            try {
                return new Product(name, recipe.orElseThrow(), layers, regions, decision.orElseThrow());
            } catch (IllegalArgumentException e) {
                fields.fault("", "impossible_product", e.getMessage());
            }
        }
        throw new InvalidInputException(faults);
    }

    private static Optional<Layer> layer(JsonNode node, String pointer, List<InputFault> faults) {
        JsonFields fields = new JsonFields(node, pointer, faults);
        if (!node.isObject()) {
            return Optional.empty();
        }
        String name = fields.requiredText("name");
        String region = fields.optionalText("region");
        Optional<RegionRole> role = fields.word("role", RegionRole.values(), RegionRole::word, RegionRole.PART.word());
        if (fields.has("role") && region.isEmpty()) {
            fields.fault("role", "without_region", "a layer without region has no role");
        }
        Map<String, Double> numbers = new HashMap<>();
        LAYER_NUMBERS.forEach(field -> numbers.put(field, fields.requiredNumber(field)));
        fields.refuseUnknown();
        // A faulty name is noted already; the constructor shall look at the numbers.
        return fields.build(numbers, HARMLESS_LAYER, n -> new Layer(name.isBlank() ? "layer" : name, region,
                role.orElse(RegionRole.PART), n.get("thicknessMetres"), n.get("areaSquareMetres"),
                n.get("conductivityWattsPerMetreKelvin"), n.get("heatCapacityJoulesPerCubicMetreKelvin")));
    }

    private static Optional<Region> region(JsonNode node, String pointer, List<InputFault> faults) {
        int before = faults.size();
        JsonFields fields = new JsonFields(node, pointer, faults);
        if (!node.isObject()) {
            return Optional.empty();
        }
        String name = fields.requiredText("name");
        Optional<RegionRole> role = fields.word("role", RegionRole.values(), RegionRole::word, RegionRole.PART.word());
        double from = fields.requiredNumber("fromJoulesPerKelvin");
        double to = fields.requiredNumber("toJoulesPerKelvin");
        fields.refuseUnknown();
        try {
            return faults.size() > before ? Optional.empty()
                    : Optional.of(new Region(name, role.orElseThrow(), from, to));
        } catch (IllegalArgumentException e) {
            fields.fault("fromJoulesPerKelvin", "out_of_range", e.getMessage());
            return Optional.empty();
        }
    }

    private static void refuseSameNames(List<Region> regions, List<InputFault> faults) {
        Set<String> names = new HashSet<>();
        for (Region region : regions) {
            if (!names.add(region.name())) {
                faults.add(new InputFault("/regions", "duplicate_name",
                        "the region name '" + region.name() + "' is given twice"));
            }
        }
    }

    static byte[] bytes(Product product) {
        return Json.bytes(g -> write(g, product));
    }

    private static void write(JsonGenerator g, Product product) throws IOException {
        g.writeStartObject();
        g.writeStringField("product", product.name());
        RecipeJson.write(g, product.recipe());
        if (!product.layers().isEmpty()) {
            g.writeArrayFieldStart("layers");
            for (Layer layer : product.layers()) {
                write(g, layer);
            }
            g.writeEndArray();
        } else {
            g.writeArrayFieldStart("regions");
            for (Region region : product.regions()) {
                g.writeStartObject();
                g.writeStringField("name", region.name());
                g.writeStringField("role", region.role().word());
                g.writeNumberField("fromJoulesPerKelvin", region.fromJoulesPerKelvin());
                g.writeNumberField("toJoulesPerKelvin", region.toJoulesPerKelvin());
                g.writeEndObject();
            }
            g.writeEndArray();
        }
        DecisionJson.write(g, product.settings());
        g.writeEndObject();
    }

    private static void write(JsonGenerator g, Layer layer) throws IOException {
        g.writeStartObject();
        g.writeStringField("name", layer.name());
        if (!layer.region().isEmpty()) {
            g.writeStringField("region", layer.region());
            g.writeStringField("role", layer.role().word());
        }
        g.writeNumberField("thicknessMetres", layer.thicknessMetres());
        g.writeNumberField("areaSquareMetres", layer.areaSquareMetres());
        g.writeNumberField("conductivityWattsPerMetreKelvin", layer.conductivityWattsPerMetreKelvin());
        g.writeNumberField("heatCapacityJoulesPerCubicMetreKelvin", layer.heatCapacityJoulesPerCubicMetreKelvin());
        g.writeEndObject();
    }
}

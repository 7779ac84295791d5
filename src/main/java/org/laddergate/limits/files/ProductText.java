package org.laddergate.limits.files;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import org.laddergate.limits.DecisionRule;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Layer;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.TemperatureSensor;

/** A product definition as text. */
final class ProductText {
    private ProductText() {}

    static String write(Product product) {
        SectionText.Writer w = new SectionText.Writer().comment("Laddergate product, format 1")
                .value("product", product.name());
        recipe(w, product.recipe());
        settings(w, product.settings());
        if (!product.layers().isEmpty()) {
            w.section("layers").comment("from the heated face outwards; a layer without region is not judged")
                    .row("name", "region", "role", "thickness_m", "area_m2", "conductivity_W_per_mK",
                            "heat_capacity_J_per_m3K");
            for (Layer l : product.layers()) {
                w.row(l.name(), l.region(), l.role().word(), l.thicknessMetres(), l.areaSquareMetres(),
                        l.conductivityWattsPerMetreKelvin(), l.heatCapacityJoulesPerCubicMetreKelvin());
            }
        } else {
            w.section("regions").comment("intervals of cumulative capacitance")
                    .row("name", "role", "from_J_per_K", "to_J_per_K");
            product.regions().forEach(r -> w.row(r.name(), r.role().word(), r.fromJoulesPerKelvin(),
                    r.toJoulesPerKelvin()));
        }
        return w.toString();
    }

    static Product read(String text) {
        Map<String, SectionText.Section> s = SectionText.read(text);
        List<Layer> layers = new ArrayList<>();
        SectionText.Section l = s.get("layers");
        for (int i = 0; l != null && i < l.rowCount(); i++) {
            layers.add(new Layer(l.cell(i, "name"), l.cell(i, "region"), role(l.cell(i, "role")),
                    l.number(i, "thickness_m"), l.number(i, "area_m2"), l.number(i, "conductivity_W_per_mK"),
                    l.number(i, "heat_capacity_J_per_m3K")));
        }
        List<Region> regions = new ArrayList<>();
        SectionText.Section r = s.get("regions");
        for (int i = 0; r != null && i < r.rowCount(); i++) {
            regions.add(new Region(r.cell(i, "name"), role(r.cell(i, "role")), r.number(i, "from_J_per_K"),
                    r.number(i, "to_J_per_K")));
        }
        return new Product(s.get("").text("product"), recipe(section(s, "recipe")), layers, regions,
                settings(section(s, "decision")));
    }

    static void recipe(SectionText.Writer w, Recipe recipe) {
        w.section("recipe").value("curve", recipe.curve().word()).value("heating_power_W", recipe.heatingPowerWatts())
                .value("heating_s", recipe.heatingSeconds()).value("cut_s", recipe.cutSeconds())
                .value("record_s", recipe.recordSeconds()).value("power_tolerance", recipe.powerTolerance())
                .value("maximum_noise_K", recipe.maximumNoiseKelvin());
        recipe.sensor().ifPresent(sensor -> w.value("sensor_polynomial_C",
                String.join(" ", Arrays.stream(sensor.coefficients()).mapToObj(Double::toString).toList())));
    }

    static Recipe recipe(SectionText.Section s) {
        Optional<TemperatureSensor> sensor = s.has("sensor_polynomial_C")
                ? Optional.of(TemperatureSensor.polynomial(
                        Arrays.stream(s.text("sensor_polynomial_C").split(" ")).mapToDouble(Double::parseDouble).toArray()))
                : Optional.empty();
        return new Recipe(CurveKind.valueOf(s.text("curve").toUpperCase(Locale.ROOT)), s.number("heating_power_W"),
                s.number("heating_s"), s.number("cut_s"), s.number("record_s"), s.number("power_tolerance"),
                s.number("maximum_noise_K"), sensor);
    }

    static void settings(SectionText.Writer w, DecisionSettings d) {
        w.section("decision").value("content", d.content()).value("confidence_level", d.confidenceLevel())
                .value("rule", d.rule().word()).value("specific_risk", d.specificRisk())
                .value("false_reject_risk", d.falseRejectRisk()).value("prior_fault_rate", d.priorFaultRate());
    }

    static DecisionSettings settings(SectionText.Section s) {
        return new DecisionSettings(s.number("content"), s.number("confidence_level"),
                DecisionRule.valueOf(s.text("rule").toUpperCase(Locale.ROOT)), s.number("specific_risk"),
                s.number("false_reject_risk"), s.number("prior_fault_rate"));
    }

    static RegionRole role(String word) {
        return RegionRole.valueOf(word.toUpperCase(Locale.ROOT));
    }

    static SectionText.Section section(Map<String, SectionText.Section> sections, String name) {
        SectionText.Section s = sections.get(name);
        if (s == null) {
            throw new IllegalArgumentException("section [" + name + "] is missing");
        }
        return s;
    }
}

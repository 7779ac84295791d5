package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.Submission;
import org.laddergate.measurement.TemperatureSensor;

/** Measurement recipe on the wire. */
final class RecipeJson {
    private static final Map<String, Double> HARMLESS = Map.of("heatingPowerWatts", 1.0, "heatingSeconds", 1.0,
            "cutSeconds", Double.NaN, "recordSeconds", 9e4, "powerTolerance", 0.05, "maximumNoiseKelvin", Double.NaN);

    private RecipeJson() {}

    static Optional<Recipe> read(JsonNode node, String pointer, List<InputFault> faults) {
        JsonFields fields = new JsonFields(node, pointer, faults);
        if (!node.isObject()) {
            return Optional.empty();
        }
        Optional<CurveKind> kind = fields.word("curve", CurveKind.values(), CurveKind::word, "");
        Map<String, Double> numbers = new HashMap<>();
        numbers.put("heatingPowerWatts", fields.requiredNumber("heatingPowerWatts"));
        numbers.put("heatingSeconds", heatingSeconds(fields, kind));
        numbers.put("cutSeconds", fields.optionalNumber("cutSeconds", Double.NaN));
        numbers.put("recordSeconds", fields.requiredNumber("recordSeconds"));
        numbers.put("powerTolerance", fields.optionalNumber("powerTolerance", Recipe.DEFAULT_POWER_TOLERANCE));
        numbers.put("maximumNoiseKelvin", fields.optionalNumber("maximumNoiseKelvin", Double.NaN));
        Optional<TemperatureSensor> sensor = fields.has("sensor")
                ? SensorJson.read(fields.get("sensor"), fields.pointerTo("sensor"), faults) : Optional.empty();
        fields.refuseUnknown();
        return fields.build(numbers, HARMLESS, n -> new Recipe(kind.orElse(CurveKind.COOLING),
                n.get("heatingPowerWatts"), n.get("heatingSeconds"), n.get("cutSeconds"), n.get("recordSeconds"),
                n.get("powerTolerance"), n.get("maximumNoiseKelvin"), sensor));
    }

    private static double heatingSeconds(JsonFields fields, Optional<CurveKind> kind) {
        boolean heating = kind.equals(Optional.of(CurveKind.HEATING));
        if (heating && !fields.has("heatingSeconds")) {
            return Double.POSITIVE_INFINITY;
        }
        JsonNode value = fields.get("heatingSeconds");
        if (value.isTextual() && value.textValue().equals(Submission.STEADY_STATE)) {
            return Double.POSITIVE_INFINITY;
        }
        return fields.requiredNumber("heatingSeconds");
    }

    static void write(JsonGenerator g, Recipe recipe) throws IOException {
        g.writeObjectFieldStart("recipe");
        g.writeStringField("curve", recipe.curve().word());
        g.writeNumberField("heatingPowerWatts", recipe.heatingPowerWatts());
        if (Double.isInfinite(recipe.heatingSeconds())) {
            g.writeStringField("heatingSeconds", Submission.STEADY_STATE);
        } else {
            g.writeNumberField("heatingSeconds", recipe.heatingSeconds());
        }
        optional(g, "cutSeconds", recipe.cutSeconds());
        g.writeNumberField("recordSeconds", recipe.recordSeconds());
        g.writeNumberField("powerTolerance", recipe.powerTolerance());
        optional(g, "maximumNoiseKelvin", recipe.maximumNoiseKelvin());
        if (recipe.sensor().isPresent()) {
            SensorJson.write(g, recipe.sensor().get());
        }
        g.writeEndObject();
    }

    private static void optional(JsonGenerator g, String field, double value) throws IOException {
        if (!Double.isNaN(value)) {
            g.writeNumberField(field, value);
        }
    }
}

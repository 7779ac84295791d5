package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.laddergate.limits.DecisionRule;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.measurement.InputFault;

/** Decision settings on the wire; what is not given keeps its earlier value. */
final class DecisionJson {
    private static final DecisionSettings DEFAULT = DecisionSettings.DEFAULT;
    private static final Map<String, Double> HARMLESS = Map.of("content", DEFAULT.content(), "confidenceLevel",
            DEFAULT.confidenceLevel(), "specificRisk", DEFAULT.specificRisk(), "falseRejectRisk",
            DEFAULT.falseRejectRisk(), "priorFaultRate", DEFAULT.priorFaultRate());

    private DecisionJson() {}

    static Optional<DecisionSettings> read(JsonNode node, String pointer, DecisionSettings earlier,
            List<InputFault> faults) {
        JsonFields fields = new JsonFields(node, pointer, faults);
        if (!node.isObject()) {
            return Optional.empty();
        }
        Optional<DecisionRule> rule = fields.word("rule", DecisionRule.values(), DecisionRule::word,
                earlier.rule().word());
        Map<String, Double> numbers = new HashMap<>();
        put(numbers, fields, "content", earlier.content());
        put(numbers, fields, "confidenceLevel", earlier.confidenceLevel());
        put(numbers, fields, "specificRisk", earlier.specificRisk());
        put(numbers, fields, "falseRejectRisk", earlier.falseRejectRisk());
        put(numbers, fields, "priorFaultRate", earlier.priorFaultRate());
        fields.refuseUnknown();
        return fields.build(numbers, HARMLESS, n -> new DecisionSettings(n.get("content"), n.get("confidenceLevel"),
                rule.orElse(earlier.rule()), n.get("specificRisk"), n.get("falseRejectRisk"),
                n.get("priorFaultRate")));
    }

    private static void put(Map<String, Double> numbers, JsonFields fields, String field, double earlier) {
        numbers.put(field, fields.optionalNumber(field, earlier));
    }

    static void write(JsonGenerator g, DecisionSettings settings) throws IOException {
        g.writeObjectFieldStart("decision");
        g.writeNumberField("content", settings.content());
        g.writeNumberField("confidenceLevel", settings.confidenceLevel());
        g.writeStringField("rule", settings.rule().word());
        g.writeNumberField("specificRisk", settings.specificRisk());
        g.writeNumberField("falseRejectRisk", settings.falseRejectRisk());
        g.writeNumberField("priorFaultRate", settings.priorFaultRate());
        g.writeEndObject();
    }
}

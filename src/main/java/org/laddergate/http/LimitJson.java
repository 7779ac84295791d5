package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.databind.JsonNode;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.RegionLimit;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;

/** Limit sets and the requests about them on the wire. */
final class LimitJson {
    private static final int MAXIMUM_REASON = 1000;

    private LimitJson() {}

    /**
     * What is said at a release.
     *
     * @param reason        why, not blank
     * @param releasedBy    who, empty if not given
     */
    record Release(String reason, String releasedBy) {}

    /** Settings of a learning request; those of the product where nothing else is said. */
    static DecisionSettings readSettings(JsonNode body, DecisionSettings earlier) {
        List<InputFault> faults = new ArrayList<>();
        JsonFields fields = new JsonFields(body, "", faults);
        Optional<DecisionSettings> settings = fields.has("settings")
                ? DecisionJson.read(fields.get("settings"), "/settings", earlier, faults) : Optional.of(earlier);
        fields.refuseUnknown();
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        return settings.orElseThrow();
    }

    static Release readRelease(JsonNode body) {
        List<InputFault> faults = new ArrayList<>();
        JsonFields fields = new JsonFields(body, "", faults);
        String reason = fields.optionalText("reason", MAXIMUM_REASON);
        if (reason.isBlank() && faults.isEmpty()) {
            fields.fault("reason", "missing", "a release needs a reason");
        }
        String releasedBy = fields.optionalText("releasedBy");
        fields.refuseUnknown();
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
        return new Release(reason.strip(), releasedBy.strip());
    }

    static byte[] bytes(LimitSet limits) {
        return Json.bytes(g -> {
            g.writeStartObject();
            summary(g, limits);
            RecipeJson.write(g, limits.recipe());
            DecisionJson.write(g, limits.settings());
            g.writeArrayFieldStart("regions");
            for (RegionLimit region : limits.regionLimits()) {
                write(g, region);
            }
            g.writeEndArray();
            Json.texts(g, "remarks", limits.remarks());
            g.writeEndObject();
        });
    }

    static byte[] list(List<LimitSet> revisions) {
        return Json.bytes(g -> {
            g.writeStartObject();
            g.writeArrayFieldStart("limits");
            for (LimitSet limits : revisions) {
                g.writeStartObject();
                summary(g, limits);
                g.writeEndObject();
            }
            g.writeEndArray();
            g.writeEndObject();
        });
    }

    private static void summary(JsonGenerator g, LimitSet limits) throws IOException {
        g.writeStringField("product", limits.product());
        g.writeNumberField("revision", limits.revision());
        g.writeStringField("state", limits.state().word());
        g.writeStringField("sha256", limits.sha256());
        g.writeStringField("learntAt", limits.learntAt().toString());
        g.writeNumberField("goldenUnits", limits.goldenUnits());
    }

    private static void write(JsonGenerator g, RegionLimit limit) throws IOException {
        g.writeStartObject();
        g.writeStringField("region", limit.region().name());
        g.writeStringField("role", limit.region().role().word());
        Json.number(g, "fromJoulesPerKelvin", limit.region().fromJoulesPerKelvin());
        Json.number(g, "toJoulesPerKelvin", limit.region().toJoulesPerKelvin());
        g.writeBooleanField("assessed", limit.assessed());
        Json.number(g, "goldenMeanKelvinPerWatt", limit.goldenMeanKelvinPerWatt());
        Json.number(g, "goldenSigmaKelvinPerWatt", limit.goldenSigmaKelvinPerWatt());
        Json.number(g, "factor", limit.factor());
        Json.number(g, "lowerLimit", limit.lowerKelvinPerWatt());
        Json.number(g, "upperLimit", limit.upperKelvinPerWatt());
        g.writeStringField("origin", limit.origin());
        g.writeEndObject();
    }
}

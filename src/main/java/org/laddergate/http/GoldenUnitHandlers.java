package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import io.javalin.http.Context;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.GoldenUnit;
import org.laddergate.limits.Layer;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.Submission;

/**
 * Golden and known-bad units.
 *
 * @param bodies    size limits
 * @param intake    rules and recipes
 * @param store     where units are kept
 * @param gate      limits the number of bodies parsed at once
 */
record GoldenUnitHandlers(Bodies bodies, Intake intake, GoldenStore store, WorkGate gate) {

    void post(Context ctx) {
        Product product = ProductHandlers.find(ctx, intake.products());
        String type = bodies.requireType(ctx, Bodies.JSON, Bodies.CSV);
        byte[] body = bodies.read(ctx);
        GoldenUnit unit = gate.compute(() -> unit(product, parse(ctx, type, body)));
        if (store.add(unit)) {
            ctx.status(201);
        }
        TransientHandlers.json(ctx, Json.bytes(g -> write(g, unit)));
    }

    void list(Context ctx) {
        Product product = ProductHandlers.find(ctx, intake.products());
        List<GoldenUnit> units = store.units(product.name());
        TransientHandlers.json(ctx, Json.bytes(g -> {
            g.writeStartObject();
            g.writeArrayFieldStart("goldenUnits");
            for (GoldenUnit unit : units) {
                write(g, unit);
            }
            g.writeEndArray();
            g.writeEndObject();
        }));
    }

    private SubmissionJson.Parsed parse(Context ctx, String type, byte[] body) {
        int maximumSamples = intake.rules().maximumSamples();
        return type.equals(Bodies.CSV)
                ? SubmissionCsv.parse(body, TransientHandlers.firstValues(ctx), maximumSamples)
                : SubmissionJson.parse(body, maximumSamples);
    }

    private GoldenUnit unit(Product product, SubmissionJson.Parsed parsed) {
        Submission sent = parsed.submission();
        List<InputFault> faults = new ArrayList<>(parsed.faults());
        if (!sent.product().isEmpty() && !sent.product().equals(product.name())) {
            faults.add(new InputFault("/product", "differs", "product is '" + sent.product()
                    + "', but the address says '" + product.name() + "'"));
        }
        GoldenUnit.Condition condition = condition(sent, faults);
        faultRegion(sent, condition, product, faults);
        Submission.Builder completed = sent.toBuilder();
        completed.text("product", product.name());
        Measurement measurement = intake.accept(new SubmissionJson.Parsed(completed.build(), faults,
                parsed.warnings())).measurement();
        return new GoldenUnit(measurement, condition, sent.faultRegion());
    }

    /** Must be said: a bad unit taken for golden by mistake would widen the limits. */
    private static GoldenUnit.Condition condition(Submission sent, List<InputFault> faults) {
        for (GoldenUnit.Condition condition : GoldenUnit.Condition.values()) {
            if (condition.word().equals(sent.condition())) {
                return condition;
            }
        }
        faults.add(new InputFault("/condition", sent.condition().isEmpty() ? "missing" : "unknown_word",
                "condition must be 'golden' or 'known-bad'"));
        return GoldenUnit.Condition.KNOWN_BAD;
    }

    private static void faultRegion(Submission sent, GoldenUnit.Condition condition, Product product,
            List<InputFault> faults) {
        if (sent.faultRegion().isEmpty()) {
            return;
        }
        Set<String> regions = Stream.concat(product.layers().stream().map(Layer::region),
                product.regions().stream().map(Region::name)).filter(r -> !r.isEmpty()).collect(Collectors.toSet());
        if (condition == GoldenUnit.Condition.GOLDEN) {
            faults.add(new InputFault("/faultRegion", "contradiction", "a golden unit has no faultRegion"));
        } else if (!regions.contains(sent.faultRegion())) {
            faults.add(new InputFault("/faultRegion", "unknown_region",
                    "faultRegion must be one of the product's regions " + regions.stream().sorted().toList()));
        }
    }

    private static void write(JsonGenerator g, GoldenUnit unit) throws IOException {
        Measurement m = unit.measurement();
        g.writeStartObject();
        g.writeStringField("measurementId", m.measurementId());
        g.writeStringField("product", m.product());
        g.writeStringField("serial", m.serial());
        Json.text(g, "lot", m.lot());
        Json.text(g, "station", m.station());
        g.writeStringField("measuredAt", Times.text(m.measuredAt()));
        g.writeStringField("condition", unit.condition().word());
        Json.text(g, "faultRegion", unit.faultRegion());
        g.writeNumberField("samples", m.curve().size());
        g.writeEndObject();
    }
}

package org.laddergate.http;

import com.fasterxml.jackson.core.JsonGenerator;
import java.io.IOException;
import java.util.List;
import java.util.stream.IntStream;
import org.laddergate.measurement.SquareRootStart;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.Trace;

/** A stored verdict and its curves on the wire. */
final class VerdictJson {
    private VerdictJson() {}

    /** What is added to a verdict on request. */
    enum Extra {
        NOTHING, STRUCTURE_FUNCTION
    }

    static byte[] bytes(StoredVerdict verdict, List<String> warnings, Extra extra) {
        return Json.bytes(g -> write(g, verdict, warnings, extra));
    }

    private static void write(JsonGenerator g, StoredVerdict verdict, List<String> warnings, Extra extra)
            throws IOException {
        Judgement judgement = verdict.judgement();
        g.writeStartObject();
        g.writeStringField("measurementId", verdict.measurementId());
        g.writeStringField("product", verdict.product());
        g.writeStringField("serial", verdict.serial());
        Json.text(g, "lot", verdict.lot());
        Json.text(g, "station", verdict.station());
        g.writeStringField("measuredAt", Times.text(verdict.measuredAt()));
        g.writeObjectFieldStart("limits");
        g.writeNumberField("revision", judgement.limitRevision());
        g.writeStringField("sha256", judgement.limitSha256());
        g.writeEndObject();
        decision(g, judgement);
        g.writeNumberField("attempt", verdict.attempt());
        g.writeStringField("algorithmVersion", judgement.algorithmVersion());
        g.writeStringField("storedAt", verdict.storedAt().toString());
        if (!warnings.isEmpty()) {
            Json.texts(g, "warnings", warnings);
        }
        if (extra == Extra.STRUCTURE_FUNCTION) {
            g.writeObjectFieldStart("structureFunction");
            structure(g, judgement.trace());
            g.writeEndObject();
        }
        g.writeEndObject();
    }

    private static void decision(JsonGenerator g, Judgement judgement) throws IOException {
        g.writeStringField("verdict", judgement.outcome().word());
        g.writeStringField("disposition", judgement.disposition().word());
        if (judgement.outcome() == Outcome.FAIL) {
            Json.text(g, "failingRegion", judgement.failingRegion());
        }
        Json.texts(g, "otherSuspects", judgement.otherSuspects());
        Json.number(g, "confidence", judgement.decisionConfidence());
        g.writeArrayFieldStart("regions");
        for (RegionResult region : judgement.regions()) {
            write(g, region);
        }
        g.writeEndArray();
        g.writeObjectFieldStart("envelope");
        g.writeBooleanField("inside", judgement.envelopeInside());
        Json.number(g, "firstExitJoulesPerKelvin", judgement.envelopeFirstExitJoulesPerKelvin());
        g.writeEndObject();
        g.writeObjectFieldStart("inFamily");
        Json.number(g, "statistic", judgement.inFamilyStatistic());
        Json.number(g, "limit", judgement.inFamilyLimit());
        g.writeEndObject();
        g.writeArrayFieldStart("reasons");
        for (Reason reason : judgement.reasons()) {
            g.writeStartObject();
            g.writeStringField("code", reason.code());
            g.writeStringField("sentence", reason.sentence());
            Json.number(g, "value", reason.value());
            Json.number(g, "bound", reason.bound());
            g.writeEndObject();
        }
        g.writeEndArray();
    }

    private static void write(JsonGenerator g, RegionResult region) throws IOException {
        g.writeStartObject();
        g.writeStringField("region", region.region());
        g.writeStringField("role", region.role().word());
        g.writeBooleanField("assessed", region.assessed());
        Json.number(g, "resistanceKelvinPerWatt", region.resistanceKelvinPerWatt());
        Json.number(g, "uncertaintyKelvinPerWatt", region.uncertaintyKelvinPerWatt());
        Json.number(g, "lowerLimit", region.lowerLimitKelvinPerWatt());
        Json.number(g, "upperLimit", region.upperLimitKelvinPerWatt());
        Json.number(g, "probabilityConforming", region.probabilityConforming());
        Json.number(g, "faultProbability", region.faultProbability());
        g.writeEndObject();
    }

    static byte[] curve(StoredVerdict verdict) {
        Trace trace = verdict.judgement().trace();
        int[] filled = filledBins(trace);
        return Json.bytes(g -> {
            g.writeStartObject();
            g.writeStringField("measurementId", verdict.measurementId());
            g.writeArrayFieldStart("timeSeconds");
            for (int bin : filled) {
                g.writeNumber(trace.binTimesSeconds()[bin]);
            }
            g.writeEndArray();
            g.writeArrayFieldStart("temperatureCelsius");
            for (int bin : filled) {
                g.writeNumber(trace.binTemperaturesCelsius()[bin]);
            }
            g.writeEndArray();
            g.writeArrayFieldStart("samples");
            for (int bin : filled) {
                g.writeNumber(trace.binCounts()[bin]);
            }
            g.writeEndArray();
            Json.number(g, "startCelsius",
                    SquareRootStart.extrapolate(trace.binTimesSeconds(), trace.binTemperaturesCelsius()));
            g.writeEndObject();
        });
    }

    static String curveCsv(StoredVerdict verdict) {
        Trace trace = verdict.judgement().trace();
        StringBuilder out = new StringBuilder("timeSeconds,temperatureCelsius,samples\r\n");
        for (int bin : filledBins(trace)) {
            out.append(trace.binTimesSeconds()[bin]).append(',').append(trace.binTemperaturesCelsius()[bin]).append(',')
                    .append(trace.binCounts()[bin]).append("\r\n");
        }
        return out.toString();
    }

    static byte[] structureFunction(StoredVerdict verdict) {
        return Json.bytes(g -> {
            g.writeStartObject();
            g.writeStringField("measurementId", verdict.measurementId());
            structure(g, verdict.judgement().trace());
            g.writeEndObject();
        });
    }

    static String structureFunctionCsv(StoredVerdict verdict) {
        double[] r = verdict.judgement().trace().structureResistancesKelvinPerWatt();
        double[] c = verdict.judgement().trace().structureCapacitancesJoulesPerKelvin();
        StringBuilder out = new StringBuilder("resistanceKelvinPerWatt,capacitanceJoulesPerKelvin\r\n");
        for (int i = 0; i < r.length; i++) {
            out.append(r[i]).append(',').append(c[i]).append("\r\n");
        }
        return out.toString();
    }

    private static void structure(JsonGenerator g, Trace trace) throws IOException {
        Json.numbers(g, "resistanceKelvinPerWatt", trace.structureResistancesKelvinPerWatt());
        Json.numbers(g, "capacitanceJoulesPerKelvin", trace.structureCapacitancesJoulesPerKelvin());
    }

    private static int[] filledBins(Trace trace) {
        return IntStream.range(0, trace.binTimesSeconds().length)
                .filter(bin -> Double.isFinite(trace.binTemperaturesCelsius()[bin])).toArray();
    }
}

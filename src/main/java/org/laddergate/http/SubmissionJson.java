package org.laddergate.http;

import com.fasterxml.jackson.core.JsonParser;
import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.core.JsonToken;
import java.io.IOException;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.Submission;

/**
 * Reads one transient from JSON, in one pass and into primitive arrays. One object reads one body.
 *
 * <p>Unknown fields are ignored with a warning, so that testers may send more than this version knows.
 */
final class SubmissionJson {
    private static final int MAXIMUM_FAULTS = 50;
    private static final int MAXIMUM_WARNINGS = 20;
    private static final Set<String> TEXT_FIELDS = Set.copyOf(Submission.TEXT_FIELDS);

    private final JsonParser parser;
    private final int maximumSamples;
    private final Submission.Builder fields = new Submission.Builder();
    private final List<InputFault> faults = new ArrayList<>();
    private final List<String> warnings = new ArrayList<>();
    private String valueField = "";

    private SubmissionJson(JsonParser parser, int maximumSamples) {
        this.parser = parser;
        this.maximumSamples = maximumSamples;
    }

    /**
     * What was sent, as far as it could be read.
     *
     * @param submission    the fields
     * @param faults        fields of a wrong type; their values in {@code submission} mean nothing
     * @param warnings      what was ignored
     */
    record Parsed(Submission submission, List<InputFault> faults, List<String> warnings) {}

    /** @throws ProblemException if the body is not JSON */
    static Parsed parse(byte[] body, int maximumSamples) {
        String pointer = "";
        try (JsonParser parser = Json.FACTORY.createParser(body)) {
            try {
                return new SubmissionJson(parser, maximumSamples).parse();
            } catch (JsonProcessingException e) {
                pointer = parser.getParsingContext().pathAsPointer().toString();
                throw e;
            }
        } catch (JsonProcessingException e) {
            throw Problems.malformedJson(e, pointer).asException();
        } catch (IOException e) {
            throw Json.unreadable();
        }
    }

    private Parsed parse() throws IOException {
        JsonToken first = parser.nextToken();
        if (first != JsonToken.START_OBJECT) {
            throw Problem.of(first == null ? ProblemCode.MALFORMED_JSON : ProblemCode.INVALID_INPUT, new InputFault("",
                    "not_an_object", first == null ? "the body is empty" : "the body must be a JSON object"))
                    .asException();
        }
        while (parser.nextToken() == JsonToken.FIELD_NAME) {
            String name = parser.currentName();
            field(name, parser.nextToken());
        }
        Json.refuseMore(parser);
        return new Parsed(fields.build(), faults, warnings);
    }

    private void field(String name, JsonToken token) throws IOException {
        if (token == JsonToken.VALUE_NULL) {
            return;
        }
        switch (name) {
            case Submission.TIME_FIELD -> fields.timesSeconds(samples(name, token));
            case Submission.TEMPERATURE_FIELD, Submission.VOLTAGE_FIELD -> values(name, token);
            case "heatingPowerWatts", "heatingSeconds" -> number(name, token);
            case "sensor" -> SensorJson.read(parser.readValueAsTree(), "/sensor", faults).ifPresent(fields::sensor);
            default -> textOrUnknown(name, token);
        }
    }

    private void textOrUnknown(String name, JsonToken token) throws IOException {
        if (TEXT_FIELDS.contains(name)) {
            if (token == JsonToken.VALUE_STRING) {
                fields.text(name, parser.getText());
            } else {
                wrongType(name, "a text");
            }
            return;
        }
        if (warnings.size() < MAXIMUM_WARNINGS) {
            warnings.add("field '" + (name.length() <= 40 ? name : name.substring(0, 40) + "...")
                    + "' is unknown and was ignored");
        }
        parser.skipChildren();
    }

    private void number(String name, JsonToken token) throws IOException {
        boolean steady = token == JsonToken.VALUE_STRING && name.equals("heatingSeconds")
                && parser.getText().equals(Submission.STEADY_STATE);
        if (steady) {
            fields.number(name, Double.POSITIVE_INFINITY);
        } else if (!token.isNumeric()) {
            wrongType(name, "a number");
        } else {
            double value = parser.getDoubleValue();
            // Infinite means steady state, which only the word may say.
            fields.number(name, Double.isFinite(value) ? value : Double.NaN);
        }
    }

    private void wrongType(String name, String expected) throws IOException {
        faults.add(new InputFault("/" + name, "wrong_type", name + " must be " + expected + ", not " + described()));
        parser.skipChildren();
    }

    private void values(String name, JsonToken token) throws IOException {
        double[] samples = samples(name, token);
        if (!valueField.isEmpty()) {
            faults.add(new InputFault("/" + name, "both_given",
                    "give either temperatureCelsius or voltageVolts, not both"));
            return;
        }
        valueField = name;
        fields.values(name, samples);
    }

    private double[] samples(String name, JsonToken token) throws IOException {
        if (token != JsonToken.START_ARRAY) {
            wrongType(name, "an array of numbers");
            return new double[0];
        }
        double[] samples = new double[512];
        int count = 0;
        int index = 0;
        for (JsonToken t = parser.nextToken(); t != JsonToken.END_ARRAY; t = parser.nextToken(), index++) {
            double value = t != null && t.isNumeric() ? parser.getDoubleValue() : notANumber(name, index);
            // One more than allowed is enough for the rules to refuse it.
            if (count <= maximumSamples) {
                samples = count < samples.length ? samples : Arrays.copyOf(samples, 2 * count);
                samples[count++] = value;
            }
        }
        return Arrays.copyOf(samples, count);
    }

    private double notANumber(String name, int index) throws IOException {
        if (faults.size() < MAXIMUM_FAULTS) {
            faults.add(new InputFault("/" + name + "/" + index, "not_a_number",
                    name + "[" + index + "] is " + described() + ", not a number"));
        }
        parser.skipChildren();
        return Double.NaN;
    }

    private String described() throws IOException {
        return switch (parser.currentToken()) {
            case START_ARRAY -> "an array";
            case START_OBJECT -> "an object";
            case VALUE_STRING -> {
                String text = parser.getText();
                yield "the text '" + (text.length() <= 40 ? text : text.substring(0, 40) + "...") + "'";
            }
            default -> parser.getText();
        };
    }
}

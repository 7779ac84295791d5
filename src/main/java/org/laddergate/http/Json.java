package org.laddergate.http;

import com.fasterxml.jackson.core.JsonFactory;
import com.fasterxml.jackson.core.JsonGenerator;
import com.fasterxml.jackson.core.JsonParser;
import com.fasterxml.jackson.core.JsonProcessingException;
import com.fasterxml.jackson.core.JsonToken;
import com.fasterxml.jackson.core.StreamReadConstraints;
import com.fasterxml.jackson.core.StreamReadFeature;
import com.fasterxml.jackson.core.StreamWriteFeature;
import com.fasterxml.jackson.core.json.JsonReadFeature;
import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;

/**
 * JSON as this service reads and writes it: field names given twice and deep nesting are refused, NaN is never written.
 */
final class Json {
    private static final int MAXIMUM_DEPTH = 32;

    static final ObjectMapper MAPPER = new ObjectMapper(JsonFactory.builder()
            .streamReadConstraints(StreamReadConstraints.builder().maxNestingDepth(MAXIMUM_DEPTH)
                    .maxStringLength(20_000).maxNameLength(1000).maxNumberLength(1000).build())
            .enable(StreamReadFeature.STRICT_DUPLICATE_DETECTION)
            .enable(StreamReadFeature.USE_FAST_DOUBLE_PARSER)
            .enable(StreamWriteFeature.USE_FAST_DOUBLE_WRITER)
            // Read as numbers so that the answer can name the sample; the rules refuse them as not finite.
            .enable(JsonReadFeature.ALLOW_NON_NUMERIC_NUMBERS)
            .build());
    static final JsonFactory FACTORY = MAPPER.getFactory();

    private Json() {}

    /** Something that writes one value. */
    @FunctionalInterface
    interface Writing {
        void to(JsonGenerator g) throws IOException;
    }

    static byte[] bytes(Writing writing) {
        ByteArrayOutputStream out = new ByteArrayOutputStream(1024);
        try (JsonGenerator g = FACTORY.createGenerator(out)) {
            writing.to(g);
        } catch (IOException e) {
            throw new UncheckedIOException("memory cannot fail to be written", e);
        }
        return out.toByteArray();
    }

    /** The whole body as a tree; an empty body is an empty object. */
    static JsonNode tree(byte[] body) {
        String pointer = "";
        try (JsonParser parser = FACTORY.createParser(body)) {
            try {
                if (parser.nextToken() == null) {
                    return MAPPER.createObjectNode();
                }
                JsonNode tree = parser.readValueAsTree();
                refuseMore(parser);
                return tree;
            } catch (JsonProcessingException e) {
                pointer = parser.getParsingContext().pathAsPointer().toString();
                throw e;
            }
        } catch (JsonProcessingException e) {
            throw Problems.malformedJson(e, pointer).asException();
        } catch (IOException e) {
            throw unreadable();
        }
    }

    /** Refuses anything but white space after the value. */
    static void refuseMore(JsonParser parser) throws IOException {
        JsonToken token = parser.nextToken();
        if (token != null) {
            throw Problem.of(ProblemCode.MALFORMED_JSON, "line " + parser.currentTokenLocation().getLineNr()
                    + ", column " + parser.currentTokenLocation().getColumnNr()
                    + ": something follows the JSON value").asException();
        }
    }

    /** Bytes that are no text at all. */
    static ProblemException unreadable() {
        return Problem.of(ProblemCode.MALFORMED_JSON, "the body is not text in UTF-8").asException();
    }

    /** A number, or null where there is none. */
    static void number(JsonGenerator g, String field, double value) throws IOException {
        if (Double.isFinite(value)) {
            g.writeNumberField(field, value);
        } else {
            g.writeNullField(field);
        }
    }

    /** A text field that is left out when it is empty. */
    static void text(JsonGenerator g, String field, String value) throws IOException {
        if (!value.isEmpty()) {
            g.writeStringField(field, value);
        }
    }

    static void numbers(JsonGenerator g, String field, double[] values) throws IOException {
        g.writeArrayFieldStart(field);
        for (double value : values) {
            if (Double.isFinite(value)) {
                g.writeNumber(value);
            } else {
                g.writeNull();
            }
        }
        g.writeEndArray();
    }

    static void texts(JsonGenerator g, String field, Iterable<String> values) throws IOException {
        g.writeArrayFieldStart(field);
        for (String value : values) {
            g.writeString(value);
        }
        g.writeEndArray();
    }
}

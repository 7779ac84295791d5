package org.laddergate.thermal;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;

/** Reference numbers that were not made by this project's own code; every file says where its numbers come from. */
final class ReferenceData {
    private ReferenceData() {}

    static JsonNode json(String name) {
        try (InputStream in = open(name)) {
            return new ObjectMapper().readTree(in);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    static List<String> lines(String name) {
        try (BufferedReader in = new BufferedReader(new InputStreamReader(open(name), StandardCharsets.UTF_8))) {
            return in.lines().toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    static double[] array(JsonNode node) {
        double[] out = new double[node.size()];
        for (int i = 0; i < out.length; i++) {
            out[i] = node.get(i).asDouble();
        }
        return out;
    }

    private static InputStream open(String name) {
        return ReferenceData.class.getResourceAsStream("/reference/thermal/" + name);
    }
}

package org.laddergate.app;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.zip.GZIPInputStream;

/**
 * The reference population "kestrel": an invented module simulated in two dimensions by another program, with the truth of
 * every unit (README.md beside the data).
 */
final class KestrelPopulation {
    private static final String FOLDER = "/reference/population-kestrel/";

    private KestrelPopulation() {}

    /** One record: its name, its label (bad measurements only), times and temperatures. */
    record Curve(String id, String label, double[] timesSeconds, double[] celsius) {}

    static List<Curve> curves(String file, int keyColumns) {
        List<String[]> rows = rows(file);
        String[] head = rows.get(0);
        List<Curve> out = new ArrayList<>();
        for (String[] row : rows.subList(1, rows.size())) {
            List<double[]> samples = new ArrayList<>();
            for (int i = keyColumns; i < row.length; i++) {
                if (!row[i].isEmpty()) {
                    samples.add(new double[] {Double.parseDouble(head[i]), Double.parseDouble(row[i])});
                }
            }
            out.add(new Curve(row[0], keyColumns > 1 ? row[1] : "", samples.stream().mapToDouble(s -> s[0]).toArray(),
                    samples.stream().mapToDouble(s -> s[1]).toArray()));
        }
        return out;
    }

    /** Columns of truth.csv by unit. */
    static Map<String, Map<String, String>> truth() {
        List<String[]> rows = rows("truth.csv");
        Map<String, Map<String, String>> out = new HashMap<>();
        for (String[] row : rows.subList(1, rows.size())) {
            Map<String, String> columns = new HashMap<>();
            for (int i = 0; i < row.length; i++) {
                columns.put(rows.get(0)[i], row[i]);
            }
            out.put(row[0], columns);
        }
        return out;
    }

    static List<String[]> rows(String file) {
        try (InputStream raw = KestrelPopulation.class.getResourceAsStream(FOLDER + file);
                InputStream in = file.endsWith(".gz") ? new GZIPInputStream(raw) : raw;
                BufferedReader reader = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8))) {
            return reader.lines().map(line -> line.split(",", -1)).toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}

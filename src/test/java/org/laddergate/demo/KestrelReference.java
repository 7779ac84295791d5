package org.laddergate.demo;

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
import org.laddergate.demo.DemoFault.Shape;
import org.laddergate.demo.Population.Spread;
import org.laddergate.limits.Layer;
import org.laddergate.limits.RegionRole;

/**
 * The reference population "kestrel", made by another program (README.md beside the data), in the terms of this room:
 * its nominal product and the true factors of its units.
 */
final class KestrelReference {
    static final double HEATED_AREA = 2.209e-5;
    static final double FILM = 16_000;
    private static final String FOLDER = "/reference/population-kestrel/";

    private KestrelReference() {}

    /** README, "Product and measurement", "Spread" and "Noise model"; layers.csv. */
    static Population population() {
        return new Population("kestrel", layers(), HEATED_AREA, FILM, Map.of("die", new Spread(0.012, 0),
                "attach", new Spread(0.07, 0.03), "solder", new Spread(0.055, 0), "tim", new Spread(0.07, 0.03)), "", 0,
                new RawRecorder.Setup(60, 2, 1.5, 30, 0.02, 0.003, 2, 0.15, 8e-6, 0.05), List.of());
    }

    static List<Layer> layers() {
        List<Layer> out = new ArrayList<>();
        for (String[] row : rows("layers.csv")) {
            if (!row[0].equals("name") && !row[1].isEmpty()) {
                boolean judged = List.of("die", "attach", "solder", "tim").contains(row[0]);
                out.add(new Layer(row[0], judged ? row[0] : "", RegionRole.PART, Double.parseDouble(row[1]),
                        Double.parseDouble(row[4]), Double.parseDouble(row[2]), Double.parseDouble(row[3])));
            }
        }
        return out;
    }

    /** Shares of the layers and, last, of the film [K/W]. */
    static double[] shares() {
        return rows("layers.csv").stream().skip(1).mapToDouble(r -> Double.parseDouble(r[6])).toArray();
    }

    /** Rows of truth.csv by column name. */
    static List<Map<String, String>> truth() {
        List<String[]> rows = rows("truth.csv");
        List<Map<String, String>> out = new ArrayList<>();
        for (String[] row : rows.subList(1, rows.size())) {
            Map<String, String> columns = new HashMap<>();
            for (int i = 0; i < row.length; i++) {
                columns.put(rows.get(0)[i], row[i]);
            }
            out.add(columns);
        }
        return out;
    }

    /** The unit that a row of truth.csv describes. */
    static PopulationUnit unit(Population kestrel, Map<String, String> row) {
        List<DemoFault> faults = new ArrayList<>();
        List<Double> severities = new ArrayList<>();
        for (String suffix : List.of("", "_2")) {
            if (!row.get("kind" + suffix).isEmpty()) {
                Shape shape = switch (row.get("kind" + suffix)) {
                    case "thick" -> Shape.THICK;
                    case "central_void", "missing_center" -> Shape.CENTRE_VOID;
                    default -> Shape.EDGE_DELAMINATION;
                };
                faults.add(new DemoFault(row.get("region" + suffix), shape,
                        Double.parseDouble(row.get("severity" + suffix))));
                severities.add(Double.valueOf(row.get("severity_drawn" + suffix)));
            }
        }
        double[] thickness = kestrel.layers().stream()
                .mapToDouble(l -> Double.parseDouble(row.getOrDefault("factor_" + l.name() + "_thickness", "1")))
                .toArray();
        double[] conductivity = kestrel.layers().stream()
                .mapToDouble(l -> Double.parseDouble(row.getOrDefault("factor_" + l.name() + "_conductivity", "1")))
                .toArray();
        return new PopulationUnit(kestrel, faults, severities.stream().mapToDouble(Double::doubleValue).toArray(),
                thickness, conductivity);
    }

    static List<String[]> rows(String file) {
        try (InputStream raw = KestrelReference.class.getResourceAsStream(FOLDER + file);
                InputStream in = file.endsWith(".gz") ? new GZIPInputStream(raw) : raw;
                BufferedReader reader = new BufferedReader(new InputStreamReader(in, StandardCharsets.UTF_8))) {
            return reader.lines().map(line -> line.split(",", -1)).toList();
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}

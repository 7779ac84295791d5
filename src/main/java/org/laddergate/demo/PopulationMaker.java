package org.laddergate.demo;

import java.io.IOException;
import java.io.OutputStreamWriter;
import java.io.Writer;
import java.math.BigDecimal;
import java.math.MathContext;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Random;
import java.util.zip.GZIPOutputStream;
import org.laddergate.limits.Layer;

/**
 * Writes populations of invented parts with known truth, to develop and try a screener on: curves as gzipped CSV, one
 * record a row, and the truth beside them, in the columns of the reference population kestrel.
 *
 * <p>Deterministic for a seed. A unit takes about a tenth of a second.
 */
final class PopulationMaker {
    private static final int GOLDEN = 80;
    private static final int PRODUCTION = 300;
    private static final int UNITS_PER_CLASS = 16;

    private final Population population;
    private final Random random;
    private final RawRecorder recorder;
    private final ConductionModel nominal;

    PopulationMaker(Population population, long seed) {
        this.population = population;
        this.random = new Random(seed);
        this.recorder = new RawRecorder(population.setup());
        this.nominal = PopulationUnit.nominal(population).model();
    }

    /** Arguments: folder, then names of populations; none for all. */
    public static void main(String[] arguments) throws IOException {
        if (arguments.length == 0) {
            System.err.println("usage: PopulationMaker <folder> [population ...]");
            return;
        }
        List<String> wanted = List.of(arguments).subList(1, arguments.length);
        for (Population population : InventedPopulations.ALL) {
            if (wanted.isEmpty() || wanted.contains(population.name())) {
                new PopulationMaker(population, population.name().hashCode())
                        .write(Path.of(arguments[0]).resolve(population.name()), GOLDEN, PRODUCTION, UNITS_PER_CLASS);
            }
        }
    }

    /** Writes all files; truth.csv appears last and whole. */
    void write(Path folder, int golden, int production, int perClass) throws IOException {
        Files.createDirectories(folder);
        Files.writeString(folder.resolve("layers.csv"), layerTable());
        Files.writeString(folder.resolve("measurement.json"), measurement());
        StringBuilder truth = new StringBuilder(truthHead());
        writeSet(folder, "golden", Collections.nCopies(golden, List.of()), truth);
        writeSet(folder, "production", Collections.nCopies(production, List.of()), truth);
        List<List<DemoFault>> faulty = new ArrayList<>();
        population.faultClasses().forEach(c -> faulty.addAll(Collections.nCopies(perClass, c)));
        Collections.shuffle(faulty, random);
        writeSet(folder, "faulty", faulty, truth);
        Path whole = folder.resolve("truth.csv.part");
        Files.writeString(whole, truth);
        Files.move(whole, folder.resolve("truth.csv"), StandardCopyOption.REPLACE_EXISTING);
    }

    private void writeSet(Path folder, String set, List<List<DemoFault>> units, StringBuilder truth)
            throws IOException {
        try (Writer curves = new OutputStreamWriter(
                new GZIPOutputStream(Files.newOutputStream(folder.resolve(set + ".csv.gz"))), StandardCharsets.UTF_8)) {
            curves.write("unit_id");
            for (int i = 0; i < recorder.size(); i++) {
                curves.write("," + number(recorder.timeSeconds(i), 9));
            }
            curves.write("\n");
            for (int n = 0; n < units.size(); n++) {
                String id = String.format(Locale.ROOT, "%.1s%.1s%04d", population.name(), set, n + 1)
                        .toUpperCase(Locale.ROOT);
                PopulationUnit unit = PopulationUnit.draw(population, units.get(n), random);
                ConductionModel model = unit.model();
                curves.write(id);
                for (double celsius : recorder.record(model.network(), random)) {
                    curves.write(String.format(Locale.ROOT, ",%.4f", celsius));
                }
                curves.write("\n");
                truth.append(truthRow(id, set, unit, model));
            }
        }
    }

    private String truthHead() {
        StringBuilder head = new StringBuilder(
                "unit_id,set,region,kind,severity,region_2,kind_2,severity_2,R_total_K_per_W");
        for (String region : population.regions()) {
            head.append(",shift_").append(region).append("_K_per_W,shift_").append(region).append("_relative");
        }
        population.regions().forEach(r -> head.append(",share_").append(r).append("_K_per_W"));
        head.append(",severity_drawn,severity_drawn_2");
        for (Layer layer : population.layers()) {
            Population.Spread spread = population.spreadOf(layer);
            head.append(spread.thickness() > 0 ? ",factor_" + layer.name() + "_thickness" : "");
            head.append(spread.conductivity() > 0 ? ",factor_" + layer.name() + "_conductivity" : "");
        }
        return head.append('\n').toString();
    }

    private String truthRow(String id, String set, PopulationUnit unit, ConductionModel model) {
        StringBuilder row = new StringBuilder(id).append(',').append(set);
        for (int f = 0; f < 2; f++) {
            if (f < unit.faults().size()) {
                DemoFault fault = unit.faults().get(f);
                row.append(',').append(fault.region()).append(',').append(kind(fault)).append(',')
                        .append(fault.severity());
            } else {
                row.append(f == 0 ? ",none,," : ",,,");
            }
        }
        row.append(',').append(number(model.steadyResistanceKelvinPerWatt(), 7));
        for (String region : population.regions()) {
            double shift = unit.shiftKelvinPerWatt(region, model);
            row.append(',').append(number(shift, 6)).append(',').append(number(shift / share(nominal, region), 6));
        }
        population.regions().forEach(r -> row.append(',').append(number(share(model, r), 6)));
        for (int f = 0; f < 2; f++) {
            row.append(',').append(f < unit.faults().size() ? number(unit.drawnSeverities()[f], 6) : "");
        }
        for (int i = 0; i < population.layers().size(); i++) {
            Population.Spread spread = population.spreadOf(population.layers().get(i));
            row.append(spread.thickness() > 0 ? "," + number(unit.thickness()[i], 7) : "");
            row.append(spread.conductivity() > 0 ? "," + number(unit.conductivity()[i], 7) : "");
        }
        return row.append('\n').toString();
    }

    private double share(ConductionModel model, String region) {
        double sum = 0;
        for (int i = 0; i < population.layers().size(); i++) {
            sum += population.layers().get(i).region().equals(region) ? model.shareKelvinPerWatt(i) : 0;
        }
        return sum;
    }

    /** The reference population speaks of missing interface material where other layers have voids. */
    private static String kind(DemoFault fault) {
        boolean interfaceMaterial = fault.region().equals("tim");
        return switch (fault.shape()) {
            case THICK -> "thick";
            case CENTRE_VOID -> interfaceMaterial ? "missing_center" : "central_void";
            case EDGE_DELAMINATION -> interfaceMaterial ? "missing_edge" : "edge_delamination";
        };
    }

    private String layerTable() {
        StringBuilder table = new StringBuilder("name,thickness_m,conductivity_W_per_mK,heat_capacity_J_per_m3K,"
                + "area_m2,heat_capacity_J_per_K,share_of_total_resistance_K_per_W,region\n");
        for (int i = 0; i < population.layers().size(); i++) {
            Layer l = population.layers().get(i);
            table.append(String.join(",", l.name(), number(l.thicknessMetres(), 6),
                    number(l.conductivityWattsPerMetreKelvin(), 6),
                    number(l.heatCapacityJoulesPerCubicMetreKelvin(), 6),
                    number(l.areaSquareMetres(), 6), number(l.heatCapacityJoulesPerCubicMetreKelvin()
                            * l.thicknessMetres() * l.areaSquareMetres(), 6), number(nominal.shareKelvinPerWatt(i), 6),
                    l.region())).append('\n');
        }
        Layer last = population.layers().get(population.layers().size() - 1);
        return table.append("coolant_film,,,,").append(number(last.areaSquareMetres(), 6)).append(",,")
                .append(number(nominal.filmShareKelvinPerWatt(), 6)).append(",\n").toString();
    }

    private String measurement() {
        RawRecorder.Setup s = population.setup();
        List<String> lines = new ArrayList<>();
        lines.add(" \"product\": \"" + population.name() + "\"");
        lines.add(" \"note\": \"invented; simulated, not measured\"");
        lines.add(" \"curve\": \"cooling\"");
        lines.add(" \"heating_power_W\": " + s.powerWatts());
        lines.add(" \"heating_s\": " + s.heatingSeconds());
        lines.add(" \"record_s\": " + s.recordSeconds());
        lines.add(" \"coolant_C\": " + s.coolantCelsius());
        lines.add(" \"points\": " + recorder.size());
        lines.add(" \"heated_area_m2\": " + number(population.heatedAreaSquareMetres(), 6));
        lines.add(" \"film_coefficient_W_per_m2K\": " + population.filmWattsPerSquareMetreKelvin());
        lines.add(" \"raw_sample_rate_per_s\": " + 1 / RawRecorder.SAMPLE_SECONDS);
        lines.add(" \"first_sample_s\": " + RawRecorder.FIRST_SECONDS);
        lines.add(" \"noise_sigma_per_raw_sample_K\": " + s.noiseKelvin());
        lines.add(" \"raw_samples_averaged_at_most\": " + RawRecorder.AVERAGED_AT_MOST);
        lines.add(" \"noise_floor_K\": " + s.noiseFloorKelvin());
        lines.add(" \"electrical_transient_K_at_time_0\": " + s.switchingKelvin());
        lines.add(" \"electrical_transient_relative_sigma\": " + s.switchingSpread());
        lines.add(" \"electrical_transient_time_constant_s\": " + s.switchingSeconds());
        lines.add(" \"drift_at_most_K_at_end_of_record\": " + s.driftKelvin());
        lines.add(" \"clamping_relative_sigma_of_" + population.clampedLayer() + "_thickness\": "
                + population.clampSpread());
        lines.add(" \"nominal_total_resistance_K_per_W\": " + number(nominal.steadyResistanceKelvinPerWatt(), 6));
        return "{\n" + String.join(",\n", lines) + "\n}\n";
    }

    private static String number(double value, int digits) {
        String text = Double.toString(new BigDecimal(value).round(new MathContext(digits)).doubleValue());
        return text.endsWith(".0") ? text.substring(0, text.length() - 2) : text;
    }
}

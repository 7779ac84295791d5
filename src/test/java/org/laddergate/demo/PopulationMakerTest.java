package org.laddergate.demo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import java.util.zip.GZIPInputStream;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;
import org.laddergate.demo.DemoFault.Shape;

class PopulationMakerTest {
    private static final List<DemoFault> DOUBLE =
            List.of(new DemoFault("attach", Shape.CENTRE_VOID, 0.08), new DemoFault("tim", Shape.THICK, 0.5));

    @TempDir
    private Path folder;

    static List<Population> populations() {
        return InventedPopulations.ALL;
    }

    /** Source: head of truth.csv of the reference population kestrel; one reader must do for both. */
    @Test
    @Tag("reference")
    void write_kestrelProduct_columnsOfTheReference() throws IOException {
        new PopulationMaker(withClasses(KestrelReference.population(), List.of(DOUBLE)), 1).write(folder, 1, 1, 1);
        List<String> truth = Files.readAllLines(folder.resolve("truth.csv"));
        assertEquals(String.join(",", KestrelReference.rows("truth.csv").get(0)), truth.get(0));
        assertEquals(4, truth.size());
        String[] faulty = truth.get(3).split(",", -1);
        assertEquals(KestrelReference.rows("truth.csv").get(0).length, faulty.length);
        assertArrayEquals(new String[] {"KF0001", "faulty", "attach", "central_void", "0.08", "tim", "thick", "0.5"},
                List.of(faulty).subList(0, 8).toArray());
        String[] head = unzipped("faulty.csv.gz").get(0).split(",");
        assertEquals(1 + 253, head.length);
    }

    /**
     * Source: README of the reference population kestrel, "Detectability": standard deviations of 300 production units.
     * Of 60 units ours are within 30 % of them, three standard errors of a standard deviation.
     */
    @Test
    @Tag("reference")
    void draw_kestrelSpread_sigmasOfTheReference() {
        Population kestrel = KestrelReference.population();
        Random random = new Random(20261201);
        List<double[]> drawn = new ArrayList<>();
        for (int i = 0; i < 60; i++) {
            PopulationUnit unit = PopulationUnit.draw(kestrel, List.of(), random);
            ConductionModel model = unit.model();
            drawn.add(new double[] {model.steadyResistanceKelvinPerWatt(), unit.shiftKelvinPerWatt("die", model),
                unit.shiftKelvinPerWatt("attach", model), unit.shiftKelvinPerWatt("solder", model),
                unit.shiftKelvinPerWatt("tim", model)});
        }
        double[] expected = {0.00315, 0.00020, 0.00100, 0.00070, 0.00284};
        for (int k = 0; k < expected.length; k++) {
            assertEquals(expected[k], sigma(drawn, k), 0.3 * expected[k], "column " + k);
        }
    }

    @Test
    @Tag("identity")
    void write_sameSeed_sameFiles() throws IOException {
        Population small = withClasses(InventedPopulations.WREN, List.of(DOUBLE));
        new PopulationMaker(small, 7).write(folder.resolve("a"), 1, 0, 1);
        new PopulationMaker(small, 7).write(folder.resolve("b"), 1, 0, 1);
        for (String file : List.of("golden.csv.gz", "faulty.csv.gz", "truth.csv", "layers.csv", "measurement.json")) {
            assertEquals(-1, Files.mismatch(folder.resolve("a").resolve(file), folder.resolve("b").resolve(file)),
                    file);
        }
    }

    /** Every population is buildable, and every fault class adds resistance in its own region. */
    @ParameterizedTest
    @MethodSource("populations")
    @Tag("identity")
    void faultClasses_ofEveryPopulation_addResistance(Population population) {
        PopulationUnit nominal = PopulationUnit.nominal(population);
        Set<List<DemoFault>> classes = new HashSet<>(population.faultClasses());
        assertEquals(population.faultClasses().size(), classes.size(), "no class twice");
        for (List<DemoFault> faults : classes) {
            PopulationUnit unit = new PopulationUnit(population, faults,
                    faults.stream().mapToDouble(DemoFault::severity).toArray(), nominal.thickness(),
                    nominal.conductivity());
            ConductionModel model = unit.model();
            for (DemoFault fault : faults) {
                assertTrue(unit.shiftKelvinPerWatt(fault.region(), model) > 0, fault.toString());
            }
        }
    }

    private static Population withClasses(Population p, List<List<DemoFault>> classes) {
        return new Population(p.name(), p.layers(), p.heatedAreaSquareMetres(), p.filmWattsPerSquareMetreKelvin(),
                Map.copyOf(p.spread()), p.clampedLayer(), p.clampSpread(), p.setup(), classes);
    }

    private static double sigma(List<double[]> rows, int column) {
        double mean = rows.stream().mapToDouble(r -> r[column]).average().orElseThrow();
        double sum = rows.stream().mapToDouble(r -> (r[column] - mean) * (r[column] - mean)).sum();
        return Math.sqrt(sum / (rows.size() - 1));
    }

    private List<String> unzipped(String file) throws IOException {
        byte[] zipped = Files.readAllBytes(folder.resolve(file));
        try (GZIPInputStream in = new GZIPInputStream(new ByteArrayInputStream(zipped))) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().toList();
        }
    }
}

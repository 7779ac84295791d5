package org.laddergate.demo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.databind.JsonNode;
import com.fasterxml.jackson.databind.ObjectMapper;
import java.io.IOException;
import java.io.InputStream;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.laddergate.limits.Layer;
import org.laddergate.limits.RegionRole;
import org.laddergate.thermal.FosterNetwork;

/** The conduction model against exact one-dimensional solutions and a two-dimensional program that is not ours. */
class ConductionModelTest {
    private static final double AREA = 1e-4;

    /**
     * Closed form of a rod heated at one end and held at the other (Carslaw and Jaeger, Conduction of Heat in Solids,
     * 1959, section 3.4): R_n = 8R/(pi^2(2n-1)^2), tau_n = 4RC/(pi^2(2n-1)^2). Tolerance: a quarter of a per cent, the
     * error this grid is made for.
     */
    @Test
    @Tag("reference")
    void network_rodOfSilicon_closedFormFromTenMicroseconds() {
        Layer rod = new Layer("rod", "", RegionRole.PART, 2e-4, AREA, 130, 1.66e6);
        FosterNetwork ours = ConductionModel.of(List.of(rod), AREA, Double.POSITIVE_INFINITY, List.of()).network();
        double r = 2e-4 / (130 * AREA);
        double c = 2e-4 * AREA * 1.66e6;
        for (double t = 1e-5; t < 1e-2; t *= 1.5) {
            double exact = 0;
            for (int n = 20_000; n >= 1; n--) {
                double odd = Math.PI * Math.PI * (2.0 * n - 1) * (2.0 * n - 1);
                exact -= 8 * r / odd * Math.expm1(-t * odd / (4 * r * c));
            }
            assertEquals(exact, ours.impedanceKelvinPerWatt(t), 0.0025 * exact, "at " + t + " s");
        }
        assertEquals(r, ours.totalResistanceKelvinPerWatt(), 1e-9 * r, "steady state of a rod is linear");
    }

    /** Source: analytic-structures.json, exact eigenvalue expansions of layered one-dimensional stacks at 50 digits. */
    @ParameterizedTest
    @ValueSource(strings = {"two-layer", "four-layer", "four-layer-attach-x2"})
    @Tag("reference")
    void network_layersOfOneWidth_exactStepResponse(String name) throws IOException {
        JsonNode structure = structure(name);
        List<Layer> layers = new ArrayList<>();
        double thickness = 2.5e-4;
        for (JsonNode element : structure.get("elements_from_junction")) {
            double r = element.get("R").asDouble();
            double c = element.get("C").asDouble();
            layers.add(new Layer("layer", "", RegionRole.PART, thickness, AREA, thickness / (r * AREA),
                    c / (thickness * AREA)));
        }
        FosterNetwork ours = ConductionModel.of(layers, AREA, Double.POSITIVE_INFINITY, List.of()).network();
        double worst = 0;
        for (int i = 0; i < structure.get("t").size(); i++) {
            double t = structure.get("t").get(i).asDouble();
            double exact = structure.get("Zth").get(i).asDouble();
            if (t >= 1e-5) {
                worst = Math.max(worst, Math.abs(ours.impedanceKelvinPerWatt(t) / exact - 1));
            }
        }
        assertTrue(worst < 0.003, name + ": worst relative error " + worst);
        assertEquals(structure.get("R_total").asDouble(), ours.totalResistanceKelvinPerWatt(), 1e-9);
    }

    private static JsonNode structure(String name) throws IOException {
        try (InputStream in = ConductionModelTest.class
                .getResourceAsStream("/reference/thermal/analytic-structures.json")) {
            for (JsonNode s : new ObjectMapper().readTree(in).get("structures")) {
                if (s.get("name").asText().equals(name)) {
                    return s;
                }
            }
        }
        throw new IllegalArgumentException(name);
    }

    /** Source: layers.csv and README of the reference population kestrel, another program with about 10,000 cells. */
    @Test
    @Tag("reference")
    void shares_kestrel_asTheReferenceProgram() {
        ConductionModel model = ConductionModel.of(KestrelReference.layers(), KestrelReference.HEATED_AREA,
                KestrelReference.FILM, List.of());
        double[] expected = KestrelReference.shares();
        assertEquals(0.556239, model.steadyResistanceKelvinPerWatt(), 0.001 * 0.556239);
        for (int layer = 0; layer < expected.length - 1; layer++) {
            assertEquals(expected[layer], model.shareKelvinPerWatt(layer), 0.012 * expected[layer], "layer " + layer);
        }
        assertEquals(expected[expected.length - 1], model.filmShareKelvinPerWatt(), 0.002 * expected[9], "film");
    }

    /**
     * Source: README of the reference population kestrel, table of detectability, "total, mK/W": the fault alone, all
     * else nominal. Printed to 0.1 mK/W, itself within 0.8 % of its own finer grid; tolerance 1.5 % and half a digit.
     */
    @ParameterizedTest
    @CsvSource({"attach,CENTRE_VOID,0.04,4.7", "attach,CENTRE_VOID,0.08,14.5", "attach,CENTRE_VOID,0.15,41.8",
        "attach,CENTRE_VOID,0.30,139.0", "attach,EDGE_DELAMINATION,0.05,3.5", "attach,EDGE_DELAMINATION,0.12,11.1",
        "attach,EDGE_DELAMINATION,0.25,40.7", "attach,THICK,0.30,3.9", "attach,THICK,0.60,7.8",
        "solder,CENTRE_VOID,0.05,39.8", "solder,CENTRE_VOID,0.12,107.5", "solder,CENTRE_VOID,0.25,200.6",
        "solder,EDGE_DELAMINATION,0.10,2.8", "solder,EDGE_DELAMINATION,0.25,8.7", "tim,THICK,0.40,14.1",
        "tim,THICK,0.80,27.6", "tim,CENTRE_VOID,0.15,64.1", "tim,CENTRE_VOID,0.40,145.5",
        "tim,EDGE_DELAMINATION,0.15,3.8", "tim,EDGE_DELAMINATION,0.40,16.8"})
    @Tag("reference")
    void shift_kestrelFaultClass_asTheReferenceProgram(String region, DemoFault.Shape shape, double severity,
            double expectedMilli) {
        Population kestrel = KestrelReference.population();
        PopulationUnit nominal = PopulationUnit.nominal(kestrel);
        PopulationUnit faulty = new PopulationUnit(kestrel, List.of(new DemoFault(region, shape, severity)),
                new double[] {severity}, nominal.thickness(), nominal.conductivity());
        assertEquals(expectedMilli, 1e3 * faulty.shiftKelvinPerWatt(region, faulty.model()),
                0.015 * expectedMilli + 0.05);
    }

    /** Source: truth.csv of the reference population kestrel: R_total of units with spread and faults, every 29th. */
    @Test
    @Tag("reference")
    void steadyResistance_kestrelUnits_withinThreeTenthsOfAPerCent() {
        Population kestrel = KestrelReference.population();
        List<Map<String, String>> rows = KestrelReference.truth();
        for (int i = 0; i < rows.size(); i += 29) {
            double expected = Double.parseDouble(rows.get(i).get("R_total_K_per_W"));
            assertEquals(expected, KestrelReference.unit(kestrel, rows.get(i)).model().steadyResistanceKelvinPerWatt(),
                    0.003 * expected, rows.get(i).toString());
        }
    }

    /** Identity: in steady state what enters leaves, healthy or not, and the shares make up the total. */
    @Test
    @Tag("identity")
    void steadyState_withVoid_energyIsConserved() {
        AirRing hole = AirRing.centre(1, 2.5e-5, 0.3);
        ConductionModel model = ConductionModel.of(KestrelReference.layers(), KestrelReference.HEATED_AREA,
                KestrelReference.FILM, List.of(hole));
        double sum = model.filmShareKelvinPerWatt();
        for (int layer = 0; layer < KestrelReference.layers().size(); layer++) {
            sum += model.shareKelvinPerWatt(layer);
        }
        assertEquals(1, model.steadyHeatOut(), 1e-9);
        assertEquals(model.steadyResistanceKelvinPerWatt(), sum, 1e-9);
        assertEquals(sum, model.network().totalResistanceKelvinPerWatt(), 1e-9);
    }

    /** Metamorphic: four times the shifts change nothing, so the reduction is finished. */
    @Test
    @Tag("metamorphic")
    void network_moreShifts_sameResponse() {
        ConductionModel model = ConductionModel.of(KestrelReference.layers(), KestrelReference.HEATED_AREA,
                KestrelReference.FILM, List.of(AirRing.centre(5, 2.56e-4, 0.12)));
        FosterNetwork few = model.network();
        FosterNetwork many = model.network(8);
        for (double t = 1e-5; t < 20; t *= 1.3) {
            double expected = many.impedanceKelvinPerWatt(t);
            assertEquals(expected, few.impedanceKelvinPerWatt(t), 1e-4 * expected, "at " + t + " s");
        }
    }

    /** Metamorphic: half the element size, healthy and with a void in the attach. */
    @ParameterizedTest
    @ValueSource(doubles = {0, 0.08})
    @Tag("metamorphic")
    void network_finerGrid_sameResponseWithinThreeTenthsOfAPerCent(double share) {
        List<AirRing> rings = share > 0 ? List.of(AirRing.centre(1, 2.5e-5, share)) : List.of();
        FosterNetwork coarse = ConductionModel.of(KestrelReference.layers(), KestrelReference.HEATED_AREA,
                KestrelReference.FILM, rings).network();
        FosterNetwork fine = ConductionModel.of(KestrelReference.layers(), KestrelReference.HEATED_AREA,
                KestrelReference.FILM, rings, 2).network();
        for (double t = 1e-5; t < 20; t *= 2) {
            double expected = fine.impedanceKelvinPerWatt(t);
            assertEquals(expected, coarse.impedanceKelvinPerWatt(t), 0.003 * expected, "at " + t + " s");
        }
    }

    @Test
    @Tag("edge")
    void of_impossibleStack_refused() {
        List<Layer> layers = KestrelReference.layers();
        assertThrows(IllegalArgumentException.class, () -> ConductionModel.of(List.of(), 1e-5, 1e4, List.of()));
        assertThrows(IllegalArgumentException.class, () -> ConductionModel.of(layers, 2.6e-5, 1e4, List.of()));
        assertThrows(IllegalArgumentException.class, () -> ConductionModel.of(layers, 2e-5, Double.NaN, List.of()));
        assertThrows(IllegalArgumentException.class, () -> new AirRing(1, 2e-3, 1e-3));
    }
}

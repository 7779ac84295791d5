package org.laddergate.demo;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.laddergate.limits.Layer;

/**
 * One part of a population: its process factors and its faults as they turned out.
 *
 * @param population        the product
 * @param faults            of its class; empty for a healthy part
 * @param drawnSeverities   of these faults: areas scatter, thickness does not [1]
 * @param thickness         process factor of each layer's thickness [1]
 * @param conductivity      process factor of each layer's conductivity [1]
 */
record PopulationUnit(Population population, List<DemoFault> faults, double[] drawnSeverities, double[] thickness,
        double[] conductivity) {
    private static final double SPREAD_CUT = 3.5;
    private static final double AREA_SCATTER = 0.04;
    private static final double AREA_CUT = 2.5;

    static PopulationUnit draw(Population population, List<DemoFault> faults, Random random) {
        int n = population.layers().size();
        double[] thickness = new double[n];
        double[] conductivity = new double[n];
        for (int i = 0; i < n; i++) {
            Layer layer = population.layers().get(i);
            Population.Spread spread = population.spreadOf(layer);
            thickness[i] = 1 + spread.thickness() * cut(random, SPREAD_CUT);
            conductivity[i] = 1 + spread.conductivity() * cut(random, SPREAD_CUT);
            if (layer.name().equals(population.clampedLayer())) {
                thickness[i] *= 1 + population.clampSpread() * cut(random, SPREAD_CUT);
            }
        }
        double[] severities = new double[faults.size()];
        for (int f = 0; f < severities.length; f++) {
            double scatter = faults.get(f).shape() == DemoFault.Shape.THICK ? 0 : AREA_SCATTER * cut(random, AREA_CUT);
            severities[f] = faults.get(f).severity() * (1 + scatter);
        }
        return new PopulationUnit(population, faults, severities, thickness, conductivity);
    }

    /** The part that has every factor at 1 and no fault. */
    static PopulationUnit nominal(Population population) {
        double[] ones = population.layers().stream().mapToDouble(l -> 1).toArray();
        return new PopulationUnit(population, List.of(), new double[0], ones, ones);
    }

    private static double cut(Random random, double most) {
        double z = random.nextGaussian();
        while (Math.abs(z) > most) {
            z = random.nextGaussian();
        }
        return z;
    }

    ConductionModel model() {
        return model("");
    }

    /** What this region adds to the steady resistance: the part as it is minus with this region nominal [K/W]. */
    double shiftKelvinPerWatt(String region, ConductionModel asIs) {
        return asIs.steadyResistanceKelvinPerWatt() - model(region).steadyResistanceKelvinPerWatt();
    }

    /** The part with one region back to nominal, solved on the grid of the part as it is. */
    private ConductionModel model(String nominalRegion) {
        List<Layer> built = new ArrayList<>();
        for (int i = 0; i < thickness.length; i++) {
            Layer layer = population.layers().get(i);
            boolean restored = !nominalRegion.isEmpty() && layer.region().equals(nominalRegion);
            built.add(restored ? layer : scaled(layer, thickness[i], conductivity[i]));
        }
        List<AirRing> rings = new ArrayList<>();
        for (int f = 0; f < faults.size(); f++) {
            DemoFault fault = faults.get(f);
            int at = population.layerOfRegion(fault.region());
            double area = population.layers().get(at).areaSquareMetres();
            boolean restored = fault.region().equals(nominalRegion);
            if (fault.shape() == DemoFault.Shape.THICK) {
                built.set(at, restored ? built.get(at) : scaled(built.get(at), 1 + drawnSeverities[f], 1));
            } else {
                AirRing ring = fault.shape() == DemoFault.Shape.CENTRE_VOID
                        ? AirRing.centre(at, area, drawnSeverities[f]) : AirRing.rim(at, area, drawnSeverities[f]);
                rings.add(restored ? ring.linesOnly() : ring);
            }
        }
        return ConductionModel.of(built, population.heatedAreaSquareMetres(),
                population.filmWattsPerSquareMetreKelvin(), rings);
    }

    private static Layer scaled(Layer layer, double thickness, double conductivity) {
        return new Layer(layer.name(), layer.region(), layer.role(), layer.thicknessMetres() * thickness,
                layer.areaSquareMetres(), layer.conductivityWattsPerMetreKelvin() * conductivity,
                layer.heatCapacityJoulesPerCubicMetreKelvin());
    }
}

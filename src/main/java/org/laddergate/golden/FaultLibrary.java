package org.laddergate.golden;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.FaultSignature.Shape;
import org.laddergate.limits.Layer;
import org.laddergate.limits.SpreadDirection;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.Recipe;
import org.laddergate.thermal.AxisymmetricStack;
import org.laddergate.thermal.AxisymmetricStack.Void;
import org.laddergate.thermal.FosterNetwork;

/**
 * Works out with the calibrated conduction model what faults of each region would do to the curve.
 *
 * <p>Method: a region's resistance is raised evenly, its weakest layer is made thicker, and voids of several sizes are
 * put into its weakest layer, at the axis and at the rim. Each faulty model is compared with a healthy one on the same
 * grid, so that grid errors cancel. The first layer carries the heat source and gets no voids.
 *
 * <p>Why: a void bends the heat's path, and its curve is no multiple of that of a thicker layer; with thick layers
 * alone most voids were put down to the wrong neighbour. Figures in docs/decisions/0002-fault-signatures.md.
 */
final class FaultLibrary {
    private static final double SMALL = 0.02;
    private static final double[] GROWTHS = {0.25, 1, 4};
    private static final double[] CENTRE_SHARES = {0.02, 0.035, 0.06, 0.1, 0.16, 0.25, 0.4};
    private static final double[] EDGE_SHARES = {0.04, 0.08, 0.15, 0.25, 0.45};

    private final StackModel stack;
    private final double[] parameters;
    private final Recipe recipe;
    private final double[] fineTimes;
    private final ComparisonBins bins;

    FaultLibrary(StackModel stack, double[] parameters, Recipe recipe, double[] fineTimes, ComparisonBins bins) {
        this.stack = stack;
        this.parameters = parameters;
        this.recipe = recipe;
        this.fineTimes = fineTimes;
        this.bins = bins;
    }

    private record Case(String region, Shape shape, double severity, double[] resistance, double[] thickness,
            Void hole) {}

    List<FaultSignature> signatures(List<String> regions) {
        List<Case> cases = new ArrayList<>();
        for (String region : regions) {
            List<Integer> members = IntStream.range(0, stack.layerCount())
                    .filter(i -> stack.layer(i).region().equals(region)).boxed().toList();
            for (double growth : GROWTHS) {
                double[] factor = stack.noChange();
                members.forEach(i -> factor[i] = 1 + growth);
                cases.add(new Case(region, Shape.UNIFORM, growth, factor, stack.noChange(), null));
            }
            int weakest = members.stream().max(Comparator.comparingDouble(this::resistivity)).orElseThrow();
            for (double growth : GROWTHS) {
                double[] factor = stack.noChange();
                factor[weakest] = 1 + growth;
                cases.add(new Case(region, Shape.THICKER, growth, stack.noChange(), factor, null));
            }
            if (weakest > 0) {
                double radius = stack.radiusMetres(weakest);
                for (double share : CENTRE_SHARES) {
                    cases.add(new Case(region, Shape.CENTRE, share, stack.noChange(), stack.noChange(),
                            new Void(weakest, 0, radius * Math.sqrt(share))));
                }
                for (double share : EDGE_SHARES) {
                    cases.add(new Case(region, Shape.EDGE, share, stack.noChange(), stack.noChange(),
                            new Void(weakest, radius * Math.sqrt(1 - share), radius)));
                }
            }
        }
        return cases.parallelStream().map(this::signature).toList();
    }

    /** How parts may differ: each layer's resistance and capacitance, the film, the heated share; sigmas still zero. */
    List<SpreadDirection> spread() {
        int layers = stack.layerCount();
        double[] healthy = curve(stack.build(parameters, stack.noChange(), List.of()).network());
        return IntStream.range(0, stack.parameterCount()).parallel().mapToObj(i -> {
            double[] moved = parameters.clone();
            // More resistance is less conductivity; one unit is 100 % in the linear sense.
            double step = i < layers ? -SMALL : SMALL;
            moved[i] += step;
            double[] changed = curve(stack.build(moved, stack.noChange(), List.of()).network());
            for (int k = 0; k < changed.length; k++) {
                changed[k] = (changed[k] - healthy[k]) / SMALL;
            }
            double[] compared = new double[bins.size()];
            bins.reduceInto(changed, compared);
            String name = i < layers ? "resistance of " + stack.layer(i).name()
                    : i < 2 * layers ? "heat capacity of " + stack.layer(i - layers).name()
                    : i == 2 * layers ? "film under the last layer" : "heated share";
            String region = i < layers ? stack.layer(i).region() : "";
            return new SpreadDirection(name, region, 0, compared);
        }).toList();
    }

    /** A void sits where the material resists most for its thickness: in the joint, not in the metal beside it. */
    private double resistivity(int layer) {
        Layer l = stack.layer(layer);
        return 1 / l.conductivityWattsPerMetreKelvin() / l.thicknessMetres();
    }

    private FaultSignature signature(Case c) {
        List<Void> healthyVoids = c.hole() == null ? List.of()
                : List.of(new Void(-1, c.hole().innerRadiusMetres(), c.hole().outerRadiusMetres()));
        List<Void> faultyVoids = c.hole() == null ? List.of() : List.of(c.hole());
        FosterNetwork healthy = stack.build(parameters, stack.noChange(), healthyVoids).network();
        FosterNetwork faulty = stack.build(parameters, c.resistance(), c.thickness(), faultyVoids).network();
        double[] difference = curve(faulty);
        double[] base = curve(healthy);
        for (int i = 0; i < base.length; i++) {
            difference[i] -= base[i];
        }
        double[] compared = new double[bins.size()];
        bins.reduceInto(difference, compared);
        return new FaultSignature(c.region(), c.shape(), c.severity(), total(faulty) - total(healthy), compared);
    }

    private double[] curve(FosterNetwork network) {
        double[] out = new double[fineTimes.length];
        network.coolingInto(recipe.heatingPowerWatts(), recipe.pulseSeconds(), fineTimes, out);
        return out;
    }

    private static double total(FosterNetwork network) {
        double sum = 0;
        for (int j = 0; j < network.size(); j++) {
            sum += network.resistanceKelvinPerWatt(j);
        }
        return sum;
    }

    /** Healthy model of the calibrated stack. */
    AxisymmetricStack healthy() {
        return stack.build(parameters, stack.noChange(), List.of());
    }
}

package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.FaultSignature.Shape;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.SpreadDirection;
import org.laddergate.measurement.Recipe;
import org.laddergate.thermal.CauerLadder;
import org.laddergate.thermal.CauerToFoster;
import org.laddergate.thermal.FosterNetwork;
import org.laddergate.thermal.FosterToCauer;
import org.laddergate.thermal.SpectrumSearch;

/**
 * The heat path of a product without a layer table: the golden ladder, cut into regions at given cumulative
 * capacitances.
 *
 * <p>A region's resistance is scaled in the ladder and the ladder's response compared with the golden one. Voids have
 * no signature here; faults of unknown shape get the larger share of the prior instead.
 */
final class LadderFaultModel {
    private static final double[] GROWTHS = {0.25, 1, 4};
    private static final double SMALL = 0.02;
    private static final double CURVE_SHARE = 2e-5;

    private final Recipe recipe;
    private final GoldenCurves curves;
    private final CauerLadder ladder;
    private final double[] healthy;

    private LadderFaultModel(Recipe recipe, GoldenCurves curves, CauerLadder ladder) {
        this.recipe = recipe;
        this.curves = curves;
        this.ladder = ladder;
        this.healthy = response(ladder);
    }

    static FaultModel of(Product product, GoldenCurves curves) {
        double[] sigma = new double[curves.mean().length];
        for (int i = 0; i < sigma.length; i++) {
            sigma[i] = Math.max(curves.noise()[i] / Math.sqrt(curves.units()), CURVE_SHARE * curves.mean()[0]);
        }
        SpectrumSearch.Found found = SpectrumSearch.smoothest(curves.bins().centresSeconds(), curves.mean(), sigma,
                product.recipe().heatingPowerWatts(), product.recipe().pulseSeconds());
        FosterNetwork network = FosterNetwork.of(found.amplitudes(), found.plan().timeConstantsSeconds());
        LadderFaultModel model =
                new LadderFaultModel(product.recipe(), curves, FosterToCauer.computeLadder(network));
        List<FaultSignature> signatures = new ArrayList<>();
        List<SpreadDirection> spread = new ArrayList<>();
        double[] golden = new double[product.regions().size()];
        for (int r = 0; r < golden.length; r++) {
            Region region = product.regions().get(r);
            double[] share = model.share(region);
            for (int k = 0; k < share.length; k++) {
                golden[r] += share[k] * model.ladder.resistanceKelvinPerWatt(k);
            }
            for (double growth : GROWTHS) {
                signatures.add(new FaultSignature(region.name(), Shape.UNIFORM, growth, golden[r] * growth,
                        model.deviation(share, growth)));
            }
            spread.add(new SpreadDirection("resistance of " + region.name(), region.name(), 0,
                    scaled(model.deviation(share, SMALL), 1 / SMALL)));
            spread.add(new SpreadDirection("heat capacity of " + region.name(), "", 0,
                    scaled(model.capacityDeviation(region), 1 / SMALL)));
        }
        return new FaultModel(product.regions(), golden, signatures, spread, network.resistancesKelvinPerWatt(),
                network.timeConstantsSeconds(), false,
                List.of("Without a layer table faults are told apart by when they start only; voids may be put down to a "
                        + "neighbouring region."));
    }

    /** Share of each rung's resistance that lies in a region: the rung spans from its own node to the next. */
    private double[] share(Region region) {
        int n = ladder.size();
        double[] share = new double[n];
        double sum = 0;
        for (int k = 0; k < n; k++) {
            double from = sum + 0.5 * ladder.capacitanceJoulesPerKelvin(k);
            sum += ladder.capacitanceJoulesPerKelvin(k);
            double to = k + 1 < n ? sum + 0.5 * ladder.capacitanceJoulesPerKelvin(k + 1) : Math.max(sum, from * 1.0001);
            double low = Math.max(from, Math.max(region.fromJoulesPerKelvin(), 1e-300));
            double high = Math.min(to, region.toJoulesPerKelvin());
            share[k] = high > low ? Math.log(high / low) / Math.log(to / from) : 0;
        }
        return share;
    }

    private double[] deviation(double[] share, double growth) {
        double[] factor = new double[share.length];
        for (int k = 0; k < factor.length; k++) {
            factor[k] = 1 + growth * share[k];
        }
        return compared(response(ladder.withResistancesScaled(factor)));
    }

    private double[] capacityDeviation(Region region) {
        double[] c = ladder.capacitancesJoulesPerKelvin();
        double sum = 0;
        for (int k = 0; k < c.length; k++) {
            double middle = sum + 0.5 * c[k];
            sum += c[k];
            if (middle > region.fromJoulesPerKelvin() && middle <= region.toJoulesPerKelvin()) {
                c[k] *= 1 + SMALL;
            }
        }
        return compared(response(CauerLadder.of(ladder.resistancesKelvinPerWatt(), c)));
    }

    private double[] compared(double[] faulty) {
        double[] difference = new double[faulty.length];
        for (int i = 0; i < difference.length; i++) {
            difference[i] = faulty[i] - healthy[i];
        }
        double[] out = new double[curves.comparison().size()];
        curves.comparison().reduceInto(difference, out);
        return out;
    }

    private double[] response(CauerLadder of) {
        double[] out = new double[curves.bins().size()];
        CauerToFoster.computeNetwork(of).coolingInto(recipe.heatingPowerWatts(), recipe.pulseSeconds(),
                curves.bins().centresSeconds(), out);
        return out;
    }

    private static double[] scaled(double[] v, double factor) {
        for (int i = 0; i < v.length; i++) {
            v[i] *= factor;
        }
        return v;
    }
}

package org.laddergate.limits;

import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.Recipe;
import org.laddergate.thermal.SpectrumPlan;

/** The one way in which structure functions of a product's parts are computed, golden units and production alike. */
public final class StructurePlans {
    /**
     * Smoothness and closeness to golden, in units of the noise; figures in docs/decisions/0003-spectrum-smoothing.md.
     */
    private static final double SMOOTHING = 30;
    private static final double RIDGE = 3;

    private StructurePlans() {}

    /** Plan for single parts of a model that has a golden spectrum. */
    public static SpectrumPlan of(GoldenModel model, Recipe recipe) {
        LogTimeBins bins =
                LogTimeBins.spanning(model.firstEdgeSeconds(), model.lastEdgeSeconds(), model.binsPerDecade());
        return SpectrumPlan.drawnTowards(model.spectrum(), bins.centresSeconds(), model.noiseKelvin(),
                recipe.heatingPowerWatts(), recipe.pulseSeconds(), SMOOTHING, RIDGE);
    }
}

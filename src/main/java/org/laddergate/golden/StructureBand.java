package org.laddergate.golden;

import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.Envelope;
import org.laddergate.limits.GoldenModel;
import org.laddergate.measurement.Recipe;

/** Placeholder until the spectrum room is in. */
final class StructureBand {
    private StructureBand() {}

    static Envelope none() {
        return new Envelope(new double[0], new double[0], new double[0]);
    }

    static GoldenModel addTo(GoldenModel model, Recipe recipe, GoldenCurves curves, DecisionSettings settings) {
        return model;
    }
}

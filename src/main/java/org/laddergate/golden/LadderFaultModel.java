package org.laddergate.golden;

import org.laddergate.limits.Product;

/** Placeholder until the ladder room is in. */
final class LadderFaultModel {
    private LadderFaultModel() {}

    static FaultModel of(Product product, GoldenCurves curves) {
        throw new UnsupportedOperationException();
    }
}

package org.laddergate.demo;

import java.util.Locale;

/**
 * What is wrong with an invented part.
 *
 * @param region    region at fault; empty for a healthy part
 * @param shape     how
 * @param severity  share of the layer's area that is missing, or relative growth of its thickness [1]
 */
record DemoFault(String region, Shape shape, double severity) {
    static final DemoFault NONE = new DemoFault("", Shape.THICK, 0);

    /** Shapes of faults. */
    enum Shape {
        /** The layer is thicker everywhere. */
        THICK,
        /** A disc in the middle of the layer is empty. */
        CENTRE_VOID,
        /** The rim of the layer has come off. */
        EDGE_DELAMINATION
    }

    boolean isNone() {
        return region.isEmpty();
    }

    @Override
    public String toString() {
        return isNone() ? "healthy" : String.format(Locale.ROOT, "%s %s %.0f %%", region,
                shape.name().toLowerCase(Locale.ROOT).replace('_', ' '), 100 * severity);
    }
}

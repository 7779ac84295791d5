package org.laddergate.screening;

import java.util.Optional;

/** Structure function of one part against the golden envelope. */
record StructureReading(double[] resistances, double[] capacitances, boolean inside, double firstExit,
        Optional<Reason> reason) {

    static StructureReading none() {
        return new StructureReading(new double[0], new double[0], true, Double.NaN, Optional.empty());
    }

    static StructureReading of(Plan plan, Workspace work) {
        return none();
    }
}

package org.laddergate.screening;

import java.util.Locale;
import java.util.Optional;
import org.laddergate.limits.Envelope;
import org.laddergate.thermal.StructureSolver;

/**
 * Structure function of one part against the golden envelope.
 *
 * @param resistances   cumulative resistances of the points [K/W]
 * @param capacitances  cumulative capacitances of the points [J/K]
 * @param inside        whether it stays in the envelope
 * @param firstExit     capacitance where it first leaves [J/K]; NaN if it stays
 * @param reason        why it fails, if it leaves
 */
record StructureReading(double[] resistances, double[] capacitances, boolean inside, double firstExit,
        Optional<Reason> reason) {

    static StructureReading none() {
        return new StructureReading(new double[0], new double[0], true, Double.NaN, Optional.empty());
    }

    static StructureReading of(Plan plan, Workspace work) {
        StructureSolver solver = work.structure;
        solver.solve(work.fine);
        Envelope band = plan.limits().model().envelope();
        for (int i = 0; i < band.capacitancesJoulesPerKelvin().length; i++) {
            double c = band.capacitancesJoulesPerKelvin()[i];
            double r = solver.resistanceAt(c);
            boolean high = r > band.upperKelvinPerWatt()[i];
            if (high || r < band.lowerKelvinPerWatt()[i]) {
                double bound = high ? band.upperKelvinPerWatt()[i] : band.lowerKelvinPerWatt()[i];
                Reason reason = new Reason("structure_outside_envelope", String.format(Locale.ROOT,
                        "The structure function leaves the golden envelope at %.4g J/K with %.5g K/W, %s %.5g K/W.", c, r,
                        high ? "above" : "below", bound), r, bound);
                return new StructureReading(solver.resistances(), solver.capacitances(), false, c, Optional.of(reason));
            }
        }
        return new StructureReading(solver.resistances(), solver.capacitances(), true, Double.NaN, Optional.empty());
    }
}

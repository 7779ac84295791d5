package org.laddergate.thermal;

/**
 * From a cooling curve to the points of its structure function, by one plan: spectrum, Foster network, ladder,
 * cumulation. Not thread-safe: it owns its scratch arrays, and allocates nothing while solving.
 */
public final class StructureSolver {
    private final SpectrumPlan plan;
    private final SpectrumPlan.Workspace spectrumWork;
    private final FosterToCauer.Workspace ladderWork;
    private final double[] timeConstants;
    private final double[] amplitudes;
    private final double[] rungR;
    private final double[] rungC;
    private final double[] resistances;
    private final double[] capacitances;
    private int points;

    public StructureSolver(SpectrumPlan plan) {
        int n = plan.size();
        this.plan = plan;
        this.spectrumWork = plan.newWorkspace();
        this.ladderWork = new FosterToCauer.Workspace(n);
        this.timeConstants = plan.timeConstantsSeconds();
        this.amplitudes = new double[n];
        this.rungR = new double[n];
        this.rungC = new double[n];
        this.resistances = new double[n + 1];
        this.capacitances = new double[n + 1];
    }

    /**
     * Solves for a curve at the plan's times [K or deg C]; the results are read from this object until the next call.
     */
    public void solve(double[] temperatures) {
        plan.solveInto(temperatures, amplitudes, spectrumWork);
        int rungs = FosterToCauer.computeLadderInto(amplitudes, timeConstants, timeConstants.length, rungR, rungC,
                ladderWork);
        StructureFunction.cumulateInto(rungR, rungC, rungs, resistances, capacitances);
        points = rungs + 1;
        // The last thousandth of the resistance belongs to time constants far beyond the record; its capacitance means
        // nothing.
        double end = 0.999 * resistances[rungs];
        while (points > 2 && resistances[points - 2] >= end) {
            points--;
        }
    }

    /** Number of points of the structure function. */
    public int points() {
        return points;
    }

    /** Cumulative resistance at a cumulative capacitance [K/W]. */
    public double resistanceAt(double capacitanceJoulesPerKelvin) {
        return StructureFunction.resistanceAt(resistances, capacitances, points, capacitanceJoulesPerKelvin);
    }

    /** Cumulative resistances of the points [K/W], a copy. */
    public double[] resistances() {
        return java.util.Arrays.copyOf(resistances, points);
    }

    /** Cumulative capacitances of the points [J/K], a copy. */
    public double[] capacitances() {
        return java.util.Arrays.copyOf(capacitances, points);
    }
}

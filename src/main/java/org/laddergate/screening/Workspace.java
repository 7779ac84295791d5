package org.laddergate.screening;

import org.laddergate.limits.evidence.EvidenceModel;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.thermal.SpectrumPlan;
import org.laddergate.thermal.StructureSolver;

/** Scratch arrays for judging one measurement at a time; one per thread and plan. Not thread-safe. */
final class Workspace {
    final double[] binned;
    final int[] counts;
    final double[] fine;
    final double[] correction;
    final double[] deviation;
    final double[] compared;
    final double[] whitened;
    final double[] scratch;
    final double[] explanationLog;
    final double[] subjectLog;
    final double[] posterior;
    final StructureSolver structure;

    Workspace(LogTimeBins bins, ComparisonBins comparison, EvidenceModel evidence, SpectrumPlan spectrum) {
        int n = bins.size();
        int freedom = evidence.family().freedom();
        binned = new double[n];
        counts = new int[n];
        fine = new double[n];
        correction = new double[n];
        deviation = new double[n];
        compared = new double[comparison.size()];
        whitened = new double[freedom];
        scratch = new double[Math.max(freedom, n)];
        explanationLog = new double[evidence.explanationCount()];
        subjectLog = new double[evidence.subjects().size()];
        posterior = new double[evidence.subjects().size()];
        structure = new StructureSolver(spectrum);
    }
}

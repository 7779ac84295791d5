package org.laddergate.screening;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.RegionEstimator;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.StructurePlans;
import org.laddergate.limits.evidence.EvidenceModel;
import org.laddergate.limits.evidence.FamilyModel;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.CurveChecks;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.thermal.SpectrumPlan;

/**
 * Everything that judging needs and that depends only on the limit set, worked out once per revision. Immutable.
 */
public final class Plan {
    private final LimitSet limits;
    private final LogTimeBins bins;
    private final ComparisonBins comparison;
    private final CurveChecks checks;
    private final EvidenceModel evidence;
    private final List<RegionPlan> regions;
    private final SpectrumPlan spectrum;

    private Plan(LimitSet limits) {
        GoldenModel model = limits.model();
        this.limits = limits;
        this.bins = LogTimeBins.spanning(model.firstEdgeSeconds(), model.lastEdgeSeconds(), model.binsPerDecade());
        this.comparison = ComparisonBins.of(bins);
        this.checks = new CurveChecks(model.goldenKelvin(), model.noiseKelvin(), limits.recipe().maximumNoiseKelvin());
        this.evidence = EvidenceModel.of(model, limits.recipe(), limits.regionLimits().stream()
                .filter(RegionLimit::assessed).map(RegionLimit::region).toList(), limits.settings());
        this.spectrum = StructurePlans.of(model, limits.recipe());
        this.regions = new ArrayList<>();
        double[] golden = new double[comparison.size()];
        comparison.reduceInto(model.goldenKelvin(), golden);
        double[][] base = FamilyModel.base(model.comparisonNoiseKelvin(), golden, comparison.logCentres());
        for (RegionLimit limit : limits.regionLimits()) {
            FaultSignature slight = model.signatures().stream()
                    .filter(s -> s.region().equals(limit.region().name())
                            && s.shape() == FaultSignature.Shape.UNIFORM)
                    .min(Comparator.comparingDouble(FaultSignature::severity)).orElseThrow();
            regions.add(new RegionPlan(limit, slight,
                    RegionEstimator.of(limit.region().name(), slight, model.spread(), base)));
        }
    }

    public static Plan of(LimitSet limits) {
        return new Plan(limits);
    }

    public LimitSet limits() {
        return limits;
    }

    LogTimeBins bins() {
        return bins;
    }

    ComparisonBins comparison() {
        return comparison;
    }

    CurveChecks checks() {
        return checks;
    }

    EvidenceModel evidence() {
        return evidence;
    }

    List<RegionPlan> regions() {
        return regions;
    }

    Workspace newWorkspace() {
        return new Workspace(bins, comparison, evidence, spectrum);
    }
}

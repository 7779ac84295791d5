package org.laddergate.records;

import java.util.List;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;

/**
 * Replaces -0.0 by 0.0 in the scalars of a judgement. SQLite keeps small whole numbers of a REAL column as integers and
 * so forgets the sign of zero; without this the first answer and the stored one would differ in a character.
 */
final class PositiveZero {
    private PositiveZero() {}

    static Judgement in(Judgement j) {
        List<RegionResult> regions = j.regions().stream().map(PositiveZero::in).toList();
        List<Reason> reasons = j.reasons().stream()
                .map(r -> new Reason(r.code(), r.sentence(), in(r.value()), in(r.bound()))).toList();
        return new Judgement(j.outcome(), j.disposition(), j.failingRegion(), j.otherSuspects(),
                in(j.decisionConfidence()), regions, j.envelopeInside(), in(j.envelopeFirstExitJoulesPerKelvin()),
                in(j.inFamilyStatistic()), in(j.inFamilyLimit()), reasons, j.limitRevision(), j.limitSha256(),
                j.algorithmVersion(), j.trace());
    }

    private static RegionResult in(RegionResult r) {
        return new RegionResult(r.region(), r.role(), r.assessed(), in(r.resistanceKelvinPerWatt()),
                in(r.uncertaintyKelvinPerWatt()), in(r.lowerLimitKelvinPerWatt()), in(r.upperLimitKelvinPerWatt()),
                in(r.probabilityConforming()), in(r.faultProbability()));
    }

    /** IEEE 754: -0.0 + 0.0 is 0.0; every other value, NaN and infinities included, stays. */
    private static double in(double value) {
        return value + 0.0;
    }
}

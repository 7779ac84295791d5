package org.laddergate.screening;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.RegionRole;
import org.laddergate.limits.evidence.EvidenceModel;
import org.laddergate.limits.evidence.FamilyModel;
import org.laddergate.limits.evidence.Subject;
import org.laddergate.measurement.CurveNormaliser;
import org.laddergate.measurement.Finding;
import org.laddergate.measurement.InvalidReason;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.NoiseEstimate;

/**
 * Judges one measurement at a time by a plan. Not thread-safe: one per thread and plan; it owns its scratch arrays.
 *
 * <p>Order of judgement: is it a measurement at all (coverage, signal)? Then all explanations of its deviation from
 * golden are weighed. If any limit is broken, the most probable explanation decides: an error of the measurement or a
 * shift of the fixture makes it invalid, anything else fails the part. If no limit is broken the part passes.
 */
public final class Screener {
    /** Changes whenever the same curve and limits could give another number. */
    public static final String ALGORITHM_VERSION = "1";

    /** A part is measured again, instead of failed, only when an error of the measurement is this probable. */
    static final double CERTAIN_ENOUGH = 0.9;

    private static final double LIKELY = 0.5;

    private final Plan plan;
    private final Workspace work;
    private final RegionReading reading;

    public Screener(Plan plan) {
        this.plan = plan;
        this.work = plan.newWorkspace();
        this.reading = new RegionReading(plan, work);
    }

    /** Judges a measurement whose curve kind is the recipe's. */
    public Judgement judge(Measurement measurement) {
        List<Finding> findings = new ArrayList<>(0);
        ReportedRules.check(measurement, plan.limits().recipe(), findings);
        int filled = plan.bins().binInto(measurement.curve().timesSecondsUnsafe(), measurement.curve().valuesUnsafe(),
                work.binned, work.counts, work.scratch);
        if (!findings.isEmpty()) {
            return invalid(findings);
        }
        findings.addAll(plan.checks().coverage(work.binned, filled));
        findings.addAll(plan.checks().gaps(work.counts, plan.bins().perDecade()));
        if (!findings.isEmpty()) {
            return invalid(findings);
        }
        double noiseRatio = normalise(measurement);
        findings.addAll(plan.checks().signal(work.fine, work.counts, noiseRatio));
        if (!findings.isEmpty()) {
            return invalid(findings);
        }
        return weigh(noiseRatio);
    }

    /** Fills the normalised curve and its deviation from golden; returns the noise in units of the golden noise. */
    private double normalise(Measurement measurement) {
        GoldenModel model = plan.limits().model();
        double factor = CurveNormaliser.factor(measurement, plan.limits().recipe());
        PulseCorrection.addInto(measurement, plan.limits().recipe(), model, plan.bins(), work);
        for (int i = 0; i < work.fine.length; i++) {
            work.fine[i] = factor * work.binned[i] + work.correction[i];
            work.deviation[i] = work.fine[i] - model.goldenKelvin()[i];
        }
        return NoiseEstimate.ratio(work.deviation, model.noiseKelvin(), work.scratch);
    }

    private Judgement weigh(double noiseRatio) {
        EvidenceModel evidence = plan.evidence();
        plan.comparison().reduceInto(work.deviation, work.compared);
        evidence.family().whitenInto(work.compared, work.whitened);
        evidence.weighInto(work.whitened, work.explanationLog, work.subjectLog, work.scratch);
        double inFamily = evidence.posteriorInto(work.subjectLog, work.posterior);
        double tSquared = FamilyModel.tSquared(work.whitened);
        double shape = evidence.logFaultRatio(work.subjectLog);
        StructureReading structure = StructureReading.of(plan, work);
        List<Reason> reasons = new ArrayList<>(0);
        List<Reason> againstPart = new ArrayList<>(0);
        brokenLimits(tSquared, shape, structure, noiseRatio, reasons, againstPart);
        if (reasons.isEmpty()) {
            return pass(noiseRatio, inFamily, tSquared, structure);
        }
        double wrongMeasurement = 0;
        for (int s = 0; s < work.posterior.length; s++) {
            if (evidence.subjects().get(s).kind() == Subject.Kind.MEASUREMENT) {
                wrongMeasurement += work.posterior[s];
            }
        }
        if (wrongMeasurement > CERTAIN_ENOUGH) {
            int error = mostProbable(kind -> kind == Subject.Kind.MEASUREMENT);
            return doubtful(evidence.subjects().get(error), wrongMeasurement, tSquared, structure);
        }
        int best = mostProbable(kind -> kind != Subject.Kind.MEASUREMENT);
        if (evidence.subjects().get(best).kind() == Subject.Kind.FIXTURE_REGION) {
            if (work.posterior[best] > LIKELY) {
                return fixture(evidence.subjects().get(best), work.posterior[best], tSquared, structure);
            }
            if (againstPart.isEmpty()) {
                // A fixture a little off, or a shape that looks like one if anything, is no reason to reject a part.
                return pass(noiseRatio, inFamily, tSquared, structure);
            }
        }
        return fail(reasons, tSquared, structure, noiseRatio);
    }

    private void brokenLimits(double tSquared, double shape, StructureReading structure, double noiseRatio,
            List<Reason> reasons, List<Reason> againstPart) {
        GoldenModel model = plan.limits().model();
        for (RegionPlan region : plan.regions()) {
            if (region.limit().assessed()) {
                reading.brokenLimit(region, noiseRatio).ifPresent(
                        region.limit().region().role() == RegionRole.PART ? againstPart::add : reasons::add);
            }
        }
        if (shape > model.shapeLimit()) {
            reasons.add(new Reason("shape_of_a_fault", text("The curve looks like a fault rather than like a healthy "
                    + "part: log odds %.2f, limit %.2f.", shape, model.shapeLimit()), shape, model.shapeLimit()));
        }
        if (tSquared > model.inFamilyLimit()) {
            againstPart.add(new Reason("not_in_family", text("The curve is outside the golden family: T-squared %.1f, "
                    + "limit %.1f.", tSquared, model.inFamilyLimit()), tSquared, model.inFamilyLimit()));
        }
        structure.reason().ifPresent(againstPart::add);
        reasons.addAll(0, againstPart);
    }

    private Judgement pass(double noiseRatio, double inFamily, double tSquared, StructureReading structure) {
        List<RegionResult> regions = reading.results(noiseRatio);
        double confidence = 1;
        for (RegionResult r : regions) {
            if (r.assessed()) {
                confidence -= 1 - r.probabilityConforming();
            }
        }
        confidence = Math.max(0, Math.min(confidence, 1 - faultProbability(inFamily)));
        return judgement(Outcome.PASS, Disposition.ACCEPT, "", List.of(), confidence, regions, structure, tSquared,
                List.of());
    }

    private double faultProbability(double inFamily) {
        double measurement = 0;
        for (int s = 0; s < work.posterior.length; s++) {
            if (plan.evidence().subjects().get(s).kind() == Subject.Kind.MEASUREMENT) {
                measurement += work.posterior[s];
            }
        }
        return Math.max(0, 1 - inFamily - measurement);
    }

    private Judgement fail(List<Reason> reasons, double tSquared, StructureReading structure, double noiseRatio) {
        int best = mostProbable(kind -> kind != Subject.Kind.MEASUREMENT && kind != Subject.Kind.FIXTURE_REGION);
        Subject named = plan.evidence().subjects().get(best);
        RegionReading.Conditional read = reading.given(best, noiseRatio);
        return judgement(Outcome.FAIL, Disposition.REJECT, named.name(), read.otherSuspects(), work.posterior[best],
                read.results(), structure, tSquared, reasons);
    }

    private Judgement doubtful(Subject error, double probability, double tSquared, StructureReading structure) {
        String sentence = text("The curve is explained better by an error of the measurement (%s) than by a fault of the "
                + "part; probability %.3f.", error.name().replace('_', ' '), probability);
        return judgement(Outcome.INVALID, Disposition.RETEST, "", List.of(), Double.NaN,
                reading.unread(), structure, tSquared,
                List.of(new Reason(error.name(), sentence, probability, CERTAIN_ENOUGH)));
    }

    private Judgement fixture(Subject region, double probability, double tSquared, StructureReading structure) {
        String sentence = text("The tester's own region %s has shifted; probability %.3f. Clean and check the fixture.",
                region.name(), probability);
        return judgement(Outcome.INVALID, Disposition.RETEST, "", List.of(), Double.NaN,
                reading.unread(), structure, tSquared,
                List.of(new Reason(InvalidReason.FIXTURE_SHIFT.code(), sentence, probability, LIKELY)));
    }

    private Judgement invalid(List<Finding> findings) {
        List<Reason> reasons = findings.stream()
                .map(f -> new Reason(f.reason().code(), f.sentence(), f.value(), f.bound())).toList();
        return judgement(Outcome.INVALID, Disposition.RETEST, "", List.of(), Double.NaN, reading.unread(),
                StructureReading.none(), Double.NaN, reasons);
    }

    private Judgement judgement(Outcome outcome, Disposition disposition, String failing, List<String> others,
            double confidence, List<RegionResult> regions, StructureReading structure, double tSquared,
            List<Reason> reasons) {
        LimitSet limits = plan.limits();
        Trace trace = new Trace(plan.bins().centresSeconds(), work.binned.clone(), work.counts.clone(),
                structure.resistances(), structure.capacitances());
        return new Judgement(outcome, disposition, failing, others, confidence, regions, structure.inside(),
                structure.firstExit(), tSquared, limits.model().inFamilyLimit(), reasons, limits.revision(),
                limits.sha256(), ALGORITHM_VERSION, trace);
    }

    private int mostProbable(java.util.function.Predicate<Subject.Kind> eligible) {
        int best = -1;
        for (int s = 0; s < work.posterior.length; s++) {
            if (eligible.test(plan.evidence().subjects().get(s).kind())
                    && (best < 0 || work.posterior[s] > work.posterior[best])) {
                best = s;
            }
        }
        return best;
    }

    private static String text(String pattern, Object... values) {
        return String.format(Locale.ROOT, pattern, values);
    }
}

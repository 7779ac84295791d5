package org.laddergate.screening;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.apache.commons.statistics.distribution.NormalDistribution;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.RegionEstimator;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.evidence.EvidenceModel;
import org.laddergate.limits.evidence.Explanation;
import org.laddergate.limits.evidence.Subject;

/**
 * Reads the regions' resistances off the whitened deviation in a workspace.
 *
 * <p>For a healthy part every region is read with everything else in family. When a fault is named, its region is read
 * off the signatures that explain the curve, weighted by their evidence, and the other regions are read with the named
 * fault allowed for: otherwise one fault would show in every region.
 */
final class RegionReading {
    private static final NormalDistribution NORMAL = NormalDistribution.of(0, 1);
    /** A second fault must stand out of what the first leaves by this many sigma. */
    private static final double SECOND_FAULT_SIGMAS = 5;

    private final Plan plan;
    private final Workspace work;

    RegionReading(Plan plan, Workspace work) {
        this.plan = plan;
        this.work = work;
    }

    /** The reason if a region's resistance is outside its acceptance limits. */
    Optional<Reason> brokenLimit(RegionPlan region, double noiseRatio) {
        double r = region.resistanceKelvinPerWatt(work.compared);
        RegionLimit limit = region.limit();
        double guard = guard(limit, noiseRatio);
        boolean high = r > limit.upperKelvinPerWatt() - guard;
        if (!high && r >= limit.lowerKelvinPerWatt() + guard) {
            return Optional.empty();
        }
        double bound = high ? limit.upperKelvinPerWatt() - guard : limit.lowerKelvinPerWatt() + guard;
        return Optional.of(new Reason(high ? "resistance_above_limit" : "resistance_below_limit",
                String.format(Locale.ROOT, "Region %s reads %.5g K/W with all else in family, %s its limit of %.5g K/W.",
                        region.name(), r, high ? "above" : "below", bound), r, bound));
    }

    private double guard(RegionLimit limit, double noiseRatio) {
        double w = NORMAL.inverseSurvivalProbability(plan.limits().settings().specificRisk())
                * limit.uncertaintyKelvinPerWatt() * Math.max(1, noiseRatio);
        return switch (plan.limits().settings().rule()) {
            case SIMPLE_ACCEPTANCE -> 0;
            case GUARDED_ACCEPTANCE -> w;
            case GUARDED_REJECTION -> -w;
        };
    }

    /** Results of all regions of a part that is not known to have a fault. */
    List<RegionResult> results(double noiseRatio) {
        List<RegionResult> out = new ArrayList<>(plan.regions().size());
        for (RegionPlan region : plan.regions()) {
            out.add(!region.limit().assessed() ? unread(region)
                    : result(region, region.resistanceKelvinPerWatt(work.compared),
                            region.limit().uncertaintyKelvinPerWatt() * Math.max(1, noiseRatio),
                            work.posterior[subjectOf(region.name())]));
        }
        return out;
    }

    /** What is read when a fault is named: all regions, and those that stand out besides the named one. */
    record Conditional(List<RegionResult> results, List<String> otherSuspects) {}

    private record Suspect(String region, double sigmas) {}

    /** Results conditional on the fault of a named subject. */
    Conditional given(int named, double noiseRatio) {
        Explanation best = bestExplanation(named);
        double[][] allowed = best.allowance(best.size(work.whitened));
        List<RegionResult> out = new ArrayList<>(plan.regions().size());
        List<Suspect> suspects = new ArrayList<>();
        for (RegionPlan region : plan.regions()) {
            int subject = region.limit().assessed() ? subjectOf(region.name()) : -1;
            double golden = region.limit().goldenMeanKelvinPerWatt();
            if (subject < 0) {
                out.add(unread(region));
            } else if (subject == named) {
                double[] excess = namedExcess(region, subject);
                out.add(result(region, golden + excess[0],
                        Math.hypot(region.limit().uncertaintyKelvinPerWatt() * Math.max(1, noiseRatio), excess[1]),
                        work.posterior[subject]));
            } else {
                RegionEstimator.Reading read = region.estimator().readAllowing(allowed, work.compared);
                out.add(result(region, golden + read.excessKelvinPerWatt(),
                        read.uncertaintyKelvinPerWatt() * Math.max(1, noiseRatio), work.posterior[subject]));
                double spread = Math.hypot(read.uncertaintyKelvinPerWatt(), region.limit().goldenSigmaKelvinPerWatt());
                if (read.excessKelvinPerWatt() > SECOND_FAULT_SIGMAS * spread) {
                    suspects.add(new Suspect(region.name(), read.excessKelvinPerWatt() / spread));
                }
            }
        }
        suspects.sort(Comparator.comparingDouble(Suspect::sigmas).reversed());
        return new Conditional(out, suspects.stream().map(Suspect::region).toList());
    }

    /** Mean and standard deviation of the named region's excess resistance over its explanations [K/W]. */
    private double[] namedExcess(RegionPlan region, int subject) {
        EvidenceModel evidence = plan.evidence();
        double sum = 0;
        double mean = 0;
        double square = 0;
        for (int e = evidence.firstExplanation(subject); e < evidence.firstExplanation(subject + 1); e++) {
            double weight = Math.exp(work.explanationLog[e] - work.subjectLog[subject]);
            if (weight > 1e-4) {
                FaultSignature s = evidence.explanation(e).signature().orElseThrow();
                double added = region.estimator().size(s.deviationKelvin(), work.compared)
                        * s.addedResistanceKelvinPerWatt();
                sum += weight;
                mean += weight * added;
                square += weight * added * added;
            }
        }
        mean /= sum;
        return new double[] {mean, Math.sqrt(Math.max(0, square / sum - mean * mean))};
    }

    List<RegionResult> unread() {
        return plan.regions().stream().map(this::unread).toList();
    }

    private RegionResult unread(RegionPlan region) {
        RegionLimit limit = region.limit();
        return new RegionResult(region.name(), limit.region().role(), false, Double.NaN, Double.NaN,
                limit.lowerKelvinPerWatt(), limit.upperKelvinPerWatt(), Double.NaN, Double.NaN);
    }

    private RegionResult result(RegionPlan region, double resistance, double uncertainty, double faultProbability) {
        RegionLimit limit = region.limit();
        double conforming = NORMAL.cumulativeProbability((limit.upperKelvinPerWatt() - resistance) / uncertainty)
                - NORMAL.cumulativeProbability((limit.lowerKelvinPerWatt() - resistance) / uncertainty);
        return new RegionResult(region.name(), limit.region().role(), true, resistance, uncertainty,
                limit.lowerKelvinPerWatt(), limit.upperKelvinPerWatt(), conforming, faultProbability);
    }

    private Explanation bestExplanation(int subject) {
        EvidenceModel evidence = plan.evidence();
        int best = evidence.firstExplanation(subject);
        for (int e = best; e < evidence.firstExplanation(subject + 1); e++) {
            best = work.explanationLog[e] > work.explanationLog[best] ? e : best;
        }
        return evidence.explanation(best);
    }

    private int subjectOf(String region) {
        List<Subject> subjects = plan.evidence().subjects();
        for (int s = 0; s < subjects.size(); s++) {
            if (subjects.get(s).name().equals(region)) {
                return s;
            }
        }
        throw new IllegalStateException("no subject " + region);
    }
}

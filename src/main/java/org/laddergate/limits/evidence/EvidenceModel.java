package org.laddergate.limits.evidence;

import java.util.List;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.Region;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.Recipe;

/**
 * Weighs all explanations of a deviation from golden against each other.
 *
 * <p>Definition: P(subject | d) is proportional to prior(subject) times the mean likelihood of its explanations; the
 * golden family itself is one of the subjects with what is left of the prior.
 *
 * <p>Cost: prepared once per limit revision; one weighing costs about (explanations) x (rank) x (bins) multiplications
 * and allocates nothing. Immutable; scratch arrays belong to the caller.
 */
public final class EvidenceModel {
    private final FamilyModel family;
    private final List<Subject> subjects;
    private final Explanation[] explanations;
    private final int[] firstOfSubject;
    private final double logPriorFamily;

    private EvidenceModel(FamilyModel family, List<Subject> subjects) {
        this.family = family;
        this.subjects = List.copyOf(subjects);
        this.firstOfSubject = new int[subjects.size() + 1];
        for (int s = 0; s < subjects.size(); s++) {
            firstOfSubject[s + 1] = firstOfSubject[s] + subjects.get(s).explanations().size();
        }
        this.explanations = subjects.stream().flatMap(s -> s.explanations().stream()).toArray(Explanation[]::new);
        double others = subjects.stream().mapToDouble(s -> Math.exp(s.logPrior())).sum();
        this.logPriorFamily = Math.log1p(-Math.min(0.9, others));
    }

    /**
     * @param model     the golden family
     * @param recipe    how the product is measured
     * @param regions   regions that can be judged, in the order of the heat path
     * @param settings  prior fault rate
     */
    public static EvidenceModel of(GoldenModel model, Recipe recipe, List<Region> regions, DecisionSettings settings) {
        FamilyModel family = familyOf(model);
        return new EvidenceModel(family, new SubjectCatalogue(model, recipe, family).subjects(regions, settings));
    }

    /** The golden family of a model. */
    public static FamilyModel familyOf(GoldenModel model) {
        LogTimeBins fine =
                LogTimeBins.spanning(model.firstEdgeSeconds(), model.lastEdgeSeconds(), model.binsPerDecade());
        ComparisonBins bins = ComparisonBins.of(fine);
        double[] golden = new double[bins.size()];
        bins.reduceInto(model.goldenKelvin(), golden);
        return FamilyModel.of(model.comparisonNoiseKelvin(), model.familyFactors(), golden, model.familyBend(),
                bins.logCentres());
    }

    public FamilyModel family() {
        return family;
    }

    public List<Subject> subjects() {
        return subjects;
    }

    /** Number of explanations over all subjects. */
    public int explanationCount() {
        return explanations.length;
    }

    public Explanation explanation(int i) {
        return explanations[i];
    }

    /** Index of the first explanation of a subject; the explanations of a subject are contiguous. */
    public int firstExplanation(int subject) {
        return firstOfSubject[subject];
    }

    /** Logarithm of the prior probability of the family. */
    public double logPriorFamily() {
        return logPriorFamily;
    }

    /**
     * Weighs a deviation.
     *
     * @param whitened          whitened deviation, not modified
     * @param explanationLog    weighted log evidence of each explanation, length {@link #explanationCount()}, overwritten
     * @param subjectLog        log evidence of each subject against the family, before its prior, overwritten
     * @param scratch           length {@link FamilyModel#freedom()}, overwritten
     */
    public void weighInto(double[] whitened, double[] explanationLog, double[] subjectLog, double[] scratch) {
        for (int s = 0; s < subjectLog.length; s++) {
            double best = Double.NEGATIVE_INFINITY;
            for (int e = firstOfSubject[s]; e < firstOfSubject[s + 1]; e++) {
                explanationLog[e] = explanations[e].logWeight() + explanations[e].logEvidence(whitened, scratch);
                best = Math.max(best, explanationLog[e]);
            }
            double sum = 0;
            for (int e = firstOfSubject[s]; e < firstOfSubject[s + 1]; e++) {
                sum += Math.exp(explanationLog[e] - best);
            }
            subjectLog[s] = best + Math.log(sum);
        }
    }

    /**
     * Posterior probabilities from log evidences.
     *
     * @param subjectLog    from {@link #weighInto}, not modified
     * @param posterior     probability of each subject, same length, overwritten
     * @return probability of the family
     */
    public double posteriorInto(double[] subjectLog, double[] posterior) {
        double best = logPriorFamily;
        for (int s = 0; s < subjectLog.length; s++) {
            posterior[s] = subjectLog[s] + subjects.get(s).logPrior();
            best = Math.max(best, posterior[s]);
        }
        double inFamily = Math.exp(logPriorFamily - best);
        double sum = inFamily;
        for (int s = 0; s < posterior.length; s++) {
            posterior[s] = Math.exp(posterior[s] - best);
            sum += posterior[s];
        }
        for (int s = 0; s < posterior.length; s++) {
            posterior[s] /= sum;
        }
        return inFamily / sum;
    }

    /**
     * Logarithm of the ratio "some fault of the part" to "member of the family", before the overall fault rate: the
     * statistic of the shape test. Its largest value is unbounded, that of a healthy part is small.
     *
     * @param subjectLog from {@link #weighInto}, not modified
     */
    public double logFaultRatio(double[] subjectLog) {
        double best = Double.NEGATIVE_INFINITY;
        double prior = 0;
        for (int s = 0; s < subjectLog.length; s++) {
            if (isFault(s)) {
                best = Math.max(best, subjectLog[s]);
                prior += Math.exp(subjects.get(s).logPrior());
            }
        }
        double sum = 0;
        for (int s = 0; s < subjectLog.length; s++) {
            if (isFault(s)) {
                sum += Math.exp(subjects.get(s).logPrior() + subjectLog[s] - best);
            }
        }
        return best + Math.log(sum / prior);
    }

    private boolean isFault(int subject) {
        return subjects.get(subject).kind() != Subject.Kind.MEASUREMENT;
    }
}

package org.laddergate.golden;

import java.util.Arrays;
import java.util.List;
import java.util.Random;
import java.util.stream.IntStream;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.Region;
import org.laddergate.limits.evidence.EvidenceModel;
import org.laddergate.measurement.Recipe;

/**
 * Limit of the shape test: how much a healthy curve may look like some fault rather than like the family.
 *
 * <p>Definition: the (1 - risk) quantile of the log fault-to-family ratio over simulated members of the family, but at
 * least ln(1) = 0, since a curve that looks more like the family than like any fault is no reason to reject.
 *
 * <p>Method: 20,000 whitened standard normal vectors with a fixed seed; a Student-t tail with as many degrees of
 * freedom as golden units carry would be the finite-family distribution, so vectors are scaled by sqrt(nu/chi2_nu).
 *
 * <p>Source: quantile by simulation; multivariate t as predictive distribution, e.g. Gelman et al., Bayesian Data
 * Analysis, section 3.6.
 */
final class ShapeLimit {
    private static final int DRAWS = 20_000;
    private static final long SEED = 20_261_201L;

    private ShapeLimit() {}

    static GoldenModel addTo(GoldenModel model, Recipe recipe, List<Region> judged, DecisionSettings settings,
            int units) {
        EvidenceModel evidence = EvidenceModel.of(model, recipe, judged, settings);
        int freedom = evidence.family().freedom();
        int chunks = 20;
        double[] ratio = IntStream.range(0, chunks).parallel().boxed().flatMapToDouble(chunk -> {
            Random random = new Random(SEED + chunk);
            double[] z = new double[freedom];
            double[] scratch = new double[freedom];
            double[] each = new double[evidence.explanationCount()];
            double[] subjects = new double[evidence.subjects().size()];
            double[] out = new double[DRAWS / chunks];
            for (int k = 0; k < out.length; k++) {
                double chi = 0;
                for (int i = 0; i < units - 1; i++) {
                    double g = random.nextGaussian();
                    chi += g * g;
                }
                double stretch = Math.sqrt((units - 1) / chi);
                for (int i = 0; i < freedom; i++) {
                    z[i] = stretch * random.nextGaussian();
                }
                evidence.weighInto(z, each, subjects, scratch);
                out[k] = evidence.logFaultRatio(subjects);
            }
            return Arrays.stream(out);
        }).toArray();
        Arrays.sort(ratio);
        double quantile = ratio[(int) Math.min(DRAWS - 1, Math.ceil((1 - settings.falseRejectRisk() / 2) * DRAWS))];
        return model.withShapeLimit(Math.max(0, quantile));
    }
}

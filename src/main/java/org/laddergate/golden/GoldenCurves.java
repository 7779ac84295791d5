package org.laddergate.golden;

import java.util.ArrayList;
import java.util.List;
import org.laddergate.measurement.ComparisonBins;
import org.laddergate.measurement.CurveNormaliser;
import org.laddergate.measurement.InputFault;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.LogTimeBins;
import org.laddergate.measurement.NoiseEstimate;
import org.laddergate.measurement.Recipe;
import org.laddergate.measurement.SampledCurve;

/**
 * The golden units' curves on common bins: their mean, their noise, and how each differs from the mean.
 *
 * <p>Arrays are owned by this object and must not be modified.
 */
final class GoldenCurves {
    /** Fewer units than this carry no statistics at all. */
    static final int FEWEST_UNITS = 10;
    private static final int[] DENSITIES = {50, 40, 32, 25, 20, 16, 12};
    private static final double FILLED_SHARE = 0.85;
    /** A unit this many robust spreads from the median curve is a broken measurement, not a golden unit. */
    private static final double BROKEN = 25;

    private final LogTimeBins bins;
    private final ComparisonBins comparison;
    private final double[][] fine;
    private final double[] mean;
    private final double[] noise;
    private final double[] comparisonNoise;
    private final double[][] deviations;

    private GoldenCurves(LogTimeBins bins, double[][] fine) {
        this.bins = bins;
        this.comparison = ComparisonBins.of(bins);
        this.fine = fine;
        int n = fine.length;
        this.mean = new double[bins.size()];
        for (double[] f : fine) {
            for (int i = 0; i < mean.length; i++) {
                mean[i] += f[i] / n;
            }
        }
        double last = mean[mean.length - 1];
        double[][] fineDeviations = new double[n][mean.length];
        for (int u = 0; u < n; u++) {
            for (int i = 0; i < mean.length; i++) {
                // n/(n-1): the mean contains the unit itself.
                fineDeviations[u][i] = (fine[u][i] - mean[i]) * Math.sqrt(n / (n - 1.0));
            }
        }
        this.noise = NoiseEstimate.profile(fineDeviations, bins.perDecade());
        for (int i = 0; i < mean.length; i++) {
            mean[i] -= last;
        }
        this.comparisonNoise = comparisonNoise(noise, comparison);
        this.deviations = new double[n][comparison.size()];
        for (int u = 0; u < n; u++) {
            double[] d = new double[mean.length];
            for (int i = 0; i < d.length; i++) {
                d[i] = fine[u][i] - mean[i];
            }
            comparison.reduceInto(d, deviations[u]);
        }
    }

    private static double[] comparisonNoise(double[] noise, ComparisonBins comparison) {
        double[] out = new double[comparison.size()];
        for (int j = 0; j < out.length; j++) {
            int count = comparison.firstFine(j + 1) - comparison.firstFine(j);
            double sum = 0;
            for (int i = comparison.firstFine(j); i < comparison.firstFine(j + 1); i++) {
                sum += noise[i] * noise[i];
            }
            out[j] = Math.sqrt(sum) / count;
        }
        return out;
    }

    /**
     * @param recipe nominal values
     * @param units  golden units, checked to belong to the product and recipe
     * @throws InvalidInputException naming the unit whose curve cannot be used
     */
    static GoldenCurves of(Recipe recipe, List<GoldenUnit> units) {
        List<SampledCurve> curves = units.stream().map(u -> CurveNormaliser.normalise(u.measurement(), recipe)).toList();
        double end = recipe.recordSeconds();
        double shortest = Double.POSITIVE_INFINITY;
        int shortestUnit = 0;
        for (int u = 0; u < curves.size(); u++) {
            SampledCurve c = curves.get(u);
            // A log-binned record ends half a bin after its last stamp.
            double reach = c.size() < 2 ? 0 : c.timeSeconds(c.size() - 1)
                    * Math.sqrt(c.timeSeconds(c.size() - 1) / c.timeSeconds(c.size() - 2));
            if (reach < shortest) {
                shortest = reach;
                shortestUnit = u;
            }
        }
        if (shortest < 0.5 * end) {
            throw fault(units.get(shortestUnit), "record_too_short", "ends after " + shortest + " s, the recipe records "
                    + end + " s");
        }
        end = Math.min(end, shortest);
        double cut = Double.isNaN(recipe.cutSeconds()) ? CutTime.find(curves) : recipe.cutSeconds();
        LogTimeBins bins = densest(curves, cut, end);
        double[][] fine = new double[curves.size()][bins.size()];
        int[] counts = new int[bins.size()];
        for (int u = 0; u < curves.size(); u++) {
            bins.binInto(curves.get(u).timesSecondsUnsafe(), curves.get(u).valuesUnsafe(), fine[u], counts);
            for (double v : fine[u]) {
                if (Double.isNaN(v)) {
                    throw fault(units.get(u), "incomplete_record", "has no samples at the start or end of the window "
                            + cut + " to " + end + " s");
                }
            }
        }
        refuseBroken(units, fine);
        return new GoldenCurves(bins, fine);
    }

    private static LogTimeBins densest(List<SampledCurve> curves, double cut, double end) {
        SampledCurve sparsest = curves.get(0);
        for (SampledCurve c : curves) {
            sparsest = c.size() < sparsest.size() ? c : sparsest;
        }
        for (int density : DENSITIES) {
            LogTimeBins bins = LogTimeBins.spanning(cut, end, density);
            int filled = bins.binInto(sparsest.timesSecondsUnsafe(), sparsest.valuesUnsafe(), new double[bins.size()],
                    new int[bins.size()]);
            if (filled >= FILLED_SHARE * bins.size()) {
                return bins;
            }
        }
        throw new InvalidInputException("/goldenUnits", "too_few_samples",
                "the golden curves hold fewer than " + DENSITIES[DENSITIES.length - 1] + " samples a decade");
    }

    /** Compares each unit's drop below its start with the median unit's. */
    private static void refuseBroken(List<GoldenUnit> units, double[][] fine) {
        int n = fine.length;
        int bins = fine[0].length;
        double[] worst = new double[n];
        double[] column = new double[n];
        for (int i = 0; i < bins; i += Math.max(1, bins / 40)) {
            for (int u = 0; u < n; u++) {
                column[u] = fine[u][0] - fine[u][i];
            }
            double median = Robust.median(column);
            double spread = Math.max(Robust.scaledMad(column), 1e-3 * Math.abs(median) + 1e-9);
            for (int u = 0; u < n; u++) {
                worst[u] = Math.max(worst[u], Math.abs(column[u] - median) / spread);
            }
        }
        List<InputFault> faults = new ArrayList<>();
        for (int u = 0; u < n; u++) {
            if (worst[u] > BROKEN) {
                faults.add(new InputFault("/goldenUnits/" + units.get(u).measurement().measurementId(),
                        "unlike_the_others",
                        "golden unit " + units.get(u).measurement().measurementId() + " is " + Math.round(worst[u])
                                + " robust spreads from the median curve (at most " + BROKEN
                                + "): a broken measurement or another product"));
            }
        }
        if (!faults.isEmpty()) {
            throw new InvalidInputException(faults);
        }
    }

    private static InvalidInputException fault(GoldenUnit unit, String code, String what) {
        String id = unit.measurement().measurementId();
        return new InvalidInputException("/goldenUnits/" + id, code, "golden unit " + id + " " + what);
    }

    int units() {
        return fine.length;
    }

    LogTimeBins bins() {
        return bins;
    }

    ComparisonBins comparison() {
        return comparison;
    }

    /** Curve of one unit in fine bins [deg C]. */
    double[] fine(int unit) {
        return fine[unit];
    }

    /** Golden mean in fine bins, minus its last value [K]. */
    double[] mean() {
        return mean;
    }

    /** Noise of one curve in fine bins [K]. */
    double[] noise() {
        return noise;
    }

    /** Noise of one curve in comparison bins [K]. */
    double[] comparisonNoise() {
        return comparisonNoise;
    }

    /** Deviation of one unit from the golden mean in comparison bins [K]; an offset is arbitrary. */
    double[] deviation(int unit) {
        return deviations[unit];
    }
}

package org.laddergate.inmemory;

import java.time.Instant;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.CompletionStage;
import org.laddergate.golden.GoldenUnit;
import org.laddergate.golden.LimitLearning;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.Envelope;
import org.laddergate.limits.GoldenModel;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;
import org.laddergate.limits.Region;
import org.laddergate.limits.RegionLimit;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Disposition;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.ScreeningDesk;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.Trace;
import org.laddergate.screening.VerdictLedger;

/** The simplest judge there is: one region, its resistance the whole temperature swing per watt, golden mean +-20 %. */
public final class TotalResistance implements LimitLearning, ScreeningDesk {
    /** This judge needs no model of the golden family. */
    private static final GoldenModel NO_MODEL = new GoldenModel(1, 2, 1, new double[0], new double[0], new double[0],
            new double[0][], 0, 0, 0, new double[0], new double[0], List.of(), List.of(), false, new double[0],
            new Envelope(new double[0], new double[0], new double[0]));

    private final ProductStore products;
    private final LimitStore limits;
    private final VerdictLedger ledger;

    public TotalResistance(ProductStore products, LimitStore limits, VerdictLedger ledger) {
        this.products = products;
        this.limits = limits;
        this.ledger = ledger;
    }

    @Override
    public LimitSet learn(Product product, List<GoldenUnit> units) {
        double mean = units.stream().filter(unit -> unit.condition() == GoldenUnit.Condition.GOLDEN)
                .mapToDouble(unit -> resistance(unit.measurement())).average().orElseThrow(
                        () -> new InvalidInputException("/goldenUnits", "too_few_units", "0 golden units; 1 needed"));
        RegionLimit limit = new RegionLimit(new Region("stack", RegionRole.PART, 0, Double.POSITIVE_INFINITY), true,
                mean, Double.NaN, Double.NaN, Double.NaN, 0.8 * mean, 1.2 * mean, "learnt");
        return new LimitSet(product.name(), 0, LimitState.DRAFT, "", Instant.parse("2026-12-01T06:00:00Z"),
                product.recipe(), product.settings(), units.size(), List.of(limit), NO_MODEL, List.of("one region only"));
    }

    @Override
    public CompletionStage<StoredVerdict> screen(Measurement measurement, String contentSha256) {
        products.find(measurement.product()).orElseThrow(
                () -> new LimitNotFoundException("unknown_product", "no product " + measurement.product()));
        LimitSet released = limits.released(measurement.product()).orElseThrow(() -> new LimitNotFoundException(
                "no_released_limits", "product " + measurement.product() + " has no released limits"));
        if (measurement.curveKind() != released.recipe().curve()) {
            throw new InvalidInputException("/curve", "other_curve", "the limits are for the other kind of curve");
        }
        return ledger.append(measurement, contentSha256, judge(measurement, released));
    }

    public static Judgement judge(Measurement measurement, LimitSet released) {
        RegionLimit limit = released.regionLimits().get(0);
        double r = resistance(measurement);
        boolean inside = r >= limit.lowerKelvinPerWatt() && r <= limit.upperKelvinPerWatt();
        Outcome outcome = r == 0 ? Outcome.INVALID : inside ? Outcome.PASS : Outcome.FAIL;
        RegionResult region = new RegionResult("stack", RegionRole.PART, r > 0, r > 0 ? r : Double.NaN,
                r > 0 ? r / 100 : Double.NaN, limit.lowerKelvinPerWatt(), limit.upperKelvinPerWatt(),
                r > 0 ? (inside ? 0.99 : 0.01) : Double.NaN, r > 0 ? (inside ? 0.01 : 0.99) : Double.NaN);
        List<Reason> reasons = r > 0 ? List.of()
                : List.of(new Reason("no_heating_seen", "The temperature did not change.", 0, Double.NaN));
        return new Judgement(outcome, disposition(outcome), outcome == Outcome.FAIL ? "stack" : "", List.of(),
                outcome == Outcome.INVALID ? Double.NaN : 0.99, List.of(region), inside, Double.NaN, Double.NaN,
                Double.NaN, reasons, released.revision(), released.sha256(), "total-resistance-1",
                trace(measurement, r));
    }

    private static Disposition disposition(Outcome outcome) {
        return switch (outcome) {
            case PASS -> Disposition.ACCEPT;
            case FAIL -> Disposition.REJECT;
            case INVALID -> Disposition.RETEST;
        };
    }

    private static Trace trace(Measurement m, double r) {
        double[] times = Arrays.copyOf(m.curve().timesSecondsUnsafe(), 8);
        double[] temperatures = Arrays.copyOf(m.curve().valuesUnsafe(), 8);
        temperatures[3] = Double.NaN;
        int[] counts = {1, 1, 1, 0, 1, 1, 1, 1};
        return new Trace(times, temperatures, counts, new double[] {r / 2, r}, new double[] {0.1, 10});
    }

    private static double resistance(Measurement m) {
        double highest = Arrays.stream(m.curve().valuesUnsafe()).max().orElseThrow();
        double lowest = Arrays.stream(m.curve().valuesUnsafe()).min().orElseThrow();
        return (highest - lowest) / m.heatingPowerWatts();
    }
}

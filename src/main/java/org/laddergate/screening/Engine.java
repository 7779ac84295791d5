package org.laddergate.screening;

import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.function.LongConsumer;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.ProductStore;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;

/**
 * Judges measurements by the released limits of their product and hands the verdicts to the ledger.
 *
 * <p>The plan of a limit set is worked out once, at the first measurement or by {@link #warmUp}. Screeners are kept and
 * lent to the calling threads, so judging allocates no scratch arrays. Safe for use from many threads.
 */
public final class Engine implements ScreeningDesk {
    private static final int WARM_UP_ROUNDS = 600;

    private final ProductStore products;
    private final LimitStore limits;
    private final VerdictLedger ledger;
    private final LongConsumer analysisNanos;
    private final ConcurrentHashMap<String, Crew> crews = new ConcurrentHashMap<>();

    /** @param analysisNanos told how long each judgement took [ns] */
    public Engine(ProductStore products, LimitStore limits, VerdictLedger ledger, LongConsumer analysisNanos) {
        this.products = products;
        this.limits = limits;
        this.ledger = ledger;
        this.analysisNanos = analysisNanos;
    }

    @Override
    public CompletionStage<StoredVerdict> screen(Measurement measurement, String contentSha256) {
        LimitSet released = releasedLimits(measurement.product());
        if (measurement.curveKind() != released.recipe().curve()) {
            throw new InvalidInputException("/curve", "other_curve_kind", "the limits of " + measurement.product()
                    + " are for " + released.recipe().curve().word() + " curves, this is a "
                    + measurement.curveKind().word() + " curve");
        }
        Optional<StoredVerdict> earlier = ledger.find(measurement.measurementId());
        if (earlier.isPresent()) {
            return earlier.get().contentSha256().equals(contentSha256)
                    ? CompletableFuture.completedStage(earlier.get())
                    : CompletableFuture.failedStage(new MeasurementConflictException(measurement.measurementId()));
        }
        return ledger.append(measurement, contentSha256, judge(released, measurement));
    }

    /** Judges by a given limit set without storing anything. */
    public Judgement judge(LimitSet set, Measurement measurement) {
        Crew crew = crew(set);
        Screener screener = crew.borrow();
        long start = System.nanoTime();
        try {
            return screener.judge(measurement);
        } finally {
            analysisNanos.accept(System.nanoTime() - start);
            crew.giveBack(screener);
        }
    }

    /**
     * Works out the plan of a product's released limits and judges its golden curve some hundred times, so that the
     * first part of a shift waits neither for the plan nor for the compiler.
     */
    public void warmUp(String product) {
        limits.released(product).ifPresent(set -> {
            Crew crew = crew(set);
            Screener screener = crew.borrow();
            for (int i = 0; i < WARM_UP_ROUNDS; i++) {
                screener.judge(GoldenCurve.of(set));
            }
            crew.giveBack(screener);
        });
    }

    private LimitSet releasedLimits(String product) {
        if (products.find(product).isEmpty()) {
            throw new LimitNotFoundException("unknown_product", "there is no product " + product);
        }
        return limits.released(product).orElseThrow(() -> new LimitNotFoundException("no_released_limits",
                "product " + product + " has no released limits"));
    }

    private Crew crew(LimitSet set) {
        return crews.compute(set.product(), (name, old) -> old != null && old.sha256.equals(set.sha256()) ? old
                : new Crew(set.sha256(), Plan.of(set)));
    }

    /** Screeners of one plan, lent and taken back. */
    private static final class Crew {
        private final String sha256;
        private final Plan plan;
        private final ConcurrentLinkedQueue<Screener> idle = new ConcurrentLinkedQueue<>();

        Crew(String sha256, Plan plan) {
            this.sha256 = sha256;
            this.plan = plan;
        }

        Screener borrow() {
            Screener screener = idle.poll();
            return screener == null ? new Screener(plan) : screener;
        }

        void giveBack(Screener screener) {
            idle.add(screener);
        }
    }
}

package org.laddergate.app;

import java.time.Clock;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.Executor;
import java.util.concurrent.TimeUnit;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.LimitLearning;
import org.laddergate.inmemory.InMemoryGoldenUnits;
import org.laddergate.inmemory.InMemoryLedger;
import org.laddergate.inmemory.InMemoryLimits;
import org.laddergate.inmemory.InMemoryProducts;
import org.laddergate.inmemory.TotalResistance;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.ProductStore;
import org.laddergate.screening.ScreeningDesk;
import org.laddergate.screening.VerdictLedger;

/** Stores in memory; verdicts take their time, as on a slow disk. */
final class InMemoryWiring extends Wiring {
    private static final Executor SLOW = CompletableFuture.delayedExecutor(2500, TimeUnit.MILLISECONDS);

    final InMemoryProducts products = new InMemoryProducts();
    final InMemoryLimits limits = new InMemoryLimits();
    final InMemoryGoldenUnits goldenUnits = new InMemoryGoldenUnits();
    final InMemoryLedger ledger = new InMemoryLedger(Clock.systemUTC());
    final TotalResistance judge = new TotalResistance(products, limits, ledger);

    InMemoryWiring(Settings settings) {
        super(settings);
    }

    /** The real commands over stores in memory. */
    public static void main(String[] args) {
        System.exit(Commands.line(InMemoryWiring::new, System.getenv()).execute(args));
    }

    @Override
    ProductStore products() {
        return products;
    }

    @Override
    LimitStore limits() {
        return limits;
    }

    @Override
    GoldenStore goldenUnits() {
        return goldenUnits;
    }

    @Override
    LimitLearning learning() {
        return judge;
    }

    @Override
    VerdictLedger ledger() {
        return ledger;
    }

    @Override
    ScreeningDesk desk(ProductStore p, LimitStore l, VerdictLedger v) {
        return (measurement, hash) -> judge.screen(measurement, hash).thenApplyAsync(verdict -> verdict, SLOW);
    }

    @Override
    CurveJudge curveJudge() {
        return TotalResistance::judge;
    }
}

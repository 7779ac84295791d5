package org.laddergate.app;

import io.micrometer.prometheusmetrics.PrometheusConfig;
import io.micrometer.prometheusmetrics.PrometheusMeterRegistry;
import java.time.Clock;
import java.util.List;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.LimitLearning;
import org.laddergate.http.Services;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.ProductStore;
import org.laddergate.screening.ScreeningDesk;
import org.laddergate.screening.VerdictLedger;

/**
 * The only place that knows which class stands behind which interface. Every factory method is called once for each
 * command, in the order of this file; what is opened here is closed in {@link #close}.
 */
class Wiring implements AutoCloseable {
    private final Settings settings;
    private final Clock clock = Clock.systemUTC();
    private final PrometheusMeterRegistry registry = new PrometheusMeterRegistry(PrometheusConfig.DEFAULT);

    Wiring(Settings settings) {
        this.settings = settings;
    }

    final Settings settings() {
        return settings;
    }

    final Clock clock() {
        return clock;
    }

    final PrometheusMeterRegistry registry() {
        return registry;
    }

    /** Product definitions in the limits folder. */
    ProductStore products() {
        throw missing("product store");
    }

    /** Limit sets in the limits folder. */
    LimitStore limits() {
        throw missing("limit store");
    }

    /** Golden units in their folder. */
    GoldenStore goldenUnits() {
        throw missing("store of golden units");
    }

    /** Learns limits. */
    LimitLearning learning() {
        throw missing("limit learning");
    }

    /** Stored verdicts in the data folder. */
    VerdictLedger ledger() {
        throw missing("verdict ledger");
    }

    /** Judges and stores. */
    ScreeningDesk desk(ProductStore products, LimitStore limits, VerdictLedger ledger) {
        throw missing("screening desk");
    }

    /** Judges without storing. */
    CurveJudge curveJudge() {
        throw missing("curve judge");
    }

    /** Reasons besides the ledger's why nothing can be judged now, such as a warm-up that is not finished. */
    List<String> notReady() {
        return List.of();
    }

    /** Closes what was opened, after the last request. */
    @Override
    public void close() {
        registry.close();
    }

    /** Everything the HTTP service needs. */
    final Services services() {
        ProductStore products = products();
        LimitStore limits = limits();
        GoldenStore goldenUnits = goldenUnits();
        LimitLearning learning = learning();
        VerdictLedger ledger = ledger();
        return new Services(products, limits, goldenUnits, learning, desk(products, limits, ledger), ledger, clock,
                registry, this::notReady);
    }

    private static IllegalStateException missing(String part) {
        return new IllegalStateException("this build has no " + part);
    }
}

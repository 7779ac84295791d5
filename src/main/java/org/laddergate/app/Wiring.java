package org.laddergate.app;

import io.micrometer.core.instrument.FunctionCounter;
import io.micrometer.core.instrument.FunctionTimer;
import io.micrometer.core.instrument.Gauge;
import io.micrometer.core.instrument.Timer;
import io.micrometer.prometheusmetrics.PrometheusConfig;
import io.micrometer.prometheusmetrics.PrometheusMeterRegistry;
import java.time.Clock;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import org.laddergate.golden.GoldenFolder;
import org.laddergate.golden.GoldenLearner;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.LimitLearning;
import org.laddergate.http.Services;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.ProductStore;
import org.laddergate.limits.files.LimitFiles;
import org.laddergate.limits.files.ProductFiles;
import org.laddergate.measurement.CurveRules;
import org.laddergate.records.SqliteLedger;
import org.laddergate.screening.Engine;
import org.laddergate.screening.Plan;
import org.laddergate.screening.Screener;
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
    private Optional<ProductStore> products = Optional.empty();
    private Optional<SqliteLedger> ledger = Optional.empty();
    private volatile boolean warming;

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
        if (products.isEmpty()) {
            products = Optional.of(new ProductFiles(settings.limits()));
        }
        return products.get();
    }

    /** Limit sets in the limits folder. */
    LimitStore limits() {
        return new LimitFiles(settings.limits(), clock);
    }

    /** Golden units in their folder. */
    GoldenStore goldenUnits() {
        return new GoldenFolder(settings.goldenUnits(), products(),
                new CurveRules(settings.http().maximumSamples(), clock));
    }

    /** Learns limits. */
    LimitLearning learning() {
        return new GoldenLearner(clock);
    }

    /** Stored verdicts in the data folder. */
    VerdictLedger ledger() {
        SqliteLedger opened = SqliteLedger.open(settings.data(), clock);
        FunctionTimer.builder("laddergate.commit.duration", opened, l -> l.statistics().commits(),
                l -> l.statistics().totalCommitNanos(), TimeUnit.NANOSECONDS).register(registry);
        FunctionCounter.builder("laddergate.commit.verdicts", opened, l -> l.statistics().storedVerdicts())
                .register(registry);
        FunctionCounter.builder("laddergate.commit.failures", opened, l -> l.statistics().failedBatches())
                .register(registry);
        Gauge.builder("laddergate.commit.queue", opened, l -> l.statistics().queueDepth()).register(registry);
        ledger = Optional.of(opened);
        return opened;
    }

    /** Judges and stores. */
    ScreeningDesk desk(ProductStore products, LimitStore limits, VerdictLedger verdicts) {
        Timer analysis = Timer.builder("laddergate.analysis.duration").publishPercentileHistogram().register(registry);
        Engine engine = new Engine(products, limits, verdicts, nanos -> analysis.record(nanos, TimeUnit.NANOSECONDS));
        warmUp(engine, products);
        return engine;
    }

    /** Plans are worked out in the background; until then the service says that it is not ready. */
    private void warmUp(Engine engine, ProductStore products) {
        warming = true;
        Thread thread = new Thread(() -> {
            try {
                products.names().forEach(engine::warmUp);
            } finally {
                warming = false;
            }
        }, "warm-up");
        thread.setDaemon(true);
        thread.start();
    }

    /** Judges without storing. */
    CurveJudge curveJudge() {
        return (measurement, limits) -> new Screener(Plan.of(limits)).judge(measurement);
    }

    /** Reasons besides the ledger's why nothing can be judged now, such as a warm-up that is not finished. */
    List<String> notReady() {
        return warming ? List.of("the limits are being prepared") : List.of();
    }

    /** Closes what was opened, after the last request. */
    @Override
    public void close() {
        ledger.ifPresent(SqliteLedger::close);
        registry.close();
    }

    /** Everything the HTTP service needs. */
    final Services services() {
        ProductStore products = products();
        LimitStore limits = limits();
        GoldenStore goldenUnits = goldenUnits();
        LimitLearning learning = learning();
        VerdictLedger verdicts = ledger();
        return new Services(products, limits, goldenUnits, learning, desk(products, limits, verdicts), verdicts, clock,
                registry, this::notReady);
    }
}

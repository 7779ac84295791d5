package org.laddergate.http;

import io.micrometer.prometheusmetrics.PrometheusMeterRegistry;
import java.time.Clock;
import java.util.List;
import java.util.function.Supplier;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.LimitLearning;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.ProductStore;
import org.laddergate.screening.ScreeningDesk;
import org.laddergate.screening.VerdictLedger;

/**
 * What stands behind the routes.
 *
 * @param products      product definitions
 * @param limits        limit sets
 * @param goldenUnits   golden and known-bad units
 * @param learning      learns limits
 * @param desk          judges and stores
 * @param ledger        stored verdicts
 * @param clock         what "now" is
 * @param registry      metrics
 * @param notReady      further reasons why the service cannot judge now, besides those of the ledger; empty if it can
 */
public record Services(ProductStore products, LimitStore limits, GoldenStore goldenUnits, LimitLearning learning,
        ScreeningDesk desk, VerdictLedger ledger, Clock clock, PrometheusMeterRegistry registry,
        Supplier<List<String>> notReady) {}

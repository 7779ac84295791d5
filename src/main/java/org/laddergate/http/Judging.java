package org.laddergate.http;

import io.micrometer.core.instrument.Counter;
import io.micrometer.core.instrument.MeterRegistry;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import java.util.List;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import java.util.function.Supplier;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.ScreeningDesk;
import org.laddergate.screening.StoredVerdict;

/**
 * Parses, judges and counts one transient; used by single requests and batches alike. Safe for use from many threads.
 */
final class Judging {
    /** No healthy disk takes longer to commit. */
    private static final Duration STORAGE_PATIENCE = Duration.ofSeconds(30);

    private final Intake intake;
    private final ScreeningDesk desk;
    private final WorkGate gate;
    private final MeterRegistry registry;
    private final Clock clock;

    Judging(Intake intake, ScreeningDesk desk, WorkGate gate, MeterRegistry registry, Clock clock) {
        this.intake = intake;
        this.desk = desk;
        this.gate = gate;
        this.registry = registry;
        this.clock = clock;
    }

    /**
     * A verdict on disk and what was ignored on the way to it.
     *
     * @param verdict   as stored
     * @param warnings  for the sender
     */
    record Judged(StoredVerdict verdict, List<String> warnings) {}

    int maximumSamples() {
        return intake.rules().maximumSamples();
    }

    /** Complete once the verdict is on disk; throws at once what can be told at once. */
    CompletableFuture<Judged> judge(Supplier<SubmissionJson.Parsed> parsing) {
        Instant received = clock.instant().truncatedTo(ChronoUnit.MILLIS);
        return gate.compute(() -> {
            Intake.Accepted accepted = intake.accept(parsing.get());
            return desk.screen(accepted.measurement(), accepted.contentSha256()).toCompletableFuture()
                    .thenApply(verdict -> {
                        count(verdict, received);
                        return new Judged(verdict, accepted.warnings());
                    }).orTimeout(STORAGE_PATIENCE.toSeconds(), TimeUnit.SECONDS);
        });
    }

    /** A verdict stored before the request came is an old one sent again; it was counted then. */
    private void count(StoredVerdict verdict, Instant received) {
        if (verdict.storedAt().isBefore(received)) {
            return;
        }
        Judgement judgement = verdict.judgement();
        Counter.builder("laddergate.verdicts")
                .description("Stored verdicts, measurements sent again not counted")
                .tag("product", verdict.product())
                .tag("verdict", judgement.outcome().word())
                .tag("region", judgement.failingRegion().isEmpty() ? "none" : judgement.failingRegion())
                .register(registry).increment();
    }
}

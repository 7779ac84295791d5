package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.SQLException;
import java.sql.Statement;
import java.time.Clock;
import java.time.Duration;
import java.time.Instant;
import java.time.ZoneOffset;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.CompletionException;
import java.util.concurrent.CompletionStage;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.function.BooleanSupplier;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.Trace;

/** What the storage tests share. */
final class Ledgers {
    static final Instant NOW = Instant.parse("2026-12-01T07:15:31.000000001Z");
    static final Clock CLOCK = Clock.fixed(NOW, ZoneOffset.UTC);
    private static final Trace NO_TRACE = new Trace(new double[0], new double[0], new int[0], new double[0],
            new double[0]);

    private Ledgers() {}

    /** Short patience, so that a test of a lock does not take seconds. */
    static SqliteLedger open(Path folder) {
        return open(folder, new LedgerSettings(64, 1024, 100, 2, Duration.ofMillis(20)));
    }

    static SqliteLedger open(Path folder, LedgerSettings settings) {
        return SqliteLedger.open(folder, CLOCK, settings, Runnable::run);
    }

    static Connection foreignConnection(Path folder) throws SQLException {
        return DriverManager.getConnection("jdbc:sqlite:" + folder.resolve(LedgerFile.NAME));
    }

    static StoredVerdict await(CompletionStage<StoredVerdict> stage) {
        return stage.toCompletableFuture().orTimeout(30, TimeUnit.SECONDS).join();
    }

    static <T extends Throwable> T failureOf(Class<T> type, CompletionStage<StoredVerdict> stage) {
        Throwable cause = assertThrows(CompletionException.class, () -> await(stage)).getCause();
        return assertThrows(type, () -> {
            throw cause;
        });
    }

    static void execute(Connection connection, String sql) throws SQLException {
        try (Statement statement = connection.createStatement()) {
            statement.executeUpdate(sql);
        }
    }

    /** Stops the writer thread until the latch is released, so that what is queued meanwhile becomes one batch. */
    static CountDownLatch holdWriter(SqliteLedger ledger) throws InterruptedException {
        CountDownLatch held = new CountDownLatch(1);
        CountDownLatch release = new CountDownLatch(1);
        ledger.onWriter(connection -> {
            held.countDown();
            try {
                release.await();
            } catch (InterruptedException e) {
                throw new IllegalStateException(e);
            }
        });
        held.await();
        return release;
    }

    static void waitUntil(BooleanSupplier condition) throws InterruptedException {
        for (int i = 0; i < 3000 && !condition.getAsBoolean(); i++) {
            Thread.sleep(10);
        }
        assertEquals(true, condition.getAsBoolean(), "did not come true within 30 s");
    }

    /** Sequences run from 1 without a gap, and so do the attempts of every part; nothing is damaged. */
    static void assertGapless(Path folder, long expectedVerdicts) throws SQLException {
        try (Connection connection = foreignConnection(folder)) {
            assertEquals(expectedVerdicts, Migrations.integer(connection, "SELECT count(*) FROM verdict"));
            assertEquals(expectedVerdicts,
                    Migrations.integer(connection, "SELECT coalesce(max(sequence), 0) FROM verdict"));
            assertEquals(expectedVerdicts, Migrations.integer(connection, "SELECT count(*) FROM trace"));
            assertEquals(0, Migrations.integer(connection, """
                    SELECT count(*) FROM (
                        SELECT 1 FROM verdict GROUP BY product, serial HAVING max(attempt) <> count(*))
                    """), "parts with gaps in their attempts");
            assertEquals(0, Migrations.integer(connection, "SELECT count(*) FROM pragma_foreign_key_check"));
            assertEquals(1, Migrations.integer(connection, """
                    SELECT count(*) FROM pragma_integrity_check WHERE integrity_check = 'ok'
                    """));
        }
    }

    /** Equal in every component, curves bit for bit. */
    static void assertSame(StoredVerdict expected, StoredVerdict actual) {
        assertEquals(withoutTrace(expected), withoutTrace(actual));
        assertSame(expected.judgement().trace(), actual.judgement().trace());
    }

    static void assertSame(Trace expected, Trace actual) {
        assertEquals(bits(expected.binTimesSeconds()), bits(actual.binTimesSeconds()));
        assertEquals(bits(expected.binTemperaturesCelsius()), bits(actual.binTemperaturesCelsius()));
        assertArrayEquals(expected.binCounts(), actual.binCounts());
        assertEquals(bits(expected.structureResistancesKelvinPerWatt()),
                bits(actual.structureResistancesKelvinPerWatt()));
        assertEquals(bits(expected.structureCapacitancesJoulesPerKelvin()),
                bits(actual.structureCapacitancesJoulesPerKelvin()));
    }

    static Judgement withoutTrace(Judgement j) {
        return new Judgement(j.outcome(), j.disposition(), j.failingRegion(), j.otherSuspects(), j.decisionConfidence(),
                j.regions(), j.envelopeInside(), j.envelopeFirstExitJoulesPerKelvin(), j.inFamilyStatistic(),
                j.inFamilyLimit(), j.reasons(), j.limitRevision(), j.limitSha256(), j.algorithmVersion(), NO_TRACE);
    }

    private static StoredVerdict withoutTrace(StoredVerdict v) {
        return new StoredVerdict(v.sequence(), v.measurementId(), v.contentSha256(), v.product(), v.serial(), v.lot(),
                v.station(), v.measuredAt(), v.curveKind(), v.heatingPowerWatts(), v.heatingSeconds(), v.attempt(),
                v.storedAt(), withoutTrace(v.judgement()));
    }

    private static List<Long> bits(double[] values) {
        return Arrays.stream(values).mapToObj(Double::doubleToRawLongBits).toList();
    }
}

package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Path;
import java.time.Instant;
import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.HexFormat;
import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.measurement.SampledCurve;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Reason;
import org.laddergate.screening.StoredVerdict;

@Tag("storage")
class RoundTripTest {
    @TempDir
    Path folder;

    @Test
    void judgement_ofAnyContent_comesBackEqualInEveryComponent() {
        List<StoredVerdict> answered = new ArrayList<>();
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            for (int seed = 0; seed < 300; seed++) {
                RandomVerdicts random = new RandomVerdicts(seed);
                Measurement measurement = random.anyMeasurement(seed + ":" + random.text());
                String sha256 = random.sha256();
                Judgement judgement = random.anyJudgement();
                StoredVerdict answer = Ledgers.await(ledger.append(measurement, sha256, judgement));
                assertTellsTheSame(measurement, sha256, judgement, answer);
                Ledgers.assertSame(answer, ledger.find(measurement.measurementId()).orElseThrow());
                answered.add(answer);
            }
        }
        try (SqliteLedger reopened = Ledgers.open(folder)) {
            for (StoredVerdict answer : answered) {
                Ledgers.assertSame(answer, reopened.find(answer.measurementId()).orElseThrow());
            }
        }
    }

    private static void assertTellsTheSame(Measurement m, String sha256, Judgement judgement, StoredVerdict answer) {
        assertEquals(List.of(m.measurementId(), sha256, m.product(), m.serial(), m.lot(), m.station(), m.measuredAt(),
                m.curveKind(), m.heatingPowerWatts(), m.heatingSeconds(), Ledgers.NOW),
                List.of(answer.measurementId(), answer.contentSha256(), answer.product(), answer.serial(), answer.lot(),
                        answer.station(), answer.measuredAt(), answer.curveKind(), answer.heatingPowerWatts(),
                        answer.heatingSeconds(), answer.storedAt()));
        assertEquals(Ledgers.withoutTrace(judgement), Ledgers.withoutTrace(answer.judgement()));
        Ledgers.assertSame(judgement.trace(), answer.judgement().trace());
    }

    @Test
    void negativeZero_ofAScalar_isAnsweredAsItWillBeRead() {
        Judgement j = new RandomVerdicts(1).typicalJudgement();
        Judgement withNegativeZero = new Judgement(j.outcome(), j.disposition(), j.failingRegion(), j.otherSuspects(),
                -0.0, j.regions(), j.envelopeInside(), -0.0, -0.0, -0.0, List.of(new Reason("c", "s", -0.0, -0.0)),
                j.limitRevision(), j.limitSha256(), j.algorithmVersion(), j.trace());
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            StoredVerdict answer = Ledgers.await(ledger.append(RandomVerdicts.measurement("m", "p", "s"),
                    "a".repeat(64), withNegativeZero));
            Ledgers.assertSame(answer, ledger.find("m").orElseThrow());
        }
    }

    @Test
    void halfASurrogatePair_isRefusedInsteadOfBecomingAQuestionMark() {
        Judgement judgement = new RandomVerdicts(1).typicalJudgement();
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            Ledgers.await(ledger.append(RandomVerdicts.measurement("?", "?", "?"), "a".repeat(64), judgement));
            InvalidInputException refused = Ledgers.failureOf(InvalidInputException.class, ledger.append(
                    RandomVerdicts.measurement("m", "p", "\ud83d"), "a".repeat(64), judgement));
            assertEquals("/serial", refused.faults().get(0).pointer());
            assertEquals(List.of(), ledger.findBySerial("\ud83d", "?"));
            assertEquals(true, ledger.find("\udd25").isEmpty());
        }
    }

    @Test
    void measuredAt_beyondTheStorableYears_isRefused() {
        Measurement late = new Measurement("m", "p", "s", "", "", OffsetDateTime.parse("2300-01-01T00:00:00Z"),
                CurveKind.COOLING, 80, 4, SampledCurve.copyOf(new double[0], new double[0]));
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            InvalidInputException refused = Ledgers.failureOf(InvalidInputException.class,
                    ledger.append(late, "a".repeat(64), new RandomVerdicts(1).typicalJudgement()));
            assertEquals("/measuredAt", refused.faults().get(0).pointer());
        }
    }

    @Test
    void blobLayout_isLittleEndianFloat64AndInt32() {
        // 1.0 is 0x3FF0000000000000 and -2.0 is 0xC000000000000000 in IEEE 754-2019, binary64.
        assertArrayEquals(HexFormat.of().parseHex("000000000000f03f00000000000000c0"),
                LittleEndian.bytes(new double[] {1.0, -2.0}));
        assertArrayEquals(HexFormat.of().parseHex("01000000feffffff"), LittleEndian.bytes(new int[] {1, -2}));
    }

    @Test
    void epochNanos_atTheEndsOfTheRange_areExact() {
        assertEquals(Instant.parse("1677-09-21T00:12:43.145224192Z"), EpochNanos.instant(Long.MIN_VALUE));
        assertEquals(Instant.parse("2262-04-11T23:47:16.854775807Z"), EpochNanos.instant(Long.MAX_VALUE));
        assertEquals(Long.MAX_VALUE, EpochNanos.of(Instant.parse("2262-04-11T23:47:16.854775807Z")));
        assertEquals(-1, EpochNanos.of(Instant.parse("1969-12-31T23:59:59.999999999Z")));
    }
}

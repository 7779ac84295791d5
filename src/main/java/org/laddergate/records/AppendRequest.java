package org.laddergate.records;

import java.nio.charset.StandardCharsets;
import java.sql.SQLException;
import java.time.Instant;
import java.time.OffsetDateTime;
import java.util.concurrent.CompletableFuture;
import org.laddergate.measurement.CurveKind;
import org.laddergate.measurement.InvalidInputException;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.StoredVerdict;

/**
 * One append on its way to the disk, checked and encoded. Does not keep the raw curve: a thousand may wait.
 */
final class AppendRequest implements WriterRequest {
    private final String measurementId;
    private final String contentSha256;
    private final String product;
    private final String serial;
    private final String lot;
    private final String station;
    private final OffsetDateTime measuredAt;
    private final long measuredAtEpochNanos;
    private final CurveKind curveKind;
    private final double heatingPowerWatts;
    private final double heatingSeconds;
    private final Judgement judgement;
    private final TraceBlobs trace;
    private final CompletableFuture<StoredVerdict> answer = new CompletableFuture<>();

    private AppendRequest(Measurement m, String contentSha256, Judgement judgement) {
        this.measurementId = storable("/measurementId", m.measurementId());
        this.contentSha256 = contentSha256;
        this.product = storable("/product", m.product());
        this.serial = storable("/serial", m.serial());
        this.lot = storable("/lot", m.lot());
        this.station = storable("/station", m.station());
        this.measuredAt = m.measuredAt();
        this.measuredAtEpochNanos = epochNanos(m.measuredAt());
        this.curveKind = m.curveKind();
        this.heatingPowerWatts = m.heatingPowerWatts();
        this.heatingSeconds = m.heatingSeconds();
        this.judgement = PositiveZero.in(judgement);
        this.trace = TraceBlobs.of(judgement.trace());
    }

    /** @throws InvalidInputException if a text is not Unicode or the time is outside the years 1678 to 2261 */
    static AppendRequest of(Measurement measurement, String contentSha256, Judgement judgement) {
        return new AppendRequest(measurement, contentSha256, judgement);
    }

    /** False for half a surrogate pair: UTF-8 cannot hold it, and SQLite would store a question mark. */
    static boolean isUnicode(String text) {
        return StandardCharsets.UTF_8.newEncoder().canEncode(text);
    }

    private static String storable(String pointer, String text) {
        if (!isUnicode(text)) {
            throw new InvalidInputException(pointer, "not_unicode",
                    "the text contains half a surrogate pair; only complete Unicode characters are accepted");
        }
        return text;
    }

    private static long epochNanos(OffsetDateTime measuredAt) {
        try {
            return EpochNanos.of(measuredAt.toInstant());
        } catch (ArithmeticException e) {
            throw new InvalidInputException("/measuredAt", "out_of_range",
                    measuredAt + " is outside the years 1678 to 2261");
        }
    }

    Row bindVerdict(Row row, long sequence, int attempt, Instant storedAt) throws SQLException {
        row.integer(sequence).text(measurementId).text(contentSha256).text(product).text(serial).text(lot).text(station)
                .integer(measuredAtEpochNanos).integer(measuredAt.getOffset().getTotalSeconds())
                .text(curveKind.word()).real(heatingPowerWatts).real(heatingSeconds).integer(attempt)
                .integer(EpochNanos.of(storedAt));
        return row.text(judgement.outcome().word()).text(judgement.disposition().word())
                .text(judgement.failingRegion()).real(judgement.decisionConfidence())
                .flag(judgement.envelopeInside()).real(judgement.envelopeFirstExitJoulesPerKelvin())
                .real(judgement.inFamilyStatistic()).real(judgement.inFamilyLimit())
                .integer(judgement.limitRevision()).text(judgement.limitSha256()).text(judgement.algorithmVersion());
    }

    StoredVerdict stored(long sequence, int attempt, Instant storedAt) {
        return new StoredVerdict(sequence, measurementId, contentSha256, product, serial, lot, station, measuredAt,
                curveKind, heatingPowerWatts, heatingSeconds, attempt, storedAt, judgement);
    }

    String measurementId() {
        return measurementId;
    }

    String contentSha256() {
        return contentSha256;
    }

    String product() {
        return product;
    }

    String serial() {
        return serial;
    }

    Judgement judgement() {
        return judgement;
    }

    TraceBlobs trace() {
        return trace;
    }

    CompletableFuture<StoredVerdict> answer() {
        return answer;
    }
}

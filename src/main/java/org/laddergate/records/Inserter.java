package org.laddergate.records;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.temporal.ChronoUnit;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.Trace;

/** Inserts verdicts over the writer's connection, inside the caller's transaction. For the writer thread alone. */
final class Inserter {
    private final PreparedStatement lastSequence;
    private final PreparedStatement attempts;
    private final PreparedStatement verdict;
    private final PreparedStatement region;
    private final PreparedStatement reason;
    private final PreparedStatement trace;

    Inserter(Connection c) throws SQLException {
        lastSequence = c.prepareStatement("SELECT coalesce(max(sequence), 0) FROM verdict");
        attempts = c.prepareStatement("SELECT count(*) FROM verdict WHERE product = ? AND serial = ?");
        verdict = c.prepareStatement("""
                INSERT INTO verdict (sequence, measurement_id, content_sha256, product, serial, lot, station, measured_at,
                    measured_at_utc_us, curve_kind, heating_power_w, heating_s, attempt, stored_at, outcome, disposition,
                    failing_region, other_suspects, decision_confidence, envelope_inside, envelope_exit_j_per_k,
                    in_family_statistic, in_family_limit, limit_revision, limit_sha256, algorithm_version)
                VALUES (?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?,?)""");
        region = c.prepareStatement("INSERT INTO region_result VALUES (?,?,?,?,?,?,?,?,?,?,?)");
        reason = c.prepareStatement("INSERT INTO reason VALUES (?,?,?,?,?,?)");
        trace = c.prepareStatement("INSERT INTO trace VALUES (?,?,?,?,?,?)");
    }

    long lastSequence() throws SQLException {
        try (ResultSet r = lastSequence.executeQuery()) {
            return r.getLong(1);
        }
    }

    StoredVerdict insert(long sequence, Measurement m, String contentSha256, Judgement j, Instant now)
            throws SQLException {
        int attempt = 1 + earlier(m);
        StoredVerdict stored = new StoredVerdict(sequence, m.measurementId(), contentSha256, m.product(), m.serial(), m.lot(),
                m.station(), m.measuredAt(), m.curveKind(), m.heatingPowerWatts(), m.heatingSeconds(), attempt, now, j);
        insertVerdict(stored);
        for (int i = 0; i < j.regions().size(); i++) {
            insertRegion(sequence, i, j.regions().get(i));
        }
        for (int i = 0; i < j.reasons().size(); i++) {
            insertReason(sequence, i, j.reasons().get(i));
        }
        insertTrace(sequence, j.trace());
        return stored;
    }

    private int earlier(Measurement m) throws SQLException {
        attempts.setString(1, m.product());
        attempts.setString(2, m.serial());
        try (ResultSet r = attempts.executeQuery()) {
            return r.getInt(1);
        }
    }

    private void insertVerdict(StoredVerdict v) throws SQLException {
        Judgement j = v.judgement();
        int i = 1;
        verdict.setLong(i++, v.sequence());
        for (String text : new String[] {v.measurementId(), v.contentSha256(), v.product(), v.serial(), v.lot(),
            v.station(), v.measuredAt().toString()}) {
            verdict.setString(i++, text);
        }
        verdict.setLong(i++, ChronoUnit.MICROS.between(Instant.EPOCH, v.measuredAt().toInstant()));
        verdict.setString(i++, v.curveKind().name());
        verdict.setDouble(i++, v.heatingPowerWatts());
        number(verdict, i++, v.heatingSeconds());
        verdict.setInt(i++, v.attempt());
        verdict.setString(i++, v.storedAt().toString());
        verdict.setString(i++, j.outcome().name());
        verdict.setString(i++, j.disposition().name());
        verdict.setString(i++, j.failingRegion());
        verdict.setString(i++, String.join(Reader.SEPARATOR, j.otherSuspects()));
        number(verdict, i++, j.decisionConfidence());
        verdict.setInt(i++, j.envelopeInside() ? 1 : 0);
        number(verdict, i++, j.envelopeFirstExitJoulesPerKelvin());
        number(verdict, i++, j.inFamilyStatistic());
        number(verdict, i++, j.inFamilyLimit());
        verdict.setInt(i++, j.limitRevision());
        verdict.setString(i++, j.limitSha256());
        verdict.setString(i, j.algorithmVersion());
        verdict.executeUpdate();
    }

    private void insertRegion(long sequence, int position, RegionResult r) throws SQLException {
        region.setLong(1, sequence);
        region.setInt(2, position);
        region.setString(3, r.region());
        region.setString(4, r.role().name());
        region.setInt(5, r.assessed() ? 1 : 0);
        number(region, 6, r.resistanceKelvinPerWatt());
        number(region, 7, r.uncertaintyKelvinPerWatt());
        number(region, 8, r.lowerLimitKelvinPerWatt());
        number(region, 9, r.upperLimitKelvinPerWatt());
        number(region, 10, r.probabilityConforming());
        number(region, 11, r.faultProbability());
        region.executeUpdate();
    }

    private void insertReason(long sequence, int position, Reason r) throws SQLException {
        reason.setLong(1, sequence);
        reason.setInt(2, position);
        reason.setString(3, r.code());
        reason.setString(4, r.sentence());
        number(reason, 5, r.value());
        number(reason, 6, r.bound());
        reason.executeUpdate();
    }

    private void insertTrace(long sequence, Trace t) throws SQLException {
        trace.setLong(1, sequence);
        trace.setBytes(2, Blobs.of(t.binTimesSeconds()));
        trace.setBytes(3, Blobs.of(t.binTemperaturesCelsius()));
        trace.setBytes(4, Blobs.of(t.binCounts()));
        trace.setBytes(5, Blobs.of(t.structureResistancesKelvinPerWatt()));
        trace.setBytes(6, Blobs.of(t.structureCapacitancesJoulesPerKelvin()));
        trace.executeUpdate();
    }

    /** What is not a finite number is not there: SQLite has no NaN, and an infinite limit or pulse is the absence of one. */
    private static void number(PreparedStatement s, int index, double value) throws SQLException {
        if (Double.isFinite(value)) {
            s.setDouble(index, value);
        } else {
            s.setNull(index, java.sql.Types.REAL);
        }
    }
}

package org.laddergate.records;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.util.List;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.MeasurementConflictException;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.StoredVerdict;

/**
 * The append itself, inside a transaction of the writer connection; used by the writer thread only. Sequence and
 * attempt are decided here from what the transaction sees, so a rolled-back append leaves no gap in either.
 */
final class VerdictInserter implements AutoCloseable {
    private static final String LAST_SEQUENCE = "SELECT coalesce(max(sequence), 0) FROM verdict";
    /** The last attempt rather than a count: a golden unit measured daily for years costs one index step. */
    private static final String LAST_ATTEMPT = """
            SELECT coalesce(max(attempt), 0) FROM verdict WHERE product = ? AND serial = ?
            """;
    private static final String VERDICT = """
            INSERT INTO verdict (sequence, measurement_id, content_sha256, product, serial, lot, station,
                measured_at_utc_ns, measured_at_offset_s, curve_kind, heating_power_w, heating_s, attempt,
                stored_at_utc_ns, outcome, disposition, failing_region, decision_confidence, envelope_inside,
                envelope_first_exit_j_per_k, in_family_statistic, in_family_limit, limit_revision, limit_sha256,
                algorithm_version)
            VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)
            """;
    private static final String REGION = """
            INSERT INTO region_result (sequence, position, region, role, assessed, rth_k_per_w, uncertainty_k_per_w,
                lower_limit_k_per_w, upper_limit_k_per_w, probability_conforming, fault_probability)
            VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)
            """;
    private static final String SUSPECT = "INSERT INTO other_suspect (sequence, position, region) VALUES (?, ?, ?)";
    private static final String REASON = """
            INSERT INTO reason (sequence, position, code, sentence, value, bound) VALUES (?, ?, ?, ?, ?, ?)
            """;
    private static final String TRACE = """
            INSERT INTO trace (sequence, bin_time_s, bin_temperature_c, bin_count, structure_rth_k_per_w,
                structure_cth_j_per_k)
            VALUES (?, ?, ?, ?, ?, ?)
            """;

    private final VerdictReader reader;
    private final PreparedStatement lastSequence;
    private final PreparedStatement lastAttempt;
    private final PreparedStatement verdict;
    private final PreparedStatement region;
    private final PreparedStatement suspect;
    private final PreparedStatement reason;
    private final PreparedStatement trace;

    VerdictInserter(Connection connection) throws SQLException {
        reader = new VerdictReader(connection);
        lastSequence = connection.prepareStatement(LAST_SEQUENCE);
        lastAttempt = connection.prepareStatement(LAST_ATTEMPT);
        verdict = connection.prepareStatement(VERDICT);
        region = connection.prepareStatement(REGION);
        suspect = connection.prepareStatement(SUSPECT);
        reason = connection.prepareStatement(REASON);
        trace = connection.prepareStatement(TRACE);
    }

    /** The position of the last verdict; 0 in an empty ledger. */
    long lastSequence() throws SQLException {
        try (ResultSet result = lastSequence.executeQuery()) {
            return result.getLong(1);
        }
    }

    /**
     * Inserts, or finds the earlier verdict of the same content.
     *
     * @param sequence position to give to a new verdict
     * @throws MeasurementConflictException if the id is stored with another content; nothing was inserted
     */
    StoredVerdict append(AppendRequest request, long sequence, Instant storedAt) throws SQLException {
        VerdictReader.Key earlier = reader.findKey(request.measurementId()).orElse(null);
        if (earlier == null) {
            return insert(request, sequence, storedAt);
        }
        if (!earlier.contentSha256().equals(request.contentSha256())) {
            throw new MeasurementConflictException(request.measurementId());
        }
        return reader.read(earlier.sequence());
    }

    private StoredVerdict insert(AppendRequest request, long sequence, Instant storedAt) throws SQLException {
        int attempt = lastAttempt(request) + 1;
        request.bindVerdict(Row.of(verdict), sequence, attempt, storedAt).insert();
        request.trace().bind(Row.of(trace).integer(sequence)).insert();
        insertParts(sequence, request.judgement());
        return request.stored(sequence, attempt, storedAt);
    }

    private int lastAttempt(AppendRequest request) throws SQLException {
        Row.of(lastAttempt).text(request.product()).text(request.serial());
        try (ResultSet result = lastAttempt.executeQuery()) {
            return result.getInt(1);
        }
    }

    private void insertParts(long sequence, Judgement judgement) throws SQLException {
        int position = 0;
        for (RegionResult r : judgement.regions()) {
            Row.of(region).integer(sequence).integer(position++).text(r.region()).text(r.role().word())
                    .flag(r.assessed()).real(r.resistanceKelvinPerWatt()).real(r.uncertaintyKelvinPerWatt())
                    .real(r.lowerLimitKelvinPerWatt()).real(r.upperLimitKelvinPerWatt())
                    .real(r.probabilityConforming()).real(r.faultProbability()).insert();
        }
        position = 0;
        for (String s : judgement.otherSuspects()) {
            Row.of(suspect).integer(sequence).integer(position++).text(s).insert();
        }
        position = 0;
        for (Reason r : judgement.reasons()) {
            Row.of(reason).integer(sequence).integer(position++).text(r.code()).text(r.sentence()).real(r.value())
                    .real(r.bound()).insert();
        }
    }

    @Override
    public void close() throws SQLException {
        reader.close();
        for (PreparedStatement s : List.of(lastSequence, lastAttempt, verdict, region, suspect, reason, trace)) {
            s.close();
        }
    }
}

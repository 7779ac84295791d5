package org.laddergate.records;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.ZoneOffset;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.screening.Disposition;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.StoredVerdict;

/**
 * Reads verdicts over one connection; not thread-safe. No transaction spans the statements: a verdict and its parts
 * appear in one commit and never change, so whoever sees the verdict sees the parts.
 */
final class VerdictReader implements AutoCloseable {
    private static final String KEY_OF_MEASUREMENT = """
            SELECT sequence, content_sha256 FROM verdict WHERE measurement_id = ?
            """;
    private static final String SEQUENCES_OF_SERIAL = """
            SELECT sequence FROM verdict WHERE product = ? AND serial = ? ORDER BY attempt
            """;
    private static final String VERDICT = """
            SELECT verdict.*, bin_time_s, bin_temperature_c, bin_count, structure_rth_k_per_w, structure_cth_j_per_k
            FROM verdict JOIN trace ON trace.sequence = verdict.sequence
            WHERE verdict.sequence = ?
            """;
    private static final String REGIONS = "SELECT * FROM region_result WHERE sequence = ? ORDER BY position";
    private static final String SUSPECTS = "SELECT region FROM other_suspect WHERE sequence = ? ORDER BY position";
    private static final String REASONS = "SELECT * FROM reason WHERE sequence = ? ORDER BY position";

    /** Where a measurement is stored, and for which content. */
    record Key(long sequence, String contentSha256) {}

    private interface Mapping<T> {
        T map(ResultSet row) throws SQLException;
    }

    private final PreparedStatement keyOfMeasurement;
    private final PreparedStatement sequencesOfSerial;
    private final PreparedStatement verdict;
    private final PreparedStatement regions;
    private final PreparedStatement suspects;
    private final PreparedStatement reasons;

    VerdictReader(Connection connection) throws SQLException {
        keyOfMeasurement = connection.prepareStatement(KEY_OF_MEASUREMENT);
        sequencesOfSerial = connection.prepareStatement(SEQUENCES_OF_SERIAL);
        verdict = connection.prepareStatement(VERDICT);
        regions = connection.prepareStatement(REGIONS);
        suspects = connection.prepareStatement(SUSPECTS);
        reasons = connection.prepareStatement(REASONS);
    }

    Optional<Key> findKey(String measurementId) throws SQLException {
        keyOfMeasurement.setString(1, measurementId);
        return rows(keyOfMeasurement, row -> new Key(row.getLong(1), row.getString(2))).stream().findFirst();
    }

    Optional<StoredVerdict> find(String measurementId) throws SQLException {
        Optional<Key> key = findKey(measurementId);
        return key.isPresent() ? Optional.of(read(key.get().sequence())) : Optional.empty();
    }

    List<StoredVerdict> findBySerial(String product, String serial) throws SQLException {
        sequencesOfSerial.setString(1, product);
        sequencesOfSerial.setString(2, serial);
        List<StoredVerdict> verdicts = new ArrayList<>();
        for (long sequence : rows(sequencesOfSerial, row -> row.getLong(1))) {
            verdicts.add(read(sequence));
        }
        return List.copyOf(verdicts);
    }

    StoredVerdict read(long sequence) throws SQLException {
        List<RegionResult> regionResults = parts(regions, sequence, VerdictReader::regionResult);
        List<String> otherSuspects = parts(suspects, sequence, row -> row.getString(1));
        List<Reason> why = parts(reasons, sequence, row -> new Reason(row.getString("code"), row.getString("sentence"),
                real(row, "value"), real(row, "bound")));
        return parts(verdict, sequence, row -> verdict(row, otherSuspects, regionResults, why)).get(0);
    }

    private static StoredVerdict verdict(ResultSet row, List<String> otherSuspects, List<RegionResult> regions,
            List<Reason> reasons) throws SQLException {
        Judgement judgement = new Judgement(Outcome.valueOf(constant(row, "outcome")),
                Disposition.valueOf(constant(row, "disposition")), row.getString("failing_region"), otherSuspects,
                real(row, "decision_confidence"), regions, row.getInt("envelope_inside") == 1,
                real(row, "envelope_first_exit_j_per_k"), real(row, "in_family_statistic"),
                real(row, "in_family_limit"), reasons, row.getInt("limit_revision"), row.getString("limit_sha256"),
                row.getString("algorithm_version"), TraceBlobs.read(row));
        return new StoredVerdict(row.getLong("sequence"), row.getString("measurement_id"),
                row.getString("content_sha256"), row.getString("product"), row.getString("serial"),
                row.getString("lot"), row.getString("station"),
                EpochNanos.instant(row.getLong("measured_at_utc_ns"))
                        .atOffset(ZoneOffset.ofTotalSeconds(row.getInt("measured_at_offset_s"))),
                CurveKind.valueOf(constant(row, "curve_kind")), real(row, "heating_power_w"), real(row, "heating_s"),
                row.getInt("attempt"), EpochNanos.instant(row.getLong("stored_at_utc_ns")), judgement);
    }

    private static RegionResult regionResult(ResultSet row) throws SQLException {
        return new RegionResult(row.getString("region"), RegionRole.valueOf(constant(row, "role")),
                row.getInt("assessed") == 1, real(row, "rth_k_per_w"), real(row, "uncertainty_k_per_w"),
                real(row, "lower_limit_k_per_w"), real(row, "upper_limit_k_per_w"),
                real(row, "probability_conforming"), real(row, "fault_probability"));
    }

    private static <T> List<T> parts(PreparedStatement query, long sequence, Mapping<T> mapping) throws SQLException {
        query.setLong(1, sequence);
        return rows(query, mapping);
    }

    private static <T> List<T> rows(PreparedStatement query, Mapping<T> mapping) throws SQLException {
        List<T> rows = new ArrayList<>();
        try (ResultSet result = query.executeQuery()) {
            while (result.next()) {
                rows.add(mapping.map(result));
            }
        }
        return rows;
    }

    private static double real(ResultSet row, String column) throws SQLException {
        double value = row.getDouble(column);
        return row.wasNull() ? Double.NaN : value;
    }

    private static String constant(ResultSet row, String column) throws SQLException {
        return row.getString(column).toUpperCase(Locale.ROOT);
    }

    @Override
    public void close() throws SQLException {
        for (PreparedStatement s : List.of(keyOfMeasurement, sequencesOfSerial, verdict, regions, suspects, reasons)) {
            s.close();
        }
    }
}

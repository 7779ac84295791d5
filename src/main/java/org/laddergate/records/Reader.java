package org.laddergate.records;

import java.sql.Connection;
import java.sql.PreparedStatement;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.time.Instant;
import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.laddergate.limits.RegionRole;
import org.laddergate.measurement.CurveKind;
import org.laddergate.screening.Disposition;
import org.laddergate.screening.Judgement;
import org.laddergate.screening.Outcome;
import org.laddergate.screening.Reason;
import org.laddergate.screening.RegionResult;
import org.laddergate.screening.StoredVerdict;
import org.laddergate.screening.Trace;

/** Reads stored verdicts over one connection. For one thread at a time. */
final class Reader implements AutoCloseable {
    /** Separates names in one column; control characters are refused where names enter. */
    static final String SEPARATOR = "\u001f";

    private final Connection connection;
    private final boolean owned;
    private final PreparedStatement byId;
    private final PreparedStatement bySerial;
    private final PreparedStatement regions;
    private final PreparedStatement reasons;
    private final PreparedStatement trace;

    /** @param owned whether the connection is closed with the reader */
    Reader(Connection connection, boolean owned) throws SQLException {
        this.connection = connection;
        this.owned = owned;
        this.byId = connection.prepareStatement("SELECT * FROM verdict WHERE measurement_id = ?");
        this.bySerial = connection
                .prepareStatement("SELECT * FROM verdict WHERE product = ? AND serial = ? ORDER BY sequence");
        this.regions = connection.prepareStatement("SELECT * FROM region_result WHERE sequence = ? ORDER BY position");
        this.reasons = connection.prepareStatement("SELECT * FROM reason WHERE sequence = ? ORDER BY position");
        this.trace = connection.prepareStatement("SELECT * FROM trace WHERE sequence = ?");
    }

    Optional<StoredVerdict> find(String measurementId) throws SQLException {
        byId.setString(1, measurementId);
        List<StoredVerdict> found = read(byId);
        return found.isEmpty() ? Optional.empty() : Optional.of(found.get(0));
    }

    List<StoredVerdict> findBySerial(String product, String serial) throws SQLException {
        bySerial.setString(1, product);
        bySerial.setString(2, serial);
        return read(bySerial);
    }

    private List<StoredVerdict> read(PreparedStatement query) throws SQLException {
        List<StoredVerdict> out = new ArrayList<>();
        try (ResultSet r = query.executeQuery()) {
            while (r.next()) {
                out.add(verdict(r));
            }
        }
        return out;
    }

    private StoredVerdict verdict(ResultSet r) throws SQLException {
        long sequence = r.getLong("sequence");
        double exit = number(r, "envelope_exit_j_per_k");
        String suspects = r.getString("other_suspects");
        Judgement judgement = new Judgement(Outcome.valueOf(r.getString("outcome")),
                Disposition.valueOf(r.getString("disposition")), r.getString("failing_region"),
                suspects.isEmpty() ? List.of() : List.of(suspects.split(SEPARATOR)), number(r, "decision_confidence"),
                regions(sequence), r.getInt("envelope_inside") == 1, exit, number(r, "in_family_statistic"),
                number(r, "in_family_limit"), reasons(sequence), r.getInt("limit_revision"), r.getString("limit_sha256"),
                r.getString("algorithm_version"), trace(sequence));
        double heating = number(r, "heating_s");
        return new StoredVerdict(sequence, r.getString("measurement_id"), r.getString("content_sha256"),
                r.getString("product"), r.getString("serial"), r.getString("lot"), r.getString("station"),
                OffsetDateTime.parse(r.getString("measured_at")), CurveKind.valueOf(r.getString("curve_kind")),
                r.getDouble("heating_power_w"), Double.isNaN(heating) ? Double.POSITIVE_INFINITY : heating,
                r.getInt("attempt"), Instant.parse(r.getString("stored_at")), judgement);
    }

    private List<RegionResult> regions(long sequence) throws SQLException {
        regions.setLong(1, sequence);
        List<RegionResult> out = new ArrayList<>();
        try (ResultSet r = regions.executeQuery()) {
            while (r.next()) {
                double lower = number(r, "lower_limit_k_per_w");
                double upper = number(r, "upper_limit_k_per_w");
                out.add(new RegionResult(r.getString("region"), RegionRole.valueOf(r.getString("role")),
                        r.getInt("assessed") == 1, number(r, "rth_k_per_w"), number(r, "uncertainty_k_per_w"),
                        Double.isNaN(lower) ? Double.NEGATIVE_INFINITY : lower,
                        Double.isNaN(upper) ? Double.POSITIVE_INFINITY : upper, number(r, "probability_conforming"),
                        number(r, "fault_probability")));
            }
        }
        return out;
    }

    private List<Reason> reasons(long sequence) throws SQLException {
        reasons.setLong(1, sequence);
        List<Reason> out = new ArrayList<>();
        try (ResultSet r = reasons.executeQuery()) {
            while (r.next()) {
                out.add(new Reason(r.getString("code"), r.getString("sentence"), number(r, "value"), number(r, "bound")));
            }
        }
        return out;
    }

    private Trace trace(long sequence) throws SQLException {
        trace.setLong(1, sequence);
        try (ResultSet r = trace.executeQuery()) {
            return new Trace(Blobs.doubles(r.getBytes("bin_times_s")), Blobs.doubles(r.getBytes("bin_temperatures_c")),
                    Blobs.ints(r.getBytes("bin_counts")), Blobs.doubles(r.getBytes("structure_r_k_per_w")),
                    Blobs.doubles(r.getBytes("structure_c_j_per_k")));
        }
    }

    private static double number(ResultSet r, String column) throws SQLException {
        double value = r.getDouble(column);
        return r.wasNull() ? Double.NaN : value;
    }

    @Override
    public void close() throws SQLException {
        for (PreparedStatement s : List.of(byId, bySerial, regions, reasons, trace)) {
            s.close();
        }
        if (owned) {
            connection.close();
        }
    }
}

package org.laddergate.records;

import java.sql.ResultSet;
import java.sql.SQLException;
import org.laddergate.screening.Trace;

/** A trace as the columns of its table; encoded on the caller's thread, so that the writer only binds. */
final class TraceBlobs {
    private final byte[] binTimes;
    private final byte[] binTemperatures;
    private final byte[] binCounts;
    private final byte[] structureResistances;
    private final byte[] structureCapacitances;

    private TraceBlobs(Trace trace) {
        binTimes = LittleEndian.bytes(trace.binTimesSeconds());
        binTemperatures = LittleEndian.bytes(trace.binTemperaturesCelsius());
        binCounts = LittleEndian.bytes(trace.binCounts());
        structureResistances = LittleEndian.bytes(trace.structureResistancesKelvinPerWatt());
        structureCapacitances = LittleEndian.bytes(trace.structureCapacitancesJoulesPerKelvin());
    }

    static TraceBlobs of(Trace trace) {
        return new TraceBlobs(trace);
    }

    Row bind(Row row) throws SQLException {
        return row.blob(binTimes).blob(binTemperatures).blob(binCounts).blob(structureResistances)
                .blob(structureCapacitances);
    }

    static Trace read(ResultSet row) throws SQLException {
        return new Trace(
                LittleEndian.doubles(row.getBytes("bin_time_s")),
                LittleEndian.doubles(row.getBytes("bin_temperature_c")),
                LittleEndian.ints(row.getBytes("bin_count")),
                LittleEndian.doubles(row.getBytes("structure_rth_k_per_w")),
                LittleEndian.doubles(row.getBytes("structure_cth_j_per_k")));
    }
}

package org.laddergate.records;

import java.sql.Connection;
import java.sql.SQLException;
import java.sql.Statement;
import java.time.Instant;
import java.util.ArrayList;
import java.util.List;
import org.laddergate.screening.MeasurementConflictException;
import org.laddergate.screening.StoredVerdict;

/**
 * The writer connection with its prepared statements; used by the writer thread only.
 *
 * <p>The driver finalises a statement that failed, so after any failure the statements are prepared anew, and the
 * connection is given up as well unless the fault is known to leave it sound.
 */
final class WriterSession implements AutoCloseable {
    /** Two commits on purpose: only a commit that keeps pages shows that there is room for a verdict. */
    private static final String PROBE_FILL = """
            INSERT OR REPLACE INTO write_probe (probe_id, filler) VALUES (1, zeroblob(16384))
            """;
    private static final String PROBE_CLEAR = "DELETE FROM write_probe";

    private final Connection connection;
    private final Statement control;
    private VerdictInserter inserter;

    private WriterSession(Connection connection) throws SQLException {
        this.connection = connection;
        this.control = connection.createStatement();
        this.inserter = new VerdictInserter(connection);
    }

    /** Takes the connection over, and closes it if the statements do not fit its tables. */
    static WriterSession on(Connection connection) throws SQLException {
        try {
            return new WriterSession(connection);
        } catch (SQLException e) {
            connection.close();
            throw e;
        }
    }

    Connection connection() {
        return connection;
    }

    /**
     * Stores a batch in one transaction and returns its answers, which must not be given before this returns.
     *
     * @throws RowFaultException one request is at fault; everything was rolled back and the rest may be tried again
     * @throws SQLException      the database is at fault; everything was rolled back
     */
    BatchResult store(List<AppendRequest> requests, Instant storedAt) throws SQLException, RowFaultException {
        control.executeUpdate("BEGIN IMMEDIATE");
        try {
            BatchResult result = insertAll(requests, storedAt);
            control.executeUpdate("COMMIT");
            return result;
        } catch (SQLException | RowFaultException | RuntimeException | Error e) {
            rollBack();
            throw e;
        }
    }

    private BatchResult insertAll(List<AppendRequest> requests, Instant storedAt)
            throws SQLException, RowFaultException {
        long before = inserter.lastSequence();
        long last = before;
        List<Runnable> answers = new ArrayList<>(requests.size());
        for (int i = 0; i < requests.size(); i++) {
            AppendRequest request = requests.get(i);
            try {
                StoredVerdict verdict = inserter.append(request, last + 1, storedAt);
                last = Math.max(last, verdict.sequence());
                answers.add(() -> request.answer().complete(verdict));
            } catch (MeasurementConflictException e) {
                answers.add(() -> request.answer().completeExceptionally(e));
            } catch (SQLException e) {
                if (SqlFaults.liesInTheRow(e)) {
                    throw new RowFaultException(i, e);
                }
                throw e;
            } catch (RuntimeException e) {
                throw new RowFaultException(i, e);
            }
        }
        return new BatchResult(answers, (int) (last - before));
    }

    /** Makes the session fit for the next batch after a row fault or a fault that leaves the connection sound. */
    void renewStatements() throws SQLException {
        inserter.close();
        inserter = new VerdictInserter(connection);
    }

    /** Writes and removes about as much as a verdict needs. */
    void probe() throws SQLException {
        control.executeUpdate(PROBE_FILL);
        control.executeUpdate(PROBE_CLEAR);
    }

    /** SQLite rolls back by itself on some faults and then refuses; a transaction left open fails the next BEGIN. */
    private void rollBack() {
        try {
            control.executeUpdate("ROLLBACK");
        } catch (SQLException alreadyRolledBack) {
            return;
        }
    }

    @Override
    public void close() throws SQLException {
        try {
            inserter.close();
            control.close();
        } finally {
            connection.close();
        }
    }
}

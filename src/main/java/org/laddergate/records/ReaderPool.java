package org.laddergate.records;

import java.sql.Connection;
import java.sql.SQLException;
import java.util.Optional;
import java.util.concurrent.ArrayBlockingQueue;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.TimeUnit;
import org.laddergate.screening.LedgerUnavailableException;
import org.slf4j.Logger;
import org.slf4j.LoggerFactory;

/**
 * A fixed number of read-only connections, opened when first needed. Every look-up is short: a reader that stays inside
 * a transaction would keep the write-ahead log from being reused. Safe for use from many threads.
 */
final class ReaderPool implements AutoCloseable {
    private static final Logger LOG = LoggerFactory.getLogger(ReaderPool.class);
    private static final int PATIENCE_SECONDS = 10;

    /** A look-up. */
    interface Query<T> {
        T run(VerdictReader reader) throws SQLException;
    }

    private record Reader(Connection connection, VerdictReader statements) {}

    private final LedgerFile file;
    private final int size;
    private final BlockingQueue<Optional<Reader>> idle;
    private volatile boolean closed;

    ReaderPool(LedgerFile file, int size) {
        this.file = file;
        this.size = size;
        this.idle = new ArrayBlockingQueue<>(size);
        for (int i = 0; i < size; i++) {
            idle.add(Optional.empty());
        }
    }

    /** @throws LedgerUnavailableException if the database cannot be read or all readers stay busy */
    <T> T read(Query<T> query) {
        Optional<Reader> reader = borrow();
        try {
            if (closed) {
                throw new LedgerUnavailableException("the ledger is closed", null);
            }
            if (reader.isEmpty()) {
                reader = Optional.of(open());
            }
            return query.run(reader.get().statements());
        } catch (SQLException e) {
            discard(reader);
            reader = Optional.empty();
            throw new LedgerUnavailableException(SqlFaults.reason(e), e);
        } finally {
            idle.add(reader);
        }
    }

    private Optional<Reader> borrow() {
        try {
            Optional<Reader> reader = idle.poll(PATIENCE_SECONDS, TimeUnit.SECONDS);
            if (reader != null) {
                return reader;
            }
            throw new LedgerUnavailableException("too many look-ups at the same time", null);
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new LedgerUnavailableException("the look-up was interrupted", e);
        }
    }

    private Reader open() throws SQLException {
        Connection connection = file.openReader();
        try {
            return new Reader(connection, new VerdictReader(connection));
        } catch (SQLException e) {
            connection.close();
            throw e;
        }
    }

    private static void discard(Optional<Reader> reader) {
        try {
            if (reader.isPresent()) {
                reader.get().statements().close();
                reader.get().connection().close();
            }
        } catch (SQLException e) {
            LOG.warn("closing a ledger reader failed", e);
        }
    }

    /** Waits for look-ups under way. */
    @Override
    public void close() {
        if (closed) {
            return;
        }
        closed = true;
        for (int i = 0; i < size; i++) {
            discard(borrow());
            idle.add(Optional.empty());
        }
    }
}

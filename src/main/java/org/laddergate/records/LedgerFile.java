package org.laddergate.records;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import org.sqlite.SQLiteConfig;
import org.sqlite.SQLiteOpenMode;

/**
 * The one recipe for opening the ledger file; every connection of the ledger comes from here.
 *
 * <p>Autocommit stays on in every connection: the writer says BEGIN IMMEDIATE itself, because a transaction that starts
 * as a reader and turns writer fails with SQLITE_BUSY whatever the timeout.
 */
final class LedgerFile {
    static final String NAME = "laddergate.db";

    /** Order matters only for the first line: the others do not persist in the file. */
    private static final String WRITER_RECIPE = """
            PRAGMA journal_mode = WAL;            -- readers never wait for the writer
            PRAGMA synchronous = FULL;            -- NORMAL may lose the last commits when the power fails
            PRAGMA foreign_keys = ON;             -- off by default in SQLite, and per connection
            PRAGMA cache_size = -65536;           -- 64 MiB [KiB]: the index of measurement ids is hit at random
            PRAGMA journal_size_limit = 67108864; -- 64 MiB: give the disk back after a long reader let the log grow
            """;

    private final Path file;
    private final int busyTimeoutMillis;

    private LedgerFile(Path file, int busyTimeoutMillis) {
        this.file = file;
        this.busyTimeoutMillis = busyTimeoutMillis;
    }

    static LedgerFile in(Path dataFolder, int busyTimeoutMillis) {
        try {
            Files.createDirectories(dataFolder);
        } catch (IOException e) {
            throw new LedgerOpenException("cannot create the data folder " + dataFolder, e);
        }
        return new LedgerFile(dataFolder.resolve(NAME).toAbsolutePath(), busyTimeoutMillis);
    }

    /** Opens for the first time: creates the file if it is missing and brings it to the current schema. */
    Connection create() {
        try {
            return configured(writerConfig());
        } catch (LedgerOpenException e) {
            throw new LedgerOpenException("cannot open " + file + ": " + e.getMessage(), e);
        } catch (SQLException e) {
            throw new LedgerOpenException("cannot open " + file + ": " + SqlFaults.reason(e), e);
        }
    }

    /** Opens again after a failure. Never creates: a vanished file must not become an empty ledger that starts at 1. */
    Connection openWriter() throws SQLException {
        SQLiteConfig config = writerConfig();
        config.resetOpenMode(SQLiteOpenMode.CREATE);
        return configured(config);
    }

    Connection openReader() throws SQLException {
        SQLiteConfig config = new SQLiteConfig();
        config.setReadOnly(true);
        config.setBusyTimeout(busyTimeoutMillis);
        return config.createConnection("jdbc:sqlite:" + file);
    }

    private SQLiteConfig writerConfig() {
        SQLiteConfig config = new SQLiteConfig();
        config.setBusyTimeout(busyTimeoutMillis);
        config.setGetGeneratedKeys(false);
        return config;
    }

    private Connection configured(SQLiteConfig config) throws SQLException {
        Connection connection = config.createConnection("jdbc:sqlite:" + file);
        try (Statement statement = connection.createStatement()) {
            Migrations.requireOurs(connection);
            statement.executeUpdate(WRITER_RECIPE);
            requireWriteAheadLog(statement);
            Migrations.apply(connection);
            return connection;
        } catch (SQLException | RuntimeException e) {
            connection.close();
            throw e;
        }
    }

    /** SQLite answers with the old mode instead of failing, for example on a file system without shared memory. */
    private static void requireWriteAheadLog(Statement statement) throws SQLException {
        try (ResultSet mode = statement.executeQuery("PRAGMA journal_mode")) {
            if (!"wal".equals(mode.getString(1))) {
                throw new LedgerOpenException("the file system does not allow a write-ahead log; use a local disk");
            }
        }
    }
}

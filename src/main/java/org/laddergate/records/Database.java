package org.laddergate.records;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.DriverManager;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.List;

/**
 * How the database file is opened, always the same way: WAL so that readers never wait for the writer; synchronous FULL
 * because in WAL mode NORMAL may lose the last commits at a power failure, and an answered verdict is on disk; foreign keys
 * checked; a short busy time-out because a locked database must be answered with "try again", not with silence.
 *
 * <p>Migrations are numbered resources, each applied in a transaction and counted in PRAGMA user_version.
 */
final class Database {
    private static final String FILE = "laddergate.db";
    private static final List<String> MIGRATIONS = List.of("0001_verdicts.sql");
    private static final int BUSY_MILLIS = 1000;

    private Database() {}

    static Path file(Path folder) {
        return folder.resolve(FILE);
    }

    /** The one connection that writes, with all migrations applied. */
    static Connection openWriter(Path folder) throws SQLException {
        try {
            Files.createDirectories(folder);
        } catch (IOException e) {
            throw new UncheckedIOException("cannot create the data folder " + folder, e);
        }
        Connection connection = open(folder);
        try (Statement s = connection.createStatement()) {
            s.execute("PRAGMA journal_mode=WAL");
        }
        migrate(connection, folder);
        return connection;
    }

    /** A connection that only reads. */
    static Connection openReader(Path folder) throws SQLException {
        Connection connection = open(folder);
        try (Statement s = connection.createStatement()) {
            s.execute("PRAGMA query_only=ON");
        }
        return connection;
    }

    private static Connection open(Path folder) throws SQLException {
        Connection connection = DriverManager.getConnection("jdbc:sqlite:" + file(folder));
        try (Statement s = connection.createStatement()) {
            s.execute("PRAGMA busy_timeout=" + BUSY_MILLIS);
            s.execute("PRAGMA synchronous=FULL");
            s.execute("PRAGMA foreign_keys=ON");
        }
        return connection;
    }

    private static void migrate(Connection connection, Path folder) throws SQLException {
        int version = version(connection);
        if (version > MIGRATIONS.size()) {
            throw new IllegalStateException("The database " + file(folder) + " has format " + version
                    + ", this program knows formats up to " + MIGRATIONS.size() + ". Start a newer program.");
        }
        for (int next = version; next < MIGRATIONS.size(); next++) {
            try (Statement s = connection.createStatement()) {
                s.execute("BEGIN IMMEDIATE");
                for (String sql : resource(MIGRATIONS.get(next)).split(";\\s*\\n")) {
                    if (!sql.isBlank()) {
                        s.execute(sql);
                    }
                }
                s.execute("PRAGMA user_version=" + (next + 1));
                s.execute("COMMIT");
            }
        }
    }

    private static int version(Connection connection) throws SQLException {
        try (Statement s = connection.createStatement(); ResultSet r = s.executeQuery("PRAGMA user_version")) {
            return r.getInt(1);
        }
    }

    private static String resource(String name) {
        try (InputStream in = Database.class.getResourceAsStream("/migration/" + name)) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new UncheckedIOException("cannot read migration " + name, e);
        }
    }
}

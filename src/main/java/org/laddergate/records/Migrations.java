package org.laddergate.records;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.List;

/**
 * Brings a ledger file to the schema of this program. Script n runs in one transaction and ends by setting
 * {@code user_version} to n; a released script is never edited.
 */
final class Migrations {
    /** "LDGR", set by the first script. */
    private static final int APPLICATION_ID = 0x4c444752;
    private static final List<String> SCRIPTS = List.of("0001_verdicts.sql");

    private Migrations() {}

    /** The schema this program writes. */
    static int currentVersion() {
        return SCRIPTS.size();
    }

    /** Refuses a file this program must not write to, before anything in it is changed. */
    static void requireOurs(Connection connection) throws SQLException {
        int version = integer(connection, "PRAGMA user_version");
        boolean empty = integer(connection, "SELECT count(*) FROM sqlite_schema") == 0;
        boolean marked = integer(connection, "PRAGMA application_id") == APPLICATION_ID;
        if (!marked && !(empty && version == 0)) {
            throw new LedgerOpenException("the file is a database of another program");
        }
        if (version > currentVersion()) {
            throw new LedgerOpenException("the file has schema version " + version + ", written by a newer version of "
                    + "this program, which knows versions up to " + currentVersion());
        }
    }

    /** Runs the missing scripts. Two processes may do so at once: the version is read under the write lock. */
    static void apply(Connection connection) throws SQLException {
        while (integer(connection, "PRAGMA user_version") < currentVersion()) {
            try (Statement statement = connection.createStatement()) {
                statement.executeUpdate("BEGIN IMMEDIATE");
                try {
                    applyNext(connection, statement);
                    statement.executeUpdate("COMMIT");
                } catch (SQLException | RuntimeException e) {
                    statement.executeUpdate("ROLLBACK");
                    throw e;
                }
            }
        }
    }

    private static void applyNext(Connection connection, Statement statement) throws SQLException {
        int version = integer(connection, "PRAGMA user_version");
        if (version >= currentVersion()) {
            return;
        }
        statement.executeUpdate(script(SCRIPTS.get(version)));
        int reached = integer(connection, "PRAGMA user_version");
        if (reached != version + 1) {
            throw new IllegalStateException(SCRIPTS.get(version) + " sets user_version to " + reached);
        }
    }

    private static String script(String name) {
        try (InputStream in = Migrations.class.getResourceAsStream("/migration/" + name)) {
            if (in == null) {
                throw new IllegalStateException("migration " + name + " is missing from the program");
            }
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new IllegalStateException("migration " + name + " cannot be read", e);
        }
    }

    static int integer(Connection connection, String query) throws SQLException {
        try (Statement statement = connection.createStatement(); ResultSet result = statement.executeQuery(query)) {
            return result.getInt(1);
        }
    }
}

package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.sql.Connection;
import java.sql.ResultSet;
import java.sql.SQLException;
import java.sql.Statement;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.screening.LedgerUnavailableException;
import org.laddergate.screening.StoredVerdict;

@Tag("storage")
class LedgerOpeningTest {
    private static final String SHA = "a".repeat(64);

    @TempDir
    Path folder;

    private static StoredVerdict append(SqliteLedger ledger, String id) {
        return Ledgers.await(ledger.append(RandomVerdicts.measurement(id, "p", "s"), SHA,
                new RandomVerdicts(1).typicalJudgement()));
    }

    @Test
    void missingFolder_isCreatedAndMigrated() throws Exception {
        Path data = folder.resolve("a").resolve("b");
        Ledgers.open(data).close();
        try (Connection connection = Ledgers.foreignConnection(data)) {
            assertEquals(1, Migrations.integer(connection, "PRAGMA user_version"));
            assertEquals(0x4c444752, Migrations.integer(connection, "PRAGMA application_id"));
            assertEquals(0, Migrations.integer(connection, """
                    SELECT count(*) FROM pragma_table_list
                    WHERE schema = 'main' AND type = 'table' AND name NOT LIKE 'sqlite%' AND strict = 0
                    """), "tables that are not STRICT");
        }
        Ledgers.assertGapless(data, 0);
    }

    /** Numbers of the synchronous levels: SQLite documentation, "PRAGMA synchronous": 2 is FULL. */
    @Test
    void writer_runsWithTheSettingsThatThePromiseRestsOn() throws Exception {
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            List<String> settings = writerSettings(ledger);
            assertEquals(List.of("wal", "2", "1", "100"), settings);
            ledger.onWriter(connection -> Ledgers.execute(connection, "PRAGMA query_only = ON")).get();
            assertThrows(RuntimeException.class, () -> append(ledger, "m"));
            append(ledger, "m");
            assertEquals(settings, writerSettings(ledger), "after the connection was replaced");
        }
    }

    private static List<String> writerSettings(SqliteLedger ledger) throws Exception {
        List<String> values = new ArrayList<>();
        ledger.onWriter(connection -> {
            for (String name : List.of("journal_mode", "synchronous", "foreign_keys", "busy_timeout")) {
                values.add(pragma(connection, name));
            }
        }).get();
        return values;
    }

    private static String pragma(Connection connection, String name) throws SQLException {
        try (Statement statement = connection.createStatement();
                ResultSet result = statement.executeQuery("PRAGMA " + name)) {
            return result.getString(1);
        }
    }

    @Test
    void readers_cannotWrite() throws Exception {
        Ledgers.open(folder).close();
        try (Connection reader = LedgerFile.in(folder, 100).openReader()) {
            SQLException refused = assertThrows(SQLException.class,
                    () -> Ledgers.execute(reader, "DELETE FROM verdict"));
            assertTrue(SqlFaults.reason(refused).contains("SQLITE_READONLY"));
        }
    }

    @Test
    void reopening_continuesTheSequence() {
        for (int i = 1; i <= 3; i++) {
            try (SqliteLedger ledger = Ledgers.open(folder)) {
                StoredVerdict stored = append(ledger, "m" + i);
                assertEquals(i, stored.sequence());
                assertEquals(i, stored.attempt());
                assertEquals(i, ledger.findBySerial("p", "s").size());
            }
        }
    }

    @Test
    void closing_leavesOneFile() throws Exception {
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            append(ledger, "m");
            assertTrue(ledger.find("m").isPresent());
        }
        try (var files = Files.list(folder)) {
            assertEquals(List.of(LedgerFile.NAME), files.map(f -> f.getFileName().toString()).toList());
        }
    }

    @Test
    void lookUps_afterClosing_failAsUnavailable() {
        SqliteLedger ledger = Ledgers.open(folder);
        ledger.close();
        assertThrows(LedgerUnavailableException.class, () -> ledger.find("m"));
    }

    @Test
    void fileOfANewerVersion_isRefusedAndNotTouched() throws Exception {
        Ledgers.open(folder).close();
        try (Connection connection = Ledgers.foreignConnection(folder)) {
            Ledgers.execute(connection, "PRAGMA user_version = 99");
        }
        byte[] before = Files.readAllBytes(folder.resolve(LedgerFile.NAME));
        LedgerOpenException refused = assertThrows(LedgerOpenException.class, () -> Ledgers.open(folder));
        assertTrue(refused.getMessage().contains("99") && refused.getMessage().contains("newer version"),
                refused.getMessage());
        assertTrue(Arrays.equals(before, Files.readAllBytes(folder.resolve(LedgerFile.NAME))));
    }

    @Test
    void databaseOfAnotherProgram_isRefused() throws Exception {
        try (Connection connection = Ledgers.foreignConnection(folder)) {
            Ledgers.execute(connection, "CREATE TABLE verdict (x)");
        }
        LedgerOpenException refused = assertThrows(LedgerOpenException.class, () -> Ledgers.open(folder));
        assertTrue(refused.getMessage().contains("another program"), refused.getMessage());
    }

    @Test
    void fileThatIsNoDatabase_isRefused() throws Exception {
        Files.writeString(folder.resolve(LedgerFile.NAME), "no database, but long enough for a header. ".repeat(50));
        LedgerOpenException refused = assertThrows(LedgerOpenException.class, () -> Ledgers.open(folder));
        assertTrue(refused.getMessage().contains("SQLITE_NOTADB"), refused.getMessage());
    }

    @Test
    void reopeningAfterAFault_doesNotCreateAVanishedFileAnew() throws Exception {
        LedgerFile file = LedgerFile.in(folder, 100);
        SQLException refused = assertThrows(SQLException.class, file::openWriter);
        assertTrue(SqlFaults.reason(refused).contains("SQLITE_CANTOPEN"), SqlFaults.reason(refused));
        assertFalse(Files.exists(folder.resolve(LedgerFile.NAME)));
    }

    @Test
    void dataFolderThatIsAFile_isRefused() throws Exception {
        Path file = Files.writeString(folder.resolve("file"), "");
        assertThrows(LedgerOpenException.class, () -> Ledgers.open(file));
    }

    @Test
    void scanOfVerdicts_doesNotReadCurves() throws Exception {
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            append(ledger, "m");
        }
        try (Connection connection = Ledgers.foreignConnection(folder)) {
            assertEquals(0, Migrations.integer(connection, """
                    SELECT count(*) FROM pragma_table_info('verdict') WHERE type = 'BLOB'
                    """));
            assertEquals(1, Migrations.integer(connection, """
                    SELECT count(*) FROM pragma_index_list('verdict')
                    WHERE name = 'verdict_by_measurement_id' AND "unique" = 1
                    """));
        }
    }
}

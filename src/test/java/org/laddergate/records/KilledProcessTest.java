package org.laddergate.records;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.Map;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.screening.StoredVerdict;

/**
 * Kills a writing process without warning (SIGKILL where there is one). Shows that what was answered is found by the
 * next process and that a repeat after the crash is recognised. The instant between answer and commit is too short to
 * be hit by a kill: {@link AppendTest} checks that order. A power failure is what synchronous=FULL is for.
 */
@Tag("storage")
class KilledProcessTest {
    @TempDir
    Path folder;

    @Test
    void everyAcknowledgedVerdict_survivesKills_andNoneIsStoredTwice() throws Exception {
        Map<String, Long> acknowledged = new HashMap<>();
        for (int answersBeforeTheKill : new int[] {1, 100, 700}) {
            runAndKill(answersBeforeTheKill, acknowledged);
            long stored = assertAllStored(acknowledged);
            Ledgers.assertGapless(folder, stored);
        }
        assertTrue(acknowledged.size() > 300, "only " + acknowledged.size() + " acknowledged");
    }

    private void runAndKill(int answers, Map<String, Long> acknowledged) throws Exception {
        Process process = new ProcessBuilder(Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                "-Xmx256m", "-cp", System.getProperty("java.class.path"), AppendingProcess.class.getName(),
                folder.toString()).redirectError(ProcessBuilder.Redirect.DISCARD).start();
        try (BufferedReader output = process.inputReader()) {
            int read = 0;
            for (String line = output.readLine(); line != null; line = output.readLine()) {
                if (line.endsWith(";")) {
                    note(line.substring(0, line.length() - 1).split(" "), acknowledged);
                    read++;
                }
                if (read == answers) {
                    // Not Process.destroyForcibly, which also closes the pipe with the last answers in it.
                    process.toHandle().destroyForcibly();
                }
            }
            assertTrue(read >= answers, "the process ended by itself after " + read + " answers");
        } finally {
            process.destroyForcibly().waitFor();
        }
    }

    private static void note(String[] answer, Map<String, Long> acknowledged) {
        long sequence = Long.parseLong(answer[1]);
        Long earlier = acknowledged.put(answer[0], sequence);
        assertTrue(earlier == null || earlier == sequence, answer[0] + " was " + earlier + ", now " + sequence);
    }

    private long assertAllStored(Map<String, Long> acknowledged) throws Exception {
        try (SqliteLedger ledger = Ledgers.open(folder)) {
            for (Map.Entry<String, Long> answer : acknowledged.entrySet()) {
                StoredVerdict found = ledger.find(answer.getKey()).orElseThrow(
                        () -> new AssertionError(answer.getKey() + " was acknowledged and is lost"));
                assertEquals(answer.getValue(), found.sequence());
            }
        }
        try (var connection = Ledgers.foreignConnection(folder)) {
            return Migrations.integer(connection, "SELECT count(DISTINCT measurement_id) FROM verdict");
        }
    }
}

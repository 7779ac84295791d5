package org.laddergate.limits.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;

/** On copies of the released limits of the invented demo products. */
class LimitFilesTest {
    @TempDir
    private Path folder;

    @BeforeEach
    void copyDemoLimits() throws IOException {
        Path from = Path.of("limits", "hb40");
        Files.createDirectories(folder.resolve("hb40"));
        try (Stream<Path> files = Files.list(from)) {
            for (Path file : files.toList()) {
                Files.copy(file, folder.resolve("hb40").resolve(file.getFileName()));
            }
        }
    }

    private LimitFiles open() {
        return new LimitFiles(folder, Clock.systemUTC());
    }

    @Test
    void saveDraft_releasedSetAgain_sameTextButForTheRevision() {
        LimitFiles files = open();
        LimitSet released = files.released("hb40").orElseThrow();
        LimitSet draft = files.saveDraft(released);
        assertEquals(2, draft.revision());
        assertEquals(LimitState.DRAFT, draft.state());
        String first = DurableFiles.read(folder.resolve("hb40/revision-0001.txt"));
        String second = DurableFiles.read(folder.resolve("hb40/revision-0002.txt"));
        assertEquals(first, second.replaceFirst("revision: 2", "revision: 1"), "every number reads back to the same bits");
    }

    @Test
    void release_newRevision_withdrawsTheOldAndSurvivesReopening() {
        LimitFiles files = open();
        files.saveDraft(files.released("hb40").orElseThrow());
        files.release("hb40", 2, "an engineer", "narrower\nsolder");
        LimitFiles again = open();
        assertEquals(2, again.released("hb40").orElseThrow().revision());
        assertEquals(LimitState.WITHDRAWN, again.find("hb40", 1).orElseThrow().state());
        assertTrue(DurableFiles.read(folder.resolve("hb40/history.txt")).contains("an engineer\tnarrower solder\n"));
        assertThrows(IllegalStateException.class, () -> again.release("hb40", 1, "x", "again"));
    }

    @Test
    void open_releasedFileEditedByHand_isRefusedWithASentence() throws IOException {
        Path file = folder.resolve("hb40/revision-0001.txt");
        Files.writeString(file, Files.readString(file).replaceFirst("golden_units: 60", "golden_units: 61"));
        IllegalStateException refused = assertThrows(IllegalStateException.class, this::open);
        assertTrue(refused.getMessage().contains("revision-0001.txt was changed after its release"), refused.getMessage());
    }

    @Test
    void open_releasedFileGone_isRefused() throws IOException {
        Files.delete(folder.resolve("hb40/revision-0001.txt"));
        assertTrue(assertThrows(IllegalStateException.class, this::open).getMessage().contains("missing"));
    }

    @Test
    void open_brokenDraft_namesFileAndLine() throws IOException {
        Files.writeString(folder.resolve("hb40/revision-0003.txt"), "product: hb40\n[a]\nx\ty\n1\n2\t3\n[a]\n");
        String message = assertThrows(IllegalStateException.class, this::open).getMessage();
        assertTrue(message.contains("revision-0003.txt") && message.contains("line 4"), message);
    }
}

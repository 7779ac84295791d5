package org.laddergate.limits.files;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Clock;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.ConcurrentHashMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.LimitStore;

/**
 * Limit sets as {@code <limits>/<product>/revision-0001.txt}, and their life in the append-only
 * {@code <limits>/<product>/history.txt}: when, what, revision, content hash, who and why, separated by tabs.
 *
 * <p>A released file that no longer has the hash of its release stops the start: a hand-edited limit must not decide.
 */
public final class LimitFiles implements LimitStore {
    private static final Pattern NAME = Pattern.compile("revision-(\\d{4,})\\.txt");
    private static final String HISTORY = "history.txt";

    private final Path root;
    private final Clock clock;
    private final Map<String, TreeMap<Integer, LimitSet>> sets = new ConcurrentHashMap<>();

    /**
     * Reads all limit sets below the folder, which need not exist yet.
     *
     * @throws IllegalStateException if a released file was changed after its release, naming file and hashes
     */
    public LimitFiles(Path root, Clock clock) {
        this.root = root;
        this.clock = clock;
        if (Files.isDirectory(root)) {
            for (Path folder : list(root)) {
                if (Files.isDirectory(folder)) {
                    load(folder);
                }
            }
        }
    }

    private void load(Path folder) {
        TreeMap<Integer, String[]> life = history(folder);
        TreeMap<Integer, LimitSet> own = new TreeMap<>();
        for (Path file : list(folder)) {
            Matcher name = NAME.matcher(file.getFileName().toString());
            if (name.matches()) {
                int revision = Integer.parseInt(name.group(1));
                String text = DurableFiles.read(file);
                String hash = DurableFiles.sha256(text);
                String[] last = life.get(revision);
                if (last != null && !last[3].equals(hash)) {
                    throw new IllegalStateException("Limit file " + file + " was changed after its release: its content "
                            + "hash is " + hash + ", released was " + last[3] + ". Restore the released file, or learn and "
                            + "release a new revision.");
                }
                LimitState state = last == null ? LimitState.DRAFT : LimitState.valueOf(last[1].toUpperCase(Locale.ROOT));
                try {
                    own.put(revision, LimitText.read(text, state, hash));
                } catch (IllegalArgumentException e) {
                    throw new IllegalStateException(file + ": " + e.getMessage(), e);
                }
            }
        }
        for (int revision : life.keySet()) {
            if (!own.containsKey(revision)) {
                throw new IllegalStateException("Limit file of released revision " + revision + " is missing in "
                        + folder);
            }
        }
        sets.put(folder.getFileName().toString(), own);
    }

    /** Last entry of each revision: time, state, revision, hash, who, why. */
    private static TreeMap<Integer, String[]> history(Path folder) {
        TreeMap<Integer, String[]> last = new TreeMap<>();
        Path file = folder.resolve(HISTORY);
        if (Files.isRegularFile(file)) {
            for (String line : DurableFiles.read(file).split("\n")) {
                if (!line.isBlank() && !line.startsWith("#")) {
                    String[] cells = line.split("\t", -1);
                    if (cells.length != 6) {
                        throw new IllegalStateException(file + ": line '" + line + "' does not have six cells");
                    }
                    last.put(Integer.parseInt(cells[2]), cells);
                }
            }
        }
        return last;
    }

    @Override
    public synchronized List<LimitSet> revisions(String product) {
        return new ArrayList<>(sets.getOrDefault(product, new TreeMap<>()).values());
    }

    @Override
    public synchronized Optional<LimitSet> find(String product, int revision) {
        return Optional.ofNullable(sets.getOrDefault(product, new TreeMap<>()).get(revision));
    }

    @Override
    public synchronized Optional<LimitSet> released(String product) {
        return sets.getOrDefault(product, new TreeMap<>()).values().stream()
                .filter(s -> s.state() == LimitState.RELEASED).findFirst();
    }

    @Override
    public synchronized LimitSet saveDraft(LimitSet draft) {
        TreeMap<Integer, LimitSet> own = sets.computeIfAbsent(draft.product(), p -> new TreeMap<>());
        int revision = own.isEmpty() ? 1 : own.lastKey() + 1;
        String text = LimitText.write(draft, revision);
        DurableFiles.write(root.resolve(draft.product()).resolve(fileName(revision)), text);
        LimitSet stored = LimitText.read(text, LimitState.DRAFT, DurableFiles.sha256(text));
        own.put(revision, stored);
        return stored;
    }

    @Override
    public synchronized LimitSet release(String product, int revision, String who, String reason) {
        LimitSet set = find(product, revision).orElseThrow(() -> new LimitNotFoundException("unknown_revision",
                "product " + product + " has no limit revision " + revision));
        if (set.state() != LimitState.DRAFT) {
            throw new IllegalStateException("revision " + revision + " of " + product + " is " + set.state().word()
                    + "; only a draft can be released");
        }
        released(product).ifPresent(old -> move(old, LimitState.WITHDRAWN, who, "replaced by revision " + revision));
        return move(set, LimitState.RELEASED, who, reason);
    }

    private LimitSet move(LimitSet set, LimitState state, String who, String reason) {
        Path history = root.resolve(set.product()).resolve(HISTORY);
        if (!Files.exists(history)) {
            DurableFiles.append(history, "# time\tstate\trevision\tsha256\twho\treason");
        }
        DurableFiles.append(history, String.join("\t", clock.instant().toString(), state.word(),
                Integer.toString(set.revision()), set.sha256(), oneLine(who), oneLine(reason)));
        LimitSet moved = set.in(state);
        sets.get(set.product()).put(set.revision(), moved);
        return moved;
    }

    private static String oneLine(String text) {
        return text.replaceAll("\\s+", " ").strip();
    }

    private static String fileName(int revision) {
        return String.format(Locale.ROOT, "revision-%04d.txt", revision);
    }

    private static List<Path> list(Path folder) {
        try (Stream<Path> files = Files.list(folder)) {
            return files.sorted().toList();
        } catch (IOException e) {
            throw new UncheckedIOException("cannot list " + folder, e);
        }
    }
}

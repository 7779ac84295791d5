package org.laddergate.http;

import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.ArrayList;
import java.util.HexFormat;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * Who may call. Only hashes of tokens are kept; a token has enough entropy that a plain hash cannot be searched.
 * Immutable.
 */
public final class Tokens {
    /** What a token may be used for. */
    public enum Role {
        /** Posts measurements and reads. */
        TESTER,
        /** Everything. */
        ENGINEER,
        /** Reads. */
        MES;

        public String word() {
            return name().toLowerCase(Locale.ROOT);
        }
    }

    /**
     * Somebody with a valid token.
     *
     * @param name  as in the token file
     * @param role  what the token may be used for
     */
    public record Caller(String name, Role role) {}

    private record Entry(Caller caller, byte[] sha256) {}

    private final List<Entry> entries;

    private Tokens(List<Entry> entries) {
        this.entries = List.copyOf(entries);
    }

    /** No tokens in use: everybody who can reach the port may do everything. */
    public static Tokens none() {
        return new Tokens(List.of());
    }

    /**
     * Reads lines of {@code role name sha256-in-hex}; empty lines and lines that start with # do not count.
     *
     * @throws IllegalArgumentException naming every faulty line, or if there is no token
     */
    public static Tokens parse(List<String> lines) {
        List<Entry> entries = new ArrayList<>();
        List<String> faults = new ArrayList<>();
        for (int i = 0; i < lines.size(); i++) {
            String line = lines.get(i).strip();
            if (!line.isEmpty() && !line.startsWith("#")) {
                Optional<Entry> entry = entry(line);
                entry.ifPresent(entries::add);
                if (entry.isEmpty()) {
                    faults.add("line " + (i + 1) + " is not 'tester|engineer|mes name sha256-in-hex'");
                }
            }
        }
        if (faults.isEmpty() && entries.isEmpty()) {
            faults.add("there is no token in it");
        }
        if (!faults.isEmpty()) {
            throw new IllegalArgumentException("token file: " + String.join("; ", faults));
        }
        return new Tokens(entries);
    }

    private static Optional<Entry> entry(String line) {
        String[] words = line.split("\\s+");
        if (words.length != 3 || !words[2].matches("[0-9a-fA-F]{64}")) {
            return Optional.empty();
        }
        return Stream.of(Role.values()).filter(role -> role.word().equals(words[0])).findFirst()
                .map(role -> new Entry(new Caller(words[1], role), HexFormat.of().parseHex(words[2])));
    }

    public boolean inUse() {
        return !entries.isEmpty();
    }

    /** Who has this token. Looks at every entry, so that the time taken tells nothing. */
    public Optional<Caller> caller(String token) {
        byte[] hash = sha256(token);
        Optional<Caller> found = Optional.empty();
        for (Entry entry : entries) {
            if (MessageDigest.isEqual(hash, entry.sha256())) {
                found = Optional.of(entry.caller());
            }
        }
        return found;
    }

    /** The line of the token file for a token. */
    public static String line(Role role, String name, String token) {
        return role.word() + " " + name + " " + HexFormat.of().formatHex(sha256(token));
    }

    private static byte[] sha256(String token) {
        try {
            return MessageDigest.getInstance("SHA-256").digest(token.getBytes(StandardCharsets.UTF_8));
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java platform has SHA-256", e);
        }
    }
}

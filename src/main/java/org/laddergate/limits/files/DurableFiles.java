package org.laddergate.limits.files;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.channels.FileChannel;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.StandardOpenOption;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;

/** Text files that are on disk when the call returns, whole or not at all. */
public final class DurableFiles {
    private DurableFiles() {}

    /** Writes to a neighbour, forces it to disk and renames it over the target. */
    public static void write(Path target, String text) {
        Path part = target.resolveSibling(target.getFileName() + ".part");
        try {
            Files.createDirectories(target.getParent());
            Files.writeString(part, text, StandardCharsets.UTF_8);
            force(part, StandardOpenOption.WRITE);
            Files.move(part, target, StandardCopyOption.ATOMIC_MOVE, StandardCopyOption.REPLACE_EXISTING);
            force(target.getParent(), StandardOpenOption.READ);
        } catch (IOException e) {
            throw new UncheckedIOException("cannot write " + target.getFileName(), e);
        }
    }

    /** Appends a line and forces it to disk. */
    public static void append(Path target, String line) {
        try {
            Files.createDirectories(target.getParent());
            Files.writeString(target, line + "\n", StandardCharsets.UTF_8, StandardOpenOption.CREATE,
                    StandardOpenOption.APPEND);
            force(target, StandardOpenOption.WRITE);
        } catch (IOException e) {
            throw new UncheckedIOException("cannot append to " + target.getFileName(), e);
        }
    }

    public static String read(Path file) {
        try {
            return Files.readString(file, StandardCharsets.UTF_8);
        } catch (IOException e) {
            throw new UncheckedIOException("cannot read " + file.getFileName(), e);
        }
    }

    /** SHA-256 of a text in UTF-8, 64 hex digits. */
    public static String sha256(String text) {
        try {
            return HexFormat.of().formatHex(
                    MessageDigest.getInstance("SHA-256").digest(text.getBytes(StandardCharsets.UTF_8)));
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException("every Java platform has SHA-256", e);
        }
    }

    private static void force(Path path, StandardOpenOption option) throws IOException {
        try (FileChannel channel = FileChannel.open(path, option)) {
            channel.force(true);
        }
    }
}

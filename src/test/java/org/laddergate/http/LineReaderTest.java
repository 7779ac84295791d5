package org.laddergate.http;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class LineReaderTest {
    /** Gives out at most so many bytes at once, as a network does. */
    private static InputStream slow(String text, int atOnce) {
        return new ByteArrayInputStream(text.getBytes(StandardCharsets.UTF_8)) {
            @Override
            public synchronized int read(byte[] target, int offset, int length) {
                return super.read(target, offset, Math.min(length, atOnce));
            }
        };
    }

    private static List<String> lines(String text, int atOnce) throws IOException {
        LineReader reader = new LineReader(slow(text, atOnce), 10);
        List<String> lines = new ArrayList<>();
        do {
            String line = new String(reader.read(), StandardCharsets.UTF_8);
            lines.add(reader.wasTooLong() ? "too long" : line);
        } while (!reader.isAtEnd());
        return lines;
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 3, 7, 1000})
    void linesComeOut_howeverTheyArrive(int atOnce) throws IOException {
        assertEquals(List.of("one", "", "0123456789", "too long", "last"),
                lines("one\n\n0123456789\n0123456789A\nlast", atOnce));
        assertEquals(List.of("one", ""), lines("one\n", atOnce));
        assertEquals(List.of(""), lines("", atOnce));
    }

    @Test
    void waiting_isKnown() throws IOException {
        LineReader reader = new LineReader(slow("a\nb\n", 1000), 10);
        reader.read();
        assertEquals(false, reader.mustWait());
        reader.read();
        assertEquals(true, reader.mustWait());
    }
}

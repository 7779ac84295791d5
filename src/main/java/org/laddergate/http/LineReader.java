package org.laddergate.http;

import java.io.IOException;
import java.io.InputStream;
import java.util.Arrays;

/** Splits a stream into lines of bytes without ever holding more than one line of limited length. For one thread. */
final class LineReader {
    private final InputStream in;
    private final int maximumLength;
    private final byte[] buffer = new byte[1 << 16];
    private int position;
    private int limit;
    private boolean atEnd;
    private boolean tooLong;

    LineReader(InputStream in, int maximumLength) {
        this.in = in;
        this.maximumLength = maximumLength;
    }

    /** The next line without its end; what is beyond the maximum length is read over. */
    byte[] read() throws IOException {
        byte[] line = new byte[0];
        tooLong = false;
        while (true) {
            if (position == limit && !fill()) {
                return line;
            }
            int end = position;
            while (end < limit && buffer[end] != '\n') {
                end++;
            }
            int length = line.length + end - position;
            tooLong |= length > maximumLength;
            if (!tooLong) {
                line = Arrays.copyOf(line, length);
                System.arraycopy(buffer, position, line, length - (end - position), end - position);
            }
            position = Math.min(end + 1, limit);
            if (end < limit) {
                return line;
            }
        }
    }

    private boolean fill() throws IOException {
        position = 0;
        limit = Math.max(0, in.read(buffer));
        atEnd = limit == 0;
        return !atEnd;
    }

    /** Whether the last line read was longer than allowed. */
    boolean wasTooLong() {
        return tooLong;
    }

    /** Whether the stream has ended; the last line read was then its last, possibly empty, one. */
    boolean isAtEnd() {
        return atEnd;
    }

    /** Whether nothing more has arrived so far. */
    boolean mustWait() throws IOException {
        return position == limit && in.available() == 0;
    }
}

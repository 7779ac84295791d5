package org.laddergate.http;

import java.time.OffsetDateTime;
import java.time.format.DateTimeFormatter;

/** Times as RFC 3339 writes them; {@code toString} would leave out zero seconds. */
final class Times {
    private Times() {}

    static String text(OffsetDateTime time) {
        return DateTimeFormatter.ISO_OFFSET_DATE_TIME.format(time);
    }
}

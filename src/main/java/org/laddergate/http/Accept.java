package org.laddergate.http;

import io.javalin.http.Context;
import java.util.Locale;

/** Which of two forms a client would rather have. */
final class Accept {
    private Accept() {}

    /** Whether CSV is named with a higher weight than JSON; no header means JSON. */
    static boolean prefersCsv(Context ctx) {
        String header = ctx.header("Accept");
        if (header == null) {
            return false;
        }
        return weight(header, Bodies.CSV) > weight(header, Bodies.JSON);
    }

    private static double weight(String header, String type) {
        double weight = 0;
        for (String range : header.toLowerCase(Locale.ROOT).split(",")) {
            String[] parts = range.split(";");
            if (parts[0].strip().equals(type)) {
                weight = Math.max(weight, quality(parts));
            }
        }
        return weight;
    }

    private static double quality(String[] parts) {
        for (int i = 1; i < parts.length; i++) {
            String parameter = parts[i].strip();
            if (parameter.matches("q=(0(\\.[0-9]{0,3})?|1(\\.0{0,3})?)")) {
                return Double.parseDouble(parameter.substring(2));
            }
        }
        return 1;
    }
}

package org.laddergate.measurement;

import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The text form of a curve, for files and for {@code text/csv} requests.
 *
 * <pre>
 * # measurementId: eol3-20261201-000123
 * # product: hb40
 * timeSeconds,temperatureCelsius
 * 1.0e-5,84.21
 * ...
 * </pre>
 *
 * <p>Header lines are optional and carry the same names as the JSON fields; unknown names are ignored, so files may
 * hold notes. The second column is {@code temperatureCelsius} or {@code voltageVolts}. Lines end with LF or CR LF;
 * fields may be quoted as in RFC 4180, but not span lines. Numbers have a decimal point. Text is UTF-8, with or without
 * a byte order mark.
 *
 * <p>Cost: one pass, no object per row; numbers of up to 15 digits are read without a conversion to text.
 *
 * @param submission    what the file says
 * @param remarks       unknown header names, which were ignored
 */
public record CurveFile(Submission submission, List<String> remarks) {
    private static final int MAXIMUM_FAULTS = 20;
    private static final int MAXIMUM_REMARKS = 20;
    private static final int MAXIMUM_NOTE_LENGTH = 1000;

    public CurveFile {
        remarks = List.copyOf(remarks);
    }

    /**
     * Reads a whole file.
     *
     * @param text              UTF-8 bytes, not modified
     * @param maximumSamples    rows beyond this many and one are not kept; {@link CurveRules} then refuses the curve
     * @throws InvalidInputException naming every faulty line, up to a limit
     */
    public static CurveFile read(byte[] text, int maximumSamples) {
        return new Reader(text, maximumSamples).read();
    }

    /** Writes header lines and rows, LF line ends; {@link #read} returns an equal submission. */
    public static byte[] write(Submission what) {
        StringBuilder out = new StringBuilder(64 + 40 * what.timesSeconds().length);
        header(what).forEach((name, value) -> {
            if (!value.isEmpty()) {
                out.append("# ").append(name).append(": ").append(value).append('\n');
            }
        });
        out.append(Submission.TIME_FIELD).append(',').append(what.valueField()).append('\n');
        for (int i = 0; i < what.timesSeconds().length; i++) {
            out.append(what.timesSeconds()[i]).append(',').append(what.values()[i]).append('\n');
        }
        return out.toString().getBytes(StandardCharsets.UTF_8);
    }

    private static Map<String, String> header(Submission what) {
        Map<String, String> header = new LinkedHashMap<>();
        header.put("condition", what.condition());
        header.put("faultRegion", what.faultRegion());
        header.put("measurementId", what.measurementId());
        header.put("product", what.product());
        header.put("serial", what.serial());
        header.put("lot", what.lot());
        header.put("station", what.station());
        header.put("measuredAt", what.measuredAt());
        header.put("curve", what.curve());
        what.heatingPowerWatts().ifPresent(watts -> header.put("heatingPowerWatts", Double.toString(watts)));
        what.heatingSeconds().ifPresent(seconds -> header.put("heatingSeconds",
                Double.isInfinite(seconds) ? Submission.STEADY_STATE : Double.toString(seconds)));
        return header;
    }

    /** One pass over the bytes. */
    private static final class Reader {
        private final byte[] text;
        private final int maximumSamples;
        private final Submission.Builder fields = new Submission.Builder();
        private final List<InputFault> faults = new ArrayList<>();
        private final List<String> remarks = new ArrayList<>();
        private final List<String> seen = new ArrayList<>();
        private double[] times = new double[512];
        private double[] values = new double[512];
        private int rows;
        private int line;
        private boolean ended;

        Reader(byte[] text, int maximumSamples) {
            this.text = text;
            this.maximumSamples = maximumSamples;
        }

        CurveFile read() {
            String valueField = "";
            int at = startsWithByteOrderMark() ? 3 : 0;
            while (at < text.length && faults.size() < MAXIMUM_FAULTS) {
                int end = endOfLine(at);
                int next = end + 1;
                if (end > at && text[end - 1] == '\r') {
                    end--;
                }
                line++;
                if (!valueField.isEmpty()) {
                    row(at, end, valueField);
                } else if (end > at && isHeader(at, end)) {
                    header(lineText(at, end));
                } else if (end > at) {
                    valueField = columns(lineText(at, end));
                    fields.firstLine(line + 1);
                }
                at = next;
            }
            if (valueField.isEmpty() && faults.isEmpty()) {
                fault("/" + Submission.TIME_FIELD, "missing", "there is no line 'timeSeconds,temperatureCelsius' or "
                        + "'timeSeconds,voltageVolts' before the samples");
            }
            if (!faults.isEmpty()) {
                throw new InvalidInputException(faults);
            }
            fields.timesSeconds(Arrays.copyOf(times, rows)).values(valueField, Arrays.copyOf(values, rows));
            return new CurveFile(fields.build(), remarks);
        }

        private boolean startsWithByteOrderMark() {
            return text.length >= 3 && text[0] == (byte) 0xEF && text[1] == (byte) 0xBB && text[2] == (byte) 0xBF;
        }

        private int endOfLine(int at) {
            int end = at;
            while (end < text.length && text[end] != '\n') {
                end++;
            }
            return end;
        }

        private boolean isHeader(int at, int end) {
            return text[at] == '#' || text[at] == '"' && end > at + 1 && text[at + 1] == '#';
        }

        private String lineText(int at, int end) {
            return new String(text, at, Math.min(end - at, 2 * MAXIMUM_NOTE_LENGTH), StandardCharsets.UTF_8);
        }

        private void header(String raw) {
            String plain = unquote(stripTrailing(raw, ',')).substring(1);
            int colon = plain.indexOf(':');
            if (colon < 0) {
                return;
            }
            String name = plain.substring(0, colon).strip();
            String value = plain.substring(colon + 1).strip();
            if (name.startsWith("heating")) {
                number(name, value);
            } else if (!fields.text(name, value)) {
                remark(name);
                return;
            }
            if (seen.contains(name)) {
                fault("/" + name, "duplicate", "line " + line + ": " + name + " is given twice");
            }
            seen.add(name);
        }

        private void remark(String name) {
            if (!name.equals("note") && remarks.size() < MAXIMUM_REMARKS) {
                String shown = name.length() <= 40 ? name : name.substring(0, 40) + "...";
                remarks.add("line " + line + ": header '" + shown + "' is unknown and was ignored");
            }
        }

        private void number(String name, String value) {
            byte[] digits = value.getBytes(StandardCharsets.UTF_8);
            boolean steady = value.equals(Submission.STEADY_STATE) && name.equals("heatingSeconds");
            double number = steady ? Double.POSITIVE_INFINITY : DecimalText.parse(digits, 0, digits.length);
            if (!steady && !Double.isFinite(number)) {
                fault("/" + name, "not_a_number", "line " + line + ": " + name + " '" + shown(value)
                        + "' is not a number with a decimal point");
            } else if (!fields.number(name, number)) {
                remark(name);
            }
        }

        private String columns(String raw) {
            String[] names = stripTrailing(raw, ',').split(",", -1);
            if (names.length == 2 && unquote(names[0].strip()).equals(Submission.TIME_FIELD)) {
                String second = unquote(names[1].strip());
                if (second.equals(Submission.TEMPERATURE_FIELD) || second.equals(Submission.VOLTAGE_FIELD)) {
                    return second;
                }
            }
            fault("/" + Submission.TIME_FIELD, "bad_columns", "line " + line + ": '" + shown(raw)
                    + "' must be 'timeSeconds,temperatureCelsius' or 'timeSeconds,voltageVolts'");
            return Submission.TEMPERATURE_FIELD;
        }

        private void row(int at, int end, String valueField) {
            if (at == end) {
                ended = true;
                return;
            }
            if (ended) {
                fault("/" + Submission.TIME_FIELD + "/" + rows, "bad_row",
                        "line " + line + ": a row follows an empty line");
                return;
            }
            if (rows > maximumSamples) {
                return;
            }
            int comma = at;
            while (comma < end && text[comma] != ',') {
                comma++;
            }
            double time = field(at, comma);
            double value = comma < end ? field(comma + 1, end) : Double.NaN;
            if (Double.isNaN(time) || Double.isNaN(value)) {
                badRow(at, end, Double.isNaN(time) ? Submission.TIME_FIELD : valueField);
            }
            keep(time, value);
        }

        private double field(int from, int to) {
            int first = from;
            int last = to;
            while (first < last && text[first] == ' ') {
                first++;
            }
            while (last > first && text[last - 1] == ' ') {
                last--;
            }
            if (last - first >= 2 && text[first] == '"' && text[last - 1] == '"') {
                first++;
                last--;
            }
            return DecimalText.parse(text, first, last);
        }

        private void badRow(int at, int end, String field) {
            fault("/" + field + "/" + rows, "not_a_number", "line " + line + ": '" + shown(lineText(at, end))
                    + "' must be two numbers with decimal points, separated by one comma");
        }

        private void keep(double time, double value) {
            if (rows == times.length) {
                times = Arrays.copyOf(times, 2 * rows);
                values = Arrays.copyOf(values, 2 * rows);
            }
            times[rows] = time;
            values[rows++] = value;
        }

        private void fault(String pointer, String code, String detail) {
            faults.add(new InputFault(pointer, code, detail));
        }

        private static String stripTrailing(String raw, char what) {
            int end = raw.length();
            while (end > 0 && (raw.charAt(end - 1) == what || raw.charAt(end - 1) == ' ')) {
                end--;
            }
            return raw.substring(0, end);
        }

        private static String unquote(String raw) {
            boolean quoted = raw.length() >= 2 && raw.startsWith("\"") && raw.endsWith("\"");
            return quoted ? raw.substring(1, raw.length() - 1).replace("\"\"", "\"") : raw;
        }

        private static String shown(String raw) {
            return raw.length() <= 60 ? raw : raw.substring(0, 60) + "...";
        }
    }
}

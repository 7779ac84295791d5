package org.laddergate.limits.files;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * The plain text form of products and limit sets: sections in brackets, in them {@code key: value} lines and rows of
 * tab-separated cells under a row of column names. Empty lines and lines starting with # are for people.
 *
 * <p>Numbers are written by {@link Double#toString}, which reads back to the same bits.
 */
final class SectionText {

    /** One section while reading: its keys and its table. */
    static final class Section {
        private final String name;
        private final Map<String, String> values = new LinkedHashMap<>();
        private final List<String[]> rows = new ArrayList<>();
        private String[] columns = new String[0];

        Section(String name) {
            this.name = name;
        }

        String text(String key) {
            String value = values.get(key);
            if (value == null) {
                throw new IllegalArgumentException("section [" + name + "] lacks '" + key + "'");
            }
            return value;
        }

        double number(String key) {
            return parse(text(key), key);
        }

        boolean has(String key) {
            return values.containsKey(key);
        }

        int rowCount() {
            return rows.size();
        }

        String cell(int row, String column) {
            for (int i = 0; i < columns.length; i++) {
                if (columns[i].equals(column)) {
                    return rows.get(row)[i];
                }
            }
            throw new IllegalArgumentException("section [" + name + "] lacks column '" + column + "'");
        }

        double number(int row, String column) {
            return parse(cell(row, column), column);
        }

        double[] column(String column) {
            double[] out = new double[rows.size()];
            for (int r = 0; r < out.length; r++) {
                out[r] = number(r, column);
            }
            return out;
        }

        /** Number of columns of the table. */
        int width() {
            return columns.length;
        }

        private double parse(String text, String what) {
            try {
                return Double.parseDouble(text);
            } catch (NumberFormatException e) {
                throw new IllegalArgumentException("section [" + name + "]: '" + text + "' is not a number (" + what + ")",
                        e);
            }
        }
    }

    private SectionText() {}

    static Map<String, Section> read(String text) {
        Map<String, Section> sections = new LinkedHashMap<>();
        Section current = new Section("");
        sections.put("", current);
        int number = 0;
        for (String line : text.split("\n", -1)) {
            number++;
            if (line.isBlank() || line.startsWith("#")) {
                continue;
            }
            if (line.startsWith("[") && line.endsWith("]")) {
                current = new Section(line.substring(1, line.length() - 1));
                if (sections.put(current.name, current) != null) {
                    throw new IllegalArgumentException("line " + number + ": section [" + current.name + "] stands twice");
                }
            } else if (line.indexOf('\t') < 0 && line.contains(": ")) {
                int colon = line.indexOf(": ");
                current.values.put(line.substring(0, colon), line.substring(colon + 2));
            } else {
                addRow(current, line.split("\t", -1), number);
            }
        }
        return sections;
    }

    private static void addRow(Section section, String[] cells, int number) {
        if (section.columns.length == 0) {
            section.columns = cells;
        } else if (cells.length == section.columns.length) {
            section.rows.add(cells);
        } else {
            throw new IllegalArgumentException("line " + number + ": " + cells.length + " cells, section ["
                    + section.name + "] has " + section.columns.length + " columns");
        }
    }

    /** Collects the text. */
    static final class Writer {
        private final StringBuilder out = new StringBuilder();

        Writer comment(String line) {
            out.append("# ").append(line).append('\n');
            return this;
        }

        Writer section(String name) {
            out.append("\n[").append(name).append("]\n");
            return this;
        }

        Writer value(String key, Object value) {
            out.append(key).append(": ").append(clean(String.valueOf(value))).append('\n');
            return this;
        }

        Writer row(Object... cells) {
            for (int i = 0; i < cells.length; i++) {
                out.append(i == 0 ? "" : "\t").append(clean(String.valueOf(cells[i])));
            }
            out.append('\n');
            return this;
        }

        private static String clean(String text) {
            return text.replaceAll("[\\t\\r\\n]+", " ");
        }

        @Override
        public String toString() {
            return out.toString();
        }
    }
}

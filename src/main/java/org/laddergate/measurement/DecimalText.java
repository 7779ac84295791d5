package org.laddergate.measurement;

import java.nio.charset.StandardCharsets;

/**
 * Reads decimal numbers out of bytes.
 *
 * <p>Method: up to 15 significant digits and a power of ten up to 22 are combined by one multiplication or division of
 * exactly representable numbers, which IEEE 754 rounds correctly; everything else goes through
 * {@link Double#parseDouble}.
 * <p>Source: W. D. Clinger, How to read floating point numbers accurately, PLDI 1990, the fast case.
 * <p>Domain: optional sign, digits with an optional decimal point, optional exponent of at most 4 digits.
 * <p>Error: none; the result is the nearest double.
 * <p>Degenerate input: NaN for anything else, the words NaN and Infinity included; a number beyond the range of double
 * is infinite.
 */
final class DecimalText {
    private static final double[] POWERS_OF_TEN = {1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12,
        1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22};
    private static final int MAXIMUM_LENGTH = 400;

    private DecimalText() {}

    /** The number in {@code text[from, to)}; NaN if that is not one decimal number and nothing else. */
    static double parse(byte[] text, int from, int to) {
        int at = from;
        boolean negative = at < to && text[at] == '-';
        if (negative || at < to && text[at] == '+') {
            at++;
        }
        long mantissa = 0;
        int digits = 0;
        int significant = 0;
        int scale = 0;
        boolean point = false;
        for (; at < to; at++) {
            byte c = text[at];
            if (c >= '0' && c <= '9') {
                digits++;
                significant += significant > 0 || c != '0' ? 1 : 0;
                mantissa = significant <= 15 ? 10 * mantissa + (c - '0') : mantissa;
                scale -= point ? 1 : 0;
            } else if (c == '.' && !point) {
                point = true;
            } else {
                break;
            }
        }
        if (digits == 0 || to - from > MAXIMUM_LENGTH) {
            return Double.NaN;
        }
        if (at < to) {
            int exponent = exponent(text, at, to);
            if (exponent == Integer.MIN_VALUE) {
                return Double.NaN;
            }
            scale += exponent;
        }
        if (significant > 15 || scale < -22 || scale > 22) {
            return Double.parseDouble(new String(text, from, to - from, StandardCharsets.US_ASCII));
        }
        double magnitude = scale < 0 ? mantissa / POWERS_OF_TEN[-scale] : mantissa * POWERS_OF_TEN[scale];
        return negative ? -magnitude : magnitude;
    }

    /** The exponent part; {@link Integer#MIN_VALUE} if it is not one. */
    private static int exponent(byte[] text, int from, int to) {
        int at = from;
        if (text[at] != 'e' && text[at] != 'E') {
            return Integer.MIN_VALUE;
        }
        at++;
        boolean negative = at < to && text[at] == '-';
        if (negative || at < to && text[at] == '+') {
            at++;
        }
        if (at == to || to - at > 4) {
            return Integer.MIN_VALUE;
        }
        int exponent = 0;
        for (; at < to; at++) {
            if (text[at] < '0' || text[at] > '9') {
                return Integer.MIN_VALUE;
            }
            exponent = 10 * exponent + (text[at] - '0');
        }
        return negative ? -exponent : exponent;
    }
}

package org.laddergate.screening;

/**
 * Why a verdict is what it is.
 *
 * @param code      stable lower-case code with underscores
 * @param sentence  one sentence for people, with the numbers and units
 * @param value     the number that broke the rule; NaN if the rule has none
 * @param bound     the bound it broke; NaN if the rule has none
 */
public record Reason(String code, String sentence, double value, double bound) {}

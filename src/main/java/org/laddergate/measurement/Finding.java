package org.laddergate.measurement;

/**
 * A measurement broke a rule.
 *
 * @param reason    which rule
 * @param sentence  one sentence with the numbers and units
 * @param value     number that broke it
 * @param bound     bound it broke
 */
public record Finding(InvalidReason reason, String sentence, double value, double bound) {}

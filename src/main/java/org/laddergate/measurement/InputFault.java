package org.laddergate.measurement;

/**
 * One thing wrong with what was sent.
 *
 * @param pointer   JSON Pointer (RFC 6901) to the field, or its name for a query or file header field
 * @param code      stable lower-case code with underscores
 * @param detail    one sentence with the offending value and what is accepted
 */
public record InputFault(String pointer, String code, String detail) {}

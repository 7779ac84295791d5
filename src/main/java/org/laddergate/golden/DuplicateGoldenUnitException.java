package org.laddergate.golden;

/** A golden unit with this measurement id and another content exists. */
public final class DuplicateGoldenUnitException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public DuplicateGoldenUnitException(String measurementId) {
        super("golden unit " + measurementId + " exists with another content");
    }
}

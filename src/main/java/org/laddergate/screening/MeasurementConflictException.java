package org.laddergate.screening;

/** The measurement id is already stored with another content. */
public final class MeasurementConflictException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public MeasurementConflictException(String measurementId) {
        super("measurement " + measurementId + " is already stored with another content");
    }
}

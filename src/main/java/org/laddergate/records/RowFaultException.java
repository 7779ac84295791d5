package org.laddergate.records;

/** One request of a batch cannot be stored whatever the state of the disk; the others can. */
final class RowFaultException extends Exception {
    private static final long serialVersionUID = 1L;
    private final int index;

    RowFaultException(int index, Throwable cause) {
        super(cause);
        this.index = index;
    }

    /** Position of the request in its batch. */
    int index() {
        return index;
    }
}

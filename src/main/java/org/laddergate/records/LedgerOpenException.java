package org.laddergate.records;

/** The ledger file is from a newer version, not a ledger, or not accessible; the service must not start. */
public final class LedgerOpenException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    LedgerOpenException(String message) {
        super(message);
    }

    LedgerOpenException(String message, Throwable cause) {
        super(message, cause);
    }
}

package org.laddergate.screening;

/** The ledger cannot store at the moment; the tester should try again. */
public final class LedgerUnavailableException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public LedgerUnavailableException(String message, Throwable cause) {
        super(message, cause);
    }
}

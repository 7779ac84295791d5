package org.laddergate.limits;

/** There is no such product or limit set. The message says which. */
public final class LimitNotFoundException extends RuntimeException {
    private static final long serialVersionUID = 1L;
    private final String code;

    /** @param code stable code: "unknown_product", "unknown_revision" or "no_released_limits" */
    public LimitNotFoundException(String code, String message) {
        super(message);
        this.code = code;
    }

    public String code() {
        return code;
    }
}

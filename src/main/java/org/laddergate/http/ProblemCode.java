package org.laddergate.http;

import java.util.Arrays;
import java.util.Locale;
import java.util.Optional;

/**
 * Every kind of problem the service answers with, RFC 9457. The word is part of the contract: it is the last part of
 * the {@code type} and the address of the explanation under {@code /problems/}.
 */
enum ProblemCode {
    MALFORMED_REQUEST(400, "The request itself is broken",
            "The address, a header or the transfer of the request is not valid HTTP. Repair the client."),
    MALFORMED_JSON(400, "The body is not valid JSON",
            "The detail names line and column. Field names must not be given twice, and nesting is limited. Repair the "
                    + "client; the same body will never be accepted."),
    MALFORMED_BODY(400, "The body cannot be decoded",
            "The body is not what its Content-Encoding says, usually because it was cut off. Send it again; if it "
                    + "happens again, look at the connection."),
    NOT_AUTHENTICATED(401, "A valid token is needed",
            "Send 'Authorization: Bearer <token>' with a token of the service's token file."),
    NOT_ALLOWED(403, "The token's role may not do this",
            "Testers post measurements, engineers define products and limits, the MES reads. Use another token."),
    UNKNOWN_ROUTE(404, "There is nothing at this address", "Compare the address with /openapi.json."),
    UNKNOWN_PRODUCT(404, "The product is not defined",
            "Define the product first (PUT /v1/products/{product}), or correct the product name."),
    UNKNOWN_REVISION(404, "The product has no such limit revision",
            "List the revisions with GET /v1/products/{product}/limits."),
    UNKNOWN_MEASUREMENT(404, "No measurement with this id is stored",
            "Nothing was ever stored under this measurement id. Measurements that were refused store nothing."),
    REQUEST_TIMEOUT(408, "The body did not arrive in time", "Send the request again."),
    METHOD_NOT_ALLOWED(405, "The address does not take this method", "The Allow header lists the methods it takes."),
    NO_RELEASED_LIMITS(409, "The product has no released limits",
            "Nothing can be judged before a limit set of the product is released. The curve was not stored; send it "
                    + "again after the release."),
    MEASUREMENT_CONFLICT(409, "The measurement id is taken by another content",
            "A measurement with this id and another content is stored. Ids must be unique for ever: give the new "
                    + "measurement its own."),
    GOLDEN_UNIT_CONFLICT(409, "The measurement id is taken by another golden unit",
            "A golden unit with this measurement id and another content exists. Give the new one its own id."),
    NOT_A_DRAFT(409, "Only a draft can be released",
            "The revision is released or withdrawn already. Learn a new draft."),
    BODY_TOO_LARGE(413, "The body is too large",
            "The limit counts decompressed bytes. Thin the curve (about 50 samples a decade carry everything), or "
                    + "raise the limit in the configuration."),
    URI_TOO_LONG(414, "The address is too long", "Shorten it."),
    UNSUPPORTED_CONTENT_TYPE(415, "The content type is not accepted here",
            "Curves come as application/json or text/csv, batches as application/x-ndjson, the rest as "
                    + "application/json."),
    UNSUPPORTED_CONTENT_ENCODING(415, "The content encoding is not accepted", "Send plain bodies or gzip."),
    INVALID_INPUT(422, "The content is impossible",
            "The body could be read, but what it says cannot be. Every fault is listed in 'errors' with the field it "
                    + "concerns. Nothing was stored."),
    HEADERS_TOO_LARGE(431, "The headers are too large", "Send fewer or shorter headers."),
    INTERNAL_FAULT(500, "The service made a mistake",
            "The fault is ours and was logged under the request id in 'instance'. Nothing is known about the part: "
                    + "neither pass nor fail."),
    OVERLOADED(503, "The service is busy", "Send the request again after the seconds in Retry-After."),
    STORAGE_UNAVAILABLE(503, "The verdict cannot be stored at the moment",
            "No verdict is given that is not stored. Hold the part and send the same request again after the seconds "
                    + "in Retry-After; the measurement id makes that safe.");

    private final int status;
    private final String title;
    private final String advice;

    ProblemCode(int status, String title, String advice) {
        this.status = status;
        this.title = title;
        this.advice = advice;
    }

    /** Lower-case word used on the wire. */
    String word() {
        return name().toLowerCase(Locale.ROOT);
    }

    int status() {
        return status;
    }

    String title() {
        return title;
    }

    /** What it means and what to do, for people. */
    String advice() {
        return advice;
    }

    String type() {
        return "/problems/" + word();
    }

    static Optional<ProblemCode> find(String word) {
        return Arrays.stream(values()).filter(code -> code.word().equals(word)).findFirst();
    }

    /** The code for a status that the HTTP server decided on by itself. */
    static ProblemCode ofServerStatus(int status) {
        return switch (status) {
            case 404 -> UNKNOWN_ROUTE;
            case 405 -> METHOD_NOT_ALLOWED;
            case 408 -> REQUEST_TIMEOUT;
            case 413 -> BODY_TOO_LARGE;
            case 414 -> URI_TOO_LONG;
            case 415 -> UNSUPPORTED_CONTENT_TYPE;
            case 431 -> HEADERS_TOO_LARGE;
            case 503 -> OVERLOADED;
            default -> status >= 400 && status < 500 ? MALFORMED_REQUEST : INTERNAL_FAULT;
        };
    }
}

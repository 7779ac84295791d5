package org.laddergate.http;

import io.javalin.http.Context;
import java.util.List;
import java.util.Map;
import java.util.Optional;

/**
 * Refuses callers whose token does not allow the route.
 *
 * @param tokens    who may call
 */
record AccessCheck(Tokens tokens) {
    private static final String CALLER = "laddergate.caller";
    private static final String SCHEME = "bearer ";

    void check(Context ctx) {
        Access access = (Access) ctx.routeRoles().stream().findFirst().orElse(Access.ENGINEER);
        if (!tokens.inUse() || access == Access.OPEN) {
            return;
        }
        Tokens.Caller caller = presented(ctx).flatMap(tokens::caller).orElseThrow(() -> refusal(
                ProblemCode.NOT_AUTHENTICATED, "a valid bearer token is needed", "Bearer realm=\"laddergate\""));
        if (!access.isOpenTo(caller.role())) {
            throw refusal(ProblemCode.NOT_ALLOWED, "a token with the role " + caller.role().word()
                    + " may not do this", "Bearer realm=\"laddergate\", error=\"insufficient_scope\"");
        }
        ctx.attribute(CALLER, caller.name());
    }

    /** Name of the caller's token; empty where no tokens are in use. */
    static String callerName(Context ctx) {
        String name = ctx.attribute(CALLER);
        return name == null ? "" : name;
    }

    private static Optional<String> presented(Context ctx) {
        String header = ctx.header("Authorization");
        boolean bearer = header != null && header.regionMatches(true, 0, SCHEME, 0, SCHEME.length());
        return bearer ? Optional.of(header.substring(SCHEME.length()).strip()) : Optional.empty();
    }

    private static ProblemException refusal(ProblemCode code, String detail, String challenge) {
        return new Problem(code, detail, List.of(), Map.of("WWW-Authenticate", challenge)).asException();
    }
}

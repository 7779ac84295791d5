package org.laddergate.http;

import io.javalin.security.RouteRole;

/** What a route needs of the caller where tokens are in use. */
enum Access implements RouteRole {
    /** Nothing: health, documents. */
    OPEN,
    /** Any valid token. */
    READ,
    /** A tester's or an engineer's token. */
    TEST,
    /** An engineer's token. */
    ENGINEER;

    boolean isOpenTo(Tokens.Role role) {
        return switch (this) {
            case OPEN, READ -> true;
            case TEST -> role == Tokens.Role.TESTER || role == Tokens.Role.ENGINEER;
            case ENGINEER -> role == Tokens.Role.ENGINEER;
        };
    }
}

package org.laddergate.http;

import io.javalin.http.Handler;
import io.javalin.http.HandlerType;

/**
 * One line of the routing table.
 *
 * @param method    HTTP method
 * @param path      path with {parameters}
 * @param access    what the caller needs
 * @param handler   what is done
 */
record Route(HandlerType method, String path, Access access, Handler handler) {
    static Route get(String path, Access access, Handler handler) {
        return new Route(HandlerType.GET, path, access, handler);
    }

    static Route post(String path, Access access, Handler handler) {
        return new Route(HandlerType.POST, path, access, handler);
    }

    static Route put(String path, Access access, Handler handler) {
        return new Route(HandlerType.PUT, path, access, handler);
    }

    boolean matches(String address) {
        return address.matches(path.replaceAll("\\{[^}]+}", "[^/]+") + "/?");
    }
}

package org.laddergate.http;

import static org.laddergate.http.Access.ENGINEER;
import static org.laddergate.http.Access.OPEN;
import static org.laddergate.http.Access.READ;
import static org.laddergate.http.Access.TEST;
import static org.laddergate.http.Route.get;
import static org.laddergate.http.Route.post;
import static org.laddergate.http.Route.put;

import java.util.List;

/** Every address of the service, and who may call it. */
final class Routes {
    private Routes() {}

    static List<Route> table(ProductHandlers products, GoldenUnitHandlers goldenUnits, LimitHandlers limits,
            TransientHandlers transients, BatchHandler batch, ServiceHandlers service) {
        return List.of(
                get("/v1/products", READ, products::list),
                get("/v1/products/{product}", READ, products::get),
                put("/v1/products/{product}", ENGINEER, products::put),

                get("/v1/products/{product}/golden-units", READ, goldenUnits::list),
                post("/v1/products/{product}/golden-units", ENGINEER, goldenUnits::post),

                get("/v1/products/{product}/limits", READ, limits::list),
                post("/v1/products/{product}/limits", ENGINEER, limits::learn),
                get("/v1/products/{product}/limits/{revision}", READ, limits::get),
                post("/v1/products/{product}/limits/{revision}/release", ENGINEER, limits::release),

                post("/v1/transients", TEST, transients::post),
                post("/v1/transients/batch", TEST, batch::post),
                get("/v1/transients/{measurementId}", READ, transients::get),
                get("/v1/transients/{measurementId}/curve", READ, transients::curve),
                get("/v1/transients/{measurementId}/structure-function", READ, transients::structureFunction),

                get("/livez", OPEN, service::livez),
                get("/readyz", OPEN, service::readyz),
                get("/metrics", READ, service::metrics),
                get("/openapi.json", OPEN, service::openApi),
                get("/problems/{code}", OPEN, service::problem));
    }
}

package org.laddergate.http;

import io.javalin.http.Context;
import java.util.Optional;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;

/**
 * Product definitions.
 *
 * @param bodies    size limits
 * @param products  where they are kept
 */
record ProductHandlers(Bodies bodies, ProductStore products) {

    void put(Context ctx) {
        bodies.requireType(ctx, Bodies.JSON);
        Product product = ProductJson.read(ctx.pathParam("product"), Json.tree(bodies.read(ctx)));
        boolean isNew = products.find(product.name()).isEmpty();
        products.save(product);
        if (isNew) {
            ctx.status(201).header("Location", "/v1/products/" + product.name());
        }
        TransientHandlers.json(ctx, ProductJson.bytes(product));
    }

    void get(Context ctx) {
        TransientHandlers.json(ctx, ProductJson.bytes(find(ctx, products)));
    }

    void list(Context ctx) {
        TransientHandlers.json(ctx, Json.bytes(g -> {
            g.writeStartObject();
            Json.texts(g, "products", products.names());
            g.writeEndObject();
        }));
    }

    /** The product of the address. */
    static Product find(Context ctx, ProductStore products) {
        String name = ctx.pathParam("product");
        Optional<Product> product = products.find(name);
        return product.orElseThrow(() -> Intake.unknown(name).asException());
    }
}

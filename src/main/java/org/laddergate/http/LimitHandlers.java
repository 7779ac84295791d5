package org.laddergate.http;

import io.javalin.http.Context;
import java.util.Optional;
import org.laddergate.golden.GoldenStore;
import org.laddergate.golden.LimitLearning;
import org.laddergate.limits.DecisionSettings;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitStore;
import org.laddergate.limits.Product;
import org.laddergate.limits.ProductStore;
import org.laddergate.measurement.InputFault;

/**
 * Learning, reading and releasing limits.
 *
 * @param bodies    size limits
 * @param products  definitions
 * @param units     what is learnt from
 * @param learning  how
 * @param limits    where limit sets are kept
 */
record LimitHandlers(Bodies bodies, ProductStore products, GoldenStore units, LimitLearning learning,
        LimitStore limits) {
    /** Who releases where nobody has a name. */
    private static final String NAMELESS = "unnamed";

    void learn(Context ctx) {
        Product product = ProductHandlers.find(ctx, products);
        byte[] body = bodies.readOptionalJson(ctx);
        DecisionSettings settings = LimitJson.readSettings(Json.tree(body), product.settings());
        Product asAsked = new Product(product.name(), product.recipe(), product.layers(), product.regions(), settings);
        LimitSet draft = limits.saveDraft(learning.learn(asAsked, units.units(product.name())));
        ctx.status(201).header("Location", "/v1/products/" + product.name() + "/limits/" + draft.revision());
        TransientHandlers.json(ctx, LimitJson.bytes(draft));
    }

    void list(Context ctx) {
        Product product = ProductHandlers.find(ctx, products);
        TransientHandlers.json(ctx, LimitJson.list(limits.revisions(product.name())));
    }

    void get(Context ctx) {
        TransientHandlers.json(ctx, LimitJson.bytes(find(ctx)));
    }

    void release(Context ctx) {
        LimitSet draft = find(ctx);
        bodies.requireType(ctx, Bodies.JSON);
        LimitJson.Release release = LimitJson.readRelease(Json.tree(bodies.read(ctx)));
        try {
            LimitSet released = limits.release(draft.product(), draft.revision(),
                    who(AccessCheck.callerName(ctx), release.releasedBy()), release.reason());
            TransientHandlers.json(ctx, LimitJson.bytes(released));
        } catch (IllegalStateException e) {
            throw Problem.of(ProblemCode.NOT_A_DRAFT,
                    new InputFault("/revision", "not_a_draft", e.getMessage())).asException();
        }
    }

    /** The token's name cannot be talked away, only added to. */
    private static String who(String caller, String said) {
        if (caller.isEmpty()) {
            return said.isEmpty() ? NAMELESS : said;
        }
        return said.isEmpty() || said.equals(caller) ? caller : said + " (token " + caller + ")";
    }

    private LimitSet find(Context ctx) {
        Product product = ProductHandlers.find(ctx, products);
        String revision = ctx.pathParam("revision");
        return (revision.matches("[1-9][0-9]{0,8}") ? limits.find(product.name(), Integer.parseInt(revision))
                : Optional.<LimitSet>empty()).orElseThrow(() -> Problem.of(ProblemCode.UNKNOWN_REVISION,
                        new InputFault("/revision", "unknown_revision", "product " + product.name()
                                + " has no limit revision '" + (revision.length() <= 20 ? revision
                                        : revision.substring(0, 20) + "...") + "'")).asException());
    }
}

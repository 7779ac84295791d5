package org.laddergate.limits;

import java.time.Instant;
import java.util.List;
import org.laddergate.measurement.Recipe;

/**
 * Everything a verdict on a product needs, learnt from golden units; immutable. Equal hash, equal verdicts.
 *
 * @param product       product name
 * @param revision      revision number, from 1; 0 before it is stored
 * @param state         draft, released or withdrawn
 * @param sha256        hash of the content (everything but state), 64 hex digits; empty before it is stored
 * @param learntAt      when it was learnt
 * @param recipe        recipe it was learnt with
 * @param settings      decision settings it was learnt with
 * @param goldenUnits   number of golden units it was learnt from
 * @param regionLimits  one per region, in the order of the heat path
 * @param model         the golden family as numbers
 * @param remarks       warnings and notes of the learning, for people
 */
public record LimitSet(String product, int revision, LimitState state, String sha256, Instant learntAt, Recipe recipe,
        DecisionSettings settings, int goldenUnits, List<RegionLimit> regionLimits, GoldenModel model,
        List<String> remarks) {

    public LimitSet {
        regionLimits = List.copyOf(regionLimits);
        remarks = List.copyOf(remarks);
    }

    /** The same limit set in another state of its life. */
    public LimitSet in(LimitState other) {
        return new LimitSet(product, revision, other, sha256, learntAt, recipe, settings, goldenUnits, regionLimits,
                model, remarks);
    }
}

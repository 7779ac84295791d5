package org.laddergate.limits;

import java.util.List;
import java.util.Optional;

/** Limit sets of all products, by revision. Safe for use from many threads. */
public interface LimitStore {

    /** Numbers and states of all revisions, ascending. */
    List<LimitSet> revisions(String product);

    Optional<LimitSet> find(String product, int revision);

    /** The one released revision, if there is one. */
    Optional<LimitSet> released(String product);

    /** Stores a draft under the next free revision number and returns it with its number and hash. */
    LimitSet saveDraft(LimitSet draft);

    /**
     * Releases a draft; an earlier released revision of the product is withdrawn.
     *
     * @param who       who releases it
     * @param reason    why, not blank
     * @throws LimitNotFoundException if there is no such revision
     * @throws IllegalStateException  if it is not a draft
     */
    LimitSet release(String product, int revision, String who, String reason);
}

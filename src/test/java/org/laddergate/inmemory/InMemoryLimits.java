package org.laddergate.inmemory;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.laddergate.limits.LimitNotFoundException;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.LimitState;
import org.laddergate.limits.LimitStore;

public final class InMemoryLimits implements LimitStore {
    private final List<LimitSet> all = new ArrayList<>();
    private final List<String> releases = new ArrayList<>();

    /** Who released what and why, in order. */
    public synchronized List<String> releases() {
        return List.copyOf(releases);
    }

    @Override
    public synchronized List<LimitSet> revisions(String product) {
        return all.stream().filter(limits -> limits.product().equals(product)).toList();
    }

    @Override
    public synchronized Optional<LimitSet> find(String product, int revision) {
        return revisions(product).stream().filter(limits -> limits.revision() == revision).findFirst();
    }

    @Override
    public synchronized Optional<LimitSet> released(String product) {
        return revisions(product).stream().filter(l -> l.state() == LimitState.RELEASED).findFirst();
    }

    @Override
    public synchronized LimitSet saveDraft(LimitSet draft) {
        int revision = revisions(draft.product()).size() + 1;
        LimitSet saved = copy(draft, revision, LimitState.DRAFT, String.format("%064x", revision));
        all.add(saved);
        return saved;
    }

    @Override
    public synchronized LimitSet release(String product, int revision, String who, String reason) {
        LimitSet draft = find(product, revision).orElseThrow(
                () -> new LimitNotFoundException("unknown_revision", "no revision " + revision));
        if (draft.state() != LimitState.DRAFT) {
            throw new IllegalStateException("revision " + revision + " is " + draft.state().word());
        }
        all.replaceAll(limits -> limits.product().equals(product) && limits.state() == LimitState.RELEASED
                ? copy(limits, limits.revision(), LimitState.WITHDRAWN, limits.sha256()) : limits);
        LimitSet released = copy(draft, revision, LimitState.RELEASED, draft.sha256());
        all.set(all.indexOf(draft), released);
        releases.add(product + " " + revision + " by " + who + ": " + reason);
        return released;
    }

    private static LimitSet copy(LimitSet from, int revision, LimitState state, String sha256) {
        return new LimitSet(from.product(), revision, state, sha256, from.learntAt(), from.recipe(), from.settings(),
                from.goldenUnits(), from.regionLimits(), from.model(), from.remarks());
    }
}

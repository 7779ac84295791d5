package org.laddergate.screening;

import java.util.concurrent.CompletionStage;
import org.laddergate.measurement.Measurement;

/** Judges a measurement against the released limits of its product and stores the verdict. */
public interface ScreeningDesk {

    /**
     * @param measurement   what was measured; its curve kind equals that of the recipe
     * @param contentSha256 hash of what the tester sent, 64 hex digits
     * @return the stored verdict, complete once it is on disk; fails as {@link VerdictLedger#append} says
     * @throws org.laddergate.limits.LimitNotFoundException if the product is unknown or has no released limits
     * @throws org.laddergate.measurement.InvalidInputException if the measurement contradicts the recipe (curve kind)
     */
    CompletionStage<StoredVerdict> screen(Measurement measurement, String contentSha256);
}

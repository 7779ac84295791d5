package org.laddergate.golden;

import java.util.List;
import org.laddergate.limits.LimitSet;
import org.laddergate.limits.Product;

/** Learns a limit set from golden units. */
public interface LimitLearning {

    /**
     * @param product   definition
     * @param units     golden and known-bad units; only the golden ones are learnt from
     * @return an unsaved draft, revision 0
     * @throws org.laddergate.measurement.InvalidInputException if the units cannot carry limits (too few, other product,
     *         other recipe), naming the unit and the reason
     */
    LimitSet learn(Product product, List<GoldenUnit> units);
}

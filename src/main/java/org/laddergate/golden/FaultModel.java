package org.laddergate.golden;

import java.util.List;
import org.laddergate.limits.FaultSignature;
import org.laddergate.limits.Product;
import org.laddergate.limits.Region;
import org.laddergate.limits.SpreadDirection;

/**
 * What is known of a product's heat path: its regions, their golden resistances, and what faults in them would do.
 *
 * @param regions               in the order of the heat path
 * @param goldenResistances     golden resistance of each region [K/W]
 * @param signatures            fault signatures of all regions
 * @param spread                how healthy parts may differ, sigmas still to be learnt
 * @param networkResistances    golden Foster network [K/W]
 * @param networkTimeConstants  golden Foster network [s]
 * @param fromLayers            whether a conduction model stands behind it
 * @param remarks               notes for people
 */
record FaultModel(List<Region> regions, double[] goldenResistances, List<FaultSignature> signatures,
        List<SpreadDirection> spread, double[] networkResistances, double[] networkTimeConstants, boolean fromLayers,
        List<String> remarks) {

    static FaultModel of(Product product, GoldenCurves curves) {
        return product.layers().isEmpty() ? LadderFaultModel.of(product, curves) : LayerFaultModel.of(product, curves);
    }

    double goldenResistance(int region) {
        return goldenResistances[region];
    }
}

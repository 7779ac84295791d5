package org.laddergate.limits;

import java.util.List;

/**
 * The golden family as numbers: what a healthy curve looks like, how healthy curves differ, and what faults would do.
 * Arrays are owned by this object and must not be modified.
 *
 * <p>Two time axes are used. The <em>fine</em> bins carry the curve itself; the <em>comparison</em> bins, about six a
 * decade, carry deviations from golden. See {@code measurement.ComparisonBins}.
 *
 * @param firstEdgeSeconds          start of the first fine bin: the cut time [s]
 * @param lastEdgeSeconds           end of the last fine bin [s]
 * @param binsPerDecade             fine bins per decade
 * @param goldenKelvin              golden mean temperature in each fine bin at the recipe's power, minus its last value;
 *                                  heating curves are mirrored into cooling curves first [K]
 * @param noiseKelvin               noise of one curve in each fine bin, one sigma [K]
 * @param comparisonNoiseKelvin     noise of one curve in each comparison bin, one sigma [K]
 * @param familyFactors             leading factors of the golden covariance, each in comparison bins, scaled by its
 *                                  standard deviation [K]
 * @param familyBend                relative bending of the factors that predicts golden units best [1]
 * @param inFamilyLimit             limit of T-squared for the stated false-reject risk, from leaving each golden unit
 *                                  out in turn [1]
 * @param shapeLimit                limit of the logarithm of the fault-to-family ratio for the stated risk [1]
 * @param networkResistances        golden Foster network [K/W]
 * @param networkTimeConstants      golden Foster network [s]
 * @param signatures                fault signatures in comparison bins
 * @param spread                    how healthy parts differ, direction by direction
 * @param fromLayers                whether signatures come from a conduction model of the layer table (true) or from the
 *                                  golden ladder alone (false)
 * @param spectrum                  golden amplitudes on the spectrum's time constants [K/W]
 * @param envelope                  golden band of the structure function
 */
public record GoldenModel(double firstEdgeSeconds, double lastEdgeSeconds, int binsPerDecade, double[] goldenKelvin,
        double[] noiseKelvin, double[] comparisonNoiseKelvin, double[][] familyFactors, double familyBend,
        double inFamilyLimit, double shapeLimit,
        double[] networkResistances, double[] networkTimeConstants, List<FaultSignature> signatures,
        List<SpreadDirection> spread, boolean fromLayers, double[] spectrum, Envelope envelope) {

    public GoldenModel {
        signatures = List.copyOf(signatures);
        spread = List.copyOf(spread);
    }

    /** The same model with another limit of the shape test. */
    public GoldenModel withShapeLimit(double limit) {
        return new GoldenModel(firstEdgeSeconds, lastEdgeSeconds, binsPerDecade, goldenKelvin, noiseKelvin,
                comparisonNoiseKelvin, familyFactors, familyBend, inFamilyLimit, limit, networkResistances,
                networkTimeConstants, signatures, spread, fromLayers, spectrum, envelope);
    }

    /** The same model with a golden spectrum and the band of the structure function. */
    public GoldenModel withStructure(double[] goldenSpectrum, Envelope band) {
        return new GoldenModel(firstEdgeSeconds, lastEdgeSeconds, binsPerDecade, goldenKelvin, noiseKelvin,
                comparisonNoiseKelvin, familyFactors, familyBend, inFamilyLimit, shapeLimit, networkResistances,
                networkTimeConstants, signatures, spread, fromLayers, goldenSpectrum, band);
    }
}

package org.laddergate.demo;

/**
 * A ring of one layer that is filled with still air through the whole thickness; a disc when the inner radius is 0.
 *
 * @param layer             index of the layer from the heated face; {@link #LINES_ONLY} changes nothing but the grid
 * @param innerRadiusMetres [m], not negative
 * @param outerRadiusMetres [m], larger than the inner one
 */
record AirRing(int layer, double innerRadiusMetres, double outerRadiusMetres) {
    /** Layer of a ring that only draws its lines, so that a part with and without a void is solved on one grid. */
    static final int LINES_ONLY = -1;

    AirRing {
        if (!(layer >= LINES_ONLY && innerRadiusMetres >= 0 && outerRadiusMetres > innerRadiusMetres)) {
            throw new IllegalArgumentException("a ring in layer " + layer + " from " + innerRadiusMetres + " to "
                    + outerRadiusMetres + " m is impossible");
        }
    }

    /** Disc in the middle that takes a share of the area of a layer. */
    static AirRing centre(int layer, double layerAreaSquareMetres, double share) {
        return new AirRing(layer, 0, Math.sqrt(share * layerAreaSquareMetres / Math.PI));
    }

    /** Rim that takes a share of the area of a layer. */
    static AirRing rim(int layer, double layerAreaSquareMetres, double share) {
        return new AirRing(layer, Math.sqrt((1 - share) * layerAreaSquareMetres / Math.PI),
                Math.sqrt(layerAreaSquareMetres / Math.PI));
    }

    AirRing linesOnly() {
        return new AirRing(LINES_ONLY, innerRadiusMetres, outerRadiusMetres);
    }

    boolean covers(double radiusMetres) {
        return radiusMetres > innerRadiusMetres && radiusMetres < outerRadiusMetres;
    }
}

package fieldwright.field.closed;

/** Solid angle of a disc, never negative, with the sum of the sizes of the terms that made it. */
final class SolidAngle {
    final double value;
    final double terms;
    /** P and Q below. */
    final double first;
    final double second;

    private SolidAngle(double value, double terms, double first, double second) {
        this.value = value;
        this.terms = terms;
        this.first = first;
        this.second = second;
    }

    /**
     * Below the disc 2 pi - P - Q, beside it Q - P, with P = c ∫ cos²/((cos² + p sin²)Δ), Q = c sqrt(p) ∫ sin²/(…),
     * c = 4 |z| a/((a + rho) r1), sqrt(p) = |a - rho|/(a + rho). Exactly above the rim Q = pi.
     */
    static SolidAngle ofDisc(Rim rim) {
        double h = Math.abs(rim.z);
        double width = rim.a + rim.rho;
        double root = Math.abs(rim.a - rim.rho) / width;
        double c = 4 * h * rim.a / (width * rim.far);
        double p = root * root;
        double first;
        double second;
        if (root > 0) {
            first = c * CompleteIntegral.cel(rim.kc, p, 1, 0);
            second = c * root * CompleteIntegral.cel(rim.kc, p, 0, 1);
        } else {
            first = c * CompleteIntegral.cel(rim.kc, 1, 1, 1);
            second = Math.PI;
        }
        boolean below = rim.rho < rim.a;
        double value = below ? 2 * Math.PI - first - second : second - first;
        return new SolidAngle(Math.max(0, value), (below ? 2 * Math.PI : 0) + first + second, first, second);
    }
}

package fieldwright.field.closed;

/**
 * Integrals along a straight edge seen from a place: s runs along the edge from the foot of the place, d is the distance
 * of the place from the edge's line, R = sqrt(s² + d²). All are formed without cancellation.
 */
final class Edge {
    final double s1;
    final double s2;
    final double d2;
    final double r1;
    final double r2;
    /** ∫ ds/R; 0 stands in for infinity on the edge itself, where {@link #touched} is set. */
    final double log;
    /** ∫ ds/R³ (unusable where touched). */
    final double cubed;
    /** ∫ s ds/R = R2 - R1. */
    final double rise;
    /** The place is nearer to the edge than its own rounding. */
    final boolean touched;

    /**
     * @param length s2 - s1, given apart because it is better known than the difference
     * @param touch distance from the edge below which the place counts as on it
     */
    Edge(double s1, double s2, double length, double d2, double touch) {
        this.s1 = s1;
        this.s2 = s2;
        this.d2 = d2;
        r1 = Math.sqrt(s1 * s1 + d2);
        r2 = Math.sqrt(s2 * s2 + d2);
        rise = length * (s1 + s2) / (r1 + r2);
        boolean beside = s1 < 0 && s2 > 0;
        touched = beside ? d2 <= touch * touch : Math.min(r1, r2) <= touch;
        if (touched) {
            log = 0;
            cubed = 0;
            return;
        }
        log = log(s1, s2, length, d2);
        cubed = beside ? (s2 / r2 - s1 / r1) / d2
                : length * Math.abs(s1 + s2) / (r1 * r2 * (Math.abs(s2) * r1 + Math.abs(s1) * r2));
    }

    /** ∫ ds/R = ln((R1 + R2 + length)/(R1 + R2 - length)), its denominator from positive terms only. */
    static double log(double s1, double s2, double length, double d2) {
        double r1 = Math.sqrt(s1 * s1 + d2);
        double r2 = Math.sqrt(s2 * s2 + d2);
        double gap = s1 >= 0 ? r1 + s1 + d2 / (r2 + s2)
                : s2 <= 0 ? r2 - s2 + d2 / (r1 - s1) : d2 / (r1 - s1) + d2 / (r2 + s2);
        return Math.log1p(2 * length / gap);
    }

    /** ∫ R ds. */
    double lengthMoment() {
        return 0.5 * (s2 * r2 - s1 * r1 + d2 * log);
    }

    /** ∫ s ds/R³ = 1/R1 - 1/R2. */
    double inverseFall() {
        return rise / (r1 * r2);
    }

    /** Bound on how fast {@link #log} changes as the place moves: the field of the edge with unit charge per length. */
    double slope() {
        return cubed * Math.sqrt(d2) + Math.abs(inverseFall());
    }
}

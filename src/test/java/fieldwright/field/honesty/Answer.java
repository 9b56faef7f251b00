package fieldwright.field.honesty;

/**
 * What a judge finds, with no physical constant in front: Ex Ey Ez = ∫ρ(r−r')/|r−r'|³ and V = ∫ρ/|r−r'|, in the body's frame.
 * {@code magnitude} is the integral of the absolute value: the scale of rounding and cancellation.
 */
record Answer(double[] value, double[] magnitude, long evaluations) {
    static final double EPS = Math.ulp(1.0);

    static Answer zero() {
        return new Answer(new double[4], new double[4], 0);
    }

    Answer plus(Answer other) {
        double[] v = new double[4];
        double[] m = new double[4];
        for (int c = 0; c < 4; c++) {
            v[c] = value[c] + other.value[c];
            m[c] = magnitude[c] + other.magnitude[c];
        }
        return new Answer(v, m, evaluations + other.evaluations);
    }

    double field() {
        return Math.sqrt(value[0] * value[0] + value[1] * value[1] + value[2] * value[2]);
    }

    double fieldMagnitude() {
        return Math.max(magnitude[0], Math.max(magnitude[1], magnitude[2]));
    }

    /** Distance of two answers' fields. */
    double fieldDifference(Answer o) {
        double dx = value[0] - o.value[0];
        double dy = value[1] - o.value[1];
        double dz = value[2] - o.value[2];
        return Math.sqrt(dx * dx + dy * dy + dz * dz);
    }
}

package fieldwright.field;

/**
 * One place at which a source is seen, and what its field E and potential V there add to the answer:
 * answer field += a·E + b·V, answer potential += c·V. Images in surroundings are probes at reflected places.
 * {@code a} by rows, sheet frame.
 */
record Probe(double[] place, double[] a, double[] b, double c) {
    static Probe direct(double x, double y, double z) {
        return new Probe(new double[] {x, y, z}, new double[] {1, 0, 0, 0, 1, 0, 0, 0, 1}, null, 1);
    }

    /** Whether it sees the source as it is, but for a factor. */
    boolean isPlain() {
        for (int k = 0; k < 9; k++) {
            if (a[k] != (k % 4 == 0 ? c : 0)) {
                return false;
            }
        }
        return b == null;
    }

    Probe times(double factor) {
        double[] m = a.clone();
        for (int k = 0; k < 9; k++) {
            m[k] *= factor;
        }
        double[] v = b == null ? null : new double[] {factor * b[0], factor * b[1], factor * b[2]};
        return new Probe(place, m, v, factor * c);
    }
}

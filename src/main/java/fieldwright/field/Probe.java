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
}

package fieldwright.field;

/**
 * Nodes of a rule on a panel, ready for any place: offsets from the panel's anchor (m), what each carries (charge, or a vector of
 * measure with the weight of its map), and the rounding of its position.
 */
record NodeSet(double[][] offset, double[][] carried, double[] rounding, double[] relative) {
    static NodeSet scratch(fieldwright.geometry.Nodes nodes) {
        return new NodeSet(nodes.offset, new double[3][Workspace.BLOCK], nodes.rounding, nodes.relative);
    }

    /** A copy of the first n nodes; where positions are exact their rounding is nothing. */
    NodeSet kept(int n, int vectors, boolean exact) {
        double[][] o = new double[3][];
        double[][] c = new double[vectors][];
        for (int a = 0; a < 3; a++) {
            o[a] = java.util.Arrays.copyOf(offset[a], n);
        }
        for (int a = 0; a < vectors; a++) {
            c[a] = java.util.Arrays.copyOf(carried[a], n);
        }
        if (exact) {
            return new NodeSet(o, c, Workspace.ZEROS, Workspace.ZEROS);
        }
        return new NodeSet(o, c, java.util.Arrays.copyOf(rounding, n), java.util.Arrays.copyOf(relative, n));
    }
}

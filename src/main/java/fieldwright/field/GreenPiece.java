package fieldwright.field;

import java.util.List;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.integral.Cubature;
import fieldwright.integral.Integrand;

/** Density times measure times a smooth {@link Green} part over a patch: boxes of parameters as they are. */
final class GreenPiece implements Integrand {
    /** Noise is taken as independent from node to node, doubt is not: the root of a usual number of nodes. */
    private static final double ALIKE = 5;
    private static final int[] ORDERS = {0, 20, 14, 10};

    private final Patch patch;
    private final Green green;
    private final boolean potential;
    private final Workspace space;
    private final Chart.Anchor anchor;
    private final double[][] s = new double[3][BLOCK];
    private final double[] weight = new double[BLOCK];
    private final double[] doubt = new double[BLOCK];

    /** The parameters it runs over: all, or all but the turn round the axis, along which nothing changes. */
    private final int[] axes;

    private GreenPiece(Patch patch, Green green, boolean potential, Workspace space, int turn) {
        axes = java.util.stream.IntStream.range(0, patch.dimension()).filter(k -> k != turn).toArray();
        this.patch = patch;
        this.green = green;
        this.potential = potential;
        this.space = space;
        double[] middle = new double[patch.dimension()];
        java.util.Arrays.fill(middle, 0.5);
        anchor = patch.chart().anchor(middle);
    }

    /** Adds the pieces, cut where the density bends; what needs no integral to the start. */
    static void add(Patch patch, Green green, Paver paver, Workspace space, double[] error) {
        add(patch, green, paver, space, error, -1);
    }

    /** The same for charge and Green function that do not change along parameter {@code turn}, round an axis. */
    static void add(Patch patch, Green green, Paver paver, Workspace space, double[] error, int turn) {
        if (patch.weight().isConstant() && patch.weight().constant() == 0) {
            return;
        }
        GreenPiece f = new GreenPiece(patch, green, paver.isPotential(), space, turn);
        if (f.dimension() == 0) {
            double[][] out = new double[paver.start.length][1];
            f.evaluate(new double[0][], 1, out, new double[1]);
            for (int c = 0; c < out.length; c++) {
                paver.start[c] += out[c][0];
                error[c] += Math.abs(f.weight[0]) * f.doubt[0];
            }
            return;
        }
        add(f, paver.pieces);
    }

    private static void add(GreenPiece f, List<Cubature.Piece> pieces) {
        Patch patch = f.patch;
        int d = f.dimension();
        double[][] cuts = new double[d][];
        for (int k = 0; k < d; k++) {
            int axis = f.axes[k];
            cuts[k] = patch.chart().isEndless(axis) ? endless(patch.breaks()[axis]) : patch.breaks()[axis];
        }
        int[] orders = new int[d];
        java.util.Arrays.fill(orders, ORDERS[d]);
        Cubature.addBetween(f, cuts, orders, pieces);
    }

    private static double[] endless(double[] breaks) {
        java.util.TreeSet<Double> all = new java.util.TreeSet<>(List.of(0.25, 0.5, 0.75));
        for (double b : breaks) {
            all.add(b);
        }
        return all.stream().mapToDouble(Double::doubleValue).toArray();
    }

    @Override
    public int dimension() {
        return axes.length;
    }

    @Override
    public int components() {
        return potential ? 1 : 3;
    }

    @Override
    public boolean isSmooth() {
        return patch.weight().isSmooth() && green.isSmooth();
    }

    @Override
    public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
        double[][] du = space.du;
        double[] w = weight;
        java.util.Arrays.fill(w, 0, n, 1);
        for (int k = 0; k < 3; k++) {
            java.util.Arrays.fill(du[k], 0, n, 0);
        }
        for (int k = 0; k < axes.length; k++) {
            for (int i = 0; i < n; i++) {
                double width = patch.triangle() && k == 1 ? 1 - u[0][i] : 1;
                du[axes[k]][i] = width * u[k][i] - 0.5;
                w[i] *= width;
            }
        }
        Nodes nodes = space.nodes;
        patch.chart().evaluate(anchor, du, n, nodes);
        patch.weight().evaluate(nodes, anchor.position(), n, space.density);
        double[] own = new double[3];
        for (int i = 0; i < n; i++) {
            if (Double.isNaN(space.density[i])) {
                throw Facet.notANumber(patch, nodes, i);
            }
            w[i] *= space.density[i] * nodes.measure[i];
            for (int a = 0; a < 3; a++) {
                own[a] = anchor.position()[a] + nodes.offset[a][i];
            }
            double[] sheet = patch.frame().toSheet(own);
            for (int a = 0; a < 3; a++) {
                s[a][i] = sheet[a];
            }
        }
        if (potential) {
            green.potential(s, n, out[0], doubt);
        } else {
            green.field(s, n, out, doubt);
        }
        for (int i = 0; i < n; i++) {
            for (int c = 0; c < components(); c++) {
                out[c][i] = w[i] == 0 ? 0 : w[i] * out[c][i];
            }
            noise[i] = ALIKE * Math.abs(w[i]) * doubt[i];
        }
    }
}

package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.quantity.AuthorException;

/**
 * What is integrated over, without any place yet: a patch as it stands, one face of a volume, or one edge of a flat face. Keeps the
 * panels it was cut into, which serve every place.
 */
abstract class Facet {
    final Patch patch;
    final Chart chart;
    final Workspace space;
    /** Chart depth of each parameter; other depths stay where {@link #held} says. */
    final int[] axes;
    final double[] held;
    private Panel[] roots;
    private double reach = -1;

    Facet(Patch patch, Chart chart, Workspace space, int[] axes, double[] held) {
        this.patch = patch;
        this.chart = chart;
        this.space = space;
        this.axes = axes;
        this.held = held;
    }

    int dimension() {
        return axes.length;
    }

    /** How many numbers a node carries: charge, or a vector of measure. */
    abstract int vectors();

    /** What nodes placed last carry; {@code jacobian} is du per unit of the integration variables. */
    abstract void carry(Chart.Anchor anchor, double[] jacobian, int n, NodeSet set);

    /** Whether what is integrated is known to be smooth along the facet. */
    abstract boolean isSmooth();

    Chart.Anchor anchor(double... v) {
        double[] u = held.clone();
        for (int k = 0; k < axes.length; k++) {
            u[axes[k]] = v[k];
        }
        return chart.anchor(u);
    }

    /** Parameter k of an anchor. */
    double parameter(Chart.Anchor anchor, int k) {
        return anchor.u()[axes[k]];
    }

    /** Positions, tangents and measure at anchor + du. */
    Nodes place(Chart.Anchor anchor, double[][] du, int n) {
        double[][] full = space.full;
        for (int k = 0; k < 3; k++) {
            full[k] = Workspace.ZEROS;
        }
        for (int k = 0; k < axes.length; k++) {
            full[axes[k]] = du[k];
        }
        chart.evaluate(anchor, full, n, space.nodes);
        return space.nodes;
    }

    double[][] tangent(int k) {
        return space.nodes.tangent[axes[k]];
    }

    /** A line no longer than this, m, is a point: an edge at which a face has shrunk to nothing but rounding. */
    double leastLength() {
        return 0;
    }

    /** The box of all parameters. */
    Panel whole() {
        if (roots == null) {
            double[] to = new double[axes.length];
            java.util.Arrays.fill(to, 1);
            roots = new Panel[] {new Panel(this, new double[axes.length], to)};
        }
        return roots[0];
    }

    /** The boxes between the breaks of the patch, outermost parameter slowest. */
    Panel[] between(double[][] cuts) {
        if (roots == null) {
            int total = 1;
            for (double[] c : cuts) {
                total *= c.length - 1;
            }
            roots = new Panel[total];
            for (int i = 0; i < total; i++) {
                double[] from = new double[cuts.length];
                double[] to = new double[cuts.length];
                int rest = i;
                for (int k = 0; k < cuts.length; k++) {
                    int j = rest % (cuts[k].length - 1);
                    rest /= cuts[k].length - 1;
                    from[k] = cuts[k][j];
                    to[k] = cuts[k][j + 1];
                }
                roots[i] = new Panel(this, from, to);
            }
        }
        return roots;
    }

    /** Distance from the frame's origin to the furthest corner: the size its coordinates are rounded at. */
    double reach() {
        if (reach < 0) {
            int n = axes.length;
            for (int i = 0; i < 1 << n; i++) {
                double[] v = new double[n];
                for (int k = 0; k < n; k++) {
                    v[k] = chart.isEndless(axes[k]) ? 0.5 : i >> k & 1;
                }
                double[] p = anchor(v).position();
                reach = Math.max(reach, Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]));
            }
        }
        return reach;
    }

    /** A patch as it stands. */
    static final class Body extends Facet {
        Body(Patch patch, Chart chart, Workspace space) {
            super(patch, chart, space, all(chart.dimension()), new double[chart.dimension()]);
        }

        private static int[] all(int n) {
            int[] axes = new int[n];
            for (int k = 0; k < n; k++) {
                axes[k] = k;
            }
            return axes;
        }

        @Override
        int vectors() {
            return 1;
        }

        @Override
        boolean isSmooth() {
            return patch.weight().isSmooth();
        }

        @Override
        void carry(Chart.Anchor anchor, double[] jacobian, int n, NodeSet set) {
            double[] w = set.carried()[0];
            double[] measure = space.nodes.measure;
            if (patch.weight().isConstant()) {
                double density = patch.weight().constant();
                for (int i = 0; i < n; i++) {
                    w[i] = density * measure[i] * jacobian[i];
                }
                return;
            }
            patch.weight().evaluate(space.nodes, anchor.position(), n, w);
            for (int i = 0; i < n; i++) {
                if (Double.isNaN(w[i])) {
                    throw notANumber(patch, space.nodes, i);
                }
                w[i] *= measure[i] * jacobian[i];
            }
        }
    }

    static AuthorException notANumber(Patch patch, Nodes nodes, int i) {
        StringBuilder where = new StringBuilder();
        for (int m = 0; m < patch.chart().coordinates().size(); m++) {
            where.append(m == 0 ? "" : ", ").append(patch.chart().coordinates().get(m)).append(" = ")
                .append(String.format(java.util.Locale.ROOT, "%.6g", nodes.c[m][i]));
        }
        return new AuthorException("density " + patch.density().text() + " is not a number at " + where
            + " (SI). Check roots, logarithms and divisions in it against the region's limits.");
    }

    /** One face of a volume's box; nodes carry its outward normal times area. */
    static final class Face extends Facet {
        final int depth;
        /** +1 when the two tangents, first × second, point outward. */
        final int sign;
        final Edges edges;

        Face(Patch patch, Chart chart, Workspace space, int depth, boolean upper, int handedness) {
            super(patch, chart, space, new int[] {(depth + 1) % 3, (depth + 2) % 3}, at(depth, upper));
            this.depth = depth;
            sign = (upper ? 1 : -1) * handedness;
            edges = patch.polynomial() != null && chart.isFlatFace(depth, upper) ? new Edges(this, false, sign) : null;
        }

        private static double[] at(int depth, boolean upper) {
            double[] u = new double[3];
            u[depth] = upper ? 1 : 0;
            return u;
        }

        @Override
        int vectors() {
            return 3;
        }

        @Override
        boolean isSmooth() {
            return true;   // SpaceFunction admits no other
        }

        @Override
        void carry(Chart.Anchor anchor, double[] jacobian, int n, NodeSet set) {
            double[][] s = tangent(0);
            double[][] t = tangent(1);
            double[] x = set.carried()[0];
            double[] y = set.carried()[1];
            double[] z = set.carried()[2];
            for (int i = 0; i < n; i++) {
                double f = sign * jacobian[i];
                x[i] = f * (s[1][i] * t[2][i] - s[2][i] * t[1][i]);
                y[i] = f * (s[2][i] * t[0][i] - s[0][i] * t[2][i]);
                z[i] = f * (s[0][i] * t[1][i] - s[1][i] * t[0][i]);
            }
        }
    }

    /** The edges of a flat surface or face, its normal, and a point of it. */
    static final class Edges {
        private static final double[][] TRIANGLE = {{0, 0}, {1, 0}, {0, 1}};
        private static final double[][] SQUARE = {{0, 0}, {1, 0}, {1, 1}, {0, 1}};

        final Chart.Anchor middle;
        /** Unit normal, outward of a volume; null when there is none, at a point. */
        final double[] normal;
        final Edge[] all;

        Edges(Facet facet, boolean triangle, int sign) {
            Workspace space = facet.space;
            middle = facet.anchor(0.5, 0.5);
            space.du[0][0] = 0;
            space.du[1][0] = 0;
            facet.place(middle, space.du, 1);
            double[][] p = facet.tangent(0);
            double[][] q = facet.tangent(1);
            double[] n = {p[1][0] * q[2][0] - p[2][0] * q[1][0], p[2][0] * q[0][0] - p[0][0] * q[2][0], p[0][0] * q[1][0] - p[1][0] * q[0][0]};
            double size = Math.sqrt(n[0] * n[0] + n[1] * n[1] + n[2] * n[2]);
            normal = size > 0 && Double.isFinite(size) ? new double[] {sign * n[0] / size, sign * n[1] / size, sign * n[2] / size} : null;
            double[][] corners = triangle ? TRIANGLE : SQUARE;
            java.util.List<Edge> edges = new java.util.ArrayList<>();
            for (int k = 0; k < corners.length; k++) {
                double[] from = corners[k];
                double[] to = corners[(k + 1) % corners.length];
                if (triangle || !facet.chart.isFullTurn(facet.axes[1 - k % 2])) {
                    double[] corner = facet.held.clone();
                    double[] along = new double[corner.length];
                    for (int j = 0; j < 2; j++) {
                        corner[facet.axes[j]] = from[j];
                        along[facet.axes[j]] = to[j] - from[j];
                    }
                    edges.add(new Edge(facet, corner, along, sign));
                }
            }
            all = edges.toArray(new Edge[0]);
        }
    }

    /** One edge of a flat face, from one corner of its parameters to another; nodes carry its tangent. */
    static final class Edge extends Facet {
        /** −1 when it runs clockwise about the normal. */
        final int sign;
        private final double[] along;
        private final double leastLength;

        Edge(Facet face, double[] corner, double[] along, int sign) {
            super(face.patch, face.chart, face.space, new int[] {0}, corner);
            this.sign = sign;
            this.along = along;
            leastLength = 1e-20 * face.reach();
        }

        @Override
        int vectors() {
            return 3;
        }

        @Override
        boolean isSmooth() {
            return true;
        }

        @Override
        double leastLength() {
            return leastLength;
        }

        @Override
        Chart.Anchor anchor(double... v) {
            double[] u = held.clone();
            for (int k = 0; k < u.length; k++) {
                u[k] += along[k] == 0 ? 0 : along[k] * v[0];
            }
            return chart.anchor(u);
        }

        @Override
        double parameter(Chart.Anchor anchor, int k) {
            for (int j = 0; j < along.length; j++) {
                if (along[j] != 0) {
                    return (anchor.u()[j] - held[j]) / along[j];
                }
            }
            return 0;
        }

        /** Where on the edge parameters of the face are nearest, 0 to 1. */
        double project(double[] at, int[] faceAxes) {
            double dot = 0;
            double square = 0;
            for (int j = 0; j < 2; j++) {
                double a = along[faceAxes[j]];
                dot += (at[j] - held[faceAxes[j]]) * a;
                square += a * a;
            }
            return Math.min(1, Math.max(0, dot / square));
        }

        @Override
        Nodes place(Chart.Anchor anchor, double[][] du, int n) {
            double[][] full = space.full;
            double[] given = du[0];
            for (int k = 0; k < 3; k++) {
                full[k] = Workspace.ZEROS;
                if (k < along.length && along[k] != 0) {
                    full[k] = space.edge[k];
                    for (int i = 0; i < n; i++) {
                        full[k][i] = along[k] * given[i];
                    }
                }
            }
            chart.evaluate(anchor, full, n, space.nodes);
            double[][] t = space.along;
            for (int a = 0; a < 3; a++) {
                java.util.Arrays.fill(t[a], 0, n, 0);
                for (int k = 0; k < along.length; k++) {
                    double[] own = space.nodes.tangent[k][a];
                    double f = along[k];
                    for (int i = 0; f != 0 && i < n; i++) {
                        t[a][i] += f * own[i];
                    }
                }
            }
            return space.nodes;
        }

        @Override
        double[][] tangent(int k) {
            return space.along;
        }

        @Override
        void carry(Chart.Anchor anchor, double[] jacobian, int n, NodeSet set) {
            for (int a = 0; a < 3; a++) {
                double[] t = space.along[a];
                double[] c = set.carried()[a];
                for (int i = 0; i < n; i++) {
                    c[i] = sign * jacobian[i] * t[i];
                }
            }
        }
    }
}

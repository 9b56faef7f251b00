package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;

/** What one patch is integrated over by different rules: itself, the faces of its box, its edges. Made when first needed. */
final class Facets {
    private static final int GRID = 4;

    private Facet.Body body;
    private Extent extent;
    private List<Facet.Face> faces;
    private Facet.Edges edges;
    private Patch patch;
    private double largestDensity = -1;

    /**
     * Points all over a patch, from which its distance and size are told: offsets from {@code middle}; {@code radius} is half the
     * longest side of the box that holds them, {@code length} is along each parameter.
     */
    record Extent(Chart.Anchor middle, double[][] sample, double radius, double[] length) {
        private static final double CANCELLATION = 100;
        private static final int LOW = 4;

        /**
         * Whether a place is so near that integrals along rays from it suit: less than two radii, or six for a polynomial of low degree,
         * which grows little on the way to the place; and not many thicknesses from a thin
         * patch, where what rays gather before and behind it would cancel. {@code b} is middle minus place, {@code gap} the distance of
         * some nearer point.
         */
        boolean isNear(double[] b, double gap, int degree) {
            double least = least(b);
            double cancellation = 1;
            for (double l : length) {
                cancellation *= Math.max(1, Math.min(gap, least) / l);
            }
            return least < (degree >= 0 && degree <= LOW ? 6 : 2) * radius && cancellation < CANCELLATION;
        }

        /** The least distance of the points from a place, {@code b} being middle minus place. */
        private double least(double[] b) {
            double least = Double.POSITIVE_INFINITY;
            for (int i = 0; i < sample[0].length; i++) {
                double x = b[0] + sample[0][i];
                double y = b[1] + sample[1][i];
                double z = b[2] + sample[2][i];
                least = Math.min(least, x * x + y * y + z * z);
            }
            return Math.sqrt(least);
        }
    }

    void of(Patch patch) {
        this.patch = patch;
    }

    /** The patch as it stands; for endless charts made anew for each place, whose map it follows. */
    Facet.Body body(Workspace space, Probe probe) {
        if (patch.chart().isEndless()) {
            return new Facet.Body(patch, patch.chart().towards(patch.frame().toOwn(probe.place())), space);
        }
        if (body == null) {
            body = new Facet.Body(patch, patch.chart(), space);
        }
        return body;
    }

    Extent extent() {
        if (extent == null) {
            int d = body.dimension();
            double[] half = new double[d];
            java.util.Arrays.fill(half, 0.5);
            Chart.Anchor middle = body.chart.anchor(half);
            int n = d == 2 ? GRID * GRID : GRID * GRID * GRID;
            for (int i = 0; i < n; i++) {
                int rest = i;
                for (int k = d - 1; k >= 0; k--) {
                    body.space.du[k][i] = rest % GRID / (GRID - 1.0) - 0.5;
                    rest /= GRID;
                }
            }
            Nodes nodes = body.place(middle, body.space.du, n);
            double[][] sample = new double[3][];
            double radius = 0;
            for (int a = 0; a < 3; a++) {
                sample[a] = java.util.Arrays.copyOf(nodes.offset[a], n);
                double low = Double.POSITIVE_INFINITY;
                double high = Double.NEGATIVE_INFINITY;
                for (double v : sample[a]) {
                    low = Math.min(low, v);
                    high = Math.max(high, v);
                }
                radius = Math.max(radius, (high - low) / 2);
            }
            extent = new Extent(middle, sample, radius, lengths(sample, d));
        }
        return extent;
    }

    /** The longest of the sampled lines along each parameter. */
    private static double[] lengths(double[][] sample, int d) {
        double[] length = new double[d];
        int stride = 1;
        for (int k = d - 1; k >= 0; k--) {
            for (int i = 0; i < sample[0].length; i++) {
                if (i / stride % GRID == 0) {
                    double sum = 0;
                    for (int j = 1; j < GRID; j++) {
                        double x = sample[0][i + j * stride] - sample[0][i + (j - 1) * stride];
                        double y = sample[1][i + j * stride] - sample[1][i + (j - 1) * stride];
                        double z = sample[2][i + j * stride] - sample[2][i + (j - 1) * stride];
                        sum += Math.sqrt(x * x + y * y + z * z);
                    }
                    length[k] = Math.max(length[k], sum);
                }
            }
            stride *= GRID;
        }
        return length;
    }

    /** Largest absolute value of a volume's density at the points of its extent. */
    double largestDensity() {
        if (largestDensity < 0) {
            Extent e = extent();
            int n = e.sample()[0].length;
            patch.inSpace().evaluate(e.middle().position(), e.sample(), n, body.space.density);
            for (int i = 0; i < n; i++) {
                largestDensity = Math.max(largestDensity, Math.abs(body.space.density[i]));
            }
        }
        return largestDensity;
    }

    /** Edges of a flat surface. */
    Facet.Edges edges() {
        if (edges == null) {
            edges = new Facet.Edges(body, patch.triangle(), 1);
        }
        return edges;
    }

    /** Faces of a volume that have an area: not those of a full turn, nor where a range shrinks to nothing. */
    List<Facet.Face> faces() {
        if (faces == null) {
            faces = new ArrayList<>();
            Chart chart = body.chart;
            double size = extent().radius();
            int hand = chart.handedness(body.space.nodes);
            for (int depth = 0; depth < 3; depth++) {
                for (int side = 0; side < 2 && !chart.isFullTurn(depth); side++) {
                    if (!chart.closesAt(depth, side == 1)) {
                        Facet.Face face = new Facet.Face(patch, chart, body.space, depth, side == 1, hand);
                        if (hasArea(face, size)) {
                            faces.add(face);
                        }
                    }
                }
            }
        }
        return faces;
    }

    private static boolean hasArea(Facet.Face face, double size) {
        double[][] du = face.space.du;
        for (int i = 0; i < 9; i++) {
            du[0][i] = 0.31 * (i / 3 - 1);
            du[1][i] = 0.31 * (i % 3 - 1);
        }
        face.place(face.anchor(0.5, 0.5), du, 9);
        double[][] p = face.tangent(0);
        double[][] q = face.tangent(1);
        for (int i = 0; i < 9; i++) {
            double x = p[1][i] * q[2][i] - p[2][i] * q[1][i];
            double y = p[2][i] * q[0][i] - p[0][i] * q[2][i];
            double z = p[0][i] * q[1][i] - p[1][i] * q[0][i];
            double scale = Math.abs(p[0][i]) + Math.abs(p[1][i]) + Math.abs(p[2][i]);
            scale *= Math.abs(q[0][i]) + Math.abs(q[1][i]) + Math.abs(q[2][i]);
            double area = Math.sqrt(x * x + y * y + z * z);
            if (area > 0 && area > 1e-14 * scale && scale > 1e-28 * size * size) {
                return true;
            }
        }
        return false;
    }
}

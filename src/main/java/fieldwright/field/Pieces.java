package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.integral.Integrand;
import fieldwright.integral.TensorRule;

/**
 * The pieces a patch is cut into. Each maps its own unit box into the patch's, so that what is left to integrate is smooth:
 * a plain box, or rays from the point nearest to the target, along which R = h sinh(w) with h the distance there
 * (Johnston &amp; Elliott 2005).
 */
final class Pieces {
    private Pieces() {
    }

    /** Shared by all: offsets from an anchor, and the values there. */
    abstract static class Base implements Integrand {
        final Sampler sampler;
        Chart.Anchor anchor;
        double[] b;
        private double[] shift;
        final double[] jacobian;

        Base(Sampler sampler, Chart.Anchor anchor) {
            this.sampler = sampler;
            this.anchor = anchor;
            b = sampler.toAnchor(anchor);
            jacobian = sampler.space.jacobian;
        }

        Base(Sampler sampler, double[] anchorAt) {
            this(sampler, sampler.anchor(anchorAt));
        }

        @Override
        public int dimension() {
            return sampler.dimension();
        }

        @Override
        public int components() {
            return sampler.potential ? 1 : 3;
        }

        @Override
        public boolean isSmooth() {
            return sampler.facet.isSmooth();
        }

        @Override
        public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
            double[][] du = sampler.space.du;
            map(u, n, du);
            if (shift != null) {
                for (int k = 0; k < shift.length; k++) {
                    double step = shift[k];
                    for (int i = 0; i < n; i++) {
                        du[k][i] += step;
                    }
                }
            }
            NodeSet set = sampler.space.set;
            sampler.facet.place(anchor, sampler.space.du, n);
            sampler.facet.carry(anchor, sampler.space.jacobian, n, set);
            sampler.act(set, anchor, b, n, out, noise);
            finish(u, n, out, noise);
        }

        /**
         * Takes offsets from another anchor, one for all pieces of a sampler: the rounding of an anchor's position then
         * moves all of them alike, which is no more than the rounding of the place.
         */
        final void rebase(Chart.Anchor base, double[] toBase) {
            int n = sampler.dimension();
            double[] moved = new double[n];
            boolean any = false;
            for (int k = 0; k < n; k++) {
                moved[k] = sampler.facet.parameter(anchor, k) - sampler.facet.parameter(base, k);
                any |= moved[k] != 0;
            }
            anchor = base;
            b = toBase;
            shift = any ? moved : null;
        }

        /** The place is on the anchor: what is left between them is rounding. */
        final void touching(double height) {
            if (height == 0) {
                java.util.Arrays.fill(b, 0);
            }
        }

        abstract void map(double[][] u, int n, double[][] du);

        void finish(double[][] u, int n, double[][] out, double[] noise) { }
    }

    private static final double[] NOWHERE = new double[3];

    private static double distance(double[] a, double[] b) {
        double x = a[0] - b[0];
        double y = a[1] - b[1];
        double z = a[2] - b[2];
        return Math.sqrt(x * x + y * y + z * z);
    }

    /** A box of parameters as it is. */
    static final class Box extends Base {
        private final Panel panel;
        private final double[] toOwn;
        private final double[] from;
        private final double[] width;
        private final double[] at;
        private final double volume;

        /** A panel, with the nodes it keeps. */
        Box(Sampler sampler, Panel panel) {
            this(sampler, panel, panel.anchor, panel.from, panel.to);
        }

        Box(Sampler sampler, double[] from, double[] to) {
            this(sampler, null, sampler.anchor(middle(from, to)), from, to);
        }

        private Box(Sampler sampler, Panel panel, Chart.Anchor anchor, double[] from, double[] to) {
            super(sampler, anchor);
            this.panel = panel;
            toOwn = b;
            this.from = from;
            at = middle(from, to);
            width = new double[from.length];
            double product = 1;
            for (int k = 0; k < from.length; k++) {
                width[k] = to[k] - from[k];
                product *= width[k];
            }
            volume = product;
        }

        private static double[] middle(double[] from, double[] to) {
            double[] m = new double[from.length];
            for (int k = 0; k < m.length; k++) {
                m[k] = (from[k] + to[k]) / 2;
            }
            return m;
        }

        /**
         * So close against what positions are rounded at that the rounding of its anchor would show beside that of its neighbours:
         * it is then worked from the anchor that all share.
         */
        private boolean isClose() {
            return distance(toOwn, NOWHERE) < 1e-4 * (distance(panel.anchor.position(), NOWHERE) + distance(sampler.seen, NOWHERE));
        }

        @Override
        public Integrand half(int direction, boolean low) {
            return panel == null || isClose() ? null : new Box(sampler, panel.half(direction, low));
        }

        @Override
        public boolean evaluate(TensorRule rule, int block, int n, double[][] out, double[] noise) {
            if (panel == null || isClose()) {
                return false;
            }
            sampler.act(panel.nodes(rule)[block], panel.anchor, toOwn, n, out, noise);
            return true;
        }

        @Override
        void map(double[][] u, int n, double[][] du) {
            for (int k = 0; k < width.length; k++) {
                double shift = from[k] - at[k];
                for (int i = 0; i < n; i++) {
                    du[k][i] = shift + width[k] * u[k][i];
                }
            }
            java.util.Arrays.fill(jacobian, 0, n, volume);
        }
    }

    /** A radius from 0 to {@code length} that is fine near {@code height}: R = h sinh(w), or R itself for h = 0. */
    static final class Radius {
        final double height;

        Radius(double height) {
            this.height = height;
        }

        double span(double length) {
            return height > 0 ? asinh(length / height) : 1;
        }

        double at(double w, double length) {
            return height > 0 ? height * sinh(w) : w * length;
        }

        /** d at/dw where at is {@code r}. */
        double slope(double r, double length) {
            return height > 0 ? Math.sqrt(height * height + r * r) : length;
        }
    }

    /** sinh, by its series where the exponential would cancel. */
    static double sinh(double x) {
        if (Math.abs(x) < 0.5) {
            double q = x * x;
            return x * (1 + q / 6 * (1 + q / 20 * (1 + q / 42 * (1 + q / 72 * (1 + q / 110 * (1 + q / 156))))));
        }
        double e = Math.exp(x);
        return 0.5 * (e - 1 / e);
    }

    /** cosh of what has this sinh. */
    static double cosh(double sinh) {
        return Math.sqrt(1 + sinh * sinh);
    }

    static double asinh(double x) {
        double a = Math.abs(x);
        double y = a > 1e8 ? Math.log(2 * a) : a > 0.7 ? Math.log(a + Math.sqrt(a * a + 1)) : Math.log1p(a + a * a / (1 + Math.sqrt(a * a + 1)));
        return x < 0 ? -y : y;
    }

    /** From the nearest point of a line to one end. */
    static final class Segment extends Base {
        private final double reach;
        private final double length;
        private final Radius radius;
        private final double[] pole;

        /** {@code pole}: coefficient of 1/s to take out when the target is on the line (endless kernels), or null. */
        Segment(Sampler sampler, double at, double end, double length, double height, double[] pole) {
            super(sampler, new double[] {at});
            reach = end - at;
            this.length = length;
            radius = new Radius(height);
            touching(height);
            this.pole = pole;
        }

        double span() {
            return radius.span(length);
        }

        @Override
        void map(double[][] u, int n, double[][] du) {
            double span = span();
            for (int i = 0; i < n; i++) {
                double w = span * u[0][i];
                double r = radius.at(w, length);
                du[0][i] = reach * (r / length);
                jacobian[i] = Math.abs(reach) * (radius.slope(r, length) / length) * span;
            }
        }

        @Override
        void finish(double[][] u, int n, double[][] out, double[] noise) {
            takeOut(pole, u[0], n, out, noise);
        }
    }

    private static void takeOut(double[] pole, double[] s, int n, double[][] out, double[] noise) {
        if (pole == null) {
            return;
        }
        for (int i = 0; i < n; i++) {
            for (int c = 0; c < 3; c++) {
                out[c][i] -= pole[c] / s[i];
                noise[i] += 4 * Sampler.EPS * Math.abs(pole[c]) / s[i];
            }
        }
    }

    /**
     * A triangle of parameters from the nearest point to one side, in polar coordinates of the tangent plane: first
     * coordinate along rays, second along the side by y = D sinh(v). When the target is on the surface the 1/R part of
     * the field is taken out and its finite part, with ln R at the side, put back.
     */
    static final class Triangle extends Base {
        private final double[] a;
        private final double[] side;
        private final double cross;
        private final double distance;
        private final double scale;
        private final double yA;
        private final double yB;
        private final double vA;
        private final double vB;
        private final Radius radius;
        private final double[][] pole;
        private final double[] rMax;
        private final double[] angle;
        private final double[] along;

        /**
         * {@code a}, {@code c}: ends of the side minus the nearest point, in parameters; {@code metric}: tangent-plane vectors of the two
         * parameters (2 × 2, column per parameter); {@code pole}: density times mapped tangent vectors of the parameters, or null.
         */
        Triangle(Sampler sampler, double[] at, double[] a, double[] c, double[] metric, double height, double[][] pole) {
            super(sampler, at);
            this.a = a;
            side = new double[] {c[0] - a[0], c[1] - a[1]};
            cross = Math.abs(a[0] * c[1] - a[1] * c[0]);
            double ax = metric[0] * a[0] + metric[1] * a[1];
            double ay = metric[2] * a[0] + metric[3] * a[1];
            double sx = metric[0] * side[0] + metric[1] * side[1];
            double sy = metric[2] * side[0] + metric[3] * side[1];
            double length = Math.sqrt(sx * sx + sy * sy);
            distance = Math.abs(ax * sy - ay * sx) / length;
            yA = (ax * sx + ay * sy) / length;
            yB = yA + length;
            scale = Math.sqrt(distance * distance + height * height);
            vA = asinh(yA / scale);
            vB = asinh(yB / scale);
            radius = new Radius(height);
            touching(height);
            this.pole = pole;
            rMax = pole == null ? null : new double[Workspace.BLOCK];
            angle = pole == null ? null : new double[Workspace.BLOCK];
            along = pole == null ? null : new double[Workspace.BLOCK];
        }

        boolean isEmpty() {
            return !(cross > 0) || !(distance > 0);
        }

        /** From the place to the side. */
        double toSide() {
            double beyond = Math.max(0, Math.max(yA, -yB));
            return Math.sqrt(scale * scale + beyond * beyond);
        }

        /** Largest extent in w, and extent in v: how many pieces it takes. */
        double spanW() {
            return radius.span(Math.sqrt(distance * distance + Math.max(yA * yA, yB * yB)));
        }

        double spanV() {
            return vB - vA;
        }

        @Override
        void map(double[][] u, int n, double[][] du) {
            for (int i = 0; i < n; i++) {
                double v = vA + (vB - vA) * u[1][i];
                double y = scale * sinh(v);
                double t = (y - yA) / (yB - yA);
                double r = Math.sqrt(distance * distance + y * y);
                double span = radius.span(r);
                double w = span * u[0][i];
                double at = radius.at(w, r);
                double lambda = at / r;
                du[0][i] = lambda * (a[0] + t * side[0]);
                du[1][i] = lambda * (a[1] + t * side[1]);
                double dy = Math.sqrt(scale * scale + y * y) * (vB - vA);
                jacobian[i] = cross * lambda * (radius.slope(at, r) / r * span) * dy / (yB - yA);
                if (pole != null) {
                    rMax[i] = r;
                    angle[i] = distance * dy / (r * r);
                    along[i] = t;
                }
            }
        }

        @Override
        void finish(double[][] u, int n, double[][] out, double[] noise) {
            if (pole == null) {
                return;
            }
            for (int i = 0; i < n; i++) {
                double p0 = a[0] + along[i] * side[0];
                double p1 = a[1] + along[i] * side[1];
                double f = -angle[i] / rMax[i] * (Math.log(rMax[i]) - 1 / u[0][i]);
                for (int c = 0; c < 3; c++) {
                    double term = f * (p0 * pole[0][c] + p1 * pole[1][c]);
                    out[c][i] += term;
                    noise[i] += 4 * Sampler.EPS * Math.abs(term);
                }
            }
        }
    }

    /**
     * A box of parameters one edge of which is a single point (an axis, a pole, an apex), nearest to the target there: parameter
     * {@code ray} runs from that point, the other goes round it.
     */
    static final class Fan extends Base {
        private final int ray;
        private final double reach;
        private final double from;
        private final double width;
        private final double length;
        private final Radius radius;

        Fan(Sampler sampler, double[] at, int ray, double end, double from, double to, double length, double height) {
            super(sampler, at);
            this.ray = ray;
            reach = end - at[ray];
            this.from = from - at[1 - ray];
            width = to - from;
            this.length = length;
            radius = new Radius(height);
            touching(height);
        }

        /** On the tip the 1/R parts of a full turn cancel only if the rule round it is exact for them. */
        @Override
        public int leastOrder(int direction) {
            return direction == 1 && radius.height == 0 ? 24 : 0;
        }

        double span() {
            return radius.span(length);
        }

        @Override
        void map(double[][] u, int n, double[][] du) {
            double span = span();
            for (int i = 0; i < n; i++) {
                double w = span * u[0][i];
                double r = radius.at(w, length);
                du[ray][i] = reach * (r / length);
                du[1 - ray][i] = from + width * u[1][i];
                jacobian[i] = Math.abs(reach) * (radius.slope(r, length) / length) * span * width;
            }
        }
    }

    /**
     * A pyramid of parameters from the nearest point of a volume to one face of a box: along the rays R = h sinh(w), across by
     * sinh about the nearest point, so that flat pyramids do no harm.
     */
    static final class Pyramid extends Base {
        private final int depth;
        private final double reach;
        private final double[] low;
        private final double[] high;
        private final double[] scale;
        private final double length;
        private final Radius radius;

        /**
         * {@code low}, {@code high}: the face's box minus the apex; {@code length}: of the apex' distance to the face, m.
         * A coordinate that does not move the place at the apex (phi on the axis) has scale +infinity: it runs through its whole
         * range at every distance, so that the pyramids over the other faces fill the box.
         */
        Pyramid(Sampler sampler, double[] at, int depth, double reach, double[] low, double[] high, double[] scale, double length,
            double height) {
            super(sampler, at);
            this.depth = depth;
            this.reach = reach;
            this.low = low;
            this.high = high;
            this.scale = scale;
            this.length = length;
            radius = new Radius(height);
            touching(height);
        }

        double span() {
            return radius.span(length);
        }

        @Override
        void map(double[][] u, int n, double[][] du) {
            double span = span();
            for (int i = 0; i < n; i++) {
                double w = span * u[0][i];
                double r = radius.at(w, length);
                double lambda = r / length;
                double volume = Math.abs(reach) * (radius.slope(r, length) / length) * span;
                du[depth][i] = lambda * reach;
                for (int k = 1; k < 3; k++) {
                    int j = (depth + k) % 3;
                    if (scale[j] == Double.POSITIVE_INFINITY) {
                        du[j][i] = low[j] + (high[j] - low[j]) * u[k][i];
                        volume *= high[j] - low[j];
                        continue;
                    }
                    double vA = asinh(low[j] / scale[j]);
                    double vB = asinh(high[j] / scale[j]);
                    double v = vA + (vB - vA) * u[k][i];
                    double sinh = sinh(v);
                    du[j][i] = lambda * scale[j] * sinh;
                    volume *= lambda * scale[j] * cosh(sinh) * (vB - vA);
                }
                jacobian[i] = volume;
            }
        }
    }
}

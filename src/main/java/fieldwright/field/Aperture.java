package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.integral.Cubature;
import fieldwright.integral.Integrand;
import fieldwright.quantity.AuthorException;

/**
 * A surface as seen from a place: the solid angle Ω = ∫ n·d/|d|³ dA (sr), positive where the normal points away from the place; a point
 * charge q there sends the flux qΩ/4π through it.
 * The parameters are cut at the nearest point into triangles with their tip there, radii mapped by a hyperbolic sine as wide as the gap
 * (Johnston and Elliott 2005, after Duffy 1982).
 */
final class Aperture {
    private static final double GOAL = 1e-12;
    private static final int MOST = 200_000;
    private static final int SIDE = 9;

    private final List<Domain> parts;
    private final List<double[][]> lattices = new ArrayList<>();
    private double[] tip;
    private double[] from;
    private double gap;

    Aperture(List<Domain> parts) {
        this.parts = parts;
        for (Domain part : parts) {
            double[][] places = new double[SIDE * SIDE][];
            for (int i = 0; i < places.length; i++) {
                places[i] = part.place(i % SIDE / (SIDE - 1.0), i / SIDE / (SIDE - 1.0));
            }
            lattices.add(places);
        }
    }

    /** Ω and a bound of its error. Errors: AuthorException when the place lies on the surface. */
    double[] seenFrom(double[] place) {
        from = place;
        double sum = 0;
        double error = 0;
        for (int i = 0; i < parts.size(); i++) {
            Domain part = parts.get(i);
            nearest(part, lattices.get(i));
            if (gap <= 1e-14 * (Vectors.norm(place) + part.size())) {
                throw new AuthorException(String.format(java.util.Locale.ROOT, "fluxThrough: the surface touches a line or point charge at (%.6g, %.6g, %.6g) m, where "
                    + "the flux has one value on each side. Move the surface a little to the side that is meant.", place[0], place[1], place[2]));
            }
            Cubature.Result r = Cubature.integrate(pieces(part), 1, false, new Cubature.Goal(GOAL, 1, GOAL, MOST), null);
            sum += r.value()[0];
            error += r.error()[0] + 32 * Sampler.EPS * r.magnitude()[0];
        }
        return new double[] {sum, error};
    }

    /** Parameters of the point nearest to the place: the best of a lattice, then Gauss-Newton steps that shorten the distance. */
    private void nearest(Domain part, double[][] lattice) {
        int best = 0;
        for (int i = 1; i < lattice.length; i++) {
            best = distance(lattice[i]) < distance(lattice[best]) ? i : best;
        }
        tip = new double[] {best % SIDE / (SIDE - 1.0), best / SIDE / (SIDE - 1.0)};
        gap = distance(lattice[best]);
        for (int step = 0; step < 30; step++) {
            double[] move = newton(part);
            double scale = 1;
            boolean nearer = false;
            while (scale > 1e-3 && !nearer) {
                double[] next = {inside(tip[0] - scale * move[0]), inside(tip[1] - scale * move[1])};
                double d = distance(part.place(next));
                nearer = d < gap;
                if (nearer) {
                    tip = next;
                    gap = d;
                }
                scale /= 4;
            }
            if (!nearer) {
                return;
            }
        }
    }

    private double[] newton(Domain part) {
        double[] d = Vectors.minus(part.place(tip), from);
        double[][] t = {slope(part, 0), slope(part, 1)};
        double[] g = {Vectors.dot(t[0], d), Vectors.dot(t[1], d)};
        double a = Vectors.dot(t[0], t[0]);
        double b = Vectors.dot(t[0], t[1]);
        double c = Vectors.dot(t[1], t[1]);
        for (int k = 0; k < 2; k++) {
            boolean pressed = tip[k] == 0 && g[k] > 0 || tip[k] == 1 && g[k] < 0;
            if (pressed) {
                double own = k == 0 ? c : a;
                double other = own > 0 ? g[1 - k] / own : 0;
                return k == 0 ? new double[] {0, other} : new double[] {other, 0};
            }
        }
        double det = a * c - b * b;
        if (!(det > 1e-14 * a * c)) {
            return new double[] {a > 0 ? g[0] / a : 0, c > 0 ? g[1] / c : 0};
        }
        return new double[] {(c * g[0] - b * g[1]) / det, (a * g[1] - b * g[0]) / det};
    }

    private double[] slope(Domain part, int k) {
        double h = 1e-5;
        double[] low = tip.clone();
        double[] high = tip.clone();
        low[k] = inside(tip[k] - h);
        high[k] = inside(tip[k] + h);
        double[] d = Vectors.minus(part.place(high), part.place(low));
        double width = high[k] - low[k];
        return new double[] {d[0] / width, d[1] / width, d[2] / width};
    }

    private static double inside(double t) {
        return Math.min(1, Math.max(0, t));
    }

    private double distance(double[] p) {
        return Vectors.norm(Vectors.minus(p, from));
    }

    private List<Cubature.Piece> pieces(Domain part) {
        List<Cubature.Piece> all = new ArrayList<>();
        for (int k = 0; k < 2; k++) {
            if (isCollapsed(part, 1 - k)) {
                for (double way : new double[] {-tip[k], 1 - tip[k]}) {
                    if (way != 0) {
                        all.add(Cubature.Piece.whole(new Strip(part, k, way), 10, 10));
                    }
                }
                return all;
            }
        }
        for (double u : new double[] {-tip[0], 1 - tip[0]}) {
            for (double v : new double[] {-tip[1], 1 - tip[1]}) {
                if (u != 0 && v != 0) {
                    all.add(Cubature.Piece.whole(new Triangle(part, u, v, true), 10, 10));
                    all.add(Cubature.Piece.whole(new Triangle(part, u, v, false), 10, 10));
                }
            }
        }
        return all;
    }

    /** Whether the whole line of parameter {@code k} through the tip is one point, such as the middle of a disc. */
    private boolean isCollapsed(Domain part, int k) {
        double most = 0;
        for (double t : new double[] {0.03, 0.31, 0.64, 0.93}) {
            double[] other = tip.clone();
            other[k] = t;
            most = Math.max(most, Vectors.norm(Vectors.minus(part.place(other), part.place(tip))));
        }
        return most < 1e-3 * gap;
    }

    /** Width, in parameters, over which distance grows from the gap. */
    private double width(Domain part, double[] end) {
        double length = Vectors.norm(Vectors.minus(part.place(end), part.place(tip)));
        return Math.min(10, Math.max(1e-13, length > 0 ? gap / length : 10));
    }

    private static double reach(double width) {
        double inverse = 1 / width;
        return Math.log(inverse + Math.sqrt(inverse * inverse + 1));
    }

    /** From a line that is all at one distance to an end: across it by a hyperbolic sine, along it plainly. */
    private final class Strip extends Mapped {
        private final int across;
        private final double way;
        private final double width;
        private final double reach;

        Strip(Domain part, int across, double way) {
            super(part);
            this.across = across;
            this.way = way;
            double[] end = tip.clone();
            end[across] += way;
            width = width(part, end);
            reach = reach(width);
        }

        @Override
        void map(double[][] s, int n) {
            for (int i = 0; i < n; i++) {
                double r = width * Math.sinh(s[0][i] * reach);
                t[across][i] = tip[across] + r * way;
                t[1 - across][i] = s[1][i];
                size[i] = width * Math.cosh(s[0][i] * reach) * reach * Math.abs(way);
            }
        }
    }

    /** Half of the rectangle from the tip to the corner (u, v) away: radius, then the way along the far side. */
    private final class Triangle extends Mapped {
        private final double u;
        private final double v;
        private final boolean alongV;
        private final double width;
        private final double reach;

        Triangle(Domain part, double u, double v, boolean alongV) {
            super(part);
            this.u = u;
            this.v = v;
            this.alongV = alongV;
            width = width(part, alongV ? new double[] {tip[0] + u, tip[1]} : new double[] {tip[0], tip[1] + v});
            reach = reach(width);
        }

        @Override
        void map(double[][] s, int n) {
            for (int i = 0; i < n; i++) {
                double r = width * Math.sinh(s[0][i] * reach);
                double q = s[1][i];
                t[0][i] = tip[0] + r * u * (alongV ? 1 : q);
                t[1][i] = tip[1] + r * v * (alongV ? q : 1);
                size[i] = width * Math.cosh(s[0][i] * reach) * reach * r * Math.abs(u * v);
            }
        }
    }

    private abstract class Mapped implements Integrand {
        private final Domain part;
        final double[][] t = new double[2][BLOCK];
        final double[] size = new double[BLOCK];
        private final double start = Math.abs(from[0]) + Math.abs(from[1]) + Math.abs(from[2]);

        Mapped(Domain part) {
            this.part = part;
        }

        /** Fills the parameters {@link #t} and the {@link #size} of the mapped element. */
        abstract void map(double[][] s, int n);

        private double area(int i) {
            return Vectors.norm(new double[] {part.element[0][i], part.element[1][i], part.element[2][i]});
        }

        @Override
        public int dimension() {
            return 2;
        }

        @Override
        public int components() {
            return 1;
        }

        @Override
        public void evaluate(double[][] s, int n, double[][] out, double[] noise) {
            map(s, n);
            part.elements(t, n);
            for (int i = 0; i < n; i++) {
                double x = part.place[0][i] - from[0];
                double y = part.place[1][i] - from[1];
                double z = part.place[2][i] - from[2];
                double d = Math.sqrt(x * x + y * y + z * z);
                out[0][i] = (part.element[0][i] * x + part.element[1][i] * y + part.element[2][i] * z) / d / d / d * size[i];
                double reach = Math.abs(part.place[0][i]) + Math.abs(part.place[1][i]) + Math.abs(part.place[2][i]) + start;
                noise[i] = Math.abs(size[i]) * area(i) / d / d * 2 * Sampler.EPS * reach / d;   // both places are known to their rounding
            }
        }
    }
}

package fieldwright.field.search;

import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Stop;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.apache.commons.math3.analysis.UnivariateFunction;
import org.apache.commons.math3.analysis.solvers.BrentSolver;
import org.apache.commons.math3.exception.NoBracketingException;
import org.apache.commons.math3.exception.TooManyEvaluationsException;

/**
 * Where a function of two coordinates takes a level: equipotentials, lines of equal field strength.
 *
 * <p>Marching squares on an even grid find the lines, Brent's method puts each crossing of a grid line onto the level, and chords are
 * halved until their middles lie within the tolerance of it. A closed line smaller than one square of the grid can be missed. Where the
 * function is not a number (on a charge) the lines are left out.
 *
 * @param level  of the function
 * @param lines  each with its u and v; a closed line ends where it began
 * @param within greatest distance found between the middle of a chord and the line, in the unit of u and v
 */
public record Contours(double level, List<Line> lines, double within) {
    /** Corners of one line. */
    public record Line(double[] u, double[] v) {
        public Line {
            u = u.clone();
            v = v.clone();
        }

        public boolean isClosed() {
            return u.length > 2 && u[0] == u[u.length - 1] && v[0] == v[v.length - 1];
        }
    }

    /** A function of two coordinates; NaN where it has no value. */
    public interface Plane {
        double at(double u, double v);

        /** Many values at once. */
        default double[] at(double[] u, double[] v) {
            double[] values = new double[u.length];
            for (int i = 0; i < u.length; i++) {
                values[i] = at(u[i], v[i]);
            }
            return values;
        }
    }

    /** Chord to line, of the longer side of the window. */
    private static final double TOLERANCE = 5e-4;
    private static final double ON_LEVEL = 1e-9;
    private static final int HALVINGS = 8;

    /**
     * Contours at several levels over one window; {@code squares} along each side.
     * Errors: AuthorException for a window without size.
     */
    public static List<Contours> of(Plane f, double u0, double u1, double v0, double v1, int squares, double[] levels) {
        if (!(u1 > u0) || !(v1 > v0) || Double.isInfinite(u1 - u0) || Double.isInfinite(v1 - v0)) {
            throw new AuthorException("contours over a window from (" + u0 + ", " + v0 + ") to (" + u1 + ", " + v1
                + "): each side must run from the lower to the higher number, both finite.");
        }
        Grid grid = new Grid(f, u0, u1, v0, v1, squares);
        List<Contours> all = new ArrayList<>();
        for (double level : levels) {
            Stop.check();
            all.add(new Tracing(f, grid, level).contours());
        }
        return all;
    }

    private static final class Grid {
        final int n;
        final double[] u;
        final double[] v;
        final double[] value;
        final double side;

        Grid(Plane f, double u0, double u1, double v0, double v1, int squares) {
            n = squares + 1;
            u = new double[n * n];
            v = new double[n * n];
            for (int j = 0; j < n; j++) {
                for (int i = 0; i < n; i++) {
                    u[j * n + i] = i == squares ? u1 : u0 + (u1 - u0) * i / squares;
                    v[j * n + i] = j == squares ? v1 : v0 + (v1 - v0) * j / squares;
                }
            }
            value = f.at(u, v);
            side = Math.max(u1 - u0, v1 - v0);
        }
    }

    /** Lines of one level. A crossing is known by its grid line: 2·node for the one to the right, 2·node + 1 for the one upwards. */
    private static final class Tracing {
        private final Plane f;
        private final Grid grid;
        private final double level;
        private final Map<Integer, double[]> crossing = new HashMap<>();
        private final Map<Integer, List<Integer>> next = new java.util.LinkedHashMap<>();
        private double worst;

        Tracing(Plane f, Grid grid, double level) {
            this.f = f;
            this.grid = grid;
            this.level = level;
        }

        Contours contours() {
            for (int j = 0; j + 1 < grid.n; j++) {
                for (int i = 0; i + 1 < grid.n; i++) {
                    square(j * grid.n + i);
                }
            }
            List<Line> lines = new ArrayList<>();
            for (boolean ends : new boolean[] {true, false}) {
                for (int start : List.copyOf(next.keySet())) {
                    int left = next.get(start).size();
                    if (left == 1 || !ends && left > 0) {
                        lines.add(smooth(chain(start)));
                    }
                }
            }
            return new Contours(level, lines, worst);
        }

        private boolean above(int node) {
            return grid.value[node] >= level;
        }

        /** Joins the crossings of a square's sides; two lines through one square are told apart by its middle. */
        private void square(int a) {
            int n = grid.n;
            int[] corner = {a, a + 1, a + n + 1, a + n};
            int[] side = {2 * a, 2 * (a + 1) + 1, 2 * (a + n), 2 * a + 1};
            List<Integer> cut = new ArrayList<>();
            for (int k = 0; k < 4; k++) {
                if (Double.isNaN(grid.value[corner[k]])) {
                    return;
                }
                if (above(corner[k]) != above(corner[(k + 1) % 4])) {
                    cut.add(k);
                }
            }
            if (cut.size() == 2) {
                join(side[cut.get(0)], side[cut.get(1)]);
            } else if (cut.size() == 4) {
                double middle = f.at(0.5 * (grid.u[a] + grid.u[a + n + 1]), 0.5 * (grid.v[a] + grid.v[a + n + 1]));
                boolean together = middle >= level == above(corner[0]);
                join(side[0], together ? side[1] : side[3]);
                join(side[2], together ? side[3] : side[1]);
            }
        }

        private void join(int a, int b) {
            double[] p = crossing.computeIfAbsent(a, this::cross);
            double[] q = crossing.computeIfAbsent(b, this::cross);
            if (p.length > 0 && q.length > 0) {
                next.computeIfAbsent(a, k -> new ArrayList<>()).add(b);
                next.computeIfAbsent(b, k -> new ArrayList<>()).add(a);
            }
        }

        /** The place on a grid line where the level is taken; empty where the function jumps over it. */
        private double[] cross(int line) {
            int a = line / 2;
            int b = line % 2 == 0 ? a + 1 : a + grid.n;
            double[] p = between(grid.u[a], grid.v[a], grid.value[a], grid.u[b], grid.v[b], grid.value[b]);
            return p == null ? new double[0] : p;
        }

        private double[] between(double ua, double va, double fa, double ub, double vb, double fb) {
            double t = root(s -> f.at(ua + s * (ub - ua), va + s * (vb - va)) - level, fa - level, fb - level);
            return Double.isNaN(t) ? null : new double[] {ua + t * (ub - ua), va + t * (vb - va)};
        }

        /** On [0, 1], between values at the ends; NaN where there is none or the function has no value on the way. */
        private static double root(UnivariateFunction g, double atZero, double atOne) {
            if (atZero == 0 || atOne == 0) {
                return atZero == 0 ? 0 : 1;
            }
            if (!(atZero * atOne < 0)) {
                return Double.NaN;
            }
            try {
                double t = new BrentSolver(1e-10, ON_LEVEL, 0).solve(100, g, 0, 1);
                double here = g.value(t);
                return Math.abs(here) <= 1e-3 * (Math.abs(atZero) + Math.abs(atOne)) ? t : Double.NaN;
            } catch (NoBracketingException | TooManyEvaluationsException none) {
                return Double.NaN;
            }
        }

        private List<double[]> chain(int start) {
            List<double[]> line = new ArrayList<>();
            int at = start;
            line.add(crossing.get(at));
            while (!next.get(at).isEmpty()) {
                int to = next.get(at).remove(0);
                next.get(to).remove((Integer) at);
                line.add(crossing.get(to));
                at = to;
            }
            return line;
        }

        private Line smooth(List<double[]> corners) {
            List<double[]> fine = new ArrayList<>();
            fine.add(corners.get(0));
            for (int i = 0; i + 1 < corners.size(); i++) {
                halve(corners.get(i), corners.get(i + 1), HALVINGS, fine);
            }
            return new Line(fine.stream().mapToDouble(p -> p[0]).toArray(), fine.stream().mapToDouble(p -> p[1]).toArray());
        }

        /** Adds the way from p to q, q among it: through the place of the line beside the chord's middle when that is too far off. */
        private void halve(double[] p, double[] q, int left, List<double[]> fine) {
            double[] middle = {0.5 * (p[0] + q[0]), 0.5 * (p[1] + q[1])};
            double[] beside = beside(p, q, middle);
            double off = beside == null ? 0.5 * Math.hypot(q[0] - p[0], q[1] - p[1]) : Math.hypot(beside[0] - middle[0], beside[1] - middle[1]);
            if (off > TOLERANCE * grid.side && left > 0 && beside != null) {
                halve(p, beside, left - 1, fine);
                halve(beside, q, left - 1, fine);
                return;
            }
            worst = Math.max(worst, off);
            fine.add(q);
        }

        /** Where the level is taken on the line square to the chord through its middle, at most a half chord away; null when nowhere. */
        private double[] beside(double[] p, double[] q, double[] m) {
            double du = -(q[1] - p[1]);
            double dv = q[0] - p[0];
            double here = f.at(m[0], m[1]);
            for (double reach = 0.01; reach <= 0.5; reach *= 3.5) {
                for (double way : new double[] {reach, -reach}) {
                    double[] far = {m[0] + way * du, m[1] + way * dv};
                    double there = f.at(far[0], far[1]);
                    if ((here - level) * (there - level) <= 0) {
                        return between(m[0], m[1], here, far[0], far[1], there);
                    }
                }
            }
            return null;
        }
    }

    /** Corners of all lines, one after another. */
    public int corners() {
        return lines.stream().mapToInt(l -> l.u().length).sum();
    }

    /** All u or v of the lines in turn, a NaN between two lines: as a chart draws them. */
    public double[] joined(boolean second) {
        double[] all = new double[corners() + Math.max(0, lines.size() - 1)];
        int at = 0;
        for (Line line : lines) {
            if (at > 0) {
                all[at++] = Double.NaN;
            }
            double[] part = second ? line.v() : line.u();
            System.arraycopy(part, 0, all, at, part.length);
            at += part.length;
        }
        return Arrays.copyOf(all, at);
    }
}

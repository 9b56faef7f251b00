package fieldwright.field;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

import fieldwright.charge.Source;
import fieldwright.integral.Cubature;
import fieldwright.integral.Estimate;
import fieldwright.integral.Integrand;
import fieldwright.integral.SparingCubature;
import fieldwright.quantity.Stop;

/**
 * Sum over a line, surface or volume of something asked of a field at each of its places.
 *
 * <p>What is asked is smooth but for surfaces the domain crosses or ends on. Crossings are found beforehand and the domain is cut there:
 * a line at its roots; a surface into cells between curves of roots, each mapped onto a square; a volume where a surface crosses it at
 * one value of a parameter. Towards cuts and ends nodes are graded by t²(3 − 2t), which flattens the weak singularities
 * (roots, logarithms) that fields have at faces and edges (Sidi 1993 for such maps). Refinement, error and limit are those of {@link SparingCubature};
 * the error of what was asked is integrated beside it and added.
 */
final class Sweep {
    /** Something at a place for an element (charge, path or area); fills {@code value}, returns a bound of its error (norm). */
    interface Asked {
        double at(double[] place, double[] element, double[] value);
    }

    /** Integral by component, the error of the sum, that carried by what was asked, the sum of absolute contributions. */
    record Result(double[] value, double error, double carried, double magnitude, int places, Estimate.Status status) { }

    private final Asked asked;
    private final int components;
    private final Crossings crossings;
    private final boolean graded;
    private final List<Cubature.Piece> pieces = new ArrayList<>();

    private Sweep(Asked asked, int components, Crossings crossings, boolean graded) {
        this.asked = asked;
        this.components = components;
        this.crossings = crossings;
        this.graded = graded;
    }

    /**
     * @param crossings surfaces at which what is asked may bend or jump
     * @param graded whether it may also be singular at the domain's own ends
     */
    static Result over(List<Domain> domains, Asked asked, int components, Crossings crossings, boolean graded, Cubature.Goal goal) {
        Sweep sweep = new Sweep(asked, components, crossings, graded);
        for (Domain domain : domains) {
            sweep.cut(domain);
        }
        Cubature.Result r = SparingCubature.integrate(sweep.pieces, components + 1, goal);
        double magnitude = 0;
        for (int c = 0; c < components; c++) {
            magnitude += r.magnitude()[c] * r.magnitude()[c];
        }
        magnitude = Math.sqrt(magnitude);
        return new Result(java.util.Arrays.copyOf(r.value(), components), r.error()[0] + ROUNDING * magnitude, r.value()[components], magnitude,
            r.evaluations(), r.status());
    }

    /** The same sum over the points of a point charge or a cloud, added to {@code sum}; returns how many there are. */
    static int overPoints(Source points, Asked asked, double sign, Tally sum) {
        List<Elements.Point> all = Elements.points(points);
        double[] value = new double[sum.size()];
        for (Elements.Point point : all) {
            Stop.check();
            double error = asked.at(point.at(), new double[] {point.charge(), 0, 0}, value);
            sum.add(sign, value, 0, error + point.relative() * Tally.norm(value), 0);
        }
        return all.size();
    }

    private void cut(Domain domain) {
        switch (domain.dimension()) {
            case 1 -> line(domain);
            case 2 -> surface(domain);
            default -> volume(domain);
        }
    }

    private void line(Domain domain) {
        double[] breaks = domain.breaks(0);
        for (int i = 0; i + 1 < breaks.length; i++) {
            double from = breaks[i];
            for (Crossings.Root root : crossings.along(domain::place, breaks[i], breaks[i + 1])) {
                box(domain, new double[] {from}, new double[] {root.at()});
                from = root.at();
            }
            box(domain, new double[] {from}, new double[] {breaks[i + 1]});
        }
    }

    private void box(Domain domain, double[] from, double[] to) {
        int d = from.length;
        int[] orders = new int[d];
        boolean towardsEnds = graded || !crossings.isEmpty();
        java.util.Arrays.fill(orders, towardsEnds ? GRADED_ORDER : PLAIN_ORDER);
        pieces.add(Cubature.Piece.whole(new Box(domain, from, to, towardsEnds), orders));
    }

    // ---- volumes

    private void volume(Domain domain) {
        double[][] cuts = new double[3][];
        for (int k = 0; k < 3; k++) {
            cuts[k] = levels(domain, k);
        }
        for (int i = 0; i + 1 < cuts[0].length; i++) {
            for (int j = 0; j + 1 < cuts[1].length; j++) {
                for (int k = 0; k + 1 < cuts[2].length; k++) {
                    double[] from = {cuts[0][i], cuts[1][j], cuts[2][k]};
                    double[] to = {cuts[0][i + 1], cuts[1][j + 1], cuts[2][k + 1]};
                    box(domain, from, to);
                }
            }
        }
    }

    /** Breaks of the density and parameters at which a margin is zero all over the level. */
    private double[] levels(Domain domain, int depth) {
        java.util.TreeSet<Double> found = new java.util.TreeSet<>();
        for (double b : domain.breaks(depth)) {
            found.add(b);
        }
        if (!crossings.isEmpty()) {
            double[][] others = {{0.23, 0.31}, {0.57, 0.79}, {0.87, 0.13}};
            List<List<Crossings.Root>> roots = new ArrayList<>();
            for (double[] other : others) {
                roots.add(crossings.along(s -> domain.place(inserted(other, depth, s)), 0, 1));
            }
            for (Crossings.Root root : roots.get(0)) {
                if (roots.get(1).stream().anyMatch(r -> same(r, root)) && roots.get(2).stream().anyMatch(r -> same(r, root))) {
                    found.add(root.at());
                }
            }
        }
        return found.stream().mapToDouble(Double::doubleValue).toArray();
    }

    private static boolean same(Crossings.Root a, Crossings.Root b) {
        return a.which() == b.which() && Math.abs(a.at() - b.at()) < 1e-12;
    }

    private static double[] inserted(double[] other, int depth, double value) {
        double[] t = new double[3];
        int next = 0;
        for (int k = 0; k < 3; k++) {
            t[k] = k == depth ? value : other[next++];
        }
        return t;
    }

    // ---- surfaces

    private void surface(Domain domain) {
        double[] u = domain.breaks(0);
        double[] v = domain.breaks(1);
        for (int i = 0; i + 1 < u.length; i++) {
            for (int j = 0; j + 1 < v.length; j++) {
                if (crossings.isEmpty()) {
                    box(domain, new double[] {u[i], v[j]}, new double[] {u[i + 1], v[j + 1]});
                } else {
                    cells(new Roots(domain, v[j], v[j + 1]), u[i], u[i + 1]);
                }
            }
        }
    }

    /** Of element, density and summation together, as a part of the sum of absolute contributions. */
    private static final double ROUNDING = 16 * 1.2e-16;
    private static final int PLAIN_ORDER = 6;
    /** Graded nodes stand for polynomials of higher degree. */
    private static final int GRADED_ORDER = 10;
    /** There are many cells, some of them small. */
    private static final int CELL_ORDER = 7;
    private static final int LOOKS = 32;
    private static final int MOST_CUTS = 100;

    private void cells(Roots roots, double from, double to) {
        List<Double> cuts = new ArrayList<>(List.of(from));
        double before = from + 1e-9 * (to - from);
        for (int i = 1; i <= LOOKS; i++) {
            double next = i == LOOKS ? to - 1e-9 * (to - from) : from + (to - from) * i / LOOKS;
            changes(roots, before, roots.key(before), next, roots.key(next), 1e-13 * (to - from), cuts);
            before = next;
        }
        cuts.add(to);
        for (int i = 0; i + 1 < cuts.size(); i++) {
            int strips = roots.at((cuts.get(i) + cuts.get(i + 1)) / 2).length - 1;
            boolean alone = !graded && strips == 1 && cuts.size() == 2;
            int order = alone ? PLAIN_ORDER : CELL_ORDER;
            for (int strip = 0; strip < strips; strip++) {
                pieces.add(Cubature.Piece.whole(new Cell(roots, cuts.get(i), cuts.get(i + 1), strip, strips, !alone), order, order));
            }
        }
    }

    /** Parameters at which the order of roots changes, by bisection. */
    private static void changes(Roots roots, double a, List<Integer> keyA, double b, List<Integer> keyB, double least, List<Double> cuts) {
        if (keyA.equals(keyB) || cuts.size() >= MOST_CUTS) {
            return;
        }
        double middle = (a + b) / 2;
        if (b - a <= least) {
            if (middle - cuts.get(cuts.size() - 1) > 4 * least) {
                cuts.add(middle);
            }
            return;
        }
        List<Integer> key = roots.key(middle);
        changes(roots, a, keyA, middle, key, least, cuts);
        changes(roots, middle, key, b, keyB, least, cuts);
    }

    /** Crossings along the second parameter of a surface, by the first. */
    private final class Roots {
        private final Domain domain;
        private final double from;
        private final double to;
        private final Map<Double, double[]> known = new HashMap<>();

        Roots(Domain domain, double from, double to) {
            this.domain = domain;
            this.from = from;
            this.to = to;
        }

        /** Ends of the strips at u, in order. */
        double[] at(double u) {
            return known.computeIfAbsent(u, this::find);
        }

        private double[] find(double u) {
            List<Crossings.Root> roots = crossings.along(v -> domain.place(u, v), from, to);
            double[] ends = new double[roots.size() + 2];
            ends[0] = from;
            for (int i = 0; i < roots.size(); i++) {
                ends[i + 1] = roots.get(i).at();
            }
            ends[ends.length - 1] = to;
            return ends;
        }

        /** Which margins are crossed in which order, and on which side of each the first strip lies. */
        List<Integer> key(double u) {
            List<Crossings.Root> roots = crossings.along(v -> domain.place(u, v), from, to);
            double first = roots.isEmpty() ? to : roots.get(0).at();
            double[] p = domain.place(u, (from + first) / 2);
            List<Integer> key = new ArrayList<>();
            for (int m = 0; m < crossings.count(); m++) {
                key.add(-3 - crossings.side(m, p));
            }
            roots.forEach(r -> key.add(r.which()));
            return key;
        }
    }

    // ---- integrands

    private static double grade(double t) {
        return t * t * (3 - 2 * t);
    }

    private static double slope(double t) {
        return 6 * t * (1 - t);
    }

    private abstract class Part implements Integrand {
        final Domain domain;
        final boolean towardsEnds;
        final double[][] t;
        final double[] width = new double[BLOCK];
        private final double[] place = new double[3];
        private final double[] element = new double[3];
        private final double[] value = new double[components];

        Part(Domain domain, boolean towardsEnds) {
            this.domain = domain;
            this.towardsEnds = towardsEnds;
            t = new double[domain.dimension()][BLOCK];
        }

        /** Fills {@link #t} and {@link #width}, the size of the mapped element. */
        abstract void map(double[][] u, int n);

        @Override
        public int dimension() {
            return domain.dimension();
        }

        @Override
        public int components() {
            return components + 1;
        }

        @Override
        public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
            map(u, n);
            domain.elements(t, n);
            for (int i = 0; i < n; i++) {
                double size = 0;
                for (int a = 0; a < 3; a++) {
                    place[a] = domain.place[a][i];
                    element[a] = domain.element[a][i] * width[i];
                    size += Math.abs(element[a]);
                }
                double error = size == 0 ? 0 : asked.at(place, element, value);
                for (int c = 0; c < components; c++) {
                    out[c][i] = size == 0 ? 0 : value[c];
                }
                out[components][i] = error;
            }
        }
    }

    /** A box of parameters. */
    private final class Box extends Part {
        private final double[] from;
        private final double[] to;

        Box(Domain domain, double[] from, double[] to, boolean towardsEnds) {
            super(domain, towardsEnds);
            this.from = from;
            this.to = to;
        }

        @Override
        void map(double[][] u, int n) {
            java.util.Arrays.fill(width, 0, n, 1);
            for (int k = 0; k < from.length; k++) {
                for (int i = 0; i < n; i++) {
                    double s = u[k][i];
                    t[k][i] = from[k] + (to[k] - from[k]) * (towardsEnds ? grade(s) : s);
                    width[i] *= (to[k] - from[k]) * (towardsEnds ? slope(s) : 1);
                }
            }
        }
    }

    /** A strip of a surface between two curves of roots. */
    private final class Cell extends Part {
        private final Roots roots;
        private final double from;
        private final double to;
        private final int strip;
        private final int strips;

        Cell(Roots roots, double from, double to, int strip, int strips, boolean towardsEnds) {
            super(roots.domain, towardsEnds);
            this.roots = roots;
            this.from = from;
            this.to = to;
            this.strip = strip;
            this.strips = strips;
        }

        @Override
        void map(double[][] u, int n) {
            for (int i = 0; i < n; i++) {
                double s = towardsEnds ? grade(u[0][i]) : u[0][i];
                double r = towardsEnds ? grade(u[1][i]) : u[1][i];
                double first = from + (to - from) * s;
                double[] ends = roots.at(first);
                double low = end(ends, strip);
                double high = end(ends, strip + 1);
                t[0][i] = first;
                t[1][i] = low + (high - low) * r;
                width[i] = (to - from) * (high - low) * (towardsEnds ? slope(u[0][i]) * slope(u[1][i]) : 1);
            }
        }

        /** Close to a change of order a pair of roots may be lost or gained: strips still cover all, some empty. */
        private double end(double[] ends, int k) {
            return k >= strips ? ends[ends.length - 1] : ends[Math.min(k, ends.length - 1)];
        }
    }
}

package fieldwright.integral;

import java.util.ArrayList;
import java.util.List;
import java.util.PriorityQueue;

import fieldwright.quantity.Stop;

/**
 * Adaptive integration of several pieces at once: the piece with the largest error is halved, along the direction that
 * is resolved worst, until the error of the sum is small enough.
 * Components may be grouped (three of a vector): a group is judged by the norm of its value.
 * Errors of pieces are added, never averaged.
 */
public final class Cubature {

    /** One smooth piece: a box within an integrand's unit box and the Gauss orders it starts with. */
    public record Piece(Integrand integrand, double[] from, double[] to, int[] orders) {
        public static Piece whole(Integrand integrand, int... orders) {
            int d = integrand.dimension();
            double[] to = new double[d];
            java.util.Arrays.fill(to, 1);
            return new Piece(integrand, new double[d], to, orders);
        }
    }

    /** Adds a piece for each box between the cuts of every direction, the first direction fastest. */
    public static void addBetween(Integrand f, double[][] cuts, int[] orders, List<Piece> pieces) {
        int d = cuts.length;
        int[] index = new int[d];
        while (true) {
            double[] from = new double[d];
            double[] to = new double[d];
            for (int k = 0; k < d; k++) {
                from[k] = cuts[k][index[k]];
                to[k] = cuts[k][index[k] + 1];
            }
            pieces.add(new Piece(f, from, to, orders));
            int k = 0;
            while (k < d && ++index[k] == cuts[k].length - 1) {
                index[k++] = 0;
            }
            if (k == d) {
                return;
            }
        }
    }

    /**
     * What is asked: error at most {@code relative}·|value| or {@code relative}·{@code smallest}·(sum of absolute
     * contributions) or {@code absolute}, whichever is largest.
     */
    public record Goal(double relative, double smallest, double absolute, int maxEvaluations) { }

    /** Value and error per component; {@code magnitude} is the sum of absolute contributions. */
    public record Result(double[] value, double[] error, double[] magnitude, int evaluations, Estimate.Status status) {
        public boolean isConverged() {
            return status == Estimate.Status.CONVERGED;
        }

        public Estimate estimate(int component) {
            return new Estimate(value[component], error[component], evaluations, status);
        }
    }

    private static final double UNIT_ROUNDOFF = 1.2e-16;
    private static final int DEEPEST = 60;
    private static final int STALLED = 12;

    private final int components;
    private final boolean grouped;
    private final Goal goal;
    private final double[] start;
    private final Scratch scratch;
    private int evaluations;

    private Cubature(int components, boolean grouped, Goal goal, double[] start, Scratch scratch) {
        this.components = components;
        this.grouped = grouped;
        this.goal = goal;
        this.start = start;
        this.scratch = scratch;
    }

    /** Arrays for one integration at a time, of up to three components; may be used again. */
    public static final class Scratch {
        private final double[][] u = new double[3][Integrand.BLOCK];
        private final double[][] out;
        private final double[] noise = new double[Integrand.BLOCK];
        private final double[][][] marginal;

        public Scratch() {
            this(3);
        }

        private Scratch(int components) {
            out = new double[components][Integrand.BLOCK];
            marginal = new double[3][components][GaussLegendre.MAX_ORDER];
        }
    }

    /**
     * Integrates the sum of the pieces plus the constant {@code start} (may be null).
     * Errors: none thrown for a bad integrand; a value that is not a number gives status NOT_A_NUMBER.
     */
    public static Result integrate(List<Piece> pieces, int components, boolean grouped, Goal goal, double[] start) {
        return integrate(pieces, components, grouped, goal, start, new Scratch(components));
    }

    /** As above, with arrays of the caller's. */
    public static Result integrate(List<Piece> pieces, int components, boolean grouped, Goal goal, double[] start, Scratch scratch) {
        return new Cubature(components, grouped, goal, start, scratch).run(pieces);
    }

    private static final class Panel {
        Piece piece;
        double[] value;
        double[] error;
        double[] magnitude;
        double worst;
        double floor;
        int direction;
        int depth;
        double[] byDirection;
        double[] decay;
        boolean raised;
        /** The piece is all of its integrand's unit box. */
        boolean whole;
        /** Halvings in a row that did not help. */
        int stalled;
    }

    /** Orders a piece starts with at most; the decay found there tells what it needs. */
    private static final int[] START = {0, 10, 8, 6};
    private static final int MOST = 24;
    /** Over what part of an order the decay of coefficients is carried on: half is the rule's own. */
    private static final double[] CARRY = {0, 0.4, 0.45, 0.4};

    private Result run(List<Piece> pieces) {
        PriorityQueue<Panel> heap = new PriorityQueue<>(Math.max(1, pieces.size()), (a, b) -> Double.compare(b.worst, a.worst));
        List<Panel> done = new ArrayList<>();
        double[] value = new double[components];
        double[] error = new double[components];
        double[] magnitude = new double[components];
        if (start != null) {
            for (int c = 0; c < components; c++) {
                value[c] = start[c];
                magnitude[c] = Math.abs(start[c]);
                error[c] = 2 * UNIT_ROUNDOFF * magnitude[c];
            }
        }
        for (Piece piece : pieces) {
            Panel panel = work(start(piece), 0);
            heap.add(panel);
            add(panel, 1, value, error, magnitude);
        }
        Estimate.Status status = Estimate.Status.CONVERGED;
        int sinceExact = 0;
        while (!heap.isEmpty()) {
            if (!finite(value)) {
                status = Estimate.Status.NOT_A_NUMBER;
                break;
            }
            if (goodEnough(value, error, magnitude)) {
                break;
            }
            Panel panel = heap.poll();
            if (panel.worst <= panel.floor || panel.depth >= DEEPEST || panel.stalled > STALLED) {
                done.add(panel);
                continue;
            }
            if (evaluations >= goal.maxEvaluations) {
                heap.add(panel);
                status = Estimate.Status.EVALUATION_LIMIT;
                break;
            }
            Stop.check();
            add(panel, -1, value, error, magnitude);
            int[] higher = panel.raised ? null : higher(panel, 0.3 * allowed(value, magnitude) / Math.max(4, heap.size()));
            if (higher != null) {
                Panel again = work(new Piece(panel.piece.integrand, panel.piece.from, panel.piece.to, higher), panel.depth);
                again.raised = true;
                heap.add(again);
                add(again, 1, value, error, magnitude);
                continue;
            }
            Panel low = work(half(panel, true), panel.depth + 1);
            Panel high = work(half(panel, false), panel.depth + 1);
            int stalled = low.worst + high.worst > 0.9 * panel.worst ? panel.stalled + 1 : 0;
            low.stalled = stalled;
            high.stalled = stalled;
            heap.add(low);
            heap.add(high);
            add(low, 1, value, error, magnitude);
            add(high, 1, value, error, magnitude);
            if (++sinceExact >= 32) {
                sinceExact = 0;
                sum(heap, done, value, error, magnitude);
            }
        }
        sum(heap, done, value, error, magnitude);
        if (status == Estimate.Status.CONVERGED) {
            if (!finite(value)) {
                status = Estimate.Status.NOT_A_NUMBER;
            } else if (!goodEnough(value, error, magnitude)) {
                status = Estimate.Status.ROUNDOFF;
            }
        }
        return new Result(value, error, magnitude, evaluations, status);
    }

    /** What the whole may be wrong by. */
    private double allowed(double[] value, double[] magnitude) {
        if (grouped) {
            return allowed(norm(value), norm(magnitude));
        }
        double least = Double.POSITIVE_INFINITY;
        for (int c = 0; c < components; c++) {
            least = Math.min(least, allowed(Math.abs(value[c]), magnitude[c]));
        }
        return least;
    }

    /** Orders that bring every direction below {@code target} if coefficients go on to decay as they do; null when halving is better. */
    private static int[] higher(Panel panel, double target) {
        int[] orders = panel.piece.orders.clone();
        double before = 1;
        double after = 1;
        for (int d = 0; d < orders.length; d++) {
            before *= orders[d];
            double e = panel.byDirection[d];
            if (e > target) {
                double more = Math.log(e / target) / -Math.log(panel.decay[d]);
                if (!(panel.decay[d] < 0.72) || orders[d] + more > MOST) {
                    return null;
                }
                orders[d] = (int) Math.ceil(orders[d] + more) + 1;
            }
            after *= orders[d];
        }
        return after > before ? orders : null;
    }

    private void sum(Iterable<Panel> heap, Iterable<Panel> done, double[] value, double[] error, double[] magnitude) {
        for (int c = 0; c < components; c++) {
            value[c] = start == null ? 0 : start[c];
            magnitude[c] = Math.abs(value[c]);
            error[c] = 2 * UNIT_ROUNDOFF * magnitude[c];
        }
        for (Panel panel : heap) {
            add(panel, 1, value, error, magnitude);
        }
        for (Panel panel : done) {
            add(panel, 1, value, error, magnitude);
        }
    }

    private void add(Panel panel, int sign, double[] value, double[] error, double[] magnitude) {
        for (int c = 0; c < components; c++) {
            value[c] += sign * panel.value[c];
            error[c] += sign * panel.error[c];
            magnitude[c] += sign * panel.magnitude[c];
        }
    }

    private static Piece start(Piece piece) {
        int[] orders = piece.orders.clone();
        for (int d = 0; d < orders.length; d++) {
            orders[d] = Math.max(piece.integrand.leastOrder(d), Math.min(orders[d], START[orders.length]));
        }
        return new Piece(piece.integrand, piece.from, piece.to, orders);
    }

    private static boolean finite(double[] value) {
        for (double v : value) {
            if (!Double.isFinite(v)) {
                return false;
            }
        }
        return true;
    }

    private boolean goodEnough(double[] value, double[] error, double[] magnitude) {
        if (grouped) {
            return norm(error) <= allowed(norm(value), norm(magnitude));
        }
        for (int c = 0; c < components; c++) {
            if (!(error[c] <= allowed(Math.abs(value[c]), magnitude[c]))) {
                return false;
            }
        }
        return true;
    }

    private double allowed(double value, double magnitude) {
        return Math.max(goal.absolute, goal.relative * Math.max(value, goal.smallest * magnitude));
    }

    private static double norm(double[] v) {
        double sum = 0;
        for (double x : v) {
            sum += x * x;
        }
        return Math.sqrt(sum);
    }

    private static Piece half(Panel panel, boolean low) {
        Piece p = panel.piece;
        if (panel.whole) {
            Integrand half = p.integrand.half(panel.direction, low);
            if (half != null) {
                return start(new Piece(half, p.from, p.to, p.orders));
            }
        }
        double[] from = p.from.clone();
        double[] to = p.to.clone();
        double middle = (from[panel.direction] + to[panel.direction]) / 2;
        if (low) {
            to[panel.direction] = middle;
        } else {
            from[panel.direction] = middle;
        }
        return start(new Piece(p.integrand, from, to, p.orders));
    }

    /** Value, error and worst direction of one box. */
    private Panel work(Piece piece, int depth) {
        TensorRule rule = TensorRule.of(piece.orders);
        int dimension = piece.orders.length;
        double[][][] marginal = scratch.marginal;
        double[][] out = scratch.out;
        double[] noise = scratch.noise;
        double volume = 1;
        boolean whole = true;
        for (int d = 0; d < dimension; d++) {
            volume *= piece.to[d] - piece.from[d];
            whole &= piece.from[d] == 0 && piece.to[d] == 1;
            for (int c = 0; c < components; c++) {
                java.util.Arrays.fill(marginal[d][c], 0, piece.orders[d], 0);
            }
        }
        Panel panel = new Panel();
        panel.piece = piece;
        panel.depth = depth;
        panel.whole = whole;
        panel.value = new double[components];
        panel.error = new double[components];
        panel.magnitude = new double[components];
        double carried = 0;
        for (int first = 0; first < rule.size; first += Integrand.BLOCK) {
            int n = Math.min(Integrand.BLOCK, rule.size - first);
            java.util.Arrays.fill(noise, 0, n, 0);
            if (!whole || !piece.integrand.evaluate(rule, first / Integrand.BLOCK, n, out, noise)) {
                for (int d = 0; d < dimension; d++) {
                    double from = piece.from[d];
                    double width = piece.to[d] - from;
                    double[] node = rule.node[d];
                    double[] target = scratch.u[d];
                    for (int i = 0; i < n; i++) {
                        target[i] = from + width * node[first + i];
                    }
                }
                piece.integrand.evaluate(scratch.u, n, out, noise);
            }
            for (int i = 0; i < n; i++) {
                double part = rule.weight[first + i] * noise[i];
                carried += part * part;
            }
            for (int c = 0; c < components; c++) {
                double[] f = out[c];
                double sum = 0;
                double absolute = 0;
                for (int i = 0; i < n; i++) {
                    double v = f[i] * (rule.weight[first + i] * volume);
                    f[i] = v;
                    sum += v;
                    absolute += Math.abs(v);
                }
                panel.value[c] += sum;
                panel.magnitude[c] += absolute;
                if (dimension == 1) {
                    System.arraycopy(f, 0, marginal[0][c], first, n);
                } else {
                    rule.addMarginals(f, first, n, marginal, c);
                }
            }
        }
        carried = 3 * Math.sqrt(carried) * volume;   // roundings of different nodes are independent
        evaluations += rule.size;
        double total = 0;
        for (int c = 0; c < components; c++) {
            total += panel.magnitude[c];
        }
        double[] byDirection = new double[dimension];
        panel.byDirection = byDirection;
        panel.decay = new double[dimension];
        double[] rounding = new double[components];
        double[] error = new double[components];
        for (int c = 0; c < components; c++) {
            rounding[c] = 4 * UNIT_ROUNDOFF * panel.magnitude[c] + UNIT_ROUNDOFF * 1e-2 * total + carried;
            panel.error[c] = -(dimension - 1) * rounding[c];
            panel.floor = Math.max(panel.floor, 30 * rounding[c]);
        }
        for (int d = 0; d < dimension; d++) {
            panel.decay[d] = rule.rules[d].errors(marginal[d], components, piece.integrand.isSmooth() ? CARRY[dimension] : 0, rounding, error);
            for (int c = 0; c < components; c++) {
                byDirection[d] = Math.max(byDirection[d], error[c]);
                panel.error[c] += error[c];
            }
        }
        for (int c = 0; c < components; c++) {
            panel.worst = Math.max(panel.worst, panel.error[c]);
        }
        for (int d = 1; d < dimension; d++) {
            if (byDirection[d] > byDirection[panel.direction]) {
                panel.direction = d;
            }
        }
        if (Double.isNaN(panel.worst)) {
            panel.worst = Double.POSITIVE_INFINITY;
        }
        return panel;
    }
}

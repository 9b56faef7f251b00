package fieldwright.integral;

import java.util.ArrayList;
import java.util.List;
import java.util.PriorityQueue;

import fieldwright.quantity.Stop;

/**
 * Adaptive integration of vectors whose integrand is dear, such as a field worked afresh at every node, and may be weakly singular at the
 * ends of its box: the Gauss orders of the worst piece are raised, in the directions resolved worst, and only a piece that gains
 * little by that is halved.
 *
 * <p>Error of a piece, by direction: the last pair of Legendre coefficients of the integral over the other directions, twenty times; or,
 * once the orders were raised, what that changed times what the raise gained on the one before, three times and at most 2/5: so for
 * algebraic convergence too. Errors of directions and pieces are added, never averaged. Judged by the norm of all components.
 */
public final class SparingCubature {
    private static final double UNIT_ROUNDOFF = 1.2e-16;
    private static final double RAISE = 1.4;
    private static final double LEFT = 0.4;
    /** Most that one raise is believed to gain: on what the raise before it changed, or for the first on the last coefficients. */
    private static final double MOST_GAIN = 1e-3;
    private static final double FIRST_GAIN = 1e-4;
    private static final int HIGHEST = 56;
    private static final int DEEPEST = 40;

    private final int components;
    private final Cubature.Goal goal;
    private final double[][] u = new double[3][Integrand.BLOCK];
    private final double[][] out;
    private final double[] noise = new double[Integrand.BLOCK];
    private int evaluations;

    private SparingCubature(int components, Cubature.Goal goal) {
        this.components = components;
        this.goal = goal;
        out = new double[components][Integrand.BLOCK];
    }

    /**
     * Integrates the sum of the pieces, from the orders they name on. {@code error} holds the norm of the error in each component.
     * Errors: none thrown for a bad integrand; a value that is not a number gives status NOT_A_NUMBER.
     */
    public static Cubature.Result integrate(List<Cubature.Piece> pieces, int components, Cubature.Goal goal) {
        return new SparingCubature(components, goal).run(pieces);
    }

    private static final class Panel {
        Cubature.Piece piece;
        double[] value;
        double[] magnitude;
        double[] tail;
        double[] left;
        double error;
        /** What the last raise changed; NaN before the first. */
        double change = Double.NaN;
        /** Error over the error before, 0 while orders are low. */
        double gain;
        int depth;
    }

    private Cubature.Result run(List<Cubature.Piece> pieces) {
        PriorityQueue<Panel> heap = new PriorityQueue<>(Math.max(1, pieces.size()), (a, b) -> Double.compare(b.error, a.error));
        List<Panel> all = new ArrayList<>();
        for (Cubature.Piece piece : pieces) {
            Panel panel = work(piece, 0);
            heap.add(panel);
            all.add(panel);
        }
        Estimate.Status status = Estimate.Status.CONVERGED;
        double[] value = new double[components];
        double[] magnitude = new double[components];
        double error;
        while (true) {
            error = sum(all, value, magnitude);
            double carried = 0.5 * Math.abs(value[components - 1]);
            double allowed = Math.max(Math.max(carried, goal.absolute()), goal.relative() * Math.max(norm(value), goal.smallest() * norm(magnitude)));
            if (!Double.isFinite(norm(value))) {
                status = Estimate.Status.NOT_A_NUMBER;
                break;
            }
            if (error <= allowed || heap.isEmpty()) {
                status = error <= allowed ? status : Estimate.Status.ROUNDOFF;
                break;
            }
            if (evaluations >= goal.maxEvaluations()) {
                status = Estimate.Status.EVALUATION_LIMIT;
                break;
            }
            Stop.check();
            refine(heap.poll(), heap, all);
        }
        double[] errors = new double[components];
        java.util.Arrays.fill(errors, error);
        return new Cubature.Result(value, errors, magnitude, evaluations, status);
    }

    private double sum(List<Panel> all, double[] value, double[] magnitude) {
        java.util.Arrays.fill(value, 0);
        java.util.Arrays.fill(magnitude, 0);
        double error = 0;
        for (Panel panel : all) {
            for (int c = 0; c < components; c++) {
                value[c] += panel.value[c];
                magnitude[c] += panel.magnitude[c];
            }
            error += panel.error;
        }
        return error;
    }

    private void refine(Panel panel, PriorityQueue<Panel> heap, List<Panel> all) {
        if (panel.error <= 8 * rounding(panel) || panel.depth >= DEEPEST) {
            return;
        }
        int[] higher = panel.gain > 0.3 ? null : higher(panel);
        all.remove(panel);
        if (higher == null) {
            int worst = worst(panel.tail);
            for (int side = 0; side < 2; side++) {
                Panel half = work(half(panel.piece, worst, side == 0), panel.depth + 1);
                heap.add(half);
                all.add(half);
            }
            return;
        }
        Panel next = work(new Cubature.Piece(panel.piece.integrand(), panel.piece.from(), panel.piece.to(), higher), panel.depth);
        compare(panel, next);
        heap.add(next);
        all.add(next);
    }

    /** Orders raised in the directions that are resolved worst; null when one is as high as it may be. */
    private static int[] higher(Panel panel) {
        int[] orders = panel.piece.orders().clone();
        double most = panel.tail[worst(panel.tail)];
        for (int d = 0; d < orders.length; d++) {
            if (panel.tail[d] >= 0.03 * most) {
                orders[d] = (int) Math.ceil(RAISE * orders[d]);
                if (orders[d] > HIGHEST) {
                    return null;
                }
            }
        }
        return orders;
    }

    /** What is left of the error once orders were raised, from what that changed. */
    private void compare(Panel before, Panel next) {
        double change = 0;
        for (int c = 0; c < components; c++) {
            change += (next.value[c] - before.value[c]) * (next.value[c] - before.value[c]);
        }
        change = Math.sqrt(change);
        double gain = Double.isNaN(before.change) ? LEFT : Math.min(LEFT, 3 * change / before.change);
        double least = Double.isNaN(before.change) ? FIRST_GAIN * before.tail[worst(before.tail)] : MOST_GAIN * before.change;
        double left = Math.max(gain * change, least);
        double error = rounding(next);
        int raised = 0;
        for (int d = 0; d < next.left.length; d++) {
            raised += next.piece.orders()[d] > before.piece.orders()[d] ? 1 : 0;
        }
        for (int d = 0; d < next.left.length; d++) {
            next.left[d] = Math.min(next.left[d], next.piece.orders()[d] > before.piece.orders()[d] ? left / raised : before.left[d]);
            error += next.left[d];
        }
        next.change = change;
        next.gain = next.piece.orders()[worst(next.tail)] < 16 ? 0 : error / before.error;
        next.error = error;
    }

    private static Cubature.Piece half(Cubature.Piece p, int direction, boolean low) {
        double[] from = p.from().clone();
        double[] to = p.to().clone();
        double middle = (from[direction] + to[direction]) / 2;
        if (low) {
            to[direction] = middle;
        } else {
            from[direction] = middle;
        }
        int[] orders = p.orders().clone();
        for (int d = 0; d < orders.length; d++) {
            orders[d] = Math.max(Math.min(orders[d], 6), (int) (orders[d] / RAISE / RAISE));
        }
        return new Cubature.Piece(p.integrand(), from, to, orders);
    }

    private static int worst(double[] tail) {
        int worst = 0;
        for (int d = 1; d < tail.length; d++) {
            worst = tail[d] > tail[worst] ? d : worst;
        }
        return worst;
    }

    private static double rounding(Panel panel) {
        return 4 * UNIT_ROUNDOFF * norm(panel.magnitude);
    }

    private static double norm(double[] v) {
        double sum = 0;
        for (double x : v) {
            sum += x * x;
        }
        return Math.sqrt(sum);
    }

    private Panel work(Cubature.Piece piece, int depth) {
        TensorRule rule = TensorRule.of(piece.orders());
        int dimension = piece.orders().length;
        double volume = 1;
        double[][][] marginal = new double[dimension][components][];
        for (int d = 0; d < dimension; d++) {
            volume *= piece.to()[d] - piece.from()[d];
            for (int c = 0; c < components; c++) {
                marginal[d][c] = new double[piece.orders()[d]];
            }
        }
        Panel panel = new Panel();
        panel.piece = piece;
        panel.depth = depth;
        panel.value = new double[components];
        panel.magnitude = new double[components];
        for (int first = 0; first < rule.size; first += Integrand.BLOCK) {
            int n = Math.min(Integrand.BLOCK, rule.size - first);
            for (int d = 0; d < dimension; d++) {
                double from = piece.from()[d];
                double width = piece.to()[d] - from;
                for (int i = 0; i < n; i++) {
                    u[d][i] = from + width * rule.node[d][first + i];
                }
            }
            piece.integrand().evaluate(u, n, out, noise);
            for (int c = 0; c < components; c++) {
                for (int i = 0; i < n; i++) {
                    double v = out[c][i] * rule.weight[first + i] * volume;
                    panel.value[c] += v;
                    panel.magnitude[c] += Math.abs(v);
                    for (int d = 0; d < dimension; d++) {
                        marginal[d][c][rule.index[d][first + i]] += v;
                    }
                }
            }
        }
        evaluations += rule.size;
        panel.tail = new double[dimension];
        panel.left = new double[dimension];
        double floor = rounding(panel);
        panel.error = floor;
        for (int d = 0; d < dimension; d++) {
            panel.tail[d] = rule.rules[d].lastPair(marginal[d]);
            panel.left[d] = panel.tail[d] <= floor ? 0 : 20 * panel.tail[d];
            panel.error += panel.left[d];
        }
        if (Double.isNaN(panel.error)) {
            panel.error = Double.POSITIVE_INFINITY;
        }
        return panel;
    }
}

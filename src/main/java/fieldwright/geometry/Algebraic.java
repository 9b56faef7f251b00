package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;

import fieldwright.formula.Formula;
import fieldwright.formula.Node;

/**
 * The limits and held coordinates of one chart when they are made of + − · / , whole powers and square roots, worked so that
 * nothing cancels: every number goes with its difference to the anchor's and its derivatives by the parameters, and a root that
 * closes a range is worked as a product. sqrt(a² − x²) for x from −a to a is sqrt((x + a)(a − x)), and those two
 * distances follow from the parameter itself, exactly, however near the end.
 *
 * <p>Slots: per depth the coordinate, its distance from the lower and to the upper limit; then one per {@link Step}.
 * Immutable; {@link Nodes} holds the blocks.
 */
final class Algebraic {
    /** Slots of one depth. */
    static final int PER_DEPTH = 3;
    static final int FROM_LOW = 1;
    static final int TO_HIGH = 2;

    /** One block of a slot. */
    static final class Slot {
        final double[] value = new double[Nodes.BLOCK];
        /** Value minus the anchor's. */
        final double[] delta = new double[Nodes.BLOCK];
        /** Derivative by each parameter; unset where the slot does not depend on it. */
        final double[][] d = new double[3][Nodes.BLOCK];
    }

    private enum Operation { CONSTANT, NEGATE, PLUS, MINUS, TIMES, OVER, POWER, ROOT }

    /** {@code number}: the constant, or the whole power; {@code depends}: a bit per parameter. */
    private record Step(Operation operation, int a, int b, double number, int depends) { }

    private static final double CLOSED = 1e-14;
    private static final int HIGHEST_POWER = 12;

    private final Nest nest;
    private final int dimension;
    private final Ends ends;
    private final List<Step> steps = new ArrayList<>();
    private final int[] from;
    private final int[] to;
    private final int[] held;
    /** Steps done before the coordinate of each depth is. */
    private final int[] before;
    private boolean failed;

    /** Numbers of the chart that tell where a root closes: coordinates and limits at fractions of the ranges. */
    interface Ends {
        double[] coordinatesAt(double[] psi);

        double[] limitsAt(double[] psi);

        boolean isEndless(int depth);
    }

    private Algebraic(Nest nest, Ends ends) {
        this.nest = nest;
        this.ends = ends;
        dimension = nest.order().size();
        from = new int[dimension];
        to = new int[dimension];
        before = new int[dimension + 1];
        held = new int[nest.names().size()];
        for (int k = 0; k < dimension; k++) {
            String name = nest.order().get(k);
            from[k] = slot(nest.from(name));
            to[k] = slot(nest.to(name));
            before[k] = steps.size();
        }
        for (int m = 0; m < held.length; m++) {
            Formula f = nest.fixed(nest.names().get(m));
            held[m] = f == null ? -1 : slot(f);
        }
        before[dimension] = steps.size();
    }

    /** Null when some limit is of another kind. */
    static Algebraic of(Nest nest, Ends ends) {
        Algebraic a = new Algebraic(nest, ends);
        return a.failed ? null : a;
    }

    // ---- made once

    private int slot(Formula f) {
        return slot(f, f.tree());
    }

    private int slot(Formula f, Node node) {
        Formula part = f.part(node);
        if (part.variables().isEmpty()) {
            return add(Operation.CONSTANT, -1, -1, part.compile(List.of()).at());
        }
        if (node instanceof Node.Name name) {
            return PER_DEPTH * nest.order().indexOf(name.name());
        }
        if (node instanceof Node.Negate n) {
            return add(Operation.NEGATE, slot(f, n.of()), -1, 0);
        }
        if (node instanceof Node.Inlined n && n.condition() == null) {
            return slot(f, n.body());
        }
        if (node instanceof Node.Call c && c.function() == fieldwright.formula.Function.SQRT) {
            return root(f, c.arguments().get(0));
        }
        if (node instanceof Node.Binary b) {
            return binary(f, b);
        }
        failed = true;
        return 0;
    }

    private int binary(Formula f, Node.Binary b) {
        if (b.operator() == Node.Operator.POWER) {
            Formula exponent = f.part(b.right());
            double p = exponent.variables().isEmpty() ? exponent.compile(List.of()).at() : Double.NaN;
            if (p == 0.5) {
                return root(f, b.left());
            }
            if (!(p == Math.rint(p) && p >= 1 && p <= HIGHEST_POWER)) {
                failed = true;
                return 0;
            }
            return add(Operation.POWER, slot(f, b.left()), -1, p);
        }
        int left = slot(f, b.left());
        int right = slot(f, b.right());
        return add(switch (b.operator()) {
            case PLUS -> Operation.PLUS;
            case MINUS -> Operation.MINUS;
            case TIMES -> Operation.TIMES;
            default -> Operation.OVER;
        }, left, right, 0);
    }

    /** sqrt(g); where g is a parabola in its innermost coordinate and vanishes at an end of that one's range, as a product. */
    private int root(Formula f, Node argument) {
        Formula g = f.part(argument);
        int k = dimension - 1;
        while (k >= 0 && !g.variables().contains(nest.order().get(k))) {
            k--;
        }
        if (k < 0) {
            return slot(f, argument);   // not reached: without names it is a constant
        }
        String name = nest.order().get(k);
        if (ends.isEndless(k) || g.degree(name).orElse(3) > 2) {
            return add(Operation.ROOT, slot(f, argument), -1, 0);
        }
        Formula slope = g.derivative(name);
        Formula curve = slope.derivative(name).times(Formula.constant(0.5));
        boolean low = closes(g, slope, k, false);
        boolean high = closes(g, slope, k, true);
        if (curve.variables().contains(name) || !low && !high) {
            return add(Operation.ROOT, slot(f, argument), -1, 0);
        }
        int c = slot(curve);
        int product;
        if (low && high) {
            int both = add(Operation.TIMES, PER_DEPTH * k + FROM_LOW, PER_DEPTH * k + TO_HIGH, 0);
            product = add(Operation.TIMES, add(Operation.NEGATE, c, -1, 0), both, 0);
        } else {
            int distance = PER_DEPTH * k + (low ? FROM_LOW : TO_HIGH);
            int first = slot(slope.substitute(java.util.Map.of(name, low ? nest.from(name) : nest.to(name))));
            first = low ? first : add(Operation.NEGATE, first, -1, 0);
            product = add(Operation.TIMES, distance, add(Operation.PLUS, first, add(Operation.TIMES, c, distance, 0), 0), 0);
        }
        return add(Operation.ROOT, product, -1, 0);
    }

    /** Whether g vanishes, but for rounding, all along this end of depth k. */
    private boolean closes(Formula g, Formula slope, int k, boolean high) {
        Scalar value = Scalar.of(g, nest.names());
        Scalar derivative = Scalar.of(slope, nest.names());
        int m = nest.names().indexOf(nest.order().get(k));
        double[] psi = new double[dimension];
        for (double outer : new double[] {0.5, 0.37, 0.81}) {
            java.util.Arrays.fill(psi, outer);
            double[] c = ends.coordinatesAt(psi);
            double[] limits = ends.limitsAt(psi);
            double middle = Math.abs(at(value, c, m, (limits[2 * k] + limits[2 * k + 1]) / 2));
            double end = limits[high ? 2 * k + 1 : 2 * k];
            double rounding = 1e-15 * Math.abs(end * at(derivative, c, m, end));
            if (!(Math.abs(at(value, c, m, end)) <= CLOSED * middle + rounding)) {
                return false;
            }
        }
        return true;
    }

    private static double at(Scalar f, double[] c, int m, double own) {
        double[][] block = new double[3][1];
        for (int i = 0; i < c.length; i++) {
            block[i][0] = i == m ? own : c[i];
        }
        double[] out = new double[1];
        f.evaluate(block, 1, out);
        return out[0];
    }

    private int add(Operation operation, int a, int b, double number) {
        steps.add(new Step(operation, a, b, number, dependsOn(a) | dependsOn(b)));
        return PER_DEPTH * dimension + steps.size() - 1;
    }

    private int dependsOn(int slot) {
        if (slot < 0) {
            return 0;
        }
        if (slot >= PER_DEPTH * dimension) {
            return steps.get(slot - PER_DEPTH * dimension).depends;
        }
        int k = slot / PER_DEPTH;
        return 1 << k | dependsOn(from[k]) | dependsOn(to[k]);
    }

    // ---- used by the chart

    int slots() {
        return PER_DEPTH * dimension + steps.size();
    }

    int from(int depth) {
        return from[depth];
    }

    int to(int depth) {
        return to[depth];
    }

    int held(int coordinate) {
        return held[coordinate];
    }

    boolean depends(int slot, int depth) {
        return (dependsOn(slot) >> depth & 1) != 0;
    }

    /** Values at one point; {@code depth} == dimension works the held coordinates. */
    void work(int depth, double[] slots) {
        for (int i = depth == 0 ? 0 : before[depth - 1]; i < before[depth]; i++) {
            Step s = steps.get(i);
            double a = s.a < 0 ? 0 : slots[s.a];
            double b = s.b < 0 ? 0 : slots[s.b];
            slots[PER_DEPTH * dimension + i] = switch (s.operation) {
                case CONSTANT -> s.number;
                case NEGATE -> -a;
                case PLUS -> a + b;
                case MINUS -> a - b;
                case TIMES -> a * b;
                case OVER -> a / b;
                case POWER -> power(a, (int) s.number);
                case ROOT -> root(a);
            };
        }
    }

    private static double power(double a, int n) {
        double p = a;
        for (int i = 1; i < n; i++) {
            p *= a;
        }
        return p;
    }

    /** What is below zero is so by rounding: the limits were checked. */
    private static double root(double a) {
        return a < 0 ? 0 : Math.sqrt(a);
    }

    /** Values, differences to the anchor's slots {@code base}, and derivatives of a block. */
    void work(int depth, double[] base, Slot[] slots, int n) {
        for (int i = depth == 0 ? 0 : before[depth - 1]; i < before[depth]; i++) {
            Step s = steps.get(i);
            int own = PER_DEPTH * dimension + i;
            Slot out = slots[own];
            Slot a = s.a < 0 ? null : slots[s.a];
            Slot b = s.b < 0 ? null : slots[s.b];
            values(s, base, own, a, b, out, n);
            for (int k = 0; k < dimension; k++) {
                if ((s.depends >> k & 1) != 0) {
                    derivatives(s, k, (dependsOn(s.a) >> k & 1) != 0 ? a.d[k] : null, (dependsOn(s.b) >> k & 1) != 0 ? b.d[k] : null, a, b, out, n);
                }
            }
        }
    }

    private static void values(Step s, double[] base, int own, Slot a, Slot b, Slot out, int n) {
        double[] v = out.value;
        double[] e = out.delta;
        double a0 = s.a < 0 ? 0 : base[s.a];
        double b0 = s.b < 0 ? 0 : base[s.b];
        for (int i = 0; i < n; i++) {
            switch (s.operation) {
                case CONSTANT -> {
                    v[i] = s.number;
                    e[i] = 0;
                }
                case NEGATE -> {
                    v[i] = -a.value[i];
                    e[i] = -a.delta[i];
                }
                case PLUS -> {
                    v[i] = a.value[i] + b.value[i];
                    e[i] = a.delta[i] + b.delta[i];
                }
                case MINUS -> {
                    v[i] = a.value[i] - b.value[i];
                    e[i] = a.delta[i] - b.delta[i];
                }
                case TIMES -> {
                    v[i] = a.value[i] * b.value[i];
                    e[i] = a.value[i] * b.delta[i] + b0 * a.delta[i];
                }
                case OVER -> {
                    v[i] = a.value[i] / b.value[i];
                    e[i] = (a.delta[i] - base[own] * b.delta[i]) / b.value[i];
                }
                case POWER -> {
                    double p = 1;
                    double q = 0;   // Σ aⁱ a0ⁿ⁻¹⁻ⁱ
                    for (int j = 0; j < (int) s.number; j++) {
                        q = q * a0 + p;
                        p *= a.value[i];
                    }
                    v[i] = p;
                    e[i] = a.delta[i] * q;
                }
                default -> {
                    v[i] = root(a.value[i]);
                    double sum = v[i] + base[own];
                    e[i] = sum > 0 ? a.delta[i] / sum : 0;
                }
            }
        }
    }

    /** {@code da}, {@code db}: derivatives of the operands, null where they do not depend. */
    private static void derivatives(Step s, int k, double[] da, double[] db, Slot a, Slot b, Slot out, int n) {
        double[] d = out.d[k];
        for (int i = 0; i < n; i++) {
            double x = da == null ? 0 : da[i];
            double y = db == null ? 0 : db[i];
            d[i] = switch (s.operation) {
                case CONSTANT -> 0;
                case NEGATE -> -x;
                case PLUS -> x + y;
                case MINUS -> x - y;
                case TIMES -> x * b.value[i] + a.value[i] * y;
                case OVER -> (x - out.value[i] * y) / b.value[i];
                case POWER -> s.number * x * (s.number == 1 ? 1 : power(a.value[i], (int) s.number - 1));
                case ROOT -> out.value[i] > 0 ? x / (2 * out.value[i]) : 0;
            };
        }
    }
}

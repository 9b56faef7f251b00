package fieldwright.geometry;

import java.util.List;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
import fieldwright.formula.Node;
import fieldwright.quantity.AuthorException;

/**
 * A formula at a chart's nodes: over the chart's own coordinates, or over any of x y z rho phi r theta, which are then
 * taken from the position in the region's own frame.
 */
public final class NodeFunction {
    private final Formula formula;
    private final BlockFunction function;
    private final List<String> used;
    private final int[] own;
    private final boolean constant;
    private final double value;
    private final double[][] scratch;

    private NodeFunction(Formula formula, BlockFunction function, List<String> used, int[] own) {
        this.formula = formula;
        this.function = function;
        this.used = used;
        this.own = own;
        constant = used.isEmpty();
        double[] one = new double[1];
        if (constant) {
            function.evaluate(new double[0][], 1, one);
        }
        value = one[0];
        scratch = new double[used.size()][];
        for (int k = 0; k < own.length; k++) {
            if (own[k] < 0) {
                scratch[k] = new double[Nodes.BLOCK];
            }
        }
    }

    /** Errors: AuthorException when the formula uses a name that is no coordinate. Not shared between threads. */
    public static NodeFunction of(Formula formula, Chart chart) {
        List<String> used = formula.variables().stream().sorted().toList();
        int[] own = new int[used.size()];
        for (int k = 0; k < own.length; k++) {
            own[k] = chart.coordinates().indexOf(used.get(k));
            if (own[k] < 0 && !fieldwright.formula.Coordinates.is(used.get(k))) {
                throw new AuthorException("formula " + formula.text() + " uses '" + used.get(k) + "', which is neither a coordinate nor one of "
                    + String.join(", ", chart.coordinates()) + ". Give it a value or write it with coordinates.");
            }
        }
        NodeFunction f = new NodeFunction(formula, formula.compile(used), used, own);
        f.kinksAreCut = kinksAreCut(formula, chart);
        for (int k = 0; k < chart.dimension(); k++) {
            f.resolved |= !isSmooth(formula) && chart.resolvingCuts(formula, k) != null;
        }
        return f;
    }

    /**
     * Whether the formula is known to be smooth along the chart: over its own coordinates or x, y, z only, a polynomial or without roots,
     * powers, quotients, logarithms and anything with a kink; or of one own coordinate and resolved between cuts. A false answer means
     * not known.
     */
    public boolean isSmooth() {
        if (constant || smooth != null) {
            return constant || smooth;
        }
        boolean found = isSmooth(formula, kinksAreCut);
        for (int k = 0; k < own.length; k++) {
            found &= own[k] >= 0 || List.of("x", "y", "z").contains(used.get(k));
        }
        smooth = found || resolved;
        return smooth;
    }

    /** Whether a formula is known to be smooth in its variables: a polynomial, or without roots, powers, quotients, logarithms and kinks. */
    public static boolean isSmooth(Formula formula) {
        return isSmooth(formula, false);
    }

    private static boolean isSmooth(Formula formula, boolean cut) {
        if (!cut && !formula.kinks().isEmpty()) {
            return false;
        }
        boolean polynomial = true;
        for (String name : formula.variables()) {
            polynomial &= formula.degree(name).isPresent();
        }
        if (polynomial) {
            return true;
        }
        return isSmooth(formula.tree(), cut);
    }

    private static final java.util.Set<String> ENTIRE = java.util.Set.of("SIN", "COS", "EXP", "SINH", "COSH", "ERF");

    private static final java.util.Set<String> CUT = java.util.Set.of("ABS", "SIGN", "MIN", "MAX", "FLOOR", "CEIL");

    private static boolean isSmooth(Node n, boolean cut) {
        if (!hasName(n)) {
            return true;
        }
        if (n instanceof Node.Binary b) {
            boolean quotient = b.operator() == Node.Operator.OVER && hasName(b.right());
            boolean power = b.operator() == Node.Operator.POWER && !isWholePower(b);
            return !quotient && !power && isSmooth(b.left(), cut) && isSmooth(b.right(), cut);
        }
        if (n instanceof Node.Inlined inlined) {
            return isSmooth(inlined.body(), cut);
        }
        if (n instanceof Node.When w) {
            return cut && isSmooth(w.yes(), cut) && isSmooth(w.no(), cut);
        }
        if (n instanceof Node.Call c && !ENTIRE.contains(c.function().name()) && !(cut && CUT.contains(c.function().name()))) {
            return false;
        }
        return (n instanceof Node.Call || n instanceof Node.Negate || n instanceof Node.Name)
            && n.children().stream().allMatch(c -> isSmooth(c, cut));
    }

    private static boolean isWholePower(Node.Binary b) {
        return b.right() instanceof Node.Literal p && p.value() >= 0 && p.value() == Math.rint(p.value());
    }

    private static boolean hasName(Node n) {
        return n instanceof Node.Name || n.children().stream().anyMatch(NodeFunction::hasName);
    }

    private Boolean smooth;
    /** A function of one coordinate that is as good as a polynomial between the cuts of the chart. */
    private boolean resolved;
    /** Every kink is a value of one coordinate with constant limits, or the chart a line: there integrals over it are cut. */
    private boolean kinksAreCut;

    private static boolean kinksAreCut(Formula formula, Chart chart) {
        for (Formula kink : formula.kinks()) {
            boolean cut = chart.dimension() == 1 && !chart.isEndless(0);
            for (int k = 0; k < chart.dimension(); k++) {
                String name = chart.coordinates().get(chart.coordinateOf(k));
                cut |= kink.variables().equals(java.util.Set.of(name)) && chart.hasConstantLimits(k) && !chart.isEndless(k);
            }
            if (!cut) {
                return false;
            }
        }
        return true;
    }

    public Formula formula() {
        return formula;
    }

    public boolean isConstant() {
        return constant;
    }

    public double constant() {
        return value;
    }

    /** Values at nodes whose positions are anchor + offset. */
    public void evaluate(Nodes nodes, double[] anchor, int n, double[] out) {
        if (constant) {
            java.util.Arrays.fill(out, 0, n, value);
            return;
        }
        double[][] args = new double[own.length][];
        for (int k = 0; k < own.length; k++) {
            if (own[k] >= 0) {
                args[k] = nodes.c[own[k]];
            } else {
                args[k] = scratch[k];
                fromPosition(used.get(k), nodes.offset, anchor, n, scratch[k]);
            }
        }
        function.evaluate(args, n, out);
    }

    /** A coordinate of the positions anchor + offset; phi in (−pi, pi]. */
    public static void fromPosition(String name, double[][] offset, double[] anchor, int n, double[] out) {
        double ax = anchor[0];
        double ay = anchor[1];
        double az = anchor[2];
        double[] dx = offset[0];
        double[] dy = offset[1];
        double[] dz = offset[2];
        switch (name) {
            case "x" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = ax + dx[i];
                }
            }
            case "y" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = ay + dy[i];
                }
            }
            case "z" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = az + dz[i];
                }
            }
            case "rho" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = Math.sqrt((ax + dx[i]) * (ax + dx[i]) + (ay + dy[i]) * (ay + dy[i]));
                }
            }
            case "r" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = Math.sqrt((ax + dx[i]) * (ax + dx[i]) + (ay + dy[i]) * (ay + dy[i]) + (az + dz[i]) * (az + dz[i]));
                }
            }
            case "phi" -> {
                for (int i = 0; i < n; i++) {
                    out[i] = Math.atan2(ay + dy[i], ax + dx[i]);
                }
            }
            default -> {
                for (int i = 0; i < n; i++) {
                    out[i] = Math.atan2(Math.sqrt((ax + dx[i]) * (ax + dx[i]) + (ay + dy[i]) * (ay + dy[i])), az + dz[i]);
                }
            }
        }
    }
}

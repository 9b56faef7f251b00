package fieldwright.field;

import java.util.List;
import java.util.OptionalInt;
import java.util.Set;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
import fieldwright.geometry.NodeFunction;

/**
 * A density as a smooth function of position, which may be evaluated beyond its body: needed to integrate radially from a place.
 * Only formulas that are smooth through the axis and the origin qualify: x, y, z as they are, rho and r only evenly.
 */
final class SpaceFunction {
    private static final Set<String> ALLOWED = Set.of("x", "y", "z", "rho", "r");

    private final BlockFunction function;
    private final List<String> used;
    private final double[][] scratch;
    private final double constant;
    /** Polynomial degree along a straight line, or −1. */
    final int degree;

    private SpaceFunction(BlockFunction function, List<String> used, int degree) {
        this.function = function;
        this.used = used;
        this.degree = degree;
        scratch = new double[used.size()][fieldwright.geometry.Nodes.BLOCK];
        double[] one = new double[1];
        if (used.isEmpty()) {
            function.evaluate(new double[0][], 1, one);
        }
        constant = one[0];
    }

    /** The function, or null when the formula does not qualify. */
    static SpaceFunction of(Formula f) {
        List<String> used = f.variables().stream().sorted().toList();
        if (!ALLOWED.containsAll(used) || !NodeFunction.isSmooth(f)) {
            return null;
        }
        BlockFunction function = f.compile(used);
        if (!isEven(function, used, "rho") || !isEven(function, used, "r")) {
            return null;
        }
        int degree = 0;
        for (String name : used) {
            OptionalInt d = f.degree(name);
            degree = d.isEmpty() || degree < 0 ? -1 : degree + d.getAsInt();
        }
        return new SpaceFunction(function, used, degree);
    }

    /** f(−v) = f(v) at places chosen once, of several sizes. */
    private static boolean isEven(BlockFunction f, List<String> used, String name) {
        int at = used.indexOf(name);
        if (at < 0) {
            return true;
        }
        java.util.Random random = new java.util.Random(20);
        double[] arguments = new double[used.size()];
        for (int trial = 0; trial < 12; trial++) {
            double size = Math.pow(10, trial / 2 - 4);
            for (int k = 0; k < arguments.length; k++) {
                arguments[k] = size * (0.2 + random.nextDouble());
            }
            double plus = f.at(arguments);
            arguments[at] = -arguments[at];
            double minus = f.at(arguments);
            if (Double.isFinite(plus) != Double.isFinite(minus) || Math.abs(plus - minus) > 1e-12 * Math.abs(plus)) {
                return false;
            }
        }
        return true;
    }

    boolean isConstant() {
        return used.isEmpty();
    }

    double constant() {
        return constant;
    }

    /** Values at anchor + offset. */
    void evaluate(double[] anchor, double[][] offset, int n, double[] out) {
        if (used.isEmpty()) {
            java.util.Arrays.fill(out, 0, n, constant);
            return;
        }
        for (int k = 0; k < scratch.length; k++) {
            NodeFunction.fromPosition(used.get(k), offset, anchor, n, scratch[k]);
        }
        function.evaluate(scratch, n, out);
    }
}

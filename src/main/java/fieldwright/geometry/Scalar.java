package fieldwright.geometry;

import java.util.List;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;

/** A formula ready for numbers: compiled over the few coordinates it uses. */
final class Scalar {
    static final Scalar ZERO = new Scalar(0);

    private final BlockFunction function;
    private final int[] arguments;
    private final double constant;

    private Scalar(double constant) {
        this.constant = constant;
        function = null;
        arguments = new int[0];
    }

    private Scalar(BlockFunction function, int[] arguments) {
        this.function = function;
        this.arguments = arguments;
        constant = Double.NaN;
    }

    static Scalar of(Formula formula, List<String> coordinates) {
        List<String> used = formula.variables().stream().sorted().toList();
        BlockFunction f = formula.compile(used);
        if (used.isEmpty()) {
            double[] out = new double[1];
            f.evaluate(new double[0][], 1, out);
            return new Scalar(out[0]);
        }
        int[] arguments = new int[used.size()];
        for (int k = 0; k < arguments.length; k++) {
            arguments[k] = coordinates.indexOf(used.get(k));
        }
        return new Scalar(f, arguments);
    }

    boolean isConstant() {
        return function == null;
    }

    double constant() {
        return constant;
    }

    void evaluate(double[][] c, int n, double[] out) {
        if (function == null) {
            java.util.Arrays.fill(out, 0, n, constant);
            return;
        }
        double[][] args = new double[arguments.length][];
        for (int k = 0; k < args.length; k++) {
            args[k] = c[arguments[k]];
        }
        function.evaluate(args, n, out);
    }
}

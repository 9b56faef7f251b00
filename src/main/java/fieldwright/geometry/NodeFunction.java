package fieldwright.geometry;

import java.util.List;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
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
        return new NodeFunction(formula, formula.compile(used), used, own);
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

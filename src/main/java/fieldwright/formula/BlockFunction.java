package fieldwright.formula;

/**
 * A real function of several arguments, worked a block of nodes at a time. Plain SI in and out. Thread-safe; results do
 * not depend on how nodes are grouped into blocks.
 */
public interface BlockFunction {
    /** The largest block. */
    int BLOCK = 256;

    int arguments();

    /**
     * {@code out[i] = f(args[0][i], args[1][i], …)} for {@code i < n <= BLOCK}. {@code out} may be one of the arguments'
     * arrays. Outside the function's domain the value is NaN or infinite; a violated condition of a user's formula is an
     * {@link fieldwright.quantity.AuthorException}.
     */
    void evaluate(double[][] args, int n, double[] out);

    /** One node; slow. */
    default double at(double... args) {
        double[][] block = new double[args.length][1];
        for (int i = 0; i < args.length; i++) {
            block[i][0] = args[i];
        }
        double[] out = new double[1];
        evaluate(block, 1, out);
        return out[0];
    }
}

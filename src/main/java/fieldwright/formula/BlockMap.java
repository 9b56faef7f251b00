package fieldwright.formula;

/** Several real functions of the same arguments, worked together a block of nodes at a time: what they share is worked once. */
public interface BlockMap {
    /**
     * {@code out[k][i] = f_k(args[0][i], args[1][i], …)} for {@code i < n <= BlockFunction.BLOCK}. No array of {@code out} may be one of
     * the arguments'. Values outside a domain as in {@link BlockFunction}.
     */
    void evaluate(double[][] args, int n, double[][] out);
}

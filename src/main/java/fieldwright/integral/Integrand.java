package fieldwright.integral;

/**
 * A function of several components on a unit box, Jacobian of its map included.
 * Implementations may keep scratch space: one thread at a time.
 */
public interface Integrand {
    int dimension();

    int components();

    /**
     * Values at {@code n} nodes, at most {@link #BLOCK}.
     * {@code u[d][i]} is in [0, 1]; {@code out[c][i]} receives component c; {@code noise[i]} the rounding error, absolute,
     * that the value's largest component carries beside the usual few units in its last place (0 when none).
     */
    void evaluate(double[][] u, int n, double[][] out, double[] noise);

    /**
     * As {@link #evaluate(double[][], int, double[][], double[])} at the nodes of a rule over the whole unit box, block by block, for
     * integrands that keep what they need of them; false when they keep nothing and nothing was done.
     */
    default boolean evaluate(TensorRule rule, int block, int n, double[][] out, double[] noise) {
        return false;
    }

    /** One half along a direction as a function on a unit box of its own, for integrands that keep nodes of it; null otherwise. */
    default Integrand half(int direction, boolean low) {
        return null;
    }

    /** Gauss order below which the integrand must not be taken in a direction of its unit box. */
    default int leastOrder(int direction) {
        return 0;
    }

    /**
     * False when the function may have kinks or singular points inside its box: the decay of coefficients, which are those of partial
     * integrals, then promises nothing, and the last coefficients themselves are taken as the error.
     */
    default boolean isSmooth() {
        return true;
    }

    int BLOCK = 64;
}

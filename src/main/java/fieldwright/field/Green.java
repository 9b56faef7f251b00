package fieldwright.field;

import fieldwright.quantity.AuthorException;

/**
 * Part of a Green function, seen from one place (that of the question) and smooth in the place of the source: what is left of endless
 * rows of images without the near ones, or all of it for sources far away. Without 1/(4π eps0): 1/m and 1/m² for unit charge.
 * Keeps scratch space: one thread at a time.
 */
interface Green {
    /**
     * {@code out[i]} = potential of unit charges at {@code s[0..2][i]}, sheet frame; {@code doubt[i]} = what it is wrong by at most,
     * beside the rounding of the places.
     */
    void potential(double[][] s, int n, double[] out, double[] doubt);

    /** {@code out[0..2][i]} = field of unit charges, sheet frame; {@code doubt[i]} for each component. */
    void field(double[][] s, int n, double[][] out, double[] doubt);

    /** The same for a patch whose charge is integrated along its endless coordinates. Errors: AuthorException where that is not worked. */
    default Green endless(Patch patch) {
        throw new AuthorException("endless charge in these surroundings: it is not worked. Give the region finite limits.");
    }

    /** The same, for the many nodes of an integral: with less effort for one source where effort and doubt are exchanged. */
    default Green forPatch() {
        return this;
    }

    /** Whether it is smooth in the place of the source up to the walls. */
    default boolean isSmooth() {
        return true;
    }
}

package fieldwright.session;

/**
 * A cell must be worked that uses an object which may have changed since the cell that made it was worked. That one must
 * be worked again first; the pass begins anew.
 */
final class Again extends RuntimeException {
    private static final long serialVersionUID = 1L;
    private final int cell;

    /** @param cell to be worked again, 1-based; 0 for all of them, over fresh classes */
    Again(int cell) {
        super(null, null, false, false);
        this.cell = cell;
    }

    int cell() {
        return cell;
    }
}

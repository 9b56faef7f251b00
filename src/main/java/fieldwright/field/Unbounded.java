package fieldwright.field;

import fieldwright.quantity.Standing;

/** Carries out of an integrand that a field is unbounded where it was asked for. */
final class Unbounded extends RuntimeException {
    private static final long serialVersionUID = 1;
    private final transient Standing standing;

    Unbounded(Standing standing) {
        super(standing.reason(), null, false, false);
        this.standing = standing;
    }

    Standing standing() {
        return standing;
    }
}

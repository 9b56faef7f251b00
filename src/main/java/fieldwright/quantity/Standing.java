package fieldwright.quantity;

import java.util.Objects;

/**
 * Whether a number can be used: it converged, it did not (value and error are the best found), or it has no bound at
 * that place. The reason is empty for a converged number.
 */
public record Standing(Kind kind, String reason) {
    public enum Kind { CONVERGED, NOT_CONVERGED, UNBOUNDED }

    public static final Standing CONVERGED = new Standing(Kind.CONVERGED, "");

    /** Of a value whose numerical error came out infinite: nothing is known about it. */
    public static final Standing NO_ERROR_BOUND = notConverged("a divisor, or the place of a jump, is zero within its numerical error");

    public Standing {
        Objects.requireNonNull(kind, "kind");
        reason = reason == null ? "" : reason;
    }

    public static Standing notConverged(String reason) {
        return new Standing(Kind.NOT_CONVERGED, reason);
    }

    public static Standing unbounded(String reason) {
        return new Standing(Kind.UNBOUNDED, reason);
    }

    /** The worse of two; the first one's reason when they are equally bad. */
    public Standing worse(Standing other) {
        return other.kind.ordinal() > kind.ordinal() ? other : this;
    }

    public boolean isConverged() {
        return kind == Kind.CONVERGED;
    }
}

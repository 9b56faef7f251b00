package fieldwright.field;

import fieldwright.quantity.AuthorException;

/**
 * What is asked of a number: error at most relative·|value| or absoluteFloor (SI, in the result's unit), whichever is larger;
 * components that vanish by symmetry are judged against the size of what cancels. Limits count evaluations, not time.
 * {@code closedForms} says what may answer.
 */
public record Accuracy(double relative, double absoluteFloor, int maxEvaluations, ClosedForms closedForms) {
    public static final Accuracy DEFAULT = new Accuracy(1e-9, 0, 2_000_000);
    /** The same from panels alone. */
    public static final Accuracy PANELS = DEFAULT.with(ClosedForms.OFF);

    public Accuracy {
        if (!(relative >= 0) || !(absoluteFloor >= 0) || maxEvaluations < 1) {
            throw new AuthorException("accuracy: relative " + relative + ", absolute " + absoluteFloor + ", "
                + maxEvaluations + " evaluations: tolerances must be >= 0 and the limit at least 1.");
        }
    }

    /** Closed forms where there are any. */
    public Accuracy(double relative, double absoluteFloor, int maxEvaluations) {
        this(relative, absoluteFloor, maxEvaluations, ClosedForms.AUTO);
    }

    public static Accuracy relative(double relative) {
        return new Accuracy(relative, 0, DEFAULT.maxEvaluations);
    }

    /** The same with another relative tolerance. */
    public Accuracy withRelative(double other) {
        return new Accuracy(other, absoluteFloor, maxEvaluations, closedForms);
    }

    public Accuracy with(ClosedForms other) {
        return new Accuracy(relative, absoluteFloor, maxEvaluations, other);
    }
}

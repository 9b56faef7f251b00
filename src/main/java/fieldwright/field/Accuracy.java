package fieldwright.field;

/**
 * What is asked of a number: error at most relative·|value| or absoluteFloor (SI, in the result's unit), whichever is larger;
 * components that vanish by symmetry are judged against the size of what cancels. Limits count evaluations, not time.
 */
public record Accuracy(double relative, double absoluteFloor, int maxEvaluations) {
    public static final Accuracy DEFAULT = new Accuracy(1e-9, 0, 2_000_000);

    public Accuracy {
        if (!(relative >= 0) || !(absoluteFloor >= 0) || maxEvaluations < 1) {
            throw new fieldwright.quantity.AuthorException("accuracy: relative " + relative + ", absolute " + absoluteFloor + ", "
                + maxEvaluations + " evaluations: tolerances must be >= 0 and the limit at least 1.");
        }
    }

    public static Accuracy relative(double relative) {
        return new Accuracy(relative, 0, DEFAULT.maxEvaluations);
    }
}

package fieldwright.output;

/** Whether a number may be relied on. Ordered from good to bad, so the worst of several is their maximum. */
public enum Status {
    /** The numerical error is below what was asked. */
    CONVERGED("converged"),
    /** The work ended before the numerical error was small enough; the reason stands beside it. */
    NOT_CONVERGED("notConverged"),
    /** There is no finite number: the quantity grows without limit at this place. */
    UNBOUNDED("unbounded");

    private final String word;

    Status(String word) {
        this.word = word;
    }

    /** The word used in JSON. */
    public String word() {
        return word;
    }

    /** The worse of the two. */
    public Status and(Status other) {
        return compareTo(other) >= 0 ? this : other;
    }
}

package fieldwright.study;

/**
 * An assessed value of one replay against what is allowed, both in the same SI unit.
 *
 * @param value the value assessed; its size counts, not its sign
 * @param error its numerical error, absolute, {@code >= 0}
 * @param allowed threshold over margin in this replay, {@code > 0}
 * @param converged false if the value did not converge or is unbounded
 */
public record Assessed(double value, double error, double allowed, boolean converged) {

    /** Part of the allowance used, numerical error included; 1 is the limit. */
    public double used() {
        return (Math.abs(value) + error) / allowed;
    }

    /** Whether {@link #used()} means something. */
    boolean isUsable() {
        return converged && !Double.isNaN(used());
    }
}

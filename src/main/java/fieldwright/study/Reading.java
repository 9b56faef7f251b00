package fieldwright.study;

/**
 * One result of one replay, in SI: one number for a scalar, three for a vector, six for a one-sided pair (the
 * plus side first).
 *
 * @param values the numbers
 * @param errors numerical error of each, absolute; NaN where it was not carried
 * @param converged false if any of the numbers did not converge or is unbounded
 */
public record Reading(double[] values, double[] errors, boolean converged) {
    public Reading {
        if (values.length != errors.length) {
            throw new IllegalArgumentException(values.length + " values with " + errors.length + " errors");
        }
        values = values.clone();
        errors = errors.clone();
    }

    public static Reading of(double value, double error) {
        return new Reading(new double[] {value}, new double[] {error}, true);
    }

    public static Reading notConverged(int numbers) {
        double[] none = new double[numbers];
        java.util.Arrays.fill(none, Double.NaN);
        return new Reading(none, none, false);
    }

    @Override
    public double[] values() {
        return values.clone();
    }

    @Override
    public double[] errors() {
        return errors.clone();
    }

    int size() {
        return values.length;
    }

    double value(int component) {
        return values[component];
    }

    /** Numerical error of a component, zero where it was not carried. */
    double error(int component) {
        return Double.isNaN(errors[component]) ? 0 : errors[component];
    }

    /** Whether a difference may be taken with this number: converged and finite. */
    boolean isUsable(int component) {
        return converged && component < values.length && Double.isFinite(values[component]);
    }
}

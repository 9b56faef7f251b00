package fieldwright.field.tree;

/**
 * Bare field (three rows) or potential (one row) at each target, without 1/(4π eps0).
 *
 * @param error bound of the length of the error, that of the place's own rounding included
 * @param size Σ of the lengths of all contributions, about: what cancels
 * @param touching target on a charge or a charged line, where there is no value
 */
public record Answers(double[][] value, double[] error, double[] size, boolean[] touching) {
    static Answers of(int rows, int targets) {
        return new Answers(new double[rows][targets], new double[targets], new double[targets], new boolean[targets]);
    }
}

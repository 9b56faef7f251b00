package fieldwright.sheet;

/**
 * {@code corr(first, second) = coefficient}: the tolerances of two inputs are not independent.
 *
 * @param coefficient as written
 * @param line        line in the file, 1-based
 * @param column      column at which the coefficient begins, 1-based
 */
public record CorrelationEntry(String first, String second, String coefficient, int line, int column)
        implements InputLine { }

package fieldwright.sheet;

/**
 * A line that has not the form of its cell.
 *
 * @param line    line in the file, 1-based
 * @param column  1-based
 * @param message thing, value and remedy, without the place
 */
public record MalformedLine(int line, int column, String message) implements InputLine, DeriveLine { }

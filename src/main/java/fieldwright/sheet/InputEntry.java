package fieldwright.sheet;

/**
 * {@code name = definition | description | source}.
 *
 * @param definition  {@code value unit ± tolerance}, as written
 * @param description empty when there is none
 * @param source      empty when there is none; shown as "no source"
 * @param line        line in the file, 1-based
 * @param column      column at which the definition begins, 1-based
 */
public record InputEntry(String name, String definition, String description, String source, int line, int column)
        implements InputLine { }

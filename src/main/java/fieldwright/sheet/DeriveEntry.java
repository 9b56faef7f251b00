package fieldwright.sheet;

import java.util.List;

/**
 * {@code name = formula [in unit] | description | source}, or {@code name(arg: unit, …) = formula [for condition]}.
 *
 * @param parameters    the arguments; empty when there are none
 * @param formula       as written
 * @param unit          the unit to show it in; empty when not said
 * @param condition     where the formula holds; empty when not said
 * @param line          line in the file, 1-based
 * @param column        column at which the formula begins, 1-based
 * @param continuations the lines below that begin with {@code =} or {@code ~}
 */
public record DeriveEntry(String name, List<Parameter> parameters, String formula, String unit, String condition,
                          String description, String source, List<Continuation> continuations, int line, int column)
        implements DeriveLine {

    public DeriveEntry {
        parameters = List.copyOf(parameters);
        continuations = List.copyOf(continuations);
    }

    /**
     * An argument.
     *
     * @param unit   a unit that has its dimension; empty for a plain number
     * @param column at which the name begins, 1-based
     */
    public record Parameter(String name, String unit, int column) { }

    /** How a line goes on. */
    public enum Relation {
        /** {@code =}: the same, written otherwise. */
        EQUAL,
        /** {@code ~}: what it becomes in a limiting case. */
        LIMIT
    }

    /**
     * A step of the reader's own derivation.
     *
     * @param condition of a limiting case: {@code z >> R_s}; empty when not said
     * @param column    column at which the formula begins, 1-based
     */
    public record Continuation(Relation relation, String formula, String unit, String condition, String description,
                               String source, int line, int column) { }
}

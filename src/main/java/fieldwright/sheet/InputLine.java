package fieldwright.sheet;

/** One line of an input cell. */
public sealed interface InputLine permits InputEntry, CorrelationEntry, MalformedLine {

    /** Line in the file, 1-based. */
    int line();
}

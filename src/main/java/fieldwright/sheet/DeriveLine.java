package fieldwright.sheet;

/** One line of a derive cell, with the lines that continue it. */
public sealed interface DeriveLine permits DeriveEntry, MalformedLine {

    /** Line in the file, 1-based. */
    int line();
}

package fieldwright.session.snippet;

/** What a piece of Java declares for the pieces below it. */
public sealed interface Declaration {

    String name();

    /**
     * A variable. Its value lies outside JShell's own variables, in a static field of its own (see {@link SnippetCompiler}),
     * so that code that uses it does not depend on how the value came about.
     *
     * @param type as Java text with full names; a class declared in a cell by the name of its wrapper, which is never
     *             used twice, so equal texts are equal types
     */
    record Variable(String name, String type) implements Declaration { }

    /** A method or a type. The same text compiled again is another one. */
    record Code(String name, CompiledSnippet snippet, boolean isType) implements Declaration { }

    /** An import, by its text; it counts for everything below. */
    record Import(String name) implements Declaration { }
}

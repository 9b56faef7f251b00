package fieldwright.session;

import fieldwright.session.snippet.CompiledSnippet;
import fieldwright.session.snippet.Declaration;
import java.util.LinkedHashSet;
import java.util.Set;

/** Names a piece of Java may read: those in its text, and those in the methods and classes it uses. */
final class JavaReads {
    private JavaReads() { }

    static Set<String> of(CompiledSnippet snippet) {
        Set<String> names = new LinkedHashSet<>();
        collect(snippet, names);
        return names;
    }

    private static void collect(CompiledSnippet snippet, Set<String> names) {
        for (Declaration declaration : snippet.environment().values()) {
            if (names.add(declaration.name()) && declaration instanceof Declaration.Code code) {
                collect(code.snippet(), names);
            }
        }
    }
}

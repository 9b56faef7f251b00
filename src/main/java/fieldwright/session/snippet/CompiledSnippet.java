package fieldwright.session.snippet;

import java.util.List;
import java.util.Map;
import java.util.OptionalInt;
import java.util.Set;
import jdk.jshell.SourceCodeAnalysis.SnippetWrapper;

/** One statement or declaration, compiled. It can be run any number of times in any {@link Workspace}. */
public final class CompiledSnippet {
    private final String source;
    private final Set<String> names;
    private final Map<String, Declaration> environment;
    private final List<Declaration.Import> imports;
    private final Set<String> classes;
    private final String wrapper;
    private final boolean runs;
    private final String field;
    private final SnippetWrapper text;
    private Declaration declares;

    /**
     * @param names       identifiers in the text, see {@link JavaText#free()}
     * @param environment those of them that something above declares
     * @param imports     those that stand above
     * @param classes     binary names of all its classes
     * @param wrapper     binary name of the class JShell wrapped it in; null for an import
     * @param runs        false when it only declares
     * @param field       static field of the wrapper that holds the declared variable; null when it declares none
     * @param text        the wrapped text, for line numbers; null for an import
     */
    CompiledSnippet(String source, Set<String> names, Map<String, Declaration> environment, List<Declaration.Import> imports,
                    Set<String> classes, String wrapper, boolean runs, String field, SnippetWrapper text) {
        this.source = source;
        this.names = Set.copyOf(names);
        this.environment = Map.copyOf(environment);
        this.imports = List.copyOf(imports);
        this.classes = Set.copyOf(classes);
        this.wrapper = wrapper;
        this.runs = runs;
        this.field = field;
        this.text = text;
    }

    void declare(Declaration declaration) {
        this.declares = declaration;
    }

    public String source() {
        return source;
    }

    /** Names declared above that stand in its text: what it may read. */
    public Map<String, Declaration> environment() {
        return environment;
    }

    boolean dependsOn(Declaration declaration) {
        return environment.containsValue(declaration) || imports.contains(declaration);
    }

    /** Every identifier in its text, whether anything declares it or not. */
    public Set<String> names() {
        return names;
    }

    /** What it declares, or null. */
    public Declaration declares() {
        return declares;
    }

    /** False for a declaration of a method or class and for an import: nothing to run. */
    public boolean runs() {
        return runs;
    }

    Set<String> classes() {
        return classes;
    }

    String wrapper() {
        return wrapper;
    }

    String field() {
        return field;
    }

    /**
     * Line of its text, 0-based, where an exception passed through it: the innermost of its own lines on the stack.
     * Empty when it is not on the stack.
     */
    public OptionalInt lineOf(Throwable thrown) {
        for (StackTraceElement frame : thrown.getStackTrace()) {
            String className = frame.getClassName();
            if (wrapper != null && (className.equals(wrapper) || className.startsWith(wrapper + "$"))) {
                return OptionalInt.of(sourceLine(frame.getLineNumber()));
            }
        }
        return OptionalInt.empty();
    }

    /** Line of its text, 0-based, on which the code begins, behind comments and blank lines. */
    public int firstLine() {
        return linesBefore(new JavaText(source).start());
    }

    /** The line of the source that stands on a line (1-based) of the wrapped text. */
    private int sourceLine(int wrappedLine) {
        String wrapped = text.wrapped();
        int start = 0;
        for (int line = 1; line < wrappedLine && start >= 0; line++) {
            start = wrapped.indexOf('\n', start) + 1;
        }
        int end = wrapped.indexOf('\n', start);
        for (int at = start; at < (end < 0 ? wrapped.length() : end); at++) {
            int offset = text.wrappedToSourcePosition(at);
            if (offset >= 0 && offset < source.length() && text.sourceToWrappedPosition(offset) == at) {
                return linesBefore(offset);
            }
        }
        return 0;
    }

    private int linesBefore(int offset) {
        return (int) source.substring(0, offset).chars().filter(c -> c == '\n').count();
    }
}

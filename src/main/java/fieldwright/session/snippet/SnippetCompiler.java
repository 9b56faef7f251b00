package fieldwright.session.snippet;

import java.io.File;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import jdk.jshell.DeclarationSnippet;
import jdk.jshell.JShell;
import jdk.jshell.MethodSnippet;
import jdk.jshell.Snippet;
import jdk.jshell.SnippetEvent;
import jdk.jshell.SourceCodeAnalysis;
import jdk.jshell.TypeDeclSnippet;
import jdk.jshell.VarSnippet;

/**
 * Compiles the statements and declarations of working cells with JShell, and runs none of them.
 *
 * <p>Compiling is a function of the text and of what the names in it mean ({@link Declaration}), and is remembered: the
 * same text among the same declarations costs nothing. For that, JShell's own state is kept as small as it can be:
 * <ul>
 * <li>A statement is dropped as soon as it is compiled; its classes stay with us.
 * <li>A variable {@code Q} is compiled under a name used once, {@code Q$17}, and dropped too; a name used again would
 *     make JShell compile once for every earlier use. Only when something below uses
 *     {@code Q} is a variable of that name and type declared to JShell, its <em>slot</em>: a static field in a class of
 *     its own. {@link Workspace} moves the value there. So a change of how {@code Q} is worked out compiles one snippet,
 *     not all those that use it.
 * <li>Methods and classes stay declared as they are.
 * <li>What is declared below the snippet at hand must not be seen by it: names in its text that mean nothing to it are
 *     dropped from JShell before.
 * </ul>
 *
 * <p>For one thread.
 */
public final class SnippetCompiler implements AutoCloseable {
    /** JShell keeps a little of every snippet it has seen; beyond this many it is time for a fresh one. */
    private static final int TIRED = 4000;

    private record Key(String source, Map<String, Declaration> environment, List<Declaration.Import> imports) { }

    private record Active(Declaration declaration, Snippet snippet) { }

    private final ClassStore store = new ClassStore();
    private final CapturingControl control = new CapturingControl(store);
    private final SnippetLoader types = new SnippetLoader(store);
    private final JShell shell;
    private final Map<Key, CompiledSnippet> known = new HashMap<>();
    private final Map<Declaration.Variable, List<String>> slots = new HashMap<>();
    private final Map<String, Active> active = new LinkedHashMap<>();
    private final Collection<String> words;
    private int evaluations;
    /** Set when a name took another meaning in code that stands already; what JShell holds then is of no more use. */
    private boolean spoilt;

    /**
     * @param imports import declarations that stand above every cell
     * @param words   names those imports bring, to suggest one in place of a misspelt one
     */
    public SnippetCompiler(List<String> imports, Collection<String> words) {
        this.words = Set.copyOf(words);
        shell = JShell.builder().executionEngine(control.provider(), Map.of())
                .compilerOptions("-classpath", absoluteClassPath(), "-proc:none").build();
        imports.forEach(shell::eval);
    }

    /** The class path of this process with absolute entries, as child processes and compilers need it. */
    public static String absoluteClassPath() {
        return Arrays.stream(System.getProperty("java.class.path").split(File.pathSeparator))
                .map(entry -> new File(entry).getAbsolutePath()).collect(Collectors.joining(File.pathSeparator));
    }

    /** How often JShell was asked to compile something; for tests that count instead of timing. */
    public int evaluations() {
        return evaluations;
    }

    int redefinitions() {
        return control.redefinitions();
    }

    /** True when a fresh compiler should take over at the next occasion. */
    public boolean isTired() {
        return spoilt || evaluations > TIRED;
    }

    /** A piece of a cell's text and where it begins there. */
    public record Piece(String source, int offset) { }

    /** Splits the text of a cell into statements and declarations. The last may be one that does not end. */
    public List<Piece> split(String cell) {
        List<Piece> pieces = new ArrayList<>();
        int offset = 0;
        while (offset < cell.length()) {
            String rest = cell.substring(offset);
            SourceCodeAnalysis.CompletionInfo piece = shell.sourceCodeAnalysis().analyzeCompletion(rest);
            if (piece.completeness() == SourceCodeAnalysis.Completeness.EMPTY) {
                break;
            }
            boolean ends = piece.source() != null && piece.remaining().length() < rest.length();
            int length = ends ? rest.length() - piece.remaining().length() : rest.length();
            String source = rest.substring(0, length);
            if (!source.isBlank() && !source.strip().equals(";")) {
                boolean semicolonMissing = piece.completeness() == SourceCodeAnalysis.Completeness.COMPLETE_WITH_SEMI;
                pieces.add(new Piece(semicolonMissing ? source + "\n;" : source, offset));
            }
            offset += length;
        }
        return pieces;
    }

    /** The identifiers in a piece that stand by themselves. */
    public static Set<String> names(String source) {
        return new JavaText(source).free();
    }

    /** The variable, method or type a piece declares by its text, whether it compiles or not; null when it declares none. */
    public static String declaredName(String source) {
        JavaText text = new JavaText(source);
        return text.variable().map(JavaText.Declared::name).orElseGet(text::code);
    }

    /**
     * Compiles one piece.
     *
     * @param visible what stands above it, by name, imports by their text, in order. The piece declares none of it again:
     *                the caller sees to that ({@link #declaredName})
     */
    public CompiledSnippet compile(String source, Map<String, Declaration> visible) throws SnippetException {
        JavaText text = new JavaText(source);
        Map<String, Declaration> environment = new LinkedHashMap<>();
        text.free().stream().filter(visible::containsKey).forEach(name -> environment.put(name, visible.get(name)));
        Key key = new Key(source, environment, imports(visible));
        CompiledSnippet compiled = known.get(key);
        if (compiled == null) {
            compiled = compileAnew(text, key, visible);
            known.put(key, compiled);
        }
        return compiled;
    }

    private static List<Declaration.Import> imports(Map<String, Declaration> visible) {
        return visible.values().stream().filter(Declaration.Import.class::isInstance).map(Declaration.Import.class::cast).toList();
    }

    private CompiledSnippet compileAnew(JavaText text, Key key, Map<String, Declaration> visible) throws SnippetException {
        if (spoilt) {
            throw new SnippetException(0, "not compiled, because of the error above.");
        }
        JavaText.Declared variable = text.variable().orElse(null);
        refuse(text, key.source(), variable);
        prepareImports(key.imports());
        Set<String> names = text.all();
        if (variable != null && !text.usesElsewhere(variable.name(), variable.start())) {
            names.remove(variable.name());
        }
        Active overwritten = overwritten(text);
        hideOthers(names, key.environment());
        for (Declaration declaration : key.environment().values()) {
            activate(declaration, key.source());
        }
        String field = variable == null ? null : variable.name() + "$" + evaluations;
        String source = variable == null ? key.source()
                : key.source().substring(0, variable.start()) + field + key.source().substring(variable.end());
        SnippetEvent event = evaluate(source);
        Snippet snippet = event.snippet();
        if (overwritten != null) {
            drop(overwritten.snippet());
        }
        if (snippet.kind() == Snippet.Kind.IMPORT && event.status() == Snippet.Status.VALID) {
            return imported(key, snippet);
        }
        if (event.status() != Snippet.Status.VALID) {
            List<SnippetException.Fault> faults = new Faults(shell, key.source(), variable, field, visible.keySet(), words).of(snippet);
            drop(snippet);
            throw new SnippetException(faults);
        }
        return finished(text, key, variable, field, snippet);
    }

    private static void refuse(JavaText text, String source, JavaText.Declared variable) throws SnippetException {
        if (variable != null && variable.several()) {
            throw new SnippetException(variable.start(),
                    "'" + variable.name() + "' is declared together with others: write one declaration for each name.");
        }
        for (String name : text.free()) {
            if (name.matches("\\$\\d+")) {
                throw new SnippetException(source.indexOf(name),
                        "'" + name + "' is no name of the sheet: give the value a name of its own with 'var name = …'.");
            }
        }
    }

    /** JShell then has the imports that stand above, in their order, and no others. */
    private void prepareImports(List<Declaration.Import> wanted) {
        List<Declaration.Import> standing = standingImports();
        int same = 0;
        while (same < Math.min(standing.size(), wanted.size()) && standing.get(same).equals(wanted.get(same))) {
            same++;
        }
        for (int i = standing.size() - 1; i >= same; i--) {
            hide(standing.get(i).name());
        }
        for (Declaration.Import one : wanted.subList(same, wanted.size())) {
            SnippetEvent event = evaluate(one.name());
            requireUnchanged(one.name());
            active.put(one.name(), new Active(one, event.snippet()));
        }
    }

    private List<Declaration.Import> standingImports() {
        return active.values().stream().map(Active::declaration).filter(Declaration.Import.class::isInstance)
                .map(Declaration.Import.class::cast).toList();
    }

    /** JShell compiles code again when a name in it appears or disappears; when that gives other code, we are lost. */
    private void requireUnchanged(String name) {
        if (!control.wrappers().isEmpty()) {
            throw new StaleException("code changed with '" + name + "'");
        }
    }

    private CompiledSnippet imported(Key key, Snippet snippet) {
        CompiledSnippet compiled = new CompiledSnippet(key.source(), Set.of(), Map.of(), key.imports(), Set.of(), null, false, null, null);
        Declaration.Import declaration = new Declaration.Import(key.source().strip());
        compiled.declare(declaration);
        active.put(declaration.name(), new Active(declaration, snippet));
        return compiled;
    }

    private CompiledSnippet finished(JavaText text, Key key, JavaText.Declared variable, String field, Snippet snippet)
            throws SnippetException {
        boolean runs = !control.invoked().isEmpty();
        SourceCodeAnalysis.SnippetWrapper wrapped = shell.sourceCodeAnalysis().wrapper(snippet);
        String wrapper = wrapped.fullClassName();
        requireNothingElse(wrapper, snippet instanceof DeclarationSnippet declared ? declared.name() : "", 0);
        CompiledSnippet compiled = new CompiledSnippet(key.source(), text.free(), key.environment(), key.imports(),
                store.within(wrapper), wrapper, runs, field, wrapped);
        if (variable != null) {
            compiled.declare(new Declaration.Variable(variable.name(), typeOf(wrapper, field)));
        }
        if (snippet instanceof MethodSnippet || snippet instanceof TypeDeclSnippet) {
            Declaration.Code code = new Declaration.Code(((DeclarationSnippet) snippet).name(), compiled,
                    snippet instanceof TypeDeclSnippet);
            compiled.declare(code);
            if (active.containsKey(code.name())) {
                spoilt = true;
                throw new SnippetException(0, "'" + code.name() + "' is declared above already. Choose another name.");
            }
            active.put(code.name(), new Active(code, snippet));
        } else {
            drop(snippet);
        }
        return compiled;
    }

    private String typeOf(String wrapper, String field) {
        try {
            return JavaType.text(types.loadClass(wrapper).getDeclaredField(field).getGenericType());
        } catch (ReflectiveOperationException e) {
            throw new IllegalStateException("no field " + field + " in " + wrapper, e);
        }
    }

    /** Takes from JShell every name in the text that means nothing, or something else, where the text stands. */
    private void hideOthers(Set<String> names, Map<String, Declaration> environment) {
        for (String name : names) {
            Active standing = active.get(name);
            if (standing != null && !standing.declaration().equals(environment.get(name))) {
                hide(name);
            }
        }
    }

    /** Code that was compiled with this name goes first, lest JShell compile it again without. */
    private void hide(String name) {
        Active gone = active.remove(name);
        if (gone == null) {
            return;
        }
        hideUsers(gone.declaration());
        forget(gone.declaration());
        control.forget();
        drop(gone.snippet());
        requireUnchanged(name);
    }

    private void hideUsers(Declaration used) {
        List.copyOf(active.values()).stream().map(Active::declaration)
                .filter(other -> other instanceof Declaration.Code code && code.snippet().dependsOn(used))
                .forEach(other -> hide(other.name()));
    }

    private void forget(Declaration declaration) {
        if (declaration instanceof Declaration.Code code) {
            known.values().remove(code.snippet());
        }
    }

    /**
     * The method or type that stands and of which this text is another body; null when there is none. JShell replaces it
     * with the new one; to drop it first would make JShell compile once for every body it ever had.
     */
    private Active overwritten(JavaText text) {
        Active standing = active.get(text.code());
        if (standing == null || !(standing.declaration() instanceof Declaration.Code code)
                || !new JavaText(code.snippet().source()).head().equals(text.head())) {
            return null;
        }
        hideUsers(code);
        forget(code);
        return active.remove(code.name());
    }

    /** Makes a name of the environment known to JShell. */
    private void activate(Declaration declaration, String source) throws SnippetException {
        if (active.containsKey(declaration.name())) {
            return;
        }
        if (!(declaration instanceof Declaration.Variable variable)) {
            throw new StaleException("'" + declaration.name() + "' is no longer known");
        }
        SnippetEvent event = evaluate(variable.type() + " " + variable.name() + ";");
        String wrapper = shell.sourceCodeAnalysis().wrapper(event.snippet()).fullClassName();
        requireNothingElse(wrapper, variable.name(), Math.max(0, source.indexOf(variable.name())));
        active.put(variable.name(), new Active(variable, event.snippet()));
        slots.computeIfAbsent(variable, v -> new ArrayList<>()).add(wrapper);
    }

    /**
     * A name that already stood, with another meaning, in a method or class above: JShell has compiled that again, with
     * the new meaning. What it holds now is of no more use.
     */
    private void requireNothingElse(String wrapper, String name, int offset) throws SnippetException {
        if (!Set.of(wrapper).containsAll(control.wrappers())) {
            spoilt = true;
            throw new SnippetException(offset, "'" + name + "' has another meaning in a method or class above: choose another name for one of them.");
        }
    }

    private SnippetEvent evaluate(String source) {
        control.forget();
        evaluations++;
        return shell.eval(source).get(0);
    }

    private void drop(Snippet snippet) {
        if (shell.status(snippet).isActive()) {
            shell.drop(snippet);
        }
    }

    ClassStore store() {
        return store;
    }

    /** Classes that hold a variable for the code that uses it; usually none or one. */
    List<String> slots(Declaration.Variable variable) {
        return slots.getOrDefault(variable, List.of());
    }

    @Override
    public void close() {
        shell.close();
    }
}

package fieldwright.session;

import fieldwright.formula.Names;
import fieldwright.quantity.AuthorException;
import fieldwright.session.snippet.CompiledSnippet;
import fieldwright.session.snippet.Declaration;
import fieldwright.session.snippet.SnippetCompiler;
import fieldwright.session.snippet.SnippetException;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.Set;

/**
 * The Java of one working cell, compiled where it stands, up to the first piece that does not compile.
 *
 * @param steps  what compiled
 * @param faults what is wrong with the piece behind the last step; empty when all compiled
 * @param lost   variables that are not reached because of that
 */
record WorkingCode(List<Step> steps, List<Fault> faults, List<String> lost) {

    /** @param line of the cell's source on which the piece begins, blank lines and comments before it included, 1-based */
    record Step(CompiledSnippet snippet, int line) {

        /** Line of the cell's source where an exception came from. */
        int lineOf(Throwable thrown) {
            return line + snippet.lineOf(thrown).orElse(snippet.firstLine());
        }
    }

    /** @param line of the cell's source, 1-based */
    record Fault(int line, String message) { }

    List<CompiledSnippet> snippets() {
        return steps.stream().map(Step::snippet).toList();
    }

    /** Compiles the text of working cells and remembers how it splits. */
    static final class Maker {
        private final SnippetCompiler compiler;
        private final Map<String, List<SnippetCompiler.Piece>> splits = new HashMap<>();

        Maker(SnippetCompiler compiler) {
            this.compiler = compiler;
        }

        List<SnippetCompiler.Piece> split(String source) {
            return splits.computeIfAbsent(source, compiler::split);
        }

        /** @param libraries Java text of a class for each library sheet, by its name; compiled where it is used */
        WorkingCode make(Draft cell, Map<String, String> libraries) {
            String source = cell.cell().source();
            Map<String, Declaration> visible = new LinkedHashMap<>(cell.above().declarations());
            Set<String> own = new LinkedHashSet<>();
            List<Step> steps = new ArrayList<>();
            List<SnippetCompiler.Piece> pieces = split(source);
            for (int i = 0; i < pieces.size(); i++) {
                SnippetCompiler.Piece piece = pieces.get(i);
                try {
                    String declared = SnippetCompiler.declaredName(piece.source());
                    if (declared != null) {
                        requireNew(cell, own, declared, piece);
                        own.add(declared);
                    }
                    addLibraries(piece, libraries, visible);
                    CompiledSnippet snippet = compiler.compile(piece.source(), visible);
                    if (snippet.declares() != null) {
                        requireFit(snippet.declares(), piece);
                        visible.put(snippet.declares().name(), snippet.declares());
                    }
                    steps.add(new Step(snippet, lineAt(source, piece.offset())));
                } catch (SnippetException e) {
                    return new WorkingCode(steps, faults(e, source, piece, cell), declaredFrom(pieces, i));
                }
            }
            return new WorkingCode(steps, List.of(), List.of());
        }

        private void addLibraries(SnippetCompiler.Piece piece, Map<String, String> libraries, Map<String, Declaration> visible)
                throws SnippetException {
            for (Map.Entry<String, String> library : libraries.entrySet()) {
                if (!visible.containsKey(library.getKey()) && SnippetCompiler.names(piece.source()).contains(library.getKey())) {
                    Map<String, Declaration> imports = new LinkedHashMap<>(visible);
                    imports.values().removeIf(declaration -> !(declaration instanceof Declaration.Import));
                    visible.put(library.getKey(), compiler.compile(library.getValue(), imports).declares());
                }
            }
        }

        private static List<String> declaredFrom(List<SnippetCompiler.Piece> pieces, int first) {
            return pieces.subList(first, pieces.size()).stream().map(piece -> SnippetCompiler.declaredName(piece.source()))
                    .filter(Objects::nonNull).toList();
        }

        private static void requireNew(Draft cell, Set<String> own, String name, SnippetCompiler.Piece piece) throws SnippetException {
            try {
                cell.requireFree(name, false);
            } catch (AuthorException e) {
                throw new SnippetException(start(piece, name), e.getMessage());
            }
            if (own.contains(name)) {
                throw new SnippetException(start(piece, name), "'" + name + "' is declared twice in this cell. Choose another name for one of them.");
            }
        }

        /** A variable that becomes a name of the sheet must have a name that formulas can use. */
        private static void requireFit(Declaration declared, SnippetCompiler.Piece piece) throws SnippetException {
            String reserved = declared instanceof Declaration.Variable variable && SheetTypes.isNamed(variable.type())
                    ? Names.whyReserved(variable.name()) : null;
            if (reserved != null) {
                throw new SnippetException(start(piece, declared.name()), reserved);
            }
        }

        private static int start(SnippetCompiler.Piece piece, String name) {
            return Math.max(0, piece.source().indexOf(name));
        }

        private List<Fault> faults(SnippetException e, String source, SnippetCompiler.Piece piece, Draft cell) {
            List<Fault> faults = new ArrayList<>();
            for (SnippetException.Fault fault : e.faults()) {
                SheetName failed = fault.name() == null ? null : cell.above().get(fault.name());
                String more = fault.name() == null ? null : cell.hint(fault.name());
                String message = failed != null && failed.isFailed() ? cell.hasNoValue(failed)
                        : more != null ? "no '" + fault.name() + "' above. " + more : fault.message();
                faults.add(new Fault(line(source, piece.offset() + fault.offset()), message));
            }
            return faults;
        }

        /** Line of what stands at an offset, or of the next text after it. */
        private static int line(String source, int offset) {
            int at = offset;
            while (at < source.length() && Character.isWhitespace(source.charAt(at))) {
                at++;
            }
            return lineAt(source, at);
        }

        private static int lineAt(String source, int offset) {
            return 1 + (int) source.substring(0, Math.min(offset, source.length())).chars().filter(c -> c == '\n').count();
        }
    }
}

package fieldwright.session;

import fieldwright.session.snippet.SnippetCompiler;
import fieldwright.session.snippet.Workspace;
import java.lang.reflect.Modifier;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/** A compiler, the workspace its code runs in, and what the cells worked there have given. Lives and dies as one. */
final class Engine implements AutoCloseable {
    private static final List<String> IMPORTS = List.of(
            "import java.util.*;", "import java.util.function.*;", "import java.util.stream.*;",
            "import fieldwright.quantity.Amount;", "import fieldwright.quantity.Place;", "import fieldwright.quantity.Vector;",
            "import fieldwright.formula.Formula;", "import fieldwright.words.*;", "import static fieldwright.words.Words.*;");

    private final SnippetCompiler compiler = new SnippetCompiler(IMPORTS, words());
    private final WorkingCode.Maker maker = new WorkingCode.Maker(compiler);
    private Workspace workspace = new Workspace(compiler);
    private boolean fresh = true;
    private Map<String, List<CellRun>> earlier = Map.of();

    private static List<String> words() {
        return Arrays.stream(fieldwright.words.Words.class.getMethods()).filter(method -> Modifier.isStatic(method.getModifiers()))
                .map(java.lang.reflect.Method::getName).distinct().toList();
    }

    SnippetCompiler compiler() {
        return compiler;
    }

    WorkingCode.Maker maker() {
        return maker;
    }

    Workspace workspace() {
        return workspace;
    }

    boolean isFresh() {
        return fresh;
    }

    void used() {
        fresh = false;
    }

    /** Forgets what cells have given and begins with new classes; what is compiled stays. */
    void restart() {
        workspace = new Workspace(compiler);
        fresh = true;
        earlier = Map.of();
    }

    void keep(List<CellRun> runs) {
        Map<String, List<CellRun>> byText = new HashMap<>();
        runs.forEach(run -> byText.computeIfAbsent(key(run.kind(), run.source()), key -> new ArrayList<>()).add(run));
        earlier = byText;
    }

    /** For each cell of a sheet what an earlier cell of the same text gave; each serves once. */
    List<CellRun> earlier(List<fieldwright.sheet.Cell> cells) {
        Map<String, Integer> taken = new HashMap<>();
        List<CellRun> found = new ArrayList<>();
        for (fieldwright.sheet.Cell cell : cells) {
            String key = key(cell.kind(), cell.source());
            List<CellRun> candidates = earlier.getOrDefault(key, List.of());
            int next = taken.merge(key, 1, Integer::sum) - 1;
            found.add(next < candidates.size() ? candidates.get(next) : null);
        }
        return found;
    }

    private static String key(fieldwright.sheet.Cell.Kind kind, String source) {
        return kind + "\n" + source;
    }

    @Override
    public void close() {
        compiler.close();
    }
}

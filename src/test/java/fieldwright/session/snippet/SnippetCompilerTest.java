package fieldwright.session.snippet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SnippetCompilerTest {
    private final SnippetCompiler compiler = new SnippetCompiler(List.of("import java.util.*;", "import java.util.function.*;"),
            List.of("totalCharge"));
    private final Workspace workspace = new Workspace(compiler);

    @AfterEach
    void close() {
        compiler.close();
    }

    /** Compiles and runs pieces one below the other, each seeing those above; returns all values. */
    private Map<String, Object> work(String... pieces) throws Throwable {
        return work(workspace, pieces);
    }

    private Map<String, Object> work(Workspace where, String... pieces) throws Throwable {
        where.clear();
        Map<String, Declaration> visible = new LinkedHashMap<>();
        Map<String, Object> values = new LinkedHashMap<>();
        for (String piece : pieces) {
            CompiledSnippet snippet = compiler.compile(piece, visible);
            if (snippet.runs()) {
                where.run(snippet).forEach((variable, value) -> values.put(variable.name(), value));
            }
            if (snippet.declares() != null) {
                visible.put(snippet.declares().name(), snippet.declares());
            }
        }
        return values;
    }

    private SnippetException refused(String... pieces) {
        return assertThrows(SnippetException.class, () -> work(pieces));
    }

    @Test
    void variablesMethodsClassesAndImportsServeWhatStandsBelow() throws Throwable {
        Map<String, Object> values = work("import java.math.BigDecimal;", "var a = 2;", "double twice(double x) { return x * a; }",
                "record P(double x, double y) { double sum() { return twice(x) + y; } }", "var p = new P(3, 4);",
                "double s = p.sum();", "List<P> ps = List.of(p, p);", "int n = ps.size();", "String t = ps.get(0).toString();",
                "BigDecimal b = BigDecimal.TEN;");
        assertEquals(10.0, values.get("s"));
        assertEquals(2, values.get("n"));
        assertEquals("P[x=3.0, y=4.0]", values.get("t"));
        assertEquals(java.math.BigDecimal.TEN, values.get("b"));
    }

    @Test
    void assignmentsAndStatementsChangeVariables() throws Throwable {
        assertEquals(6, work("int sum = 0;", "for (int i = 0; i < 4; i++) { sum += i; }").get("sum"));
        assertEquals(3, work("int n;", "n = 3;").get("n"));
        assertEquals(7, work("var n = new int[] {5};", "Runnable r = () -> { n[0] += 2; };", "r.run();", "int k = n[0];").get("k"));
    }

    @Test
    void aChangedInitialiserOfTheSameTypeCompilesOneSnippet() throws Throwable {
        work("double a = 2;", "double b = a * a;", "double c = a + b;");
        int before = compiler.evaluations();
        Map<String, Object> values = work("double a = 3;", "double b = a * a;", "double c = a + b;");
        assertEquals(12.0, values.get("c"));
        assertEquals(before + 1, compiler.evaluations());
    }

    @Test
    void anotherTypeCompilesWhatUsesIt() throws Throwable {
        work("var a = 2;", "var b = a + 1;", "var c = \"<\" + b + \">\";", "var d = 1;");
        int before = compiler.evaluations();
        Map<String, Object> values = work("var a = \"2\";", "var b = a + 1;", "var c = \"<\" + b + \">\";", "var d = 1;");
        assertEquals("<21>", values.get("c"));
        assertEquals(before + 5, compiler.evaluations(), "three snippets and two variables of another type");
    }

    @Test
    void nothingBelowIsSeen() throws Throwable {
        work("var a = 1;", "var b = 2;", "var c = a + b;");
        assertTrue(refused("var a = b;", "var b = 2;", "var c = a + b;").getMessage().contains("no variable 'b'"));
        assertEquals(3, work("var a = 1;", "var b = 2;", "var c = a + b;").get("c"));
    }

    @Test
    void aNameBelowDoesNotChangeTheMeaningAbove() throws Throwable {
        String[] first = {"double k = 1;", "double y = max(2, 3);", "double max(double a, double b) { return -1; }",
            "double z = max(2, 3);"};
        SnippetCompiler other = new SnippetCompiler(List.of("import static java.lang.Math.*;"), List.of());
        try (other) {
            Map<String, Declaration> visible = new LinkedHashMap<>();
            List<Object> values = new ArrayList<>();
            Workspace where = new Workspace(other);
            for (int pass = 0; pass < 2; pass++) {
                visible.clear();
                for (String piece : first) {
                    CompiledSnippet snippet = other.compile(pass == 0 ? piece : piece.replace("y = max(2, 3)", "y = max(2, 3) + 0"), visible);
                    if (snippet.runs()) {
                        values.addAll(where.run(snippet).values());
                    }
                    visible.put(snippet.declares().name(), snippet.declares());
                }
            }
            assertEquals(List.of(1.0, 3.0, -1.0, 1.0, 3.0, -1.0), values);
        }
    }

    @Test
    void aParameterOfTheSameNameAsAVariableBelowIsNoUse() throws Throwable {
        String[] pieces = {"double f(double x) { return 2 * x; }", "DoubleUnaryOperator g = x -> x + 1;", "double x = 5;",
            "double y = f(x) + g.applyAsDouble(x);"};
        assertEquals(16.0, work(pieces).get("y"));
        pieces[1] = "DoubleUnaryOperator g = x -> x + 2;";
        assertEquals(17.0, work(pieces).get("y"));
        pieces[0] = "double f(double x) { return 3 * x; }";
        assertEquals(22.0, work(pieces).get("y"));
    }

    @Test
    void aNameThatChangesTheMeaningOfCodeAboveIsRefused() {
        SnippetException e = refused("double f() { return List.of(1).size(); }", "class List { static int of(int i) { return 7; } }",
                "var k = List.of(1);", "var m = f();");
        assertTrue(e.getMessage().contains("another meaning"), e.getMessage());
    }

    @Test
    void workspacesAreIndependent() throws Throwable {
        String[] pieces = {"class Counter { static int n; static int next() { return ++n; } }", "int a = Counter.next();",
            "int b = Counter.next();"};
        assertEquals(2, work(pieces).get("b"));
        assertEquals(4, work(pieces).get("b"), "the same workspace goes on counting");
        assertEquals(2, work(new Workspace(compiler), pieces).get("b"));
        assertTrue(workspace.keepsState(compiler.compile(pieces[0], Map.of())));
        assertFalse(workspace.keepsState(compiler.compile("enum Side { LEFT, RIGHT }", Map.of())));
        assertFalse(workspace.keepsState(compiler.compile("record P(double x) { static final double ONE = 1; }", Map.of())));
    }

    @Test
    void runningAgainBeginsFromNothing() throws Throwable {
        String[] pieces = {"int n;", "n++;"};
        assertEquals(1, work(pieces).get("n"));
        assertEquals(1, work(pieces).get("n"));
    }

    @Test
    void theSameTextAmongTheSameNamesIsCompiledOnce() throws Throwable {
        CompiledSnippet first = compiler.compile("double q = 1;", Map.of());
        assertSame(first, compiler.compile("double q = 1;", Map.of()));
    }

    /** JShell compiles again for each earlier class of the same name; see that there is none. */
    @Test
    void editingOneLineAgainAndAgainCostsTheSame() throws Throwable {
        for (int i = 0; i < 12; i++) {
            Map<String, Object> values = work("double a = " + i + ";", "double f(double x) { return " + i + " * x; }",
                    "record P(double u) { double v() { return u + " + i + "; } }", "double b = f(a) + new P(1).v();");
            assertEquals((double) i * i + 1 + i, values.get("b"));
            assertTrue(compiler.redefinitions() <= 2 * i + 2, "redefined " + compiler.redefinitions() + " times after " + i + " edits");
        }
    }

    @Test
    void theOwnNameWithinIsAnotherOneOrAFault() throws Throwable {
        assertEquals(3, work("IntUnaryOperator x = n -> { int x = n + 1; return x; };", "int k = x.applyAsInt(2);").get("k"));
        assertEquals(3, work("IntUnaryOperator x = n -> { int x = n + 1; return x; };", "int k = x.applyAsInt(2);").get("k"));
        for (int i = 0; i < 2; i++) {
            assertTrue(refused("IntUnaryOperator f = n -> n < 1 ? 1 : n * f.applyAsInt(n - 1);", "int k = f.applyAsInt(2);").getMessage()
                    .startsWith("'f' is used in its own declaration"));
            work("IntUnaryOperator f = n -> n;", "int k = f.applyAsInt(2);");
        }
        assertEquals("';' expected.", refused("var a = 1\nvar b = a + 1;").getMessage());
    }

    @Test
    void aMethodThatFailsAndIsMended() throws Throwable {
        String[] pieces = {"double f(double x) { return x; }", "double b = f(1);"};
        assertEquals(1.0, work(pieces).get("b"));
        refused("double f(double x) { return y; }", pieces[1]);
        refused("double f(double x) { return ; }", pieces[1]);
        refused(pieces[1]);
        assertEquals(1.0, work(pieces).get("b"));
        assertEquals(3.0, work("double f(int x) { return 3 * x; }", pieces[1]).get("b"));
        assertEquals(1.0, work(pieces).get("b"));
    }

    @Test
    void imports() throws Throwable {
        assertEquals(3, work("import static java.lang.Math.*;", "int m = max(2, 3);").get("m"));
        assertTrue(refused("int m = max(2, 3);", "import static java.lang.Math.*;").getMessage().contains("no method 'max(int,int)'"));
        assertEquals(3, work("import static java.lang.Math.*;", "int m = max(2, 3);").get("m"));
        assertEquals(4, work("int k = 1;", "import static java.lang.Math.*;", "int m = max(2, 3) + k;").get("m"));
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = '!', value = {
        "var q = totalCharg(); ! 8 ! no method 'totalCharg()'. Closest: 'totalCharge'.",
        "int q = \"a\"; ! 8 ! incompatible types: String cannot be converted to int.",
        "var q = List.of(1).sise(); ! 18 ! List has no method 'sise()'. Closest: 'size'.",
        "var q = 1 ! 8 ! the statement does not end here: a ';', a bracket or a quote is missing.",
        "int f(int x) { return y; } ! 22 ! no variable 'y'.",
        "int f(int x) { ! 13 ! the statement does not end here: a ';', a bracket or a quote is missing.",
        "int a = 1, b = 2; ! 4 ! 'a' is declared together with others: write one declaration for each name.",
        "var q = $1 + 2; ! 8 ! '$1' is no name of the sheet: give the value a name of its own with 'var name = …'.",
        "var q = q + 1; ! 8 ! 'q' is used in its own declaration, where it has no value yet. Declare it first, or choose another name within."
    })
    void faultsSayWhereAndWhat(String text, int offset, String message) {
        SnippetException e = refused(text);
        assertEquals(message, e.faults().get(0).message());
        assertEquals(offset, e.faults().get(0).offset());
        assertFalse(e.getMessage().contains("JShell") || e.getMessage().contains("REPL"), e.getMessage());
    }

    @Test
    void exceptionsHaveALine() throws Throwable {
        String text = "\nvar q =\n    Integer.parseInt(\n        \"x\");";
        CompiledSnippet snippet = compiler.compile(text, Map.of());
        NumberFormatException e = assertThrows(NumberFormatException.class, () -> workspace.run(snippet));
        assertEquals(2, snippet.lineOf(e).orElseThrow());
        CompiledSnippet loop = compiler.compile("for (int i = 0; i < 3; i++) {\n    int[] a = new int[i];\n    a[1] = 2;\n}", Map.of());
        RuntimeException out = assertThrows(ArrayIndexOutOfBoundsException.class, () -> workspace.run(loop));
        assertEquals(2, loop.lineOf(out).orElseThrow());
        assertTrue(snippet.lineOf(out).isEmpty());
    }

    @Test
    void splitting() {
        String cell = "// a note\nvar a = 1; var b = 2;\n\nif (a > 0) a = 3;\nelse a = 4;\nint f(int x) {\n  return x; }\n;\nshow(a) // end";
        List<SnippetCompiler.Piece> pieces = compiler.split(cell);
        assertEquals(List.of("// a note\nvar a = 1;", "var b = 2;", "if (a > 0) a = 3;\nelse a = 4;",
                "int f(int x) {\n  return x; }", "show(a) // end"), pieces.stream().map(piece -> piece.source().strip()).toList());
        for (SnippetCompiler.Piece piece : pieces) {
            assertTrue(cell.startsWith(piece.source().replaceAll(";$", ""), piece.offset()));
        }
        assertEquals(List.of("var a = 1;", "var b = (2"), compiler.split("var a = 1;var b = (2").stream()
                .map(SnippetCompiler.Piece::source).toList());
        assertEquals("var a = 1 // end\n;", compiler.split("var a = 1 // end").get(0).source());
        assertEquals(List.of(), compiler.split(" // nothing\n"));
    }
}

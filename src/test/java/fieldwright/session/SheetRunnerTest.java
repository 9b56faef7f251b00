package fieldwright.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.CellOutcome;
import fieldwright.output.CellOutcome.State;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.output.Value;
import java.util.List;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Sheets worked in this process, all by one runner, as they would be one after the other in a long session. */
class SheetRunnerTest {
    private static SheetRunner runner;

    @BeforeAll
    static void start() {
        runner = new SheetRunner();
    }

    @AfterAll
    static void end() {
        runner.close();
    }

    /** A sheet of cells, each given as its kind and its lines. */
    static String sheet(String... cells) {
        StringBuilder text = new StringBuilder("fieldwright sheet 1\n");
        for (String cell : cells) {
            text.append("\n:: ").append(cell.strip()).append('\n');
        }
        return text.toString();
    }

    private static RunOutcome work(String... cells) {
        return runner.work(sheet(cells), WorkOptions.RESULTS, progress -> { });
    }

    private static Value.Scalar scalar(RunOutcome outcome, String name) {
        return (Value.Scalar) outcome.all(Output.Result.class).stream().filter(result -> result.name().equals(name)).findFirst()
                .orElseThrow(() -> new AssertionError("no result " + name + " in " + outcome.problems())).value();
    }

    private static double number(RunOutcome outcome, String name) {
        return scalar(outcome, name).value();
    }

    private static List<String> problems(RunOutcome outcome) {
        return outcome.problems().stream().map(Output.Problem::text).toList();
    }

    private static List<State> states(RunOutcome outcome) {
        return outcome.cells().stream().map(CellOutcome::state).toList();
    }

    // -- what a working cell yields --

    @Test
    void amountsBecomeNamesOfTheSheetAndResults() {
        RunOutcome outcome = work("input\na = 2 m\nb = 3 kV", "working\nvar c = a.times(2);\nint n = 3;\nAmount d = calc(\"c*b\");",
                "derive\ne = c + d/b in mm");
        assertEquals(List.of(), problems(outcome));
        assertEquals(List.of("c", "d", "e"), outcome.all(Output.Result.class).stream().map(Output.Result::name).toList());
        assertEquals(8, number(outcome, "e"), 1e-12);
        assertEquals("mm", scalar(outcome, "e").shown().unit());
        assertEquals(12_000, number(outcome, "d"), 1e-9);
        assertEquals(3, outcome.all(Output.Given.class).size() + 1);
    }

    @Test
    void formulasAndVectorsBecomeNames() {
        RunOutcome outcome = work("input\na = 2 m", "derive\nf = 3*x/a\ng(s: m) = s^2 for s > 0 m",
                "working\nFormula h = formula(\"f*2\");\nvar w = calc(\"g(a)\");\nvar v = pointCharge(at(\"0\",\"0\",\"0\"), \"1 nC\").inFreeSpace()"
                        + ".electricField(at(\"0\", \"0\", \"a\"));", "working\nvar k = v.z();");
        assertEquals(List.of(), problems(outcome));
        assertEquals(List.of("f", "g", "h"), outcome.all(Output.Typeset.class).stream().map(Output.Typeset::name).toList());
        assertEquals(4, number(outcome, "w"), 1e-12);
        assertEquals(1e-9 / (4 * Math.PI * 8.8541878188e-12 * 4), number(outcome, "k"), 1e-9);
        assertTrue(outcome.all(Output.Result.class).stream().anyMatch(r -> r.name().equals("v") && r.value() instanceof Value.Triple));
    }

    @Test
    void otherVariablesMethodsAndClassesServeBelowWithoutBeingResults() {
        RunOutcome outcome = work("working\nint n = 2;\nvar list = List.of(1, 2);\ndouble twice(double x) { return n * x; }\n"
                + "record Pair(double u, double v) { }", "working\nvar p = new Pair(twice(4), list.size());\nvar s = Amount.of(p.u() + p.v());");
        assertEquals(List.of(), problems(outcome));
        assertEquals(List.of("s"), outcome.all(Output.Result.class).stream().map(Output.Result::name).toList());
        assertEquals(10, number(outcome, "s"));
    }

    @Test
    void resultServesComputedNamesAndChoosesTheUnit() {
        RunOutcome outcome = work("working\nfor (int i = 1; i <= 2; i++) {\n  result(\"U_\" + i, Amount.of(i, \"kV\"), \"V\");\n}\n"
                + "var Q = Amount.of(2e-9, \"C\");\nresult(\"Q\", Q, \"nC\");", "derive\nS = U_1 + U_2", "working\nvar T = U_2.minus(U_1);");
        assertEquals(List.of(), problems(outcome));
        assertEquals(List.of("U_1", "U_2", "Q", "S", "T"), outcome.all(Output.Result.class).stream().map(Output.Result::name).toList());
        assertEquals("nC", scalar(outcome, "Q").shown().unit());
        assertEquals(1000, number(outcome, "T"), 1e-9);
    }

    @Test
    void aVariableIsShownWithItsLastValue() {
        RunOutcome outcome = work("working\nvar Q = Amount.of(1, \"C\");\nshow(\"text\");\nQ = Q.times(3);", "derive\nR = 2*Q");
        assertEquals(List.of(), problems(outcome));
        assertEquals(3, number(outcome, "Q"));
        assertEquals(6, number(outcome, "R"));
        RunOutcome late = work("working\nvar Q = Amount.of(1, \"C\");\nresult(\"Q\", Q, \"nC\");\nQ = Q.times(3);");
        assertEquals(List.of("cell 1, line 6: 'Q' changes after its result was given. Give the result last."), problems(late));
    }

    @Test
    void inputsThatAreNoNumberAreJavaValues() {
        RunOutcome outcome = work("input\nn = 3 (whole)\nd = [1, 2, 5] mm\nfilm = PE of {PE, PTFE}\nt = table(h / mm: 1, 2; U / kV: 3, 4)",
                "working\nvar last = d.get(n - 1);\nvar U = t.get(\"U\").get(1);\nvar k = Amount.of(film.equals(\"PE\") ? 2.3 : 2.1);");
        assertEquals(List.of(), problems(outcome));
        assertEquals(5e-3, number(outcome, "last"), 1e-15);
        assertEquals(4000, number(outcome, "U"), 1e-9);
        assertEquals(2.3, number(outcome, "k"));
    }

    // -- who may write a name, and what sees it --

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = '!', value = {
        "working~var q = Amount.of(1); ! working~var q = Amount.of(2); ! cell 2, line 7: 'q' is written by cell 1 and again by cell 2",
        "input~q = 1 ! working~var q = Amount.of(2); ! cell 2, line 7: 'q' is written by cell 1 and again by cell 2",
        "input~q = 1 ! derive~q = 2 ! cell 2, line 7: 'q' is written by cell 1 and again by cell 2",
        "input~q = 1 ! input~q = 2 ! cell 2, line 7: 'q' is written by cell 1 and again by cell 2",
        "derive~q = 1 ! working~result(\"q\", Amount.of(2)); ! cell 2, line 7: 'q' is written by cell 1 and again by cell 2",
        "working~var q = Amount.of(1); ! working~q = Amount.of(2); ! cell 2, line 7: 'q' is written by cell 1 and assigned in cell 2",
        "working~int q = 1; ! working~for (int i = 0; i < 3; i++) q += i; ! cell 2, line 7: 'q' is written by cell 1 and assigned in cell 2",
        "working~int f(int x) { return x; } ! working~int f(int x) { return -x; } ! cell 2, line 7: 'f' is written by cell 1 and again by cell 2",
        "working~record P(int x) { } ! working~class P { } ! cell 2, line 7: 'P' is written by cell 1 and again by cell 2"
    })
    void aNameIsWrittenByOneCell(String first, String second, String problem) {
        RunOutcome outcome = work(first.replace('~', '\n'), second.replace('~', '\n'));
        assertEquals(1, outcome.problems().size(), problems(outcome).toString());
        assertTrue(problems(outcome).get(0).startsWith(problem), problems(outcome).toString());
        assertEquals(State.FAILED, states(outcome).get(1));
        assertTrue(outcome.cells().get(0).isComplete());
    }

    @Test
    void anAssignmentFromElsewhereLeavesTheValue() {
        RunOutcome outcome = work("working\nvar q = Amount.of(1);", "working\nq = Amount.of(2);", "derive\nu = 10*q", "working\nvar s = q.times(5);");
        assertEquals(10, number(outcome, "u"));
        assertEquals(5, number(outcome, "s"));
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = '!', value = {
        "working~var q = Amount.of(1);~var q = Amount.of(2); ! cell 1, line 5: 'q' is declared twice in this cell. Choose another name for one of them.",
        "input~q = 1~q = 2 ! cell 1, line 5: 'q' is declared twice in this cell. Choose another name for one of them.",
        "derive~q = 1~q = 2 ! cell 1, line 5: 'q' is declared twice in this cell. Choose another name for one of them.",
        "input~rho = 1 m ! cell 1, line 4: name 'rho' is reserved (a coordinate). Choose another, such as 'rho_1'.",
        "derive~pi = 3 ! cell 1, line 4: name 'pi' is reserved (a constant). Choose another, such as 'pi_1'.",
        "working~var phi = Amount.of(1); ! cell 1, line 4: name 'phi' is reserved (a coordinate). Choose another, such as 'phi_1'."
    })
    void namesThatCannotBe(String cell, String problem) {
        assertEquals(List.of(problem), problems(work(cell.replace('~', '\n'))));
    }

    @Test
    void nothingBelowIsSeen() {
        RunOutcome outcome = work("working\nvar a = b.times(2);", "derive\nc = 2*b", "working\nvar b = Amount.of(1);", "derive\nd = 2*b");
        assertEquals(List.of("cell 1, line 4: no 'b' above. Cell 3, below, declares it; a cell sees what stands above it.",
                "cell 2, line 7: no quantity 'b'. Define it above this line. Cell 3, below, declares it; a cell sees what stands above it."),
                problems(outcome));
        assertEquals(2, number(outcome, "d"));
        assertEquals(List.of(), problems(work("working\nvar b = Amount.of(1);", "working\nvar a = b.times(2);")));
        assertEquals(2, work("working\nvar a = b.times(2);", "working\nvar b = Amount.of(1);").problems().get(0).line() / 2);
    }

    // -- errors --

    @Test
    void errorsOfCompilationNameTheLine() {
        RunOutcome outcome = work("working\nvar a = 1;\n\n// a note\nvar q =\n   totalCharg(3);\nvar b = 2;");
        assertEquals(List.of("cell 1, line 8: no method 'totalCharg(int)'."), problems(outcome).stream()
                .map(text -> text.replaceAll(" Closest.*", "")).toList());
        assertEquals(List.of("cell 1, line 4: incompatible types: String cannot be converted to int."), problems(work("working\nint i = \"x\";")));
    }

    @Test
    void exceptionsNameTheLineAndTheirClass() {
        assertEquals(List.of("cell 1, line 6: ArithmeticException: / by zero"),
                problems(work("working\nint a = 0;\nint f(int x) { return 1 / x; }\nint b = f(a);")));
        assertEquals(List.of("cell 1, line 6: NumberFormatException: For input string: \"x\""),
                problems(work("working\nint a =\n   1 +\n   Integer.parseInt(\"x\");")));
        assertTrue(problems(work("working\nint f(int n) { return f(n + 1); }\nint a = f(1);")).get(0)
                .startsWith("cell 1, line 5: calls within calls without end"));
    }

    @Test
    void theAuthorsErrorsPassThrough() {
        List<String> problems = problems(work("input\na = 2 m", "working\nvar b = calc(\"a + 1 kg\");"));
        assertEquals(1, problems.size());
        assertTrue(problems.get(0).startsWith("cell 2, line 7: "), problems.get(0));
        assertFalse(problems.get(0).contains("internal"), problems.get(0));
        assertFalse(problems.get(0).contains("JShell"), problems.get(0));
    }

    @Test
    void ourOwnErrorsSaySo() {
        RunOutcome outcome = work("working\nvar q = new fieldwright.session.OwnFault().fail();");
        assertTrue(problems(outcome).get(0).startsWith("cell 1, line 4: internal: IllegalStateException: at fault (fieldwright.session.OwnFault"),
                problems(outcome).get(0));
    }

    @Test
    void afterAFailureTheCellEndsAndOthersGoOn() {
        RunOutcome outcome = work("working\nvar a = Amount.of(1);\nvar b = Amount.of(Integer.parseInt(\"x\"));\nvar c = Amount.of(3);",
                "working\nvar d = c.times(2);", "derive\ne = 2*b\nf = 5*a", "working\nvar g = a.times(7);");
        assertEquals(List.of(State.FAILED, State.FAILED, State.FAILED, State.WORKED), states(outcome));
        assertEquals(List.of("cell 1, line 5: NumberFormatException: For input string: \"x\"",
                "cell 2, line 9: 'c' has no value: cell 1 failed.", "cell 3, line 12: 'b' has no value: cell 1 failed."), problems(outcome));
        assertEquals(5, number(outcome, "f"));
        assertEquals(7, number(outcome, "g"));
    }

    @ParameterizedTest(name = "''{0}''")
    @CsvSource(delimiter = '!', value = {
        "'' ! 0", "hello ! 1", "fieldwright sheet 2 ! 1", "fieldwright sheet 1~:: workin~ ! 2"})
    void whatIsNoSheetIsRefused(String text, int line) {
        RunOutcome outcome = runner.work(text.replace('~', '\n'), WorkOptions.FULL, progress -> { });
        assertEquals(1, outcome.problems().size());
        assertEquals(line, outcome.problems().get(0).line());
        assertEquals(RunOutcome.SHEET_ERROR, outcome.exitCode());
    }

    @Test
    void accuracyIsChecked() {
        RunOutcome outcome = runner.work("fieldwright sheet 1\naccuracy: high\n\n:: derive\na = 1\n", WorkOptions.FULL, progress -> { });
        assertEquals(List.of("line 2: accuracy: high is not a relative tolerance between 1e-14 and 0.1, such as 1e-9."), problems(outcome));
    }

    @Test
    void accuracyOfTheSheetIsThatOfItsNumbers() {
        String cell = "\n:: working\nvar V = volumeCharge(cylinder(\"1 m\", \"1 m\"), \"1 (nC/m^3)*(1 - 0.9*rho/(1 m))\").inFreeSpace()"
                + ".potential(at(\"2 m\", \"0\", \"0.3 m\"));\n";
        Value.Scalar loose = scalar(runner.work("fieldwright sheet 1\naccuracy: 1e-3\n" + cell, WorkOptions.RESULTS, progress -> { }), "V");
        Value.Scalar tight = scalar(runner.work("fieldwright sheet 1\naccuracy: 1e-12\n" + cell, WorkOptions.RESULTS, progress -> { }), "V");
        assertEquals(tight.value(), loose.value(), loose.numericalError());
        assertTrue(tight.numericalError() < 1e-12 * tight.value() && loose.numericalError() > 10 * tight.numericalError(),
                loose.numericalError() + " " + tight.numericalError());
    }

    @Test
    void labelsStandOnce() {
        RunOutcome outcome = work("working\ncheck(\"same\", Amount.of(1), Amount.of(1), 1e-9);", "working\ncheck(\"same\", Amount.of(2), Amount.of(2), 1e-9);");
        assertEquals(List.of("cell 2, line 6: check 'same' stands in cell 1 and again in cell 2. Give one of them another label."), problems(outcome));
    }

    // -- notes, printing, typesetting --

    @Test
    void notesQuoteResults() {
        RunOutcome outcome = work("note\nIt is {U} at most, {n} times, \\{x}.", "input\nn = 3 (whole)", "derive\nU = 12345.678 V in kV");
        assertEquals("It is 12.35 kV at most, 3 times, {x}.", outcome.all(Output.Note.class).get(0).commonmark());
        assertEquals(List.of("cell 1, line 5: the note quotes {U_q}, but there is no such result. Closest: 'U_p'. A brace that quotes nothing is written \\{."),
                problems(work("note\nIt is\n{U_q}.", "derive\nU_p = 1 V")));
    }

    @Test
    void deriveLinesAreTypeset() {
        RunOutcome outcome = work("input\nR_s = 2 m", "derive\nA = pi*R_s^2 | area | by hand\n  = R_s^2*pi");
        assertEquals(List.of(), problems(outcome));
        List<Output.Typeset> lines = outcome.all(Output.Typeset.class);
        assertEquals("A=\\pi\\,R_{s}^{2}", lines.get(0).latex());
        assertEquals("area", lines.get(0).description());
        assertTrue(outcome.all(Output.Check.class).get(0).passed());
        RunOutcome wrong = work("input\nR_s = 2 m", "derive\nA = pi*R_s^2\n  = 3*R_s^2");
        assertFalse(wrong.all(Output.Check.class).get(0).passed());
        assertEquals(RunOutcome.JUDGED_BAD, wrong.exitCode());
    }

    // -- work that is not done again --

    @Test
    void unchangedCellsAreReused() {
        String[] cells = {"input\na = 2 m\nb = 3 m", "working\nvar c = a.times(2);", "derive\nd = 2*b", "working\nvar e = c.plus(d);", "note\n{e}"};
        work(cells);
        RunOutcome again = work(cells);
        assertEquals(List.of(State.REUSED, State.REUSED, State.REUSED, State.REUSED), states(again).subList(0, 4));
        cells[0] = "input\na = 2 m\nb = 4 m";
        RunOutcome changed = work(cells);
        assertEquals(List.of(State.WORKED, State.REUSED, State.WORKED, State.WORKED), states(changed).subList(0, 4));
        assertEquals(12, number(changed, "e"));
        assertEquals("12 m", changed.all(Output.Note.class).get(0).commonmark());
    }

    @Test
    void onlyTheChangedLineIsCompiled() {
        String[] cells = {"input\na = 2 m", "working\nvar b = a.times(2);\nint k = 3;\nvar c = b.times(k);", "derive\nd = 2*c",
            "working\nvar e = d.plus(c).plus(a);\ndouble half(double y) { return y / 2; }", "working\nvar g = e.times(half(k));"};
        work(cells);
        int before = runner.compilations();
        assertEquals(28.5, number(work(cells[0].replace("2 m", "2.25 m"), cells[1], cells[2], cells[3], cells[4]), "g") / 2.25, 1e-12, "inputs compile nothing");
        assertEquals(before, runner.compilations());
        cells[1] = cells[1].replace("a.times(2)", "a.times(4)");
        assertEquals(55.5, number(work(cells), "g") / 2, 1e-12);
        assertEquals(before + 1, runner.compilations(), "nothing that uses b is compiled again");
        cells[4] = cells[4].replace("half(k)", "half(2)");
        work(cells);
        assertEquals(before + 2, runner.compilations());
    }

    @Test
    void formulasThatAreWrongShowWhere() {
        assertEquals(List.of("cell 1, line 4: a length (m) stands with a mass (kg): terms of a sum must have one unit. Check units and factors."
                + " In '2*(3 m + 1 kg)', at '+ 1 kg)'."), problems(work("derive\na = 2*(3 m + 1 kg)")));
    }

    @Test
    void anEqualValueEndsTheChange() {
        work("input\na = 2 m", "derive\nb = a*0 + 1 m", "working\nvar c = b.times(2);");
        RunOutcome changed = work("input\na = 3 m", "derive\nb = a*0 + 1 m", "working\nvar c = b.times(2);");
        assertEquals(List.of(State.WORKED, State.WORKED, State.REUSED), states(changed));
    }

    @Test
    void cellsMayBeMoved() {
        work("working\nvar a = Amount.of(1);", "working\nvar b = Amount.of(2);", "working\nvar c = a.plus(b);");
        RunOutcome moved = work("working\nvar b = Amount.of(2);", "note\nbetween", "working\nvar a = Amount.of(1);", "working\nvar c = a.plus(b);");
        assertEquals(List.of(State.REUSED, State.WORKED, State.REUSED, State.REUSED), states(moved));
        RunOutcome refused = work("working\nvar b = Amount.of(2);", "working\nvar c = a.plus(b);", "working\nvar a = Amount.of(1);");
        assertEquals(State.FAILED, refused.cells().get(1).state());
    }

    @Test
    void objectsThatChangeAreMadeAnew() {
        String[] cells = {"working\nvar list = new ArrayList<Double>();", "working\nlist.add(1.0);", "working\nlist.add(2.0);\nvar n = Amount.of(list.size());"};
        assertEquals(2, number(work(cells), "n"));
        assertEquals(2, number(work(cells), "n"));
        cells[2] = "working\nlist.add(3.0);\nvar n = Amount.of(list.size());";
        assertEquals(2, number(work(cells), "n"));
        cells[1] = "working\nlist.add(1.0); list.add(1.5);";
        assertEquals(3, number(work(cells), "n"));
    }

    @Test
    void classesThatKeepStateAreMadeAnew() {
        String[] cells = {"working\nclass Counter { static int n; static int next() { return ++n; } }", "working\nint first = Counter.next();",
            "working\nvar k = Amount.of(Counter.next());"};
        assertEquals(2, number(work(cells), "k"));
        cells[2] = "working\nvar k = Amount.of(10*Counter.next());";
        assertEquals(20, number(work(cells), "k"));
    }

    @Test
    void aNameFoundLaterIsNoticed() {
        work("working\nvar a = Amount.of(1);", "working\nvar b = Amount.of(2);\nvar c = scopeHas(\"a\");\nboolean scopeHas(String s) { return true; }");
        RunOutcome missing = work("derive\nb = 2*a", "derive\nc = 1");
        assertEquals(1, missing.problems().size());
        RunOutcome found = work("input\na = 5", "derive\nb = 2*a", "derive\nc = 1");
        assertEquals(10, number(found, "b"));
    }

    // -- tolerances --

    @Test
    void tolerancesAndWorstCases() {
        String text = sheet("input\na = 10 m ± 0.3 m\nb = 2 m ± 0.1 m (k=2)\nc = 5 m", "working\nvar s = a.plus(b.times(2));",
                "derive\nd = 3*c\nt = s - 2*b",
                "working\nassess(\"length\", s, threshold(\"most\", \"15 m\", \"own choice\", \"none\"), 1);");
        RunOutcome outcome = runner.work(text, WorkOptions.FULL, progress -> { });
        assertEquals(List.of(), problems(outcome));
        assertEquals(2 * Math.sqrt(0.3 * 0.3 / 3 + 0.1 * 0.1), scalar(outcome, "s").tolerance(), 1e-9);
        assertEquals(2 * 0.3 / Math.sqrt(3), scalar(outcome, "t").tolerance(), 1e-9);
        assertNull(scalar(outcome, "d").tolerance(), "no input it uses states a tolerance");
        Output.Assessment assessment = outcome.all(Output.Assessment.class).get(0);
        assertEquals(10.3 + 2 * 2.1, assessment.worstCase().value(), 1e-9);
        assertTrue(assessment.passed());
        RunOutcome tighter = runner.work(text.replace("15 m", "14.4 m"), WorkOptions.FULL, progress -> { });
        assertFalse(tighter.all(Output.Assessment.class).get(0).passed(), "passes as stated, but not in the worst case");
    }

    @Test
    void theToleranceIsAbsentWhereARerunFails() {
        RunOutcome outcome = runner.work(sheet("input\na = 1 m ± 0.2 m", "working\nif (a.value(\"m\") > 1.1) throw new IllegalArgumentException(\"too long\");\n"
                + "var s = a.times(2);\nassess(\"s\", s, threshold(\"most\", \"15 m\", \"own choice\", \"none\"), 1);", "derive\nt = 2*a"), WorkOptions.FULL, progress -> { });
        assertEquals(List.of(), problems(outcome));
        assertNull(scalar(outcome, "s").tolerance());
        assertEquals(2 * 2 * 0.2 / Math.sqrt(3), scalar(outcome, "t").tolerance(), 1e-9);
        assertFalse(outcome.all(Output.Assessment.class).get(0).passed(), "no worst case, no pass");
    }

    @Test
    void rerunsDoNotDisturbTheRun() {
        String text = sheet("input\na = 1 m ± 0.2 m", "working\nvar list = new ArrayList<Amount>();\nlist.add(a);",
                "working\nlist.add(a);\nvar s = list.get(0).plus(list.get(1));\nvar n = Amount.of(list.size());\nrecord P(Amount u) { }\nvar p = new P(a);",
                "working\nvar w = p.u().times(3);");
        RunOutcome outcome = runner.work(text, WorkOptions.FULL, progress -> { });
        assertEquals(List.of(), problems(outcome));
        assertEquals(2 * 2 * 0.2 / Math.sqrt(3), scalar(outcome, "s").tolerance(), 1e-9);
        assertEquals(2 * 3 * 0.2 / Math.sqrt(3), scalar(outcome, "w").tolerance(), 1e-9);
        RunOutcome again = runner.work(text.replace("var w = p", "var w =  p"), WorkOptions.FULL, progress -> { });
        assertEquals(2, number(again, "n"));
        assertEquals(outcome.all(Output.Result.class), again.all(Output.Result.class));
    }

    @Test
    void stopEndsTheRun() throws Exception {
        String text = sheet("note\nfirst", "working\nwhile (!Thread.currentThread().isInterrupted()) { Thread.onSpinWait(); }", "derive\nb = 2");
        RunOutcome outcome = runner.work(text, WorkOptions.FULL, progress -> {
            if (progress instanceof Progress.Started started && started.cell() == 2) {
                new Thread(() -> stopSoon()).start();
            }
        });
        fieldwright.quantity.Stop.clear();
        assertEquals(List.of(State.WORKED, State.STOPPED, State.NOT_REACHED), states(outcome));
        assertTrue(outcome.isStopped());
        assertEquals(2, number(work("derive\nb = 2"), "b"));
    }

    private static void stopSoon() {
        try {
            Thread.sleep(200);
        } catch (InterruptedException e) {
            return;
        }
        runner.stop();
    }

    /** Flux, voltage, energy, force, torque and moments, asked on a sheet; values by hand with 1/(4 pi eps0) as above. */
    @Test
    void questionsAboutWholesAreResults() {
        RunOutcome outcome = work("input\nq = 2 nC\nd = 0.5 m", """
                working
                var a = pointCharge(at(0, 0, 0), "q").inFreeSpace();
                var b = pointCharge(at("d", 0, 0), "q");
                var flux = a.fluxThrough(ball("d/2"));
                var U = a.voltageAlong(rod(at("d", 0, 0), at("2*d", 0, 0)));
                var W = a.energyWith(b);
                var F = a.forceOn(b);
                var T = a.torqueOn(b, at(0, "d", 0));
                var p = b.inFreeSpace().dipoleMoment(at(0, 0, 0));
                var Q_xx = b.inFreeSpace().quadrupoleMoment(at(0, 0, 0)).xx();
                var W_self = a.energy();
                var W_film = surfaceCharge(disc("d"), "q/d^2").inFreeSpace().energy();""");
        assertEquals(List.of(), problems(outcome));
        double k = 1 / (4 * Math.PI * 8.8541878188e-12);
        assertEquals(2e-9, number(outcome, "flux"), 1e-18);
        assertEquals(k * 2e-9, number(outcome, "U"), 1e-8);
        assertEquals(k * 8e-18, number(outcome, "W"), 1e-16);
        assertEquals(8 * Math.PI / 3 * k * 4e-18 / 0.5, number(outcome, "W_film"), 1e-15);
        assertEquals(1e-9, number(outcome, "Q_xx"), 1e-20);
        assertTrue(outcome.all(Output.Result.class).stream().filter(r -> List.of("F", "T", "p").contains(r.name()))
                .allMatch(r -> r.value() instanceof Value.Triple));
    }
}

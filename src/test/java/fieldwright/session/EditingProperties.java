package fieldwright.session;

import static org.junit.jupiter.api.Assertions.assertEquals;

import fieldwright.output.CellOutcome;
import fieldwright.output.RunOutcome;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.IntStream;
import net.jqwik.api.Arbitraries;
import net.jqwik.api.Arbitrary;
import net.jqwik.api.Combinators;
import net.jqwik.api.EdgeCasesMode;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import net.jqwik.api.Provide;
import net.jqwik.api.ShrinkingMode;

/** What stands on the sheet is what a clean run gives, whatever was edited before. */
class EditingProperties {
    /** Cells that read, write, change and break what the others read; a tilde stands for a line end, # for a digit. */
    private static final String[] CELLS = {
        "input~a = # m ± 0.1 m~b = 2 kV",
        "input~e = # m",
        "derive~c = a*#",
        "derive~d = c + a~f = #*x/a",
        "working~var p = c.plus(a.times(#));~assess(\"p\", p, threshold(\"most\", \"9 m\", \"own choice\", \"none\"), 1);",
        "working~var list = new ArrayList<Double>(List.of(#.0));",
        "working~list.add(#.0);",
        "working~var n = Amount.of(list.size() + #);",
        "working~int k = #;~double twice(double y) { return k * y; }",
        "working~var t = Amount.of(twice(#));",
        "working~class Counter { static int n; static int next() { return n += #; } }",
        "working~var u = Amount.of(Counter.next());~var u_2 = Amount.of(Counter.next());",
        "working~import java.math.BigDecimal;",
        "working~var w = Amount.of(BigDecimal.TEN.intValue() + #);",
        "working~var a_2 = a.times(#);~var a_3 = calc(\"a_2 + e\");",
        "working~a = a.times(#);",
        "working~var a = Amount.of(#);",
        "working~DoubleUnaryOperator g = y -> y * list.size() + #;",
        "working~var h = Amount.of(g.applyAsDouble(#));",
        "working~record Pair(double y, Amount z) { double sum() { return y + z.si() + #; } }~var pair = new Pair(#, a);",
        "working~var q = Amount.of(pair.sum());",
        "working~var bad = Amount.of(Integer.parseInt(\"x#\"));~var worse = bad.times(2);",
        "working~var worst = worse.times(#);",
        "working~if (a.value(\"m\") > 1.5) { k = #; }",
        "working~result(\"r_#\", a.times(2), \"cm\");",
        "working~double y = #;~double z = twice(y) + g.applyAsDouble(y);~var s = Amount.of(z);",
        "working~int m = max(1, #);~int max(int i, int j) { return -1; }~var v = Amount.of(max(2, 3));",
        "note~{d} and {p} and {n}, #"
    };

    /** The cells that are wrong by themselves or beside the others; a sheet begins without them. */
    private static final Set<Integer> WRONG = Set.of(15, 16, 21, 22);

    /** One edit: what is done to which place, with which cell. */
    record Edit(int kind, int place, int cell, int digit) { }

    @Provide
    Arbitrary<List<Edit>> edits() {
        return Combinators.combine(Arbitraries.integers().between(0, 9), Arbitraries.integers().between(0, 999),
                Arbitraries.integers().between(0, CELLS.length - 1), Arbitraries.integers().between(1, 3)).as(Edit::new).list().ofSize(7);
    }

    @Property(tries = 3, seed = "20260314", shrinking = ShrinkingMode.OFF, edgeCases = EdgeCasesMode.NONE)
    void anEditedSheetGivesWhatAFreshOneGives(@ForAll("edits") List<Edit> edits) {
        List<String> cells = new ArrayList<>();
        IntStream.range(0, CELLS.length).filter(cell -> !WRONG.contains(cell)).forEach(cell -> cells.add(text(cell, 1)));
        try (SheetRunner runner = new SheetRunner()) {
            compare(runner, cells);
            for (Edit edit : edits) {
                apply(edit, cells);
                compare(runner, cells);
            }
        }
    }

    private static String text(int cell, int digit) {
        return CELLS[cell].replace('~', '\n').replace("#", Integer.toString(digit));
    }

    /** Mostly another digit in one cell; now and then a cell more, a cell less, a cell elsewhere. */
    private static void apply(Edit edit, List<String> cells) {
        int place = edit.place() % cells.size();
        switch (edit.kind()) {
            case 0 -> cells.add(place, text(edit.cell(), edit.digit()));
            case 1 -> cells.remove(place);
            case 2 -> cells.add(edit.cell() % cells.size(), cells.remove(place));
            default -> cells.set(place, cells.get(place).replaceAll("(?<=[^\\p{L}_0-9])[123](?=[^0-9])", Integer.toString(edit.digit())));
        }
    }

    private static void compare(SheetRunner runner, List<String> cells) {
        String text = SheetRunnerTest.sheet(cells.toArray(String[]::new));
        RunOutcome edited = normal(runner.work(text, WorkOptions.FULL, progress -> { }));
        try (SheetRunner clean = new SheetRunner()) {
            RunOutcome fresh = normal(clean.work(text, WorkOptions.FULL, progress -> { }));
            for (int i = 0; i < fresh.cells().size(); i++) {
                assertEquals(fresh.cells().get(i), edited.cells().get(i), () -> text);
            }
            assertEquals(fresh, edited, () -> text);
        }
    }

    /** Whether a cell was worked now or before is the one difference allowed. */
    private static RunOutcome normal(RunOutcome outcome) {
        return new RunOutcome(outcome.cells().stream().map(cell -> cell.state() == CellOutcome.State.REUSED
                ? new CellOutcome(cell.cell(), CellOutcome.State.WORKED, cell.outputs(), cell.reads()) : cell).toList(), outcome.sheetProblems());
    }
}

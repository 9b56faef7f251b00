package fieldwright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonArray;
import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import fieldwright.output.Axis;
import fieldwright.output.CellOutcome;
import fieldwright.output.CellOutcome.State;
import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.RunOutcome;
import fieldwright.output.Series;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The command around the engine: what is asked, printed and written. The engine's answers are given here. */
class RunCommandTest {

    private static final String SHEET = """
            fieldwright sheet 1
            title: Film on a drum
            project: Tarnwick pellet works
            revision: B

            :: input
            a = 12 mm ± 0.1 mm | drum radius

            :: working film
            var film = 1;
            """;

    @TempDir
    Path folder;
    private Path file;
    private Path trusted;
    private int runs;

    @BeforeEach
    void writeSheet() throws IOException {
        file = folder.resolve("film.fws");
        trusted = folder.resolve("config/trusted");
        Files.writeString(file, SHEET);
    }

    private static final Output.Result CHARGE = new Output.Result("Q", "Q",
            new Value.Scalar(5.98511e-5, 3e-20, 1.7e-5, "C", new Display("uC", 1e-6), Status.CONVERGED, ""), "all of it", "");
    private static final Output.Check CLOSES = new Output.Check("flux closes", true, "agrees to 2e-10", 2e-10, 1e-9, "");

    private static Value.Scalar field(double value) {
        return Value.Scalar.of(value, 2e-5, "V/m");
    }

    private static RunOutcome run(State state, Output... outputs) {
        Output.Given a = new Output.Given("a", "a", Value.Scalar.of(0.012, 0.0, "m"), "12 mm ± 0.1 mm", "drum radius", "");
        return new RunOutcome(List.of(new CellOutcome(1, State.WORKED, List.of(a), Set.of()),
                new CellOutcome(2, state, List.of(outputs), Set.of("a"))), List.of());
    }

    private Recording command(RunOutcome outcome, String... options) {
        return command(null, true, outcome, options);
    }

    private Recording command(java.util.function.UnaryOperator<String> ask, boolean unicode, RunOutcome outcome, String... options) {
        List<String> arguments = new ArrayList<>(List.of("run", file.toString()));
        arguments.addAll(List.of(options));
        return Recording.of(trusted, ask, unicode, text -> {
            runs++;
            return outcome;
        }, arguments.toArray(String[]::new));
    }

    // ---- trust

    @Test
    void withoutATerminalAnUnknownSheetIsNotRun() {
        Recording result = command(run(State.WORKED, CHARGE));
        assertEquals(64, result.exit());
        assertEquals(0, runs);
        assertEquals("", result.out());
        assertTrue(result.err().contains(file + ": not made here") && result.err().contains("--trust"), result.err());
    }

    @Test
    void anAnswerIsAskedOncePerText() throws IOException {
        List<String> questions = new ArrayList<>();
        java.util.function.UnaryOperator<String> yes = question -> {
            questions.add(question);
            return "y";
        };
        assertEquals(0, command(yes, true, run(State.WORKED, CHARGE)).exit());
        assertEquals(0, command(yes, true, run(State.WORKED, CHARGE)).exit());
        assertEquals(1, questions.size());
        assertTrue(questions.get(0).contains(file.toString()));
        Files.writeString(file, SHEET.replace("\n", "\r\n"));
        assertEquals(0, command(run(State.WORKED, CHARGE)).exit(), "other line ends are the same text");
        Files.writeString(file, SHEET.replace("film = 1", "film = 2"));
        assertEquals(64, command(run(State.WORKED, CHARGE)).exit());
        assertEquals(3, runs);
    }

    @Test
    void noIsNo() {
        for (String answer : new String[] {"n", "", "yep", null}) {
            Recording result = command(question -> answer, true, run(State.WORKED, CHARGE));
            assertEquals(64, result.exit());
        }
        assertEquals(0, runs);
        assertFalse(Files.exists(trusted));
    }

    @Test
    void trustForOnceIsNotRemembered() {
        assertEquals(0, command(run(State.WORKED, CHARGE), "--trust", "--record").exit());
        assertFalse(Files.exists(trusted));
        assertEquals(64, command(run(State.WORKED, CHARGE)).exit());
    }

    // ---- printing

    @Test
    void theCalculationSheet() {
        RunOutcome outcome = run(State.WORKED, new Output.Assumption("free space"), CHARGE,
                new Output.Result("E", "E", new Value.Triple(field(0), field(-1.5), field(276969).withTolerance(8e4), new Point(0, 0, 4))),
                new Output.Result("V", "V", new Value.Scalar(12.5, 0.3, null, "V", null, Status.NOT_CONVERGED, "2000 evaluations")),
                new Output.Result("E_w", "E", new Value.Scalar(Double.NaN, null, null, "V/m", null, Status.UNBOUNDED, "on the rim")),
                CLOSES, new Output.Check("slab", false, "", 3.4, 0.05, ""),
                new Output.Assessment("breakdown", true, field(276969), Value.Scalar.of(3.5e5, null, "V/m"), Value.Scalar.of(3e6, 0.0, "V/m"), 3, 8.57,
                        "handbook", "plain gap only"),
                new Output.Plot("on the axis", new Axis("z", "m"), new Axis("|E|", "kV/m"),
                        List.of(new Series("film", new double[] {0, 1}, new double[] {1, 2}, null)), List.of("2 points left out")),
                new Output.Table("sizes", List.of("a / mm", "Q / uC"), List.of(List.of("1", "20.5"), List.of("100", "3")), List.of()),
                new Output.Caution("own caution", "own source"), new Output.Printed("printed\nby hand\n"));
        Recording result = command(outcome, "--trust");
        assertEquals("""
                Film on a drum
                Tarnwick pellet works, revision B

                1 input
                  a = 12 mm ± 0.1 mm   drum radius   no source

                2 working: film
                  assumed: free space
                  Q = 59.9 µC   ± 17 µC (k = 2)   num. 3e-20 C   all of it
                  E at (0, 0, 4) m
                    x = 0 kV/m   num. 2e-5 V/m
                    y = -0.0015 kV/m   num. 2e-5 V/m
                    z = 277 kV/m   ± 80 kV/m (k = 2)   num. 2e-5 V/m
                  V = 12.5 V   did not converge: 2000 evaluations   num. 0.3 V
                  E_w = unbounded: on the rim
                  ✓ flux closes: agrees to 2e-10
                  ✕ slab: found 3.4, allowed 0.05
                  ✓ breakdown: 276.969 kV/m, worst case 350.000 kV/m, threshold 3 MV/m, margin 8.57, asked 3
                    threshold from: handbook
                    ! plain gap only
                  chart 'on the axis': |E| / (kV/m) over z / m: film (2 points)
                    2 points left out
                  sizes
                    a / mm   Q / uC
                         1     20.5
                       100        3
                  ! own caution (own source)
                  printed
                  by hand

                ✕ 1 result did not converge, 1 check failed (4 results, 2 checks, 1 assessment)
                """, result.out());
        assertEquals(3, result.exit());
        assertEquals("", result.err());
    }

    @Test
    void aTerminalWithoutUnicodeGetsAscii() {
        Recording result = command(question -> "y", false, run(State.WORKED, CHARGE, CLOSES, new Output.Printed("ρ_0 in C/m³, ✓ 語")));
        assertTrue(result.out().contains("  Q = 59.9 uC   +/- 17 uC (k = 2)   num. 3e-20 C   all of it\n"), result.out());
        assertTrue(result.out().contains("  ok   flux closes: agrees to 2e-10\n"), result.out());
        assertTrue(result.out().contains("  rho_0 in C/m^3, ok   ?\n"), result.out());
        assertTrue(result.out().chars().allMatch(c -> c < 128), result.out());
    }

    @Test
    void anErrorIsPrintedInItsCellAndCounted() {
        Recording result = command(run(State.FAILED, new Output.Problem(10, 2, "no quantity 'lamda'. Closest defined name: 'lambda'.")), "--trust");
        assertEquals(4, result.exit());
        assertTrue(result.out().contains("✕ cell 2, line 10: no quantity 'lamda'. Closest defined name: 'lambda'.\n"), result.out());
        assertTrue(result.out().endsWith("✕ 1 error\n"), result.out());
    }

    // ---- JSON

    @Test
    void jsonHoldsEverythingInSi() {
        Value.Triple up = new Value.Triple(field(0), field(0), field(3), new Point(0, 0, 0));
        Value.Triple down = new Value.Triple(field(0), field(0), field(-3), new Point(0, 0, 0));
        RunOutcome outcome = run(State.WORKED, CHARGE, new Output.Result("E", "E", new Value.Triple(field(0), field(1), field(2), new Point(0, 0, 4))),
                new Output.Result("E_s", "E", new Value.Sides("+z", up, "-z", down)),
                new Output.Result("V", "V", new Value.Scalar(12.5, null, null, "V", null, Status.NOT_CONVERGED, "2000 \"evaluations\"")),
                new Output.Result("E_w", "E", new Value.Scalar(Double.POSITIVE_INFINITY, null, null, "V/m", null, Status.UNBOUNDED, "on the rim")),
                CLOSES, new Output.Check("no number", false, "", Double.NaN, 1, "V/m"),
                new Output.Assessment("breakdown", true, field(276969), null, Value.Scalar.of(3e6, 0.0, "V/m"), 3, 10.8, "handbook", "plain gap"),
                new Output.Caution("take care", "own"), new Output.Assumption("free space"), new Output.Printed("not here"));
        Recording result = command(outcome, "--json", "--trust");
        assertEquals(3, result.exit());
        assertFalse(result.out().contains("NaN") || result.out().contains("Infinity"), result.out());

        JsonObject json = JsonParser.parseString(result.out()).getAsJsonObject();
        assertEquals(List.of("results", "checks", "assessments", "cautions", "assumptions", "errors"), List.copyOf(json.keySet()));
        JsonArray results = json.getAsJsonArray("results");
        assertEquals(JsonParser.parseString("""
                {"cell": 2, "name": "Q", "status": "converged", "value": 5.98511e-5, "unit": "C", "numericalError": 3e-20, "tolerance": 1.7e-5}"""),
                results.get(0));
        assertEquals(JsonParser.parseString("""
                {"cell": 2, "name": "E", "status": "converged", "value": [0, 1, 2], "unit": "V/m", "numericalError": [2e-5, 2e-5, 2e-5],
                 "tolerance": [null, null, null], "place": [0, 0, 4]}"""), results.get(1));
        JsonArray sides = results.get(2).getAsJsonObject().getAsJsonArray("sides");
        assertEquals("-z", sides.get(1).getAsJsonObject().get("side").getAsString());
        assertEquals(-3.0, sides.get(1).getAsJsonObject().getAsJsonArray("value").get(2).getAsDouble());
        assertEquals(JsonParser.parseString("""
                {"cell": 2, "name": "V", "status": "notConverged", "value": 12.5, "unit": "V", "numericalError": null, "tolerance": null,
                 "reason": "2000 \\"evaluations\\""}"""), results.get(3));
        assertEquals(JsonParser.parseString("""
                {"cell": 2, "name": "E_w", "status": "unbounded", "value": null, "unit": "V/m", "numericalError": null, "tolerance": null,
                 "reason": "on the rim"}"""), results.get(4));
        assertTrue(json.getAsJsonArray("checks").get(1).getAsJsonObject().get("measured").isJsonNull());
        assertEquals(JsonParser.parseString("""
                {"cell": 2, "label": "breakdown", "passed": true, "status": "converged", "value": 276969, "unit": "V/m", "numericalError": 2e-5,
                 "tolerance": null, "worstCase": null, "threshold": 3000000, "marginAsked": 3, "marginFound": 10.8, "source": "handbook",
                 "caution": "plain gap"}"""), json.getAsJsonArray("assessments").get(0));
        assertEquals("take care", json.getAsJsonArray("cautions").get(0).getAsJsonObject().get("text").getAsString());
        assertEquals(0, json.getAsJsonArray("errors").size());
    }

    @Test
    void aFileThatIsNoSheetIsAnErrorWithItsLineAndRunsNothing() throws IOException {
        Files.writeString(file, "");
        Recording empty = command(run(State.WORKED), "--json", "--trust");
        assertEquals(4, empty.exit());
        JsonObject error = JsonParser.parseString(empty.out()).getAsJsonObject().getAsJsonArray("errors").get(0).getAsJsonObject();
        assertTrue(error.get("line").isJsonNull() && error.get("cell").isJsonNull());
        assertEquals("the file is empty. A sheet begins with the line 'fieldwright sheet 1'.", error.get("message").getAsString());

        Files.writeString(file, "fieldwright sheet 1\n:: nope\n");
        Recording unknown = command(run(State.WORKED), "--trust");
        assertEquals(4, unknown.exit());
        assertEquals("", unknown.out());
        assertEquals("fieldwright: " + file + ", line 2: unknown kind of cell 'nope'. Write ':: note', ':: input', ':: derive' or ':: working'.\n", unknown.err());
        assertEquals(0, runs);
    }

    // ---- recording

    @Test
    void recordsStandUnderTheirCellsAndTheNewTextIsTrusted() throws IOException {
        Recording result = command(question -> "y", true, run(State.WORKED, CHARGE, CLOSES), "--record");
        assertEquals(0, result.exit());
        assertEquals(SHEET + """
                :rec Q = 5.98511e-5 C | num 3e-20 | tol 1.7e-5 | shown uC = 1e-6
                :rec check "flux closes" passed | measured 2e-10 | allowed 1e-9 | detail "agrees to 2e-10"
                """, Files.readString(file));
        assertEquals(0, command(run(State.WORKED, CHARGE, CLOSES)).exit(), "what was recorded here was made here");
    }

    @Test
    void aFailedCheckIsRecordedAnErrorIsNot() throws IOException {
        assertEquals(1, command(run(State.WORKED, new Output.Check("c", false, "", 2, 1, "")), "--record", "--trust").exit());
        String recorded = SHEET + ":rec check \"c\" failed | measured 2 | allowed 1\n";
        assertEquals(recorded, Files.readString(file));
        Recording failed = command(run(State.FAILED, CHARGE, new Output.Problem(10, 2, "wrong.")), "--record", "--trust");
        assertEquals(4, failed.exit());
        assertTrue(failed.err().contains("nothing recorded"), failed.err());
        assertEquals(4, command(run(State.NOT_REACHED), "--record", "--trust").exit());
        assertEquals(recorded, Files.readString(file));
    }

    @Test
    void aSignedSheetIsRecordedOnlyUnderAnotherRevision() throws IOException {
        String signed = SHEET + "\n:signed checked: LM | revision B | 2 June\n";
        Files.writeString(file, signed);
        Recording refused = command(run(State.WORKED, CHARGE), "--record", "--trust");
        assertEquals(64, refused.exit());
        assertEquals(0, runs);
        assertTrue(refused.err().contains("line 12: signed for revision 'B'") && refused.err().contains("Raise 'revision:'"), refused.err());
        assertEquals(signed, Files.readString(file));
        assertEquals(0, command(run(State.WORKED, CHARGE), "--trust").exit(), "running alone changes nothing");

        Files.writeString(file, signed.replace("revision: B", "revision: C"));
        assertEquals(0, command(run(State.WORKED, CHARGE), "--record", "--trust").exit());
        assertTrue(Files.readString(file).contains(":rec Q = "));

        Files.writeString(file, signed.replace(" | revision B", ""));
        assertEquals(64, command(run(State.WORKED, CHARGE), "--record", "--trust").exit(), "a signature that names no revision");
    }

    @Test
    void aFileChangedDuringTheRunIsNotOverwritten() throws IOException {
        Recording result = Recording.of(trusted, null, true, text -> {
            Files.writeString(file, SHEET + "// saved from elsewhere\n");
            return run(State.WORKED, CHARGE);
        }, "run", "--record", "--trust", file.toString());
        assertEquals(64, result.exit());
        assertEquals(SHEET + "// saved from elsewhere\n", Files.readString(file));
    }

    @Test
    void anUnreadableRecordIsReportedAndKept() throws IOException {
        Files.writeString(file, SHEET + ":rec Q = about 3 C\n");
        Recording result = command(run(State.WORKED, CHARGE), "--record", "--trust");
        assertTrue(result.err().contains("record not readable, kept as it is: ':rec Q = about 3 C': column"), result.err());
        assertTrue(Files.readString(file).endsWith(":rec Q = about 3 C\n"));
    }

    // ---- wrong use

    @Test
    void wrongUse() {
        assertEquals(64, command(run(State.WORKED), "--jsn").exit());
        assertEquals(64, Recording.of(trusted, null, true, null, "run").exit());
        assertEquals(64, Recording.of(trusted, null, true, null, "fly", "x").exit());
        Recording missing = Recording.of(trusted, null, true, null, "run", folder.resolve("none.fws").toString());
        assertEquals(64, missing.exit());
        assertEquals("fieldwright: " + folder.resolve("none.fws") + ": there is no such file. Check the path.\n", missing.err());
        assertEquals(64, Recording.of(trusted, null, true, null, "run", folder.toString()).exit());
        assertEquals(0, runs);
        Recording help = Recording.of(trusted, null, true, null, "run", "--help");
        assertEquals(0, help.exit());
        assertTrue(help.out().contains("--record") && help.out().contains("64 wrong use"), help.out());
    }

    @Test
    void anEngineThatBreaksIsAnErrorNotAResult() {
        Recording result = Recording.of(trusted, null, true, text -> {
            throw new IllegalStateException("the process ended");
        }, "run", "--trust", "--json", file.toString());
        assertEquals(4, result.exit());
        assertTrue(JsonParser.parseString(result.out()).getAsJsonObject().getAsJsonArray("errors").get(0).getAsJsonObject()
                .get("message").getAsString().contains("the process ended"));
    }
}

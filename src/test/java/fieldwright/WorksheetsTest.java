package fieldwright;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.output.Series;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.session.SheetRunner;
import fieldwright.session.WorkOptions;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** The shipped sheets from their text to their last verdict, against values worked outside the program. */
class WorksheetsTest {
    private static final Path FOLDER = Path.of("worksheets");
    private static final Map<String, RunOutcome> RUNS = new HashMap<>();
    private static final SheetRunner RUNNER = new SheetRunner();

    private record Row(String sheet, String name, double expected, String unit, Double tolerance, Double worst, String formula) {
        @Override
        public String toString() {
            return sheet + ", " + name + ": " + formula;
        }
    }

    @AfterAll
    static void close() {
        RUNNER.close();
    }

    static List<String> sheets() throws IOException {
        try (Stream<Path> files = Files.list(FOLDER)) {
            return files.map(f -> f.getFileName().toString()).filter(n -> n.endsWith(".fws")).map(n -> n.replace(".fws", "")).sorted().toList();
        }
    }

    static List<Row> rows() throws IOException {
        try (InputStream in = WorksheetsTest.class.getResourceAsStream("worksheets.csv")) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().filter(line -> !line.startsWith("#")).skip(1)
                    .map(line -> line.split(" \\| ", -1)).map(f -> new Row(f[0], f[1], Double.parseDouble(f[2]), f[3], number(f[4]), number(f[5]), f[6]))
                    .toList();
        }
    }

    private static Double number(String text) {
        return text.isBlank() ? null : Double.valueOf(text);
    }

    private static synchronized RunOutcome run(String sheet) {
        return RUNS.computeIfAbsent(sheet, name -> {
            try {
                return RUNNER.work(Files.readString(FOLDER.resolve(name + ".fws")), WorkOptions.FULL, progress -> { });
            } catch (IOException e) {
                throw new java.io.UncheckedIOException(e);
            }
        });
    }

    @Test
    void everyKindOfChargeHasASheet() throws IOException {
        List<String> texts = sheets().stream().map(name -> {
            try {
                return Files.readString(FOLDER.resolve(name + ".fws"));
            } catch (IOException e) {
                throw new java.io.UncheckedIOException(e);
            }
        }).toList();
        for (String word : List.of("pointCharge(", "lineCharge(", "surfaceCharge(", "volumeCharge(", "parametric(", "plain(", "integral(",
                "corr(", "(k=2, nu=9)", "± 25 %", "for s <= R_s", "profile(", "table(", "assess(", "check(", "caution(")) {
            assertTrue(texts.stream().anyMatch(t -> t.contains(word)), word);
        }
    }

    @ParameterizedTest
    @MethodSource("sheets")
    void runsWithoutErrorAndPassesItsOwnChecks(String sheet) {
        RunOutcome run = run(sheet);
        assertEquals(List.of(), run.problems());
        List<Output.Check> checks = run.all(Output.Check.class);
        assertFalse(checks.isEmpty());
        for (Output.Check check : checks) {
            assertTrue(check.passed(), check.label() + ": " + check.detail());
        }
        assertTrue(run.all(Output.Result.class).stream().allMatch(r -> r.value().status() == Status.CONVERGED));
        assertEquals(RunOutcome.ALL_WELL, run.exitCode());
    }

    @ParameterizedTest
    @MethodSource("sheets")
    void statesItsSurroundingsAndItsCautions(String sheet) {
        RunOutcome run = run(sheet);
        assertTrue(run.all(Output.Assumption.class).stream().anyMatch(a -> a.text().contains("ground plane")));
        List<Output.Assessment> assessments = run.all(Output.Assessment.class);
        assertFalse(assessments.isEmpty());
        for (Output.Assessment a : assessments) {
            assertTrue(a.passed(), a.label());
            assertNotNull(a.worstCase(), a.label() + ": worst case of the inputs");
            assertTrue(Math.abs(a.worstCase().value()) >= Math.abs(a.value().value()), a.label());
            assertFalse(a.source().isBlank() || a.caution().isBlank());
        }
    }

    @ParameterizedTest
    @MethodSource("sheets")
    void drawsCurvesWithoutGaps(String sheet) {
        List<Output.Plot> plots = run(sheet).all(Output.Plot.class);
        assertFalse(plots.isEmpty());
        for (Output.Plot plot : plots) {
            assertEquals(List.of(), plot.remarks(), plot.title());
            assertFalse(plot.x().quantity().isBlank() || plot.x().unit().isBlank() || plot.y().quantity().isBlank() || plot.y().unit().isBlank());
            for (Series series : plot.series()) {
                assertTrue(Arrays.stream(series.y()).allMatch(Double::isFinite), plot.title() + ", " + series.label());
            }
        }
    }

    @ParameterizedTest
    @MethodSource("rows")
    void agreesWithValuesWorkedOutside(Row row) {
        Output.Result result = run(row.sheet()).all(Output.Result.class).stream().filter(r -> r.name().equals(row.name())).findFirst().orElseThrow();
        Value.Scalar found = (Value.Scalar) result.value();
        assertEquals(row.unit(), found.unit());
        double miss = Math.abs(found.value() - row.expected());
        assertTrue(miss <= 1e-8 * Math.abs(row.expected()), row + ": " + found.value() + " against " + row.expected());
        assertTrue(miss <= found.numericalError() + 2 * Math.ulp(row.expected()), row + ": off by " + miss + ", states " + found.numericalError());
        if (row.tolerance() == null) {
            return;
        }
        assertEquals(row.tolerance(), found.tolerance(), 1e-6 * row.tolerance(), row + ", tolerance");
        if (row.worst() != null) {
            Output.Assessment assessment = run(row.sheet()).all(Output.Assessment.class).stream()
                    .filter(a -> a.value().value() == found.value()).findFirst().orElseThrow();
            assertEquals(row.worst(), Math.abs(assessment.worstCase().value()), 1e-8 * row.worst(), row + ", worst case");
        }
    }
}

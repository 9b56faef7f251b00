package fieldwright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.gson.JsonArray;
import com.google.gson.JsonElement;
import com.google.gson.JsonObject;
import com.google.gson.JsonParser;
import fieldwright.output.Output;
import fieldwright.session.Session;
import fieldwright.session.WorkOptions;
import fieldwright.sheet.SheetFile;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.StreamSupport;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** Whole sheets through the whole program: text in, exit code, JSON and file out. */
class EndToEndTest {

    /** A plate of 40 mm radius; on its axis the field is σ/(2 ε0)·(1 − z/√(z² + a²)), any handbook of electrostatics. */
    private static final String PLATE = """
            fieldwright sheet 1
            title: Charged plate of a filter
            revision: A

            :: note
            On the axis the plate gives {E_z}.

            :: input
            a     = 40 mm ± 1 mm   | radius  | drawing F-3
            sigma = 2 nC/m^2 ± 10 % | density | probe
            h     = 30 mm          | height  | drawing F-3

            :: working plate
            var plate = surfaceCharge(cylindrical().rho("0", "a").phi("0", "2*pi").z("0"), "sigma").inFreeSpace();
            var Q = plate.totalCharge();
            var E = plate.electricField(at("0", "0", "h"));
            var E_on = plate.electricField(at("0", "0", "0"));
            var E_z = E.z();

            :: derive
            Q_hand = pi*a^2*sigma in pC | the charge by hand
            E_hand = sigma/(2*eps0)*(1 - h/sqrt(h^2 + a^2)) | on the axis

            :: working judgement
            check("axis", E_z, "E_hand", 1e-8);
            """;

    private static Session session;

    @TempDir
    Path folder;

    @BeforeAll
    static void start() {
        session = Session.start();
    }

    @AfterAll
    static void close() {
        session.close();
    }

    private Recording run(String sheet, String... options) throws IOException {
        Path file = folder.resolve("sheet.fws");
        Files.writeString(file, sheet);
        String[] arguments = new String[options.length + 3];
        arguments[0] = "run";
        arguments[1] = file.toString();
        arguments[2] = "--trust";
        System.arraycopy(options, 0, arguments, 3, options.length);
        return Recording.of(folder.resolve("trusted"), null, true, text -> session.work(text, WorkOptions.FULL, progress -> { }).get(), arguments);
    }

    private String file() throws IOException {
        return Files.readString(folder.resolve("sheet.fws"));
    }

    private static JsonObject named(JsonArray all, String key, String name) {
        for (JsonElement each : all) {
            if (each.getAsJsonObject().get(key).getAsString().equals(name)) {
                return each.getAsJsonObject();
            }
        }
        throw new AssertionError("no " + name + " in " + all);
    }

    @Test
    void aGoodSheetInJson() throws IOException {
        Recording result = run(PLATE, "--json");
        JsonObject json = JsonParser.parseString(result.out()).getAsJsonObject();
        assertEquals(0, json.getAsJsonArray("errors").size(), result.out());
        assertEquals(0, result.exit(), result.out());

        double eps0 = 8.8541878188e-12;     // CODATA 2022
        double axis = 2e-9 / (2 * eps0) * (1 - 0.03 / 0.05);
        JsonArray results = json.getAsJsonArray("results");
        JsonObject charge = named(results, "name", "Q");
        assertEquals(Math.PI * 0.04 * 0.04 * 2e-9, charge.get("value").getAsDouble(), 1e-19);
        assertEquals("C", charge.get("unit").getAsString());
        assertEquals(3, charge.get("cell").getAsInt());
        assertTrue(charge.get("numericalError").getAsDouble() >= 0);
        // JCGM 100: rectangular half-widths 1 mm and 10 %, k = 2; relative: 2/sqrt(3)*hypot(2*1/40, 0.1).
        double tolerance = charge.get("value").getAsDouble() * 2 / Math.sqrt(3) * Math.hypot(0.05, 0.1);
        assertEquals(tolerance, charge.get("tolerance").getAsDouble(), 0.02 * tolerance);

        JsonObject vector = named(results, "name", "E");
        assertEquals(axis, vector.getAsJsonArray("value").get(2).getAsDouble(), 1e-8 * axis);
        assertEquals(3, vector.getAsJsonArray("numericalError").size());
        JsonArray sides = named(results, "name", "E_on").getAsJsonArray("sides");
        assertEquals(2, sides.size());
        for (JsonElement side : sides) {
            double sign = side.getAsJsonObject().get("side").getAsString().contains("-") ? -1 : 1;
            double value = side.getAsJsonObject().getAsJsonArray("value").get(2).getAsDouble();
            assertEquals(sign * 2e-9 / (2 * eps0), value, 1e-6 * Math.abs(value));
        }
        assertTrue(named(json.getAsJsonArray("checks"), "label", "axis").get("passed").getAsBoolean());
        assertTrue(json.getAsJsonArray("assumptions").toString().contains("free space"), result.out());
    }

    @Test
    void aGoodSheetInText() throws IOException {
        Recording result = run(PLATE);
        assertEquals(0, result.exit(), result.out() + result.err());
        assertTrue(result.out().contains("Q = 10.1 pC") || result.out().contains("Q = 10.05 pC") || result.out().contains("Q = 10.053 pC"), result.out());
        assertTrue(result.out().contains("✓ axis"), result.out());
        assertFalse(result.out().contains("{E_z}"), result.out());
        assertEquals(PLATE, file(), "running alone writes nothing");
    }

    @Test
    void recordsReadBackAndASecondRunChangesNothing() throws Exception {
        assertEquals(0, run(PLATE, "--record").exit());
        String recorded = file();
        assertEquals(PLATE.lines().toList(), recorded.lines().filter(line -> !line.startsWith(":rec")).toList());
        assertEquals(0, run(recorded, "--record").exit());
        assertEquals(recorded, file());
        List<Output> contents = SheetFile.read(folder.resolve("sheet.fws")).cells().stream().flatMap(cell -> cell.records().stream())
                .map(record -> record.content()).toList();
        assertFalse(contents.contains(null), recorded);
        assertTrue(contents.size() >= 7, recorded);
    }

    @Test
    void aFailedCheckIsExitOne() throws IOException {
        Recording result = run(PLATE.replace("\"E_hand\", 1e-8", "\"1.01*E_hand\", 1e-8"));
        assertEquals(1, result.exit(), result.out());
        assertTrue(result.out().contains("✕ axis"), result.out());
    }

    // ---- what is wrong is said with line, cell, thing and remedy

    private static Arguments wrong(String title, String before, String after, int cell, String inLine, String... words) {
        return Arguments.of(title, PLATE.replace(before, after), cell, inLine, List.of(words));
    }

    static List<Arguments> wrongSheets() {
        return List.of(
                wrong("unit that does not fit", "h     = 30 mm ", "h     = 30 nC ", 3, "var E =", "C", "m"),
                wrong("density whose unit does not fit", "sigma = 2 nC/m^2", "sigma = 2 nC/m^3", 3, "var plate", "C/m"),
                wrong("unit in a derive line", "h/sqrt(h^2 + a^2)", "h/sqrt(h^2 + a)", 4, "E_hand =", "m"),
                wrong("unknown unit", "40 mm ± 1 mm", "40 millis ± 1 mm", 2, "a     =", "millis"),
                wrong("unknown name in a formula", "pi*a^2*sigma", "pi*a^2*sigm", 4, "Q_hand", "'sigm'", "'sigma'"),
                wrong("unknown name in working", "\"sigma\")", "\"sgima\")", 3, "var plate", "'sgima'", "'sigma'"),
                wrong("cyclic limits", ".rho(\"0\", \"a\").phi(\"0\", \"2*pi\")", ".rho(\"0\", \"a*phi/6\").phi(\"0\", \"rho/a\")", 3, "var plate", "rho", "phi"),
                wrong("lower limit above upper", ".rho(\"0\", \"a\")", ".rho(\"2*a\", \"a\")", 3, "var plate", "0.08", "0.04"),
                wrong("reserved name", "h     = 30 mm", "rho   = 30 mm", 2, "rho   =", "'rho'"),
                wrong("reserved Java word", "h     = 30 mm", "class = 30 mm", 2, "class =", "'class'"),
                wrong("input declared twice", "h     = 30 mm", "a     = 30 mm", 2, "a     = 30 mm", "'a'"),
                wrong("name declared again in working", "var Q = plate", "var sigma = plate", 3, "var sigma", "'sigma'"),
                wrong("name declared again in derive", "E_hand = sigma", "Q = sigma", 4, "Q = sigma", "'Q'"),
                wrong("surroundings left out", ".inFreeSpace()", "", 3, "var Q =", "inFreeSpace"),
                wrong("Java that does not compile", "var Q = plate.totalCharge();", "var Q = plate.totalChrage();", 3, "var Q", "totalChrage"),
                wrong("Java with a missing bracket", "var Q = plate.totalCharge();", "var Q = plate.totalCharge(;", 3, "var Q"),
                wrong("line that is no input", "h     = 30 mm", "h       30 mm", 2, "h       30 mm", "'='"));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("wrongSheets")
    void messages(String title, String sheet, int cell, String inLine, List<String> words) throws IOException {
        assertFalse(sheet.equals(PLATE), "the sheet was changed");
        Recording result = run(sheet, "--json", "--record");
        assertEquals(4, result.exit(), result.out());
        JsonArray errors = JsonParser.parseString(result.out()).getAsJsonObject().getAsJsonArray("errors");
        JsonObject first = StreamSupport.stream(errors.spliterator(), false).map(JsonElement::getAsJsonObject)
                .filter(error -> error.get("cell").getAsInt() == cell).findFirst().orElseThrow(() -> new AssertionError(errors.toString()));
        String message = first.get("message").getAsString();
        String line = sheet.lines().toList().get(first.get("line").getAsInt() - 1);
        assertTrue(line.contains(inLine), message + " at line: " + line);
        for (String word : words) {
            assertTrue(message.contains(word), "'" + word + "' is not in: " + message);
        }
        assertTrue(message.length() > 25, "thing, value and remedy: " + message);
        assertFalse(result.out().matches("(?s).*(REPL|\\$JShell|jdk\\.jshell|fieldwright\\.(session|words|formula)|Exception|\\tat ).*"), result.out());
        assertEquals(sheet, file(), "nothing written");
        assertTrue(result.err().contains("nothing recorded"), result.err());
    }

    /** The way a terminal goes: a calculation process for this run alone, an unknown sheet refused, a shipped one not asked about. */
    @Test
    void aRunOfItsOwn() throws IOException {
        Path file = folder.resolve("small.fws");
        Files.writeString(file, "fieldwright sheet 1\n:: input\na = 2 mm\n:: working\nvar b = calc(\"a^2\");\n");
        assertEquals(64, Recording.of(folder.resolve("trusted"), null, true, Main::workInSession, "run", file.toString()).exit());
        Recording result = Recording.of(folder.resolve("trusted"), null, true, Main::workInSession, "run", "--json", "--trust", file.toString());
        assertEquals(0, result.exit(), result.out() + result.err());
        JsonObject b = named(JsonParser.parseString(result.out()).getAsJsonObject().getAsJsonArray("results"), "name", "b");
        assertEquals(4e-6, b.get("value").getAsDouble(), 1e-20);
        assertEquals("m^2", b.get("unit").getAsString());
    }

    @ParameterizedTest(name = "{1}")
    @MethodSource("noSheets")
    void whatIsNoSheet(String text, String message) throws IOException {
        Recording result = run(text, "--record");
        assertEquals(4, result.exit());
        assertTrue(result.err().contains(message), result.err());
        assertEquals("", result.out());
        assertEquals(text, file());
    }

    static List<Arguments> noSheets() {
        return List.of(Arguments.of("", "the file is empty"), Arguments.of("\n \n", "the file is empty"),
                Arguments.of("<html></html>", "line 1: not a sheet: the first line is '<html></html>'"),
                Arguments.of("fieldwright sheet 1\n:: worknig\n", "line 2: unknown kind of cell 'worknig'"));
    }
}

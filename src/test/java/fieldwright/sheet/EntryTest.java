package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class EntryTest {

    private static Cell cell(String kind, String source) throws SheetException {
        return Sheet.parse("fieldwright sheet 1\n\n:: " + kind + "\n" + source + "\n").cells().get(0);
    }

    private static DeriveEntry derive(String line) throws SheetException {
        return (DeriveEntry) cell("derive", line).derives().get(0);
    }

    @Test
    void inputsAreSplitAtTheBarsOutsideQuotes() throws SheetException {
        List<InputLine> lines = cell("input", """
                R_s   = 1.80 m ± 0.02 m    | inner radius            | drawing TW-S3-02

                ρ_0 = 2.1 uC/m^3 ± 25 % (k=1, nu=18)
                  k = 0.6 | fall-off
                corr(R_s, k) = 0.9
                wall = "a | b" | lining | list 3 | page 2""").inputs();
        assertEquals(List.of(
                new InputEntry("R_s", "1.80 m ± 0.02 m", "inner radius", "drawing TW-S3-02", 4, 9),
                new InputEntry("ρ_0", "2.1 uC/m^3 ± 25 % (k=1, nu=18)", "", "", 6, 7),
                new InputEntry("k", "0.6", "fall-off", "", 7, 7),
                new CorrelationEntry("R_s", "k", "0.9", 8, 16),
                new InputEntry("wall", "\"a | b\"", "lining", "list 3 | page 2", 9, 8)), lines);
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "R 3 m; line 'R 3 m' has no '='. Write 'name = value unit ± tolerance | description | source'.",
        "'  = 3 m'; line '= 3 m' has no name before '='. Write 'name = value unit ± tolerance | description | source', the name without blanks.",
        "a b = 3; line 'a b = 3' has no name before '='. Write 'name = value unit ± tolerance | description | source', the name without blanks.",
        "R = | x; line 'R = | x' gives 'R' no value. Write 'name = value unit ± tolerance | description | source'."})
    void malformedInputs(String text, String message) throws SheetException {
        List<InputLine> lines = cell("input", "ok = 1\n" + text).inputs();
        assertEquals(new MalformedLine(5, 1 + text.indexOf(text.strip()), message), lines.get(1));
    }

    @Test
    void derivesHaveUnitDescriptionSourceAndContinuations() throws SheetException {
        List<DeriveLine> lines = cell("derive", """
                Q_hand = pi*rho_0*R_s^2*H*(1 - k/2)     | the charge by hand
                       = 2*pi*H*integral(rho_0*rho, rho: 0 to R_s) | by rings
                       ~ pi*rho_0*R_s^2*H for k << 1

                E_slab = rho_0*(H + 1 m)/eps0 in kV/m   | upper bound | own""").derives();
        assertEquals(List.of(
                new DeriveEntry("Q_hand", List.of(), "pi*rho_0*R_s^2*H*(1 - k/2)", "", "", "the charge by hand", "", List.of(
                        new DeriveEntry.Continuation(DeriveEntry.Relation.EQUAL, "2*pi*H*integral(rho_0*rho, rho: 0 to R_s)", "", "",
                                "by rings", "", 5, 10),
                        new DeriveEntry.Continuation(DeriveEntry.Relation.LIMIT, "pi*rho_0*R_s^2*H", "", "k << 1", "", "", 6, 10)),
                        4, 10),
                new DeriveEntry("E_slab", List.of(), "rho_0*(H + 1 m)/eps0", "kV/m", "", "upper bound", "own", List.of(), 8, 10)), lines);
    }

    @Test
    void argumentsAndCondition() throws SheetException {
        DeriveEntry entry = derive("E_ring(z_1: m, q: uC, n) = q*z_1/(4*pi*eps0*(z_1^2 + a^2)^1.5) for z_1 >= 0 | on the axis");
        assertEquals("E_ring", entry.name());
        assertEquals(List.of(new DeriveEntry.Parameter("z_1", "m", 8), new DeriveEntry.Parameter("q", "uC", 16),
                new DeriveEntry.Parameter("n", "", 23)), entry.parameters());
        assertEquals("q*z_1/(4*pi*eps0*(z_1^2 + a^2)^1.5)", entry.formula());
        assertEquals("z_1 >= 0", entry.condition());
        assertEquals(28, entry.column());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', nullValues = "-", value = {
        "x = 3 in in mm;                3 in;             mm;   ''",
        "x = f(a in b);                 f(a in b);        '';   ''",
        "x = (1 + 2) in kV/m;           (1 + 2);          kV/m; ''",
        "x = (1 + 2 in kV/m;            (1 + 2 in kV/m;   '';   ''",
        "x = 2 (uC/m^3) in nC/m^3;      2 (uC/m^3);       nC/m^3; ''",
        "x = a in mm for b > 0;         a;                mm;   b > 0",
        "x = a for b > 0 in mm;         a;                mm;   b > 0",
        "x = integral(a for b, c) + 1;  integral(a for b, c) + 1; ''; ''",
        "x = sin(a)in;                  sin(a)in;         '';   ''",
        "x = a in;                      a in;             '';   ''",
        "x = when(a <= b, 1, 2) in mm;  when(a <= b, 1, 2); mm; ''",
        "x = inner + fort in for;       inner + fort;     for;  ''"})
    void unitAndConditionAreFoundOutsideBrackets(String line, String formula, String unit, String condition) throws SheetException {
        DeriveEntry entry = derive(line);
        assertEquals(formula, entry.formula());
        assertEquals(unit, entry.unit());
        assertEquals(condition, entry.condition());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "2*pi; line '2*pi' has no '='. Write 'name = formula | description | source'. A line that goes on begins with '=' or '~'.",
        "a <= b; line 'a <= b' has no '='. Write 'name = formula | description | source'. A line that goes on begins with '=' or '~'.",
        "a + b = c; line 'a + b = c' has 'a + b' before '='. Write a name without blanks, or 'name(argument: unit, …)'.",
        "f() = c; line 'f() = c' has the argument ''. Write 'name(argument: unit, …)'.",
        "a = | why; line 'a = | why' gives 'a' no formula. Write 'name = formula | description | source'.",
        "= 3; line '= 3' goes on with nothing: no formula stands above it in this cell.",
        "~ ; line '~' has no formula behind '~'."})
    void malformedDerives(String text, String message) throws SheetException {
        assertEquals(new MalformedLine(4, 1, message), cell("derive", text).derives().get(0));
    }

    @Test
    void aMalformedLineDoesNotHideTheOthers() throws SheetException {
        List<DeriveLine> lines = cell("derive", "a = 1\nwrong\n= 2\nb = 3").derives();
        assertEquals(3, lines.size());
        assertEquals("b", ((DeriveEntry) lines.get(2)).name());
        assertEquals(List.of(), ((DeriveEntry) lines.get(0)).continuations());
    }
}

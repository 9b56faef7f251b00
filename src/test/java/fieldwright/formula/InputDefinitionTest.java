package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class InputDefinitionTest {
    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "1.80 m ± 0.02 m;        1.80;  m;       1.8;     0.02;      LIMITS;   NaN; Infinity",
        "1.80 m ± 2 cm;          1.80;  m;       1.8;     0.02;      LIMITS;   NaN; Infinity",
        "1.80 m +- 0.02 m;       1.80;  m;       1.8;     0.02;      LIMITS;   NaN; Infinity",
        "1.80 m +/- 0.02 m;      1.80;  m;       1.8;     0.02;      LIMITS;   NaN; Infinity",
        "2.1 uC/m^3 ± 25 %;      2.1;   uC/m^3;  2.1e-6;  0.525e-6;  LIMITS;   NaN; Infinity",
        "2.1 µC/m³ ± 25%;        2.1;   µC/m³;   2.1e-6;  0.525e-6;  LIMITS;   NaN; Infinity",
        "3.0 kV ± 0.1 kV (k=2);  3.0;   kV;      3000;    100;       EXPANDED; 2;   Infinity",
        "3.0 kV ± 2 % (k=1, nu=18); 3.0; kV;     3000;    60;        EXPANDED; 1;   18",
        "3.0 kV ± 2 % ( k = 1, ν = 18 ); 3.0; kV; 3000;   60;        EXPANDED; 1;   18",
        "-4e-9 C ± 10 %;         -4e-9; C;       -4e-9;   4e-10;     LIMITS;   NaN; Infinity",
        "−4 nC ± 1 nC;           -4;    nC;      -4e-9;   1e-9;      LIMITS;   NaN; Infinity",
        "2 (uC/m^3) ± 1 (uC/m^3); 2;    uC/m^3;  2e-6;    1e-6;      LIMITS;   NaN; Infinity",
        "30 deg ± 1 deg;         30;    deg;     0.5235987755982989; 0.017453292519943295; LIMITS; NaN; Infinity"})
    void quantitiesWithTolerance(String text, String written, String unit, double si, double half, Tolerance.Form form, double k, double nu) {
        InputDefinition.Quantity q = (InputDefinition.Quantity) InputDefinition.parse(text);
        assertEquals(written, q.written());
        assertEquals(unit, q.value().shown());
        assertEquals(si, q.value().si(), text);
        assertEquals(half, q.tolerance().halfWidth(), Math.ulp(half), text);
        assertEquals(form, q.tolerance().form());
        assertEquals(k, q.tolerance().coverage());
        assertEquals(nu, q.tolerance().degreesOfFreedom());
        assertEquals(form == Tolerance.Form.LIMITS ? half / Math.sqrt(3) : half / k, q.tolerance().standardUncertainty(), Math.ulp(half));
    }

    @Test
    void withoutTolerance() {
        InputDefinition.Quantity q = (InputDefinition.Quantity) InputDefinition.parse("0.6");
        assertNull(q.tolerance());
        assertNull(q.value().shown());
        assertEquals("0.6", q.written());
        assertEquals(0.6, ((Binding.Value) q.binding()).amount().si());
        assertEquals(1.9, ((InputDefinition.Quantity) InputDefinition.parse("1.8 m")).moved(1.9).si());
        assertEquals("m", ((InputDefinition.Quantity) InputDefinition.parse("1.8 m")).moved(1.9).shown());
    }

    @Test
    void otherKinds() {
        assertEquals(new InputDefinition.Whole(12), InputDefinition.parse("12 (whole)"));
        assertEquals(List.of(Amount.of(1, "mm"), Amount.of(2, "mm"), Amount.of(5, "mm")), ((InputDefinition.Listed) InputDefinition.parse("[1, 2, 5] mm")).values());
        assertEquals(List.of(Amount.of(1, "mm"), Amount.of(2, "cm")), ((InputDefinition.Listed) InputDefinition.parse("[1 mm, 2 cm]")).values());
        InputDefinition.Table t = (InputDefinition.Table) InputDefinition.parse("table(d / mm: 1, 2; σ / (uC/m^2): 3, 4.5; n: 1, 2)");
        assertEquals(List.of("d", "sigma", "n"), t.columns().stream().map(InputDefinition.Table.Column::name).toList());
        assertEquals(4.5e-6, t.columns().get(1).values().get(1).si());
        assertEquals(new InputDefinition.Choice("PE", List.of("PE", "PTFE", "soda glass")), InputDefinition.parse("PE of {PE, PTFE, soda glass}"));
        assertTrue(InputDefinition.parse("[1, 2]").binding() instanceof Binding.Unfit);
    }

    @ParameterizedTest(name = "{index}: {0}")
    @CsvSource(delimiter = '@', value = {
        "'' @ 0 @ has no value", "abc @ 0 @ is no number", "2*3 m @ 1 @ formulas belong into a derive cell", "1,8 m @ 1 @ one decimal point",
        "1.8 q @ 4 @ no unit 'q'", "1.8 m ± 0.02 @ 8 @ tolerance is a plain number", "1.8 ± 0.02 m @ 6 @ tolerance is a length", "1.8 m ± 0 m @ 8 @ must be > 0",
        "1.8 m ± -1 m @ 8 @ must be > 0", "1.8 m ± @ 7 @ a number is missing", "0 m ± 5 % @ 6 @ percent of 0", "25 % ± 5 % @ 7 @ can mean two things",
        "1 m ± 1 m (nu=3) @ 10 @ coverage factor is missing", "1 m ± 1 m (k=0) @ 13 @ must be a plain number > 0", "1 m ± 1 m (k=2, x=3) @ 15 @ is not known",
        "[1, 2 @ 0 @ not closed", "[1 m, 2 s] @ 6 @ one kind", "[1, , 2] @ 4 @ a number is missing", "[1, 2] q @ 7 @ no unit 'q'",
        "table(d / mm: 1, 2; U: 1) @ 20 @ has 1 numbers", "table(d: 1; d: 2) @ 12 @ stands twice", "table(d: 1 @ 5 @ not closed", "PE {PE} @ 0 @ a choice is written",
        "PVC of {PE, PTFE} @ 0 @ none of the options", "1.5 (whole) @ 0 @ no whole number", "2.1×10^-6 C @ 3 @ 2.1e-6"})
    void errorsHaveAPlace(String text, int position, String part) {
        FormulaException e = assertThrows(FormulaException.class, () -> InputDefinition.parse(text));
        assertTrue(e.getMessage().contains(part), e.getMessage());
        assertEquals(position, e.position(), e.getMessage());
    }

    @Test
    void correlations() {
        assertEquals(new Correlation("rho_0", "H", -0.9), Correlation.parse("corr(ρ_0, H) = −0.9"));
        for (String wrong : new String[] {"corr(a, a) = 0.5", "corr(a, b) = 1.1", "corr(a, b) = x", "corr(a) = 1"}) {
            assertThrows(AuthorException.class, () -> Correlation.parse(wrong), wrong);
        }
    }
}

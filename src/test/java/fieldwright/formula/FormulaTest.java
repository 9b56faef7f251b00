package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.UnknownNameException;
import fieldwright.quantity.Units;
import java.util.List;
import java.util.Map;
import java.util.OptionalInt;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FormulaTest {
    private final TestScope scope = new TestScope().value("R_s", 1.8, "m").value("H", 4, "m").value("rho_0", 2.1, "uC/m^3").value("k", 0.6, "");

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "1 + 2*3; 7", "-2^2; -4", "2^-1; 0.5", "2^3^2; 512", "(1+2)*3; 9", "7/2/2; 1.75", "1 - 2 - 3; -4", "2*-3; -6", "1e3 + .5; 1000.5",
        "min(3, 1, 2); 1", "max(1, 4); 4", "when(1 < 2, 3, 4); 3", "when(2 < 1, 3, otherwise 4); 4", "when(2 < 1, 3, otherwise -(4)); -4", "when(0 < 1 < 2 and not (3 < 2), 3, 4); 3", "when(2 < 1 or 1 >= 2, 3, 4); 4",
        "abs(-3); 3", "sqrt(16); 4", "2² + 2³; 12", "3×2 − 1; 5", "6÷3; 2", "10⁻¹*10; 1", "90 deg*2/π; 1", "50 % * 2; 1", "1 km/(1 m); 1000",
        "cbrt(-8); -2", "atan2(1 m, 1 m)*4/pi; 1", "floor(2.5) + ceil(2.5); 5", "2 (uC/m^3)/(1 (uC/m^3)); 2", "log10(1000); 3"})
    void textInNumberOut(String text, double value) {
        assertEquals(value, Formula.parse(text).bind(Scope.EMPTY).amount().si(), 1e-15 * Math.abs(value), text);
    }

    @Test
    void pelletSilo() {
        Formula f = Formula.parse("rho_0*(1 - k*(rho/R_s)^2)").bind(scope);
        assertEquals(Set.of("rho"), f.variables());
        assertEquals(Units.VOLUME_DENSITY, f.dimension(Map.of()));
        assertEquals(2.1e-6 * (1 - 0.6 * 0.25), f.compile(List.of("rho")).at(0.9), 1e-21);
        assertEquals(OptionalInt.of(2), f.degree("rho"));
        Amount q = Formula.parse("pi*rho_0*R_s^2*H*(1 - k/2)").bind(scope).amount();
        assertEquals(5.98511e-5, q.value("C"), 5e-11);   // value of the scenario, six digits
        assertTrue(q.error() > 0 && q.error() < 1e-15 * q.si());
        assertEquals("\\rho_{0}\\,\\left(1-k\\,\\left(\\frac{\\rho}{R_{s}}\\right)^{2}\\right)", f.latex());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "2 x; 2; is not a unit", "2(x + 1); 1; brackets hold a unit", "R_s H; 4; without an operator", "(1 + 2; 0; not closed", "1 + ; 3; ends where",
        "sin; 0; without arguments", "sin(1, 2); 0; Write sin(x)", "5 V/m; 2; round brackets: 5 (V/m)", "2 m^2; 2; round brackets", "a = b; 2; '='",
        "1 < 2 + 3 < ; 11; ends where", "integral(x); 0; without limits", "integral(x, x: 0 to x); 12; depend on x itself",
        "integral(x, x: 0 to y, y: 0 to x); 12; in a circle", "when(1, 2, 3); 5; comparison is expected", "1 + (a < b); 7; comparison stands where",
        "2 ** 3; 2; '**'", "a ? b; 2; no meaning", "1..2; 2; decimal point", "'a, b'; 1; unexpected ','", "integral(x, x, 1); 13; colon", "x(3); 1; not a function"})
    void syntaxErrorsHaveAPlace(String text, int position, String part) {
        FormulaException e = assertThrows(FormulaException.class, () -> Formula.parse(text));
        assertTrue(e.getMessage().contains(part), e.getMessage());
        assertEquals(position, e.position(), e.getMessage());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "H + 1 V; 2; a length (m) stands with a potential (V)", "sin(H); 4; argument of sin must be a plain number", "2^H; 2; exponent must be",
        "H^k2; 1; ", "when(H < 1 V, 1, 2); 7; only like quantities compare", "when(1 < 2, H, 1 V); 15; both values",
        "max(H, k); 0; arguments of max", "integral(rho, rho: 0 to 2); 24; the limits of 'rho'", "H^pi; 1; no simple fraction"})
    void unitErrorsHaveAPlace(String text, int position, String part) {
        scope.value("k2", 2, "");
        Formula f = Formula.parse(text).bind(scope);
        if (part == null) {
            assertEquals(Units.AREA, f.dimension(Map.of()));
            return;
        }
        FormulaException e = assertThrows(FormulaException.class, () -> f.dimension(Map.of()));
        assertTrue(e.getMessage().contains(part), e.getMessage());
        assertEquals(position, e.position(), e.getMessage());
    }

    @Test
    void unknownNamesOfferTheClosest() {
        UnknownNameException e = assertThrows(UnknownNameException.class, () -> Formula.parse("2*R_S").bind(scope));
        assertEquals("no quantity 'R_S'. Closest defined name: 'R_s'.", e.getMessage());
        assertEquals(2, e.position());
        assertTrue(assertThrows(UnknownNameException.class, () -> Formula.parse("5*V/m").bind(scope)).getMessage().contains("5 (V/m)"));
    }

    @Test
    void definitionsWithArgumentsAndConditions() {
        scope.define("E", "z: m", "rho_0*z/eps0", "z <= H");
        Formula f = Formula.parse("E(H/2)").bind(scope);
        assertEquals(2.1e-6 * 2 / Constants.EPS0, f.amount().si(), 1e-9);
        FormulaException outside = assertThrows(FormulaException.class, () -> Formula.parse("1 + E(2*H)/(1 V/1 m)").bind(scope).amount());
        assertEquals(4, outside.position());
        assertTrue(outside.getMessage().contains("E(2*H) holds only for z <= H"), outside.getMessage());
        FormulaException unit = assertThrows(FormulaException.class, () -> Formula.parse("E(k)").bind(scope).dimension(Map.of()));
        assertTrue(unit.getMessage().contains("argument 'z'"), unit.getMessage());
        Formula pieces = Formula.parse("when(z <= H, E(z), 0)").bind(scope);
        assertEquals(0, pieces.compile(List.of("z")).at(5));
        assertThrows(FormulaException.class, () -> Formula.parse("E(z)").bind(scope).compile(List.of("z")).at(5));
    }
}

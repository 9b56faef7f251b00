package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Standing;
import fieldwright.quantity.UnknownNameException;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.OptionalInt;
import java.util.Set;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FormulaApiTest {
    private final TestScope scope = new TestScope().value("R_s", 1.8, "m").value("H", 4, "m").value("rho_0", 2.1, "uC/m^3").value("k", 0.6, "");

    @ParameterizedTest(name = "{0} -> {1}")
    @CsvSource(delimiter = ';', value = {
        "x + x; 2*x", "2*x - x; x", "x*x; x^2", "x/x; 1", "a*b - b*a; 0", "1/3 + 1/6; 1/2", "0.5*2*x; x", "-(-x); x", "x^2/x; x", "sqrt(x)*sqrt(x); x",
        "-x + y; y - x", "x*(1/2); x/2", "0*x; 0", "x^0; 1", "2*(x + 1)/2; x + 1", "(x + y) - (y + x); 0", "sqrt(4)*exp(0); 2", "x^-1*x; 1", "0.6*x + 0.3*x; 0.9*x",
        "sin(x)/sin(x) + cos(0); 2", "3*x^2*2; 6*x^2", "a/b/c; a/(b*c)", "when(x < 1, y, y); y", "x^1.5*x^0.5; x^2", "(x^2)^0.5; sqrt(x^2)"})
    void simplified(String text, String simple) {
        assertEquals(simple, Formula.parse(text).simplified().text());
    }

    @ParameterizedTest(name = "d/dx {0} = {1}")
    @CsvSource(delimiter = ';', value = {
        "x^3; 3*x^2", "1/x; -1/x^2", "sin(2*x); 2*cos(2*x)", "a*x; a", "exp(-x^2); -2*exp(-x^2)*x", "ln(x); 1/x", "abs(x); sign(x)", "x^a; a*x^(a - 1)",
        "a^x; a^x*ln(a)", "when(x < a, x^2, a^2); when(x < a, 2*x, 0)", "max(x, a); when(x >= a, 1, 0)", "floor(x); 0", "besselJ(0, x); -besselJ(1, x)"})
    void derivatives(String text, String derivative) {
        assertEquals(derivative, Formula.parse(text).derivative("x").text());
    }

    /** Every function that has a derivative, at interior points, against central differences. */
    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {"sqrt(x)", "cbrt(x)", "exp(x)", "ln(x)", "log10(x)", "sin(x)", "cos(x)", "tan(x)", "asin(x)", "acos(x)", "atan(x)",
        "atan2(x, 0.4)", "atan2(0.4, x)", "sinh(x)", "cosh(x)", "tanh(x)", "asinh(x)", "acosh(x + 1)", "atanh(x)", "abs(x)", "erf(x)", "erfc(x)", "gamma(x)",
        "besselJ(0, x)", "besselJ(3, x)", "besselY(0, x)", "besselY(2, x)", "besselI(0, x)", "besselI(2, x)", "besselK(0, x)", "besselK(3, x)",
        "legendreP(1, x)", "legendreP(4, x)", "ellipticK_m(x)", "ellipticE_m(x)", "ellipticPi_m(x, 0.3)", "ellipticPi_m(0.3, x)", "ellipticPi_m(-2, x)",
        "ellipticF_m(x, 0.3)", "ellipticF_m(0.8, x)", "ellipticE_m(x, 0.3)", "ellipticE_m(0.8, x)", "ellipticPi_m(x, 0.8, 0.3)", "ellipticPi_m(0.4, x, 0.3)",
        "ellipticPi_m(0.4, 0.8, x)"})
    void everyFunctionsDerivative(String text) {
        Formula f = Formula.parse(text);
        BlockFunction value = f.compile(List.of("x"));
        BlockFunction slope = f.derivative("x").compile(List.of("x"));
        for (double x : new double[] {0.21, 0.57, 0.83}) {
            double h = 1e-3;
            double fine = (value.at(x + h) - value.at(x - h)) / (2 * h);
            double coarse = (value.at(x + 2 * h) - value.at(x - 2 * h)) / (4 * h);
            double expected = fine + (fine - coarse) / 3;   // error h^4 f^(5)/30
            assertEquals(expected, slope.at(x), 1e-7 * (1 + Math.abs(expected)), text + " at " + x + ": " + f.derivative("x").text());
        }
    }

    @Test
    void anOrderThatVariesHasNoDerivative() {
        assertThrows(FormulaException.class, () -> Formula.parse("besselJ(n, x)").derivative("x"));
    }

    @ParameterizedTest(name = "degree of {0}")
    @CsvSource(delimiter = ';', value = {"rho_0*(1 - k*(rho/R_s)^2); 2", "(rho^2 + 1 (m^2))^3*rho; 7", "rho_0; 0", "sin(rho/R_s); -1", "1 m/rho; -1", "rho^0.5; -1",
        "when(rho < R_s, rho, R_s); -1", "-rho + 2*rho; 1"})
    void degrees(String text, int degree) {
        assertEquals(degree < 0 ? OptionalInt.empty() : OptionalInt.of(degree), Formula.parse(text).bind(scope).degree("rho"));
    }

    @Test
    void kinks() {
        List<Formula> found = Formula.parse("abs(x - H) + when(rho < R_s and z >= 0, 1, 2)*max(x, y) + sin(x/H)").bind(scope).kinks();
        assertEquals(List.of("x - H", "rho - R_s", "z - 0", "x - y"), found.stream().map(Formula::text).toList());
        assertEquals(List.of(), Formula.parse("rho_0*cos(phi)").bind(scope).kinks());
    }

    @Test
    void plainNumbers() {
        Formula f = Formula.plain("3.2 - 0.4*x^2 + sin(phi)", "mm", "uC/m^3", scope);
        assertEquals(Units.VOLUME_DENSITY, f.dimension(Map.of()));
        assertEquals((3.2 - 0.4 * 4 + 1) * 1e-6, f.compile(List.of("x", "phi")).at(0.002, Math.PI / 2), 1e-20);
        assertEquals("3.2 - 0.4*x^2 + sin(phi)", f.text());
        Formula limit = Formula.plain("2.5", "mm", "mm", scope);
        assertEquals(0.0025, limit.amount().si(), 1e-18);
        assertTrue(assertThrows(FormulaException.class, () -> Formula.plain("R_s*x", "mm", "C", scope)).getMessage().contains("plain numbers"));
        assertEquals(1800, Formula.plain("R_s/(1 mm)", "mm", "", scope).amount().si(), 1e-9);
        assertThrows(FormulaException.class, () -> Formula.plain("x", "kV", "C", scope));
    }

    @Test
    void bareZeroAndInfFitAnyUnit() {
        for (String any : new String[] {"0", "-0", "inf", "-inf", "0*H", "max(0, 0)"}) {
            Formula f = Formula.parse(any).bind(scope);
            assertTrue(f.fitsAnyUnit(), any);
            f.requireDimension(Units.CHARGE, "limit", Map.of());
        }
        Formula.parse("when(x > 0, H, 0) + 0").bind(scope).requireDimension(Units.LENGTH, "limit", Map.of());
        assertThrows(FormulaException.class, () -> Formula.parse("1").requireDimension(Units.LENGTH, "limit", Map.of()));
    }

    @Test
    void powersOfQuantities() {
        Formula f = Formula.parse("sqrt(R_s*H) + (R_s*H)^(1/2) + (R_s^3)^(1/3) + R_s^1.5/R_s^0.5").bind(scope);
        assertEquals(Units.LENGTH, f.dimension(Map.of()));
        assertEquals(2 * Math.sqrt(7.2) + 3.6, f.amount().value("m"), 1e-14);
    }

    @Test
    void wordsFitAndUnfit() {
        Scope s = new TestScope() {
            @Override
            public Binding lookup(String name) {
                return name.equals("E_roof") ? new Binding.Unfit("a vector", "Use a component.") : super.lookup(name);
            }
        }.value("Q", 1, "C").define("f", "a: m", "2*a", null);
        assertTrue(assertThrows(FormulaException.class, () -> Formula.parse("2*E_roof").bind(s)).getMessage().contains("is a vector, not a number. Use a component."));
        assertTrue(assertThrows(FormulaException.class, () -> Formula.parse("Q(2)").bind(s)).getMessage().contains("Q*("));
        assertTrue(assertThrows(FormulaException.class, () -> Formula.parse("f + 1").bind(s)).getMessage().contains("Write f(a)"));
        assertTrue(assertThrows(FormulaException.class, () -> Formula.parse("f(1, 2)").bind(s)).getMessage().contains("takes 1 argument, not 2"));
        assertEquals("sqrt", assertThrows(UnknownNameException.class, () -> Formula.parse("sqrrt(2)").bind(s)).nearest());
        assertEquals(6, Formula.parse("f(3 m)").bind(s).amount().value("m"));
    }

    @Test
    void greekAndMicroFold() {
        for (String same : new String[] {"ρ_0*ρ/ε0", "rho_0*rho/eps0", "ρ₀·ϱ÷ε₀", "ρ_0 × ρ / ϵ_0"}) {
            assertEquals(Formula.parse("rho_0*rho/eps0"), Formula.parse(same), same);
        }
        assertEquals(Formula.parse("cos(theta) + phi"), Formula.parse("cos(ϑ) + ϕ"));
        assertEquals(Formula.parse("5 µm").amount(Map.of()).si(), Formula.parse("5 μm").amount(Map.of()).si());
        assertEquals("mu_r", Names.fold("μ_r"));
        assertEquals("mu_r", Names.fold("µ_r"));
        assertEquals("Omega_12", Names.fold("Ω₁₂"));
    }

    @Test
    void reservedNames() {
        for (String name : Names.reserved()) {
            assertTrue(name.equals("_") || Names.whyReserved(name) != null, name);
        }
        for (String free : new String[] {"R_s", "H", "k", "E_roof", "Q", "V", "m", "lambda", "sigma", "D", "U_0"}) {
            assertNull(Names.whyReserved(free), free);
        }
    }

    @Test
    void constants() {
        assertEquals(8.8541878188e-12, Constants.EPS0);   // CODATA 2022
        assertEquals(1.602176634e-19, Constants.value("q_e").si());   // exact, SI 2019
        assertEquals(299792458, Constants.value("c_0").si());   // exact
        assertEquals(Units.PERMITTIVITY, Constants.value("eps0").dimension());
        assertEquals(Math.PI, Formula.parse("π").amount().si());
    }

    @Test
    void undecidedComparisonsCountBothValues() {
        scope.value("a", new Amount(1, 1e-3, Units.NONE, null, Standing.CONVERGED)).value("b", new Amount(1.0005, 0, Units.NONE, null, Standing.CONVERGED));
        assertEquals(4, Formula.parse("when(a < b, 1, 5)").bind(scope).amount().error(), 1e-12);
        assertEquals(0, Formula.parse("when(a < 2*b, 1, 5)").bind(scope).amount().error());
        assertEquals(0, Formula.parse("when(a <= a, 1, 5)").bind(scope).amount().error());
        Amount lost = Formula.parse("1/(a - b)").bind(scope).amount();
        assertEquals(Standing.NO_ERROR_BOUND, lost.standing());
        assertEquals(Standing.NO_ERROR_BOUND, Amount.of(1).dividedBy(Amount.si(1e-3, 1e-2, Units.NONE)).standing());
        assertTrue(Formula.parse("sqrt(a - a)").bind(scope).amount().error() >= Math.sqrt(2e-3));
    }

    @Test
    void sameNameWithOtherValueIsNotMerged() {
        Formula one = Formula.parse("a").bind(new TestScope().value("a", 1, "m"));
        Formula two = Formula.parse("a").bind(new TestScope().value("a", 3, "m"));
        assertEquals(-2, one.minus(two).simplified().amount().si());
        assertNotEquals(one, two);
    }

    @Test
    void unknownErrorStaysUnknown() {
        scope.value("q", new Amount(2, Double.NaN, Units.NONE, null, Standing.CONVERGED));
        for (String text : new String[] {"q + 1", "q*2", "1/q", "sqrt(q)", "sin(q)", "q^2", "exp(q)", "max(q, 1)"}) {
            assertTrue(Double.isNaN(Formula.parse(text).bind(scope).amount().error()), text);
        }
    }

    @Test
    void runawayTextsAreRefusedNotCrashed() {
        String brackets = "(".repeat(5000) + "1" + ")".repeat(5000);
        String sum = "1" + "+1".repeat(50_000);
        String signs = "-".repeat(5000) + "1";
        String powers = "2" + "^1".repeat(1000);
        for (String text : new String[] {brackets, sum, signs, powers, "1".repeat(1000)}) {
            assertThrows(FormulaException.class, () -> Formula.parse(text));
        }
        assertEquals(1500, Formula.parse("1" + "+1".repeat(1499)).amount().si());
    }

    @Test
    void blockCodeIsThreadSafe() throws Exception {
        BlockFunction f = Formula.parse("rho_0*(1 - k*(rho/R_s)^2)*when(rho < R_s/2, sin(rho/R_s), cos(rho/R_s))").bind(scope).compile(List.of("rho"));
        ExecutorService pool = Executors.newFixedThreadPool(4);
        try {
            List<Callable<Double>> tasks = new ArrayList<>();
            for (int t = 0; t < 64; t++) {
                double rho = 0.01 + t / 40.0;
                tasks.add(() -> {
                    double[] same = new double[BlockFunction.BLOCK];
                    java.util.Arrays.fill(same, rho);
                    double[] out = new double[BlockFunction.BLOCK];
                    for (int i = 0; i < 50; i++) {
                        f.evaluate(new double[][] {same}, BlockFunction.BLOCK, out);
                    }
                    return out[BlockFunction.BLOCK - 1];
                });
            }
            int t = 0;
            for (Future<Double> found : pool.invokeAll(tasks)) {
                assertEquals(f.at(0.01 + t++ / 40.0), found.get());
            }
        } finally {
            pool.shutdownNow();
        }
    }

    @Test
    void boundNamesAreNotFree() {
        Formula f = Formula.parse("integral(t*x, t: 0 to u)");
        assertEquals(Set.of("x", "u"), f.variables());
        AuthorException e = assertThrows(AuthorException.class, () -> Formula.parse("x + 1 m").amount());
        assertTrue(e.getMessage().contains("still depends on x"), e.getMessage());
    }
}

package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.Units;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class IntegralTest {
    private final TestScope scope = new TestScope().value("R_s", 1.8, "m").value("H", 4, "m").value("rho_0", 2.1, "uC/m^3").value("k", 0.6, "")
        .with(new TestIntegrator());

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "integral(x^2, x: 0 to 3 m)/(1 (m^3)); 9", "integral(1, t: 2 to 5); 3", "integral(sin(phi), phi: 0 to pi); 2",
        "integral(1, x: 0 to 1 m, y: 0 to x)/(1 (m^2)); 0.5", "integral(1, y: 0 to x, x: 0 to 1 m)/(1 (m^2)); 0.5",
        "integral(r^2*sin(theta), r: 0 to 1 m, theta: 0 to pi, phi: 0 to 2*pi)/(1 (m^3)); 4.1887902047863905",
        "integral(exp(-t^2), t: -inf to inf); 1.7724538509055159", "integral(t, t: 1 to 0); -0.5",
        "integral(integral(t*u, t: 0 to u), u: 0 to 2); 2", "integral(t + integral(t, t: 0 to 1), t: 0 to 1); 1"})
    void values(String text, double value) {
        Amount a = Formula.parse(text).bind(scope).amount();
        assertEquals(value, a.si(), a.error() + 1e-15, text);
        assertTrue(a.error() < 1e-8, "error " + a.error());
    }

    @Test
    void theChargeOfTheCloudByTwoRoutes() {
        Amount byHand = Formula.parse("pi*rho_0*R_s^2*H*(1 - k/2)").bind(scope).amount();
        Amount integral = Formula.parse("2*pi*H*integral(rho_0*(1 - k*(rho/R_s)^2)*rho, rho: 0 to R_s)").bind(scope).amount();
        assertEquals(Units.CHARGE, integral.dimension());
        assertEquals(byHand.si(), integral.si(), byHand.error() + integral.error());
    }

    @Test
    void errorsOfTheInputsAreCarriedThrough() {
        scope.value("a", new Amount(2, 1e-6, Units.NONE, null, fieldwright.quantity.Standing.CONVERGED));
        Amount a = Formula.parse("integral(a*t^2, t: 0 to a)").bind(scope).amount();   // a^4/3, slope 4 a^3/3
        assertEquals(16 / 3.0, a.si(), 1e-13);
        assertEquals(4 * 8 / 3.0 * 1e-6, a.error(), 1e-9);
        scope.value("b", new Amount(2, Double.NaN, Units.NONE, null, fieldwright.quantity.Standing.CONVERGED));
        assertTrue(Double.isNaN(Formula.parse("integral(b*t, t: 0 to 1)").bind(scope).amount().error()));
    }

    @Test
    void limitsAndIntegrandMayUseOuterVariables() {
        Formula f = Formula.parse("integral(x*t, t: 0 to x/(1 m))").bind(scope);
        assertEquals(Units.LENGTH, f.dimension(Map.of()));
        BlockFunction block = f.compile(List.of("x"));
        assertEquals(13.5, block.at(3), 1e-12);
        assertEquals(4, f.amount(Map.of("x", Amount.of(2, "m"))).si(), 1e-12);
    }

    @Test
    void argumentsAreNotCaptured() {
        scope.define("F", "a: 1", "integral(a*t, t: 0 to 1)", null);
        Formula f = Formula.parse("integral(F(t), t: 0 to 1)").bind(scope);   // inner t is another t
        assertEquals(0.25, f.amount().si(), 1e-13);
        Formula g = Formula.parse("integral(s*t, t: 0 to 1)").substitute(Map.of("s", Formula.parse("t")));
        assertEquals(1.5, Formula.parse("0*t + 0").plus(g).bind(scope, java.util.Set.of("t")).compile(List.of("t")).at(3), 1e-13);
    }

    @ParameterizedTest(name = "d/da {0}")
    @CsvSource(delimiter = ';', value = {"integral(sin(a*t), t: 0 to 2)", "integral(t^2*a, t: a to a^2)", "integral(t*u*a, t: 0 to a, u: t to 2*a)",
        "integral(exp(-a*t), t: 0 to inf)"})
    void leibniz(String text) {
        Formula f = Formula.parse(text).bind(scope, java.util.Set.of("a"));
        BlockFunction value = f.compile(List.of("a"));
        double h = 1e-4;
        double coarse = (value.at(1.3 + 2 * h) - value.at(1.3 - 2 * h)) / (4 * h);
        double fine = (value.at(1.3 + h) - value.at(1.3 - h)) / (2 * h);
        assertEquals(fine + (fine - coarse) / 3, f.derivative("a").compile(List.of("a")).at(1.3), 1e-9, f.derivative("a").text());
    }

    @Test
    void withoutAnIntegratorItSaysSo() {
        Formula f = Formula.parse("1 + integral(t, t: 0 to 1)").bind(Scope.EMPTY);
        assertEquals(4, assertThrows(FormulaException.class, f::amount).position());
    }

    @Test
    void kinksOfTheIntegrandReachTheIntegrator() {
        Integrator.Problem[] seen = new Integrator.Problem[1];
        Formula f = Formula.parse("integral(abs(t - 1/3) + when(t < 1/2, 1, 2), t: 0 to 1)").bind(new TestScope().with(p -> {
            seen[0] = p;
            return new Integrator.Estimate(0, 0, fieldwright.quantity.Standing.CONVERGED);
        }));
        f.amount();
        assertEquals(2, seen[0].kinks().size());
        assertEquals(0, seen[0].kinks().get(0).at(1 / 3.0), 1e-16);
        assertEquals(0, seen[0].kinks().get(1).at(0.5), 1e-16);
    }

    @Test
    void notConvergedIsKept() {
        TestScope stuck = new TestScope().with(p -> new Integrator.Estimate(1, 0.5, fieldwright.quantity.Standing.notConverged("too hard")));
        Amount a = Formula.parse("2*integral(t, t: 0 to 1)").bind(stuck).amount();
        assertEquals("too hard", a.standing().reason());
        assertTrue(a.error() >= 1);
        assertTrue(Double.isNaN(Formula.parse("integral(x*t, t: 0 to 1)").bind(stuck).compile(List.of("x")).at(1)));
    }
}

package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import net.jqwik.api.ForAll;
import net.jqwik.api.Property;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.scilab.forge.jlatexmath.TeXConstants;
import org.scilab.forge.jlatexmath.TeXFormula;

class LatexTest {
    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "2*pi*H; 2\\,\\pi\\,H", "a*2; a\\cdot 2", "(a + b)/(c*d); \\frac{a+b}{c\\,d}", "-(a + b)*c; -\\left(a+b\\right)\\,c", "a - (b - c); a-\\left(b-c\\right)",
        "sqrt(x^2 + z^2); \\sqrt{x^{2}+z^{2}}", "sin(phi)^2; \\sin^{2}\\left(\\varphi\\right)", "exp(-x/a); \\mathrm{e}^{-\\frac{x}{a}}",
        "rho_0*eps0; \\rho_{0}\\,\\varepsilon_{0}", "E_roof; E_{\\mathrm{roof}}", "H + 1 m; H+1\\,\\mathrm{m}",
        "2.1 (uC/m^3); 2.1\\,\\mu \\mathrm{C}/\\mathrm{m}^{3}", "2.1e-6*x; 2.1\\cdot 10^{-6}\\,x", "abs(x); \\left|x\\right|",
        "integral(rho, rho: 0 to R_s); \\int_{0}^{R_{s}}\\rho\\,\\mathrm{d}\\rho",
        "integral(x + y, y: 0 to x, x: 0 to a); \\int_{0}^{a}\\int_{0}^{x}\\left(x+y\\right)\\,\\mathrm{d}y\\,\\mathrm{d}x",
        "when(rho < a, 1, 0); \\begin{cases}1&\\quad\\text{if }\\rho<a\\\\0&\\quad\\text{otherwise}\\end{cases}", "besselJ(0, k*rho); J_{0}\\left(k\\,\\rho\\right)",
        "(-2)^n; \\left(-2\\right)^{n}", "(x^2)^3; \\left(x^{2}\\right)^{3}", "90 deg; 90^{\\circ}", "a*-b; a\\,\\left(-b\\right)", "f(a, 2); f\\left(a,\\,2\\right)"})
    void formulas(String text, String latex) {
        assertEquals(latex, Formula.parse(text).latex());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {"kV/cm; \\mathrm{kV}/\\mathrm{cm}", "µC/m²; \\mu \\mathrm{C}/\\mathrm{m}^{2}", "MOhm; \\mathrm{M}\\Omega ", "m^2/(V*s); \\mathrm{m}^{2}/(\\mathrm{V}\\cdot \\mathrm{s})",
        "%; \\%", "um; \\mu \\mathrm{m}"})
    void units(String unit, String latex) {
        assertEquals(latex.strip(), Latex.unit(unit).strip());
    }

    @Test
    void everyFunctionRenders() {
        List<String> texts = new ArrayList<>(List.of("when(0 < x < a and not (y > b), x, when(x > 2 or y <= 1, 1 m, inf))*2 + q_e*c_0",
            "integral(r^2*sin(theta), r: 0 to inf, theta: 0 to pi/2)^2", "x << a", "alpha + Gamma*Omega_max_2 + eps_r + omicron", "5 kOhm*x + 3 % + 2 (m^2/(V*s))"));
        for (Function f : Function.values()) {
            List<String> arguments = new ArrayList<>(List.of("1/2", "x", "m_1").subList(0, f.arity()));
            texts.add(f.text() + "(" + String.join(", ", arguments) + ")^2");
        }
        texts.forEach(t -> assertRenders(Formula.parse(t).latex()));
    }

    @Property(seed = "20260307", tries = 300)
    void anyTreeRenders(@ForAll long seed) {
        assertRenders(Latex.of(new RandomFormulas(seed).any(4)));
    }

    private static void assertRenders(String latex) {
        var icon = new TeXFormula(latex).createTeXIcon(TeXConstants.STYLE_DISPLAY, 20);
        assertTrue(icon.getIconWidth() > 0 && icon.getIconHeight() > 0, latex);
    }
}

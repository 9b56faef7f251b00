package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;
import java.util.List;
import org.junit.jupiter.api.Test;

class DeriveDefinitionTest {
    private final TestScope scope = new TestScope().value("R_s", 1.8, "m").value("H", 4, "m").value("rho_0", 2.1, "uC/m^3").value("k", 0.6, "");

    @Test
    void aNumberInItsUnit() {
        DeriveDefinition.Bound b = DeriveDefinition.parse("E_slab", List.of(), "rho_0*(H + 1 m)/eps0", "kV/m", "").bind(scope);
        assertTrue(b.isNumber());
        assertEquals("kV/m", b.amount().shown());
        assertEquals(2.1e-6 * 5 / 8.8541878188e-12 / 1000, b.amount().value("kV/m"), 1e-9);
        FormulaException e = assertThrows(FormulaException.class,
            () -> DeriveDefinition.parse("E_slab", List.of(), "rho_0*H", "kV/m", null).bind(scope));
        assertTrue(e.getMessage().contains("a surface charge density") && e.getMessage().contains("kV/m"), e.getMessage());
    }

    @Test
    void aFormulaOfArgumentsWithConditionAndSteps() {
        DeriveDefinition d = DeriveDefinition.parse("E_axis", List.of(DeriveDefinition.parameter("z", "m")), "rho_0*R_s^3/(3*eps0*z^2)", "", "z > R_s");
        DeriveDefinition.Bound b = d.bind(scope);
        assertFalse(b.isNumber());
        assertEquals(Units.FIELD, b.dimension());
        assertEquals("E_{\\mathrm{axis}}\\left(z\\right)=\\frac{\\rho_{0}\\,R_{s}^{3}}{3\\,\\varepsilon_{0}\\,z^{2}}\\quad\\text{for }z>R_{s}", d.latex());
        DeriveDefinition.Step step = DeriveDefinition.Step.parse(true, "rho_0*R_s/(3*eps0)", "z << 2*R_s");
        assertTrue(b.bindStep(step, scope).condition().isLimitingCase());
        assertEquals("\\approx \\frac{\\rho_{0}\\,R_{s}}{3\\,\\varepsilon_{0}}\\quad\\text{for }z\\ll 2\\,R_{s}", step.latex());
        FormulaException e = assertThrows(FormulaException.class, () -> b.bindStep(DeriveDefinition.Step.parse(false, "rho_0*R_s", null), scope));
        assertEquals("rho_0*R_s", e.text());
    }

    @Test
    void aCoordinateFormulaIsNoNumber() {
        DeriveDefinition.Bound b = DeriveDefinition.parse("sigma", List.of(), "rho_0*R_s*(1 - rho/R_s)", "", "").bind(scope);
        assertFalse(b.isNumber());
        assertTrue(b.binding() instanceof Binding.Definition);
    }

    @Test
    void aConditionOfANumberIsChecked() {
        DeriveDefinition.Bound b = DeriveDefinition.parse("Q", List.of(), "rho_0*R_s^3", "", "H > 3*R_s").bind(scope);
        AuthorException e = assertThrows(AuthorException.class, b::amount);
        assertTrue(e.getMessage().contains("Q holds only for H > 3*R_s"), e.getMessage());
    }

    @Test
    void namesAreCheckedAndFolded() {
        assertEquals("rho_1", DeriveDefinition.parse("ρ₁", List.of(), "1", "", "").name());
        for (String reserved : new String[] {"rho", "pi", "eps0", "sin", "class", "inf", "when", "2a", "θ", "γ"}) {
            AuthorException e = assertThrows(AuthorException.class, () -> DeriveDefinition.parse(reserved, List.of(), "1", "", ""), reserved);
            assertTrue(e.getMessage().contains("reserved") || e.getMessage().contains("not a name"), e.getMessage());
        }
        assertThrows(AuthorException.class, () -> DeriveDefinition.parameter("z", "kV"));
        assertThrows(AuthorException.class, () -> DeriveDefinition.parse("f", List.of(DeriveDefinition.parameter("a", "m"),
            DeriveDefinition.parameter("a", "m")), "1", "", ""));
    }
}

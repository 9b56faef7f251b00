package fieldwright.quantity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class UnitsTest {
    @ParameterizedTest(name = "{0}")
    @CsvSource({
        "uC/m^2, 1e-6, C/m^2", "µC/m², 1e-6, C/m^2", "μC/m², 1e-6, C/m^2", "nC, 1e-9, C", "pC, 1e-12, C", "kV/cm, 1e5, V/m",
        "MV/m, 1e6, V/m", "pF/m, 1e-12, F/m", "mm, 1e-3, m", "uC/m^3, 1e-6, C/m^3", "nC/m, 1e-9, C/m", "nC/mm^2, 1e-3, C/m^2",
        "%, 1e-2, 1", "deg, 0.017453292519943295, 1", "°, 0.017453292519943295, 1", "mrad, 1e-3, 1", "q_e, 1.602176634e-19, C",
        "e/m^3, 1.602176634e-19, C/m^3", "keV, 1.602176634e-16, J", "m^2/(V*s), 1, m^2/(V*s)", "cm^2·V^-1·s^-1, 1e-4, m^2/(V*s)",
        "min, 60, s", "h, 3600, s", "g, 1e-3, kg", "mg, 1e-6, kg", "kg, 1, kg", "kg/m^3, 1, kg/m^3", "L, 1e-3, m^3", "mbar, 100, Pa",
        "kOhm, 1000, Ohm", "kΩ, 1000, Ohm", "MΩ, 1e6, Ohm", "mJ, 1e-3, J", "Pa, 1, Pa", "cd, 1, cd", "mol, 1, mol", "dam, 10, m",
        "V/m/s, 1, V/(m*s)", "1/m, 1, m^-1", "m⁻¹, 1, m^-1", "C/(m*m), 1, C/m^2", "kV, 1000, V", "um, 1e-6, m", "J/m^3, 1, Pa"})
    void tradeWritings(String text, double factor, String sameAs) {
        TradeUnit unit = Units.parse(text);
        assertEquals(factor, unit.factor(), 0, text);
        assertEquals(Units.parse(sameAs).dimension(), unit.dimension(), text);
    }

    @Test
    void factorsAreRoundedOnce() {
        assertEquals(0.0018, Amount.of(1.8, "mm").si());
        assertEquals(2.1e-6, Amount.of(2.1, "uC/m^3").si());
        assertEquals(2.5e5, Amount.of(2.5, "kV/cm").si());
        assertEquals(2.5, Amount.of(2.5, "kV/cm").value("kV/cm"));
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource({"uC/q, no unit 'q'", "mT3, unexpected '3'", "'C/(m', closing bracket", "m^x, whole number", "m/, ends too early", "Ohn, closest: 'Ohm'"})
    void wrongUnitsNamePartAndRemedy(String text, String part) {
        AuthorException e = assertThrows(AuthorException.class, () -> Units.parse(text));
        assertTrue(e.getMessage().contains(part) && e.getMessage().contains("Write units like"), e.getMessage());
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource({"V/m, V/m", "N/C, V/m", "J/C, V", "C*V, J", "V*m^2*F/m^3, C/m", "kg*m^2, m^2*kg", "s^3, s^3", "m/s, m/s", "1/s^2, 1/s^2"})
    void preferredTexts(String text, String preferred) {
        assertEquals(preferred, Units.preferred(Units.parse(text).dimension()));
    }

    @Test
    void dimensionsWithRoots() {
        Dimensions root = (Dimensions) Units.LENGTH.root(2);
        assertEquals("m^(1/2)", Units.preferred(root));
        assertEquals(Units.LENGTH, root.multiply(root));
        assertEquals("a length (m)", Units.describe(Units.LENGTH));
    }
}

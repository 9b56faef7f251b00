package fieldwright.draw;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class FiguresTest {
    private static final String NBSP = "\u00a0";

    @ParameterizedTest(name = "{0} {3}, tolerance {1}, numerical {2}: {4}")
    @CsvSource({
        "5.98511e-05, 1.7e-05, 3e-20, C,     59.9 µC",
        "276969,      8.0e4,   2e-5,  V/m,   277 kV/m",
        "1.8,         0.02,    1e-18, m,     1.800 m",
        "5.98511e-05, ,        3e-20, C,     59.8511 µC",
        "1.23456789,  ,        2e-3,  V,     1.235 V",
        "1.23456789,  ,        0.02,  V,     1.23 V",
        "-276969,     ,        0.5,   V/m,   −276.969 kV/m",
        "0.6,         ,        0,     '',    0.6",
        "12345,       3000,    1e-9,  '',    12300",
        "0.001,       17,      1e-9,  '',    0.0",
        "2.5e-10,     ,        1e-12, '',    2.50·10⁻¹⁰",
        "1e-12,       ,        1e-10, C,     0 pC",
        "0,           ,        1e-20, V/m,   0 V/m",
        "999.9999999999, ,     1e-6,  V/m,   1.00000 kV/m",
        "0.0021,      0.0005,  0,     C/m^2, 2.10 mC/m²",
        "2.1e-6,      ,        0,     C/m^3, 2.1 µC/m³",
        "5e-4,        ,        0,     m^2,   0.0005 m²",
        "12500,       ,        0,     kg,    12500 kg"})
    void value(double si, Double tolerance, Double numerical, String unit, String expected) {
        assertEquals(expected.replace(" ", NBSP), Figures.value(si, tolerance, numerical, Scale.fitting(si, unit)));
    }

    @Test
    void noDigitStandsThatTheNumericalErrorReaches() {
        // The estimate is 4 in the fourth decimal: 0.123 may stand, 0.12346 would claim what is not known.
        assertEquals("0.123", Figures.number(0.12345678, null, 4e-3, Scale.plain("")));
        assertEquals("0.1235", Figures.number(0.12345678, null, 4e-4, Scale.plain("")));
        assertFalse(Figures.number(0.12345678, 1e-5, 4e-2, Scale.plain("")).contains("0.123"));
    }

    @ParameterizedTest(name = "tolerance {0}, numerical {1}: {3}")
    @CsvSource({
        "1.7e-05, 3e-20, C,   ± 17 µC (k = 2) · num. 3·10⁻²⁰ C",
        "1.61e-05, 3e-8, C,   ± 17 µC (k = 2) · num. 0.03 µC",
        "1.7e-05, ,      C,   ± 17 µC (k = 2) · num. error not carried",
        ",        2.1e-20, C, num. 3·10⁻²⁰ C",
        ",        0,     C,   num. 0 µC"})
    void doubt(Double tolerance, Double numerical, String unit, String expected) {
        Scale micro = new Scale("µC", 1e-6);
        assertEquals(expected, Figures.doubt(tolerance, numerical, micro, unit).replace(NBSP, " "));
    }

    @Test
    void doubtsAreRoundedAwayFromZeroButNotByAFloatingPointCrumb() {
        assertEquals("0.3", Figures.roundedUp(0.1 + 0.2, 1));
        assertEquals("0.4", Figures.roundedUp(0.301, 1));
        assertEquals("2·10⁻⁵", Figures.roundedUp(1.2e-5, 1));
        assertEquals("10", Figures.roundedUp(9.7, 1));
    }

    @Test
    void numbersWithinASentence() {
        assertEquals("agree to 1.9·10⁻¹⁵ of 2 kC/m³, name a1e5 and 3e-2x stay", Figures.prose("agree to 1.9e-15 of 2 kC/m^3, name a1e5 and 3e-2x stay"));
        assertEquals("−4·10⁻³", Figures.written("-4e-3"));
        assertEquals("1.61·10⁶", Figures.written("1.61e+06"));
        assertEquals("1.80", Figures.written("1.80"));
    }

    @Test
    void unitsInPrint() {
        assertEquals("µC/m³", Scale.print("uC/m^3"));
        assertEquals("V·m", Scale.print("V*m"));
        assertEquals("m⁻¹", Scale.print("m^-1"));
        assertEquals("", Scale.print("1"));
        assertEquals("30°", Figures.withUnit("30", Scale.print("deg")));
        assertEquals("|E| / (kV/m)", new Scale("kV/m", 1e3).heading("|E|"));
        assertEquals("z / m", Scale.plain("m").heading("z"));
        assertEquals("k", Scale.plain("").heading("k"));
    }

    @Test
    void prefixesStandOnlyWhereTheyMayStand() {
        assertEquals(new Scale("kV/m", 1e3), Scale.fitting(277e3, "V/m"));
        assertEquals(new Scale("pC", 1e-12), Scale.fitting(3e-12, "C"));
        assertEquals(new Scale("km", 1e3), Scale.fitting(5e9, "m"));
        assertEquals(Scale.plain("m"), Scale.fitting(0.957, "m"));
        assertEquals(new Scale("mm", 1e-3), Scale.fitting(0.004, "m"));
        assertEquals(Scale.plain("m^2"), Scale.fitting(1e-9, "m^2"));
        assertEquals(Scale.plain("kV/m"), Scale.fitting(1e-9, "kV/m"));
        assertEquals(Scale.plain("kg"), Scale.fitting(1e-9, "kg"));
        assertEquals(Scale.plain("1/m"), Scale.fitting(1e9, "1/m"));
        assertEquals(Scale.plain("V/m"), Scale.fitting(0, "V/m"));
        assertEquals(Scale.plain("V/m"), Scale.fitting(Double.POSITIVE_INFINITY, "V/m"));
    }

    @Test
    void whatIsNotFiniteIsNamed() {
        assertEquals("∞", Figures.number(Double.POSITIVE_INFINITY, null, null, Scale.plain("")));
        assertEquals("no number", Figures.number(Double.NaN, null, null, Scale.plain("")));
    }
}

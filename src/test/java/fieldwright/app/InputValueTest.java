package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.sheet.Cell;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.Sheet;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class InputValueTest {
    private static String replaced(String line, String typed) throws Exception {
        Cell cell = Sheet.parse("fieldwright sheet 1\n\n:: input\n" + line + "\n").cells().get(0);
        return InputValue.replaced(cell, (InputEntry) cell.inputs().get(0), typed);
    }

    @ParameterizedTest(name = "{0}")
    @CsvSource(delimiter = ';', value = {
        "1.80 m ± 0.02 m;            1.80;   m;        ± 0.02 m",
        "2.1 uC/m^3 ± 25 %;          2.1;    uC/m^3;   ± 25 %",
        "0.6;                        0.6;    '';       ''",
        "-4e-3 m +/- 1 mm (k=2);     -4e-3;  m;        +/- 1 mm (k=2)",
        "30 (uC/m^2) ± 10 %;         30;     (uC/m^2); ± 10 %",
        "5 % ± 1 %;                  5;      %;        ± 1 %"})
    void parts(String definition, String number, String unit, String tolerance) {
        assertEquals(new InputValue(number, unit, tolerance), InputValue.of(definition).orElseThrow());
    }

    @ParameterizedTest
    @CsvSource(delimiter = ';', value = {"[1, 2, 3] m", "air", "1.2.3", "(1, 2) m"})
    void whatIsNotOneNumber(String definition) {
        assertTrue(InputValue.of(definition).isEmpty());
    }

    @Test
    void onlyTheNumberChanges() throws Exception {
        String line = "rho_0 = 2.1 uC/m^3 ± 25 %   |  charge density, 2.1 by the mill  | mill test 14  ";
        assertEquals(line.replaceFirst("2\\.1", "3.5e-1"), replaced(line, " 3.5e-1 "));
        String tight = "k=0.6|radial fall-off|judgement";
        assertEquals("k=0.75|radial fall-off|judgement", replaced(tight, "0.75"));
        assertEquals("z = -3 m", replaced("z = 4 m", "−3"), "a printed minus sign becomes the file's");
    }

    @Test
    void theSecondLineOfSeveralIsFound() throws Exception {
        Cell cell = Sheet.parse("fieldwright sheet 1\n\n:: input\na = 1 m\n\nb = 2 m | x\n:rec b = 2 m\nc = 3 m\n").cells().get(0);
        assertEquals("a = 1 m\n\nb = 7 m | x\nc = 3 m", InputValue.replaced(cell, (InputEntry) cell.inputs().get(1), "7"));
        assertEquals("a = 1 m\n\nb = 2 m | x\nc = 7 m", InputValue.replaced(cell, (InputEntry) cell.inputs().get(2), "7"));
    }

    @Test
    void whatIsNotANumberIsRefusedWithARemedy() throws Exception {
        assertTrue(assertThrows(IllegalArgumentException.class, () -> replaced("a = 1 m", "1,8")).getMessage().contains("1.8"));
        assertThrows(IllegalArgumentException.class, () -> replaced("a = 1 m", "tall"));
        assertThrows(IllegalArgumentException.class, () -> replaced("a = 1 m", ""));
        assertThrows(IllegalArgumentException.class, () -> replaced("a = [1, 2] m", "[1, 2] m | x"));
        assertEquals("a = [1, 2, 4] m | x", replaced("a = [1, 2] m | x", "[1, 2, 4] m"));
    }
}

package fieldwright.output;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class NumberTextTest {

    @ParameterizedTest
    @CsvSource({"0,0", "-0.0,-0", "1,1", "-1250.5,-1250.5", "5.98511e-5,5.98511e-5", "276969,276969", "0.1,0.1", "1e7,1e7", "9999999,9999999",
        "12345678.5,1.23456785e7", "0.001,0.001", "0.00099,9.9e-4", "0.30000000000000004,0.30000000000000004", "2e23,2e23",
        "1.7976931348623157e308,1.7976931348623157e308"})
    void exactIsShort(double value, String text) {
        assertEquals(text, NumberText.exact(value));
    }

    @Test
    void whatIsNotFiniteIsRefused() {
        assertThrows(IllegalArgumentException.class, () -> NumberText.exact(Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> NumberText.exact(Double.NEGATIVE_INFINITY));
    }
}

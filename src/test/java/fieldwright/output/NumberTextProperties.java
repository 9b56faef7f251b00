package fieldwright.output;

import static org.junit.jupiter.api.Assertions.assertEquals;

import net.jqwik.api.ForAll;
import net.jqwik.api.Property;

class NumberTextProperties {

    @Property(tries = 3000, seed = "99")
    void exactReadsBack(@ForAll long bits) {
        double value = Double.longBitsToDouble(bits);
        if (Double.isFinite(value)) {
            assertEquals(value, Double.parseDouble(NumberText.exact(value)));
        }
    }
}

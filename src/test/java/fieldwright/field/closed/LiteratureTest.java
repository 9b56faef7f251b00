package fieldwright.field.closed;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Constants and single values known from outside; each row names its source. */
class LiteratureTest {
    @Test
    void potentialOfUnitCube() {
        Box cube = Box.uniform(0, 1, 0, 1, 0, 1, 1);
        // centre: 3 ln(2 + sqrt 3) - pi/2 = 2.380077…; Hummer 1996, and B_3(-1) of Bailey, Borwein and Crandall 2007 (from memory)
        double centre = 3 * Math.log(2 + Math.sqrt(3)) - Math.PI / 2;
        assertEquals(2.3800773, centre, 1e-6);
        assertEquals(centre, cube.at(0.5, 0.5, 0.5).v(), 1e-14);
        // at a corner half of it, by eight cubes about one point and scaling
        assertEquals(centre / 2, cube.at(0, 0, 0).v(), 1e-14);
        assertEquals(centre / 2, cube.at(1, 0, 1).v(), 1e-14);
    }

    @Test
    void potentialOfUnitSquare() {
        Polygon square = Polygon.rectangle(0, 1, 0, 1, 1, 0, 0);
        // centre: 4 ln(1 + sqrt 2) = 3.525494…; B_2(-1) of Bailey, Borwein and Crandall 2007 (from memory)
        double centre = 4 * Math.log(1 + Math.sqrt(2));
        assertEquals(3.5254943, centre, 1e-6);
        assertEquals(centre, square.at(0.5, 0.5, 0).v(), 1e-14);
        assertEquals(centre / 2, square.at(1, 0, 0).v(), 1e-14);
    }

    @ParameterizedTest(name = "disc at {0}, {1}: {4}")
    @CsvSource({
        "0,    0, 6.283185307179586, 1e-14, 2 pi radius at the centre (elementary)",
        "1,    0, 4,                 1e-14, 4 radius on the rim (Durand 1964; from memory)",
        "0, 0.75, 3.141592653589793, 1e-14, on the axis 2 pi (sqrt(z² + a²) - z) = 2 pi (1.25 - 0.75)",
        "0.5,  0, 5.869848,          2e-6,  4 a E(m = 1/4); E = 1.467462 (Abramowitz-Stegun table 17.1: E(0.25) = 1.46746 22093)"})
    void potentialOfDisc(double x, double z, double expected, double tolerance, String source) {
        assertEquals(expected, new Disc(1, 1).at(x, 0, z).v(), tolerance, source);
    }

    @ParameterizedTest(name = "K({0}): {3}")
    @CsvSource({
        "0.5,   1.8540746773014, 1e-13, Carlson 1995 test value R_F(0; 1/2; 1)",
        "0.5,   1.8540746773013719, 4e-16, Abramowitz-Stegun table 17.1 (K(0.5) = 1.85407 46773 01372)",
        "0,     1.5707963267948966, 4e-16, pi/2"})
    void firstKind(double m, double expected, double tolerance, String source) {
        assertEquals(expected, CompleteIntegral.first(Math.sqrt(1 - m)), tolerance, source);
    }

    @Test
    void fieldOnAxisOfRingIsLargestAtRadiusOverRootTwo() {
        // E = 2 pi z/(1 + z²)^1.5, largest at z = 1/sqrt 2 with 4 pi/(3 sqrt 3) (elementary)
        assertEquals(4 * Math.PI / (3 * Math.sqrt(3)), new Ring(1, 1).at(0, 0, Math.sqrt(0.5)).ez(), 1e-14);
    }
}

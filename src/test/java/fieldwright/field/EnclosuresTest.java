package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Grounded enclosures against series of other kinds; each row of the table names its generator. */
class EnclosuresTest {
    private static final double K = 1 / (4 * Math.PI * Constants.EPS0);

    static List<String> rows() throws IOException {
        try (InputStream in = EnclosuresTest.class.getResourceAsStream("enclosures.csv")) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().filter(line -> !line.startsWith("#")).toList();
        }
    }

    private static double[] numbers(String text) {
        return Arrays.stream(text.strip().split(" +")).mapToDouble(Double::parseDouble).toArray();
    }

    private static Surroundings surroundings(String text) {
        String[] words = text.split(" ");
        double[] size = numbers(text.substring(text.indexOf(' ')));
        return switch (words[0]) {
            case "pair" -> new Surroundings.GroundedPair("z", 0, size[0]);
            case "box" -> new Surroundings.GroundedBox(0, size[0], 0, size[1], 0, size[2]);
            case "tube" -> new Surroundings.GroundedTube("z", 0, 0, 0, size[0]);
            case "drum" -> new Surroundings.GroundedDrum("z", 0, 0, 0, size[0], 0, size[1]);
            default -> throw new IllegalArgumentException(text);
        };
    }

    @ParameterizedTest
    @MethodSource("rows")
    void pointCharge(String row) {
        String[] f = row.split(",");
        double[] at = numbers(f[1]);
        double[] p = numbers(f[2]);
        Source source = new PointCharge(new Place(at[0], at[1], at[2]), Amount.si(1 / K, 0, Units.CHARGE), surroundings(f[0]));
        FieldSolver solver = FieldSolver.of(source, Accuracy.DEFAULT);
        Place place = new Place(p[0], p[1], p[2]);
        double v = Double.parseDouble(f[3]);
        Amount found = solver.potential(place);
        Vector e = solver.electricField(place);
        double[] expected = {Double.parseDouble(f[4]), Double.parseDouble(f[5]), Double.parseDouble(f[6])};
        double size = Math.sqrt(expected[0] * expected[0] + expected[1] * expected[1] + expected[2] * expected[2]);
        Amount[] c = {e.x(), e.y(), e.z()};
        for (int k = 0; k < 3; k++) {
        }
        near(v, found, Math.abs(v));
        for (int k = 0; k < 3; k++) {
            near(expected[k], c[k], size);
        }
    }

    private static void near(double expected, Amount found, double size) {
        assertTrue(found.isConverged(), () -> "not converged: " + found.standing());
        assertEquals(expected, found.si(), 1e-9 * size);
        assertEquals(expected, found.si(), found.error() + 1e-15 * size);
    }
}

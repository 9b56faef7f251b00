package fieldwright.formula;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.formula.special.Bessel;
import fieldwright.formula.special.Carlson;
import fieldwright.formula.special.CompleteElliptic;
import java.io.IOException;
import java.io.InputStream;
import java.math.BigDecimal;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvFileSource;
import org.junit.jupiter.params.provider.CsvSource;

class SpecialFunctionTest {
    /** The accuracy each function claims, which error propagation counts on, holds on all rows. */
    @Test
    void claimedAccuracyHolds() throws IOException {
        Map<String, Double> worst = new TreeMap<>();
        int rows = 0;
        for (String line : lines("special-mpmath.csv")) {
            String[] column = line.split(",");
            double[] arguments = numbers(column[1]);
            Function f = Function.of(column[0], arguments.length);
            BigDecimal expected = new BigDecimal(column[2]);
            double value = f.value(arguments);
            double reference = expected.doubleValue();
            if (Double.isInfinite(reference) || Math.abs(reference) < 1e-300) {
                assertEquals(reference, value, 1e-300, line);
                continue;
            }
            double miss = new BigDecimal(value).subtract(expected).abs().doubleValue();
            double allowed = f.ulps() * Math.ulp(reference) + f.absoluteAccuracy(arguments);
            worst.merge(f.name(), miss / allowed, Math::max);
            assertTrue(miss <= allowed, line + ": " + value + " misses by " + miss + ", claimed " + allowed);
            rows++;
        }
        System.out.println("special functions, worst error as a part of the claimed one, " + rows + " values: " + worst);
        assertTrue(rows > 1700, "rows read: " + rows);
    }

    @ParameterizedTest(name = "{0}({1}): {4}")
    @CsvFileSource(resources = "/fieldwright/formula/special-printed.csv")
    void printedValues(String name, String arguments, double value, double tolerance, String source) {
        double[] a = numbers(arguments);
        assertEquals(value, Function.of(name, a.length).value(a), tolerance, source);
    }

    @ParameterizedTest(name = "{0}({1})")
    @CsvSource({
        "RF, 1 2 0,       1.3110287771461,  5e-14", "RF, 0.5 1 0,     1.8540746773014,  5e-14", "RF, 2 3 4,       0.58408284167715, 5e-15",
        "RC, 0 0.25,      3.1415926535898,  5e-14", "RC, 2.25 2,      0.69314718055995, 5e-15",
        "RJ, 0 1 2 3,     0.77688623778582, 5e-15", "RJ, 2 3 4 5,     0.14297579667157, 5e-15",
        "RD, 0 2 1,       1.7972103521034,  5e-14", "RD, 2 3 4,       0.16510527294261, 5e-15"})
    void carlson1995(String name, String arguments, double value, double tolerance) {
        double[] a = numbers(arguments);
        double found = switch (name) {
            case "RF" -> Carlson.rf(a[0], a[1], a[2]);
            case "RC" -> Carlson.rc(a[0], a[1]);
            case "RD" -> Carlson.rd(a[0], a[1], a[2]);
            default -> Carlson.rj(a[0], a[1], a[2], a[3]);
        };
        assertEquals(value, found, tolerance, "Carlson, Numerical Algorithms 10 (1995) 13-26, section 3 (quoted from memory)");
    }

    @Test
    void outsideTheDomain() {
        for (double x : new double[] {Double.NaN, -1, -0.5}) {
            assertTrue(Double.isNaN(Bessel.y(0, x)) && Double.isNaN(Bessel.k(1, x)), "x = " + x);
            assertTrue(Double.isNaN(Carlson.rf(x, 1, 1)) && Double.isNaN(Carlson.rd(1, 1, x)), "x = " + x);
        }
        assertEquals(Double.NEGATIVE_INFINITY, Bessel.y(3, 0));
        assertEquals(Double.POSITIVE_INFINITY, Bessel.k(2, 0));
        assertEquals(0, Bessel.j(4, 0));
        assertEquals(1, Bessel.j(0, -0.0));
        assertEquals(Double.POSITIVE_INFINITY, CompleteElliptic.firstKindOfParameter(1));
        assertTrue(Double.isNaN(CompleteElliptic.firstKindOfParameter(1.5)));
        assertTrue(Double.isNaN(CompleteElliptic.thirdKindOfParameter(1.5, 0.5)));
        assertTrue(Double.isNaN(Function.LEGENDRE_P.value(1.5, 0.2)), "an order that is not whole");
        assertTrue(Double.isNaN(Function.GAMMA.value(-2)));
        assertEquals(Bessel.j(3, 2.5), -Bessel.j(3, -2.5));
        assertEquals(Bessel.i(2, 2.5), Bessel.i(2, -2.5));
        assertEquals(0, Bessel.k(0, 1e5));
        assertEquals(Double.POSITIVE_INFINITY, Bessel.i(0, 1e5));
    }

    @Test
    void complementKeepsDigitsNearOne() {
        // K = ln(4/k') + (ln(4/k') - 1) k'^2/4 + ..., DLMF 19.12.1
        double complement = 1e-20;
        double k = Math.sqrt(complement);
        assertEquals(Math.log(4 / k), CompleteElliptic.firstKindOfComplement(complement), 1e-14);
        assertEquals(1, CompleteElliptic.secondKindOfComplement(complement), 1e-15);
    }

    static List<String> lines(String file) throws IOException {
        try (InputStream in = SpecialFunctionTest.class.getResourceAsStream(file)) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().filter(l -> !l.startsWith("#")).toList();
        }
    }

    private static double[] numbers(String blankSeparated) {
        return Stream.of(blankSeparated.strip().split(" ")).mapToDouble(Double::parseDouble).toArray();
    }
}

package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Closed forms from handbooks; each row of the table names its formula and source, the file its generator. */
class HandbookTest {
    private static final double RELATIVE = 1e-8;

    private record Row(String group, String kind, String region, String density, String around, String place, String ask,
                       double expected, String unit, double scale, String formula, String source) {
        @Override
        public String toString() {
            return group + ", " + ask + " " + place + ": " + formula + " (" + source + ")";
        }
    }

    static List<Row> rows() throws IOException {
        try (InputStream in = HandbookTest.class.getResourceAsStream("handbook.csv")) {
            return new String(in.readAllBytes(), StandardCharsets.UTF_8).lines().filter(line -> !line.startsWith("#")).skip(1)
                    .map(HandbookTest::row).toList();
        }
    }

    private static Row row(String line) {
        String[] f = Arrays.stream(line.split(" \\| ", -1)).map(String::strip).toArray(String[]::new);
        assertEquals(12, f.length, line);
        double expected = Double.parseDouble(f[7]);
        double scale = f[9].isEmpty() ? Math.abs(expected) : Double.parseDouble(f[9]);
        return new Row(f[0], f[1], f[2], f[3], f[4], f[5], f[6], expected, f[8], scale, f[10], f[11]);
    }

    @Test
    void permittivityOfVacuumIsThatOfCodata2022() {
        assertEquals(8.8541878188e-12, Constants.EPS0, 0, "CODATA 2022 recommended value, all printed digits");
    }

    @Test
    void thereAreEnoughOfThemAndEachHasItsSource() throws IOException {
        List<Row> rows = rows();
        assertTrue(rows.size() >= 120, rows.size() + " rows");
        assertTrue(rows.stream().noneMatch(r -> r.source().isBlank() || r.formula().isBlank()));
        Set<String> groups = rows.stream().map(Row::group).collect(Collectors.toSet());
        assertTrue(groups.containsAll(List.of("point", "rod", "ring", "disc", "rectangle", "ball", "shell", "cylinder", "tube", "cube",
                "endless line", "endless plane")), groups.toString());
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("rows")
    void isReproducedWithinItsStatedError(Row row) {
        Amount found = ask(source(row), row);
        double miss = Math.abs(found.value(row.unit()) - row.expected());
        String text = row + String.format(Locale.ROOT, "%nfound %.17g, expected %.17g, off by %.2g, states %.2g",
                found.si(), row.expected(), miss, found.error());
        assertTrue(found.isConverged(), () -> text + "\n" + found.standing().reason());
        assertTrue(miss <= RELATIVE * row.scale(), text);
        double printed = 2 * Math.ulp(row.expected());    // the expected value is itself rounded to a double
        assertTrue(miss <= found.error() + printed, text);
    }

    private static Source source(Row row) {
        Formula density = Formula.parseValue(row.density()).bind(Scope.EMPTY);
        String[] words = row.around().split(" ");
        Surroundings around = switch (words[0]) {
            case "free" -> Surroundings.FREE_SPACE;
            case "medium" -> new Surroundings.Medium(Double.parseDouble(words[1]));
            case "above" -> new Surroundings.GroundPlane("z", 0, 1);
            default -> throw new IllegalArgumentException(row.around());
        };
        if (row.kind().equals("point")) {
            double[] p = numbers(row.region());
            return new PointCharge(new Place(p[0], p[1], p[2]), density.amount(), around);
        }
        Region region = region(row.region());
        assertEquals(List.of("point", "line", "surface", "volume").indexOf(row.kind()), region.dimension(), row.region());
        return new Charge(region, density, around);
    }

    /** {@code cylindrical rho=0..0.2 m phi=0..2*pi z=0}, {@code parametric x y z over s=0..1 t=0..2*pi}. */
    private static Region region(String text) {
        String[] parts = text.split(" (?=[a-z]+=)| over ");
        if (text.startsWith("parametric")) {
            String[] position = parts[0].split(" ");
            Set<String> free = Arrays.stream(parts).skip(1).map(p -> p.split("=")[0]).collect(Collectors.toSet());
            ParametricRegion region = ParametricRegion.of(bound(position[1], free), bound(position[2], free), bound(position[3], free));
            for (String part : Arrays.asList(parts).subList(1, parts.length)) {
                String[] limits = part.split("=")[1].split("\\.\\.");
                region = region.over(part.split("=")[0], bound(limits[0], free), bound(limits[1], free));
            }
            return region;
        }
        CoordinateRegion region = CoordinateRegion.in(CoordinateSystem.valueOf(parts[0].toUpperCase(Locale.ROOT)));
        for (String part : Arrays.asList(parts).subList(1, parts.length)) {
            String name = part.split("=")[0];
            String[] limits = part.split("=")[1].split("\\.\\.");
            region = limits.length == 1 ? region.fixed(name, bound(limits[0], Set.of()))
                    : region.limits(name, bound(limits[0], Set.of()), bound(limits[1], Set.of()));
        }
        return region;
    }

    private static Formula bound(String text, Set<String> free) {
        return Formula.parseValue(text).bind(Scope.EMPTY, free);
    }

    private static Amount ask(Source source, Row row) {
        FieldSolver solver = FieldSolver.of(source, Accuracy.DEFAULT);
        if (row.ask().equals("Q")) {
            return solver.totalCharge();
        }
        double[] p = numbers(row.place());
        Place at = switch (row.place().substring(0, 3)) {
            case "at " -> new Place(p[0], p[1], p[2]);
            case "cyl" -> Place.cylindrical(p[0], p[1], p[2]);
            default -> Place.spherical(p[0], p[1], p[2]);
        };
        if (row.ask().equals("V")) {
            return solver.potential(at);
        }
        boolean sided = row.ask().matches(".*[+-]");
        String component = row.ask().substring(1).replaceAll("[+-]", "");
        Vector vector = row.ask().startsWith("D") ? solver.fluxDensity(at) : solver.electricField(at);
        assertEquals(sided, vector.isSided(), row + ": one-sided pair");
        Vector side = sided ? vector.onSide(row.ask().charAt(row.ask().length() - 1) + component) : vector;
        return switch (component) {
            case "x" -> side.x();
            case "y" -> side.y();
            case "z" -> side.z();
            case "rho" -> side.rho();
            case "r" -> side.r();
            case "theta" -> side.theta();
            default -> throw new IllegalArgumentException(row.ask());
        };
    }

    private static double[] numbers(String text) {
        return Arrays.stream(text.split(" ")).skip(1).mapToDouble(Double::parseDouble).toArray();
    }
}

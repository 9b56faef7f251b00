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
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Values from outside: closed forms and constants of the literature, far, near, on and inside, on edges, in several descriptions of one body.
 * Each row of the table names its formula and source, the file its generator. Panels answer all of them, closed forms where there are any.
 */
class HandbookTest {
    private record Row(String group, String kind, String region, String density, String around, String place, String ask,
                       double expected, String unit, double scale, String formula, String source, double gap) {
        /** 1e-9, or what the rounding of the place leaves: 8 eps size/gap. */
        double allowed() {
            return Math.max(1e-9, 8 * Math.ulp(1.0) / gap) * scale;
        }

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
        assertTrue(f.length == 12 || f.length == 13, line);
        double expected = Double.parseDouble(f[7]);
        double scale = f[9].isEmpty() ? Math.abs(expected) : Double.parseDouble(f[9]);
        return new Row(f[0], f[1], f[2], f[3], f[4], f[5], f[6], expected, f[8], scale, f[10], f[11], f.length == 13 ? Double.parseDouble(f[12]) : 1);
    }

    @Test
    void permittivityOfVacuumIsThatOfCodata2022() {
        assertEquals(8.8541878188e-12, Constants.EPS0, 0, "CODATA 2022 recommended value, all printed digits");
    }

    @Test
    void thereAreEnoughOfThemAndEachHasItsSource() throws IOException {
        List<Row> rows = rows();
        assertTrue(rows.size() >= 340, rows.size() + " rows");
        assertTrue(rows.stream().noneMatch(r -> r.source().isBlank() || r.formula().isBlank()));
        assertTrue(rows.stream().filter(HandbookTest::hasClosedForms).count() >= 200, "rows that closed forms answer too");
        Set<String> groups = rows.stream().map(Row::group).collect(Collectors.toSet());
        assertTrue(groups.containsAll(List.of("point", "rod", "ring", "disc", "rectangle", "ball", "shell", "cylinder", "tube", "cube",
                "endless line", "endless plane", "box", "ellipsoid", "strip", "annulus", "hollow cylinder", "thick shell")), groups.toString());
    }

    static List<Arguments> questions() throws IOException {
        return rows().stream().flatMap(r -> (hasClosedForms(r) ? Stream.of(ClosedForms.OFF, ClosedForms.AUTO) : Stream.of(ClosedForms.OFF))
            .map(c -> Arguments.of(r, c))).toList();
    }

    private static boolean hasClosedForms(Row row) {
        try {
            FieldSolver.of(source(row), Accuracy.DEFAULT.with(ClosedForms.ONLY));
            return true;
        } catch (AuthorException none) {
            return false;
        }
    }

    @ParameterizedTest(name = "{0}, closed forms {1}")
    @MethodSource("questions")
    void isReproducedWithinItsStatedError(Row row, ClosedForms forms) {
        FieldSolver solver = FieldSolver.of(source(row), Accuracy.DEFAULT.with(forms));
        if (row.ask().startsWith("unbounded")) {
            isUnbounded(row, solver);
            return;
        }
        Amount found = ask(solver, row);
        double miss = Math.abs(found.value(row.unit()) - row.expected());
        String text = row + String.format(Locale.ROOT, "%nfound %.17g, expected %.17g, off by %.2g, states %.2g",
                found.si(), row.expected(), miss, found.error());
        assertTrue(found.isConverged(), () -> text + "\n" + found.standing().reason());
        assertTrue(miss <= row.allowed(), text);
        double printed = 2 * Math.ulp(row.expected());    // the expected value is itself rounded to a double
        assertTrue(miss <= found.error() + printed, text);
    }

    /** {@code unbounded}: without direction; {@code unbounded Ex}: that component grows to the sign expected. */
    private static void isUnbounded(Row row, FieldSolver solver) {
        Vector e = solver.electricField(place(row));
        assertEquals(Standing.Kind.UNBOUNDED, e.standing().kind(), row.toString());
        if (row.ask().equals("unbounded")) {
            assertTrue(Double.isNaN(e.x().si()) && Double.isNaN(e.y().si()) && Double.isNaN(e.z().si()), row + ": " + e.x().si());
        } else {
            assertEquals(row.expected() * Double.POSITIVE_INFINITY, component(e, row.ask().substring("unbounded E".length()), row).si(), row.toString());
        }
    }

    private static Source source(Row row) {
        Formula density = Formula.parseValue(row.density()).bind(Scope.EMPTY);
        String[] words = row.around().split(" ");
        Surroundings around = switch (words[0]) {
            case "free" -> Surroundings.FREE_SPACE;
            case "medium" -> new Surroundings.Medium(Double.parseDouble(words[1]));
            case "above" -> new Surroundings.GroundPlane("z", 0, 1);
            case "under" -> new Surroundings.GroundPlane("z", Double.parseDouble(words[1]), -1);
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

    /** {@code cylindrical rho=0..0.2 m phi=0..2*pi z=0}, {@code parametric x; y; z over s=0..1 t=0..2*pi}. */
    private static Region region(String text) {
        String[] parts = text.split(" (?=[a-z]+=)| over ");
        if (text.startsWith("parametric")) {
            String[] position = ("parametric; " + parts[0].substring("parametric ".length())).split("; ");
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

    private static Place place(Row row) {
        double[] p = numbers(row.place());
        return switch (row.place().substring(0, 3)) {
            case "at " -> new Place(p[0], p[1], p[2]);
            case "cyl" -> Place.cylindrical(p[0], p[1], p[2]);
            default -> Place.spherical(p[0], p[1], p[2]);
        };
    }

    private static Amount ask(FieldSolver solver, Row row) {
        if (row.ask().equals("Q")) {
            return solver.totalCharge();
        }
        if (row.ask().equals("V")) {
            return solver.potential(place(row));
        }
        String[] words = row.ask().split(" ");
        String asked = words[words.length - 1];
        Vector vector = asked.startsWith("D") ? solver.fluxDensity(place(row)) : solver.electricField(place(row));
        assertEquals(asked.matches(".*[+-]") || words.length > 1, vector.isSided(), row + ": one-sided pair");
        String component = asked.substring(1).replaceAll("[+-]", "");
        if (words.length > 1) {
            return component(words[0].equals("mean") ? vector.mean() : outward(vector, component), component, row);
        }
        // Ex+ in a flat surface: the side is that of the surface, not of the component
        Vector side = !vector.isSided() ? vector : runsAlong(vector, component) ? vector.plusSide() : vector.onSide(asked.charAt(asked.length() - 1) + component);
        return component(side, component, row);
    }

    private static boolean runsAlong(Vector pair, String component) {
        int axis = "xyz".indexOf(component);
        return component.length() == 1 && axis >= 0 && Math.abs(pair.normal()[axis]) < 1e-9;
    }

    /** The jump in the direction of the component, whichever way the pair's own normal points. */
    private static Vector outward(Vector pair, String component) {
        return pair.onSide("+" + component).minus(pair.onSide("-" + component));
    }

    private static Amount component(Vector side, String component, Row row) {
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

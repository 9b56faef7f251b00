package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Questions at the edge of sense: each has a clear answer or an error that says what is wrong, the same from closed forms and panels,
 * and never a number without warning.
 */
class DegenerateTest {
    private static final String EMPTY = "0";
    private static final String NONE = "not converged";
    private static final String UNBOUNDED = "unbounded";

    /** Expected: {@link #EMPTY}, {@link #NONE}, {@link #UNBOUNDED}, "any" for a converged number, or words of the error's message. */
    private record Row(String name, String region, String density, Surroundings around, double[] at, String field, String potential, String charge) {
        @Override
        public String toString() {
            return name;
        }
    }

    private static Row free(String name, String region, String density, double[] at, String field, String potential, String charge) {
        return new Row(name, region, density, Surroundings.FREE_SPACE, at, field, potential, charge);
    }

    private static double[] at(double x, double y, double z) {
        return new double[] {x, y, z};
    }

    private static final String TURN = " phi=0..2*pi";
    private static final String WHOLE = " theta=0..pi phi=0..2*pi";
    private static final String AWAY = "leave the range of numbers";
    private static final String ENDLESS = "endless charge";

    static List<Row> rows() {
        Surroundings plane = new Surroundings.GroundPlane("z", 0, 1);
        Surroundings sphere = new Surroundings.GroundedSphere(0, 0, 0, 1, true);
        Surroundings glass = new Surroundings.DielectricHalfSpace("z", 0, 1, 1, 3);
        return List.of(
            free("place at 1e300 m", "spherical r=0..1 m" + WHOLE, "1 (nC/m^3)", at(1e300, 0, 0), AWAY, AWAY, "any"),
            free("point from 1e300 m", "point", "1 nC", at(0, -1e300, 0), AWAY, AWAY, "any"),
            free("place at 1e85 m", "cylindrical rho=0..1 m" + TURN + " z=0", "1 (nC/m^2)", at(1e85, 1e84, 0), "any", "any", "any"),
            free("ball of 1e200 m", "spherical r=0..1e200 m" + WHOLE, "1 (nC/m^3)", at(1, 0, 0), AWAY, AWAY, AWAY),
            free("disc of 1e120 m", "cylindrical rho=0..1e120 m" + TURN + " z=0", "1 (nC/m^2)", at(0, 0, 1), AWAY, AWAY, AWAY),
            free("ball of 1e-200 m", "spherical r=0..1e-200 m" + WHOLE, "1 (nC/m^3)", at(0, 0, 1), AWAY, AWAY, AWAY),
            free("place on a point charge, nearly", "point", "1 nC", at(1e-200, 0, 0), UNBOUNDED, UNBOUNDED, "any"),
            free("ring of radius 0", "cylindrical rho=0" + TURN + " z=0", "1 (nC/m)", at(0, 0, 0), EMPTY, EMPTY, EMPTY),
            free("rod without length", "cartesian x=0 y=0 z=0..0", "1 (nC/m)", at(0, 0, 0), EMPTY, EMPTY, EMPTY),
            free("disc of radius 0", "cylindrical rho=0..0" + TURN + " z=0", "1 (nC/m^2)", at(1, 0, 0), EMPTY, EMPTY, EMPTY),
            free("box without thickness, in it", "cartesian x=0..0 y=0..1 m z=0..1 m", "1 (nC/m^3)", at(0, 0.3, 0.3), EMPTY, EMPTY, EMPTY),
            free("ball of radius 0", "spherical r=0..0" + WHOLE, "1 (nC/m^3)", at(0, 0, 0), EMPTY, EMPTY, EMPTY),
            free("shell of radius 0", "spherical r=0" + WHOLE, "1 (nC/m^2)", at(0, 0, 0), EMPTY, EMPTY, EMPTY),
            free("sector without angle, on it", "cylindrical rho=0..1 m phi=0..0 z=0", "1 (nC/m^2)", at(0.3, 0, 0), EMPTY, EMPTY, EMPTY),
            free("no charge, on a rod", "cartesian x=0 y=0 z=0..1 m", "0", at(0, 0, 0.5), EMPTY, EMPTY, EMPTY),
            free("no charge, on a disc", "cylindrical rho=0..1 m" + TURN + " z=0", "0", at(0.3, 0, 0), EMPTY, EMPTY, EMPTY),
            free("no charge, by a product", "cartesian x=0..1 m y=0..1 m z=0..1 m", "0*x*1 (nC/m^4)", at(0, 0, 0.5), EMPTY, EMPTY, EMPTY),
            free("no charge in an endless line, on it", "cartesian x=0 y=0 z=-inf..inf", "0", at(0, 0, 0.5), EMPTY, ENDLESS, ENDLESS),
            free("root of a negative", "cartesian x=-1 m..1 m y=0 z=0", "1 (nC/m)*sqrt(x/(1 m))", at(0, 0, 0.5), "is not a number at x = -", "is not a number at x = -", NONE),
            free("logarithm just below 0", "cartesian x=-1e-9 m..1 m y=0..1 m z=0", "1 (nC/m^2)*ln(x/(1 m))", at(0, 0, 2), "is not a number at x = -", "is not a number at x = -", NONE),
            free("constant that is no number", "spherical r=0..1 m" + WHOLE, "1 (nC/m^3)*sqrt(-1)", at(0, 0, 2), "not a finite number", "not a finite number", "not a finite number"),
            free("constant without bound", "cylindrical rho=0..1 m" + TURN + " z=0", "1 (nC/m^2)/0", at(0, 0, 2), "not a finite number", "not a finite number", "not a finite number"),
            free("density with a pole at an end", "cartesian x=0..1 m y=0 z=0", "1 nC/x", at(0, 0, 0.5), NONE, NONE, NONE),
            free("density with a pole within", "cartesian x=-1 m..2 m y=0 z=0", "1 nC/x", at(0, 0, 0.5), NONE, NONE, NONE),
            free("density with a pole that can be integrated", "spherical r=0..1 m" + WHOLE, "1 (nC/m^2)/r", at(0, 0, 2), "any", "any", "any"),
            free("endless line", "cartesian x=0 y=0 z=-inf..inf", "1 (nC/m)", at(0.3, 0, 2), "any", ENDLESS, ENDLESS),
            free("endless line, on it", "cartesian x=0 y=0 z=-inf..inf", "1 (nC/m)", at(0, 0, 2), UNBOUNDED, ENDLESS, ENDLESS),
            free("half a line", "cartesian x=0 y=0 z=0..inf", "1 (nC/m)", at(0.3, 0, 2), "any", ENDLESS, ENDLESS),
            free("plane by its radius", "cylindrical rho=0..inf" + TURN + " z=0", "1 (nC/m^2)", at(0.3, 0, 2), "any", ENDLESS, NONE),
            free("half a plane has no field", "cartesian x=0..inf y=-inf..inf z=0", "1 (nC/m^2)", at(0.3, 0, 2), "no value to find", ENDLESS, ENDLESS),
            free("all space has no field", "cartesian x=-inf..inf y=-inf..inf z=-inf..inf", "1 (nC/m^3)", at(0.3, 0, 2), "no value to find", ENDLESS, ENDLESS),
            free("line that falls off", "cartesian x=0 y=0 z=1 m..inf", "1 (nC*m)/z^2", at(0.3, 0, 2), "any", "any", "any"),
            free("line that falls off too slowly", "cartesian x=0 y=0 z=1 m..inf", "1 nC/z", at(0.3, 0, 2), "any", "any", "no value to find"),
            free("line that grows", "cartesian x=0 y=0 z=1 m..inf", "1 (nC/m^2)*z", at(0.3, 0, 2), "no value to find", ENDLESS, "no value to find"),
            new Row("film in the ground's face", "cylindrical rho=0..1 m" + TURN + " z=0", "1 (nC/m^2)", plane, at(0, 0, 1), "lies in the face", "lies in the face", "any"),
            new Row("ball through the ground", "spherical r=0..1 m" + WHOLE, "1 (nC/m^3)", plane, at(0, 0, 2), "is behind", "is behind", "any"),
            new Row("rod through the ground", "cartesian x=0 y=0 z=-1 m..1 m", "1 (nC/m)", plane, at(1, 0, 2), "is behind", "is behind", "any"),
            new Row("rod that stands on the ground, its foot", "cartesian x=0 y=0 z=0..1 m", "1 (nC/m)", plane, at(0, 0, 0), UNBOUNDED, EMPTY, "any"),
            new Row("cylinder on the ground, its face", "cylindrical rho=0..1 m" + TURN + " z=0..1 m", "1 (nC/m^3)", plane, at(0.3, 0, 0), "any", EMPTY, "any"),
            new Row("tube on the ground, its foot", "cylindrical rho=1 m" + TURN + " z=0..1 m", "1 (nC/m^2)", plane, at(1, 0, 0), UNBOUNDED, EMPTY, "any"),
            new Row("point on the ground", "point", "1 nC", plane, at(1, 0, 0), "on the face", "on the face", "any"),
            new Row("film on an earthed sphere", "spherical r=1 m" + WHOLE, "1 (nC/m^2)", sphere, at(0, 0, 2), "lies in the face", "lies in the face", "any"),
            new Row("ball within an earthed sphere", "spherical r=0..0.5 m" + WHOLE, "1 (nC/m^3)", sphere, at(0, 0, 2), "is behind", "is behind", "any"),
            new Row("rod on glass", "cartesian x=0..1 m y=0 z=0", "1 (nC/m)", glass, at(0, 0, 2), "lies in the face", "lies in the face", "any"));
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("rows")
    void answerIsClear(Row row) {
        for (ClosedForms forms : List.of(ClosedForms.OFF, ClosedForms.AUTO)) {
            Accuracy accuracy = new Accuracy(1e-9, 0, row.field().equals("any") ? 400_000 : 60_000, forms);
            Place place = new Place(row.at()[0], row.at()[1], row.at()[2]);
            String what = row.name() + ", closed forms " + forms + ": ";
            hears(what + "E", row.field(), () -> asAmount(FieldSolver.electricField(source(row), place, accuracy)));
            hears(what + "V", row.potential(), () -> FieldSolver.potential(source(row), place, accuracy));
            hears(what + "Q", row.charge(), () -> FieldSolver.totalCharge(source(row), accuracy));
        }
    }

    private static Amount asAmount(Vector v) {
        return v.isSided() ? v.plusSide().magnitude() : v.standing().kind() == Standing.Kind.UNBOUNDED ? v.x() : v.magnitude();
    }

    private static void hears(String what, String expected, java.util.function.Supplier<Amount> question) {
        if (!List.of(EMPTY, NONE, UNBOUNDED, "any", "no value to find").contains(expected)) {
            String message = assertThrows(AuthorException.class, question::get, what).getMessage();
            assertTrue(message.contains(expected), what + ": " + message);
            return;
        }
        Amount found = question.get();
        Standing standing = found.standing();
        String said = what + " " + found.si() + " ± " + found.error() + ", " + standing;
        switch (expected) {
            case EMPTY -> assertTrue(standing.isConverged() && found.si() == 0, said);
            case "any" -> assertTrue(standing.isConverged() && Math.abs(found.si()) > 0 && found.error() <= 1e-8 * Math.abs(found.si()), said);
            case UNBOUNDED -> assertEquals(Standing.Kind.UNBOUNDED, standing.kind(), said);
            default -> {
                assertEquals(Standing.Kind.NOT_CONVERGED, standing.kind(), said);
                assertTrue(expected.equals(NONE) ? !standing.reason().isBlank() : standing.reason().contains(expected), said);
            }
        }
    }

    private static Source source(Row row) {
        Formula density = formula(row.density());
        if (row.region().equals("point")) {
            return new PointCharge(new Place(0, 0, 0), density.amount(), row.around());
        }
        return new Charge(region(row.region()), density, row.around());
    }

    private static Formula formula(String text) {
        return Formula.parseValue(text).bind(Scope.EMPTY, Set.of("x", "y", "z", "rho", "phi", "r", "theta"));
    }

    private static Region region(String text) {
        String[] parts = text.split(" (?=[a-z]+=)");
        CoordinateRegion region = CoordinateRegion.in(CoordinateSystem.valueOf(parts[0].toUpperCase(Locale.ROOT)));
        for (String part : Arrays.asList(parts).subList(1, parts.length)) {
            String name = part.split("=")[0];
            String[] limits = part.split("=")[1].split("\\.\\.");
            region = limits.length == 1 ? region.fixed(name, formula(limits[0])) : region.limits(name, formula(limits[0]), formula(limits[1]));
        }
        return region;
    }
}

package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;
import java.util.List;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Bends and jumps slanted in two coordinates, against closed forms: a rectangle with one is two polygons of linear density, and a box with a
 * jump and one with the rest of it are a uniform box.
 */
class SlantedCutTest {
    private static final Accuracy CLOSED = Accuracy.DEFAULT.with(ClosedForms.ONLY);
    private static final List<Place> PLACES = List.of(new Place(2, 0.3, 0.4), new Place(0.01, 0.02, 1.2), new Place(0.2, 0.1, 1e-6), new Place(0.3, -0.2, 0),
        new Place(0.501, 0.1, 0.001), new Place(5000, 7000, -3000));

    private static Formula f(String text) {
        return Formula.parseValue(text).bind(Scope.EMPTY, Set.of("x", "y", "z"));
    }

    private static Source free(Region region, String density) {
        return new Charge(region, f(density), Surroundings.FREE_SPACE);
    }

    private static Region rectangle() {
        return Bodies.rectangle(f("1 m"), f("0.8 m"));
    }

    private static Region polygon(double... xy) {
        java.util.ArrayList<Place> corners = new java.util.ArrayList<>();
        for (int i = 0; i < xy.length; i += 2) {
            corners.add(new Place(xy[i], xy[i + 1], 0));
        }
        return Bodies.polygon(corners);
    }

    private static void agree(Source panels, Source closed, Place p) {
        FieldSolver solver = FieldSolver.of(panels, Accuracy.PANELS);
        Vector a = solver.electricField(p);
        Vector b = FieldSolver.electricField(closed, p, CLOSED);
        if (b.standing().kind() == Standing.Kind.UNBOUNDED) {   // on the jump itself
            assertEquals(Standing.Kind.UNBOUNDED, a.standing().kind(), p.toString());
            return;
        }
        assertTrue(a.standing().isConverged(), p + ": " + a.standing().reason());
        assertTrue(solver.evaluations() < 40_000, p + ": " + solver.evaluations() + " evaluations");
        assertEquals(b.isSided(), a.isSided(), p.toString());
        for (int side = -1; side <= 1; side += 2) {
            Vector u = a.onSide(0, 0, side);
            Vector v = b.onSide(0, 0, side);
            assertEquals(v.x().si(), u.x().si(), u.x().error() + v.x().error(), p + ", Ex");
            assertEquals(v.y().si(), u.y().si(), u.y().error() + v.y().error(), p + ", Ey");
            assertEquals(v.z().si(), u.z().si(), u.z().error() + v.z().error(), p + ", Ez");
        }
    }

    @Test
    void aBendInARectangleIsTwoPolygons() {
        Source closed = new Sources(List.of(Charge.of(polygon(-0.4, -0.4, 0.5, -0.4, 0.5, 0.4, 0.4, 0.4), f("(x - y)*1 (nC/m^3)")),
            Charge.of(polygon(-0.5, -0.4, -0.4, -0.4, 0.4, 0.4, -0.5, 0.4), f("(y - x)*1 (nC/m^3)")))).with(Surroundings.FREE_SPACE);
        for (Place p : PLACES) {
            agree(free(rectangle(), "abs(x - y)*1 (nC/m^3)"), closed, p);
        }
    }

    @Test
    void aJumpInARectangleIsAPolygon() {
        Source closed = free(polygon(0.5, -0.4, 0.5, 0.4, -0.3, 0.4), "2 (nC/m^2)");
        for (Place p : PLACES) {
            agree(free(rectangle(), "when(x + y > 0.1 m, 2 (nC/m^2), otherwise 0)"), closed, p);
        }
    }

    /** Lines of all slopes and places, some of which miss the rectangle. */
    @Test
    void chargeOnBothSidesIsWhatIsCutOff() {
        Random random = new Random(7);
        for (int i = 0; i < 20; i++) {
            double slope = Math.tan(3 * random.nextDouble() - 1.5);
            double start = 1.5 * random.nextGaussian();
            String line = "y - (" + slope + ")*x - (" + start + ")*1 m";
            Source one = free(rectangle(), "when(" + line + " > 0, 1 (nC/m^2), otherwise 0)");
            Source other = free(rectangle(), "when(" + line + " > 0, 0, otherwise 1 (nC/m^2))");
            Source whole = free(rectangle(), "1 (nC/m^2)");
            Place p = new Place(random.nextGaussian(), random.nextGaussian(), 0.3);
            agree(new Sources(List.of(one, other)), whole, p);
        }
    }

    @ParameterizedTest
    @CsvSource({"x + y > 0.1 m", "x - 2*z < 0.3 m", "3*z - y >= 0.05 m", "x > y"})
    void aBoxInTwoPartsIsABox(String condition) {
        CoordinateRegion box = CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", f("-0.5 m"), f("0.5 m")).limits("y", f("-0.4 m"), f("0.4 m"))
            .limits("z", f("-0.3 m"), f("0.4 m"));
        Source both = new Sources(List.of(Charge.of(box, f("when(" + condition + ", 1 (nC/m^3) + x*1 (nC/m^4), otherwise 0)")),
            Charge.of(box, f("when(" + condition + ", 0, otherwise 1 (nC/m^3) + x*1 (nC/m^4))")))).with(Surroundings.FREE_SPACE);
        for (Place p : PLACES) {
            agree(both, free(box, "1 (nC/m^3) + x*1 (nC/m^4)"), p);
        }
        agree(both, free(box, "1 (nC/m^3) + x*1 (nC/m^4)"), new Place(0.1, 0.12, 0.05));
    }
}

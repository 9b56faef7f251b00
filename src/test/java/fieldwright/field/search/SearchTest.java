package fieldwright.field.search;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.field.Accuracy;
import fieldwright.field.FieldSolver;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import java.util.List;
import org.junit.jupiter.api.Test;

/** Against closed forms of elementary electrostatics. */
class SearchTest {
    private static final double K = 1 / (4 * Math.PI * Constants.EPS0);

    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private static Source spread(Region region, double density) {
        return Charge.of(region, Formula.constant(Amount.si(density, 0, Charge.densityDimension(region.dimension()))))
            .with(Surroundings.FREE_SPACE);
    }

    private static FieldSolver solver(Source source) {
        return FieldSolver.of(source, Accuracy.DEFAULT);
    }

    private static PointCharge point(double x, double y, double z, double q) {
        return new PointCharge(new Place(x, y, z), Amount.si(q, 0, Units.CHARGE), null);
    }

    private static Source free(Source... parts) {
        return new Sources(List.of(parts)).with(Surroundings.FREE_SPACE);
    }

    private static Region box(double x0, double x1, double y0, double y1, double z0, double z1) {
        CoordinateRegion r = CoordinateRegion.in(CoordinateSystem.CARTESIAN);
        r = x0 == x1 ? r.fixed("x", m(x0)) : r.limits("x", m(x0), m(x1));
        r = y0 == y1 ? r.fixed("y", m(y0)) : r.limits("y", m(y0), m(y1));
        return z0 == z1 ? r.fixed("z", m(z0)) : r.limits("z", m(z0), m(z1));
    }

    private static void holds(double exact, Peak peak) {
        Amount found = peak.magnitude();
        assertTrue(found.isConverged(), () -> found.standing().reason());
        assertTrue(Math.abs(found.si() - exact) <= found.error(), "off " + (found.si() - exact) + ", stated " + found.error());
        assertTrue(found.error() <= 2 * Peak.WITHIN * exact, "stated " + found.error());
        assertTrue(peak.upTo() >= exact * (1 - 1e-12), "the upper bound is one");
    }

    // ---- peak

    @Test
    void onTheAxisOfARingThePeakStandsAtRootHalf() {
        Peak peak = Peak.over(box(0, 0, 0, 0, 0.01, 5), solver(spread(Bodies.ring(m(0.3)), 1e-9)), Peak.WITHIN);
        holds(2 * Math.PI * 0.3 * 1e-9 * K * 2 / (3 * Math.sqrt(3) * 0.09), peak);
        assertEquals(0.3 / Math.sqrt(2), peak.place().z(), 1e-5);
    }

    @Test
    void nearAPointChargeThePeakIsTheNearestPlace() {
        Source charge = free(point(1.5, 0.4, 0.3, 1e-9));
        Peak flat = Peak.over(box(0, 1, 0, 1, 0, 0), solver(charge), Peak.WITHIN);
        holds(1e-9 * K / (0.25 + 0.09), flat);
        assertEquals(1, flat.place().x(), 1e-12);
        assertEquals(0.4, flat.place().y(), 1e-3);
        Peak solid = Peak.over(box(0, 1, 0, 1, 0, 1), solver(charge), 1e-4);
        assertEquals(1e-9 * K / 0.25, solid.magnitude().si(), solid.magnitude().error());
        assertTrue(solid.magnitude().isConverged() && solid.magnitude().error() < 2e-4 * solid.magnitude().si());
    }

    @Test
    void insideAndAcrossABallThePeakIsItsSurface() {
        Peak peak = Peak.over(box(0.1, 3, 0, 0, 0, 0), solver(spread(Bodies.ball(m(1)), 1e-9)), Peak.WITHIN);
        holds(1e-9 / (3 * Constants.EPS0), peak);
        assertEquals(1, peak.place().x(), 1e-4);
    }

    @Test
    void onAChargedSurfaceTheLargerSideCounts() {
        Source film = new Charge(Bodies.disc(m(1)), Formula.constant(Amount.si(1e-9, 0, Units.SURFACE_DENSITY)),
            new Surroundings.Applied(Surroundings.FREE_SPACE, 0, 0, 10));
        Peak peak = Peak.over(box(0, 0, 0, 0, -0.5, 0.5), solver(film), Peak.WITHIN);
        holds(1e-9 / (2 * Constants.EPS0) + 10, peak);
    }

    @Test
    void aFieldWithoutBoundIsSaid() {
        FieldSolver disc = solver(spread(Bodies.disc(m(1)), 1e-9));
        Peak rim = Peak.over(box(0.437, 1.618, 0, 0, 0, 0), disc, Peak.WITHIN);
        assertEquals(Standing.Kind.UNBOUNDED, rim.magnitude().standing().kind());
        assertEquals(1, rim.place().x(), 1e-7);
        Peak at = Peak.over(box(0, 1, 0, 1, 0, 0), solver(free(point(0.123, 0.456, 0, 1e-9))), Peak.WITHIN);
        assertEquals(Standing.Kind.UNBOUNDED, at.magnitude().standing().kind());
        assertEquals(0.123, at.place().x(), 1e-7);
    }

    @Test
    void aRegionThatCannotBeSearchedIsNamed() {
        FieldSolver any = solver(free(point(0, 0, 0, 1e-9)));
        assertTrue(assertThrows(AuthorException.class, () -> Peak.over(box(1, 1, 1, 1, 1, 1), any, 1e-5)).getMessage().contains("electricField"));
    }

    // ---- decay

    @Test
    void linePointAndDipoleFallByOneTwoAndThree() {
        Formula infinite = Formula.constant(Amount.si(Double.POSITIVE_INFINITY, 0, Units.LENGTH));
        Formula minus = Formula.constant(Amount.si(Double.NEGATIVE_INFINITY, 0, Units.LENGTH));
        Region line = CoordinateRegion.in(CoordinateSystem.CARTESIAN).fixed("x", m(0)).fixed("y", m(0)).limits("z", minus, infinite);
        exponent(1, spread(line, 1e-9), 1e-9);
        exponent(2, free(point(0, 0, 0, 1e-9)), 1e-9);
        exponent(3, free(point(0, 0, 5e-5, 1e-9), point(0, 0, -5e-5, -1e-9)), 2e-8);
    }

    private static void exponent(double exact, Source source, double model) {
        FieldSolver solver = solver(source);
        Amount mean = DecayExponent.mean(solver, s -> new Place(s, 0, 0), 1, 10);
        assertEquals(exact, mean.si(), mean.error() + model);
        Amount local = DecayExponent.at(solver, s -> new Place(s, 0, 0), 3, 1, 10);
        assertEquals(exact, local.si(), local.error() + model);
        assertTrue(mean.error() < 1e-8 && local.error() < 1e-7, mean.error() + " " + local.error());
    }

    @Test
    void onTheAxisOfARingTheLocalExponentIsThatOfTheClosedForm() {
        FieldSolver ring = solver(spread(Bodies.ring(m(1)), 1e-9));
        for (double z : new double[] {0.2, 0.7, 2, 50}) {
            Amount found = DecayExponent.at(ring, s -> new Place(0, 0, s), z, 0.01, 100);
            double exact = -1 + 3 * z * z / (1 + z * z);    // E ~ z (1 + z²)^(−3/2)
            assertEquals(exact, found.si(), found.error());
            assertTrue(found.error() < 1e-6, "stated " + found.error());
        }
    }

    @Test
    void aPathThatHasNoLogarithmIsNamed() {
        FieldSolver any = solver(free(point(0, 0, 0, 1e-9)));
        assertTrue(assertThrows(AuthorException.class, () -> DecayExponent.mean(any, s -> new Place(s, 0, 0), 0, 1)).getMessage().contains("> 0"));
    }

    // ---- field lines

    @Test
    void dipoleLinesAreThoseOfTheTextbook() {
        FieldSolver dipole = solver(free(point(0, 0, 1e-4, 1e-9), point(0, 0, -1e-4, -1e-9)));
        FieldLine line = FieldLine.through(new Place(0.8, 0.6, 0), dipole, 5);
        assertEquals(FieldLine.End.CHARGE, line.tail());
        assertEquals(FieldLine.End.CHARGE, line.head());
        int far = 0;
        for (Place p : line.places()) {
            if (p.r() > 0.1) {
                far++;
                assertEquals(p.r(), Math.pow(Math.sin(p.theta()), 2), 1e-5, "r = C sin²θ at " + p);
                assertEquals(0.75, p.y() / p.x(), 1e-9, "it stays in its plane");
            }
        }
        assertTrue(far > 20);
        Place end = line.places().get(line.places().size() - 1);
        assertEquals(-1e-4, end.z(), 1e-5, "along the field, to the negative charge");
    }

    @Test
    void linesEndOnConductorsAndFarAway() {
        Source charge = new Sources(List.of(point(0, 0, 1, 1e-9))).with(new Surroundings.GroundPlane("z", 0, 1));
        FieldLine down = FieldLine.through(new Place(0.3, 0, 0.8), solver(charge), 50);
        assertEquals(FieldLine.End.CONDUCTOR, down.head());
        assertEquals(0, down.places().get(down.places().size() - 1).z(), 1e-5);
        assertEquals(FieldLine.End.CHARGE, down.tail());
        FieldLine out = FieldLine.through(new Place(1, 1, 0), solver(free(point(0, 0, 0, 1e-9))), 10);
        assertEquals(FieldLine.End.FAR, out.head());
        Place last = out.places().get(out.places().size() - 1);
        assertEquals(last.x(), last.y(), 1e-8);
    }

    @Test
    void aLineStartsOnBothSidesOfAFilmAndEndsAtAZero() {
        FieldLine through = FieldLine.through(new Place(0.1, 0, 0), solver(spread(Bodies.disc(m(1)), 1e-9)), 3);
        assertEquals(FieldLine.End.CHARGE, through.tail());
        assertEquals(FieldLine.End.FAR, through.head());
        FieldLine saddle = FieldLine.through(new Place(0.5, 0, 0), solver(free(point(0, 0, 0, 1e-9), point(2, 0, 0, 1e-9))), 5);
        assertEquals(FieldLine.End.NULL, saddle.head());
        assertEquals(1, saddle.places().get(saddle.places().size() - 1).x(), 1e-5);
    }

    // ---- contours

    private static Contours.Plane plane(FieldSolver solver) {
        return (u, v) -> solver.potential(new Place(u, v, 0)).si();
    }

    @Test
    void equipotentialsOfAPointChargeAreCircles() {
        Contours.Plane f = plane(solver(free(point(0.1, 0.2, 0, 1e-9))));
        List<Contours> all = Contours.of(f, -1, 1, -1, 1, 20, new double[] {1e-9 * K / 0.5, 1e-9 * K / 1.0, 1e-9 * K / 10});
        assertEquals(1, all.get(0).lines().size());
        assertTrue(all.get(0).lines().get(0).isClosed());
        assertFalse(all.get(1).lines().get(0).isClosed(), "it leaves the window");
        assertEquals(0, all.get(2).lines().size());
        for (int k = 0; k < 2; k++) {
            double radius = k == 0 ? 0.5 : 1;
            assertTrue(all.get(k).within() <= 1e-3, "stated " + all.get(k).within());
            for (Contours.Line line : all.get(k).lines()) {
                for (int i = 0; i < line.u().length; i++) {
                    assertEquals(radius, Math.hypot(line.u()[i] - 0.1, line.v()[i] - 0.2), 1e-7);
                    if (i > 0) {
                        double sagitta = radius - Math.hypot(0.5 * (line.u()[i] + line.u()[i - 1]) - 0.1, 0.5 * (line.v()[i] + line.v()[i - 1]) - 0.2);
                        assertTrue(sagitta <= all.get(k).within() + 1e-9, "between corners the line is within the tolerance stated");
                    }
                }
            }
        }
    }

    @Test
    void aSaddleIsPassedOnTheRightSideAndAChargeLeavesNoLine() {
        Contours.Plane f = plane(solver(free(point(-0.5, 0, 0, 1e-9), point(0.5, 0, 0, 1e-9))));
        double saddle = 2e-9 * K / 0.5;
        List<Contours> all = Contours.of(f, -1.5, 1.5, -1, 1, 30, new double[] {1.02 * saddle, 0.98 * saddle});
        assertEquals(2, all.get(0).lines().size(), "above the saddle one line about each charge");
        assertEquals(1, all.get(1).lines().size(), "below it one about both");
        double[] joined = all.get(0).joined(false);
        assertEquals(all.get(0).corners() + 1, joined.length);
    }
}

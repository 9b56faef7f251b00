package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/** Places where a general integrator fails: on, in and beside charge, without end, behind conductors. */
class FieldSolverTest {
    private static final double EPS0 = Constants.EPS0;

    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private static Formula plain(String text, String unit) {
        return Formula.plain(text, "m", unit, ReferenceCases.NOTHING);
    }

    private static Source free(Region region, String density) {
        String unit = new String[] {"C", "C/m", "C/m^2", "C/m^3"}[region.dimension()];
        return Charge.of(region, plain(density, unit)).with(Surroundings.FREE_SPACE);
    }

    private static Vector e(Source s, double x, double y, double z) {
        return FieldSolver.electricField(s, new Place(x, y, z), Accuracy.PANELS);
    }

    private static void near(double expected, Amount found, double relative) {
        assertTrue(found.isConverged(), () -> "not converged: " + found.standing());
        assertEquals(expected, found.si(), relative * Math.abs(expected));
        assertTrue(Math.abs(found.si() - expected) <= found.error() + 4e-16 * Math.abs(expected), () -> "stated " + found.error() + ", off "
            + (found.si() - expected));
    }

    private static CoordinateRegion cartesian() {
        return CoordinateRegion.in(CoordinateSystem.CARTESIAN);
    }

    private static CoordinateRegion cylindrical() {
        return CoordinateRegion.in(CoordinateSystem.CYLINDRICAL);
    }

    private static final Formula INF = Formula.parse("inf").bind(ReferenceCases.NOTHING);
    private static final Formula MINUS_INF = Formula.parse("-inf").bind(ReferenceCases.NOTHING);
    private static final Formula TURN = Formula.constant(2 * Math.PI);
    private static final Formula ZERO = Formula.constant(0);

    // ---- unbounded and sided

    @Test
    void onALineTheFieldIsUnbounded() {
        Vector v = e(free(Bodies.ring(m(1)), "1e-9"), 0, 1, 0);
        assertEquals(Standing.Kind.UNBOUNDED, v.standing().kind());
        Amount potential = FieldSolver.potential(free(Bodies.ring(m(1)), "1e-9"), new Place(1, 0, 0), Accuracy.PANELS);
        assertEquals(Standing.Kind.UNBOUNDED, potential.standing().kind());
    }

    @Test
    void onARimTheFieldIsUnboundedOutwards() {
        Vector v = e(free(Bodies.disc(m(1)), "1e-9"), 1, 0, 0);
        assertEquals(Standing.Kind.UNBOUNDED, v.standing().kind());
        assertEquals(Double.POSITIVE_INFINITY, v.x().si());
    }

    @Test
    void onARimWhereTheDensityVanishesTheFieldIsFinite() {
        // sum of the two one-sided limits by approach from outside, where the integral is regular
        Source s = free(Bodies.disc(m(1)), "1e-9*(1-rho^2)");
        Vector on = e(s, 1, 0, 0);
        Vector off = e(s, 1 + 1e-7, 0, 0);
        assertTrue(on.standing().isConverged(), on.standing()::reason);
        assertEquals(off.x().si(), (on.isSided() ? on.mean() : on).x().si(), 1e-5 * off.x().si());
    }

    @Test
    void onAPointChargeTheFieldIsUnbounded() {
        Source s = new PointCharge(new Place(1, 2, 3), Amount.of(1, "nC"), Surroundings.FREE_SPACE);
        assertEquals(Standing.Kind.UNBOUNDED, e(s, 1, 2, 3).standing().kind());
    }

    @Test
    void discCentreJumpsByDensityOverEps0() {
        Vector v = e(free(Bodies.disc(m(0.7)), "1e-9"), 0, 0, 0);
        assertTrue(v.isSided());
        near(1e-9 / (2 * EPS0), v.onSide("+z").z(), 1e-12);
        near(-1e-9 / (2 * EPS0), v.onSide("-z").z(), 1e-12);
        assertEquals(0, v.mean().x().si(), 1e-9);
    }

    /** Textbook: a shell's field jumps from 0 inside to Q/(4 pi eps0 a^2). Places at poles, seam and elsewhere. */
    @ParameterizedTest
    @CsvSource({"0, 0, 2", "0, 0, -2", "2, 0, 0", "-2, 0, 0", "0, 2, 0", "1.2, 0, 1.6", "0, -1.2, -1.6"})
    void shellFromBothSides(double x, double y, double z) {
        Vector v = e(free(Bodies.shell(m(2)), "1e-9"), x, y, z);
        assertTrue(v.isSided(), "one-sided pair");
        near(1e-9 / EPS0, v.onSide("+r").r(), 1e-9);
        assertEquals(0, v.onSide("-r").magnitude().si(), 1e-9 * 1e-9 / EPS0);
    }

    @Test
    void foldOfTwoSheetsIsUnbounded() {
        Source floor = free(cartesian().limits("x", m(0), m(1)).limits("y", m(-1), m(1)).fixed("z", m(0)), "1e-9");
        Source wall = free(cartesian().limits("z", m(0), m(1)).limits("y", m(-1), m(1)).fixed("x", m(0)), "1e-9");
        assertEquals(Standing.Kind.UNBOUNDED, e(new Sources(List.of(floor, wall)), 0, 0, 0).standing().kind());
    }

    // ---- near

    /** Disc on its axis, textbook: E = sigma/(2 eps0) (1 - z/sqrt(z^2 + a^2)); at every gap. */
    @ParameterizedTest
    @CsvSource({"1e-9", "1e-7", "1e-5", "1e-3", "0.1", "1", "10", "1e4", "1e8"})
    void discOnItsAxis(double z) {
        double expected = 1e-9 / (2 * EPS0) * (1 / (Math.sqrt(1 + z * z) * (Math.sqrt(1 + z * z) + z)));
        near(expected, e(free(Bodies.disc(m(1)), "1e-9"), 0, 0, z).z(), 1e-9);
    }

    /** Rod at its middle, textbook: E = lambda/(2 pi eps0 d) L/sqrt(L^2 + d^2) with half length L. */
    @ParameterizedTest
    @CsvSource({"1e-7", "1e-5", "1e-3", "0.1", "1", "10", "1e6"})
    void rodBesideItsMiddle(double d) {
        double expected = 1e-9 / (2 * Math.PI * EPS0 * d) / Math.sqrt(1 + d * d);
        double relative = Math.max(1e-9, 8 * 2.2e-16 / d);
        near(expected, e(free(cartesian().fixed("x", m(0)).fixed("y", m(0)).limits("z", m(-1), m(1)), "1e-9"), d, 0, 0).x(), relative);
    }

    // ---- volumes with densities that cannot be carried beyond the body

    /** Ball with density proportional to r, textbook: E = k r^2/(4 eps0) inside, k a^4/(4 eps0 r^2) outside. */
    @ParameterizedTest
    @CsvSource({"0.3", "0.9", "1.2", "3"})
    void ballWithDensityProportionalToR(double r) {
        Vector v = e(free(Bodies.ball(m(1)), "1e-6*r"), r * 0.6, 0, r * 0.8);
        double expected = 1e-6 / (4 * EPS0) * (r < 1 ? r * r : 1 / (r * r));
        near(expected, v.r(), 1e-9);
    }

    /** Cylinder sections of different density by when(): the same as two bodies. */
    @Test
    void jumpInTheDensity() {
        Source whole = free(Bodies.cylinder(m(1), m(1)), "when(z < 0.4, 1e-6, 3e-6)");
        Source low = free(Bodies.cylinder(m(1), m(0.4)), "1e-6");
        Source high = free(cylindrical().limits("rho", m(0), m(1)).limits("phi", ZERO, TURN).limits("z", m(0.4), m(1)), "3e-6");
        for (double[] p : new double[][] {{0.3, 0, 2}, {1.4, 0.2, 0.4}}) {
            near(e(new Sources(List.of(low, high)), p[0], p[1], p[2]).z().si(), e(whole, p[0], p[1], p[2]).z(), 3e-9);
        }
    }

    // ---- endless

    @Test
    void endlessLine() {
        Source s = free(cartesian().fixed("x", m(0)).fixed("y", m(0)).limits("z", MINUS_INF, INF), "2e-9");
        near(2e-9 / (2 * Math.PI * EPS0 * 0.5), e(s, 0.3, 0.4, 7).rho(), 1e-12);
        AuthorException x = assertThrows(AuthorException.class, () -> FieldSolver.potential(s, new Place(1, 0, 0), Accuracy.PANELS));
        assertTrue(x.getMessage().contains("zeroAt"), x.getMessage());
        Amount v = FieldSolver.of(s, Accuracy.PANELS).potential(new Place(0.5, 0, 0), new Place(0, 2, 1));
        near(2e-9 / (2 * Math.PI * EPS0) * Math.log(4), v, 1e-12);
        assertThrows(AuthorException.class, () -> FieldSolver.totalCharge(s, Accuracy.PANELS));
    }

    @Test
    void endlessPlaneFromBothSides() {
        Source s = free(cartesian().limits("x", MINUS_INF, INF).limits("y", MINUS_INF, INF).fixed("z", m(1)), "1e-9");
        near(1e-9 / (2 * EPS0), e(s, 5, 5, 3).z(), 1e-12);
        near(-1e-9 / (2 * EPS0), e(s, 5, 5, 0.5).z(), 1e-12);
        Vector on = e(s, 5, 5, 1);
        near(1e-9 / (2 * EPS0), on.onSide("+z").z(), 1e-12);
        Vector d = FieldSolver.fluxDensity(s, new Place(0, 0, 9), Accuracy.PANELS);
        near(0.5e-9, d.z(), 1e-12);
    }

    @Test
    void endlessCylinderInsideAndOutside() {
        Source s = free(cylindrical().limits("rho", m(0), m(2)).limits("phi", ZERO, TURN).limits("z", MINUS_INF, INF), "1e-6");
        near(1e-6 * 0.5 / (2 * EPS0), e(s, 0.3, 0.4, 0).rho(), 1e-9);
        near(1e-6 * 4 / (2 * EPS0 * 5), e(s, 3, 4, 0).rho(), 1e-9);
        Source shell = free(cylindrical().fixed("rho", m(2)).limits("phi", ZERO, TURN).limits("z", MINUS_INF, INF), "1e-9");
        Vector on = e(shell, 0, 2, 3);
        near(1e-9 / EPS0, on.onSide("+rho").rho(), 1e-9);
    }

    // ---- surroundings

    @Test
    void surroundingsMustBeStated() {
        Source s = Charge.of(Bodies.ring(m(1)), plain("1e-9", "C/m"));
        AuthorException x = assertThrows(AuthorException.class, () -> e(s, 0, 0, 1));
        assertTrue(x.getMessage().contains("inFreeSpace"), x.getMessage());
    }

    @Test
    void groundPlane() {
        Source s = new PointCharge(new Place(0, 0, 2), Amount.of(1, "nC"), new Surroundings.GroundPlane("z", 0, 1));
        Vector face = e(s, 0, 0, 0);
        assertTrue(face.isSided());
        near(-2e-9 / (4 * Math.PI * EPS0 * 4), face.onSide("+z").z(), 1e-12);
        assertEquals(0, face.onSide("-z").magnitude().si());
        assertEquals(0, e(s, 0.3, 0, -1).magnitude().si());
        assertEquals(0, FieldSolver.potential(s, new Place(1, 1, 0), Accuracy.PANELS).si());
        near(1e-9 / (4 * Math.PI * EPS0) * (1 - 1.0 / 3), FieldSolver.potential(s, new Place(0, 0, 1), Accuracy.PANELS), 1e-12);
    }

    @Test
    void chargeBehindTheConductorIsAnError() {
        Source s = Charge.of(Bodies.ball(m(1)), plain("1e-6", "C/m^3")).with(new Surroundings.GroundPlane("z", 0.5, 1));
        AuthorException x = assertThrows(AuthorException.class, () -> e(s, 0, 0, 3));
        assertTrue(x.getMessage().contains("behind"), x.getMessage());
        Source flat = Charge.of(Bodies.disc(m(1)), plain("1e-6", "C/m^2")).with(new Surroundings.GroundPlane("z", 0, 1));
        assertThrows(AuthorException.class, () -> e(flat, 0, 0, 3));
    }

    /** Cloud that reaches the plane: at the wall the field is twice the free-space one, straight into it. */
    @Test
    void cloudTouchingTheGroundPlane() {
        Region room = cylindrical().limits("rho", m(0), m(1.8)).limits("phi", ZERO, TURN).limits("z", m(0), m(4));
        Source cloud = Charge.of(room, plain("2.1e-6*(1-0.6*(rho/1.8)^2)", "C/m^3")).with(new Surroundings.GroundPlane("z", 4, -1));
        Source alone = cloud.with(Surroundings.FREE_SPACE);
        Vector roof = e(cloud, 0, 0, 4);
        near(2 * e(alone, 0, 0, 4).z().si(), roof.onSide("-z").z(), 2e-9);
        assertFalse(e(cloud, 0.2, 0.3, 3.9).isSided());
    }

    @Test
    void dielectricFaceKeepsTheNormalFluxDensity() {
        Source s = new PointCharge(new Place(0, 0, 1), Amount.of(1, "nC"), new Surroundings.DielectricHalfSpace("z", 0, 1, 1, 4));
        Vector d = FieldSolver.fluxDensity(s, new Place(0.3, 0, 0), Accuracy.PANELS);
        near(d.onSide("-z").z().si(), d.onSide("+z").z(), 1e-12);
        Vector e = e(s, 0.3, 0, 0);
        near(e.onSide("-z").x().si(), e.onSide("+z").x(), 1e-12);
    }

    @Test
    void chargeInsideAGroundedShell() {
        // at the centre of the sphere a charge off the centre by b: E = q/(4 pi eps0) (1/b^2 - b/a^3), by its image
        Source s = new PointCharge(new Place(0, 0, 0.5), Amount.of(1, "nC"), new Surroundings.GroundedSphere(0, 0, 0, 2, false));
        double expected = -1e-9 / (4 * Math.PI * EPS0) * (4 - 0.5 / 8);
        near(expected, e(s, 0, 0, 0).z(), 1e-8);
    }

    // ---- bad regions

    @Test
    void wrongUnitOfTheDensity() {
        Source s = Charge.of(Bodies.disc(m(1)), plain("1e-9", "C/m^3")).with(Surroundings.FREE_SPACE);
        AuthorException x = assertThrows(AuthorException.class, () -> e(s, 0, 0, 1));
        assertTrue(x.getMessage().contains("surface density"), x.getMessage());
    }

    @Test
    void densityThatIsNotANumber() {
        AuthorException x = assertThrows(AuthorException.class, () -> e(free(Bodies.disc(m(1)), "1e-9*sqrt(0.5-rho)"), 0, 0, 1));
        assertTrue(x.getMessage().contains("not a number"), x.getMessage());
    }

    /** ∫cos θ over a sphere vanishes: a total of zero, told from the charge of both signs that is there. */
    @Test
    void aTotalThatCancelsIsZeroAndConverged() {
        for (String density : List.of("1 (nC/m^2)*cos(theta)", "1 (nC/m^2)*cos(theta)*sin(phi)")) {
            Source shell = Charge.of(Bodies.shell(Formula.constant(Amount.of(0.7, "m"))), Formula.parse(density).bind(Scope.EMPTY));
            Amount total = FieldSolver.totalCharge(shell, Accuracy.DEFAULT);
            assertTrue(total.standing().isConverged(), total.standing()::toString);
            assertTrue(Math.abs(total.si()) <= total.error() && total.error() < 1e-20, total::toString);
        }
    }
}

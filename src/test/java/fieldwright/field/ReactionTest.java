package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Field and potential of induced charge alone, on the charge itself too. */
class ReactionTest {
    private static final double K = 1 / (4 * Math.PI * Constants.EPS0);
    private static final Surroundings PLANE = new Surroundings.GroundPlane("z", 0.1, 1);

    private static FieldSolver point(double x, double y, double z, Surroundings around) {
        return FieldSolver.of(new PointCharge(new Place(x, y, z), Amount.si(1e-9, 0, Units.CHARGE), around), Accuracy.PANELS);
    }

    private static void near(double expected, Amount found) {
        assertTrue(found.isConverged(), () -> "not converged: " + found.standing());
        assertEquals(expected, found.si(), found.error() + 4e-16 * Math.abs(expected));
        assertTrue(found.error() <= 1e-12 * Math.abs(expected), () -> "stated " + found.error());
    }

    /** Image laws at the charge: Jackson, Classical Electrodynamics, 3rd ed., eqs. 2.4 to 2.6 and 4.45 (from memory). */
    @Test
    void aPointChargeFeelsItsImages() {
        near(-1e-9 * K / 0.6, point(1, 2, 0.4, PLANE).reactionPotential(new Place(1, 2, 0.4)));
        near(-1e-9 * K / 0.36, point(1, 2, 0.4, PLANE).reactionField(new Place(1, 2, 0.4)).z());
        var oil = new Surroundings.DielectricHalfSpace("z", 0, 1, 1, 2.2);
        near(-1.2 / 3.2 * 1e-9 * K / 0.8, point(0, 0, 0.4, oil).reactionPotential(new Place(0, 0, 0.4)));
        var ball = new Surroundings.GroundedSphere(0, 0, 0, 0.5, true);
        near(-1e-9 * K * 0.5 / (0.64 - 0.25), point(0, 0.8, 0, ball).reactionPotential(new Place(0, 0.8, 0)));
        near(-1e-9 * K * 0.5 * 0.8 / (0.39 * 0.39), point(0, 0.8, 0, ball).reactionField(new Place(0, 0.8, 0)).y());
    }

    record Case(Source source, Place at) { }

    static List<Case> cases() {
        Formula half = Formula.constant(Amount.si(0.15, 0, Units.LENGTH));
        Formula density = Formula.plain("1e-9*(1 + x)", "m", "C/m^3", ReferenceCases.NOTHING);
        Source ball = Charge.of(Bodies.ball(half), density);
        var below = new Surroundings.GroundPlane("z", -0.2, 1);
        var glass = new Surroundings.DielectricHalfSpace("x", 0.2, -1, 1.5, 4);
        var shell = new Surroundings.GroundedSphere(0.1, 0, 0, 0.7, false);
        var sphere = new Surroundings.GroundedSphere(0, 0.6, 0, 0.3, true);
        Source even = Charge.of(Bodies.ball(half), Formula.plain("1e-9*(1 + z)", "m", "C/m^3", ReferenceCases.NOTHING));
        var drum = new Surroundings.GroundedDrum("z", 0, 0, 0, 0.2, -0.3, 0.2);
        var box = new Surroundings.GroundedBox(-0.2, 0.2, -0.16, 0.2, -0.2, 0.5);
        return List.of(new Case(even.with(drum), new Place(0.05, 0.1, 0.02)), new Case(even.with(drum), new Place(0.05, -0.15, 0.1)),
            new Case(ball.with(box), new Place(0.05, -0.12, 0.1)), new Case(ball.with(below), new Place(0.01, 0.02, 0.05)), new Case(ball.with(below), new Place(0, 0, -0.3)),
            new Case(ball.with(glass), new Place(0, 0.1, 0)), new Case(ball.with(glass), new Place(0.4, 0.1, 0)),
            new Case(ball.with(shell), new Place(0.1, 0, 0)), new Case(ball.with(shell), new Place(-0.1, 0.4, 0.1)),
            new Case(ball.with(sphere), new Place(0, 0, 0)), new Case(ball.with(sphere), new Place(0.1, 0.6, 0)),
            new Case(ball.with(new Surroundings.Medium(3)), new Place(0.1, 0.6, 0)));
    }

    /** Own field in the charge's medium and reaction make the whole. */
    @ParameterizedTest
    @MethodSource("cases")
    void ownFieldAndReactionMakeTheWhole(Case c) {
        FieldSolver whole = FieldSolver.of(c.source, Accuracy.PANELS);
        Source alone = c.source.with(new Surroundings.Medium(c.source.around().permittivity()));
        Vector own = FieldSolver.electricField(alone, c.at, Accuracy.PANELS);
        Vector reaction = whole.reactionField(c.at);
        Vector e = whole.electricField(c.at);
        double size = own.magnitude().si();
        assertEquals(e.x().si(), own.x().si() + reaction.x().si(), 3e-9 * size);
        assertEquals(e.y().si(), own.y().si() + reaction.y().si(), 3e-9 * size);
        assertEquals(e.z().si(), own.z().si() + reaction.z().si(), 3e-9 * size);
        Amount v = FieldSolver.potential(alone, c.at, Accuracy.PANELS);
        assertEquals(whole.potential(c.at).si(), v.si() + whole.reactionPotential(c.at).si(), 3e-9 * v.si());
    }

    /** On a conductor the inner side sees the induced charge undo the source's field. */
    @Test
    void withinAConductorTheReactionUndoesTheField() {
        FieldSolver solver = point(0, 0, 0.4, PLANE);
        Vector free = FieldSolver.electricField(new PointCharge(new Place(0, 0, 0.4), Amount.si(1e-9, 0, Units.CHARGE), Surroundings.FREE_SPACE),
            new Place(0.2, 0, 0.1), Accuracy.PANELS);
        Vector on = solver.reactionField(new Place(0.2, 0, 0.1));
        near(-free.z().si(), on.onSide("-z").z());
        near(free.z().si(), on.onSide("+z").z());
        near(-free.x().si(), on.onSide("+z").x());
    }
}

package fieldwright.field;

import static fieldwright.field.Charges.*;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;

import org.junit.jupiter.api.Test;

import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;

/** Flux through open and closed surfaces against solid angles and enclosed charge; voltage against potentials. */
class FluxTest {
    private static Amount flux(Source source, Region surface) {
        return Flux.of(source, Accuracy.DEFAULT).through(surface, null);
    }

    /** Right within the stated error, which is at most the accuracy asked of {@code size}. */
    private static void near(double expected, Amount found, double size) {
        assertTrue(found.isConverged(), () -> found + " " + found.standing());
        assertTrue(Math.abs(found.si() - expected) <= found.error() + 1e-14 * size, () -> found.si() + " for " + expected + " states " + found.error());
        assertTrue(found.error() <= 1.01e-9 * size, () -> "states " + found.error());
    }

    /** Cone of half the top angle α: 2π(1 − cos α), from 1 down to 1e-6 radii away. */
    @Test
    void pointThroughADisc() {
        for (double z : new double[] {1, 0.1, 1e-6}) {
            near(-0.5 * (1 - z / Math.sqrt(1 + z * z)) * 1e-9, flux(point(0, 0, z, 1e-9), disc(1)), 1e-9);
            near(0.5 * (1 - z / Math.sqrt(1 + z * z)) * 1e-9, flux(point(0, 0, -z, 1e-9), disc(1)), 1e-9);
        }
    }

    /** One of six like faces of a cube. */
    @Test
    void pointThroughAFaceOfACube() {
        near(1e-9 / 6, flux(point(0, 0, -0.5, 1e-9), rectangle(1, 1)), 1e-9);
        Region slanted = rectangle(1, 1).movedBy(0, 0, 0.5).turnedAbout(0.3, -1, 0.2, 1.1);
        near(1e-9 / 6, flux(point(0, 0, 0, 1e-9), slanted), 1e-9);
        Region polygon = Bodies.polygon(List.of(new Place(-0.5, -0.5, 0), new Place(0.5, -0.5, 0), new Place(0.5, 0.5, 0), new Place(-0.5, 0.5, 0)));
        near(1e-9 / 6, flux(point(0, 0, -0.5, 1e-9), polygon), 1e-9);
    }

    @Test
    void closedSurfacesHoldWhatIsInside() {
        Source points = new Sources(List.of(point(0.1, 0.2, 0.3, 1e-9), point(0.4, -0.3, 0.2, 3e-9), point(2, 0, 0, 7e-9)));
        for (Region closed : List.of(ball(0.8), Bodies.shell(length(0.8)), box(-0.5, 0.5, -0.5, 0.5, -0.5, 0.5), cylinder(0.7, 2).movedBy(0, 0, -1),
            Bodies.torus(length(0.45), length(0.4)), Bodies.cone(length(1), length(1)).movedBy(0, 0, -0.5))) {
            near(4e-9, flux(points, closed), 1e-8);
        }
    }

    /** The part of a rod within a ball. */
    @Test
    void rodThroughASphere() {
        Source rod = charge(rod(-1, 0.3, 0, 1, 0.3, 0), "1e-9");
        near(2 * Math.sqrt(0.25 - 0.09) * 1e-9, flux(rod, ball(0.5)), 2e-9);
        near(2 * Math.sqrt(0.25 - 0.09) * 1e-9, flux(rod, Bodies.shell(length(0.5))), 2e-9);
    }

    @Test
    void filmThroughASphere() {
        double inside = Math.PI * (0.25 - 0.04) * 1e-9;
        near(inside, flux(charge(rectangle(2, 1.5).movedBy(0, 0, 0.2), "1e-9"), ball(0.5)), 3e-9);
        near(inside, flux(charge(disc(1).movedBy(0, 0, 0.2), "1e-9"), ball(0.5)), 3e-9);
    }

    @Test
    void boxOfChargeThroughABox() {
        // ∫(1 + x) over the common part 0.2 ≤ x ≤ 1, 0.4 ≤ y ≤ 1, 0 ≤ z ≤ 0.7
        double inside = (0.8 + (1 - 0.04) / 2) * 0.6 * 0.7 * 1e-6;
        near(inside, flux(charge(box(0, 1, 0, 1, 0, 1), "1e-6*(1 + x)"), box(0.2, 1.3, 0.4, 1.2, -0.3, 0.7)), 2e-6);
        near(1.5e-6, flux(charge(box(0, 1, 0, 1, 0, 1), "1e-6*(1 + x)"), box(0, 1, 0, 1, 0, 1)), 2e-6);
    }

    /** All that a ground plane holds: the flux into it is the whole charge less what misses the piece looked at. */
    @Test
    void throughAGroundPlane() {
        Source point = point(0, 0, 0.3, 1e-9).with(new Surroundings.GroundPlane("z", 0, 1));
        Region disc = disc(0.4);
        String complaint = assertThrows(AuthorException.class, () -> flux(point, disc)).getMessage();
        assertTrue(complaint.contains("one value on each side") && complaint.contains("\"+z\""), complaint);
        // induced within a radius R: q(1 − d/√(R² + d²)), Jackson section 2.1 (from memory)
        near(-1e-9 * (1 - 0.3 / 0.5), Flux.of(point, Accuracy.DEFAULT).through(disc, "+z"), 1e-9);
        // a box that reaches into the conductor: the point and what is induced on the square
        Amount open = Flux.of(point, Accuracy.DEFAULT).through(rectangle(0.6, 0.6), "+z");
        near(1e-9 + open.si(), flux(point, box(-0.3, 0.3, -0.3, 0.3, -0.2, 0.5)), 1e-9);
    }

    /** D passes an interface: the charge is all there is in a ball across it. */
    @Test
    void acrossADielectricFace() {
        Source point = point(0, 0, 0.3, 1e-9).with(new Surroundings.DielectricHalfSpace("z", 0, 1, 1.5, 4));
        near(1e-9, flux(point, ball(0.5)), 1e-9);
        Source disc = charge(disc(0.2).movedBy(0, 0, 0.1), "1e-9").with(new Surroundings.DielectricHalfSpace("z", 0, 1, 1.5, 4));
        near(Math.PI * 0.04 * 1e-9, flux(disc, cylinder(0.3, 0.5).movedBy(0, 0, -0.25)), 1e-10);
    }

    @Test
    void onChargeASideIsAsked() {
        Source shell = charge(Bodies.shell(length(1)), "1e-9");
        assertTrue(assertThrows(AuthorException.class, () -> flux(shell, ball(1))).getMessage().contains("one value on each side"));
        near(4 * Math.PI * 1e-9, Flux.of(shell, Accuracy.DEFAULT).through(ball(1), "+r"), 2e-8);
        near(0, Flux.of(shell, Accuracy.DEFAULT).through(ball(1), "-r"), 2e-8);
        assertTrue(assertThrows(AuthorException.class, () -> flux(point(0.5, 0, 0, 1e-9), disc(1))).getMessage().contains("touches"));
        assertTrue(assertThrows(AuthorException.class, () -> flux(shell, ring(1))).getMessage().contains("is a line"));
    }

    /** Endless line through a coaxial ball. */
    @Test
    void endlessLineThroughABall() {
        Source line = charge(fieldwright.geometry.CoordinateRegion.in(fieldwright.geometry.CoordinateSystem.CARTESIAN).fixed("x", length(3))
            .fixed("y", length(0)).limits("z", Formula.parse("-inf").bind(ReferenceCases.NOTHING), Formula.parse("inf").bind(ReferenceCases.NOTHING)), "1e-9");
        near(0, flux(line, ball(1)), 1e-9);
        // seen under the angle 2 atan(1/3) of a full turn, per length 2
        near(-1e-9 * 2 * 2 * Math.atan(1.0 / 3) / (2 * Math.PI), flux(line, rectangle(2, 2).turnedAbout(0, 1, 0, Math.PI / 2)), 2e-9);
    }

    // ---- voltage

    @Test
    void voltageIsTheDifferenceOfPotentials() {
        Source body = new Sources(List.of(charge(box(0, 1, 0, 1, 0, 1), "1e-6*(1 + x)"), charge(disc(0.7).movedBy(0.5, 0.5, 0.5), "1e-7")));
        Place a = new Place(-0.5, 0.3, 0.2);
        Place b = new Place(1.4, 0.9, 1.3);
        FieldSolver solver = FieldSolver.of(body, Accuracy.DEFAULT);
        Amount expected = solver.potential(a).minus(solver.potential(b));
        Amount found = Flux.of(body, Accuracy.DEFAULT).along(Bodies.rod(a, b));
        assertTrue(found.isConverged(), () -> found.standing().reason());
        assertEquals(expected.si(), found.si(), expected.error() + found.error());
    }

    /** Along a helix, a curve of its own parameter. */
    @Test
    void voltageAlongACurve() {
        Region helix = Bodies.helix(length(0.5), length(0.4), Formula.constant(2));
        Source film = charge(rectangle(2, 2).movedBy(0, 0, 0.3), "1e-9*(1 + x^2)");
        FieldSolver solver = FieldSolver.of(film, Accuracy.DEFAULT);
        Amount expected = solver.potential(new Place(0.5, 0, 0)).minus(solver.potential(new Place(0.5, 0, 0.8)));
        Amount found = Flux.of(film, Accuracy.DEFAULT).along(helix);
        assertTrue(found.isConverged(), () -> found.standing().reason());
        assertEquals(expected.si(), found.si(), expected.error() + found.error() + 1e-12);
    }

    @Test
    void voltageThroughAPointIsNoNumber() {
        Amount v = Flux.of(point(0.31, 0, 0, 1e-9), Accuracy.DEFAULT).along(rod(0, 0, 0, 1, 0, 0));
        assertFalse(v.isConverged());
        assertTrue(assertThrows(AuthorException.class, () -> Flux.of(point(0, 0, 0, 1e-9), Accuracy.DEFAULT).along(disc(1))).getMessage().contains("Give a line"));
    }
}

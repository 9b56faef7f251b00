package fieldwright.field;

import static fieldwright.field.Charges.*;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;

import org.junit.jupiter.api.Test;

import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/** Moments against closed forms by hand; the reference cases of group 8 stand in ReferenceCasesTest. */
class MomentsTest {
    private static void near(double expected, Amount found, double size) {
        assertTrue(found.isConverged(), () -> found.standing().reason());
        assertEquals(expected, found.si(), found.error() + 1e-16 * size);
        assertTrue(found.error() <= 1e-11 * size, () -> "states " + found.error());
    }

    @Test
    void dipoleOfTwoPointsNeedsNoPlace() {
        Source pair = new Sources(List.of(point(0, 0, 0.1, 1e-9), point(0, 0, -0.1, -1e-9)));
        Vector p = Moments.dipole(pair, null, Accuracy.DEFAULT);
        near(2e-10, p.z(), 1e-10);
        near(2e-10, Moments.dipole(pair, new Place(3, 4, 5), Accuracy.DEFAULT).z(), 1e-9);
        String complaint = assertThrows(AuthorException.class, () -> Moments.dipole(point(0, 0, 1, 1e-9), null, Accuracy.DEFAULT)).getMessage();
        assertTrue(complaint.contains("not zero") && complaint.contains("dipoleMoment(at(…))"), complaint);
    }

    /** A shell of density cos θ and a ball moved off: ∫σ z dA = 4πR³/3. */
    @Test
    void polarisedShell() {
        Source shell = charge(fieldwright.geometry.Bodies.shell(length(0.5)).movedBy(1, 2, 3), "1e-9*cos(theta)");
        Vector p = Moments.dipole(shell, null, Accuracy.DEFAULT);
        near(4 * Math.PI / 3 * 0.125 * 1e-9, p.z(), 4e-9);
        near(0, p.x(), 4e-9);
    }

    /** Rod of length L about its middle: q L²/6 along, −q L²/12 across. */
    @Test
    void quadrupoleOfARod() {
        Source rod = charge(rod(0, 0, -0.5, 0, 0, 0.5).turnedAbout(0, 1, 0, Math.PI / 2), "1e-9");
        Moments.Quadrupole q = Moments.quadrupole(rod, new Place(0, 0, 0), Accuracy.DEFAULT);
        near(1e-9 / 6, q.xx(), 1e-10);
        near(-1e-9 / 12, q.yy(), 1e-10);
        near(-1e-9 / 12, q.zz(), 1e-10);
        near(0, q.xz(), 1e-10);
    }

    /** About a place at b from a charge's middle: 3bᵢbⱼ − b²δᵢⱼ more of a ball, whose own is zero. */
    @Test
    void quadrupoleOfABallAboutAnotherPlace() {
        Source ball = charge(ball(0.3).movedBy(1, 2, 0), "1");
        double charge = 4 * Math.PI / 3 * 0.027;
        Moments.Quadrupole q = Moments.quadrupole(ball, new Place(0, 0, 0), Accuracy.DEFAULT);
        near(-2 * charge, q.xx(), 1);
        near(7 * charge, q.yy(), 1);
        near(-5 * charge, q.zz(), 1);
        near(6 * charge, q.xy(), 1);
    }

    @Test
    void kinksAreCut() {
        Source rod = charge(fieldwright.geometry.CoordinateRegion.in(fieldwright.geometry.CoordinateSystem.CARTESIAN).limits("x", length(-1), length(2))
            .fixed("y", length(0)).fixed("z", length(0)), "1e-9*abs(x - 0.3)");
        // ∫|x − 0.3| x dx from −1 to 2
        double expected = (2.0 * 2 * 2 / 3 - 0.3 * 2 - 0.3 * 0.3 * 0.3 / 3 + 0.3 * 0.3 * 0.3 / 2) - (0.3 * 0.3 * 0.3 / 3 - 0.3 * 0.3 * 0.3 / 2 + 1.0 / 3 + 0.3 / 2);
        near(expected * 1e-9, Moments.dipole(rod, new Place(0, 0, 0), Accuracy.DEFAULT).x(), 1e-9);
    }

    @Test
    void endlessChargeHasNone() {
        Source line = charge(fieldwright.geometry.CoordinateRegion.in(fieldwright.geometry.CoordinateSystem.CARTESIAN).fixed("x", length(0))
            .fixed("y", length(0)).limits("z", fieldwright.formula.Formula.parse("-inf").bind(ReferenceCases.NOTHING),
                fieldwright.formula.Formula.parse("inf").bind(ReferenceCases.NOTHING)), "1e-9");
        assertTrue(assertThrows(AuthorException.class, () -> Moments.quadrupole(line, new Place(0, 0, 0), Accuracy.DEFAULT)).getMessage().contains("finite limits"));
    }
}

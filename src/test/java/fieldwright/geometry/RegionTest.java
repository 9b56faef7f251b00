package fieldwright.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;

import org.junit.jupiter.api.Test;

import fieldwright.formula.Binding;
import fieldwright.formula.Formula;
import fieldwright.formula.Integrator;
import fieldwright.formula.Scope;
import fieldwright.integral.NestedIntegrator;
import fieldwright.integral.RegionIntegral;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/** Regions: order of limits, measures of bodies, errors that name the coordinate. */
class RegionTest {
    private static final Scope NOTHING = new Scope() {
        @Override
        public Binding lookup(String name) {
            return null;
        }

        @Override
        public java.util.Collection<String> names() {
            return List.of();
        }

        @Override
        public Integrator integrator() {
            return new NestedIntegrator();
        }
    };

    private static Formula f(String text) {
        return Formula.plain(text, "m", "m", NOTHING);
    }

    private static Formula angle(String text) {
        return Formula.parse(text).bind(NOTHING);
    }

    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private static double measure(Region region) {
        return RegionIntegral.over(region, Formula.constant(1), 1e-12, 0, 1_000_000).value();
    }

    private static CoordinateRegion in(CoordinateSystem s) {
        return CoordinateRegion.in(s);
    }

    @Test
    void orderFollowsTheDependencies() {
        CoordinateRegion r = in(CoordinateSystem.CARTESIAN).limits("z", f("x^2+y^2"), f("1")).limits("y", f("-sqrt(1-x^2)"), f("sqrt(1-x^2)"))
            .limits("x", f("-1"), f("1"));
        assertEquals(List.of("x", "y", "z"), r.order());
        assertEquals(Math.PI / 2, measure(r), 1e-11);
    }

    @Test
    void cycleIsNamed() {
        CoordinateRegion r = in(CoordinateSystem.CARTESIAN).limits("x", f("0"), f("y")).limits("y", f("0"), f("x")).fixed("z", f("0"));
        AuthorException x = assertThrows(AuthorException.class, r::charts);
        assertTrue(x.getMessage().contains("x depends on y") && x.getMessage().contains("y depends on x"), x.getMessage());
    }

    @Test
    void lowerAboveUpperNamesBothValuesAndThePlace() {
        CoordinateRegion r = in(CoordinateSystem.CARTESIAN).limits("x", f("0"), f("2")).limits("y", f("x"), f("1")).fixed("z", f("0"));
        AuthorException x = assertThrows(AuthorException.class, r::charts);
        assertTrue(x.getMessage().contains("lower limit of y") && x.getMessage().contains("at x ="), x.getMessage());
        CoordinateRegion flat = in(CoordinateSystem.CARTESIAN).limits("x", f("2"), f("1")).fixed("y", f("0")).fixed("z", f("0"));
        assertTrue(assertThrows(AuthorException.class, flat::charts).getMessage().contains("= 2.0"));
    }

    @Test
    void missingCoordinateAndWrongUnit() {
        assertTrue(assertThrows(AuthorException.class, () -> in(CoordinateSystem.CYLINDRICAL).limits("rho", f("0"), f("1"))
            .limits("phi", angle("0"), angle("2*pi")).charts()).getMessage().contains("z is neither"));
        assertTrue(assertThrows(AuthorException.class, () -> in(CoordinateSystem.CYLINDRICAL).limits("rho", f("0"), angle("1"))
            .limits("phi", angle("0"), angle("2*pi")).fixed("z", f("0")).charts()).getMessage().contains("rho"));
        assertThrows(AuthorException.class, () -> in(CoordinateSystem.SPHERICAL).limits("z", f("0"), f("1")));
    }

    /** Measures by elementary geometry. */
    @Test
    void measuresOfBodies() {
        assertEquals(Math.sqrt(3), measure(Bodies.rod(new Place(0, 0, 0), new Place(1, 1, 1))), 1e-12);
        assertEquals(3, measure(Bodies.polyline(List.of(new Place(0, 0, 0), new Place(1, 0, 0), new Place(1, 2, 0)))), 1e-12);
        assertEquals(4 * Math.PI, measure(Bodies.ring(m(2))), 1e-12);
        assertEquals(4 * Math.PI, measure(Bodies.disc(m(2))), 1e-11);
        assertEquals(3 * Math.PI, measure(Bodies.annulus(m(1), m(2))), 1e-11);
        assertEquals(6, measure(Bodies.rectangle(m(2), m(3))), 1e-12);
        assertEquals(3, measure(Bodies.polygon(List.of(new Place(0, 0, 1), new Place(2, 0, 1), new Place(2, 2, 1), new Place(1, 1, 1),
            new Place(0, 2, 1)))), 1e-12);
        assertEquals(16 * Math.PI, measure(Bodies.shell(m(2))), 1e-10);
        assertEquals(12 * Math.PI, measure(Bodies.tube(m(2), m(3))), 1e-10);
        assertEquals(32 * Math.PI / 3, measure(Bodies.ball(m(2))), 1e-10);
        assertEquals(24, measure(Bodies.box(m(2), m(3), m(4))), 1e-11);
        assertEquals(12 * Math.PI, measure(Bodies.cylinder(m(2), m(3))), 1e-10);
        assertEquals(4 * Math.PI, measure(Bodies.cone(m(2), m(3))), 1e-10);
        assertEquals(2 * Math.PI * Math.PI * 2 * 0.25, measure(Bodies.torus(m(2), m(0.5))), 1e-10);
        assertEquals(2 * Math.hypot(2 * Math.PI, 0.3), measure(Bodies.helix(m(1), m(0.3), Formula.constant(2))), 1e-10);
        assertEquals(24, measure(Bodies.box(m(2), m(3), m(4)).turnedAbout(1, 1, 0, 0.4).movedBy(1, 2, 3)), 1e-11);
    }

    /** The bowl z = rho^2 below z = 1: area pi/6 (5 sqrt(5) - 1), by elementary integration. */
    @Test
    void fixedCoordinateThatIsAFormulaHasTheTrueArea() {
        Region bowl = in(CoordinateSystem.CYLINDRICAL).limits("rho", f("0"), f("1")).limits("phi", angle("0"), angle("2*pi")).fixed("z", f("rho^2/(1)"));
        assertEquals(Math.PI / 6 * (5 * Math.sqrt(5) - 1), measure(bowl), 1e-11);
        Region dome = in(CoordinateSystem.CYLINDRICAL).limits("rho", f("0"), f("1")).limits("phi", angle("0"), angle("2*pi")).fixed("z", f("sqrt(1-rho^2)"));
        assertEquals(2 * Math.PI, measure(dome), 1e-8);
    }
}

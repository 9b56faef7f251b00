package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Where a chart begins: over the seam of a full turn the field is the same as elsewhere round the axis; at a tip nothing is lost. */
class SeamTest {
    private static final double RADIUS = 0.29434261782725574;
    private static final double FROM_AXIS = 0.22860962156277673;
    private static final double HEIGHT = 7.566237913139579e-8;
    /**
     * sigma Ω/(4 pi eps0), Ω the solid angle of the disc, ∫₀^2π (1 − h/√(h² + R(φ)²)) dφ with R the distance from the foot to
     * the rim; worked with 30 digits by mpmath.
     */
    private static final double EXPECTED = 259.707475972582295908;

    @ParameterizedTest
    @ValueSource(doubles = {0, 1, 3.141592653589793, -1e-17, 2e-7, 5})
    void discFromClose(double phi) {
        Formula density = Formula.constant(Amount.of(4.599, "nC/m^2"));
        Charge disc = new Charge(Bodies.disc(Formula.constant(Amount.of(RADIUS, "m"))), density, new Surroundings.FreeSpace());
        Place at = new Place(FROM_AXIS * Math.cos(phi), FROM_AXIS * Math.sin(phi), HEIGHT);
        Amount normal = FieldSolver.electricField(disc, at, Accuracy.PANELS).z();
        assertTrue(normal.isConverged());
        assertEquals(EXPECTED, normal.si(), 2e-11 * EXPECTED);
    }

    /** With a density that is no polynomial; the same disc with its seam elsewhere has it right to rounding. */
    @Test
    void stillIsOverTheSeam() {
        Place at = new Place(FROM_AXIS, 0, HEIGHT);
        Vector here = waved("0", "2*pi", at);
        Vector elsewhere = waved("-pi", "pi", at);
        double size = elsewhere.magnitude().si();
        assertEquals(elsewhere.x().si(), here.x().si(), 1e-13 * size);
        assertEquals(elsewhere.y().si(), here.y().si(), 1e-13 * size);
        assertEquals(elsewhere.z().si(), here.z().si(), 1e-13 * size);
    }

    private static Vector waved(String from, String to, Place at) {
        CoordinateRegion disc = CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("rho", Formula.parse("0 m"), Formula.parse("0.3 m"))
            .limits("phi", Formula.parse(from), Formula.parse(to)).fixed("z", Formula.parse("0 m"));
        return FieldSolver.electricField(new Charge(disc, Formula.parse("1 (nC/m^2)*(1.5+0.5*sin(4*y/(0.3 m)))"), Surroundings.FREE_SPACE), at,
            Accuracy.PANELS.withRelative(1e-13));
    }

    /** The tip of a needle is a thousandth of its length: seen from aside no rule over the whole notices it. Parts: tip and rest. */
    @Test
    void needleHasATip() {
        Place at = new Place(-0.0168, 0.0266, 0.084);
        Vector whole = needle("0 m", "1.9e-4 m", at);
        Vector tip = needle("0 m", "1e-6 m", at);
        Vector rest = needle("1e-6 m", "1.9e-4 m", at);
        double size = whole.magnitude().si();
        double stated = whole.x().error() + whole.y().error() + whole.z().error();
        assertTrue(stated < 1e-9 * size, "stated " + stated);
        assertEquals(tip.x().si() + rest.x().si(), whole.x().si(), stated + 1e-11 * size);
        assertEquals(tip.z().si() + rest.z().si(), whole.z().si(), stated + 1e-11 * size);
    }

    private static Vector needle(String from, String to, Place at) {
        CoordinateRegion bowl = CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("rho", Formula.parse(from), Formula.parse(to))
            .limits("phi", Formula.parse("0"), Formula.parse("2*pi")).fixed("z", Formula.parse("2.8e6 (1/m)*rho^2"));
        return FieldSolver.electricField(new Charge(bowl, Formula.parse("1 (nC/m^2)*exp(0.4*x/(1.9e-4 m)-20*z/(1 m))"), Surroundings.FREE_SPACE), at,
            Accuracy.PANELS.withRelative(1e-11));
    }
}

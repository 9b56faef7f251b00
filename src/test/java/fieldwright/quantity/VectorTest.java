package fieldwright.quantity;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class VectorTest {
    private static Vector field(Place at, double x, double y, double z, double error) {
        return Vector.of(at, Amount.si(x, error, Units.FIELD), Amount.si(y, error, Units.FIELD), Amount.si(z, error, Units.FIELD));
    }

    @Test
    void componentsInThreeSystems() {
        Place at = Place.spherical(2, Math.PI / 3, Math.PI / 4);
        Vector radial = field(at, 3 * at.x(), 3 * at.y(), 3 * at.z(), 1e-9);
        assertEquals(6, radial.r().si(), 1e-14);
        assertEquals(0, radial.theta().si(), 1e-14);
        assertEquals(0, radial.phi().si(), 1e-14);
        assertEquals(6 * Math.sin(Math.PI / 3), radial.rho().si(), 1e-14);
        assertEquals(6, radial.magnitude().si(), 1e-14);
        assertTrue(radial.magnitude().error() >= 1e-9 && radial.magnitude().error() < 3e-9);
        assertEquals(radial.rho().si(), radial.along(at.x(), at.y(), 0).si(), 1e-14);
    }

    @Test
    void onTheAxis() {
        Place axis = new Place(0, 0, 1);
        assertEquals(0, field(axis, 1e-12, 0, 5, 1e-11).rho().si());
        assertEquals(2.1e-11, field(axis, 1e-12, 0, 5, 1e-11).rho().error(), 1e-25);
        assertThrows(AuthorException.class, () -> field(axis, 1, 0, 5, 1e-11).rho());
        assertThrows(AuthorException.class, () -> field(new Place(0, 0, 0), 0, 0, 0, 0).r());
        assertEquals(5, field(axis, 0, 0, 5, 0).r().si());
    }

    @Test
    void aPairMustBeResolved() {
        Place at = new Place(1, 0, 0);
        Vector pair = Vector.sided(at, new double[] {0, 0, 1}, field(at, 1, 0, 7, 0), field(at, 1, 0, 3, 0));
        assertTrue(pair.isSided());
        AuthorException e = assertThrows(AuthorException.class, pair::z);
        assertTrue(e.getMessage().contains(".onSide(\"+z\") or .mean()"), e.getMessage());
        assertThrows(AuthorException.class, pair::magnitude);
        assertEquals(7, pair.onSide("+z").z().si());
        assertEquals(3, pair.onSide("-z").z().si());
        assertEquals(3, pair.onSide(0.5, 0, -0.1).z().si());
        assertEquals(5, pair.mean().z().si());
        assertEquals(4, pair.jump().z().si());
        assertThrows(AuthorException.class, () -> pair.onSide("+rho"), "runs along the surface");
        assertThrows(AuthorException.class, () -> pair.onSide("up"));
        assertEquals(14, pair.times(2).onSide("+z").z().si());
    }

    @Test
    void sumsOfPairs() {
        Place at = new Place(1, 0, 0);
        Vector up = Vector.sided(at, new double[] {0, 0, 1}, field(at, 0, 0, 7, 0), field(at, 0, 0, 3, 0));
        Vector down = Vector.sided(at, new double[] {0, 0, -1}, field(at, 0, 0, 100, 0), field(at, 0, 0, 200, 0));
        assertEquals(207, up.plus(down).onSide("+z").z().si());
        assertEquals(103, down.plus(up).onSide("-z").z().si());
        assertEquals(8, up.plus(field(at, 0, 0, 1, 0)).onSide("+z").z().si());
        Vector slanted = Vector.sided(at, new double[] {0.6, 0, 0.8}, field(at, 0, 0, 1, 0), field(at, 0, 0, 2, 0));
        assertThrows(AuthorException.class, () -> up.plus(slanted));
        assertThrows(AuthorException.class, () -> up.plus(field(new Place(2, 0, 0), 0, 0, 1, 0)));
        assertFalse(field(at, 0, 0, 1, 0).isSided());
        assertEquals(0, field(at, 0, 0, 1, 0).jump().z().si());
    }

    @Test
    void unbounded() {
        Place at = new Place(1, 0, 0);
        Vector v = Vector.unbounded(at, Units.FIELD, new double[] {-1, 0, 0}, "on the edge of 'plate'");
        assertEquals(Double.NEGATIVE_INFINITY, v.x().si());
        assertEquals(Standing.Kind.UNBOUNDED, v.magnitude().standing().kind());
        assertEquals(Double.POSITIVE_INFINITY, v.magnitude().si());
        assertEquals("on the edge of 'plate'", v.rho().standing().reason());
        Vector nowhere = Vector.unbounded(at, Units.FIELD, null, "at the charge");
        assertEquals(Standing.Kind.UNBOUNDED, nowhere.r().standing().kind());
        assertEquals(Standing.Kind.UNBOUNDED, nowhere.plus(field(at, 1, 1, 1, 0)).magnitude().standing().kind());
    }
}

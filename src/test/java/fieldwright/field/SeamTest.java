package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** A full turn written 2*pi closes: near the surface the field is the same over its seam as elsewhere round the axis. */
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
        Amount normal = FieldSolver.electricField(disc, at, Accuracy.DEFAULT).z();
        assertTrue(normal.isConverged());
        assertEquals(EXPECTED, normal.si(), 2e-11 * EXPECTED);
    }
}

package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Laws of conductors and their known solutions: zero potential, normal field, reciprocity, limits, spheres, applied fields. */
class SurroundingsTest {
    private static final double EPS0 = Constants.EPS0;
    private static final double K = 1 / (4 * Math.PI * EPS0);
    private static final Surroundings BOX = new Surroundings.GroundedBox(-0.5, 0.7, 0, 1, -1, 0.4);
    private static final Surroundings PAIR = new Surroundings.GroundedPair("y", -0.2, 0.9);
    private static final Surroundings CORNER = new Surroundings.GroundedCorner(new Surroundings.GroundPlane("z", -0.1, 1),
        new Surroundings.GroundPlane("x", 0.8, -1));

    private static final Surroundings TUBE = new Surroundings.GroundedTube("x", 0, 0.4, -0.1, 0.7);
    private static final Surroundings DRUM = new Surroundings.GroundedDrum("y", 0.1, 0, 0.1, 0.6, -0.3, 0.8);

    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private static Formula plain(String text, String unit) {
        return Formula.plain(text, "m", unit, ReferenceCases.NOTHING);
    }

    private static Source charge(Region region, String density, Surroundings around) {
        return Charge.of(region, plain(density, new String[] {"C", "C/m", "C/m^2", "C/m^3"}[region.dimension()])).with(around);
    }

    private static CoordinateRegion cartesian() {
        return CoordinateRegion.in(CoordinateSystem.CARTESIAN);
    }

    private static CoordinateRegion block(double x0, double x1, double y0, double y1, double z0, double z1) {
        return cartesian().limits("x", m(x0), m(x1)).limits("y", m(y0), m(y1)).limits("z", m(z0), m(z1));
    }

    private static Source point(double x, double y, double z, double q, Surroundings around) {
        return new PointCharge(new Place(x, y, z), Amount.si(q, 0, Units.CHARGE), around);
    }

    private static FieldSolver solver(Source s) {
        return FieldSolver.of(s, Accuracy.DEFAULT);
    }

    private static void near(double expected, Amount found) {
        near(expected, found, Math.abs(expected));
    }

    private static void near(double expected, Amount found, double size) {
        assertTrue(found.isConverged(), () -> "not converged: " + found.standing());
        assertEquals(expected, found.si(), found.error() + 4e-16 * size, () -> "stated " + found.error());
        assertTrue(found.error() <= 1.1e-9 * size, () -> "stated " + found.error() + " of " + size);
    }

    // ---- walls

    record Walls(Surroundings around, List<Place> on, List<double[]> side) { }

    static List<Walls> walls() {
        return List.of(
            new Walls(BOX, List.of(new Place(-0.5, 0.3, 0), new Place(0.7, 0.5, -0.4), new Place(0, 1, 0.1), new Place(0.2, 0, 0), new Place(0, 0.2, 0.4)),
                List.of(new double[] {1, 0, 0}, new double[] {-1, 0, 0}, new double[] {0, -1, 0}, new double[] {0, 1, 0}, new double[] {0, 0, -1})),
            new Walls(PAIR, List.of(new Place(0.1, -0.2, 0.2), new Place(3, 0.9, 0)), List.of(new double[] {0, 1, 0}, new double[] {0, -1, 0})),
            new Walls(TUBE, List.of(new Place(0.1, 1.1, -0.1), new Place(0.3, 0.4, 0.6), new Place(0, 0.4 + 0.7 * 0.6, -0.1 + 0.7 * 0.8)),
                List.of(new double[] {0, -1, 0}, new double[] {0, 0, -1}, new double[] {0, -0.6, -0.8})),
            new Walls(DRUM, List.of(new Place(0.2, -0.3, 0.2), new Place(0, 0.8, 0.1), new Place(0.7, 0.2, 0.1), new Place(0.1 - 0.36, 0.5, 0.1 + 0.48)),
                List.of(new double[] {0, 1, 0}, new double[] {0, -1, 0}, new double[] {-1, 0, 0}, new double[] {0.6, 0, -0.8})),
            new Walls(CORNER, List.of(new Place(0.1, 0.2, -0.1), new Place(0.8, 0, 0.1)), List.of(new double[] {0, 0, 1}, new double[] {-1, 0, 0})));
    }

    /** On a grounded wall V is zero and the field stands normal on it; close before it V is the distance times that field. */
    @ParameterizedTest
    @MethodSource("walls")
    void wallsAreAtPotentialZero(Walls w) {
        FieldSolver cloud = solver(charge(cartesian().limits("x", m(-0.1), m(0.3)).limits("y", m(0.2), m(0.6)).fixed("z", m(0.25)), "1e-9*(1 + x - z)",
            w.around));
        double inside = cloud.potential(new Place(0.1, 0.5, 0.2)).si();
        for (int i = 0; i < w.on.size(); i++) {
            Place p = w.on.get(i);
            double[] n = w.side.get(i);
            assertEquals(0, cloud.potential(p).si());
            Vector e = cloud.electricField(p).onSide(n[0], n[1], n[2]);
            assertEquals(0, cloud.electricField(p).onSide(-n[0], -n[1], -n[2]).magnitude().si());
            double[] c = {e.x().si(), e.y().si(), e.z().si()};
            double normal = c[0] * n[0] + c[1] * n[1] + c[2] * n[2];
            for (int k = 0; k < 3; k++) {
                assertEquals(normal * n[k], c[k], e.x().error() + e.y().error() + e.z().error());
            }
            double h = 1e-7;
            Amount close = cloud.potential(new Place(p.x() + h * n[0], p.y() + h * n[1], p.z() + h * n[2]));
            assertEquals(-normal * h, close.si(), 1e-6 * Math.abs(normal * h) + 1e-9 * 1e-3 * inside + close.error());
        }
    }

    /** V at b of a unit charge at a is V at a of one at b. */
    @ParameterizedTest
    @MethodSource("walls")
    void reciprocity(Walls w) {
        Random random = new Random(7);
        for (int i = 0; i < 20; i++) {
            double[] a = {random.nextDouble() - 0.4, random.nextDouble() * 0.8, random.nextDouble() * 0.4};
            double[] b = {random.nextDouble() - 0.4, random.nextDouble() * 0.8, random.nextDouble() * 0.4};
            Amount ab = solver(point(a[0], a[1], a[2], 1e-9, w.around)).potential(new Place(b[0], b[1], b[2]));
            Amount ba = solver(point(b[0], b[1], b[2], 1e-9, w.around)).potential(new Place(a[0], a[1], a[2]));
            assertEquals(ab.si(), ba.si(), ab.error() + ba.error());
        }
    }

    /** The induced potential is harmonic also where the charge is: its mean over the vertices of an octahedron and a cube is that of the middle. */
    @ParameterizedTest
    @MethodSource("walls")
    void theReactionIsHarmonic(Walls w) {
        FieldSolver solver = solver(charge(block(-0.1, 0.3, 0.2, 0.6, 0, 0.35), "1e-9*(1 + x - z)", w.around));
        double[] c = {0.1, 0.4, 0.2};
        double h = 0.02;
        double mean = 0;
        for (int k = 0; k < 6; k++) {
            double[] p = c.clone();
            p[k / 2] += k % 2 == 0 ? h : -h;
            mean += solver.reactionPotential(new Place(p[0], p[1], p[2])).si() / 6 * 0.4;
        }
        for (int k = 0; k < 8; k++) {
            double s = h / Math.sqrt(3);
            mean += solver.reactionPotential(new Place(c[0] + (k % 2 * 2 - 1) * s, c[1] + (k / 2 % 2 * 2 - 1) * s, c[2] + (k / 4 * 2 - 1) * s)).si() / 8 * 0.6;
        }
        Amount middle = solver.reactionPotential(new Place(c[0], c[1], c[2]));
        assertEquals(middle.si(), mean, 3e-9 * Math.abs(middle.si()));
        Vector e = solver.reactionField(new Place(c[0], c[1], c[2]));
        double slope = (solver.reactionPotential(new Place(c[0] + 1e-3, c[1], c[2])).si() - solver.reactionPotential(new Place(c[0] - 1e-3, c[1], c[2])).si()) / 2e-3;
        assertEquals(-slope, e.x().si(), 1e-5 * Math.abs(e.x().si()) + 1e-6 * e.magnitude().si());
    }

    /** A box that fills with uniform charge: u_xx + u_yy + u_zz = -1 in the unit cube; own computation, mpmath, single sine series. */
    @Test
    void chargeFillsItsBox() {
        Surroundings cube = new Surroundings.GroundedBox(1, 2, 0, 1, 0, 1);
        FieldSolver full = solver(charge(block(1, 2, 0, 1, 0, 1), "1", cube));
        near(0.05621282982943536 / EPS0, full.potential(new Place(1.5, 0.5, 0.5)));
        near(0.01609503190724804 / EPS0, full.potential(new Place(1.1, 0.2, 0.3)));
        near(-0.2818733142146457 / EPS0, full.electricField(new Place(1, 0.5, 0.5)).onSide("+x").x());
        near(0.2818733142146457, full.fluxDensity(new Place(2, 0.5, 0.5)).onSide("-x").x());
        near(0, full.electricField(new Place(1.5, 0.5, 0.5)).x(), 1 / EPS0);
    }

    private static CoordinateRegion turned(double r0, double r1, double from, double to, double z0, double z1) {
        return CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("rho", m(r0), m(r1))
            .limits("phi", Formula.constant(from * Math.PI), Formula.constant(to * Math.PI)).limits("z", m(z0), m(z1));
    }

    /** A drum that fills with uniform charge, radius 1, height 2; own computation, mpmath, sum of sin I_0 along the axis. */
    @Test
    void chargeFillsItsDrum() {
        FieldSolver full = solver(charge(turned(0, 1, 0, 2, 0, 2), "1", new Surroundings.GroundedDrum("z", 0, 0, 0, 1, 0, 2)));
        near(0.2006636103448725 / EPS0, full.potential(new Place(0, 0, 1)));
        near(0.09413179121217576 / EPS0, full.potential(new Place(0, 0.5, 0.3)));
        near(0.1005806030265917 / EPS0, full.electricField(new Place(0, 0.5, 0.3)).y());
        near(-0.2112382828450633 / EPS0, full.electricField(new Place(0, 0.5, 0.3)).z());
        near(0.001649303843899853 / EPS0, full.potential(new Place(-0.99, 0, 1.9)), 0.01 / EPS0);
        near(0.437525551441517 / EPS0, full.electricField(new Place(1, 0, 1)).onSide("-x").x());
        near(-0.437525551441517, full.inducedDensity(new Place(0.6, 0.8, 1)));
        near(0, full.electricField(new Place(0, 0, 1)).x(), 1 / EPS0);
    }

    /** Charge all round the axis by the wall's term m = 0, its two halves by all terms: one and the same. */
    @Test
    void allRoundAndInHalves() {
        for (Surroundings around : List.of(new Surroundings.GroundedDrum("z", 0, 0, 0, 1, -0.5, 1.2), new Surroundings.GroundedTube("z", 0, 0, 0, 1))) {
            for (Region region : List.of(turned(0.2, 0.7, 0, 2, 0, 0.4), CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).fixed("rho", m(0.6))
                .limits("phi", Formula.constant(0), Formula.constant(2 * Math.PI)).fixed("z", m(0.3)))) {
                boolean line = region.dimension() == 1;
                Source whole = charge(region, "1e-9*(1 + rho)", around);
                java.util.function.BiFunction<Double, Double, Source> part = (from, to) -> charge(line
                    ? CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).fixed("rho", m(0.6)).fixed("z", m(0.3))
                        .limits("phi", Formula.constant(from * Math.PI), Formula.constant(to * Math.PI))
                    : turned(0.2, 0.7, from, to, 0, 0.4), "1e-9*(1 + rho)", around);
                FieldSolver halves = solver(new fieldwright.charge.Sources(List.of(part.apply(0.0, 0.7), part.apply(0.7, 2.0))).with(around));
                for (Place p : List.of(new Place(0.3, 0.1, 0.2), new Place(0, 0.8, 0.6))) {
                    Amount v = solver(whole).potential(p);
                    Amount w = halves.potential(p);
                    assertEquals(w.si(), v.si(), v.error() + w.error());
                    assertTrue(v.error() + w.error() < 1e-8 * Math.abs(v.si()));
                    Vector e = solver(whole).electricField(p);
                    Vector f = halves.electricField(p);
                    assertEquals(f.x().si(), e.x().si(), e.x().error() + f.x().error());
                    assertEquals(f.y().si(), e.y().si(), e.y().error() + f.y().error());
                    assertEquals(f.z().si(), e.z().si(), e.z().error() + f.z().error());
                }
            }
        }
    }

    /** A drum with far ends is a tube, and a great sphere a plane. */
    @Test
    void limitsOfDrumAndSphere() {
        Source cloud = charge(turned(0, 0.4, 0, 1.5, 0.1, 0.3), "1e-9*(1 + x - z)", null);
        Place p = new Place(0.3, 0.5, 0.2);
        for (double end : new double[] {7, 9}) {   // height below and above 16 radii
            Vector tube = solver(cloud.with(new Surroundings.GroundedTube("z", 0, 0, 0, 1))).electricField(p);
            Vector drum = solver(cloud.with(new Surroundings.GroundedDrum("z", 0, 0, 0, 1, -end, end + 0.4))).electricField(p);
            assertEquals(tube.x().si(), drum.x().si(), 3e-9 * tube.magnitude().si());
            assertEquals(tube.y().si(), drum.y().si(), 3e-9 * tube.magnitude().si());
            assertEquals(tube.z().si(), drum.z().si(), 3e-9 * tube.magnitude().si());
        }
        Vector plane = solver(cloud.with(new Surroundings.GroundPlane("z", 0, 1))).electricField(p);
        Vector sphere = solver(cloud.with(new Surroundings.GroundedSphere(0, 0, -1e6, 1e6, true))).electricField(p);
        assertEquals(plane.x().si(), sphere.x().si(), 3e-6 * plane.magnitude().si());
        assertEquals(plane.z().si(), sphere.z().si(), 3e-6 * plane.magnitude().si());
        Vector flat = solver(cloud.with(new Surroundings.GroundedDrum("z", 0, 0, 0, 9, 0, 0.5))).electricField(p);
        Vector pair = solver(cloud.with(new Surroundings.GroundedPair("z", 0, 0.5))).electricField(p);
        assertEquals(pair.x().si(), flat.x().si(), 2e-9 * pair.magnitude().si());
        assertEquals(pair.z().si(), flat.z().si(), 2e-9 * pair.magnitude().si());
    }

    /** What is left out close to a wall is stated and said: 1 mm before the wall of a tube of 1 m, which is a plane there to 2 parts in 1000. */
    @Test
    void doubtNextToARoundWall() {
        FieldSolver s = solver(point(0.999, 0, 0, 1e-9, new Surroundings.GroundedTube("z", 0, 0, 0, 1)));
        Amount v = s.potential(new Place(0.999, 0, 0.001));
        FieldSolver plane = solver(point(0.999, 0, 0, 1e-9, new Surroundings.GroundPlane("x", 1, -1)));
        Amount flat = plane.potential(new Place(0.999, 0, 0.001));
        assertFalse(v.isConverged());
        assertTrue(v.standing().reason().contains("round wall"), v.standing().reason());
        assertEquals(flat.si(), v.si(), v.error() + 2e-3 * flat.si());
    }

    /** A box whose other walls are far is a plane; two of its walls a pair. */
    @Test
    void limitsOfTheBox() {
        Source cloud = charge(block(-0.1, 0.3, 0.2, 0.6, 0.1, 0.35), "1e-9*(1 + x - z)", null);
        Place p = new Place(0.3, 0.7, 0.2);
        Vector plane = solver(cloud.with(new Surroundings.GroundPlane("z", 0, 1))).electricField(p);
        Vector box = solver(cloud.with(new Surroundings.GroundedBox(-1e4, 1e4, -1e4, 1e4, 0, 1e4))).electricField(p);
        assertEquals(plane.x().si(), box.x().si(), 1e-8 * plane.magnitude().si());
        assertEquals(plane.z().si(), box.z().si(), 1e-8 * plane.magnitude().si());
        Vector pair = solver(cloud.with(new Surroundings.GroundedPair("z", 0, 0.5))).electricField(p);
        Vector flat = solver(cloud.with(new Surroundings.GroundedBox(-10, 10, -10, 10, 0, 0.5))).electricField(p);
        assertEquals(pair.x().si(), flat.x().si(), 2e-9 * pair.magnitude().si());
        assertEquals(pair.z().si(), flat.z().si(), 2e-9 * pair.magnitude().si());
    }

    // ---- endless charge between planes

    /** Slab of charge between plates, V = ρ z(H − z)/2ε; line by the closed form of two dimensions (Morse and Feshbach 10.2, from memory). */
    @Test
    void endlessChargeBetweenPlanes() {
        Surroundings pair = new Surroundings.GroundedPair("z", 0, 2);
        Formula minus = Formula.parse("-inf").bind(ReferenceCases.NOTHING);
        Formula plus = Formula.parse("inf").bind(ReferenceCases.NOTHING);
        FieldSolver slab = solver(charge(cartesian().limits("x", minus, plus).limits("y", minus, plus).limits("z", m(0), m(2)), "1e-9", pair));
        near(1e-9 * 0.3 * 1.7 / (2 * EPS0), slab.potential(new Place(1, 2, 0.3)));
        near(1e-9 * 0.5 / EPS0, slab.electricField(new Place(1, 2, 1.5)).z());
        near(-1e-9 / EPS0, slab.electricField(new Place(1, 2, 0)).onSide("+z").z());
        FieldSolver line = solver(charge(cartesian().limits("x", minus, plus).fixed("y", m(0.1)).fixed("z", m(0.6)), "1e-9", pair));
        double eta = Math.PI * 0.4 / 2;
        double v = 1e-9 * K * Math.log((Math.cosh(eta) - Math.cos(Math.PI * 2.1 / 2)) / (Math.cosh(eta) - Math.cos(Math.PI * 0.9 / 2)));
        near(v, line.potential(new Place(-7, 0.5, 1.5)));
        near(v, line.potential(new Place(-7, -0.3, 1.5)));
        double far = 1e-9 * K * 4 * Math.sin(Math.PI * 0.3) * Math.sin(Math.PI * 0.75) * Math.exp(-Math.PI * 4.9 / 2);
        assertEquals(far, line.potential(new Place(0, 5, 1.5)).si(), 1e-3 * far);
        double h = 1e-4;
        double slope = (line.potential(new Place(0, 0.5 + h, 1.5)).si() - line.potential(new Place(0, 0.5 - h, 1.5)).si()) / (2 * h);
        assertEquals(-slope, line.electricField(new Place(0, 0.5, 1.5)).y().si(), 1e-6 * Math.abs(slope));
    }

    /** Line in a tube by its image at the inverse place, V = 2λK ln(…); endless uniform column that fills the tube, V = ρ(R² − r²)/4ε. */
    @Test
    void endlessChargeInATube() {
        Surroundings tube = new Surroundings.GroundedTube("z", 0.1, 0, 0, 0.5);
        Formula minus = Formula.parse("-inf").bind(ReferenceCases.NOTHING);
        Formula plus = Formula.parse("inf").bind(ReferenceCases.NOTHING);
        FieldSolver line = solver(charge(cartesian().fixed("x", m(0.3)).fixed("y", m(0)).limits("z", minus, plus), "1e-9", tube));
        double image = 0.1 + 0.25 / 0.2;
        near(2e-9 * K * Math.log((image - 0.2) / 0.1 * 0.2 / 0.5), line.potential(new Place(0.2, 0, 7)));
        near(2e-9 * K * (-1 / 0.1 + 1 / (image - 0.2)), line.electricField(new Place(0.2, 0, 7)).x());
        assertEquals(0, line.potential(new Place(0.1, 0.5, 2)).si());
        near(2e-9 * K * (0.25 - 0.04) / (0.5 * 0.09), line.electricField(new Place(0.6, 0, 0)).onSide("-x").x());
        Surroundings own = new Surroundings.GroundedTube("z", 0, 0, 0, 0.5);
        FieldSolver column = solver(charge(CoordinateRegion.in(CoordinateSystem.CYLINDRICAL).limits("rho", m(0), m(0.5))
            .limits("phi", Formula.constant(0), Formula.constant(2 * Math.PI)).limits("z", minus, plus), "1e-6", own));
        near(1e-6 * (0.25 - 0.04) / (4 * EPS0), column.potential(new Place(0, 0.2, 1)));
        near(1e-6 * 0.2 / (2 * EPS0), column.electricField(new Place(0, 0.2, 1)).y());
        near(1e-6 * 0.5 / (2 * EPS0), column.electricField(new Place(0, 0.5, 1)).onSide("-y").y());
        assertThrows(AuthorException.class, () -> solver(charge(cartesian().fixed("x", m(0.3)).limits("y", minus, plus).fixed("z", m(0)), "1e-9", tube))
            .potential(new Place(0.2, 0, 0)));
    }

    // ---- spheres

    /** Force on a charge by an insulated sphere: Jackson, Classical Electrodynamics, 3rd ed., eq. 2.9 (from memory). */
    @Test
    void insulatedSphere() {
        double q = 1e-9;
        double net = 3e-10;
        double a = 0.3;
        double y = 0.5;
        FieldSolver s = solver(point(0, 0, y, q, new Surroundings.FloatingSphere(0, 0, 0, a, true, net)));
        double force = K / (y * y) * (net - q * a * a * a * (2 * y * y - a * a) / (y * Math.pow(y * y - a * a, 2)));
        Place here = new Place(0, 0, y);
        // what the net charge adds is not induced: it is there without q
        double own = K * net / (y * y);
        near(force - own, s.reactionField(here).z());
        double sphere = K * (net / a + q / y);
        near(sphere, s.potential(new Place(0.1, 0, 0)));
        near(sphere, s.potential(new Place(0, 0.3, 0)));
        assertEquals(sphere, s.potential(new Place(0, 0.3 + 1e-13, 0)).si(), 1e-10);
        assertEquals(0, s.electricField(new Place(0.1, 0, 0)).magnitude().si());
        double flux = 0;
        var rule = fieldwright.integral.GaussLegendre.of(40);
        for (int i = 0; i < 40; i++) {
            double c = 2 * rule.node(i) - 1;
            Vector e = s.electricField(new Place(a * Math.sqrt(1 - c * c), 0, a * c));
            flux += 4 * Math.PI * a * a * EPS0 * rule.weight(i) * e.onSide(Math.sqrt(1 - c * c), 0, c).magnitude().si()
                * Math.signum(e.onSide(Math.sqrt(1 - c * c), 0, c).z().si() * c + e.onSide(Math.sqrt(1 - c * c), 0, c).x().si() * Math.sqrt(1 - c * c));
        }
        assertEquals(net, flux, 1e-9 * q);
    }

    @Test
    void shellAboutACharge() {
        double q = 1e-9;
        Surroundings shell = new Surroundings.FloatingSphere(0.1, 0, 0, 0.4, false, 5e-10);
        FieldSolver s = solver(charge(Bodies.ball(m(0.2)), "1e-9/(4/3*pi*0.2^3)", shell));
        near(K * 1.5e-9 / 1.9, s.potential(new Place(2, 0, 0)));
        near(K * 1.5e-9 / (1.9 * 1.9), s.electricField(new Place(2, 0, 0)).x());
        near(K * 1.5e-9 / 0.16, s.electricField(new Place(0.5, 0, 0)).onSide("+x").x());
        near(K * 1.5e-9 / 0.4, s.potential(new Place(0.5, 0, 0)));
        Source grounded = charge(Bodies.ball(m(0.2)), "1e-9/(4/3*pi*0.2^3)", new Surroundings.GroundedSphere(0.1, 0, 0, 0.4, false));
        Place in = new Place(0.2, 0.1, 0);
        near(K * 1.5e-9 / 0.4 + solver(grounded).potential(in).si(), s.potential(in));
        near(solver(grounded).electricField(in).x().si(), s.electricField(in).x());
        assertEquals(q, s.totalCharge().si(), 1e-20);
    }

    @Test
    void heldSphere() {
        FieldSolver s = solver(point(0, 0, 2, 0, new Surroundings.HeldSphere(0, 0, 0, 0.5, true, 100)));
        near(100 * 0.5 / 2, s.potential(new Place(0, 2, 0)));
        near(100 * 0.5 / 4, s.electricField(new Place(0, 2, 0)).y());
        near(200, s.electricField(new Place(0.5, 0, 0)).onSide("+x").x());
        assertEquals(100, s.potential(new Place(0.1, 0, 0)).si());
        assertEquals(100, s.potential(new Place(0, 0.5, 0)).si());
    }

    // ---- applied field

    /** Three times the field at the pole: Jackson, Classical Electrodynamics, 3rd ed., 2.5. */
    @Test
    void appliedField() {
        Surroundings grounded = new Surroundings.GroundedSphere(0, 0, 1, 0.5, true);
        FieldSolver s = solver(point(0, 0, 3, 0, new Surroundings.Applied(grounded, 0, 0, 1000)));
        near(3000, s.electricField(new Place(0, 0, 1.5)).onSide("+z").z());
        near(-1000 * (1 - 0.125), s.potential(new Place(0, 0, 2)), 1000);
        near(1000 * (1 + 2 * 0.125), s.electricField(new Place(0, 0, 2)).z());
        near(1000 * (1 - 0.125), s.electricField(new Place(1, 0, 1)).z());
        assertEquals(0, s.electricField(new Place(0, 0, 1.1)).magnitude().si());
        assertEquals(0, s.potential(new Place(0, 0.5, 1)).si());
        Surroundings plane = new Surroundings.Applied(new Surroundings.GroundPlane("z", 0, 1), 0, 0, -5000);
        FieldSolver below = solver(point(0, 0, 1, 1e-9, plane));
        near(-5000 - 2 * 1e-9 * K, below.electricField(new Place(0, 0, 0)).onSide("+z").z());
        near(5000 * 0.5 + 1e-9 * K * (1 / 0.5 - 1 / 1.5), below.potential(new Place(0, 0, 0.5)));
        near(-1e-9 * K / 4, below.reactionField(new Place(0, 0, 1)).z());
        Surroundings medium = new Surroundings.Applied(new Surroundings.Medium(2), 100, 0, 0);
        FieldSolver in = solver(point(0, 0, 0, 1e-9, medium));
        near(100 + 1e-9 * K / 2, in.electricField(new Place(1, 0, 0)).x());
        near(200 * EPS0 + 1e-9 / (4 * Math.PI), in.fluxDensity(new Place(1, 0, 0)).x());
        near(-100 + 1e-9 * K / 2 * (1 - 0.5), in.potential(new Place(1, 0, 0), new Place(0, 2, 0)));
        assertThrows(AuthorException.class, () -> in.potential(new Place(1, 0, 0)));
        assertThrows(AuthorException.class, () -> new Surroundings.Applied(BOX, 1, 0, 0));
        assertThrows(AuthorException.class, () -> new Surroundings.Applied(new Surroundings.GroundPlane("z", 0, 1), 1, 0, 0));
    }

    // ---- charge on conductors

    private static final fieldwright.integral.GaussLegendre RULE = fieldwright.integral.GaussLegendre.of(24);

    /** ∫∫ over [a, b] × [c, d]. */
    private static double integral(double a, double b, double c, double d, java.util.function.DoubleBinaryOperator f) {
        double sum = 0;
        for (int i = 0; i < 24; i++) {
            for (int j = 0; j < 24; j++) {
                sum += RULE.weight(i) * RULE.weight(j) * f.applyAsDouble(a + (b - a) * RULE.node(i), c + (d - c) * RULE.node(j));
            }
        }
        return sum * (b - a) * (d - c);
    }

    /** ∫ over [a, b] and a full turn, there by the trapezoidal rule. */
    private static double round(double a, double b, java.util.function.DoubleBinaryOperator f) {
        double sum = 0;
        for (int i = 0; i < 24; i++) {
            for (int j = 0; j < 24; j++) {
                sum += RULE.weight(i) / 24 * f.applyAsDouble(a + (b - a) * RULE.node(i), j * Math.PI / 12);
            }
        }
        return sum * (b - a) * 2 * Math.PI;
    }

    private static double density(FieldSolver s, double x, double y, double z) {
        Amount a = s.inducedDensity(new Place(x, y, z));
        assertTrue(a.isConverged());
        return a.si();
    }

    /** Induced charge: −q on a plane and on all that closes in on q; −q R/d on a sphere at distance d (Maxwell; Jackson 2.2). */
    @Test
    void inducedChargeAddsUp() {
        double q = 1e-9;
        double turn = 2 * Math.PI;
        FieldSolver plane = solver(point(0.2, 0, 0.5, q, new Surroundings.GroundPlane("z", 0, 1)));
        near(-q * 0.5 / (turn * Math.pow(0.25 + 0.01 + 0.09, 1.5)), plane.inducedDensity(new Place(0.3, 0.3, 0)));
        assertEquals(-q, round(0, 1, (t, phi) -> density(plane, 0.2 + t / (1 - t) * Math.cos(phi), t / (1 - t) * Math.sin(phi), 0)
            * t / Math.pow(1 - t, 3)), 1e-9 * q);
        FieldSolver outside = solver(point(0, 0, 0.8, q, new Surroundings.GroundedSphere(0, 0, 0, 0.5, true)));
        FieldSolver inside = solver(point(0, 0, 0.2, q, new Surroundings.GroundedSphere(0, 0, 0, 0.5, false)));
        assertEquals(-q * 0.5 / 0.8, onSphere(outside), 1e-9 * q);
        assertEquals(-q, onSphere(inside), 1e-9 * q);
        FieldSolver shell = solver(point(0, 0, 0.2, q, new Surroundings.FloatingSphere(0, 0, 0, 0.5, false, 3e-10)));
        assertEquals(3e-10, onSphere(shell), 1e-9 * q);
        FieldSolver box = solver(point(0.4, 0.6, 0.5, q, new Surroundings.GroundedBox(0, 1, 0, 1, 0, 1)));
        double sum = 0;
        for (double w : new double[] {0, 1}) {
            sum += integral(0, 1, 0, 1, (a, b) -> density(box, a, b, w) + density(box, a, w, b) + density(box, w, a, b));
        }
        assertEquals(-q, sum, 1e-9 * q);
        FieldSolver drum = solver(point(0.3, 0, 0.6, q, new Surroundings.GroundedDrum("z", 0, 0, 0, 1, 0, 1)));
        double ends = round(0, 1, (r, phi) -> r * (density(drum, r * Math.cos(phi), r * Math.sin(phi), 0)
            + density(drum, r * Math.cos(phi), r * Math.sin(phi), 1)));
        assertEquals(-q, ends + round(0, 1, (z, phi) -> density(drum, Math.cos(phi), Math.sin(phi), z)), 1e-9 * q);
        FieldSolver tube = solver(point(0.3, 0, 0.6, q, new Surroundings.GroundedTube("z", 0, 0, 0, 1)));
        double round = 0;
        for (int i = -9; i < 9; i++) {
            round += along(tube, 0.6 + i);
        }
        assertEquals(-q, round, 1e-9 * q);
    }

    private static double along(FieldSolver tube, double from) {
        double sum = 0;
        fieldwright.integral.GaussLegendre rule = fieldwright.integral.GaussLegendre.of(10);
        for (int i = 0; i < 10; i++) {
            for (int j = 0; j < 24; j++) {
                double phi = j * Math.PI / 12;
                sum += rule.weight(i) * Math.PI / 12 * density(tube, Math.cos(phi), Math.sin(phi), from + rule.node(i));
            }
        }
        return sum;
    }

    private static double onSphere(FieldSolver s) {
        return round(-1, 1, (c, phi) -> 0.25 * density(s, 0.5 * Math.sqrt(1 - c * c) * Math.cos(phi), 0.5 * Math.sqrt(1 - c * c)
            * Math.sin(phi), 0.5 * c));
    }

    @Test
    void densityOnlyOnAConductor() {
        FieldSolver s = solver(point(0.3, 0.4, 0.2, 1e-9, BOX));
        assertTrue(assertThrows(AuthorException.class, () -> s.inducedDensity(new Place(0.6, 0.5, 0))).getMessage().contains("0.1 m from the surface"));
        assertThrows(AuthorException.class, () -> s.inducedDensity(new Place(0.7, 3, 0)));
        assertThrows(AuthorException.class, () -> solver(point(0, 0, 0, 1e-9, Surroundings.FREE_SPACE)).inducedDensity(new Place(1, 0, 0)));
        assertEquals(0, s.inducedDensity(new Place(0.7, 1, 0)).si());
    }

    // ---- charge where it must not be

    @Test
    void chargeOnTheWrongSideOrInAWall() {
        for (Surroundings around : List.of(BOX, PAIR, CORNER, TUBE, DRUM)) {
            assertThrows(AuthorException.class, () -> solver(point(0.9, -0.3, -0.2, 1e-9, around)).potential(new Place(0, 0.1, 0)));
            assertThrows(AuthorException.class, () -> solver(charge(Bodies.ball(m(0.95)), "1", around)).electricField(new Place(0, 0.1, 0)));
        }
        assertThrows(AuthorException.class, () -> solver(charge(cartesian().fixed("x", m(-0.5)).limits("y", m(0.1), m(0.2)).limits("z", m(0), m(0.1)), "1", BOX))
            .potential(new Place(0, 0.1, 0)));
        Formula plus = Formula.parse("inf").bind(ReferenceCases.NOTHING);
        assertThrows(AuthorException.class, () -> solver(charge(cartesian().fixed("x", m(0)).fixed("y", m(0.1)).limits("z", m(0), plus), "1", PAIR))
            .potential(new Place(0, 0.1, 0)));
        assertEquals(0, solver(point(0, 0.1, 0, 1e-9, BOX)).electricField(new Place(2, 2, 2)).magnitude().si());
        assertEquals(0, solver(point(0, 0.1, 0, 1e-9, BOX)).potential(new Place(0.7, 1, 0)).si());
    }
}

package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Random;

import org.junit.jupiter.api.Test;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.integral.GaussLegendre;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;

/** Laws that hold for every charge: Gauss, E = −grad V, superposition, rotation, scale. Seeds fixed. */
class LawsTest {
    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private static Source free(Region region, String density) {
        String unit = new String[] {"C", "C/m", "C/m^2", "C/m^3"}[region.dimension()];
        return Charge.of(region, Formula.plain(density, "m", unit, ReferenceCases.NOTHING)).with(Surroundings.FREE_SPACE);
    }

    private static List<Source> some() {
        Formula limit = Formula.plain("1-x/2", "m", "m", ReferenceCases.NOTHING);
        return List.of(
            free(Bodies.helix(m(1), m(0.7), Formula.constant(2)), "1e-9*(1+x/2)"),
            free(Bodies.disc(m(1)), "1e-9*(1-rho^2+x)"),
            free(Bodies.tube(m(0.8), m(1)), "1e-9*cos(phi)^2"),
            free(CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", m(0), m(2)).limits("y", m(0), limit).fixed("z", m(0.3)), "1e-9*(1+y)"),
            free(Bodies.cylinder(m(1), m(1)), "1e-9*(1-rho^2)"),
            free(Bodies.ball(m(0.9)), "1e-9*exp(-r^2)"),
            free(Bodies.cone(m(0.7), m(1)), "1e-9*(1+z)"));
    }

    private static Vector e(Source s, double x, double y, double z) {
        Vector v = FieldSolver.electricField(s, new Place(x, y, z), Accuracy.PANELS);
        return v.isSided() ? v.mean() : v;
    }

    /** Flux of D through a large sphere is the charge. */
    @Test
    void gauss() {
        for (Source s : some()) {
            FieldSolver solver = FieldSolver.of(s, Accuracy.PANELS);
            GaussLegendre theta = GaussLegendre.of(24);
            double flux = 0;
            double r = 4;
            int turns = 32;
            for (int i = 0; i < 24; i++) {
                double c = 2 * theta.node(i) - 1;
                double rho = Math.sqrt(1 - c * c);
                for (int j = 0; j < turns; j++) {
                    double phi = 2 * Math.PI * j / turns;
                    Vector d = solver.fluxDensity(new Place(r * rho * Math.cos(phi), r * rho * Math.sin(phi), r * c));
                    flux += d.r().si() * theta.weight(i) / turns * 4 * Math.PI * r * r;
                }
            }
            double q = solver.totalCharge().si();
            assertEquals(q, flux, 1e-8 * Math.abs(q) + 1e-18);
        }
    }

    @Test
    void fieldIsMinusTheGradientOfThePotential() {
        Random random = new Random(7);
        for (Source s : some()) {
            FieldSolver solver = FieldSolver.of(s, Accuracy.PANELS.withRelative(1e-12));
            double x = 1.5 * random.nextDouble() - 0.4;
            double y = 1.5 * random.nextDouble() - 0.4;
            double z = 0.5 + random.nextDouble();
            double h = 1e-3;
            double[] v = new double[4];
            for (int k = 0; k < 4; k++) {
                double step = new double[] {-2, -1, 1, 2}[k] * h;
                v[k] = solver.potential(new Place(x + step, y, z)).si();
            }
            double slope = (v[0] - 8 * v[1] + 8 * v[2] - v[3]) / (12 * h);
            double field = e(s, x, y, z).x().si();
            double size = e(s, x, y, z).magnitude().si();
            assertEquals(-field, slope, 2e-7 * size, () -> "source " + s);
        }
    }

    @Test
    void superposition() {
        List<Source> all = some();
        Vector together = e(new Sources(all), 0.3, -0.2, 1.7);
        double sum = 0;
        for (Source s : all) {
            sum += e(s, 0.3, -0.2, 1.7).z().si();
        }
        assertEquals(sum, together.z().si(), 2e-9 * together.magnitude().si());
    }

    /** Turning body and place together turns the field. */
    @Test
    void rotationAndShift() {
        for (Source s : some()) {
            Charge c = (Charge) s;
            Source turned = new Charge(c.region().turnedAbout(0, 0, 1, 0.7).movedBy(1, 2, 3), c.density(), Surroundings.FREE_SPACE);
            double cos = Math.cos(0.7);
            double sin = Math.sin(0.7);
            Vector a = e(s, 0.4, 0.1, 0.8);
            Vector b = e(turned, 1 + 0.4 * cos - 0.1 * sin, 2 + 0.4 * sin + 0.1 * cos, 3.8);
            double size = a.magnitude().si();
            assertEquals(cos * a.x().si() - sin * a.y().si(), b.x().si(), 3e-9 * size);
            assertEquals(a.z().si(), b.z().si(), 3e-9 * size);
        }
    }

    @Test
    void scale() {
        // lengths times 1000, density in C/m^2 unchanged: same field
        Source small = free(Bodies.disc(m(1e-3)), "1e-9");
        Source large = free(Bodies.disc(m(1)), "1e-9");
        assertEquals(e(large, 0.3, 0.2, 0.1).z().si(), e(small, 0.3e-3, 0.2e-3, 0.1e-3).z().si(), 2e-9 / Constants.EPS0 * 1e-9);
    }
}

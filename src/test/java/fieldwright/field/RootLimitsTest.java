package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Random;

import org.junit.jupiter.api.Test;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;

/**
 * Bodies in Cartesian limits with square-root ends against the same bodies in the coordinates that suit them, at places from a
 * hundred sizes away down to gaps of 1e-8 sizes, at their ends and rims, and inside.
 */
class RootLimitsTest {
    private static final long SEED = 20261202;
    private static final int PLACES = 60;
    private static final Accuracy ACCURACY = new Accuracy(1e-9, 0, 300_000, ClosedForms.OFF);
    /** Gaps below this part of the size need not converge: some places aside of an end come out nearer to the rim than asked. */
    private static final double LEAST_GAP = 1e-8;

    /** {@code charged}: how far a place is inside; negative outside (not to scale off the plane of a flat body). */
    private record Body(String name, Source plain, Source suited, double[][] ends, Charged charged) { }

    private interface Charged {
        double inside(double x, double y, double z);
    }

    private static Source of(CoordinateSystem system, String density, String... limits) {
        CoordinateRegion region = CoordinateRegion.in(system);
        for (int i = 0; i < limits.length; i += 3) {
            region = limits[i + 2] == null ? region.fixed(limits[i], Formula.parse(limits[i + 1]))
                : region.limits(limits[i], Formula.parse(limits[i + 1]), Formula.parse(limits[i + 2]));
        }
        return Charge.of(region, Formula.parse(density)).with(Surroundings.FREE_SPACE);
    }

    private static final CoordinateSystem XYZ = CoordinateSystem.CARTESIAN;
    private static final CoordinateSystem CYL = CoordinateSystem.CYLINDRICAL;
    private static final CoordinateSystem SPH = CoordinateSystem.SPHERICAL;
    private static final String TURN = "2*pi";

    private static final List<Body> BODIES = List.of(
        new Body("disc",
            of(XYZ, "1 (C/m^2)", "x", "-2 m", "2 m", "y", "-sqrt((2 m)^2-x^2)", "sqrt((2 m)^2-x^2)", "z", "0 m", null),
            of(CYL, "1 (C/m^2)", "rho", "0 m", "2 m", "phi", "0", TURN, "z", "0 m", null),
            new double[][] {{2, 0, 0}, {-2, 0, 0}, {0, 2, 0}, {Math.sqrt(2), -Math.sqrt(2), 0}},
            (x, y, z) -> z == 0 ? 2 - Math.hypot(x, y) : -1),
        new Body("quarter disc",
            of(XYZ, "1 (C/m^2)", "x", "0 m", "2 m", "y", "0 m", "sqrt((2 m)^2-x^2)", "z", "0 m", null),
            of(CYL, "1 (C/m^2)", "rho", "0 m", "2 m", "phi", "0", "pi/2", "z", "0 m", null),
            new double[][] {{2, 0, 0}, {0, 2, 0}, {Math.sqrt(2), Math.sqrt(2), 0}, {0, 0, 0}},
            (x, y, z) -> z == 0 ? Math.min(Math.min(x, y), 2 - Math.hypot(x, y)) : -1),
        new Body("ball",
            of(XYZ, "1 (C/m^3)", "x", "-2 m", "2 m", "y", "-sqrt((2 m)^2-x^2)", "sqrt((2 m)^2-x^2)",
                "z", "-sqrt((2 m)^2-x^2-y^2)", "sqrt((2 m)^2-x^2-y^2)"),
            of(SPH, "1 (C/m^3)", "r", "0 m", "2 m", "theta", "0", "pi", "phi", "0", TURN),
            new double[][] {{2, 0, 0}, {0, -2, 0}, {0, 0, 2}, {Math.sqrt(2), -Math.sqrt(2), 0}},
            (x, y, z) -> 2 - Math.sqrt(x * x + y * y + z * z)),
        new Body("hemisphere",
            of(XYZ, "1 (C/m^3)", "y", "-2 m", "2 m", "x", "-((2 m)^2-y^2)^0.5", "((2 m)^2-y^2)^0.5", "z", "0 m", "sqrt((2 m)^2-x^2-y^2)"),
            of(SPH, "1 (C/m^3)", "r", "0 m", "2 m", "theta", "0", "pi/2", "phi", "0", TURN),
            new double[][] {{2, 0, 0}, {0, -2, 0}, {0, 0, 2}, {0, 0, 0}},
            (x, y, z) -> Math.min(z, 2 - Math.sqrt(x * x + y * y + z * z))),
        new Body("ellipsoid of revolution",
            of(XYZ, "1 (C/m^3)", "x", "-2 m", "2 m", "y", "-2 m*sqrt(1-(x/(2 m))^2)", "2 m*sqrt(1-(x/(2 m))^2)",
                "z", "-0.8*sqrt((2 m)^2-x^2-y^2)", "0.8*sqrt((2 m)^2-x^2-y^2)"),
            of(CYL, "1 (C/m^3)", "z", "-1.6 m", "1.6 m", "rho", "0 m", "2 m*sqrt(1-(z/(1.6 m))^2)", "phi", "0", TURN),
            new double[][] {{2, 0, 0}, {0, -2, 0}, {0, 0, 1.6}, {Math.sqrt(2), -Math.sqrt(2), 0}},
            (x, y, z) -> 2 - Math.sqrt(x * x + y * y + z * z * 1.5625)),
        new Body("bowl",
            of(XYZ, "1 (C/m^3)", "x", "-2 m", "2 m", "y", "-sqrt((2 m)^2-x^2)", "sqrt((2 m)^2-x^2)", "z", "(x^2+y^2)/(4 m)", "1 m"),
            of(CYL, "1 (C/m^3)", "rho", "0 m", "2 m", "phi", "0", TURN, "z", "rho^2/(4 m)", "1 m"),
            new double[][] {{2, 0, 1}, {0, -2, 1}, {0, 0, 0}, {Math.sqrt(2), -Math.sqrt(2), 1}},
            (x, y, z) -> Math.min(1 - z, z - (x * x + y * y) / 4)));

    @Test
    void bothDescriptionsAgreeWithinTheirErrors() {
        Random random = new Random(SEED);
        List<String> broken = new ArrayList<>();
        for (Body body : BODIES) {
            FieldSolver plain = FieldSolver.of(body.plain(), ACCURACY);
            FieldSolver suited = FieldSolver.of(body.suited(), ACCURACY);
            for (int i = 0; i < PLACES; i++) {
                Place p = place(body, random, i);
                String wrong = compare(body, plain, suited, p);
                if (wrong != null) {
                    broken.add(body.name() + " at " + p + ": " + wrong);
                }
            }
        }
        assertEquals(List.of(), broken, () -> "seed " + SEED + ":\n" + String.join("\n", broken));
    }

    private static Place place(Body body, Random random, int i) {
        double[] at = body.ends()[random.nextInt(body.ends().length)].clone();
        double gap = 2 * switch (i % 4) {
            case 0 -> Math.pow(10, 2 * random.nextDouble());
            case 1 -> Math.pow(10, -2 + 2 * random.nextDouble());
            default -> Math.pow(10, -8 + 6 * random.nextDouble());
        };
        double[] d = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
        double n = Math.sqrt(d[0] * d[0] + d[1] * d[1] + d[2] * d[2]);
        if (random.nextInt(3) == 0) {
            java.util.Arrays.fill(d, 0);
            d[random.nextInt(3)] = random.nextBoolean() ? 1 : -1;
            n = 1;
        }
        return new Place(at[0] + gap * d[0] / n, at[1] + gap * d[1] / n, at[2] + gap * d[2] / n);
    }

    /** Null when all is well: outside all charge both converge, and what both call converged agrees within the errors they state. */
    private static String compare(Body body, FieldSolver plain, FieldSolver suited, Place p) {
        Vector a = plain.electricField(p);
        Vector b = suited.electricField(p);
        double inside = body.charged().inside(p.x(), p.y(), p.z());
        if (a.standing().kind() == Standing.Kind.UNBOUNDED || b.standing().kind() == Standing.Kind.UNBOUNDED) {
            return a.standing().kind() == b.standing().kind() ? null : "one is unbounded";
        }
        a = a.isSided() ? a.mean() : a;
        b = b.isSided() ? b.mean() : b;
        if (!a.standing().isConverged() || !b.standing().isConverged()) {
            return inside < -2 * LEAST_GAP ? "outside, " + a.standing() + " / " + b.standing() : null;
        }
        double off = norm(a.x().si() - b.x().si(), a.y().si() - b.y().si(), a.z().si() - b.z().si());
        double stated = norm(a.x().error(), a.y().error(), a.z().error()) + norm(b.x().error(), b.y().error(), b.z().error());
        return off <= stated ? null
            : String.format(Locale.ROOT, "differ by %.2g, stated %.2g, |E| %.3g", off, stated, norm(a.x().si(), a.y().si(), a.z().si()));
    }

    private static double norm(double x, double y, double z) {
        return Math.sqrt(x * x + y * y + z * z);
    }
}

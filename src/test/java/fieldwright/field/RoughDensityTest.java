package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import java.util.function.DoubleUnaryOperator;

import org.junit.jupiter.api.Test;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Constants;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.integral.GaussLegendre;
import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/** Densities with roots, quotients, logarithms and kinks: outside all charge they converge, and stated errors hold everywhere. */
class RoughDensityTest {
    private static final long SEED = 20261203;
    private static final double K = 4 * Math.PI * Constants.EPS0;

    private static Source in(CoordinateSystem system, String density, String... limits) {
        CoordinateRegion region = CoordinateRegion.in(system);
        for (int i = 0; i < limits.length; i += 3) {
            region = region.limits(limits[i], Formula.parse(limits[i + 1]), Formula.parse(limits[i + 2]));
        }
        return Charge.of(region, Formula.parse("1 (C/m^3)*(" + density + ")")).with(Surroundings.FREE_SPACE);
    }

    private static Source ball(String density) {
        return in(CoordinateSystem.SPHERICAL, density, "r", "0 m", "1 m", "theta", "0", "pi", "phi", "0", "2*pi");
    }

    private static Source cylinder(String density) {
        return in(CoordinateSystem.CYLINDRICAL, density, "rho", "0 m", "1 m", "phi", "0", "2*pi", "z", "-1 m", "1 m");
    }

    private static Place place(Random random, int i) {
        double distance = switch (i % 4) {
            case 0 -> 1 + Math.pow(10, 2 * random.nextDouble() - 0.5);
            case 1, 2 -> 1 + Math.pow(10, -6 + 5 * random.nextDouble());
            default -> random.nextDouble();
        };
        double z = 2 * random.nextDouble() - 1;
        double phi = 2 * Math.PI * random.nextDouble();
        double rho = Math.sqrt(1 - z * z);
        return new Place(distance * rho * Math.cos(phi), distance * rho * Math.sin(phi), distance * z);
    }

    /** Charge within a radius over 4π: ∫ ρ r² dr, by hand. */
    private static final Map<String, DoubleUnaryOperator> WITHIN = Map.of(
        "sqrt(r/(1 m))", r -> Math.pow(r, 3.5) / 3.5,
        "r/(1 m)", r -> Math.pow(r, 4) / 4,
        "1/(1+r/(1 m))", r -> r < 0.05 ? Math.pow(r, 3) * series(r) : r * r / 2 - r + Math.log1p(r),
        "when(r^2 < 0.25 (m^2), 2, 1)", r -> (Math.pow(r, 3) + Math.pow(Math.min(r, 0.5), 3)) / 3,
        "abs(r/(1 m)-0.5)", r -> r < 0.5 ? Math.pow(r, 3) / 6 - Math.pow(r, 4) / 4
            : 1 / 96.0 + Math.pow(r, 4) / 4 - Math.pow(r, 3) / 6);

    /** 1/3 − r/4 + r²/5 − … */
    private static double series(double r) {
        double sum = 0;
        for (int n = 14; n >= 0; n--) {
            sum = 1.0 / (n + 3) - r * sum;
        }
        return sum;
    }

    @Test
    void roundBallsFollowTheChargeWithin() {
        Random random = new Random(SEED);
        List<String> broken = new ArrayList<>();
        WITHIN.entrySet().stream().sorted(Map.Entry.comparingByKey()).forEach(entry -> {
            FieldSolver solver = FieldSolver.of(ball(entry.getKey()), Accuracy.PANELS);
            for (int i = 0; i < 10; i++) {
                Place p = place(random, i);
                double d = Math.sqrt(p.x() * p.x() + p.y() * p.y() + p.z() * p.z());
                double exact = 4 * Math.PI * entry.getValue().applyAsDouble(Math.min(1, d)) / (K * d * d);
                Vector e = solver.electricField(p);
                if (!e.standing().isConverged()) {
                    broken.add(d > 1 ? entry.getKey() + " at " + p + ": " + e.standing().reason() : "");
                    continue;
                }
                check(entry.getKey(), p, e, new double[] {exact * p.x() / d, exact * p.y() / d, exact * p.z() / d}, 1e-14 * exact, broken);
            }
        });
        broken.removeIf(String::isEmpty);
        assertEquals(List.of(), broken);
    }

    @Test
    void absoluteHeightAgreesInTwoDescriptions() {
        FieldSolver spherical = FieldSolver.of(ball("abs(z)/(1 m)"), Accuracy.PANELS);
        FieldSolver cylindrical = FieldSolver.of(in(CoordinateSystem.CYLINDRICAL, "max(z, -z)/(1 m)", "z", "-1 m", "1 m", "rho", "0 m",
            "sqrt((1 m)^2-z^2)", "phi", "0", "2*pi"), Accuracy.PANELS);
        Random random = new Random(SEED + 1);
        List<String> broken = new ArrayList<>();
        for (int i = 0; i < 24; i++) {
            Place p = place(random, i);
            Vector a = spherical.electricField(p);
            Vector b = cylindrical.electricField(p);
            assertTrue(a.standing().isConverged() && b.standing().isConverged(), () -> p + ": " + a.standing() + b.standing());
            assertTrue(spherical.evaluations() < 30_000, () -> p + ": " + spherical.evaluations() + " evaluations");
            check("abs(z)", p, a, new double[] {b.x().si(), b.y().si(), b.z().si()}, norm(b.x().error(), b.y().error(), b.z().error()), broken);
        }
        assertEquals(List.of(), broken);
    }

    @Test
    void rootOfDistanceFromTheAxis() {
        GaussLegendre rule = GaussLegendre.of(64);
        List<String> broken = new ArrayList<>();
        FieldSolver solver = FieldSolver.of(cylinder("sqrt(rho/(1 m))"), Accuracy.PANELS);
        for (double h : new double[] {0.3, 1, 20}) {
            double sum = 0;
            for (int i = 0; i < 64; i++) {
                double u = rule.node(i);   // rho = u²
                double up = 1 / Math.sqrt(u * u * u * u + h * h) - 1 / Math.sqrt(u * u * u * u + (h + 2) * (h + 2));
                sum += rule.weight(i) * 2 * u * u * u * u * up;
            }
            double exact = 2 * Math.PI * sum / K;
            Place p = new Place(0, 0, 1 + h);
            Vector e = solver.electricField(p);
            assertTrue(e.standing().isConverged(), () -> p + ": " + e.standing());
            check("sqrt(rho)", p, e, new double[] {0, 0, exact}, 1e-13 * exact, broken);
        }
        assertEquals(List.of(), broken);
    }

    /** A jump along a curve and along the height of a cone: the same as two charges, each with its own density. */
    @Test
    void jumpsAreTwoCharges() {
        List<String> broken = new ArrayList<>();
        Random random = new Random(SEED + 2);
        for (int i = 0; i < 12; i++) {
            Place p = place(random, i);
            String at = 0.2 + 0.5 * random.nextDouble() + " m";
            sum("helix", p, new Source[] {helix("when(z < " + at + ", 1, 3)", "0", "10"), helix("1", "0", at + "/(0.1 m)"),
                helix("3", at + "/(0.1 m)", "10")}, broken);
            sum("cone", p, new Source[] {cone("when(z >= " + at + ", exp(x/(1 m)), 2)", "0 m", "1 m"), cone("2", "0 m", at),
                cone("exp(x/(1 m))", at, "1 m")}, broken);
        }
        assertEquals(List.of(), broken);
    }

    private static Source helix(String density, String from, String to) {
        Set<String> t = Set.of("t");
        ParametricRegion curve = ParametricRegion.of(Formula.parse("0.5 m*cos(t)").bind(Scope.EMPTY, t), Formula.parse("0.5 m*sin(t)").bind(Scope.EMPTY, t),
            Formula.parse("0.1 m*t").bind(Scope.EMPTY, t)).over("t", Formula.parse(from), Formula.parse(to));
        return Charge.of(curve, Formula.parse("1 (C/m)*(" + density + ")")).with(Surroundings.FREE_SPACE);
    }

    private static Source cone(String density, String from, String to) {
        return in(CoordinateSystem.CYLINDRICAL, density, "z", from, to, "phi", "0", "2*pi", "rho", "0 m", "0.7*z");
    }

    private static void sum(String what, Place p, Source[] wholeAndParts, List<String> broken) {
        Vector[] e = new Vector[3];
        for (int k = 0; k < 3; k++) {
            FieldSolver solver = FieldSolver.of(wholeAndParts[k], Accuracy.PANELS);
            e[k] = solver.electricField(p);
            assertTrue(e[k].standing().isConverged(), () -> what + " at " + p);
            assertTrue(solver.evaluations() < 60_000, () -> what + " at " + p + ": " + solver.evaluations() + " evaluations");
        }
        double bound = norm(e[1].x().error() + e[2].x().error(), e[1].y().error() + e[2].y().error(), e[1].z().error() + e[2].z().error());
        check(what, p, e[0], new double[] {e[1].x().si() + e[2].x().si(), e[1].y().si() + e[2].y().si(), e[1].z().si() + e[2].z().si()}, bound, broken);
    }

    private static void check(String what, Place p, Vector e, double[] exact, double bound, List<String> broken) {
        double off = norm(e.x().si() - exact[0], e.y().si() - exact[1], e.z().si() - exact[2]);
        double stated = norm(e.x().error(), e.y().error(), e.z().error());
        if (!(off <= stated + bound)) {
            broken.add(String.format(Locale.ROOT, "%s at %s: off %.2g, stated %.2g, bound of the reference %.2g", what, p, off, stated, bound));
        }
    }

    private static double norm(double x, double y, double z) {
        return Math.sqrt(x * x + y * y + z * z);
    }
}

package fieldwright.field;

import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;

import fieldwright.charge.Charge;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.field.closed.Ball;
import fieldwright.field.closed.Box;
import fieldwright.field.closed.Closed;
import fieldwright.field.closed.ClosedForm;
import fieldwright.field.closed.Disc;
import fieldwright.field.closed.Polygon;
import fieldwright.field.closed.Ring;
import fieldwright.field.closed.Rod;
import fieldwright.field.closed.SphericalShell;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/** Random bodies that have closed forms, in one of their descriptions, and places far, near, on and inside them. */
final class RandomProblems {
    record Problem(String text, Source source, Place place, Closed truth, double gap, double size) { }

    private final Random random;

    RandomProblems(long seed) {
        random = new Random(seed);
    }

    private static Formula m(double v) {
        return Formula.constant(Amount.si(v, 0, Units.LENGTH));
    }

    private double between(double a, double b) {
        return a + (b - a) * random.nextDouble();
    }

    private double logBetween(double a, double b) {
        return Math.exp(between(Math.log(a), Math.log(b)));
    }

    private static Source charge(Region region, double density) {
        return Charge.of(region, Formula.constant(Amount.si(density, 0, Charge.densityDimension(region.dimension()))))
            .with(Surroundings.FREE_SPACE);
    }

    private static CoordinateRegion in(CoordinateSystem s) {
        return CoordinateRegion.in(s);
    }

    /** One more problem. */
    Problem next() {
        int kind = random.nextInt(10);
        double a = logBetween(0.1, 10);
        double aspect = random.nextBoolean() ? logBetween(0.5, 2) : logBetween(1e-4, 1e4);
        double b = a * aspect;
        double c = a * logBetween(0.3, 3);
        switch (kind) {
            case 0: {
                Region r = in(CoordinateSystem.CARTESIAN).fixed("x", m(0)).fixed("y", m(0)).limits("z", m(-a), m(a));
                return problem("rod", r, Rod.uniform(-a, a, 1), new double[] {0, 0, between(-a, a)}, random.nextInt(3) == 0 ? new double[] {0, 0, a} : null, a);
            }
            case 1: {
                Region r = in(CoordinateSystem.CARTESIAN).limits("x", m(-a), m(a)).limits("y", m(-b), m(b)).fixed("z", m(0));
                return problem("rectangle", r, Polygon.rectangle(-a, a, -b, b, 1, 0, 0), new double[] {between(-a, a), between(-b, b), 0},
                    random.nextInt(3) == 0 ? new double[] {a, random.nextBoolean() ? b : between(-b, b), 0} : null, Math.max(a, b));
            }
            case 2: {
                double[] x = {0, a, between(-a, a)};
                double[] y = {0, between(-0.3, 0.3) * b, b};
                Region r = Bodies.polygon(List.of(new Place(x[0], y[0], 0), new Place(x[1], y[1], 0), new Place(x[2], y[2], 0)));
                double s = random.nextDouble();
                double t = random.nextDouble() * (1 - s);
                return problem("triangle", r, Polygon.uniform(x, y, 1), new double[] {s * x[1] + t * x[2], s * y[1] + t * y[2], 0},
                    random.nextInt(3) == 0 ? new double[] {x[1], y[1], 0} : null, Math.max(a, b));
            }
            case 3: {
                boolean cartesian = random.nextInt(3) == 0;
                Region r = cartesian
                    ? in(CoordinateSystem.CARTESIAN).limits("x", m(-a), m(a)).limits("y", root("-1", a), root("1", a)).fixed("z", m(0))
                    : Bodies.disc(m(a));
                double rho = a * Math.sqrt(random.nextDouble()) * (random.nextInt(5) == 0 ? 1e-3 : 1);
                double phi = between(0, 6.28);
                return problem(cartesian ? "disc in x y" : "disc", r, new Disc(a, 1), new double[] {rho * Math.cos(phi), rho * Math.sin(phi), 0},
                    random.nextInt(3) == 0 ? new double[] {a, 0, 0} : null, a);
            }
            case 4:
                double p = between(0, 6.28);
                return problem("ring", Bodies.ring(m(a)), new Ring(a, 1), new double[] {a * Math.cos(p), a * Math.sin(p), 0}, null, a);
            case 5: {
                double theta = Math.acos(between(-1, 1));
                double phi = between(0, 6.28);
                return problem("shell", Bodies.shell(m(a)), new SphericalShell(a, 1),
                    new double[] {a * Math.sin(theta) * Math.cos(phi), a * Math.sin(theta) * Math.sin(phi), a * Math.cos(theta)},
                    random.nextInt(5) == 0 ? new double[] {0, 0, a} : null, a);
            }
            case 6:
            case 7: {
                boolean cartesian = random.nextInt(3) == 0;
                Region r = cartesian ? in(CoordinateSystem.CARTESIAN).limits("x", m(-a), m(a)).limits("y", root("-1", a), root("1", a))
                    .limits("z", ball("-1", a), ball("1", a)) : Bodies.ball(m(a));
                double theta = Math.acos(between(-1, 1));
                double phi = between(0, 6.28);
                double rr = kind == 6 ? a : a * Math.cbrt(random.nextDouble());
                return problem(cartesian ? "ball in x y z" : "ball", r, Ball.full(a, 1),
                    new double[] {rr * Math.sin(theta) * Math.cos(phi), rr * Math.sin(theta) * Math.sin(phi), rr * Math.cos(theta)},
                    random.nextInt(5) == 0 ? new double[] {0, 0, random.nextBoolean() ? a : 0} : null, a);
            }
            default: {
                Region r = in(CoordinateSystem.CARTESIAN).limits("x", m(-a), m(a)).limits("y", m(-b), m(b)).limits("z", m(-c), m(c));
                double[] at = {between(-a, a), between(-b, b), kind == 8 ? c : between(-c, c)};
                return problem("box", r, Box.uniform(-a, a, -b, b, -c, c, 1), at,
                    random.nextInt(3) == 0 ? new double[] {a, random.nextBoolean() ? b : between(-b, b), random.nextBoolean() ? c : between(-c, c)} : null,
                    Math.max(a, Math.max(b, c)));
            }
        }
    }

    private static Formula root(String sign, double a) {
        return Formula.parse("S*sqrt(A^2-x^2)").substitute(Map.of("S", Formula.parse(sign), "A", m(a)));
    }

    private static Formula ball(String sign, double a) {
        return Formula.parse("S*sqrt(A^2-x^2-y^2)").substitute(Map.of("S", Formula.parse(sign), "A", m(a)));
    }

    private Problem problem(String text, Region region, ClosedForm form, double[] on, double[] special, double size) {
        double[] at = special != null ? special : on;
        double gap = 0;
        int where = random.nextInt(10);
        if (where < 9) {
            gap = where < 2 ? logBetween(1, 1e3) : where < 5 ? logBetween(0.03, 2) : logBetween(1e-8, 0.03);
            double[] d = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            double n = Math.sqrt(d[0] * d[0] + d[1] * d[1] + d[2] * d[2]);
            if (random.nextInt(3) == 0) {
                int axis = random.nextInt(3);
                d = new double[3];
                d[axis] = random.nextBoolean() ? 1 : -1;
                n = 1;
            }
            for (int k = 0; k < 3; k++) {
                at[k] += gap * size * d[k] / n;
            }
        }
        Place place = new Place(at[0], at[1], at[2]);
        String description = String.format(Locale.ROOT, "%s %s size %.3g gap %.2g at (%.17g, %.17g, %.17g)", text, form, size, gap, at[0], at[1], at[2]);
        return new Problem(description, charge(region, 1), place, form.at(at[0], at[1], at[2]), gap, size);
    }
}

package fieldwright.field;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.charge.Charge;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Vector;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Random;
import java.util.Set;
import org.junit.jupiter.api.Test;

/**
 * Closed forms against panels, for every body that is recognised, in frames and with images: two methods that share no step must agree
 * within the sum of what they state, at places far, near, on and inside, and say the same about the kind of answer.
 */
class ClosedFormsTest {
    private static final int EACH = 8;
    private static final long SEED = 4711;

    /** A body about the origin, no larger than 2 m, and a place on or in it as a function of three random numbers. */
    private record Body(String name, Region region, String density, Inside inside) { }

    private interface Inside {
        double[] at(double s, double t, double u);
    }

    private static Formula f(String text, String... free) {
        return Formula.parseValue(text).bind(Scope.EMPTY, Set.of(free));
    }

    /** {@code region(CYLINDRICAL, "rho", "0", "1 m", "phi", …)}; a coordinate with one limit only is fixed: {@code "z", "0", ""}. */
    private static Region region(CoordinateSystem system, String... parts) {
        CoordinateRegion r = CoordinateRegion.in(system);
        for (int i = 0; i < parts.length; i += 3) {
            r = parts[i + 2].isEmpty() ? r.fixed(parts[i], f(parts[i + 1])) : r.limits(parts[i], f(parts[i + 1]), f(parts[i + 2]));
        }
        return r;
    }

    private static Region flat(String... parts) {
        return region(CoordinateSystem.CARTESIAN, parts);
    }

    private static Region round(String... parts) {
        return region(CoordinateSystem.CYLINDRICAL, parts);
    }

    private static Region ball(String... parts) {
        return region(CoordinateSystem.SPHERICAL, parts);
    }

    private static double[] polar(double rho, double turn, double z) {
        return new double[] {rho * Math.cos(2 * Math.PI * turn), rho * Math.sin(2 * Math.PI * turn), z};
    }

    private static double[] sphere(double r, double t, double u) {
        double z = 2 * t - 1;
        return polar(r * Math.sqrt(1 - z * z), u, r * z);
    }

    private static List<Body> bodies() {
        List<Body> all = new ArrayList<>();
        all.add(new Body("rod", flat("x", "0.1 m", "", "y", "0", "", "z", "-1 m", "1 m"), "2 (nC/m)", (s, t, u) -> new double[] {0.1, 0, 2 * s - 1}));
        all.add(new Body("sloping rod", flat("x", "-0.5 m", "1.5 m", "y", "0", "", "z", "0.2 m", ""), "2 (nC/m) + 3 (nC/m^2)*x - z*5 (nC/m^2)",
            (s, t, u) -> new double[] {2 * s - 0.5, 0, 0.2}));
        all.add(new Body("rod between places", Bodies.rod(new Place(0.2, -0.4, 0.1), new Place(0.9, 0.8, -0.6)), "(1 + u)*1 (nC/m) + x*1 (nC/m^2)",
            (s, t, u) -> new double[] {0.2 + 0.7 * s, -0.4 + 1.2 * s, 0.1 - 0.7 * s}));
        all.add(new Body("spoke", round("rho", "0.2 m", "1.2 m", "phi", "0.7", "", "z", "0", ""), "rho*1 (nC/m^2)",
            (s, t, u) -> new double[] {(0.2 + s) * Math.cos(0.7), (0.2 + s) * Math.sin(0.7), 0}));
        all.add(new Body("ray", ball("r", "0.2 m", "1.2 m", "theta", "1.1", "", "phi", "0.7", ""), "3 (nC/m)",
            (s, t, u) -> new double[] {(0.2 + s) * Math.sin(1.1) * Math.cos(0.7), (0.2 + s) * Math.sin(1.1) * Math.sin(0.7), (0.2 + s) * Math.cos(1.1)}));
        all.add(new Body("polyline", Bodies.polyline(List.of(new Place(0, 0, 0), new Place(1, 0, 0), new Place(1, 0.8, 0.3))), "1 (nC/m)",
            (s, t, u) -> new double[] {s, 0, 0}));
        all.add(new Body("ring", Bodies.ring(f("0.7 m")), "1 (nC/m)", (s, t, u) -> polar(0.7, s, 0)));
        all.add(new Body("ring at a latitude", ball("r", "0.7 m", "", "theta", "0.6", "", "phi", "-pi", "pi"), "1 (nC/m)",
            (s, t, u) -> polar(0.7 * Math.sin(0.6), s, 0.7 * Math.cos(0.6))));
        all.add(new Body("disc", Bodies.disc(f("0.7 m")), "1 (nC/m^2)", (s, t, u) -> polar(0.7 * Math.sqrt(t), s, 0)));
        all.add(new Body("disc by spherical limits", ball("r", "0", "0.7 m", "theta", "pi/2", "", "phi", "0", "2*pi"), "1 (nC/m^2)",
            (s, t, u) -> polar(0.7 * Math.sqrt(t), s, 0)));
        all.add(new Body("annulus", Bodies.annulus(f("0.3 m"), f("0.9 m")), "-2 (nC/m^2)", (s, t, u) -> polar(0.3 + 0.6 * t, s, 0)));
        all.add(new Body("rectangle", flat("x", "-0.5 m", "0.7 m", "y", "0.1 m", "", "z", "-0.4 m", "0.9 m"), "1 (nC/m^2) + x*1 (nC/m^3) - 2 (nC/m^3)*z",
            (s, t, u) -> new double[] {-0.5 + 1.2 * s, 0.1, -0.4 + 1.3 * t}));
        all.add(new Body("half-plane rectangle", round("rho", "0.2 m", "1.1 m", "phi", "2", "", "z", "-0.5 m", "0.5 m"), "1 (nC/m^2) + rho*2 (nC/m^3)",
            (s, t, u) -> new double[] {(0.2 + 0.9 * s) * Math.cos(2), (0.2 + 0.9 * s) * Math.sin(2), t - 0.5}));
        all.add(new Body("triangle by limits", flat("x", "0", "1 m", "y", "0", "0.8 m - 0.8*x", "z", "0", ""), "1 (nC/m^2)",
            (s, t, u) -> new double[] {s, 0.8 * (1 - s) * t, 0}));
        all.add(new Body("polygon", Bodies.polygon(List.of(new Place(0, 0, 0), new Place(1, 0, 0), new Place(1, 0.4, 0), new Place(0.3, 0.4, 0),
            new Place(0.3, 1, 0), new Place(0, 1, 0))), "1 (nC/m^2) + x*1 (nC/m^3)", (s, t, u) -> new double[] {s, 0.4 * t, 0}));
        all.add(new Body("parallelogram", ParametricRegion.of(f("(0.5 m)*s + (0.3 m)*t", "s", "t"), f("(0.4 m)*s - (0.2 m)*t", "s", "t"), f("0.1 m + (0.6 m)*t", "t"))
            .over("s", f("-1"), f("1")).over("t", f("0"), f("1")), "(1 + t - 0.3*s)*1 (nC/m^2)",
            (s, t, u) -> new double[] {0.5 * (2 * s - 1) + 0.3 * t, 0.4 * (2 * s - 1) - 0.2 * t, 0.1 + 0.6 * t}));
        all.add(new Body("box", Bodies.box(f("1 m"), f("0.6 m"), f("1.4 m")), "1 (nC/m^3)", (s, t, u) -> new double[] {s - 0.5, 0.6 * t - 0.3, 1.4 * u - 0.7}));
        all.add(new Body("sloping box", flat("z", "0", "0.8 m", "x", "-0.3 m", "0.9 m", "y", "0.1 m", "0.5 m"), "1 (nC/m^3)*(1 + (x - 2*y)/(1 m)) - z*3 (nC/m^4)",
            (s, t, u) -> new double[] {1.2 * s - 0.3, 0.4 * t + 0.1, 0.8 * u}));
        all.add(new Body("box by parameters", ParametricRegion.of(f("(0.6 m)*p - (0.8 m)*q", "p", "q"), f("(0.8 m)*p + (0.6 m)*q", "p", "q"), f("-w", "w"))
            .over("p", f("0"), f("1")).over("q", f("0"), f("0.5")).over("w", f("0.1 m"), f("0.6 m")), "1 (nC/m^3)*(1 + p)",
            (s, t, u) -> new double[] {0.6 * s - 0.4 * t, 0.8 * s + 0.3 * t, -0.1 - 0.5 * u}));
        all.add(new Body("tube", Bodies.tube(f("0.5 m"), f("1.2 m")), "1 (nC/m^2)", (s, t, u) -> polar(0.5, s, 1.2 * t)));
        all.add(new Body("cylinder", Bodies.cylinder(f("0.5 m"), f("1.2 m")), "1 (nC/m^3)", (s, t, u) -> polar(0.5 * Math.sqrt(t), s, 1.2 * u)));
        all.add(new Body("hollow cylinder", round("rho", "0.3 m", "0.6 m", "phi", "0", "2*pi", "z", "-0.4 m", "0.5 m"), "1 (nC/m^3)",
            (s, t, u) -> polar(0.3 + 0.3 * t, s, -0.4 + 0.9 * u)));
        all.add(new Body("shell", Bodies.shell(f("0.8 m")), "1 (nC/m^2)", (s, t, u) -> sphere(0.8, s, t)));
        all.add(new Body("ball", Bodies.ball(f("0.8 m")), "1 (nC/m^3)", (s, t, u) -> sphere(0.8 * Math.cbrt(u), s, t)));
        all.add(new Body("thick shell", ball("r", "0.5 m", "0.8 m", "theta", "0", "pi", "phi", "0", "2*pi"), "1 (nC/m^3)",
            (s, t, u) -> sphere(0.5 + 0.3 * u, s, t)));
        all.add(new Body("endless line", flat("x", "0.1 m", "", "y", "0.2 m", "", "z", "-inf", "inf"), "1 (nC/m)", (s, t, u) -> new double[] {0.1, 0.2, s}));
        all.add(new Body("half-endless line", flat("x", "-inf", "0.3 m", "y", "0.2 m", "", "z", "0", ""), "1 (nC/m)", (s, t, u) -> new double[] {0.3 - s, 0.2, 0}));
        all.add(new Body("strip", flat("x", "-0.5 m", "0.4 m", "y", "-inf", "inf", "z", "0.1 m", ""), "1 (nC/m^2)", (s, t, u) -> new double[] {0.9 * s - 0.5, t, 0.1}));
        all.add(new Body("endless plane", flat("x", "-inf", "inf", "y", "0.2 m", "", "z", "-inf", "inf"), "1 (nC/m^2)", (s, t, u) -> new double[] {s, 0.2, t}));
        all.add(new Body("slab", flat("x", "-inf", "inf", "y", "-0.2 m", "0.3 m", "z", "-inf", "inf"), "1 (nC/m^3)", (s, t, u) -> new double[] {s, 0.5 * u - 0.2, t}));
        all.add(new Body("endless tube", round("rho", "0.4 m", "", "phi", "0", "2*pi", "z", "-inf", "inf"), "1 (nC/m^2)", (s, t, u) -> polar(0.4, s, t)));
        all.add(new Body("endless cylinder", round("rho", "0.2 m", "0.5 m", "phi", "0", "2*pi", "z", "-inf", "inf"), "1 (nC/m^3)",
            (s, t, u) -> polar(0.2 + 0.3 * u, s, t)));
        return all;
    }

    private record Case(String text, Charge charge, Place place) { }

    private static final Accuracy CLOSED = new Accuracy(1e-9, 0, 200_000, ClosedForms.ONLY);
    private static final Accuracy PANELS = CLOSED.with(ClosedForms.OFF);

    private static Case next(Body body, Random random) {
        double[] p = body.inside().at(random.nextDouble(), random.nextDouble(), random.nextDouble());
        double gap = 0;
        int where = random.nextInt(8);
        if (where > 0) {
            gap = where < 3 ? Math.pow(10, -1 + 4 * random.nextDouble()) : Math.pow(10, -8 * random.nextDouble());
            double[] d = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            double n = Math.sqrt(d[0] * d[0] + d[1] * d[1] + d[2] * d[2]);
            for (int k = 0; k < 3; k++) {
                p[k] += gap * d[k] / n;
            }
        }
        Region region = body.region();
        boolean endless = body.region().charts().get(0).chart().isEndless();
        Place place = new Place(p[0], p[1], p[2]);
        boolean framed = random.nextInt(3) > 0;
        if (framed) {
            double[] axis = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            double angle = random.nextInt(3) == 0 ? Math.PI / 2 : 3 * random.nextDouble();
            double[] move = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            if (endless) {
                axis = new double[] {0, 0, 1};
                angle = Math.PI / 2;
                move[2] = 0;
            }
            region = region.turnedAbout(axis[0], axis[1], axis[2], angle).movedBy(move[0], move[1], move[2]);
            double[] q = fieldwright.geometry.Frame.turned(axis[0], axis[1], axis[2], angle).toSheet(p);
            place = new Place(q[0] + move[0], q[1] + move[1], q[2] + move[2]);
        }
        Surroundings around = switch (endless ? 0 : random.nextInt(6)) {
            case 1 -> new Surroundings.GroundPlane("z", -9, 1);
            case 2 -> new Surroundings.DielectricHalfSpace("x", 12, -1, 1, 3.5);
            case 3 -> new Surroundings.GroundedSphere(20, 0, 3, 6, true);
            case 4 -> new Surroundings.GroundedSphere(0, 1, 0, 2e4, false);
            default -> Surroundings.FREE_SPACE;
        };
        String text = String.format(Locale.ROOT, "%s, %s, gap %.2g at (%.17g, %.17g, %.17g) in %s", body.name(), framed ? "framed" : "own frame", gap,
            place.x(), place.y(), place.z(), around.title());
        return new Case(text, new Charge(region, density(body), around), place);
    }

    /** Edges, rims, ends, corners and seams, by name of the body. */
    private static final Map<String, double[][]> SPECIAL = Map.ofEntries(
        Map.entry("rod", new double[][] {{0.1, 0, 1}, {0.1, 0, 1.5}, {0.1, 0, -1 - 1e-9}}),
        Map.entry("polyline", new double[][] {{1, 0, 0}, {-0.5, 0, 0}}),
        Map.entry("ring", new double[][] {{0, 0, 0}, {0, 0, 1e-7}, {-0.7, 0, 0}}),
        Map.entry("disc", new double[][] {{0.7, 0, 0}, {0, 0, 0}, {0.7 - 1e-9, 0, 0}, {0, -0.7, 1e-8}}),
        Map.entry("annulus", new double[][] {{0.3, 0, 0}, {0, 0.9, 0}, {0.1, 0, 0}, {0, 0, 0}}),
        Map.entry("rectangle", new double[][] {{0.7, 0.1, 0.2}, {-0.5, 0.1, -0.4}, {0.7 + 1e-8, 0.1, 0.9}, {0, 0.1, 0}}),
        Map.entry("polygon", new double[][] {{0.3, 0.4, 0}, {0.3, 0.7, 0}, {0.15, 0.4, 0}, {1, 0, 0}, {0.3, 0.2, 0}}),
        Map.entry("box", new double[][] {{0.5, 0.3, 0.7}, {0.5, 0, 0}, {0.5, 0.3, 0}, {0, 0, 0}, {0.5 + 1e-9, 0.3, 0.7}}),
        Map.entry("tube", new double[][] {{0.5, 0, 0}, {0, -0.5, 1.2}, {0.5, 0, 0.6}, {0, 0, 0.6}}),
        Map.entry("cylinder", new double[][] {{0.5, 0, 0}, {0, 0.5, 0.6}, {0, 0, 0}, {0, 0, 0.6}, {0.5 - 1e-9, 0, 1.2}}),
        Map.entry("shell", new double[][] {{0, 0, 0.8}, {0, 0, 0}, {0.8, 0, 0}}),
        Map.entry("ball", new double[][] {{0, 0, 0.8}, {0, 0, 0}, {0, 0, 1e-9}}),
        Map.entry("strip", new double[][] {{0.4, 0.3, 0.1}, {-0.5, 0, 0.1}, {0.5, 0, 0.1}}),
        Map.entry("half-endless line", new double[][] {{0.3, 0.2, 0}, {0.9, 0.2, 0}}));

    @Test
    void specialPlacesAreToldAlike() {
        List<String> broken = new ArrayList<>();
        int seen = 0;
        for (Body body : bodies()) {
            for (double[] p : SPECIAL.getOrDefault(body.name(), new double[0][])) {
                seen++;
                Charge charge = new Charge(body.region(), density(body), Surroundings.FREE_SPACE);
                Case c = new Case(body.name() + " at " + java.util.Arrays.toString(p), charge, new Place(p[0], p[1], p[2]));
                compare(c, FieldSolver.electricField(charge, c.place(), CLOSED), FieldSolver.electricField(charge, c.place(), PANELS), broken);
            }
        }
        assertTrue(broken.isEmpty(), () -> String.join("\n", broken));
        assertEquals(SPECIAL.values().stream().mapToInt(p -> p.length).sum(), seen);
    }

    /** Two squares side by side are one: at the seam the two edges, each without bound, cancel, which is for the panels to find. */
    @Test
    void aSeamOfTwoSquaresIsNoEdge() {
        Region left = flat("x", "-1 m", "0", "y", "-0.5 m", "0.5 m", "z", "0", "");
        Region right = flat("x", "0", "1 m", "y", "-0.5 m", "0.5 m", "z", "0", "");
        Region whole = flat("x", "-1 m", "1 m", "y", "-0.5 m", "0.5 m", "z", "0", "");
        Formula density = f("1 (nC/m^2)");
        Place seam = new Place(0, 0.2, 0);
        Vector two = FieldSolver.electricField(new Sources(List.of(Charge.of(left, density), Charge.of(right, density))).with(Surroundings.FREE_SPACE), seam,
            Accuracy.DEFAULT);
        Vector one = FieldSolver.electricField(new Charge(whole, density, Surroundings.FREE_SPACE), seam, Accuracy.DEFAULT);
        List<String> broken = new ArrayList<>();
        compare(new Case("seam", new Charge(whole, density, Surroundings.FREE_SPACE), seam), one, two, broken);
        assertTrue(broken.isEmpty(), broken.toString());
        assertTrue(two.isSided());
    }

    /** A plate of 1 : 1e-9 from close above it: the closed form has lost nine digits, the panels take over by themselves. */
    @Test
    void aFormThatLosesDigitsHandsOver() {
        Charge plate = new Charge(flat("x", "-1 m", "1 m", "y", "-1 m", "1 m", "z", "0", "1e-9 m"), f("1 (nC/m^3)"), Surroundings.FREE_SPACE);
        Place inside = new Place(0.3, 0.1, 0.5e-9);
        Vector auto = FieldSolver.electricField(plate, inside, Accuracy.DEFAULT);
        Vector panels = FieldSolver.electricField(plate, inside, PANELS);
        assertEquals(panels.x().si(), auto.x().si(), panels.x().error() + auto.x().error());
        assertTrue(auto.standing().isConverged(), auto.standing().reason());
        FieldSolver forms = FieldSolver.of(plate, CLOSED);
        assertTrue(!forms.electricField(inside).standing().isConverged() || auto.x().error() <= 1e-9 * Math.abs(auto.x().si()));
    }

    @Test
    void closedFormsAloneSayWhyThereAreNone() {
        refuses("volume density", flat("x", "0", "1 m", "y", "0", "1 m", "z", "0", "1 m"), "1 (nC/m^3)*(x/(1 m))^2", "neither constant nor linear");
        refuses("bend", flat("x", "-1 m", "1 m", "y", "0", "1 m", "z", "0", "1 m"), "1 (nC/m^3)*abs(x/(1 m))", "bend");
        refuses("jump", flat("x", "-1 m", "1 m", "y", "0", "1 m", "z", "0", ""), "when(x > 0, 1 (nC/m^2), otherwise 2 (nC/m^2))", "neither constant nor linear");
        refuses("sector", round("rho", "0", "1 m", "phi", "0", "3", "z", "0", ""), "1 (nC/m^2)", "full turn");
        refuses("almost a turn", round("rho", "0", "1 m", "phi", "0", "6.2831853", "z", "0", ""), "1 (nC/m^2)", "full turn");
        refuses("cap", ball("r", "1 m", "", "theta", "0", "pi/2", "phi", "0", "2*pi"), "1 (nC/m^2)", "pole to pole");
        refuses("cone", ball("r", "0", "1 m", "theta", "pi/3", "", "phi", "0", "2*pi"), "1 (nC/m^2)", "cone");
        refuses("round density", Bodies.disc(f("1 m")), "1 (nC/m^2)*rho/(1 m)", "not the same all over");
        refuses("helix", Bodies.helix(f("1 m"), f("0.1 m"), f("3")), "1 (nC/m)", "not linear in the parameters");
        refuses("bowl", round("rho", "0", "1 m", "phi", "0", "2*pi", "z", "rho^2/(1 m)", ""), "1 (nC/m^2)", "depend on other coordinates");
    }

    private static void refuses(String what, Region region, String density, String why) {
        Charge charge = new Charge(region, f(density, "x", "y", "z", "rho"), Surroundings.FREE_SPACE);
        String message = assertThrows(AuthorException.class, () -> FieldSolver.of(charge, CLOSED), what).getMessage();
        assertTrue(message.contains(why), what + ": " + message);
    }

    /** What cancels to a constant or a line is one. */
    @Test
    void aDensityIsJudgedByWhatIsLeftOfIt() {
        Charge charge = new Charge(flat("x", "0", "1 m", "y", "0", "1 m", "z", "0", "1 m"), f("((x + 1 m)^2 - x^2)*1 (nC/m^5)", "x"), Surroundings.FREE_SPACE);
        assertTrue(FieldSolver.of(charge, CLOSED).electricField(new Place(2, 0, 0)).standing().isConverged());
    }

    private static Formula density(Body body) {
        return f(body.density(), "x", "y", "z", "rho", "u", "s", "t", "p", "q");
    }

    @Test
    void panelsAgreeWithinWhatBothState() {
        Random random = new Random(SEED);
        List<String> broken = new ArrayList<>();
        int notConverged = 0;
        int all = 0;
        for (Body body : bodies()) {
            for (int i = 0; i < EACH; i++) {
                Case c = next(body, random);
                all++;
                FieldSolver closed = FieldSolver.of(c.charge(), CLOSED);
                FieldSolver panels = FieldSolver.of(c.charge(), PANELS);
                Vector a = closed.electricField(c.place());
                Vector b = panels.electricField(c.place());
                if (!b.standing().isConverged() && b.standing().kind() != Standing.Kind.UNBOUNDED) {
                    notConverged++;
                    continue;
                }
                compare(c, a, b, broken);
                if (!c.charge().region().charts().get(0).chart().isEndless()) {
                    Amount v = closed.potential(c.place());
                    Amount w = panels.potential(c.place());
                    if (v.standing().kind() != w.standing().kind()) {
                        broken.add("V " + v.standing() + " / " + w.standing() + ": " + c.text());
                    } else if (v.isConverged() && !(Math.abs(v.si() - w.si()) <= v.error() + w.error())) {
                        broken.add("V " + v.si() + " ± " + v.error() + " / " + w.si() + " ± " + w.error() + ": " + c.text());
                    }
                }
            }
        }
        assertTrue(broken.isEmpty(), () -> "seed " + SEED + ", " + broken.size() + ":\n" + String.join("\n", broken));
        int failed = notConverged;
        assertTrue(notConverged * 50 <= all, () -> "panels did not converge in " + failed);
    }

    private static void compare(Case c, Vector a, Vector b, List<String> broken) {
        if (a.standing().kind() != b.standing().kind() || a.isSided() != b.isSided()) {
            broken.add("E closed " + kind(a) + ", panels " + kind(b) + ": " + c.text());
            return;
        }
        if (a.standing().kind() == Standing.Kind.UNBOUNDED) {
            return;
        }
        if (!a.isSided()) {
            compare("E", c, a, b, broken);
            return;
        }
        compare("E+", c, a.plusSide(), b.onSide(a.normal()[0], a.normal()[1], a.normal()[2]), broken);
        compare("E-", c, a.minusSide(), b.onSide(-a.normal()[0], -a.normal()[1], -a.normal()[2]), broken);
    }

    private static String kind(Vector v) {
        return v.standing() + (v.isSided() ? ", a pair" : "");
    }

    private static void compare(String what, Case c, Vector a, Vector b, List<String> broken) {
        double off = HonestyLook.norm(a.x().si() - b.x().si(), a.y().si() - b.y().si(), a.z().si() - b.z().si());
        double stated = HonestyLook.norm(a.x().error(), a.y().error(), a.z().error()) + HonestyLook.norm(b.x().error(), b.y().error(), b.z().error());
        if (!(off <= stated)) {
            broken.add(String.format(Locale.ROOT, "%s off %.3g, stated %.3g (closed %.3g), size %.3g: %s", what, off, stated,
                HonestyLook.norm(a.x().error(), a.y().error(), a.z().error()), a.magnitude().si(), c.text()));
        }
    }
}

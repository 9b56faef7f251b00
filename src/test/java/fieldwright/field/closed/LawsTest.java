package fieldwright.field.closed;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import java.util.function.DoubleFunction;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What holds for every form whatever its formula: Gauss's law, E = -grad V, superposition, limits, hand-overs, edges. */
class LawsTest {
    private static final double EPS = Math.ulp(1.0);
    private static final Polygon ELL = Polygon.uniform(new double[] {0, 3, 3, 1, 1, 0}, new double[] {0, 0, 1, 1, 2, 2}, 0.7);

    private record Body(ClosedForm form, double charge) {
    }

    /** Finite bodies about the origin, within distance 2.6 of it, with their charge. */
    static Stream<Body> finiteBodies() {
        return Stream.of(
                new Body(new Rod(-0.7, 1.1, 0.4, -0.9), 0.4 * 1.8 - 0.45 * (1.21 - 0.49)),
                new Body(Polygon.rectangle(-1, 1, -0.5, 1.5, 0.8, 0.6, -0.3), 4 * (0.8 - 0.3 * 0.5)),
                new Body(new Polygon(new double[] {0, -1, -1, 1, 1}, new double[] {0, 1, -1, -1, 1}, 0.7, 0, 0), 0.7 * 3),
                new Body(new Box(-1, 1, -0.5, 0.75, 0, 2, 0.5, -0.8, 1.1, 0.3), 5 * (0.5 + 1.1 * 0.125 + 0.3)),
                new Body(Box.uniform(-1, 1, -1, 1, 0, 1e-3, 2), 8e-3),
                new Body(new Ring(1.25, 0.8), 0.8 * 2.5 * Math.PI),
                new Body(new Disc(1.25, 0.8), 0.8 * 1.5625 * Math.PI),
                new Body(new Tube(-1, 0.5, 0.8, 1.3), 1.3 * 1.5 * 1.6 * Math.PI),
                new Body(new Cylinder(-1, 0.5, 0.8, 1.3), 1.3 * 1.5 * 0.64 * Math.PI),
                new Body(new Cylinder(-2, 2, 0.05, 1.3), 1.3 * 4 * 0.0025 * Math.PI),
                new Body(new SphericalShell(1.5, 0.7), 0.7 * 9 * Math.PI),
                new Body(new Ball(0.5, 1.5, 0.7), 0.7 * 4 * Math.PI / 3 * (3.375 - 0.125)));
    }

    static Stream<ClosedForm> allForms() {
        return Stream.concat(finiteBodies().map(Body::form), Stream.of(ELL, Ball.full(1.5, 0.7), new EndlessLine(0.8),
                new HalfEndlessLine(0.8), new EndlessPlane(0.6), new Strip(-0.5, 1.5, 0.9), new Slab(-0.5, 1, 0.7),
                new EndlessTube(1.1, 0.4), new EndlessCylinder(0, 1.1, 0.4), new EndlessCylinder(0.6, 1.1, 0.4)));
    }

    @ParameterizedTest
    @MethodSource("finiteBodies")
    void fluxThroughSphereRoundTheBodyIsItsCharge(Body body) {
        int n = 30;
        double radius = 4;
        GaussRule rule = GaussRule.of(n);
        double flux = 0;
        for (int i = 0; i < n; i++) {
            double c = rule.nodes()[i];
            double s = Math.sqrt(1 - c * c);
            for (int j = 0; j < 2 * n; j++) {
                double f = Math.PI * (j + 0.3) / n;
                double[] u = {s * Math.cos(f), s * Math.sin(f), c};
                Closed e = body.form.at(radius * u[0], radius * u[1], radius * u[2]);
                flux += rule.weights()[i] * Math.PI / n * radius * radius * (e.ex() * u[0] + e.ey() * u[1] + e.ez() * u[2]);
            }
        }
        assertEquals(4 * Math.PI * body.charge, flux, 1e-9 * Math.abs(body.charge), body.form::toString);
    }

    @ParameterizedTest
    @MethodSource("allForms")
    void fieldIsMinusTheGradientOfThePotential(ClosedForm form) {
        Random random = new Random(11);
        double h = 1e-3;
        int tried = 0;
        for (int i = 0; i < 200 && tried < 60; i++) {
            double[] p = {3 * random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            Closed e = form.at(p[0], p[1], p[2]);
            double[] found = {e.ex(), e.ey(), e.ez()};
            double scale = Math.max(e.fieldLength(), Math.abs(e.v()) / 10);
            double rough = roughness(form, p, h);
            if (rough > 1e-4 * scale) {
                continue; // an edge or face too near for a difference
            }
            tried++;
            for (int axis = 0; axis < 3; axis++) {
                int a = axis;
                DoubleFunction<Double> v = t -> form.at(p[0] + (a == 0 ? t : 0), p[1] + (a == 1 ? t : 0), p[2] + (a == 2 ? t : 0)).v();
                double slope = (8 * (v.apply(h) - v.apply(-h)) - (v.apply(2 * h) - v.apply(-2 * h))) / (12 * h);
                assertEquals(found[axis], -slope, 1e-7 * scale + 1e-11 + rough * 0.1, () -> form + " at " + List.of(p[0], p[1], p[2]));
            }
        }
        assertTrue(tried >= 40, tried + " places");
    }

    /** Second difference of the field over h: small where it is smooth. */
    private static double roughness(ClosedForm form, double[] p, double h) {
        double worst = 0;
        Closed mid = form.at(p[0], p[1], p[2]);
        for (int a = 0; a < 3; a++) {
            Closed up = form.at(p[0] + (a == 0 ? 2 * h : 0), p[1] + (a == 1 ? 2 * h : 0), p[2] + (a == 2 ? 2 * h : 0));
            Closed down = form.at(p[0] - (a == 0 ? 2 * h : 0), p[1] - (a == 1 ? 2 * h : 0), p[2] - (a == 2 ? 2 * h : 0));
            worst = Math.max(worst, Math.hypot(Math.hypot(up.ex() + down.ex() - 2 * mid.ex(), up.ey() + down.ey() - 2 * mid.ey()),
                    up.ez() + down.ez() - 2 * mid.ez()));
        }
        return worst;
    }

    static Stream<Arguments> wholesAndParts() {
        return Stream.of(
                Arguments.of(new Rod(-1, 2, 0.5, 0.3), List.of(new Rod(-1, 0.25, 0.5, 0.3), new Rod(0.25, 2, 0.5, 0.3))),
                Arguments.of(ELL, List.of(Polygon.rectangle(0, 1, 0, 1, 0.7, 0, 0), Polygon.rectangle(0, 1, 1, 2, 0.7, 0, 0),
                        Polygon.rectangle(1, 3, 0, 1, 0.7, 0, 0))),
                Arguments.of(new Polygon(new double[] {0, 2, 2, 0}, new double[] {0, 0, 1, 1}, 0.2, 0.5, -0.4), List.of(
                        new Polygon(new double[] {0, 2, 0}, new double[] {0, 0, 1}, 0.2, 0.5, -0.4),
                        new Polygon(new double[] {2, 0, 2}, new double[] {1, 1, 0}, 0.2, 0.5, -0.4))),
                Arguments.of(new Box(0, 1, 0, 2, 0, 1, 0.5, -0.8, 1.1, 0.3), List.of(new Box(0, 1, 0, 2, 0, 0.25, 0.5, -0.8, 1.1, 0.3),
                        new Box(0, 1, 0, 2, 0.25, 1, 0.5, -0.8, 1.1, 0.3))),
                Arguments.of(Box.uniform(0, 1, 0, 2, 0, 1e-3, 1), List.of(Box.uniform(0, 0.5, 0, 2, 0, 1e-3, 1), Box.uniform(0.5, 1, 0, 2, 0, 1e-3, 1))),
                Arguments.of(new Tube(-1, 1, 0.7, 1), List.of(new Tube(-1, 0.9, 0.7, 1), new Tube(0.9, 1, 0.7, 1))),
                Arguments.of(new Cylinder(-1, 1, 0.7, 1), List.of(new Cylinder(-1, 0.9, 0.7, 1), new Cylinder(0.9, 1, 0.7, 1))),
                Arguments.of(Ball.full(1.2, 1), List.of(Ball.full(0.9, 1), new Ball(0.9, 1.2, 1))),
                Arguments.of(new Slab(0, 2, 1), List.of(new Slab(0, 0.5, 1), new Slab(0.5, 2, 1))),
                Arguments.of(new Strip(0, 2, 1), List.of(new Strip(0, 0.5, 1), new Strip(0.5, 2, 1))),
                Arguments.of(new EndlessCylinder(0, 2, 1), List.of(new EndlessCylinder(0, 0.5, 1), new EndlessCylinder(0.5, 2, 1))));
    }

    /** Holds within the sum of the stated errors: a check of the bounds as well as of the forms. */
    @ParameterizedTest
    @MethodSource("wholesAndParts")
    void wholeIsTheSumOfItsParts(ClosedForm whole, List<ClosedForm> parts) {
        Random random = new Random(5);
        boolean sharesZero = !(whole instanceof Slab);
        for (int i = 0; i < 200; i++) {
            double r = Math.pow(10, -2 + 4 * random.nextDouble());
            double x = r * random.nextGaussian();
            double y = r * random.nextGaussian();
            double z = r * random.nextGaussian();
            Closed all = whole.at(x, y, z);
            double ex = 0;
            double ey = 0;
            double ez = 0;
            double v = 0;
            double errE = all.errE();
            double errV = all.errV();
            for (ClosedForm part : parts) {
                Closed one = part.at(x, y, z);
                ex += one.ex();
                ey += one.ey();
                ez += one.ez();
                v += one.v();
                errE += one.errE() + EPS * one.fieldLength();
                errV += one.errV() + EPS * Math.abs(one.v());
            }
            String where = whole + " at " + x + ", " + y + ", " + z;
            assertEquals(0, Math.hypot(Math.hypot(ex - all.ex(), ey - all.ey()), ez - all.ez()), errE, where);
            if (sharesZero) {
                assertEquals(all.v(), v, errV, where);
            }
        }
    }

    /**
     * Random bodies of aspect ratios 1e-4 to 1e4 cut in two: whole and parts hand over at different places, so this sets one route
     * against another. The place is taken as exact, so only the forms' own rounding is allowed for.
     */
    @ParameterizedTest
    @ValueSource(strings = {"rod", "rectangle", "box", "tube", "cylinder", "strip"})
    void wholeIsTheSumOfRandomParts(String kind) {
        Random random = new Random(41);
        double worst = 0;
        for (int i = 0; i < 1500; i++) {
            double a = Math.pow(10, 4 * random.nextDouble() - 2);
            double b = Math.pow(10, 4 * random.nextDouble() - 2);
            double c = Math.pow(10, 4 * random.nextDouble() - 2);
            double cut = a * random.nextDouble();
            double slope = random.nextBoolean() ? 0 : random.nextGaussian();
            DoubleFunction<DoubleFunction<ClosedForm>> make = from -> to -> make(kind, from, to, b, c, slope);
            double gap = Math.pow(10, 7 * random.nextDouble() - 5) * Math.max(a, b);
            double[] anchor = anchor(kind, random, a, b, c);
            double x = anchor[0] + gap * random.nextGaussian();
            double y = anchor[1] + gap * random.nextGaussian();
            double z = anchor[2] + gap * random.nextGaussian();
            ClosedForm whole = make.apply(0).apply(a);
            Closed all = whole.at(x, y, z, 0);
            Closed one = make.apply(0).apply(cut).at(x, y, z, 0);
            Closed two = make.apply(cut).apply(a).at(x, y, z, 0);
            double d = Math.hypot(Math.hypot(one.ex() + two.ex() - all.ex(), one.ey() + two.ey() - all.ey()), one.ez() + two.ez() - all.ez());
            double dv = Math.abs(one.v() + two.v() - all.v());
            double errE = all.errE() + one.errE() + two.errE() + EPS * (one.fieldLength() + two.fieldLength());
            double errV = all.errV() + one.errV() + two.errV() + EPS * (Math.abs(one.v()) + Math.abs(two.v()));
            worst = Math.max(worst, Math.max(d / errE, dv / errV));
            assertEquals(0, d, errE, () -> "E of " + whole + " cut at " + cut + " seen from " + List.of(x, y, z));
            assertEquals(0, dv, errV, () -> "V of " + whole + " cut at " + cut + " seen from " + List.of(x, y, z));
        }
        System.out.printf(java.util.Locale.ROOT, "%s in two parts: worst difference/stated %.2g%n", kind, worst);
    }

    private static ClosedForm make(String kind, double from, double to, double b, double c, double slope) {
        switch (kind) {
            case "rod":
                return new Rod(from, to, 1, slope);
            case "rectangle":
                return Polygon.rectangle(from, to, 0, b, 1, slope, 0.3 * slope);
            case "box":
                return new Box(from, to, 0, b, 0, c, 1, slope, 0.3 * slope, -slope);
            case "tube":
                return new Tube(from, to, b, 1);
            case "cylinder":
                return new Cylinder(from, to, b, 1);
            default:
                return new Strip(from, to, 1);
        }
    }

    /** A point of the body's edges or surface. */
    private static double[] anchor(String kind, Random random, double a, double b, double c) {
        double w = random.nextInt(3) * 0.5;
        double f = 7 * random.nextDouble();
        switch (kind) {
            case "rod":
                return new double[] {0, 0, a * w};
            case "tube":
            case "cylinder":
                return new double[] {b * Math.cos(f), b * Math.sin(f), a * w};
            default:
                return new double[] {a * w, b * random.nextDouble(), kind.equals("box") ? c * random.nextInt(2) : 0};
        }
    }

    static Stream<Arguments> limits() {
        double far = 1e7;
        double close = 20 / far;
        return Stream.of(
                Arguments.of(Rod.uniform(-far, far, 0.8), new EndlessLine(0.8), close),
                Arguments.of(Rod.uniform(0, far, 0.8), new HalfEndlessLine(0.8), close),
                Arguments.of(new Disc(far, 0.6), new EndlessPlane(0.6), close),
                Arguments.of(Polygon.rectangle(-far, far, -far, far, 0.6, 0, 0), new EndlessPlane(0.6), close),
                Arguments.of(Polygon.rectangle(-0.5, 1.5, -far, far, 0.9, 0, 0), new Strip(-0.5, 1.5, 0.9), close),
                Arguments.of(Box.uniform(-far, far, -far, far, -0.5, 1, 0.7), new Slab(-0.5, 1, 0.7), 1e-6),
                Arguments.of(new Tube(-far, far, 1.1, 0.4), new EndlessTube(1.1, 0.4), close),
                Arguments.of(new Cylinder(-far, far, 1.1, 0.4), new EndlessCylinder(0, 1.1, 0.4), 1e-6));
    }

    @ParameterizedTest
    @MethodSource("limits")
    void longBodiesTendToEndlessOnes(ClosedForm large, ClosedForm endless, double close) {
        Random random = new Random(3);
        for (int i = 0; i < 60; i++) {
            double x = 2 * random.nextGaussian();
            double y = 2 * random.nextGaussian();
            double z = 2 * random.nextGaussian();
            Closed a = large.at(x, y, z);
            Closed b = endless.at(x, y, z);
            double d = Math.hypot(Math.hypot(a.ex() - b.ex(), a.ey() - b.ey()), a.ez() - b.ez());
            assertEquals(0, d, close * (1 + b.fieldLength()) + Math.min(a.errE(), 1e-6) + b.errE(), () -> large + " at " + List.of(x, y, z));
        }
    }

    @Test
    void aHoleIsCutByASlit() {
        Polygon frame = Polygon.uniform(new double[] {0, 4, 4, 0, 0, 1, 1, 2, 2, 1}, new double[] {0, 0, 4, 4, 0, 1, 2, 2, 1, 1}, 1);
        Polygon all = Polygon.rectangle(0, 4, 0, 4, 1, 0, 0);
        Polygon hole = Polygon.rectangle(1, 2, 1, 2, 1, 0, 0);
        for (double h : new double[] {1e-6, 0.3, 50}) {
            Closed a = frame.at(1.7, 1.2, h);
            Closed b = all.at(1.7, 1.2, h);
            Closed c = hole.at(1.7, 1.2, h);
            assertEquals(b.ex() - c.ex(), a.ex(), 1e-13);
            assertEquals(b.ez() - c.ez(), a.ez(), 1e-13);
            assertEquals(b.v() - c.v(), a.v(), 1e-13);
        }
    }

    static Stream<Arguments> surfacePlaces() {
        return Stream.of(
                Arguments.of(new Polygon(new double[] {0, 2, 0.4}, new double[] {0, 0.2, 1.7}, 0.5, -0.8, 1.1), 0.7, 0.5, 0.0, 0.5 - 0.56 + 0.55),
                Arguments.of(ELL, 0.5, 1.5, 0.0, 0.7),
                Arguments.of(new Disc(1.25, 0.8), 0.5, -0.7, 0.0, 0.8),
                Arguments.of(new SphericalShell(1.5, 0.7), 0.9, 0.0, 1.2, 0.7),
                Arguments.of(new Tube(-1, 0.5, 1.5, 1.3), 0.9, 1.2, 0.1, 1.3),
                Arguments.of(new EndlessPlane(-0.6), 5.0, 4.0, 0.0, -0.6),
                Arguments.of(new Strip(-0.5, 1.5, 0.9), 0.3, 7.0, 0.0, 0.9),
                Arguments.of(new EndlessTube(1.5, 0.4), 0.9, -1.2, 3.0, 0.4));
    }

    @ParameterizedTest
    @MethodSource("surfacePlaces")
    void onSurfacesMeanAndJumpGiveBothSides(ClosedForm form, double x, double y, double z, double density) {
        Closed on = form.at(x, y, z);
        assertEquals(Closed.Status.ON_SURFACE, on.status());
        assertEquals(4 * Math.PI * density, on.jump(), 1e-14);
        Closed.Direction n = on.direction();
        assertEquals(1, n.x() * n.x() + n.y() * n.y() + n.z() * n.z(), 1e-14);
        for (int side : new int[] {-1, 1}) {
            double g = side * 1e-9;
            Closed beside = form.at(x + g * n.x(), y + g * n.y(), z + g * n.z());
            assertEquals(Closed.Status.REGULAR, beside.status());
            double half = side * on.jump() / 2;
            assertEquals(beside.ex(), on.ex() + half * n.x(), 1e-7);
            assertEquals(beside.ey(), on.ey() + half * n.y(), 1e-7);
            assertEquals(beside.ez(), on.ez() + half * n.z(), 1e-7);
            assertEquals(beside.v(), on.v(), 1e-7);
        }
    }

    static Stream<Arguments> edgePlaces() {
        return Stream.of(
                Arguments.of(Polygon.rectangle(0, 2, -1, 0.5, 0.8, 0, 0), 2.0, 0.1, 0.0, 1.0, 0.0, 0.0),
                Arguments.of(Polygon.rectangle(0, 2, -1, 0.5, -0.8, 0, 0), 2.0, 0.1, 0.0, -1.0, 0.0, 0.0),
                Arguments.of(Polygon.rectangle(0, 2, -1, 0.5, 0.8, 0, 0), 2.0, 0.5, 0.0, Math.sqrt(0.5), Math.sqrt(0.5), 0.0),
                Arguments.of(new Disc(1.25, 0.8), 0.75, -1.0, 0.0, 0.6, -0.8, 0.0),
                Arguments.of(new Tube(-1, 0.5, 1.25, 0.8), 0.75, -1.0, 0.5, 0.0, 0.0, 1.0),
                Arguments.of(new Tube(-1, 0.5, 1.25, 0.8), 0.75, -1.0, -1.0, 0.0, 0.0, -1.0),
                Arguments.of(new Strip(-0.5, 1.5, 0.9), -0.5, 3.0, 0.0, -1.0, 0.0, 0.0));
    }

    @ParameterizedTest
    @MethodSource("edgePlaces")
    void onEdgesTheGrowingComponentIsNamed(ClosedForm form, double x, double y, double z, double nx, double ny, double nz) {
        Closed on = form.at(x, y, z);
        assertEquals(Closed.Status.UNBOUNDED, on.status());
        assertEquals(nx, on.direction().x(), 1e-14);
        assertEquals(ny, on.direction().y(), 1e-14);
        assertEquals(nz, on.direction().z(), 1e-14);
        assertEquals(Double.POSITIVE_INFINITY, on.errE());
        // a thousand times nearer: that component grows by ln 1000 times a factor, the potential tends to the stated one
        Closed near = form.at(x + 1e-6 * nx, y + 1e-6 * ny, z + 1e-6 * nz);
        Closed nearer = form.at(x + 1e-9 * nx, y + 1e-9 * ny, z + 1e-9 * nz);
        double growth = (nearer.ex() - near.ex()) * nx + (nearer.ey() - near.ey()) * ny + (nearer.ez() - near.ez()) * nz;
        assertTrue(growth > 0.5 * Math.log(1000), () -> "growth " + growth);
        assertEquals(on.v(), nearer.v(), 1e-7);
        assertTrue(on.errV() < 1e-12);
    }

    @Test
    void onLinesFieldAndPotentialAreUnbounded() {
        for (ClosedForm form : List.of(Rod.uniform(-1, 1, 0.5), new HalfEndlessLine(0.5), new EndlessLine(0.5))) {
            Closed on = form.at(0, 0, 0.5);
            assertEquals(Closed.Status.UNBOUNDED, on.status());
            assertEquals(Double.POSITIVE_INFINITY, on.v());
            assertEquals(Closed.Direction.NONE, on.direction());
        }
        assertEquals(Double.NEGATIVE_INFINITY, new Ring(1, -0.5).at(0.6, 0.8, 0).v());
        assertEquals(Closed.Status.REGULAR, Rod.uniform(-1, 1, 0.5).at(0, 0, 1.5).status());
        assertEquals(Math.log(5) * 0.5, Rod.uniform(-1, 1, 0.5).at(0, 0, 1.5).v(), 1e-15); // ln(2.5/0.5)
    }

    @Test
    void vanishingDensityKeepsTheFieldFiniteOnASide() {
        Closed on = Polygon.rectangle(0, 2, 0, 1, 0, 1, 0).at(0, 0.4, 0);
        Closed near = Polygon.rectangle(0, 2, 0, 1, 0, 1, 0).at(-1e-10, 0.4, 0);
        assertEquals(Closed.Status.REGULAR, on.status());
        assertEquals(near.ex(), on.ex(), 1e-8);
        assertEquals(near.ey(), on.ey(), 1e-8);
        assertTrue(on.errE() < 1e-12, () -> "errE " + on.errE());
        Closed rod = new Rod(-1, 1, 0, 1).at(0, 0, 0); // density through zero: V finite, E grows along the rod
        assertEquals(Closed.Status.UNBOUNDED, rod.status());
        assertEquals(-1, rod.direction().z());
        assertEquals(0, rod.v(), 1e-15);
    }

    @ParameterizedTest
    @MethodSource("finiteBodies")
    void noStepAtAnyHandOver(Body body) {
        // along rays from the middle the field changes by no more than gradient times step and the stated errors
        Random random = new Random(23);
        for (int ray = 0; ray < 6; ray++) {
            double[] u = {random.nextGaussian(), random.nextGaussian(), random.nextGaussian()};
            double l = Math.sqrt(u[0] * u[0] + u[1] * u[1] + u[2] * u[2]);
            for (double r = 2.7; r < 12; r *= 1.01) {
                double s = r / l;
                double t = r * (1 + 1e-9) / l;
                Closed a = body.form.at(s * u[0], s * u[1], s * u[2]);
                Closed b = body.form.at(t * u[0], t * u[1], t * u[2]);
                double d = Math.hypot(Math.hypot(a.ex() - b.ex(), a.ey() - b.ey()), a.ez() - b.ez());
                assertEquals(0, d, a.errE() + b.errE() + 2e-8 * a.fieldLength(), body.form::toString);
                double dv = Math.abs(a.v() - b.v());
                assertEquals(0, dv, a.errV() + b.errV() + 2e-9 * r * a.fieldLength(), body.form::toString);
            }
        }
    }

    @ParameterizedTest
    @ValueSource(doubles = {1e-9, 1e-3, 1e6})
    void sizesScale(double k) {
        Closed a = Box.uniform(0, 1, 0, 2, 0, 3, 1).at(1.5, 0.3, 0.4);
        Closed b = Box.uniform(0, k, 0, 2 * k, 0, 3 * k, 1).at(1.5 * k, 0.3 * k, 0.4 * k);
        assertEquals(a.ex() * k, b.ex(), 1e-13 * k * a.fieldLength());
        assertEquals(a.v() * k * k, b.v(), 1e-13 * k * k * a.v());
        Closed c = new Cylinder(0, 1, 0.5, 1).at(0.6, 0.3, 0.4);
        Closed d = new Cylinder(0, k, 0.5 * k, 1).at(0.6 * k, 0.3 * k, 0.4 * k);
        assertEquals(c.ex() * k, d.ex(), 1e-13 * k * c.fieldLength());
        assertEquals(c.v() * k * k, d.v(), 1e-13 * k * k * c.v());
    }

    @ParameterizedTest
    @MethodSource("allForms")
    void badPlacesAreRefused(ClosedForm form) {
        assertThrows(IllegalArgumentException.class, () -> form.at(Double.NaN, 0, 0));
        assertThrows(IllegalArgumentException.class, () -> form.at(0, Double.POSITIVE_INFINITY, 0));
        assertThrows(IllegalArgumentException.class, () -> form.at(0, 0, 1e300));
        assertThrows(IllegalArgumentException.class, () -> form.at(0, 0, 1, -1));
        Closed far = form.at(1e80, 1e80, -1e80);
        assertTrue(Double.isFinite(far.v()) && Double.isFinite(far.ex()), far::toString);
    }

    /** Every combination of the bodies' own coordinates, their neighbours and tiny numbers, with and without rounding of the place. */
    @ParameterizedTest
    @MethodSource("allForms")
    void specialPlacesGiveNumbersOrSayUnbounded(ClosedForm form) {
        double[] own = {0, -0.0, 1e-200, -1e-17, 0.25, 0.5, -0.5, 0.6, 0.7, -0.7, 0.75, 0.8, 1, -1, 1.1, 1.25, -1.25, 1.5, 2, 3, Math.nextUp(1.25),
            Math.nextDown(0.5), 1e-9, 1e9};
        for (double x : own) {
            for (double y : own) {
                for (double z : own) {
                    check(form, form.at(x, y, z), x, y, z);
                    check(form, form.at(x, y, z, 0), x, y, z);
                }
            }
        }
    }

    private static void check(ClosedForm form, Closed found, double x, double y, double z) {
        boolean unbounded = found.status() == Closed.Status.UNBOUNDED;
        boolean good = Double.isFinite(found.ex()) && Double.isFinite(found.ey()) && Double.isFinite(found.ez())
                && (unbounded ? found.errE() == Double.POSITIVE_INFINITY && !Double.isNaN(found.v()) && !Double.isNaN(found.errV())
                        : Double.isFinite(found.v()) && found.errE() >= 0 && found.errV() >= 0 && found.errV() < 1e300);
        assertTrue(good, () -> form + " at " + List.of(x, y, z) + ": " + found);
    }

    @Test
    void badBodiesAreRefusedByName() {
        String text = assertThrows(IllegalArgumentException.class, () -> new Ring(-0.05, 1)).getMessage();
        assertTrue(text.startsWith("ring radius = -0.05"), text);
        assertThrows(IllegalArgumentException.class, () -> new Rod(1, 1, 1, 0));
        assertThrows(IllegalArgumentException.class, () -> new Disc(1, Double.NaN));
        assertThrows(IllegalArgumentException.class, () -> new Ball(2, 1, 1));
        assertThrows(IllegalArgumentException.class, () -> Polygon.uniform(new double[] {0, 1, 2}, new double[] {0, 1, 2}, 1));
        String crossing = assertThrows(IllegalArgumentException.class,
                () -> Polygon.uniform(new double[] {0, 2, 2, 0}, new double[] {0, 1, 0, 1.5}, 1)).getMessage();
        assertTrue(crossing.startsWith("polygon sides 1 and 3 cross"), crossing);
        assertThrows(IllegalArgumentException.class, () -> Polygon.uniform(new double[] {0, 1}, new double[] {0, 1}, 1));
        assertThrows(IllegalArgumentException.class, () -> Box.uniform(0, 1, 2, 1, 0, 1, 1));
    }
}

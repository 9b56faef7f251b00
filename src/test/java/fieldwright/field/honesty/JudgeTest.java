package fieldwright.field.honesty;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** The judge itself, against closed forms, high-precision values and its own other routes; bare integrals, no constant in front. */
class JudgeTest {
    private static final SmoothDensity ONE = (x, y, z) -> 1;
    private static final SmoothDensity PARABOLA = (x, y, z) -> 1 - x * x - y * y;
    private static final double[] STAY = new double[3];
    private static final String BENCH = "own work items, 30 digits by two routes (mpmath)";
    private static final double NAN = Double.NaN;

    private static Answer ask(Charged charged, SmoothDensity density, double[] at, double[] push, DoubleExponential.Setting setting) {
        return charged.judge(density, false, Exact.Position.of(at[0], at[1], at[2]), push, setting);
    }

    static Stream<Arguments> known() {
        Charged disc = new Charged.Annulus(0, 1);
        Charged drum = Charged.Round.drum(0, 1, 0, 1);
        double ball = 4 * Math.PI / 3;
        return Stream.of(
                Arguments.of("A helix", new Charged.Coil(1, 0.2, 0, 4 * Math.PI), (SmoothDensity) (x, y, z) -> 1 + z / 0.4,
                        at(1.05 * Math.cos(5), 1.05 * Math.sin(5), 1), at(42.001155780190503389, -148.0549969012411036, -9.5366103519578599776), 3e-14, BENCH),
                Arguments.of("B1 disc", disc, PARABOLA, at(0.3, 0, 1), at(NAN, NAN, 1.0144423024112047515), 1e-14, BENCH),
                Arguments.of("B2 disc", disc, PARABOLA, at(0.3, 0, 0.1), at(NAN, NAN, 4.6670088532124423482), 1e-14, BENCH),
                Arguments.of("B3 disc", disc, PARABOLA, at(0.3, 0, 0.01), at(NAN, NAN, 5.6020187179846460313), 1e-14, BENCH),
                Arguments.of("B4 disc", disc, PARABOLA, at(0.3, 0, 0.001), at(NAN, NAN, 5.7060182423406414001), 1e-14, BENCH),
                Arguments.of("B5 disc", disc, PARABOLA, at(0.3, 0, 1e-6), at(NAN, NAN, 5.7176869365995107297), 1e-14, BENCH),
                Arguments.of("B5 by rings", new Charged.Frustum(0, 0, 1, 0, null), PARABOLA, at(0.3, 0, 1e-6), at(NAN, NAN, 5.7176869365995107297), 1e-14, BENCH),
                Arguments.of("C rectangle", new Charged.Rectangle(0, 1, 0, 2), (SmoothDensity) (x, y, z) -> x * y * y + 1, at(0.4, 0.7, 1e-4),
                        at(-2.0488671680262283695, NAN, 7.5137457751148939088), 1e-14, BENCH),
                Arguments.of("D1 drum", drum, PARABOLA, at(0.3, 0, 2), at(0.10503650072781841357, 0, 0.59379639912978756608), 2e-14, BENCH),
                Arguments.of("D2 drum", drum, PARABOLA, at(0.3, 0, 0.4), at(1.097898822915598825, 0, -0.44162101358693521213), 1e-14, BENCH),
                Arguments.of("D3 drum", drum, PARABOLA, at(0.3, 0, 1), at(0.74318296651781420481, 0, 2.5686395353226394039), 1e-14, BENCH),
                Arguments.of("E heap", Charged.Round.heap(1, 1), (SmoothDensity) (x, y, z) -> 1 + x, at(2, 1, 0.5),
                        at(0.32023734737446318155, 0.17187948861839938375, -0.036089762692556559735), 1e-14, BENCH),
                Arguments.of("ball outside", Charged.Round.shell(0, 1, false), ONE, at(0, 0.6, 1.6), at(0, ball * 0.6 / Math.pow(2.92, 1.5), ball * 1.6 / Math.pow(2.92, 1.5)),
                        1e-14, "point charge at the centre (Newton)"),
                Arguments.of("ball inside", Charged.Round.shell(0, 1, false), ONE, at(0.3, 0, 0.4), at(ball * 0.3, 0, ball * 0.4), 1e-14, "4πρr/3 (Gauss)"),
                Arguments.of("ball near", Charged.Round.shell(0, 1, false), ONE, at(0, 0, 1 + 1e-8), at(0, 0, ball / ((1 + 1e-8) * (1 + 1e-8))), 1e-14, "Newton"),
                Arguments.of("upper and whole half", Charged.Round.shell(0, 1, true), ONE, at(0, 0, 0), at(0, 0, -Math.PI), 1e-14,
                        "−∫cosθ dΩ over a half space of rays, each of length 1: −π"),
                Arguments.of("disc on axis", disc, ONE, at(0, 0, 0.5), at(0, 0, 2 * Math.PI * (1 - 0.5 / Math.sqrt(1.25))), 1e-14, "2π(1 − z/√(z²+R²)), textbook"),
                Arguments.of("rod", new Charged.Rod(-0.5, 0.5), ONE, at(1e-8, 0, 0.2),
                        at((0.3 / Math.sqrt(0.09 + 1e-16) + 0.7 / Math.sqrt(0.49 + 1e-16)) / 1e-8, 0, 1 / Math.sqrt(0.09 + 1e-16) - 1 / Math.sqrt(0.49 + 1e-16)),
                        1e-14, "finite rod, textbook"),
                Arguments.of("ring on axis", new Charged.Coil(1, 0, 0, 2 * Math.PI), ONE, at(0, 0, 0.75), at(0, 0, 2 * Math.PI * 0.75 / Math.pow(1.5625, 1.5)), 1e-14, "textbook"),
                Arguments.of("sphere just outside", new Charged.Zone(1, 0, Math.PI), ONE, at(0, 0, 1 + 1e-8), at(0, 0, 4 * Math.PI / ((1 + 1e-8) * (1 + 1e-8))), 1e-14, "Newton"),
                Arguments.of("sphere just inside", new Charged.Zone(1, 0, Math.PI), ONE, at(0, 0, 1 - 1e-8), at(0, 0, 0), 2e-14, "Newton: no field inside"),
                Arguments.of("cone at its apex", Charged.Round.cone(0.5, 0, 1), ONE, at(0, 0, 0), at(0, 0, -2 * Math.PI * (1 - 2 / Math.sqrt(5))), 1e-14,
                        "rays of length 1/cosθ up to tanθ = 1/2: 2π(1 − cosθ)"),
                Arguments.of("box at a face", new Charged.Box(at(-0.5, -0.5, -0.5), at(0.5, 0.5, 0.5)), ONE, at(0.5, 0, 0), at(boxFace(), 0, 0), 1e-14,
                        "sum over sheets of a closed solid-angle form, see boxFace"));
    }

    private static double[] at(double x, double y, double z) {
        return new double[] {x, y, z};
    }

    /** Field of sheets x' = −½ … ½ on the axis of their squares, solid angle 4 asin(1/(1+4d²)) for side 1, added up by Simpson's rule. */
    private static double boxFace() {
        int n = 20000;
        double sum = 0;
        for (int i = 0; i <= n; i++) {
            double d = (double) i / n;
            double angle = 4 * Math.asin(1 / (1 + 4 * d * d));
            sum += (i == 0 || i == n ? 1 : i % 2 == 1 ? 4 : 2) * angle;
        }
        return sum / (3.0 * n);
    }

    @ParameterizedTest(name = "{0}")
    @MethodSource("known")
    void knownValues(String name, Charged charged, SmoothDensity density, double[] at, double[] expected, double tolerance, String source) {
        for (DoubleExponential.Setting setting : List.of(DoubleExponential.Setting.FIRST, DoubleExponential.Setting.SECOND)) {
            Answer a = ask(charged, density, at, STAY, setting);
            double scale = Math.max(a.field(), a.fieldMagnitude());
            for (int c = 0; c < 3; c++) {
                if (!Double.isNaN(expected[c])) {
                    assertEquals(expected[c], a.value()[c], tolerance * scale, source);
                }
            }
        }
    }

    /** Seen as rays from the place or from the body's middle, as slices or as rings: the same numbers. */
    @Test
    void routesAgree() {
        SmoothDensity f = (x, y, z) -> Math.exp(x - y) * Math.cos(2 * z);
        double[] far = at(1.2, 2.4, 0.9);
        double[] middle = at(0, 0, 0.5);
        List<RayBody.Quadric> faces = List.of(RayBody.Quadric.cylinder(1, false), RayBody.Quadric.above(0), RayBody.Quadric.below(1));
        List<RayBody.Rim> rims = List.of(new RayBody.Rim(1, 0), new RayBody.Rim(1, 1));
        same(RayJudge.judge(RayBody.revolution(far, faces, rims, false), f, 30, DoubleExponential.Setting.FIRST),
                RayJudge.fromAfar(RayBody.revolution(middle, faces, rims, false), f, far, DoubleExponential.Setting.FIRST));
        for (double gap : new double[] {1e-8, 1e-3, 0.4}) {
            double[] near = at(0.9, 0.2, gap);
            same(ask(new Charged.Annulus(0.3, 1), f, near, STAY, DoubleExponential.Setting.FIRST),
                    ask(new Charged.Frustum(0.3, 0, 1, 0, null), f, near, STAY, DoubleExponential.Setting.FIRST));
        }
        double[] slim = at(1 + 1e-6, 0.1, 0.3);
        Answer parts = ask(Charged.Round.drum(0, 0.6, -0.001, 0.001), f, slim, STAY, DoubleExponential.Setting.FIRST)
                .plus(ask(Charged.Round.drum(0.6, 1, -0.001, 0.001), f, slim, STAY, DoubleExponential.Setting.FIRST));
        same(ask(Charged.Round.drum(0, 1, -0.001, 0.001), f, slim, STAY, DoubleExponential.Setting.FIRST), parts);
        // the same ball with its axis through the place and along z
        double[] out = at(0.9, 0.7, 0.3);
        List<RayBody.Quadric> ball = List.of(RayBody.Quadric.sphere(1, false));
        same(RayJudge.judge(RayBody.revolution(out, ball, List.of(), true), f, 30, DoubleExponential.Setting.FIRST),
                RayJudge.judge(RayBody.revolution(out, ball, List.of(), false), f, 30, DoubleExponential.Setting.FIRST));
    }

    private static void same(Answer a, Answer b) {
        assertTrue(a.fieldDifference(b) <= 5e-14 * a.fieldMagnitude(), () -> a.fieldDifference(b) / a.fieldMagnitude() + " relative");
        assertEquals(a.value()[3], b.value()[3], 5e-14 * a.magnitude()[3]);
    }

    /** E = −grad V at random problems of every kind: field and potential have separate weights and must belong together. */
    @Test
    void fieldIsTheGradient() {
        int asked = 0;
        for (int number = 0; asked < 8; number++) {
            Problem p = Problem.of(77, number);
            if (p.where() != Problem.Where.MID || p.parts().size() > 1 || p.dimension() == 3 && asked % 4 != 0) {
                continue;
            }
            asked++;
            double h = 2e-3 * p.gap();
            Answer here = p.judge(0, DoubleExponential.Setting.FIRST);
            for (int c = 0; c < 3; c++) {
                double[] v = new double[4];
                for (int k = 0; k < 4; k++) {
                    double[] at = p.at().clone();
                    at[c] += (k < 2 ? k - 2 : k - 1) * h;
                    Problem q = new Problem(number, p.kind(), p.where(), p.spec(), p.density(), p.parts(), p.placing(), at, p.normal(), p.gap(),
                            p.size(), p.thickness());
                    v[k] = q.judge(0, DoubleExponential.Setting.FIRST).value()[3];
                }
                double slope = (v[0] - 8 * v[1] + 8 * v[2] - v[3]) / (12 * h);
                assertEquals(here.value()[c], -slope, 1e-7 * here.fieldMagnitude() + 1e-12 * here.magnitude()[3] / h, p::toString);
            }
        }
    }
}

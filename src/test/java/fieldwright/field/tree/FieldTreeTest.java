package fieldwright.field.tree;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.StoppedException;
import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/** Reference: Coulomb's law charge by charge, or the closed form of a rod side by side, in compensated sums. */
class FieldTreeTest {
    private static final Workers ONE = new Workers(1, part -> { });

    /** Places and charges of several kinds; seeds fixed. */
    private static double[][] cloud(String kind, int n, int seed) {
        Random r = new Random(seed);
        double[][] s = new double[4][n];
        for (int i = 0; i < n; i++) {
            double[] p = {r.nextDouble(), r.nextDouble(), r.nextDouble()};
            double q = 0.5 + r.nextDouble();
            switch (kind) {
                case "neutral" -> q = i % 2 == 0 ? q : -q;
                case "sphere" -> {
                    double[] g = {r.nextGaussian(), r.nextGaussian(), r.nextGaussian()};
                    double l = Math.sqrt(g[0] * g[0] + g[1] * g[1] + g[2] * g[2]);
                    p = new double[] {3e4 + 7 * g[0] / l, -2e4 + 7 * g[1] / l, 7 * g[2] / l};
                }
                case "nested" -> {
                    double scale = Math.pow(10, -6 * r.nextDouble());
                    p = new double[] {scale * p[0], scale * p[1], scale * p[2]};
                }
                case "line" -> p = new double[] {1e-3 * p[0], 1e-3 * p[0] * p[0], 0};
                case "lattice" -> {
                    int side = (int) Math.ceil(Math.cbrt(n));
                    int a = i % side;
                    int b = i / side % side;
                    int c = i / side / side;
                    p = new double[] {a, b, c};
                    q = (a + b + c) % 2 == 0 ? 1 : -1;
                }
                default -> { }
            }
            for (int k = 0; k < 3; k++) {
                s[k][i] = p[k];
            }
            s[3][i] = 1e-12 * q;
        }
        return s;
    }

    /** Among the charges, at their border, close to some of them, and far away. */
    private static double[][] targets(double[][] s, int n) {
        Random r = new Random(99);
        double[][] t = new double[3][n];
        for (int i = 0; i < n; i++) {
            int a = r.nextInt(s[0].length);
            int b = r.nextInt(s[0].length);
            double away = i % 3 == 0 ? 0.3 : i % 3 == 1 ? 1e-5 : 4;
            for (int k = 0; k < 3; k++) {
                t[k][i] = s[k][a] + away * (s[k][b] - s[k][a]) * (0.5 + r.nextDouble());
            }
        }
        return t;
    }

    static Stream<Arguments> clouds() {
        List<Arguments> all = new ArrayList<>();
        for (String kind : List.of("even", "neutral", "sphere", "nested", "line", "lattice")) {
            for (double relative : new double[] {1e-3, 1e-6, 1e-9, 1e-12}) {
                all.add(Arguments.of(kind, relative));
            }
        }
        return all.stream();
    }

    @ParameterizedTest(name = "{0} to {1}")
    @MethodSource("clouds")
    void theStatedErrorIsTrueAndMeetsTheAccuracy(String kind, double relative) {
        double[][] s = cloud(kind, 3000, 7);
        double[][] t = targets(s, 120);
        FieldTree tree = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), relative, ONE);
        for (boolean potential : new boolean[] {false, true}) {
            Answers a = potential ? tree.potential(t[0], t[1], t[2], ONE) : tree.field(t[0], t[1], t[2], ONE);
            for (int i = 0; i < t[0].length; i++) {
                double[] exact = direct(s, t[0][i], t[1][i], t[2][i]);
                double error = distance(a, i, potential ? new double[] {exact[3]} : exact);
                double value = potential ? Math.abs(exact[3]) : length(exact);
                assertTrue(error <= a.error()[i], kind + " target " + i + ": error " + error + " stated " + a.error()[i]);
                double gap = exact[4];
                double extent = length(new double[] {t[0][i], t[1][i], t[2][i]}) + 2 * Math.sqrt(3) * reach(s);
                double allowed = relative * Math.max(value, 1.5e-3 * a.size()[i]) + (1e-13 + 8 * Math.ulp(1.0) * extent / gap) * a.size()[i];
                assertTrue(a.error()[i] <= allowed, kind + " target " + i + ": stated " + a.error()[i] + " allowed " + allowed);
            }
        }
    }

    private static double reach(double[][] s) {
        double most = 0;
        for (int k = 0; k < 3; k++) {
            for (double v : s[k]) {
                most = Math.max(most, Math.abs(v));
            }
        }
        return most;
    }

    private static double distance(Answers a, int i, double[] exact) {
        double sum = 0;
        for (int k = 0; k < a.value().length; k++) {
            double d = a.value()[k][i] - exact[k];
            sum += d * d;
        }
        return Math.sqrt(sum);
    }

    private static double length(double[] v) {
        return Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    }

    /** E_x, E_y, E_z, V and the distance of the nearest charge; each sum compensated (Neumaier 1974). */
    private static double[] direct(double[][] s, double x, double y, double z) {
        double[] sum = new double[4];
        double[] low = new double[4];
        double nearest = Double.POSITIVE_INFINITY;
        for (int j = 0; j < s[0].length; j++) {
            double[] d = {x - s[0][j], y - s[1][j], z - s[2][j]};
            double r = length(d);
            nearest = Math.min(nearest, r);
            for (int k = 0; k < 4; k++) {
                add(sum, low, k, k < 3 ? s[3][j] * (d[k] / r) / r / r : s[3][j] / r);
            }
        }
        return new double[] {sum[0] + low[0], sum[1] + low[1], sum[2] + low[2], sum[3] + low[3], nearest};
    }

    private static void add(double[] sum, double[] low, int k, double term) {
        double t = sum[k] + term;
        low[k] += Math.abs(sum[k]) >= Math.abs(term) ? (sum[k] - t) + term : (term - t) + sum[k];
        sum[k] = t;
    }

    @Test
    void aPolylineAgreesWithItsRods() {
        int n = 3000;
        double[][] corner = new double[3][n + 1];
        double[] start = new double[n];
        double[] end = new double[n];
        for (int i = 0; i <= n; i++) {
            double angle = 40 * Math.PI * i / n;
            corner[0][i] = (1 + 0.2 * Math.sin(5 * angle)) * Math.cos(angle);
            corner[1][i] = (1 + 0.2 * Math.sin(5 * angle)) * Math.sin(angle);
            corner[2][i] = 0.01 * angle;
        }
        for (int e = 0; e < n; e++) {
            start[e] = 1e-9 * Math.cos(7.0 * e / n);
            end[e] = 1e-9 * Math.cos(7.0 * (e + 1) / n);
        }
        Charges line = Charges.polyline(corner[0], corner[1], corner[2], start, end);
        double[][] t = new double[3][120];
        Random r = new Random(5);
        for (int i = 0; i < 120; i++) {
            int c = r.nextInt(n);
            double away = Math.pow(10, -9 * r.nextDouble());
            for (int k = 0; k < 3; k++) {
                t[k][i] = 0.3 * corner[k][c] + 0.7 * corner[k][c + 1] + away * r.nextGaussian();
            }
        }
        FieldTree tree = FieldTree.of(line, 1e-9, ONE);
        Answers field = tree.field(t[0], t[1], t[2], ONE);
        Answers potential = tree.potential(t[0], t[1], t[2], ONE);
        for (int i = 0; i < 120; i++) {
            double[] sum = new double[4];
            double[] low = new double[4];
            double[] side = new double[6];
            double allowed = 0;
            for (int e = 0; e < n; e++) {
                line.sides.closed(e, t[0][i], t[1][i], t[2][i], side);
                for (int k = 0; k < 4; k++) {
                    add(sum, low, k, side[k]);
                }
                allowed += side[4];
            }
            double[] exact = {sum[0] + low[0], sum[1] + low[1], sum[2] + low[2]};
            assertTrue(distance(field, i, exact) <= field.error()[i], "field at target " + i);
            assertTrue(Math.abs(potential.value()[0][i] - sum[3] - low[3]) <= potential.error()[i], "potential at target " + i);
            assertTrue(field.error()[i] <= 1e-9 * Math.max(length(exact), 1.5e-3 * field.size()[i]) + 2 * allowed, "stated at target " + i);
        }
    }

    /** Enough targets for local expansions of boxes on several levels. */
    @Test
    void manyTargetsAreServedByTheirBoxes() {
        double[][] s = cloud("even", 4000, 21);
        double[][] t = targets(s, 30_000);
        FieldTree tree = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), 1e-4, ONE);
        for (boolean potential : new boolean[] {false, true}) {
            Answers a = potential ? tree.potential(t[0], t[1], t[2], ONE) : tree.field(t[0], t[1], t[2], ONE);
            for (int i = 0; i < 30_000; i += 300) {
                double[] exact = direct(s, t[0][i], t[1][i], t[2][i]);
                double error = distance(a, i, potential ? new double[] {exact[3]} : exact);
                assertTrue(error <= a.error()[i], "target " + i + ": error " + error + " stated " + a.error()[i]);
                double value = potential ? Math.abs(exact[3]) : length(exact);
                assertTrue(a.error()[i] <= 1e-4 * Math.max(value, 1.5e-3 * a.size()[i]) + 1e-12 * a.size()[i], "target " + i);
            }
        }
    }

    @Test
    void theSameBitsOnAnyNumberOfThreads() {
        double[][] s = cloud("neutral", 20_000, 3);
        double[][] t = targets(s, 2000);
        Answers one = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), 1e-6, ONE).field(t[0], t[1], t[2], ONE);
        Workers three = new Workers(3, part -> { });
        Answers many = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), 1e-6, three).field(t[0], t[1], t[2], three);
        for (int k = 0; k < 3; k++) {
            assertArrayEquals(one.value()[k], many.value()[k]);
        }
        assertArrayEquals(one.error(), many.error());
    }

    @Test
    void aTargetOnAChargeIsSaidAndSpoilsNoOther() {
        double[][] s = cloud("even", 3000, 11);
        double[][] t = {{s[0][5], 0.5}, {s[1][5], 0.5}, {s[2][5], 0.5}};
        Answers a = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), 1e-9, ONE).field(t[0], t[1], t[2], ONE);
        assertTrue(a.touching()[0]);
        assertFalse(a.touching()[1]);
        double[] exact = direct(s, 0.5, 0.5, 0.5);
        assertTrue(distance(a, 1, exact) <= a.error()[1]);
        assertTrue(a.error()[1] <= 1e-9 * Math.max(length(exact), 1.5e-3 * a.size()[1]) + 1e-13 * a.size()[1]);
    }

    @Test
    void aTargetOnAChargedSideIsSaid() {
        Charges line = Charges.polyline(new double[] {0, 1, 2}, new double[3], new double[3], new double[] {1e-9, 1e-9}, new double[] {1e-9, 1e-9});
        Answers a = FieldTree.of(line, 1e-9, ONE).field(new double[] {0.25, 1, 0.5}, new double[] {0, 0, 1}, new double[3], ONE);
        assertTrue(a.touching()[0] && a.touching()[1]);
        assertFalse(a.touching()[2]);
    }

    @Test
    void fewOrNoChargesAreAnswered() {
        double[] none = {};
        Answers nothing = FieldTree.of(Charges.points(none, none, none, none), 1e-6, ONE).field(new double[] {1}, new double[] {2}, new double[] {3}, ONE);
        assertEquals(0, nothing.value()[0][0]);
        double[] zero = {0};
        Answers one = FieldTree.of(Charges.points(zero, zero, zero, new double[] {2}), 1e-6, ONE).field(new double[] {2}, zero, zero, ONE);
        assertEquals(0.5, one.value()[0][0], 1e-15);
        double[] same = new double[1000];
        double[] ones = new double[1000];
        java.util.Arrays.fill(ones, 1);
        Answers heap = FieldTree.of(Charges.points(same, same, same, ones), 1e-6, ONE).potential(new double[] {4}, zero, zero, ONE);
        assertEquals(250, heap.value()[0][0], 1e-10);
    }

    @Test
    void progressIsToldAndAStopEndsTheWork() {
        double[][] s = cloud("even", 5000, 1);
        double[][] t = targets(s, 3000);
        double[] last = {0};
        Workers told = new Workers(2, part -> {
            assertTrue(part >= last[0] && part <= 1);
            last[0] = part;
        });
        FieldTree tree = FieldTree.of(Charges.points(s[0], s[1], s[2], s[3]), 1e-6, ONE);
        tree.field(t[0], t[1], t[2], told);
        assertTrue(last[0] > 0.5);
        Workers stopping = new Workers(2, part -> Thread.currentThread().interrupt());
        assertThrows(StoppedException.class, () -> tree.field(t[0], t[1], t[2], stopping));
        assertTrue(Thread.interrupted(), "the flag is kept");
    }
}

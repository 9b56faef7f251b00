package fieldwright.field;

import java.util.Random;
import java.util.concurrent.TimeUnit;

import org.apache.commons.math3.analysis.UnivariateFunction;
import org.apache.commons.math3.analysis.integration.IterativeLegendreGaussIntegrator;
import org.apache.commons.math3.exception.TooManyEvaluationsException;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Level;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

import fieldwright.quantity.Place;
import fieldwright.quantity.Vector;

/**
 * Microseconds for the field of a work item at relative 1e-9, by panels alone, at places that vary within 1 %:
 * {@code fresh} from parsed formulas, nothing kept; {@code varied} the same with sizes and coefficients varied; {@code kept} with the
 * panels of earlier places; {@code nested} the same bare integral, one component, by nested adaptive Gauss rules of Commons Math, with
 * its own error control (a million evaluations at most, which it may end with nothing).
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@Fork(value = 1, jvmArgs = "-Xmx1g")
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 3, time = 1)
public class ItemsBench {
    @Param({"A", "B1", "B2", "B3", "B4", "B5", "C", "D1", "D2", "D3", "E"})
    public String item;

    private final Random random = new Random(7);
    private Item.Parsed own;
    private Item.Parsed[] others;
    private FieldSolver keeping;
    private int turn;

    @Setup(Level.Trial)
    public void parse() {
        own = Item.valueOf(item).parsed(0);
        others = new Item.Parsed[64];
        for (int i = 0; i < others.length; i++) {
            others[i] = Item.valueOf(item).parsed(i + 1);
        }
        keeping = FieldSolver.of(own.source(), Accuracy.PANELS);
        keeping.electricField(own.place(0, 0));
        System.out.println(item + ": " + keeping.evaluations() + " evaluations");
    }

    private Place place(Item.Parsed of) {
        return of.place(2 * random.nextDouble() - 1, 2 * random.nextDouble() - 1);
    }

    @Benchmark
    public Vector fresh() {
        return FieldSolver.of(own.source(), Accuracy.PANELS).electricField(place(own));
    }

    @Benchmark
    public Vector varied() {
        Item.Parsed next = others[turn++ % others.length];
        return FieldSolver.of(next.source(), Accuracy.PANELS).electricField(place(next));
    }

    @Benchmark
    public Vector kept() {
        return keeping.electricField(place(own));
    }

    @Benchmark
    public double nested() {
        Place p = place(own);
        try {
            return Nested.of(Item.valueOf(item), p.x(), p.y(), p.z());
        } catch (TooManyEvaluationsException e) {
            return Double.NaN;
        }
    }

    /** The bare integrals as one would write them for a general library; z component, x for the helix. */
    private static final class Nested {
        private static final int MOST = 1_000_000;

        private static double integral(double from, double to, UnivariateFunction f) {
            return new IterativeLegendreGaussIntegrator(7, 1e-10, 1e-300, 2, 30).integrate(MOST, f, from, to);
        }

        static double of(Item item, double x, double y, double z) {
            return switch (item) {
                case A -> integral(0, 4 * Math.PI, t -> {
                    double dx = x - Math.cos(t);
                    double dy = y - Math.sin(t);
                    double dz = z - t / 5;
                    return Math.sqrt(1.04) * (1 + t / 2) * dx / cube(dx, dy, dz);
                });
                case C -> integral(0, 1, a -> integral(0, 2, b -> (a * b * b + 1) * z / cube(x - a, y - b, z)));
                case D1, D2, D3, F -> integral(0, 1, c -> disc(x, y, z - c));
                case E -> integral(-1, 1, a -> {
                    double most = Math.sqrt(1 - a * a);
                    return integral(-most, most, b -> a * a + b * b >= 1 ? 0
                        : integral(a * a + b * b, 1, c -> (1 + a) * (z - c) / cube(x - a, y - b, z - c)));
                });
                default -> disc(x, y, z);
            };
        }

        private static double disc(double x, double y, double z) {
            return integral(0, 2 * Math.PI,
                phi -> integral(0, 1, s -> s * (1 - s * s) * z / cube(x - s * Math.cos(phi), y - s * Math.sin(phi), z)));
        }

        private static double cube(double x, double y, double z) {
            double square = x * x + y * y + z * z;
            return square * Math.sqrt(square);
        }
    }
}

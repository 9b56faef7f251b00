package fieldwright.field;

import java.util.concurrent.TimeUnit;

import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

import fieldwright.quantity.Place;

/** Milliseconds for a map of 100 × 100 places through a cylinder at relative 1e-6 on one processor, from parsed formulas. */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(value = 1, jvmArgs = "-Xmx1g")
@Warmup(iterations = 2, time = 2)
@Measurement(iterations = 3, time = 2)
public class MapBench {
    private final Item.Parsed parsed = Item.F.parsed(0);

    @Benchmark
    public double map() {
        return map(parsed);
    }

    static double map(Item.Parsed parsed) {
        FieldSolver solver = FieldSolver.of(parsed.source(), Accuracy.PANELS.withRelative(1e-6));
        double sum = 0;
        for (int i = 0; i < 100; i++) {
            for (int j = 0; j < 100; j++) {
                sum += solver.electricField(new Place(-2 + 4 * i / 99.0, 0.17, -1 + 3 * j / 99.0)).x().si();
            }
        }
        return sum;
    }
}

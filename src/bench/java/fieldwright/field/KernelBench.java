package fieldwright.field;

import fieldwright.field.tree.PointKernel;
import java.util.Random;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OperationsPerInvocation;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** Nanoseconds a source-target pair of the direct kernel, one core, beside the plain double loop and beside adding zeros. */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(value = 2, jvmArgs = "-Xmx512m")
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
@OperationsPerInvocation(KernelBench.PAIRS)
public class KernelBench {
    private static final int SOURCES = 4096;
    static final int PAIRS = SOURCES * PointKernel.BLOCK;

    private final double[][] source = new double[4][SOURCES];
    private final double[][] target = new double[3][PointKernel.BLOCK];
    private final double[][] out = new double[4][PointKernel.BLOCK];

    @Setup
    public void places() {
        Random r = new Random(1);
        for (double[] column : source) {
            fill(column, r);
        }
        for (double[] column : target) {
            fill(column, r);
        }
    }

    private static void fill(double[] column, Random r) {
        for (int i = 0; i < column.length; i++) {
            column[i] = r.nextDouble();
        }
    }

    /** All three components. */
    @Benchmark
    public double[] field() {
        PointKernel.field(source[0], source[1], source[2], source[3], 0, SOURCES, target[0], target[1], target[2], out[0], out[1], out[2]);
        return out[0];
    }

    @Benchmark
    public double[] potential() {
        PointKernel.potential(source[0], source[1], source[2], source[3], 0, SOURCES, target[0], target[1], target[2], out[3]);
        return out[3];
    }

    /** Source by source for each target: a sum the compiler may not reorder. */
    @Benchmark
    public double[] plainSum() {
        for (int i = 0; i < PointKernel.BLOCK; i++) {
            double ex = 0;
            double ey = 0;
            double ez = 0;
            for (int j = 0; j < SOURCES; j++) {
                double dx = target[0][i] - source[0][j];
                double dy = target[1][i] - source[1][j];
                double dz = target[2][i] - source[2][j];
                double square = dx * dx + dy * dy + dz * dz;
                double w = source[3][j] / (square * Math.sqrt(square));
                ex += w * dx;
                ey += w * dy;
                ez += w * dz;
            }
            out[0][i] = ex;
            out[1][i] = ey;
            out[2][i] = ez;
        }
        return out[0];
    }

    /** As many loops over a block that only add. */
    @Benchmark
    public double[] nothing() {
        for (int j = 0; j < SOURCES; j++) {
            for (int i = 0; i < PointKernel.BLOCK; i++) {
                out[3][i] += target[0][i];
            }
        }
        return out[3];
    }
}

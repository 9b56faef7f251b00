package fieldwright.field;

import fieldwright.field.tree.Answers;
import fieldwright.field.tree.Charges;
import fieldwright.field.tree.FieldTree;
import fieldwright.field.tree.PointKernel;
import fieldwright.field.tree.Workers;
import java.util.Locale;
import java.util.Random;
import java.util.concurrent.TimeUnit;
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
import org.openjdk.jmh.annotations.TearDown;
import org.openjdk.jmh.annotations.Warmup;

/**
 * Growth of the treecode, tree and answers together, at relative 1e-6: sources and targets grow together, and a million sources at ten
 * thousand targets, on one thread and on all; beside it the direct kernel on one thread at 1,280 of the targets. After each run the errors of
 * up to 1,000 targets are checked against the direct sum and printed.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.SECONDS)
@Fork(value = 1, jvmArgs = "-Xmx2g")
@Warmup(iterations = 1)
@Measurement(iterations = 2)
public class TreeBench {
    private static final int DIRECT = 10 * PointKernel.BLOCK;

    /** Sources and targets. */
    @Param({"10000/10000", "100000/100000", "1000000/1000000", "1000000/10000"})
    public String size;

    @Param({"1", "0"})
    public int threads;

    private double[][] source;
    private double[][] target;
    private Answers last;

    @Setup
    public void places() {
        Random r = new Random(5);
        source = random(r, 4, Integer.parseInt(size.split("/")[0]));
        target = random(r, 3, Integer.parseInt(size.split("/")[1]));
    }

    private static double[][] random(Random r, int columns, int n) {
        double[][] all = new double[columns][n];
        for (double[] column : all) {
            for (int i = 0; i < n; i++) {
                column[i] = r.nextDouble();
            }
        }
        return all;
    }

    @Benchmark
    public Answers tree() {
        Workers workers = threads == 0 ? Workers.all() : new Workers(threads, part -> { });
        FieldTree tree = FieldTree.of(Charges.points(source[0], source[1], source[2], source[3]), 1e-6, workers);
        last = tree.field(target[0], target[1], target[2], workers);
        return last;
    }

    /** Of DIRECT targets only: times targets/DIRECT. */
    @Benchmark
    public double[][] direct() {
        return direct(DIRECT);
    }

    private double[][] direct(int targets) {
        double[][] all = new double[3][targets];
        double[][] block = new double[6][PointKernel.BLOCK];
        for (int first = 0; first + PointKernel.BLOCK <= targets; first += PointKernel.BLOCK) {
            for (int k = 0; k < 3; k++) {
                System.arraycopy(target[k], first, block[k], 0, PointKernel.BLOCK);
                java.util.Arrays.fill(block[3 + k], 0);
            }
            PointKernel.field(source[0], source[1], source[2], source[3], 0, source[0].length, block[0], block[1], block[2], block[3], block[4],
                block[5]);
            for (int k = 0; k < 3; k++) {
                System.arraycopy(block[3 + k], 0, all[k], first, PointKernel.BLOCK);
            }
        }
        return all;
    }

    @TearDown(Level.Trial)
    public void check() {
        if (last == null) {
            return;
        }
        int n = 1000 / PointKernel.BLOCK * PointKernel.BLOCK;
        double[][] exact = direct(n);
        double worst = 0;
        double stated = 0;
        int beyond = 0;
        for (int i = 0; i < n; i++) {
            double error = 0;
            double value = 0;
            for (int k = 0; k < 3; k++) {
                error += Math.pow(last.value()[k][i] - exact[k][i], 2);
                value += exact[k][i] * exact[k][i];
            }
            error = Math.sqrt(error);
            value = Math.sqrt(value);
            worst = Math.max(worst, error / value);
            stated = Math.max(stated, last.error()[i] / value);
            beyond += error > last.error()[i] + 1e-12 * value ? 1 : 0;
        }
        System.out.println(String.format(Locale.ROOT, "%s: of %d targets the largest error is %.2g, the largest stated %.2g, beyond the stated %d",
            size, n, worst, stated, beyond));
    }
}

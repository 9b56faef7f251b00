package fieldwright.formula;

import fieldwright.quantity.Amount;
import java.util.Collection;
import java.util.List;
import java.util.Map;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OperationsPerInvocation;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** Nanoseconds a node: a density interpreted over blocks of 256, beside the same one compiled by hand and beside copying. */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.NANOSECONDS)
@Fork(value = 1, jvmArgs = "-Xmx512m")
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
@OperationsPerInvocation(BlockFunction.BLOCK)
public class FormulaBench {
    @Param({"rho_0*(1 - k*(rho/R_s)^2)", "rho_0*cos(phi)*rho/R_s", "rho_0*exp(-rho/R_s)", "when(rho < R_s/2, rho_0, rho_0/2)", "rho_0*sqrt(1 - (rho/R_s)^2)"})
    public String formula;

    private final double[][] nodes = new double[2][BlockFunction.BLOCK];
    private final double[] out = new double[BlockFunction.BLOCK];
    private BlockFunction code;

    @Setup
    public void compile() {
        for (int i = 0; i < BlockFunction.BLOCK; i++) {
            nodes[0][i] = 1.8 * i / BlockFunction.BLOCK;
            nodes[1][i] = 6.28 * i / BlockFunction.BLOCK;
        }
        code = Formula.parse(formula).bind(names()).compile(List.of("rho", "phi"));
    }

    private static fieldwright.formula.Scope names() {
        Map<String, Amount> values = Map.of("rho_0", Amount.of(2.1, "uC/m^3"), "k", Amount.of(0.6), "R_s", Amount.of(1.8, "m"));
        return new fieldwright.formula.Scope() {
            @Override
            public Binding lookup(String name) {
                return values.containsKey(name) ? new Binding.Value(values.get(name)) : null;
            }

            @Override
            public Collection<String> names() {
                return values.keySet();
            }

            @Override
            public Integrator integrator() {
                return null;
            }
        };
    }

    @Benchmark
    public double[] interpreted() {
        code.evaluate(nodes, BlockFunction.BLOCK, out);
        return out;
    }

    /** The first formula, node by node in one loop. */
    @Benchmark
    public double[] byHand() {
        for (int i = 0; i < BlockFunction.BLOCK; i++) {
            double t = nodes[0][i] / 1.8;
            out[i] = 2.1e-6 * (1 - 0.6 * t * t);
        }
        return out;
    }

    @Benchmark
    public double[] nothing() {
        System.arraycopy(nodes[0], 0, out, 0, BlockFunction.BLOCK);
        return out;
    }
}

package fieldwright.formula;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/** An integral compiled once, as a function of the outer variables that occur in it. */
final class IntegralCode {
    private final int outer;
    private final BlockFunction integrand;
    private final List<BlockFunction> from = new ArrayList<>();
    private final List<BlockFunction> to = new ArrayList<>();
    private final List<BlockFunction> kinks = new ArrayList<>();

    IntegralCode(Node.Integral i, List<String> outerNames, String text, Integrator integrator) {
        this.outer = outerNames.size();
        List<String> names = new ArrayList<>(outerNames);
        for (Node.Range r : Nesting.order(i, text)) {
            from.add(Compiler.compile(r.from(), names, text, integrator));
            to.add(Compiler.compile(r.to(), names, text, integrator));
            names.add(r.variable());
        }
        this.integrand = Compiler.compile(i.body(), names, text, integrator);
        for (Node kink : Kinks.of(i.body())) {
            if (names.containsAll(Trees.free(kink)) && Trees.mentionsAny(kink, Nesting.variables(i))) {
                kinks.add(Compiler.compile(kink, names, text, integrator));
            }
        }
    }

    /** The integral with the outer variables held fixed. */
    Integrator.Problem at(double[] values) {
        return outer == 0 ? new Integrator.Problem(integrand, from, to, kinks)
            : new Integrator.Problem(fixed(integrand, values), fixed(from, values), fixed(to, values), fixed(kinks, values));
    }

    private static List<BlockFunction> fixed(List<BlockFunction> functions, double[] values) {
        return functions.stream().map(f -> fixed(f, values)).toList();
    }

    private static BlockFunction fixed(BlockFunction f, double[] values) {
        double[][] held = new double[values.length][BlockFunction.BLOCK];
        for (int i = 0; i < values.length; i++) {
            Arrays.fill(held[i], values[i]);
        }
        return new BlockFunction() {
            @Override
            public int arguments() {
                return f.arguments() - held.length;
            }

            @Override
            public void evaluate(double[][] args, int n, double[] out) {
                double[][] all = Arrays.copyOf(held, held.length + args.length);
                System.arraycopy(args, 0, all, held.length, args.length);
                f.evaluate(all, n, out);
            }
        };
    }
}

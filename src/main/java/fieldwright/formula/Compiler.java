package fieldwright.formula;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * A bound tree as straight-line code over blocks. Equal subtrees are worked once, constants beforehand, whole powers by
 * multiplication. A {@code when} works both values and picks, unless a value is a formula with a condition or an
 * integral: those are worked only at the nodes that need them.
 */
final class Compiler {
    private final List<String> variables;
    private final String text;
    private final Integrator integrator;
    private final Map<List<Object>, Integer> numbers = new HashMap<>();   // value numbering: operation and operands
    private final List<Program.Step> steps = new ArrayList<>();           // one per value, in order; null for an argument
    private final List<Double> constants = new ArrayList<>();             // one per value; null when it varies

    private Compiler(List<String> variables, String text, Integrator integrator) {
        this.variables = variables;
        this.text = text;
        this.integrator = integrator;
        for (int i = 0; i < variables.size(); i++) {
            value(null, null);
        }
    }

    static Program compile(Node n, List<String> variables, String text, Integrator integrator) {
        List<String> names = List.copyOf(variables);
        Compiler c = new Compiler(names, text, integrator);
        int result = c.of(n);
        return new Program(names.size(), c.steps, c.constants, result);
    }

    /** Several trees over the same variables as one program. */
    static Program compile(List<Node> trees, List<String> variables, String text, Integrator integrator) {
        List<String> names = List.copyOf(variables);
        Compiler c = new Compiler(names, text, integrator);
        int[] results = trees.stream().mapToInt(c::of).toArray();
        return new Program(names.size(), c.steps, c.constants, results);
    }

    private int of(Node n) {
        if (n instanceof Node.Literal l) {
            return constant(l.value());
        } else if (n instanceof Node.Measure m) {
            return constant(m.amount().si());
        } else if (n instanceof Node.Infinity) {
            return constant(Double.POSITIVE_INFINITY);
        } else if (n instanceof Node.Constant c) {
            return constant(Constants.value(c.name()).si());
        } else if (n instanceof Node.Known k) {
            return constant(k.amount().si());
        } else if (n instanceof Node.Name v) {
            int i = variables.indexOf(v.name());
            if (i < 0) {
                throw Parser.unknown(v, variables);
            }
            return i;
        } else if (n instanceof Node.Negate m) {
            return emit("neg", Kernels.NEGATE, of(m.of()));
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            int[] a = c.arguments().stream().mapToInt(this::of).toArray();
            return emit(c.function(), Kernels.of(c.function()), a);
        } else if (n instanceof Node.When w) {
            return when(w);
        } else if (n instanceof Node.Inlined f) {
            return f.condition() == null ? of(f.body())
                : emit(List.of("inlined", f.call(), f.condition()), guard(f), condition(f.condition()), of(f.body()));
        } else if (n instanceof Node.Integral i) {
            return integral(i);
        }
        throw new IllegalStateException("not bound: " + n);
    }

    private int binary(Node.Binary b) {
        if (b.operator() == Node.Operator.POWER) {
            return power(of(b.left()), of(b.right()));
        }
        int l = of(b.left());
        int r = of(b.right());
        return switch (b.operator()) {
            case PLUS -> emit("+", Kernels.PLUS, l, r);
            case MINUS -> emit("-", Kernels.MINUS, l, r);
            case TIMES -> emit("*", Kernels.TIMES, l, r);
            default -> over(l, r);
        };
    }

    /** Dividing by a constant multiplies by its reciprocal: one rounding more, several times faster. */
    private int over(int l, int r) {
        Double divisor = constants.get(r);
        if (divisor != null && constants.get(l) == null && Math.abs(divisor) > 1e-290 && Math.abs(divisor) < 1e290) {
            return emit("*", Kernels.TIMES, l, constant(1 / divisor));
        }
        return emit("/", Kernels.OVER, l, r);
    }

    private int power(int base, int exponent) {
        Double p = constants.get(exponent);
        if (p == null || constants.get(base) != null || Math.abs(p) > 64) {
            return emit("^", Kernels.POWER, base, exponent);
        }
        if (p < 0) {
            return emit("/", Kernels.OVER, constant(1), power(base, constant(-p)));
        }
        if (p == Math.rint(p)) {
            return wholePower(base, p.intValue());
        }
        if (p - 0.5 == Math.rint(p - 0.5)) {
            int root = emit(Function.SQRT, Kernels.of(Function.SQRT), base);
            return p == 0.5 ? root : emit("*", Kernels.TIMES, wholePower(base, (int) (p - 0.5)), root);
        }
        return emit("^", Kernels.POWER, base, exponent);
    }

    private int wholePower(int base, int n) {
        if (n == 0) {
            return constant(1);
        }
        if (n == 1) {
            return base;
        }
        int half = wholePower(base, n / 2);
        int square = emit("*", Kernels.TIMES, half, half);
        return n % 2 == 0 ? square : emit("*", Kernels.TIMES, square, base);
    }

    private int condition(Node n) {
        if (n instanceof Node.Compare c) {
            int l = of(c.left());
            int r = of(c.right());
            return switch (c.relation()) {
                case LESS, MUCH_LESS -> emit("<", Kernels.LESS, l, r);
                case GREATER, MUCH_GREATER -> emit("<", Kernels.LESS, r, l);
                case LESS_OR_EQUAL -> emit("<=", Kernels.LESS_OR_EQUAL, l, r);
                case GREATER_OR_EQUAL -> emit("<=", Kernels.LESS_OR_EQUAL, r, l);
            };
        }
        Node.Logic logic = (Node.Logic) n;
        int result = condition(logic.parts().get(0));
        if (logic.junction() == Node.Junction.NOT) {
            return emit("-", Kernels.MINUS, constant(1), result);
        }
        for (Node part : logic.parts().subList(1, logic.parts().size())) {
            int next = condition(part);
            result = logic.junction() == Node.Junction.AND ? emit("*", Kernels.TIMES, result, next)
                : emit(Function.MAX, Kernels.of(Function.MAX), result, next);
        }
        return result;
    }

    private int when(Node.When w) {
        int condition = condition(w.condition());
        Double fixed = constants.get(condition);
        if (fixed != null && !Double.isNaN(fixed)) {
            return of(fixed == 1 ? w.yes() : w.no());
        }
        boolean careful = Trees.any(w.yes(), Compiler::onlyWhereNeeded) || Trees.any(w.no(), Compiler::onlyWhereNeeded);
        if (!careful) {
            return emit("when", Kernels.CHOOSE, condition, of(w.yes()), of(w.no()));
        }
        Program yes = compile(w.yes(), variables, text, integrator);
        Program no = compile(w.no(), variables, text, integrator);
        int[] operands = new int[variables.size() + 1];
        operands[0] = condition;
        for (int i = 0; i < variables.size(); i++) {
            operands[i + 1] = i;
        }
        return emit(List.of("when", w), Kernels.chooseWhereNeeded(yes, no), operands);
    }

    private static boolean onlyWhereNeeded(Node n) {
        return n instanceof Node.Inlined f && f.condition() != null || n instanceof Node.Integral;
    }

    private Program.Kernel guard(Node.Inlined f) {
        FormulaException violated = new FormulaException(text, f.at().offset(), f.call() + " holds only for " + f.holdsFor()
            + ", and it is asked for outside. Stay inside the condition or write a formula for this case.");
        return Kernels.notFolded((r, s, out, n) -> {
            for (int i = 0; i < n; i++) {
                if (r[s[0]][i] != 1) {
                    throw new FormulaException(violated.text(), violated.position(), violated.getMessage());
                }
            }
            System.arraycopy(r[s[1]], 0, out, 0, n);
        });
    }

    private int integral(Node.Integral i) {
        if (integrator == null) {
            throw new FormulaException(text, i.at().offset(), "an integral cannot be worked here. Give its value a name on a derive line above.");
        }
        Set<String> free = Trees.free(i);
        List<String> outer = variables.stream().filter(free::contains).toList();
        int[] operands = outer.stream().mapToInt(variables::indexOf).toArray();
        return emit(List.of("integral", i), Kernels.integral(new IntegralCode(i, outer, text, integrator), integrator), operands);
    }

    private int constant(double value) {
        return numbers.computeIfAbsent(List.of("constant", Double.doubleToRawLongBits(value)), k -> value(null, value));
    }

    private int emit(Object operation, Program.Kernel kernel, int... operands) {
        List<Object> key = new ArrayList<>();
        key.add(operation);
        for (int o : operands) {
            key.add(o);
        }
        Integer known = numbers.get(key);
        if (known != null) {
            return known;
        }
        Double folded = fold(kernel, operands);
        int id = folded != null ? constant(folded) : value(new Program.Step(kernel, operands), null);
        numbers.put(key, id);
        return id;
    }

    /** The value when all operands are constants, worked by the same kernel; an integral waits until it is asked for. */
    private Double fold(Program.Kernel kernel, int[] operands) {
        if (!kernel.elementwise()) {
            return null;
        }
        double[][] registers = new double[steps.size()][];
        for (int o : operands) {
            if (constants.get(o) == null) {
                return null;
            }
            registers[o] = new double[] {constants.get(o)};
        }
        double[] out = new double[1];
        kernel.run(registers, operands, out, 1);
        return out[0];
    }

    private int value(Program.Step step, Double constant) {
        steps.add(step);
        constants.add(constant);
        return steps.size() - 1;
    }
}

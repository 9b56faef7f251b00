package fieldwright.formula;

import fieldwright.formula.Node.At;
import java.util.List;
import java.util.Random;

/** Random trees for properties. */
final class RandomFormulas {
    private static final List<Function> SMOOTH = List.of(Function.EXP, Function.SIN, Function.COS, Function.ATAN, Function.SINH, Function.COSH,
        Function.TANH, Function.ASINH, Function.ERF, Function.CBRT);
    private final Random random;

    RandomFormulas(long seed) {
        this.random = new Random(seed);
    }

    /** Any tree the parser can make, without integrals. */
    Node any(int depth) {
        if (depth == 0 || random.nextInt(6) == 0) {
            return leaf();
        }
        return switch (random.nextInt(9)) {
            case 0 -> new Node.Negate(any(depth - 1), At.NOWHERE);
            case 1, 2, 3, 4, 5 -> new Node.Binary(pick(Node.Operator.values()), any(depth - 1), any(depth - 1), At.NOWHERE);
            case 6 -> call(depth);
            case 7 -> new Node.When(condition(depth - 1), any(depth - 1), any(depth - 1), At.NOWHERE);
            default -> new Node.Integral(any(depth - 1), List.of(new Node.Range("t", any(0), any(0), At.NOWHERE)), At.NOWHERE);
        };
    }

    private Node call(int depth) {
        Function f = pick(Function.values());
        Node[] a = new Node[f.arity()];
        for (int i = 0; i < a.length; i++) {
            a[i] = any(depth - 1);
        }
        return Node.call(f, a);
    }

    private Node condition(int depth) {
        if (random.nextInt(3) > 0 || depth == 0) {
            return new Node.Compare(pick(Node.Relation.values()), any(depth), any(depth), At.NOWHERE);
        }
        Node.Junction j = pick(Node.Junction.values());
        List<Node> parts = j == Node.Junction.NOT ? List.of(condition(depth - 1)) : List.of(condition(depth - 1), condition(depth - 1));
        return new Node.Logic(j, parts, At.NOWHERE);
    }

    private Node leaf() {
        return switch (random.nextInt(7)) {
            case 0 -> Formula.parse(random.nextInt(20) + " (uC/m^3)").tree();
            case 1 -> Formula.parse("0.5 kV").tree();
            case 2 -> new Node.Constant(pick(new String[] {"pi", "eps0", "c_0", "q_e"}), At.NOWHERE);
            case 3 -> new Node.Name(pick(new String[] {"rho", "z", "R_s", "a"}), At.NOWHERE);
            case 4 -> new Node.Infinity(At.NOWHERE);
            default -> decimal();
        };
    }

    private Node decimal() {
        String text = pick(new String[] {"1", "2", "3", "7", "0.5", "0.1", "1.25", "3.3", "1e-3", "12"});
        return new Node.Literal(Double.parseDouble(text), text, At.NOWHERE);
    }

    /** Decimals with + - * / and whole powers. */
    Node arithmetic(int depth) {
        if (depth == 0) {
            return decimal();
        }
        return switch (random.nextInt(6)) {
            case 0 -> Node.plus(arithmetic(depth - 1), arithmetic(depth - 1));
            case 1 -> Node.minus(arithmetic(depth - 1), arithmetic(depth - 1));
            case 2 -> Node.times(arithmetic(depth - 1), arithmetic(depth - 1));
            case 3 -> Node.over(arithmetic(depth - 1), arithmetic(depth - 1));
            case 4 -> Node.power(arithmetic(depth - 1), random.nextInt(4) - 1);
            default -> Node.call(Function.SQRT, arithmetic(depth - 1));
        };
    }

    /** Smooth in x, y and moderate in size for x and y near 1. */
    Node smooth(int depth) {
        if (depth == 0) {
            return random.nextInt(3) == 0 ? decimal() : new Node.Name(random.nextBoolean() ? "x" : "y", At.NOWHERE);
        }
        return switch (random.nextInt(8)) {
            case 0 -> Node.plus(smooth(depth - 1), smooth(depth - 1));
            case 1 -> Node.minus(smooth(depth - 1), smooth(depth - 1));
            case 2, 3 -> Node.times(smooth(depth - 1), smooth(depth - 1));
            case 4 -> Node.over(smooth(depth - 1), Node.plus(Node.number(2), Node.power(smooth(depth - 1), 2)));
            case 5 -> Node.power(smooth(depth - 1), random.nextInt(4));
            case 6 -> Node.call(Function.SQRT, Node.plus(Node.number(1), Node.power(smooth(depth - 1), 2)));
            default -> Node.call(pick(SMOOTH.toArray(new Function[0])), Node.call(Function.TANH, smooth(depth - 1)));
        };
    }

    private <T> T pick(T[] values) {
        return values[random.nextInt(values.length)];
    }
}

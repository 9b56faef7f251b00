package fieldwright.formula;

import fieldwright.quantity.Amount;
import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.function.UnaryOperator;

/**
 * A formula as a tree. Immutable; two trees are equal when they are written alike, wherever they stand in a text.
 * Conditions ({@link Compare}, {@link Logic}) occur only in {@link When} and {@link Inlined}.
 */
public sealed interface Node {
    /** Where the node's own sign or name stands in the text. */
    At at();

    /** The nodes below, in order of writing. */
    List<Node> children();

    /** The same node over other children. */
    Node withChildren(List<Node> children);

    /** 0-based offset. All offsets are equal, so that a place never makes two trees different. */
    record At(int offset) {
        static final At NOWHERE = new At(0);

        @Override
        public boolean equals(Object other) {
            return other instanceof At;
        }

        @Override
        public int hashCode() {
            return 1;
        }
    }

    /** A plain number; {@code text} as written, or null when worked out. */
    record Literal(double value, String text, At at) implements Leaf {
        @Override
        public boolean equals(Object o) {
            return o instanceof Literal l && Double.compare(l.value, value) == 0;
        }

        @Override
        public int hashCode() {
            return Double.hashCode(value);
        }
    }

    /** A number with unit, {@code 1 m}; {@code text} is the number as written. */
    record Measure(Amount amount, String text, At at) implements Leaf {
    }

    record Infinity(At at) implements Leaf {
    }

    record Constant(String name, At at) implements Leaf {
    }

    /** A name that is not bound: a coordinate, a parameter, an integration variable, or not yet looked up. */
    record Name(String name, At at) implements Leaf {
    }

    /** A name bound to its value. */
    record Known(String name, Amount amount, At at) implements Leaf {
    }

    record Negate(Node of, At at) implements Node {
        @Override
        public List<Node> children() {
            return List.of(of);
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Negate(c.get(0), at);
        }
    }

    enum Operator {
        PLUS("+"), MINUS("-"), TIMES("*"), OVER("/"), POWER("^");

        final String sign;

        Operator(String sign) {
            this.sign = sign;
        }
    }

    record Binary(Operator operator, Node left, Node right, At at) implements Node {
        @Override
        public List<Node> children() {
            return List.of(left, right);
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Binary(operator, c.get(0), c.get(1), at);
        }
    }

    record Call(Function function, List<Node> arguments, At at) implements Node {
        public Call {
            arguments = List.copyOf(arguments);
        }

        @Override
        public List<Node> children() {
            return arguments;
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Call(function, c, at);
        }
    }

    /** {@code f(a, b)} of a formula of the sheet, before it is bound. */
    record Apply(String name, List<Node> arguments, At at) implements Node {
        public Apply {
            arguments = List.copyOf(arguments);
        }

        @Override
        public List<Node> children() {
            return arguments;
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Apply(name, c, at);
        }
    }

    /**
     * A formula of the sheet put in place of its call.
     *
     * @param name its name; null for what was made from one, such as a derivative
     * @param holdsFor the condition as its author wrote it, for messages; null when there is none
     * @param arguments as called; the body holds them already, they stay for the check of their units
     * @param condition where it holds, or null
     */
    record Inlined(String name, String holdsFor, List<Parameter> parameters, List<Node> arguments, Node condition, Node body, At at)
        implements Node {
        public Inlined {
            parameters = List.copyOf(parameters);
            arguments = List.copyOf(arguments);
        }

        /** As called, {@code E(z)}, for messages. */
        String call() {
            return name == null ? "a formula" : Printer.text(this);
        }

        /** The arguments, the condition if there is one, the body. */
        @Override
        public List<Node> children() {
            List<Node> c = new ArrayList<>(arguments);
            if (condition != null) {
                c.add(condition);
            }
            c.add(body);
            return c;
        }

        @Override
        public Node withChildren(List<Node> c) {
            int n = arguments.size();
            return new Inlined(name, holdsFor, parameters, c.subList(0, n), condition == null ? null : c.get(n), c.get(c.size() - 1), at);
        }
    }

    record When(Node condition, Node yes, Node no, At at) implements Node {
        @Override
        public List<Node> children() {
            return List.of(condition, yes, no);
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new When(c.get(0), c.get(1), c.get(2), at);
        }
    }

    enum Relation {
        LESS("<"), LESS_OR_EQUAL("<="), GREATER(">"), GREATER_OR_EQUAL(">="), MUCH_LESS("<<"), MUCH_GREATER(">>");

        final String sign;

        Relation(String sign) {
            this.sign = sign;
        }

        public boolean holds(double a, double b) {
            return switch (this) {
                case LESS, MUCH_LESS -> a < b;
                case LESS_OR_EQUAL -> a <= b;
                case GREATER, MUCH_GREATER -> a > b;
                case GREATER_OR_EQUAL -> a >= b;
            };
        }
    }

    record Compare(Relation relation, Node left, Node right, At at) implements Node {
        @Override
        public List<Node> children() {
            return List.of(left, right);
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Compare(relation, c.get(0), c.get(1), at);
        }
    }

    enum Junction { AND, OR, NOT }

    record Logic(Junction junction, List<Node> parts, At at) implements Node {
        public Logic {
            parts = List.copyOf(parts);
        }

        @Override
        public List<Node> children() {
            return parts;
        }

        @Override
        public Node withChildren(List<Node> c) {
            return new Logic(junction, c, at);
        }
    }

    /** One {@code rho: 0 to R_s}. */
    record Range(String variable, Node from, Node to, At at) {
        public Range {
            Objects.requireNonNull(variable);
        }
    }

    /** {@code integral(body, ranges…)}; the nest order follows from which limits use which variable. */
    record Integral(Node body, List<Range> ranges, At at) implements Node {
        public Integral {
            ranges = List.copyOf(ranges);
        }

        /** The body, then lower and upper limit of each range. */
        @Override
        public List<Node> children() {
            List<Node> c = new ArrayList<>();
            c.add(body);
            for (Range r : ranges) {
                c.add(r.from());
                c.add(r.to());
            }
            return c;
        }

        @Override
        public Node withChildren(List<Node> c) {
            List<Range> moved = new ArrayList<>();
            for (int i = 0; i < ranges.size(); i++) {
                Range r = ranges.get(i);
                moved.add(new Range(r.variable(), c.get(1 + 2 * i), c.get(2 + 2 * i), r.at()));
            }
            return new Integral(c.get(0), moved, at);
        }
    }

    sealed interface Leaf extends Node {
        @Override
        default List<Node> children() {
            return List.of();
        }

        @Override
        default Node withChildren(List<Node> c) {
            return this;
        }
    }

    /** Children replaced by {@code change}; the node itself when none changed. */
    default Node mapChildren(UnaryOperator<Node> change) {
        List<Node> before = children();
        if (before.isEmpty()) {
            return this;
        }
        List<Node> after = new ArrayList<>(before.size());
        boolean changed = false;
        for (Node child : before) {
            Node next = change.apply(child);
            changed |= next != child;
            after.add(next);
        }
        return changed ? withChildren(after) : this;
    }

    /** The tree with every place set to {@code at}: for a formula put into another text. */
    default Node movedTo(At at) {
        Node n = mapChildren(c -> c.movedTo(at));
        if (n instanceof Literal l) {
            return new Literal(l.value(), l.text(), at);
        } else if (n instanceof Measure m) {
            return new Measure(m.amount(), m.text(), at);
        } else if (n instanceof Infinity) {
            return new Infinity(at);
        } else if (n instanceof Constant c) {
            return new Constant(c.name(), at);
        } else if (n instanceof Name v) {
            return new Name(v.name(), at);
        } else if (n instanceof Known k) {
            return new Known(k.name(), k.amount(), at);
        } else if (n instanceof Negate m) {
            return new Negate(m.of(), at);
        } else if (n instanceof Binary b) {
            return new Binary(b.operator(), b.left(), b.right(), at);
        } else if (n instanceof Call c) {
            return new Call(c.function(), c.arguments(), at);
        } else if (n instanceof Apply a) {
            return new Apply(a.name(), a.arguments(), at);
        } else if (n instanceof Inlined f) {
            return new Inlined(f.name(), f.holdsFor(), f.parameters(), f.arguments(), f.condition(), f.body(), at);
        } else if (n instanceof When w) {
            return new When(w.condition(), w.yes(), w.no(), at);
        } else if (n instanceof Compare c) {
            return new Compare(c.relation(), c.left(), c.right(), at);
        } else if (n instanceof Logic l) {
            return new Logic(l.junction(), l.parts(), at);
        } else if (n instanceof Integral i) {
            return new Integral(i.body(), i.ranges(), at);
        }
        throw new IllegalStateException(n.toString());
    }

    default boolean isCondition() {
        return this instanceof Compare || this instanceof Logic;
    }

    // Short ways to write trees

    static Node number(double value) {
        return new Literal(value, null, At.NOWHERE);
    }

    static Node binary(Operator operator, Node a, Node b) {
        return new Binary(operator, a, b, a.at());
    }

    static Node plus(Node a, Node b) {
        return binary(Operator.PLUS, a, b);
    }

    static Node minus(Node a, Node b) {
        return binary(Operator.MINUS, a, b);
    }

    static Node times(Node a, Node b) {
        return binary(Operator.TIMES, a, b);
    }

    static Node over(Node a, Node b) {
        return binary(Operator.OVER, a, b);
    }

    static Node power(Node a, double exponent) {
        return binary(Operator.POWER, a, number(exponent));
    }

    static Node negate(Node a) {
        return new Negate(a, a.at());
    }

    static Node call(Function f, Node... arguments) {
        return new Call(f, List.of(arguments), arguments[0].at());
    }
}

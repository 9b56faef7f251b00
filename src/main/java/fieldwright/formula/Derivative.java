package fieldwright.formula;

import static fieldwright.formula.Node.minus;
import static fieldwright.formula.Node.negate;
import static fieldwright.formula.Node.number;
import static fieldwright.formula.Node.over;
import static fieldwright.formula.Node.plus;
import static fieldwright.formula.Node.times;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;

/** The derivative of a bound tree with respect to a free name, piece by piece where the formula has pieces. */
final class Derivative {
    private final String variable;
    private final String text;

    Derivative(String variable, String text) {
        this.variable = variable;
        this.text = text;
    }

    Node of(Node n) {
        if (!Trees.mentions(n, variable)) {
            return number(0);
        }
        if (n instanceof Node.Name) {
            return number(1);
        } else if (n instanceof Node.Negate m) {
            return negate(of(m.of()));
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            return call(c);
        } else if (n instanceof Node.When w) {
            return new Node.When(w.condition(), of(w.yes()), of(w.no()), w.at());
        } else if (n instanceof Node.Inlined f) {
            return f.condition() == null ? of(f.body())
                : new Node.Inlined(null, f.holdsFor(), f.parameters(), f.arguments(), f.condition(), of(f.body()), f.at());
        } else if (n instanceof Node.Integral i) {
            return integral(i.body(), Nesting.order(i, text), i.at());
        }
        throw new IllegalStateException("not bound: " + n);
    }

    private Node binary(Node.Binary b) {
        Node u = b.left();
        Node v = b.right();
        return switch (b.operator()) {
            case PLUS -> plus(of(u), of(v));
            case MINUS -> minus(of(u), of(v));
            case TIMES -> plus(times(of(u), v), times(u, of(v)));
            case OVER -> Trees.mentions(v, variable)
                ? over(minus(times(of(u), v), times(u, of(v))), Node.power(v, 2)) : over(of(u), v);
            case POWER -> power(u, v);
        };
    }

    private Node power(Node u, Node v) {
        Node rest = Node.binary(Node.Operator.POWER, u, minus(v, number(1)));
        if (!Trees.mentions(v, variable)) {
            return times(times(v, rest), of(u));
        }
        Node self = Node.binary(Node.Operator.POWER, u, v);
        Node byExponent = times(times(self, Node.call(Function.LN, u)), of(v));
        return Trees.mentions(u, variable) ? plus(byExponent, times(times(v, rest), of(u))) : byExponent;
    }

    private Node call(Node.Call c) {
        Node sum = null;
        for (int i = 0; i < c.arguments().size(); i++) {
            Node inner = of(c.arguments().get(i));
            if (Trees.mentions(c.arguments().get(i), variable)) {
                Node outer = c.function().derivative(i, c.arguments());
                if (outer == null) {
                    throw new FormulaException(text, c.at().offset(), "no derivative of " + c.function().text() + " here: its order must be a whole number "
                        + "that is written out.");
                }
                Node term = times(outer, inner);
                sum = sum == null ? term : plus(sum, term);
            }
        }
        return sum;
    }

    /** Leibniz: the ends move, and the integrand changes; outermost range first. */
    private Node integral(Node body, List<Node.Range> ranges, Node.At at) {
        if (ranges.isEmpty()) {
            return of(body);
        }
        Node.Range r = ranges.get(0);
        List<Node.Range> rest = ranges.subList(1, ranges.size());
        Node inside = rest.isEmpty() ? body : new Node.Integral(body, rest, at);
        Node changed = integral(body, rest, at);
        Node sum = new Node.Integral(changed, List.of(r), at);
        if (Trees.mentions(r.to(), variable)) {
            sum = plus(times(Trees.substitute(inside, Map.of(r.variable(), r.to())), of(r.to())), sum);
        }
        if (Trees.mentions(r.from(), variable)) {
            sum = minus(sum, times(Trees.substitute(inside, Map.of(r.variable(), r.from())), of(r.from())));
        }
        return sum;
    }

    /** Polynomial degree in the variable (an upper bound where terms cancel); -1 when it is no polynomial. */
    int degree(Node n) {
        if (!Trees.mentions(n, variable)) {
            return 0;
        }
        if (n instanceof Node.Name) {
            return 1;
        } else if (n instanceof Node.Negate m) {
            return degree(m.of());
        } else if (n instanceof Node.Inlined f) {
            return f.condition() == null ? degree(f.body()) : -1;
        } else if (n instanceof Node.Binary b) {
            List<Integer> d = new ArrayList<>(List.of(degree(b.left()), degree(b.right())));
            if (d.contains(-1)) {
                return -1;
            }
            return switch (b.operator()) {
                case PLUS, MINUS -> Math.max(d.get(0), d.get(1));
                case TIMES -> d.get(0) + d.get(1);
                case OVER -> d.get(1) == 0 ? d.get(0) : -1;
                case POWER -> wholePower(b, d.get(0));
            };
        }
        return -1;
    }

    private int wholePower(Node.Binary b, int degree) {
        Double p = Evaluator.constant(b.right());
        return p != null && p >= 0 && p == Math.rint(p) && p * degree < 1000 ? (int) (p * degree) : -1;
    }
}

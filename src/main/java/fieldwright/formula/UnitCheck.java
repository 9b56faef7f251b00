package fieldwright.formula;

import fieldwright.quantity.Dimensions;
import fieldwright.quantity.Units;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import javax.measure.Dimension;

/**
 * Units of a bound tree, before any number is worked. A bare 0 and inf fit any unit: their dimension is null here.
 * Errors: {@link FormulaException} at the sign or name where two units do not fit.
 */
final class UnitCheck {
    private final String text;
    private final Map<String, Dimension> variables;

    UnitCheck(String text, Map<String, Dimension> variables) {
        this.text = text;
        this.variables = variables;
    }

    /** The dimension, or null when the tree fits any. */
    Dimension of(Node n) {
        if (n instanceof Node.Literal l) {
            return l.value() == 0 ? null : Units.NONE;
        } else if (n instanceof Node.Measure m) {
            return m.amount().dimension();
        } else if (n instanceof Node.Infinity) {
            return null;
        } else if (n instanceof Node.Constant c) {
            return Constants.value(c.name()).dimension();
        } else if (n instanceof Node.Known k) {
            return k.amount().dimension();
        } else if (n instanceof Node.Name v) {
            return variable(v);
        } else if (n instanceof Node.Negate m) {
            return of(m.of());
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            return call(c);
        } else if (n instanceof Node.When w) {
            of(w.condition());
            return common(of(w.yes()), of(w.no()), w.no(), "both values of 'when' must have one unit");
        } else if (n instanceof Node.Compare c) {
            common(of(c.left()), of(c.right()), c, "only like quantities compare");
            return Units.NONE;
        } else if (n instanceof Node.Logic l) {
            l.parts().forEach(this::of);
            return Units.NONE;
        } else if (n instanceof Node.Inlined f) {
            return inlined(f);
        } else if (n instanceof Node.Integral i) {
            return integral(i);
        }
        throw new IllegalStateException("not bound: " + n);
    }

    private Dimension inlined(Node.Inlined f) {
        for (int i = 0; i < f.parameters().size(); i++) {
            Parameter p = f.parameters().get(i);
            Dimension given = of(f.arguments().get(i));
            if (given != null && !given.equals(p.dimension())) {
                throw wrong(f, "argument '" + p.name() + "' of " + f.call() + " is " + Units.describe(given) + " and must be "
                    + Units.describe(p.dimension()) + ". Check its unit.");
            }
        }
        if (f.condition() != null) {
            of(f.condition());
        }
        return of(f.body());
    }

    private Dimension variable(Node.Name v) {
        Dimension known = variables.get(v.name());
        if (known == null) {
            known = Coordinates.DIMENSIONS.get(v.name());
        }
        if (known == null) {
            throw Parser.unknown(v, variables.keySet());
        }
        return known;
    }

    private Dimension binary(Node.Binary b) {
        Dimension left = of(b.left());
        Dimension right = of(b.right());
        return switch (b.operator()) {
            case PLUS -> common(left, right, b, "terms of a sum must have one unit");
            case MINUS -> common(left, right, b, "terms of a difference must have one unit");
            case TIMES -> left == null || right == null ? null : left.multiply(right);
            case OVER -> left == null ? null : left.divide(right == null ? Units.NONE : right);
            case POWER -> power(b, left, right);
        };
    }

    private Dimension power(Node.Binary b, Dimension base, Dimension exponent) {
        plain(exponent, b.right(), "an exponent");
        if (base == null || base.equals(Units.NONE)) {
            return base;
        }
        Double value = Evaluator.constant(b.right());
        if (value == null) {
            throw wrong(b, "the base is " + Units.describe(base) + " and the exponent is not a fixed number. "
                + "Divide the base by a quantity of its kind, or write the exponent as a number.");
        }
        for (int denominator = 1; denominator <= 12; denominator++) {
            double numerator = value * denominator;
            if (Math.abs(numerator - Math.rint(numerator)) < 1e-12 && Math.abs(numerator) < 1000) {
                return ((Dimensions) Dimensions.of(base)).pow((int) Math.rint(numerator), denominator);
            }
        }
        throw wrong(b, "the base is " + Units.describe(base) + " and the exponent " + value + " is no simple fraction. "
            + "Divide the base by a quantity of its kind.");
    }

    private Dimension call(Node.Call c) {
        List<Node> a = c.arguments();
        Function f = c.function();
        switch (f.units()) {
            case PLAIN:
                for (Node argument : a) {
                    plain(of(argument), argument, "the argument of " + f.text());
                }
                return Units.NONE;
            case SAME: {
                Dimension d = of(a.get(0));
                return a.size() == 1 ? d : common(d, of(a.get(1)), c, "the arguments of " + f.text() + " must have one unit");
            }
            case SIGN:
                of(a.get(0));
                return Units.NONE;
            case ROOT_2:
                return root(of(a.get(0)), 2);
            case ROOT_3:
                return root(of(a.get(0)), 3);
            default:
                common(of(a.get(0)), of(a.get(1)), c, "the arguments of " + f.text() + " must have one unit");
                return Units.NONE;
        }
    }

    private static Dimension root(Dimension d, int degree) {
        return d == null ? null : d.root(degree);
    }

    /** A coordinate keeps its own unit; another variable of integration has the unit of its limits. */
    private Dimension integral(Node.Integral i) {
        Map<String, Dimension> inner = new HashMap<>(variables);
        for (Node.Range r : Nesting.order(i, text)) {
            UnitCheck outer = new UnitCheck(text, inner);
            Dimension from = outer.of(r.from());
            Dimension to = outer.of(r.to());
            Dimension limits = common(from, to, r.to(), "both limits of '" + r.variable() + "' must have one unit");
            Dimension own = Coordinates.DIMENSIONS.get(Trees.original(r.variable()));
            if (own != null && limits != null && !limits.equals(own)) {
                throw wrong(from == null ? r.to() : r.from(), "the limits of '" + r.variable() + "' are " + Units.describe(limits) + " but "
                    + r.variable() + " is " + Units.describe(own) + ". Give limits of its kind.");
            }
            inner.put(r.variable(), own != null ? own : limits != null ? limits : Units.NONE);
        }
        Dimension result = new UnitCheck(text, inner).of(i.body());
        if (result == null) {
            return null;
        }
        for (Node.Range r : i.ranges()) {
            result = result.multiply(inner.get(r.variable()));
        }
        return result;
    }

    private Dimension common(Dimension a, Dimension b, Node at, String rule) {
        if (a == null || b == null || a.equals(b)) {
            return a == null ? b : a;
        }
        throw wrong(at, Units.describe(a) + " stands with " + Units.describe(b) + ": " + rule + ". Check units and factors.");
    }

    private void plain(Dimension d, Node at, String what) {
        if (d != null && !d.equals(Units.NONE)) {
            throw wrong(at, what + " must be a plain number, and '" + Printer.text(at) + "' is " + Units.describe(d)
                + ". Divide it by a quantity of its kind.");
        }
    }

    private FormulaException wrong(Node at, String message) {
        return new FormulaException(text, at.at().offset(), message);
    }
}

package fieldwright.formula;

import fieldwright.formula.Node.At;
import fieldwright.formula.Node.Operator;
import java.math.BigDecimal;
import java.math.BigInteger;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/**
 * Simplification that keeps the value wherever the formula has one (it may gain one where there was none: x/x is 1):
 * exact arithmetic of the numbers, like terms, like factors. Sums are not multiplied out.
 */
final class Simplifier {
    private Simplifier() {
    }

    static Node simplified(Node n) {
        Node m = n.mapChildren(Simplifier::simplified);
        if (m instanceof Node.Negate) {
            return product(m);
        } else if (m instanceof Node.Binary b) {
            return b.operator() == Operator.PLUS || b.operator() == Operator.MINUS ? sum(b) : product(b);
        } else if (m instanceof Node.Call c) {
            return call(c);
        } else if (m instanceof Node.When w && w.yes().equals(w.no())) {
            return w.yes();
        } else if (m instanceof Node.Integral i && isZero(i.body())) {
            return Node.number(0);
        }
        return m;
    }

    private static boolean isZero(Node n) {
        return n instanceof Node.Literal l && l.value() == 0;
    }

    // Sums: coefficient times rest

    private static final class Term {
        Ratio coefficient;
        final Node rest;

        Term(Ratio coefficient, Node rest) {
            this.coefficient = coefficient;
            this.rest = rest;
        }
    }

    private static Node sum(Node n) {
        Map<String, Term> terms = new LinkedHashMap<>();
        collectTerms(n, Ratio.ONE, terms);
        List<Term> left = new ArrayList<>();
        for (Term t : terms.values()) {
            if (!t.coefficient.isZero()) {
                left.add(t);
            }
        }
        if (left.isEmpty()) {
            return Node.number(0);
        }
        for (int i = 0; left.get(0).coefficient.isNegative() && i < left.size(); i++) {
            if (!left.get(i).coefficient.isNegative()) {
                left.add(0, left.remove(i));   // a sum begins with a positive term when it has one
            }
        }
        Node whole = null;
        for (Term t : left) {
            Node size = scaled(t.coefficient.abs(), t.rest);
            whole = whole == null ? (t.coefficient.isNegative() ? Node.negate(size) : size)
                : t.coefficient.isNegative() ? Node.minus(whole, size) : Node.plus(whole, size);
        }
        return whole;
    }

    private static void collectTerms(Node n, Ratio sign, Map<String, Term> terms) {
        if (n instanceof Node.Binary b && (b.operator() == Operator.PLUS || b.operator() == Operator.MINUS)) {
            collectTerms(b.left(), sign, terms);
            collectTerms(b.right(), b.operator() == Operator.MINUS ? sign.negated() : sign, terms);
            return;
        }
        Factors f = new Factors();
        f.add(n, Ratio.ONE);
        Ratio coefficient = f.coefficient.times(sign);
        Node rest = f.build(Ratio.ONE);
        Term known = terms.get(canonical(rest));
        if (known == null) {
            terms.put(canonical(rest), new Term(coefficient, rest));
        } else {
            known.coefficient = known.coefficient.plus(coefficient);
        }
    }

    private static Node scaled(Ratio coefficient, Node rest) {
        Factors f = new Factors();
        f.add(rest, Ratio.ONE);
        return f.build(f.coefficient.times(coefficient));
    }

    // Products: coefficient times bases to exponents

    private static final class Factors {
        private record Factor(Node base, Ratio exponent) {
        }

        Ratio coefficient = Ratio.ONE;
        private final Map<String, Factor> factors = new LinkedHashMap<>();

        void add(Node n, Ratio e) {
            boolean whole = e.isWhole() && e.top().bitLength() < 8;
            if (n instanceof Node.Literal l && whole && Ratio.of(l) != null && Ratio.of(l).power(e.top().intValue()) != null) {
                coefficient = coefficient.times(Ratio.of(l).power(e.top().intValue()));
            } else if (n instanceof Node.Negate m && whole) {
                coefficient = e.top().testBit(0) ? coefficient.negated() : coefficient;
                add(m.of(), e);
            } else if (n instanceof Node.Binary b && b.operator() == Operator.TIMES && whole) {
                add(b.left(), e);
                add(b.right(), e);
            } else if (n instanceof Node.Binary b && b.operator() == Operator.OVER && whole) {
                add(b.left(), e);
                add(b.right(), e.negated());
            } else if (n instanceof Node.Binary b && b.operator() == Operator.POWER && whole && exponent(b.right()) != null) {
                add(b.left(), exponent(b.right()).times(e));
            } else if (n instanceof Node.Call c && c.function() == Function.SQRT && whole) {
                add(c.arguments().get(0), Ratio.of(BigInteger.ONE, BigInteger.TWO, false).times(e));
            } else {
                factors.merge(canonical(n), new Factor(n, e), (a, b) -> new Factor(a.base(), a.exponent().plus(b.exponent())));
            }
        }

        private static Ratio exponent(Node n) {
            Ratio r = n instanceof Node.Literal l ? Ratio.of(l)
                : n instanceof Node.Negate m && m.of() instanceof Node.Literal l && Ratio.of(l) != null ? Ratio.of(l).negated()
                : n instanceof Node.Binary b && b.operator() == Operator.OVER && b.left() instanceof Node.Literal p
                    && b.right() instanceof Node.Literal q && Ratio.of(p) != null && Ratio.of(q) != null && !Ratio.of(q).isZero()
                    ? Ratio.of(p).times(Ratio.of(q).power(-1)) : null;
            return r != null && r.top().bitLength() < 8 && r.bottom().bitLength() < 6 ? r : null;
        }

        Node build(Ratio c) {
            if (c.isZero()) {
                return Node.number(0);
            }
            List<Node> above = new ArrayList<>();
            List<Node> below = new ArrayList<>();
            for (Factor f : factors.values()) {
                if (!f.exponent().isZero()) {
                    (f.exponent().isNegative() ? below : above).add(raised(f.base(), f.exponent().abs()));
                }
            }
            BigDecimal decimal = c.abs().asDecimal();
            if (decimal != null) {
                above.add(0, literal(decimal));
            } else {
                if (!c.abs().top().equals(BigInteger.ONE) || above.isEmpty()) {
                    above.add(0, literal(new BigDecimal(c.abs().top())));
                }
                if (!c.isWhole()) {
                    below.add(0, literal(new BigDecimal(c.bottom())));
                }
            }
            if (decimal != null && decimal.compareTo(BigDecimal.ONE) == 0 && above.size() > 1) {
                above.remove(0);
            }
            Node size = below.isEmpty() ? chain(above) : Node.over(chain(above), chain(below));
            return c.isNegative() ? Node.negate(size) : size;
        }

        private static Node chain(List<Node> factors) {
            return factors.stream().reduce(Node::times).orElseThrow();
        }

        private static Node raised(Node base, Ratio exponent) {
            if (exponent.isOne()) {
                return base;
            }
            if (exponent.bottom().equals(BigInteger.TWO)) {
                Node root = Node.call(Function.SQRT, base);
                return exponent.top().equals(BigInteger.ONE) ? root : Node.binary(Operator.POWER, root, literal(new BigDecimal(exponent.top())));
            }
            BigDecimal decimal = exponent.isWhole() ? new BigDecimal(exponent.top()) : exponent.asDecimal();
            Node e = decimal != null ? literal(decimal) : Node.over(literal(new BigDecimal(exponent.top())), literal(new BigDecimal(exponent.bottom())));
            return Node.binary(Operator.POWER, base, e);
        }
    }

    private static Node product(Node n) {
        Factors f = new Factors();
        f.add(n, Ratio.ONE);
        return f.build(f.coefficient);
    }

    private static Node literal(BigDecimal d) {
        return new Node.Literal(d.doubleValue(), d.stripTrailingZeros().scale() <= 0 && d.precision() - d.scale() < 16 ? d.toBigInteger().toString()
            : d.toString().replace("E+", "e").replace('E', 'e'), At.NOWHERE);
    }

    /** Values at 0 and 1 that are exact, and roots of squares of whole numbers. */
    private static Node call(Node.Call c) {
        if (c.arguments().size() != 1 || !(c.arguments().get(0) instanceof Node.Literal l)) {
            return c;
        }
        double value = c.function().value(l.value());
        boolean exact = switch (c.function()) {
            case SQRT -> value == Math.rint(value) && value < 1e7 && value * value == l.value();
            case EXP, SIN, COS, TAN, SINH, COSH, TANH, ATAN, ASIN -> l.value() == 0;
            case LN -> l.value() == 1;
            case ABS, SIGN, FLOOR, CEIL -> true;
            default -> false;
        };
        return exact ? Node.number(value + 0.0) : c;
    }

    /** One text for all orders of the same terms and factors. */
    private static String canonical(Node n) {
        if (n instanceof Node.Binary b && b.operator() != Operator.POWER) {
            boolean additive = b.operator() == Operator.PLUS || b.operator() == Operator.MINUS;
            TreeMap<String, Integer> parts = new TreeMap<>();
            parts(n, additive, false, parts);
            return (additive ? "sum" : "product") + parts;
        }
        if (n.children().isEmpty()) {
            return n instanceof Node.Known k ? "known " + k.name() + k.amount() + k.amount().si() + k.amount().error() : Printer.text(n);
        }
        StringBuilder b = new StringBuilder(n instanceof Node.Binary ? "^" : n instanceof Node.Call c ? c.function().name()
            : n instanceof Node.Compare c ? c.relation().sign : n instanceof Node.Logic l ? l.junction().name() : n.getClass().getSimpleName());
        if (n instanceof Node.Integral i) {
            b.append(Nesting.variables(i));
        } else if (n instanceof Node.Apply a) {
            b.append(a.name());
        }
        n.children().forEach(c -> b.append('(').append(canonical(c)).append(')'));
        return b.toString();
    }

    private static void parts(Node n, boolean additive, boolean inverse, TreeMap<String, Integer> parts) {
        if (n instanceof Node.Binary b) {
            Operator plain = additive ? Operator.PLUS : Operator.TIMES;
            Operator inverted = additive ? Operator.MINUS : Operator.OVER;
            if (b.operator() == plain || b.operator() == inverted) {
                parts(b.left(), additive, inverse, parts);
                parts(b.right(), additive, inverse ^ b.operator() == inverted, parts);
                return;
            }
        }
        parts.merge(canonical(n), inverse ? -1 : 1, Integer::sum);
    }
}

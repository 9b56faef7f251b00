package fieldwright.formula;

import java.math.BigDecimal;
import java.util.List;
import java.util.stream.Collectors;

/** A tree as text that the parser reads back to the same tree. */
final class Printer {
    private static final int SUM = 4;
    private static final int NEGATIVE = 5;
    private static final int PRODUCT = 6;
    private static final int POWER = 7;
    private static final int ATOM = 8;

    private Printer() {
    }

    static String text(Node n) {
        if (n instanceof Node.Literal l) {
            return l.text() != null ? l.text() : number(l.value());
        } else if (n instanceof Node.Measure m) {
            String unit = m.amount().shown();
            return m.text() + (fieldwright.quantity.Units.isSymbol(unit) ? " " + unit : " (" + unit + ")");
        } else if (n instanceof Node.Infinity) {
            return "inf";
        } else if (n instanceof Node.Constant c) {
            return c.name();
        } else if (n instanceof Node.Name v) {
            return v.name();
        } else if (n instanceof Node.Known k) {
            return k.name() != null ? k.name() : amount(k);
        } else if (n instanceof Node.Negate m) {
            return "-" + within(m.of(), NEGATIVE);
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            return c.function().text() + list(c.arguments());
        } else if (n instanceof Node.Apply a) {
            return a.name() + list(a.arguments());
        } else if (n instanceof Node.Inlined f) {
            return f.name() == null ? text(f.body()) : f.arguments().isEmpty() ? f.name() : f.name() + list(f.arguments());
        } else if (n instanceof Node.When w) {
            return "when" + list(w.children());
        } else if (n instanceof Node.Compare c) {
            return text(c.left()) + " " + c.relation().sign + " " + text(c.right());
        } else if (n instanceof Node.Logic l) {
            return logic(l);
        } else if (n instanceof Node.Integral i) {
            return "integral(" + text(i.body()) + i.ranges().stream()
                .map(r -> ", " + r.variable() + ": " + text(r.from()) + " to " + text(r.to())).collect(Collectors.joining()) + ")";
        }
        throw new IllegalStateException(n.toString());
    }

    private static String binary(Node.Binary b) {
        return switch (b.operator()) {
            case PLUS, MINUS -> within(b.left(), SUM) + " " + b.operator().sign + " " + within(b.right(), PRODUCT);
            case TIMES, OVER -> factor(b.left(), PRODUCT) + b.operator().sign + factor(b.right(), POWER);
            case POWER -> factor(b.left(), ATOM) + "^" + exponent(b.right());
        };
    }

    /** x^-1 needs no brackets. */
    private static String exponent(Node n) {
        return n instanceof Node.Negate m && level(m.of()) >= POWER && !(m.of() instanceof Node.Measure) ? text(n) : factor(n, POWER);
    }

    private static String logic(Node.Logic l) {
        if (l.junction() == Node.Junction.NOT) {
            return "not (" + text(l.parts().get(0)) + ")";
        }
        String word = l.junction() == Node.Junction.AND ? " and " : " or ";
        return l.parts().stream().map(p -> p instanceof Node.Logic ? "(" + text(p) + ")" : text(p)).collect(Collectors.joining(word));
    }

    private static String amount(Node.Known k) {
        String unit = fieldwright.quantity.Units.preferred(k.amount().dimension());
        String value = number(k.amount().si());
        return unit.isEmpty() ? value : value + " (" + unit + ")";
    }

    private static String list(List<Node> nodes) {
        return nodes.stream().map(Printer::text).collect(Collectors.joining(", ", "(", ")"));
    }

    /** A number with unit is bracketed: {@code 1 V*m} could be read in two ways. */
    private static String factor(Node n, int least) {
        return n instanceof Node.Measure || n instanceof Node.Known k && k.name() == null && !k.amount().isPlain() ? "(" + text(n) + ")" : within(n, least);
    }

    private static String within(Node n, int least) {
        return level(n) < least ? "(" + text(n) + ")" : text(n);
    }

    static int level(Node n) {
        if (n instanceof Node.Inlined f && f.name() == null) {
            return level(f.body());
        }
        if (n instanceof Node.Binary b) {
            return switch (b.operator()) {
                case PLUS, MINUS -> SUM;
                case TIMES, OVER -> PRODUCT;
                case POWER -> POWER;
            };
        }
        boolean negative = n instanceof Node.Negate || n instanceof Node.Literal l && l.text() == null && l.value() < 0
            || n instanceof Node.Known k && k.name() == null && k.amount().si() < 0;
        return negative ? NEGATIVE : n.isCondition() ? 0 : ATOM;
    }

    /** The shortest decimal that reads back as the same double, without a point where it is whole. */
    static String number(double value) {
        if (Double.isInfinite(value)) {
            return value > 0 ? "inf" : "-inf";
        }
        if (value == Math.rint(value) && Math.abs(value) < 1e15) {
            return Long.toString((long) value);
        }
        double size = Math.abs(value);
        if (size >= 1e-4 && size < 1e15) {
            return BigDecimal.valueOf(value).stripTrailingZeros().toPlainString();
        }
        return Double.toString(value).replace(".0E", "e").replace('E', 'e');
    }
}

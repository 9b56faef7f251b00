package fieldwright.formula;

import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;

/** Trees, names and units in LaTeX that jlatexmath renders. No dollar signs. */
public final class Latex {
    private static final Set<String> GREEK = Set.of("alpha", "beta", "gamma", "delta", "zeta", "eta", "theta", "iota", "kappa", "lambda", "mu",
        "nu", "xi", "pi", "rho", "sigma", "tau", "upsilon", "chi", "psi", "omega", "Gamma", "Delta", "Theta", "Lambda", "Xi", "Pi", "Sigma",
        "Upsilon", "Phi", "Psi", "Omega");
    private static final Map<String, String> SPECIAL = Map.of("eps", "\\varepsilon", "phi", "\\varphi", "omicron", "o", "eps0", "\\varepsilon_{0}");
    private static final Map<Function, String> WORDS = Map.ofEntries(Map.entry(Function.LN, "\\ln"), Map.entry(Function.LOG10, "\\log_{10}"),
        Map.entry(Function.SIN, "\\sin"), Map.entry(Function.COS, "\\cos"), Map.entry(Function.TAN, "\\tan"), Map.entry(Function.ASIN, "\\arcsin"),
        Map.entry(Function.ACOS, "\\arccos"), Map.entry(Function.ATAN, "\\arctan"), Map.entry(Function.ATAN2, "\\mathrm{atan2}"),
        Map.entry(Function.SINH, "\\sinh"), Map.entry(Function.COSH, "\\cosh"), Map.entry(Function.TANH, "\\tanh"),
        Map.entry(Function.ASINH, "\\mathrm{arsinh}"), Map.entry(Function.ACOSH, "\\mathrm{arcosh}"), Map.entry(Function.ATANH, "\\mathrm{artanh}"),
        Map.entry(Function.SIGN, "\\mathrm{sgn}"), Map.entry(Function.MIN, "\\min"), Map.entry(Function.MAX, "\\max"),
        Map.entry(Function.ERF, "\\mathrm{erf}"), Map.entry(Function.ERFC, "\\mathrm{erfc}"), Map.entry(Function.GAMMA, "\\Gamma"),
        Map.entry(Function.DIGAMMA, "\\psi"), Map.entry(Function.ELLIPTIC_K, "K"), Map.entry(Function.ELLIPTIC_E, "E"));
    private static final Map<Function, String> ORDERED = Map.of(Function.BESSEL_J, "J", Function.BESSEL_Y, "Y", Function.BESSEL_I, "I",
        Function.BESSEL_K, "K", Function.LEGENDRE_P, "P");
    private static final int SUM = 4;
    private static final int PRODUCT = 6;
    private static final int POWER = 7;
    private static final int ATOM = 8;

    private Latex() {
    }

    /** {@code R_s} as R_{s}, {@code rho_0} as \rho_{0}, {@code E_roof} with an upright subscript, {@code a1} as a_{1}. */
    public static String name(String name) {
        String special = SPECIAL.get(name);
        if (special != null) {
            return special;
        }
        int library = name.lastIndexOf('.');
        if (library >= 0) {
            return name(name.substring(library + 1));   // whose it is stands in the text of the sheet
        }
        if (name.endsWith("'")) {
            return name(name.substring(0, name.length() - 1)) + "'";
        }
        String[] parts = name.split("_+");
        List<String> subscripts = new ArrayList<>();
        String base = parts.length == 0 ? name.replace("_", "\\_") : parts[0];
        int digits = base.length();
        while (digits > 1 && Character.isDigit(base.charAt(digits - 1))) {
            digits--;
        }
        if (digits < base.length()) {
            subscripts.add(base.substring(digits));
            base = base.substring(0, digits);
        }
        for (int i = 1; i < parts.length; i++) {
            subscripts.add(word(parts[i]));
        }
        return word(base) + (subscripts.isEmpty() ? "" : "_{" + String.join(",", subscripts) + "}");
    }

    private static String word(String s) {
        return SPECIAL.containsKey(s) ? SPECIAL.get(s) : GREEK.contains(s) ? "\\" + s
            : s.length() == 1 || s.matches("[0-9]+") ? s : "\\mathrm{" + s + "}";
    }

    /** Unit text upright: {@code uC/m^3} as \mu\mathrm{C}/\mathrm{m}^{3}. */
    public static String unit(String unit) {
        StringBuilder b = new StringBuilder();
        String s = unit.strip().replace("\u00b2", "^2").replace("\u00b3", "^3").replace('\u00b5', 'u').replace('\u03bc', 'u');
        for (int i = 0; i < s.length();) {
            char c = s.charAt(i);
            if (Character.isLetter(c) || c == '_') {
                int from = i;
                while (i < s.length() && (Character.isLetter(s.charAt(i)) || s.charAt(i) == '_')) {
                    i++;
                }
                b.append(symbol(s.substring(from, i)));
            } else if (c == '^') {
                int from = ++i;
                while (i < s.length() && (Character.isDigit(s.charAt(i)) || "+-".indexOf(s.charAt(i)) >= 0)) {
                    i++;
                }
                b.append("^{").append(s, from, i).append('}');
            } else {
                b.append(c == '*' || c == '\u00b7' || c == '\u22c5' ? "\\cdot " : c == '%' ? "\\%" : c == '\u00b0' ? "^{\\circ}" : Character.isWhitespace(c) ? "" : String.valueOf(c));
                i++;
            }
        }
        return b.toString();
    }

    private static String symbol(String s) {
        if (s.equals("deg")) {
            return "^{\\circ}";
        }
        if (s.equals("q_e") || s.equals("e")) {
            return "\\mathrm{e}";
        }
        boolean ohm = s.endsWith("Ohm") || s.endsWith("ohm") || s.endsWith("\u03a9") || s.endsWith("\u2126");
        String rest = s.endsWith("hm") && ohm ? s.substring(0, s.length() - 3) : ohm ? s.substring(0, s.length() - 1) : s;
        boolean micro = rest.startsWith("u") && (rest.length() > 1 || ohm);
        String letters = micro ? rest.substring(1) : rest;
        return (micro ? "\\mu " : "") + (letters.isEmpty() ? "" : "\\mathrm{" + letters + "}") + (ohm ? "\\Omega " : "");
    }

    /** A decimal text: {@code 2.1e-6} as 2.1\cdot 10^{-6}. */
    public static String number(String text) {
        int e = Math.max(text.indexOf('e'), text.indexOf('E'));
        if (e < 0) {
            return text;
        }
        String exponent = String.valueOf(Integer.parseInt(text.substring(e + 1)));
        return (text.substring(0, e).equals("1") ? "" : text.substring(0, e) + "\\cdot ") + "10^{" + exponent + "}";
    }

    static String of(Node n) {
        if (n instanceof Node.Literal l) {
            return number(l.text() != null ? l.text() : Printer.number(l.value()));
        } else if (n instanceof Node.Measure m) {
            String unit = m.amount().shown();
            return number(m.text()) + (unit.startsWith("deg") || unit.startsWith("\u00b0") ? "" : "\\,") + unit(unit);
        } else if (n instanceof Node.Infinity) {
            return "\\infty ";
        } else if (n instanceof Node.Constant c) {
            return name(c.name());
        } else if (n instanceof Node.Name v) {
            return name(v.name());
        } else if (n instanceof Node.Known k) {
            return k.name() != null ? name(k.name()) : known(k);
        } else if (n instanceof Node.Negate m) {
            return "-" + within(m.of(), m.of() instanceof Node.Negate ? ATOM : PRODUCT);
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            return call(c, "");
        } else if (n instanceof Node.Apply a) {
            return name(a.name()) + list(a.arguments());
        } else if (n instanceof Node.Inlined f) {
            return f.name() == null ? of(f.body()) : name(f.name()) + (f.arguments().isEmpty() ? "" : list(f.arguments()));
        } else if (n instanceof Node.When w) {
            return when(w);
        } else if (n instanceof Node.Compare c) {
            return of(c.left()) + relation(c.relation()) + of(c.right());
        } else if (n instanceof Node.Logic l) {
            return logic(l);
        } else if (n instanceof Node.Integral i) {
            return integral(i);
        }
        throw new IllegalStateException(n.toString());
    }

    private static String known(Node.Known k) {
        String unit = Units.preferred(k.amount().dimension());
        return number(Printer.number(k.amount().si())) + (unit.isEmpty() ? "" : "\\," + unit(unit));
    }

    private static String binary(Node.Binary b) {
        return switch (b.operator()) {
            case PLUS, MINUS -> within(b.left(), SUM) + b.operator().sign + within(b.right(), PRODUCT);
            case TIMES -> {
                String right = within(b.right(), POWER);
                boolean digit = Character.isDigit(right.charAt(0)) || right.startsWith("\\frac{") && Character.isDigit(right.charAt(6));
                yield within(b.left(), PRODUCT) + (digit ? "\\cdot " : "\\,") + right;
            }
            case OVER -> "\\frac{" + of(b.left()) + "}{" + of(b.right()) + "}";
            case POWER -> power(b);
        };
    }

    private static String power(Node.Binary b) {
        String exponent = "{" + of(b.right()) + "}";
        if (b.left() instanceof Node.Call c && WORDS.containsKey(c.function()) && b.right() instanceof Node.Literal) {
            return call(c, "^" + exponent);   // sin² x
        }
        String base = of(b.left());
        boolean bare = level(b.left()) >= ATOM && !(b.left() instanceof Node.Call) && !(b.left() instanceof Node.Measure)
            && !(b.left() instanceof Node.Integral) && !(b.left() instanceof Node.When) && !(b.left() instanceof Node.Apply)
            && !(b.left() instanceof Node.Inlined) && !base.contains("^") && !base.contains("\\cdot") && !base.endsWith("'")
            && !(b.left() instanceof Node.Known k && k.name() == null);
        return (bare ? base : brackets(base)) + "^" + exponent;
    }

    private static String call(Node.Call c, String power) {
        Function f = c.function();
        List<Node> a = c.arguments();
        String first = of(a.get(0));
        String last = of(a.get(a.size() - 1));
        if (ORDERED.containsKey(f)) {
            return ORDERED.get(f) + "_{" + first + "}" + brackets(last);
        }
        return switch (f) {
            case SQRT -> "\\sqrt{" + first + "}";
            case CBRT -> "\\sqrt[3]{" + first + "}";
            case EXP -> "\\mathrm{e}^{" + first + "}";
            case ABS -> "\\left|" + first + "\\right|";
            case FLOOR -> "\\left\\lfloor " + first + "\\right\\rfloor ";
            case CEIL -> "\\left\\lceil " + first + "\\right\\rceil ";
            case ELLIPTIC_F_PHI -> "F" + brackets(first + "\\,|\\," + last);
            case ELLIPTIC_E_PHI -> "E" + brackets(first + "\\,|\\," + last);
            case ELLIPTIC_PI -> "\\Pi" + brackets(first + "\\,|\\," + last);
            case ELLIPTIC_PI_PHI -> "\\Pi" + brackets(first + ";" + of(a.get(1)) + "\\,|\\," + last);
            default -> WORDS.get(f) + power + list(a);
        };
    }

    private static String when(Node.When w) {
        StringBuilder b = new StringBuilder("\\begin{cases}");
        Node rest = w;
        while (rest instanceof Node.When next) {
            b.append(of(next.yes())).append("&\\quad\\text{if }").append(of(next.condition())).append("\\\\");
            rest = next.no();
        }
        return b.append(of(rest)).append("&\\quad\\text{otherwise}\\end{cases}").toString();
    }

    private static String relation(Node.Relation r) {
        return switch (r) {
            case LESS -> "<";
            case LESS_OR_EQUAL -> "\\leq ";   // jlatexmath 1.0.7 takes "le" before "left" for a bracket
            case GREATER -> ">";
            case GREATER_OR_EQUAL -> "\\geq ";
            case MUCH_LESS -> "\\ll ";
            case MUCH_GREATER -> "\\gg ";
        };
    }

    private static String logic(Node.Logic l) {
        if (l.junction() == Node.Junction.NOT) {
            return "\\text{not }" + brackets(of(l.parts().get(0)));
        }
        String word = l.junction() == Node.Junction.AND ? "\\text{ and }" : "\\text{ or }";
        return l.parts().stream().map(p -> p instanceof Node.Logic ? brackets(of(p)) : of(p)).collect(Collectors.joining(word));
    }

    private static String integral(Node.Integral i) {
        StringBuilder signs = new StringBuilder();
        StringBuilder differentials = new StringBuilder();
        for (Node.Range r : Nesting.order(i, "")) {
            signs.append("\\int_{").append(of(r.from())).append("}^{").append(of(r.to())).append("}");
            differentials.insert(0, "\\,\\mathrm{d}" + name(r.variable()));
        }
        return signs + within(i.body(), PRODUCT) + differentials;
    }

    private static String list(List<Node> nodes) {
        return brackets(nodes.stream().map(Latex::of).collect(Collectors.joining(",\\,")));
    }

    private static String brackets(String inner) {
        return "\\left(" + inner + "\\right)";
    }

    private static String within(Node n, int least) {
        return level(n) < least ? brackets(of(n)) : of(n);
    }

    private static int level(Node n) {
        if (n instanceof Node.Inlined f && f.name() == null) {
            return level(f.body());
        }
        if (n instanceof Node.Binary b && b.operator() == Node.Operator.OVER) {
            return POWER;   // a fraction needs no brackets as a factor
        }
        return n instanceof Node.When ? PRODUCT : Printer.level(n);   // an integral ends with its differential
    }
}

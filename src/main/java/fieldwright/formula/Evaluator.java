package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.Bounds;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Stop;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * Value of a bound, unit-checked tree with its numerical error, carried outward.
 *
 * <p>Sums, products, quotients: exact rounding plus carried error. Functions: the largest deviation at the corners of
 * the error box, which is right where the function is monotone or quadratic over the box, plus the function's own
 * accuracy. A comparison that the errors leave open counts both values of its {@code when}. Integrals: the
 * integrator's estimate, plus the change when each inexact quantity inside moves by its error.
 */
final class Evaluator {
    private final String text;
    private final Map<String, Approx> variables;
    private final Integrator integrator;

    Evaluator(String text, Map<String, Approx> variables, Integrator integrator) {
        this.text = text;
        this.variables = variables;
        this.integrator = integrator;
    }

    /** Value of a tree without free names, integrals or formulas of the sheet; null when it has some. */
    static Double constant(Node n) {
        if (Trees.any(n, c -> c instanceof Node.Name || c instanceof Node.Apply || c instanceof Node.Integral || c instanceof Node.Inlined f && f.condition() != null)) {
            return null;
        }
        return new Evaluator("", Map.of(), null).of(n).value();
    }

    Approx of(Node n) {
        if (n instanceof Node.Literal l) {
            return new Approx(l.value(), literalError(l), Standing.CONVERGED);
        } else if (n instanceof Node.Measure m) {
            return Approx.of(m.amount());
        } else if (n instanceof Node.Infinity) {
            return Approx.exact(Double.POSITIVE_INFINITY);
        } else if (n instanceof Node.Constant c) {
            return Approx.of(Constants.value(c.name()));
        } else if (n instanceof Node.Known k) {
            return Approx.of(k.amount());
        } else if (n instanceof Node.Name v) {
            Approx value = variables.get(v.name());
            if (value == null) {
                throw Parser.unknown(v, variables.keySet());
            }
            return value;
        } else if (n instanceof Node.Negate m) {
            Approx a = of(m.of());
            return new Approx(-a.value(), a.error(), a.standing());
        } else if (n instanceof Node.Binary b) {
            return binary(b);
        } else if (n instanceof Node.Call c) {
            return call(c);
        } else if (n instanceof Node.When w) {
            return when(w);
        } else if (n instanceof Node.Inlined f) {
            return inlined(f);
        } else if (n instanceof Node.Integral i) {
            return integral(i);
        }
        throw new IllegalStateException("not bound: " + n);
    }

    private Approx inlined(Node.Inlined f) {
        if (f.condition() == null) {
            return of(f.body());
        }
        Truth truth = truth(f.condition());
        if (!truth.holds() && !truth.open()) {
            throw new FormulaException(text, f.at().offset(), f.call() + " holds only for " + f.holdsFor()
                + violation(f.condition()) + ". Stay inside the condition or write a formula for this case.");
        }
        return of(f.body());
    }

    /** 0.1 is not a double: half a unit in the last place, unless the decimal is exact. */
    private static double literalError(Node.Literal l) {
        return l.text() == null || l.value() == Math.rint(l.value()) && Math.abs(l.value()) < 0x1p53
            || new java.math.BigDecimal(l.text()).compareTo(new java.math.BigDecimal(l.value())) == 0 ? 0 : Math.ulp(l.value()) / 2;
    }

    private Approx binary(Node.Binary b) {
        Approx l = of(b.left());
        Approx r = of(b.right());
        Standing standing = l.standing().worse(r.standing());
        double x = l.value();
        double y = r.value();
        switch (b.operator()) {
            case PLUS:
                return checked(b, x + y, Bounds.sum(l.error(), r.error(), Bounds.roundingOfSum(x, y, x + y)), standing);
            case MINUS:
                return checked(b, x - y, Bounds.sum(l.error(), r.error(), Bounds.roundingOfSum(x, -y, x - y)), standing);
            case TIMES:
                return checked(b, x * y, Bounds.ofProduct(x, l.error(), y, r.error(), x * y), standing);
            case OVER:
                if (y == 0) {
                    throw new FormulaException(text, b.at().offset(), "division by zero: '" + Printer.text(b.right()) + "' is 0. Check the divisor.");
                }
                return checked(b, x / y, Bounds.ofQuotient(x, l.error(), y, r.error(), x / y), standing);
            default:
                return power(b, l, r, standing);
        }
    }

    private Approx power(Node.Binary b, Approx base, Approx exponent, Standing standing) {
        double p = exponent.value();
        if (exponent.error() == 0 && p == Math.rint(p) && Math.abs(p) <= 64) {
            Approx result = Approx.exact(1);
            for (int i = 0; i < Math.abs(p); i++) {
                double product = result.value() * base.value();
                result = new Approx(product, Bounds.ofProduct(result.value(), result.error(), base.value(), base.error(), product), standing);
            }
            if (p < 0) {
                if (result.value() == 0) {
                    throw new FormulaException(text, b.at().offset(), "division by zero: '" + Printer.text(b.left()) + "' is 0 and its exponent negative.");
                }
                double quotient = 1 / result.value();
                result = new Approx(quotient, Bounds.ofQuotient(1, 0, result.value(), result.error(), quotient), standing);
            }
            return checked(b, result.value(), result.error(), standing);
        }
        Approx result = overBox(a -> Math.pow(a[0], a[1]), List.of(base, exponent), 1, 0);
        return checked(b, result.value(), result.error(), standing);
    }

    private Approx call(Node.Call c) {
        List<Approx> a = new ArrayList<>();
        Standing standing = Standing.CONVERGED;
        for (Node argument : c.arguments()) {
            Approx value = of(argument);
            a.add(value);
            standing = standing.worse(value.standing());
        }
        Function f = c.function();
        if (f == Function.SIN || f == Function.COS) {
            Approx x = a.get(0);
            double slope = Math.min(1, Math.abs(f == Function.SIN ? Math.cos(x.value()) : Math.sin(x.value())) + x.error());
            double value = f.value(x.value());
            return checked(c, value, Bounds.sum(Math.min(2, Bounds.product(slope, x.error())), Math.ulp(value)), standing);
        }
        Approx result = overBox(f::value, a, f.ulps(), f.absoluteAccuracy(values(a)));
        return checked(c, result.value(), result.error(), standing);
    }

    private static double[] values(List<Approx> a) {
        return a.stream().mapToDouble(Approx::value).toArray();
    }

    private Approx checked(Node n, double value, double error, Standing standing) {
        if (Double.isNaN(value) && standing.isConverged()) {
            String why = n instanceof Node.Call c ? arguments(c) : "";
            throw new FormulaException(text, n.at().offset(), "'" + Printer.text(n) + "' has no value" + why
                + ". Stay inside the range where it is defined.");
        }
        return new Approx(value, error, standing);
    }

    private String arguments(Node.Call c) {
        List<String> values = new ArrayList<>();
        c.arguments().forEach(a -> values.add(Printer.number(of(a).value())));
        return ": " + c.function().text() + "(" + String.join(", ", values) + ")";
    }

    /** f over the box of its arguments' errors; a corner outside the domain is pulled in to the domain's edge. */
    private static Approx overBox(Function.Numeric f, List<Approx> a, double ulps, double absolute) {
        int n = a.size();
        double[] centre = new double[n];
        boolean known = true;
        boolean exact = true;
        for (int i = 0; i < n; i++) {
            centre[i] = a.get(i).value();
            known &= !Double.isNaN(a.get(i).error());
            exact &= a.get(i).error() == 0;
        }
        double value = f.of(centre);
        if (!known) {
            return new Approx(value, Double.NaN, Standing.CONVERGED);
        }
        double spread = 0;
        double largest = Math.abs(value);
        for (int corner = 0; !exact && corner < 1 << n; corner++) {
            double[] at = new double[n];
            for (int i = 0; i < n; i++) {
                double e = a.get(i).error();
                at[i] = e == 0 ? centre[i] : (corner >> i & 1) == 0 ? Math.nextDown(centre[i] - e) : Math.nextUp(centre[i] + e);
            }
            double there = f.of(at);
            if (Double.isNaN(there) && !Double.isNaN(value)) {
                there = f.of(edge(f, centre, at));
            } else if (Double.isNaN(value) && !Double.isNaN(there)) {
                value = f.of(edge(f, at, centre));
                spread = Math.abs(there - value);
            }
            if (!Double.isNaN(there)) {
                spread = Math.max(spread, Math.abs(there - value));
                largest = Math.max(largest, Math.abs(there));
            }
        }
        if (Double.isInfinite(value)) {
            return new Approx(value, 0, Standing.CONVERGED);
        }
        return new Approx(value, Bounds.sum(spread, ulps * Math.ulp(largest), absolute), Standing.CONVERGED);
    }

    /** The last point on the way from inside to outside where f has a value. */
    private static double[] edge(Function.Numeric f, double[] inside, double[] outside) {
        double low = 0;
        double high = 1;
        for (int i = 0; i < 60; i++) {
            double middle = (low + high) / 2;
            if (Double.isNaN(f.of(between(inside, outside, middle)))) {
                high = middle;
            } else {
                low = middle;
            }
        }
        return between(inside, outside, low);
    }

    private static double[] between(double[] a, double[] b, double t) {
        double[] p = new double[a.length];
        for (int i = 0; i < p.length; i++) {
            p[i] = a[i] == b[i] ? a[i] : a[i] + t * (b[i] - a[i]);
        }
        return p;
    }

    // Conditions

    /** @param open the numerical errors allow the other answer too */
    private record Truth(boolean holds, boolean open, Standing standing) {
    }

    private Truth truth(Node condition) {
        if (condition instanceof Node.Compare c) {
            Approx l = of(c.left());
            Approx r = of(c.right());
            double distance = Math.abs(l.value() - r.value());
            boolean same = c.left().equals(c.right());
            boolean open = !same && l.error() + r.error() > 0 && distance <= l.error() + r.error();
            return new Truth(c.relation().holds(l.value(), r.value()), open, l.standing().worse(r.standing()));
        }
        Node.Logic logic = (Node.Logic) condition;
        Truth result = truth(logic.parts().get(0));
        if (logic.junction() == Node.Junction.NOT) {
            return new Truth(!result.holds(), result.open(), result.standing());
        }
        boolean and = logic.junction() == Node.Junction.AND;
        for (Node part : logic.parts().subList(1, logic.parts().size())) {
            if (result.holds() != and && !result.open()) {
                return result;
            }
            Truth next = truth(part);
            boolean decided = next.holds() != and && !next.open();
            boolean holds = and ? result.holds() && next.holds() : result.holds() || next.holds();
            result = new Truth(holds, !decided && (result.open() || next.open()), result.standing().worse(next.standing()));
        }
        return result;
    }

    private Approx when(Node.When w) {
        Truth truth = truth(w.condition());
        Approx taken = of(truth.holds() ? w.yes() : w.no());
        Standing standing = taken.standing().worse(truth.standing());
        if (!truth.open()) {
            return new Approx(taken.value(), taken.error(), standing);
        }
        double difference;
        try {
            Approx other = of(truth.holds() ? w.no() : w.yes());
            difference = Bounds.sum(Math.abs(taken.value() - other.value()), other.error());
        } catch (FormulaException e) {   // the other branch has no value just here
            difference = Double.POSITIVE_INFINITY;
        }
        return new Approx(taken.value(), Math.max(taken.error(), difference), standing);
    }

    private String violation(Node condition) {
        Node.Compare c = condition instanceof Node.Compare compare ? compare : null;
        if (c == null) {
            return "";
        }
        return ", and here the left side is " + Printer.number(of(c.left()).value()) + ", the right side " + Printer.number(of(c.right()).value())
            + " in SI";
    }

    // Integrals

    private Approx integral(Node.Integral i) {
        if (integrator == null) {
            throw new FormulaException(text, i.at().offset(), "an integral cannot be worked here. Give its value a name on a derive line above.");
        }
        Stop.check();
        Map<String, Node> outer = new LinkedHashMap<>();
        for (String name : Trees.free(i)) {
            if (variables.containsKey(name)) {
                Approx v = variables.get(name);
                outer.put(name, new Node.Known(name, Amount.si(v.value(), v.error(), Units.NONE, v.standing()), i.at()));
            }
        }
        Node.Integral closed = (Node.Integral) Trees.substitute(i, outer);
        Integrator.Estimate e = estimate(closed);
        double error = Bounds.sum(e.error(), 2 * Math.ulp(e.value()));
        Standing standing = e.standing();
        Map<Node.Known, Boolean> inexact = new HashMap<>();
        Trees.visit(closed, n -> {
            if (n instanceof Node.Known k) {
                inexact.put(k, true);
            }
        });
        for (Node.Known k : inexact.keySet()) {
            standing = standing.worse(k.amount().standing());
            if (Double.isNaN(k.amount().error())) {
                error = Double.NaN;
            } else if (k.amount().error() > 4 * Math.ulp(k.amount().si())) {   // less is rounding, which the integrator's floor covers
                error = Bounds.sum(error, Math.max(change(closed, k, 1, e), change(closed, k, -1, e)));
            }
        }
        return checked(i, e.value(), error, standing);
    }

    private double change(Node.Integral i, Node.Known k, int sign, Integrator.Estimate centre) {
        double moved = k.amount().si() + sign * k.amount().error();
        Node.Integral shifted = (Node.Integral) replace(i, k, new Node.Known(k.name(), Amount.si(moved, 0, k.amount().dimension()), k.at()));
        Integrator.Estimate e = estimate(shifted);
        return Math.abs(e.value() - centre.value());
    }

    private static Node replace(Node n, Node.Known old, Node.Known with) {
        return n.equals(old) ? with : n.mapChildren(c -> replace(c, old, with));
    }

    private Integrator.Estimate estimate(Node.Integral closed) {
        return integrator.integrate(new IntegralCode(closed, List.of(), text, integrator).at(new double[0]));
    }
}

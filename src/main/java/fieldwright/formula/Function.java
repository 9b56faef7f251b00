package fieldwright.formula;

import static fieldwright.formula.Node.call;
import static fieldwright.formula.Node.minus;
import static fieldwright.formula.Node.negate;
import static fieldwright.formula.Node.number;
import static fieldwright.formula.Node.over;
import static fieldwright.formula.Node.plus;
import static fieldwright.formula.Node.power;
import static fieldwright.formula.Node.times;

import fieldwright.formula.special.Bessel;
import fieldwright.formula.special.CompleteElliptic;
import fieldwright.formula.special.IncompleteElliptic;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.apache.commons.math3.special.Erf;
import org.apache.commons.math3.special.Gamma;

/**
 * The functions of formulas. Arguments are plain numbers except where {@link Units} says otherwise; angles in radian.
 * Bessel and Legendre functions take the order first, a whole number from 0; elliptic integrals end in {@code _m} and
 * take the parameter m last. Outside its domain a function is NaN.
 */
public enum Function {
    SQRT("sqrt", "x", Units.ROOT_2, a -> Math.sqrt(a[0])),
    CBRT("cbrt", "x", Units.ROOT_3, a -> Math.cbrt(a[0])),
    EXP("exp", "x", Units.PLAIN, a -> Math.exp(a[0])),
    LN("ln", "x", Units.PLAIN, a -> Math.log(a[0])),
    LOG10("log10", "x", Units.PLAIN, a -> Math.log10(a[0])),
    SIN("sin", "x", Units.PLAIN, a -> Math.sin(a[0])),
    COS("cos", "x", Units.PLAIN, a -> Math.cos(a[0])),
    TAN("tan", "x", Units.PLAIN, a -> Math.tan(a[0])),
    ASIN("asin", "x", Units.PLAIN, a -> Math.asin(a[0])),
    ACOS("acos", "x", Units.PLAIN, a -> Math.acos(a[0])),
    ATAN("atan", "x", Units.PLAIN, a -> Math.atan(a[0])),
    ATAN2("atan2", "y, x", Units.ANGLE_OF, a -> Math.atan2(a[0], a[1])),
    SINH("sinh", "x", Units.PLAIN, a -> Math.sinh(a[0])),
    COSH("cosh", "x", Units.PLAIN, a -> Math.cosh(a[0])),
    TANH("tanh", "x", Units.PLAIN, a -> Math.tanh(a[0])),
    ASINH("asinh", "x", Units.PLAIN, a -> asinh(a[0])),
    ACOSH("acosh", "x", Units.PLAIN, a -> acosh(a[0])),
    ATANH("atanh", "x", Units.PLAIN, a -> atanh(a[0])),
    ABS("abs", "x", Units.SAME, a -> Math.abs(a[0])),
    SIGN("sign", "x", Units.SIGN, a -> Math.signum(a[0])),
    MIN("min", "a, b", Units.SAME, a -> Math.min(a[0], a[1])),
    MAX("max", "a, b", Units.SAME, a -> Math.max(a[0], a[1])),
    FLOOR("floor", "x", Units.PLAIN, a -> Math.floor(a[0])),
    CEIL("ceil", "x", Units.PLAIN, a -> Math.ceil(a[0])),
    ERF("erf", "x", Units.PLAIN, a -> erf(a[0])),
    ERFC("erfc", "x", Units.PLAIN, a -> Erf.erfc(a[0])),
    GAMMA("gamma", "x", Units.PLAIN, a -> gamma(a[0])),
    DIGAMMA("digamma", "x", Units.PLAIN, a -> digamma(a[0])),
    BESSEL_J("besselJ", "n, x", Units.PLAIN, a -> Bessel.j(order(a[0]), a[1])),
    BESSEL_Y("besselY", "n, x", Units.PLAIN, a -> Bessel.y(order(a[0]), a[1])),
    BESSEL_I("besselI", "n, x", Units.PLAIN, a -> Bessel.i(order(a[0]), a[1])),
    BESSEL_K("besselK", "n, x", Units.PLAIN, a -> Bessel.k(order(a[0]), a[1])),
    LEGENDRE_P("legendreP", "n, x", Units.PLAIN, a -> legendre(order(a[0]), a[1])),
    ELLIPTIC_K("ellipticK_m", "m", Units.PLAIN, a -> CompleteElliptic.firstKindOfParameter(a[0])),
    ELLIPTIC_E("ellipticE_m", "m", Units.PLAIN, a -> CompleteElliptic.secondKindOfParameter(a[0])),
    ELLIPTIC_PI("ellipticPi_m", "n, m", Units.PLAIN, a -> CompleteElliptic.thirdKindOfParameter(a[0], a[1])),
    ELLIPTIC_F_PHI("ellipticF_m", "phi, m", Units.PLAIN, a -> IncompleteElliptic.firstKindOfParameter(a[0], a[1])),
    ELLIPTIC_E_PHI("ellipticE_m", "phi, m", Units.PLAIN, a -> IncompleteElliptic.secondKindOfParameter(a[0], a[1])),
    ELLIPTIC_PI_PHI("ellipticPi_m", "n, phi, m", Units.PLAIN, a -> IncompleteElliptic.thirdKindOfParameter(a[0], a[1], a[2]));

    /** How units pass through. */
    enum Units { PLAIN, SAME, SIGN, ROOT_2, ROOT_3, ANGLE_OF }

    /** A real function of its arguments. */
    interface Numeric {
        double of(double[] arguments);
    }

    private static final Map<String, List<Function>> BY_NAME = byName();
    private static final int MOST_ORDER = 200;

    private final String text;
    private final List<String> arguments;
    private final Units units;
    private final Numeric numeric;

    Function(String text, String arguments, Units units, Numeric numeric) {
        this.text = text;
        this.arguments = List.of(arguments.split(", "));
        this.units = units;
        this.numeric = numeric;
    }

    public String text() {
        return text;
    }

    public int arity() {
        return arguments.size();
    }

    Units units() {
        return units;
    }

    public double value(double... a) {
        return numeric.of(a);
    }

    /** Documented or measured accuracy, in units in the last place of the result. */
    double ulps() {
        return switch (this) {
            case SQRT -> 0.5;
            case ABS, SIGN, MIN, MAX, FLOOR, CEIL -> 0;
            case EXP, LN, LOG10, SIN, COS, TAN, ASIN, ACOS, ATAN, CBRT -> 1;
            case ATAN2 -> 2;
            case SINH, COSH, TANH, ASINH, ACOSH, ATANH -> 4;
            case ERFC, ELLIPTIC_PI_PHI -> 256;
            default -> 32;
        };
    }

    /** Accuracy that does not shrink with the result: near the zeros of oscillating functions. */
    double absoluteAccuracy(double... a) {
        return switch (this) {
            case BESSEL_J, BESSEL_Y, LEGENDRE_P, DIGAMMA -> 4e-15;
            default -> 0;
        };
    }

    /** True when the first argument is an order, a whole number from 0. */
    boolean hasOrder() {
        return arguments.get(0).equals("n") && this != ELLIPTIC_PI && this != ELLIPTIC_PI_PHI;
    }

    static boolean isName(String name) {
        return BY_NAME.containsKey(name);
    }

    /** All names, for "closest defined name" and highlighting. */
    public static Set<String> names() {
        return BY_NAME.keySet();
    }

    /** The function of this name and number of arguments, or null. min and max take two here; more are folded by the parser. */
    static Function of(String name, int arity) {
        return BY_NAME.getOrDefault(name, List.of()).stream().filter(f -> f.arity() == arity).findFirst().orElse(null);
    }

    static String usage(String name) {
        List<String> ways = new ArrayList<>();
        BY_NAME.get(name).forEach(f -> ways.add(name + "(" + String.join(", ", f.arguments) + ")"));
        return String.join(" or ", ways);
    }

    /**
     * Derivative with respect to the {@code i}-th argument, as a tree over the argument trees; null when there is none
     * (with respect to an order).
     */
    Node derivative(int i, List<Node> a) {
        Node x = a.get(a.size() - 1);
        Node n = a.get(0);
        switch (this) {
            case SQRT:
                return over(number(1), times(number(2), call(SQRT, x)));
            case CBRT:
                return over(number(1), times(number(3), power(call(CBRT, x), 2)));
            case EXP:
                return call(EXP, x);
            case LN:
                return over(number(1), x);
            case LOG10:
                return over(number(1), times(x, call(LN, number(10))));
            case SIN:
                return call(COS, x);
            case COS:
                return negate(call(SIN, x));
            case TAN:
                return plus(number(1), power(call(TAN, x), 2));
            case ASIN:
                return over(number(1), call(SQRT, minus(number(1), power(x, 2))));
            case ACOS:
                return negate(over(number(1), call(SQRT, minus(number(1), power(x, 2)))));
            case ATAN:
                return over(number(1), plus(number(1), power(x, 2)));
            case ATAN2: {
                Node square = plus(power(n, 2), power(x, 2));
                return i == 0 ? over(x, square) : negate(over(n, square));
            }
            case SINH:
                return call(COSH, x);
            case COSH:
                return call(SINH, x);
            case TANH:
                return minus(number(1), power(call(TANH, x), 2));
            case ASINH:
                return over(number(1), call(SQRT, plus(power(x, 2), number(1))));
            case ACOSH:
                return over(number(1), call(SQRT, minus(power(x, 2), number(1))));
            case ATANH:
                return over(number(1), minus(number(1), power(x, 2)));
            case ABS:
                return call(SIGN, x);
            case SIGN, FLOOR, CEIL:
                return number(0);
            case MIN, MAX: {
                Node.Relation first = this == MIN ? Node.Relation.LESS_OR_EQUAL : Node.Relation.GREATER_OR_EQUAL;
                Node condition = new Node.Compare(first, n, x, x.at());
                return new Node.When(condition, number(i == 0 ? 1 : 0), number(i == 0 ? 0 : 1), x.at());
            }
            case ERF:
                return times(over(number(2), call(SQRT, new Node.Constant("pi", x.at()))), call(EXP, negate(power(x, 2))));
            case ERFC:
                return negate(ERF.derivative(i, a));
            case GAMMA:
                return times(call(GAMMA, x), call(DIGAMMA, x));
            case BESSEL_J, BESSEL_Y, BESSEL_I, BESSEL_K, LEGENDRE_P:
                return i == 0 || !(n instanceof Node.Literal order) ? null : byOrder(order.value(), x);
            default:
                return Elliptics.derivative(this, i, a);
        }
    }

    /** DLMF 10.6.2, 10.29.2 and 14.10.5. */
    private Node byOrder(double order, Node x) {
        if (this == LEGENDRE_P) {
            Node difference = minus(legendreNode(order - 1, x), times(x, legendreNode(order, x)));
            return order == 0 ? number(0) : order == 1 ? number(1)
                : over(times(number(order), difference), minus(number(1), power(x, 2)));
        }
        Node above = call(this, number(order + 1), x);
        if (order == 0) {
            return this == BESSEL_I ? above : negate(above);
        }
        Node below = call(this, number(order - 1), x);
        Node both = this == BESSEL_J || this == BESSEL_Y ? minus(below, above) : plus(below, above);
        Node half = over(both, number(2));
        return this == BESSEL_K ? negate(half) : half;
    }

    private static Node legendreNode(double order, Node x) {
        return call(LEGENDRE_P, number(order), x);
    }

    private static int order(double n) {
        return n >= 0 && n <= MOST_ORDER && n == Math.rint(n) ? (int) n : -1;
    }

    /** Bonnet's recurrence, DLMF 14.10.3. */
    private static double legendre(int n, double x) {
        if (n < 0) {
            return Double.NaN;
        }
        double before = 1;
        double now = n == 0 ? 1 : x;
        for (int k = 1; k < n; k++) {
            double after = ((2 * k + 1) * x * now - k * before) / (k + 1);
            before = now;
            now = after;
        }
        return now;
    }

    private static double asinh(double x) {
        double a = Math.abs(x);
        double result = a > 1e8 ? Math.log(a) + Math.log(2) : Math.log1p(a + a * a / (1 + Math.sqrt(1 + a * a)));
        return Math.copySign(result, x);
    }

    private static double acosh(double x) {
        double t = x - 1;
        return x > 1e8 ? Math.log(x) + Math.log(2) : Math.log1p(t + Math.sqrt(t) * Math.sqrt(x + 1));
    }

    private static double atanh(double x) {
        return 0.5 * Math.log1p(2 * x / (1 - x));
    }

    /** Below 0.5 by the series DLMF 7.6.1, where Commons Math is only absolutely accurate. */
    private static double erf(double x) {
        if (!(Math.abs(x) < 0.5)) {
            return Erf.erf(x);
        }
        double sum = x;
        double term = x;
        for (int k = 1; k < 40; k++) {
            term *= -x * x / k;
            sum += term / (2 * k + 1);
        }
        return 2 / Math.sqrt(Math.PI) * sum;
    }

    private static double gamma(double x) {
        if (x == Math.rint(x)) {
            if (x <= 0) {
                return Double.NaN;
            }
            double product = 1;
            for (int k = 2; k < x && k < 200; k++) {
                product *= k;
            }
            return product;
        }
        return Gamma.gamma(x);
    }

    /** Upwards by DLMF 5.5.2 until the expansion 5.11.2 has all digits; reflection 5.5.4 below 0. */
    private static double digamma(double x) {
        if (x <= 0) {
            return x == Math.rint(x) ? Double.NaN : digamma(1 - x) - Math.PI / Math.tan(Math.PI * x);
        }
        double shift = 0;
        double y = x;
        while (y < 12) {
            shift += 1 / y;
            y++;
        }
        double s = 1 / (y * y);
        double series = s * (1.0 / 12 - s * (1.0 / 120 - s * (1.0 / 252 - s * (1.0 / 240 - s * (1.0 / 132 - s * (691.0 / 32760 - s / 12))))));
        return Math.log(y) - 0.5 / y - series - shift;
    }

    private static Map<String, List<Function>> byName() {
        Map<String, List<Function>> map = new LinkedHashMap<>();
        for (Function f : values()) {
            map.computeIfAbsent(f.text, k -> new ArrayList<>()).add(f);
        }
        return map;
    }
}

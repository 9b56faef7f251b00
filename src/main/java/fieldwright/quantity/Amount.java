package fieldwright.quantity;

import java.math.BigDecimal;
import java.util.Locale;
import java.util.Objects;
import javax.measure.Dimension;

/**
 * A number with unit, numerical error and standing.
 *
 * @param si value in coherent SI
 * @param error bound on its numerical error: absolute, SI, not negative, widened outward by every operation;
 *     NaN when the error is not known because the number came in as a bare double
 * @param dimension what it measures; angles and percentages are plain numbers
 * @param shown unit text in which to show it, or null for {@link Units#preferred}
 * @param standing converged, not converged, or unbounded; the worse one wins in arithmetic
 */
public record Amount(double si, double error, Dimension dimension, String shown, Standing standing) {
    public Amount {
        dimension = Dimensions.of(dimension);
        Objects.requireNonNull(standing, "standing");
        if (error < 0) {
            throw new IllegalArgumentException("numerical error " + error + ": must not be negative");
        }
        if (Double.isNaN(si) && standing.isConverged()) {
            throw new AuthorException("a value came out as not a number. Look for 0/0, a root or logarithm of a negative number.");
        }
    }

    // Making

    /** {@code value} of the unit, the value read as its shortest decimal and rounded once to SI. */
    public static Amount of(double value, String unit) {
        if (!Double.isFinite(value)) {
            TradeUnit parsed = Units.parse(unit);
            return new Amount(value, 0, parsed.dimension(), parsed.text(), Standing.CONVERGED);
        }
        return of(BigDecimal.valueOf(value), unit);
    }

    /** The decimal {@code value} of the unit; the error is the one rounding to a double. */
    public static Amount of(BigDecimal value, String unit) {
        TradeUnit parsed = Units.parse(unit);
        double si = Units.toSi(value, unit);
        if (Double.isInfinite(si)) {
            throw new AuthorException(value + " " + unit + ": too large for a number. Check the exponent.");
        }
        boolean exact = parsed.factor() == 1 && new BigDecimal(si).compareTo(value) == 0;
        return new Amount(si, exact ? 0 : Math.ulp(si), parsed.dimension(), parsed.text(), Standing.CONVERGED);
    }

    /** A plain number, exact. */
    public static Amount of(double value) {
        return new Amount(value, 0, Units.NONE, null, Standing.CONVERGED);
    }

    public static Amount si(double value, double error, Dimension dimension) {
        return new Amount(value, error, dimension, null, Standing.CONVERGED);
    }

    public static Amount si(double value, double error, Dimension dimension, Standing standing) {
        return new Amount(value, error, dimension, null, standing);
    }

    // Asking

    public boolean isConverged() {
        return standing.isConverged();
    }

    public boolean isPlain() {
        return dimension.equals(Units.NONE);
    }

    /** The same amount, to be shown in {@code unit}. Errors: {@link AuthorException} when the unit does not fit. */
    public Amount in(String unit) {
        TradeUnit parsed = Units.parse(unit);
        if (!parsed.dimension().equals(dimension)) {
            throw new AuthorException("unit '" + unit + "' is " + Units.describe(parsed.dimension()) + " but the value is "
                + Units.describe(dimension) + ". Choose a unit that fits.");
        }
        return new Amount(si, error, dimension, parsed.text(), standing);
    }

    /** The number in {@code unit}, without its error. */
    public double value(String unit) {
        in(unit);
        return Double.isFinite(si) ? Units.fromSi(si, unit).doubleValue() : si;
    }

    /** Unit text in which it is shown; "" for a plain number. */
    public String unitText() {
        return shown != null ? shown : Units.preferred(dimension);
    }

    public Amount withStanding(Standing worst) {
        return new Amount(si, error, dimension, shown, worst);
    }

    public Amount withError(double absolute) {
        return new Amount(si, absolute, dimension, shown, standing);
    }

    public boolean lessThan(Amount other) {
        require("compare", other);
        return si < other.si;
    }

    public boolean greaterThan(Amount other) {
        return other.lessThan(this);
    }

    // Arithmetic

    public Amount plus(Amount b) {
        require("add", b);
        double sum = si + b.si;
        return result(sum, Bounds.sum(error, b.error, Bounds.roundingOfSum(si, b.si, sum)), dimension, commonUnit(b), b);
    }

    public Amount plus(double plain) {
        return plus(of(plain));
    }

    public Amount minus(Amount b) {
        require("subtract", b);
        return plus(b.negated());
    }

    public Amount minus(double plain) {
        return plus(-plain);
    }

    public Amount times(Amount b) {
        double product = si * b.si;
        String unit = b.isPlain() ? shown : isPlain() ? b.shown : null;
        return result(product, Bounds.ofProduct(si, error, b.si, b.error, product), dimension.multiply(b.dimension), unit, b);
    }

    public Amount times(double plain) {
        return times(of(plain));
    }

    public Amount dividedBy(Amount b) {
        if (b.si == 0) {
            throw new AuthorException("division by zero" + (b.isPlain() ? "" : " (" + Units.describe(b.dimension) + ")")
                + ". Check the divisor.");
        }
        double quotient = si / b.si;
        String unit = b.isPlain() ? shown : null;
        return result(quotient, Bounds.ofQuotient(si, error, b.si, b.error, quotient), dimension.divide(b.dimension), unit, b);
    }

    public Amount dividedBy(double plain) {
        return dividedBy(of(plain));
    }

    public Amount power(int n) {
        if (n < 0) {
            return of(1).dividedBy(power(-n));
        }
        Amount result = of(1);
        Amount square = this;
        for (int k = n; k > 0; k >>= 1) {
            if ((k & 1) == 1) {
                result = result.times(square);
            }
            square = k > 1 ? square.times(square) : square;
        }
        return new Amount(result.si, result.error, dimension.pow(n), isPlain() || n == 1 ? shown : null, standing);
    }

    /** Power of a plain number; for a quantity with a unit use {@link #power(int)} or {@link #root(int)}. */
    public Amount power(double exponent) {
        if (exponent == Math.rint(exponent) && Math.abs(exponent) <= 64) {
            return power((int) exponent);
        }
        plain("a power with exponent " + exponent);
        if (si < 0) {
            throw new AuthorException("power of a negative number (" + si + ") with exponent " + exponent + ". Check the sign.");
        }
        return monotone(x -> Math.pow(x, exponent), 1, 0, Double.POSITIVE_INFINITY);
    }

    public Amount sqrt() {
        return root(2);
    }

    /** The n-th root, n from 1; odd roots of negative numbers are negative. */
    public Amount root(int n) {
        if (n < 1) {
            throw new AuthorException("root of degree " + n + ": the degree must be at least 1.");
        }
        if (si < 0 && n % 2 == 0) {
            if (-si <= error) {   // zero within its numerical error
                return new Amount(0, root(n, Bounds.sum(error, error)), dimension.root(n), null, standing);
            }
            throw new AuthorException("root of a negative number (" + this + "). Check the sign.");
        }
        double low = n % 2 == 0 ? 0 : Double.NEGATIVE_INFINITY;
        Amount plain = new Amount(si, error, Units.NONE, null, standing).monotone(x -> root(n, x), n == 2 ? 1 : 2, low,
            Double.POSITIVE_INFINITY);
        return new Amount(plain.si, plain.error, dimension.root(n), n == 1 ? shown : null, standing);
    }

    private static double root(int n, double x) {
        return switch (n) {
            case 1 -> x;
            case 2 -> Math.sqrt(x);
            case 3 -> Math.cbrt(x);
            default -> Math.copySign(Math.pow(Math.abs(x), 1.0 / n), x);
        };
    }

    public Amount negated() {
        return new Amount(-si, error, dimension, shown, standing);
    }

    public Amount abs() {
        return new Amount(Math.abs(si), error, dimension, shown, standing);
    }

    /** The larger; its error covers the case that the other one is larger in truth. */
    public Amount max(Amount b) {
        require("compare", b);
        double value = Math.max(si, b.si);
        return result(value, Math.max(error, b.error), dimension, commonUnit(b), b);
    }

    public Amount min(Amount b) {
        return negated().max(b.negated()).negated();
    }

    public Amount sin() {
        plain("sin");
        return lipschitz(Math.sin(si), Math.min(1, Math.abs(Math.cos(si)) + error));
    }

    public Amount cos() {
        plain("cos");
        return lipschitz(Math.cos(si), Math.min(1, Math.abs(Math.sin(si)) + error));
    }

    public Amount exp() {
        plain("exp");
        return monotone(Math::exp, 1, Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY);
    }

    /** Natural logarithm. */
    public Amount ln() {
        plain("ln");
        if (!(si > 0)) {
            throw new AuthorException("logarithm of " + si + ": the argument must be positive.");
        }
        return monotone(Math::log, 1, 0, Double.POSITIVE_INFINITY);
    }

    private Amount lipschitz(double value, double slope) {
        return new Amount(value, Bounds.sum(Bounds.product(slope, error), Math.ulp(value)), Units.NONE, null, standing);
    }

    /** f rising or falling on [low, high]: the error is the larger distance to the values at the ends of the error interval. */
    private Amount monotone(java.util.function.DoubleUnaryOperator f, int ulps, double low, double high) {
        double value = f.applyAsDouble(si);
        double bound = ulps * Math.ulp(value);
        if (error != 0) {
            double below = f.applyAsDouble(Math.max(low, Math.nextDown(si - error)));
            double above = f.applyAsDouble(Math.min(high, Math.nextUp(si + error)));
            double spread = Math.max(Math.abs(value - below), Math.abs(above - value));
            bound = Bounds.sum(bound, spread, ulps * Math.max(Math.ulp(below), Math.ulp(above)));
        }
        return new Amount(value, bound, Units.NONE, null, standing);
    }

    private Amount result(double value, double bound, Dimension d, String unit, Amount other) {
        Standing worst = standing.worse(other.standing);
        if (!Double.isFinite(value) && Double.isFinite(si) && Double.isFinite(other.si)) {
            throw new AuthorException("a value left the range of numbers (" + this + " with " + other + "). Check the units.");
        }
        if (Double.isInfinite(bound) && Double.isFinite(value)) {
            worst = worst.worse(Standing.NO_ERROR_BOUND);
        }
        return new Amount(value, bound, d, unit, worst);
    }

    private String commonUnit(Amount b) {
        return shown == null ? b.shown : shown;
    }

    private void require(String operation, Amount b) {
        if (!dimension.equals(b.dimension)) {
            throw new AuthorException("cannot " + operation + " " + Units.describe(dimension) + " and "
                + Units.describe(b.dimension) + ". Both must have one unit.");
        }
    }

    private void plain(String function) {
        if (!isPlain()) {
            throw new AuthorException(function + " of " + Units.describe(dimension) + ": its argument must be a plain number. "
                + "Divide by a quantity of the same kind first.");
        }
    }

    /** Value to six digits with its unit, for messages: {@code 2.76969e+05 V/m}. */
    @Override
    public String toString() {
        String unit = unitText();
        double number = Double.isFinite(si) ? value(unit) : si;
        String text = number == 0 ? "0"
            : Math.abs(number) >= 1e-4 && Math.abs(number) < 1e6 ? trimmed(String.format(Locale.ROOT, "%." + decimals(number) + "f", number))
            : String.format(Locale.ROOT, "%.5e", number);
        return unit.isEmpty() ? text : text + " " + unit;
    }

    private static int decimals(double number) {
        return Math.max(0, 5 - (int) Math.floor(Math.log10(Math.abs(number))));
    }

    private static String trimmed(String decimal) {
        return decimal.contains(".") ? decimal.replaceAll("0+$", "").replaceAll("\\.$", "") : decimal;
    }
}

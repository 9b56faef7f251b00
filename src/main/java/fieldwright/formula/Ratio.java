package fieldwright.formula;

import java.math.BigDecimal;
import java.math.BigInteger;

/** An exact rational number in lowest terms, denominator positive; {@code decimal} when a decimal point went into it. */
record Ratio(BigInteger top, BigInteger bottom, boolean decimal) {
    static final Ratio ONE = of(1);
    static final Ratio ZERO = of(0);

    static Ratio of(long n) {
        return new Ratio(BigInteger.valueOf(n), BigInteger.ONE, false);
    }

    static Ratio of(BigInteger top, BigInteger bottom, boolean decimal) {
        BigInteger divisor = top.gcd(bottom).multiply(BigInteger.valueOf(bottom.signum()));
        return new Ratio(top.divide(divisor), bottom.divide(divisor), decimal);
    }

    /** The decimal as written; null when it would have hundreds of digits. */
    static Ratio of(Node.Literal l) {
        if (!Double.isFinite(l.value())) {
            return null;
        }
        BigDecimal d = l.text() != null ? new BigDecimal(l.text()) : BigDecimal.valueOf(l.value());
        if (Math.abs(d.scale()) > 60 || d.precision() > 60) {
            return null;
        }
        BigDecimal whole = d.stripTrailingZeros();
        return whole.scale() <= 0 ? of(whole.toBigIntegerExact(), BigInteger.ONE, false)
            : of(whole.unscaledValue(), BigInteger.TEN.pow(whole.scale()), true);
    }

    Ratio plus(Ratio o) {
        return of(top.multiply(o.bottom).add(o.top.multiply(bottom)), bottom.multiply(o.bottom), decimal || o.decimal);
    }

    Ratio times(Ratio o) {
        return of(top.multiply(o.top), bottom.multiply(o.bottom), decimal || o.decimal);
    }

    Ratio negated() {
        return new Ratio(top.negate(), bottom, decimal);
    }

    /** Null for a power of zero that has no value, and for results of hundreds of digits. */
    Ratio power(int n) {
        if (n < 0 && top.signum() == 0 || (long) Math.abs(n) * Math.max(top.bitLength(), bottom.bitLength()) > 400) {
            return null;
        }
        return n >= 0 ? new Ratio(top.pow(n), bottom.pow(n), decimal) : of(bottom.pow(-n), top.pow(-n), decimal);
    }

    boolean isZero() {
        return top.signum() == 0;
    }

    boolean isOne() {
        return top.equals(bottom);
    }

    boolean isWhole() {
        return bottom.equals(BigInteger.ONE);
    }

    boolean isNegative() {
        return top.signum() < 0;
    }

    Ratio abs() {
        return isNegative() ? negated() : this;
    }

    /** The exact decimal when one went in and it is short; null otherwise. */
    BigDecimal asDecimal() {
        if (!decimal) {
            return null;
        }
        try {
            BigDecimal d = new BigDecimal(top).divide(new BigDecimal(bottom));
            return d.precision() <= 17 ? d : null;
        } catch (ArithmeticException e) {
            return null;
        }
    }

    double value() {
        return isWhole() ? top.doubleValue() : new BigDecimal(top).divide(new BigDecimal(bottom), new java.math.MathContext(40)).doubleValue();
    }
}

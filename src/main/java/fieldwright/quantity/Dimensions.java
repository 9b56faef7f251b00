package fieldwright.quantity;

import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.Map;
import javax.measure.Dimension;

/**
 * A dimension as rational exponents of the seven SI base dimensions, in the order length, mass, time, current,
 * temperature, amount of substance, luminous intensity. Equal exponents are equal dimensions, whatever product they
 * came from, so {@code equals} is the test for "same dimension". Fractions occur under roots.
 */
public final class Dimensions implements Dimension {
    private static final int BASES = 7;
    static final String[] BASE_UNITS = {"m", "kg", "s", "A", "K", "mol", "cd"};

    private final int[] numerators;   // exponents are numerators / denominator, in lowest terms
    private final int denominator;

    private Dimensions(int[] numerators, int denominator) {
        int divisor = denominator;
        for (int n : numerators) {
            divisor = gcd(divisor, Math.abs(n));
        }
        this.denominator = denominator / divisor;
        this.numerators = new int[BASES];
        for (int i = 0; i < BASES; i++) {
            this.numerators[i] = numerators[i] / divisor;
        }
    }

    static Dimensions of(int length, int mass, int time, int current) {
        return new Dimensions(new int[] {length, mass, time, current, 0, 0, 0}, 1);
    }

    static Dimensions base(int index) {
        int[] n = new int[BASES];
        n[index] = 1;
        return new Dimensions(n, 1);
    }

    /** Any JSR 385 dimension in this form. */
    public static Dimensions of(Dimension dimension) {
        if (dimension instanceof Dimensions own) {
            return own;
        }
        Map<? extends Dimension, Integer> factors = dimension.getBaseDimensions();
        if (factors == null) {
            return ofSymbol(dimension.toString());
        }
        Dimensions product = base(0).pow(0);
        for (Map.Entry<? extends Dimension, Integer> f : factors.entrySet()) {
            product = product.multiply(of(f.getKey()).pow(f.getValue()));
        }
        return product;
    }

    private static Dimensions ofSymbol(String text) {
        int index = switch (text.replaceAll("[\\[\\]]", "")) {
            case "L" -> 0;
            case "M" -> 1;
            case "T" -> 2;
            case "I" -> 3;
            case "\u0398" -> 4;
            case "N" -> 5;
            case "J" -> 6;
            default -> -1;
        };
        return index < 0 ? base(0).pow(0) : base(index);
    }

    @Override
    public Dimensions multiply(Dimension other) {
        return combine(of(other), 1);
    }

    @Override
    public Dimensions divide(Dimension other) {
        return combine(of(other), -1);
    }

    private Dimensions combine(Dimensions other, int sign) {
        int[] n = new int[BASES];
        for (int i = 0; i < BASES; i++) {
            n[i] = numerators[i] * other.denominator + sign * other.numerators[i] * denominator;
        }
        return new Dimensions(n, denominator * other.denominator);
    }

    @Override
    public Dimensions pow(int exponent) {
        return pow(exponent, 1);
    }

    @Override
    public Dimensions root(int degree) {
        return degree < 0 ? pow(-1, -degree) : pow(1, degree);
    }

    /** This to the power {@code numerator/denominator}; the denominator is positive. */
    public Dimensions pow(int numerator, int denominator) {
        int[] n = new int[BASES];
        for (int i = 0; i < BASES; i++) {
            n[i] = numerators[i] * numerator;
        }
        return new Dimensions(n, this.denominator * denominator);
    }

    public boolean isNone() {
        return Arrays.stream(numerators).allMatch(n -> n == 0);
    }

    /** Exponent texts of the base units, those that are not zero, e.g. {m=1, s=-2} or {m=1/2}. */
    Map<String, String> exponents() {
        Map<String, String> result = new LinkedHashMap<>();
        for (int i = 0; i < BASES; i++) {
            if (numerators[i] != 0) {
                int divisor = gcd(Math.abs(numerators[i]), denominator);
                int d = denominator / divisor;
                result.put(BASE_UNITS[i], numerators[i] / divisor + (d == 1 ? "" : "/" + d));
            }
        }
        return result;
    }

    /** Base dimensions to exponents; a fractional exponent has no place in this view and is refused. */
    @Override
    public Map<? extends Dimension, Integer> getBaseDimensions() {
        if (denominator != 1) {
            throw new ArithmeticException("dimension " + this + " has fractional exponents");
        }
        Map<Dimension, Integer> result = new LinkedHashMap<>();
        for (int i = 0; i < BASES; i++) {
            if (numerators[i] != 0) {
                result.put(base(i), numerators[i]);
            }
        }
        return result;
    }

    private static int gcd(int a, int b) {
        return b == 0 ? a : gcd(b, a % b);
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Dimensions d && d.denominator == denominator && Arrays.equals(d.numerators, numerators);
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.hashCode(numerators) + denominator;
    }

    /** The base-unit product, e.g. {@code m*kg*s^-2}; {@code 1} for a plain number. */
    @Override
    public String toString() {
        if (isNone()) {
            return "1";
        }
        StringBuilder b = new StringBuilder();
        exponents().forEach((unit, e) -> {
            if (b.length() > 0) {
                b.append('*');
            }
            b.append(unit);
            if (!e.equals("1")) {
                b.append('^').append(e.contains("/") ? "(" + e + ")" : e);
            }
        });
        return b.toString();
    }
}

package fieldwright.output;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;

/** Numbers as text, the same on every Java version and in every locale. Infinite and NaN are refused. */
public final class NumberText {

    private NumberText() { }

    /**
     * The number with as few digits as read back to exactly the same double. Written out by hand because
     * {@code Double.toString} gives different (equally exact) digits on Java 17 and 19.
     * {@code 276969}, {@code 5.98511e-5}, {@code -0}.
     */
    public static String exact(double value) {
        for (int digits = 15; digits < 17; digits++) {
            String text = rounded(value, digits);
            if (Double.parseDouble(text) == value) {
                return text;
            }
        }
        return rounded(value, 17);
    }

    /** The number rounded to so many significant digits, trailing zeros dropped. */
    public static String rounded(double value, int digits) {
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException(value + " is not a number that can be written. Ask for its status first.");
        }
        if (value == 0) {
            return 1 / value < 0 ? "-0" : "0";
        }
        BigDecimal number = new BigDecimal(value).round(new MathContext(digits, RoundingMode.HALF_EVEN)).stripTrailingZeros();
        int exponent = number.precision() - number.scale() - 1;
        boolean plain = exponent >= -3 && exponent < 7;
        return plain ? number.toPlainString() : number.movePointLeft(exponent).toPlainString() + "e" + exponent;
    }
}

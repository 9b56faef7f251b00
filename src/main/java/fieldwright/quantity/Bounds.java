package fieldwright.quantity;

/**
 * Error bounds, rounded outward. The rounding of one sum or product is found exactly: by the two-sum of Knuth (The Art
 * of Computer Programming, vol. 2, 4.2.2, theorem B) and by a fused multiply-add.
 */
public final class Bounds {
    private Bounds() {
    }

    /** An upper bound of the sum of non-negative numbers; NaN and infinity pass through. */
    public static double sum(double... parts) {
        double total = 0;
        for (double part : parts) {
            total = total == 0 ? part : part == 0 ? total : Math.nextUp(total + part);
        }
        return total;
    }

    /** An upper bound of the product of two non-negative numbers; 0 times infinity is 0 here. */
    public static double product(double a, double b) {
        if (a == 0 || b == 0) {
            return Double.isNaN(a + b) ? Double.NaN : 0;
        }
        return Math.nextUp(a * b);
    }

    /** The rounding error of {@code sum}, which is {@code a + b} rounded; absolute. */
    public static double roundingOfSum(double a, double b, double sum) {
        if (!Double.isFinite(sum)) {
            return 0;
        }
        double bVirtual = sum - a;
        return Math.abs((a - (sum - bVirtual)) + (b - bVirtual));
    }

    /** Error of the product of a ± ea and b ± eb, {@code product} being a*b rounded. */
    public static double ofProduct(double a, double ea, double b, double eb, double product) {
        double carried = sum(product(Math.abs(a), eb), product(Math.abs(b), ea), product(ea, eb));
        return sum(carried, roundingOfProduct(a, b, product));
    }

    private static double roundingOfProduct(double a, double b, double product) {
        if (!Double.isFinite(product)) {
            return 0;
        }
        if (Math.abs(product) < 1e-280) {   // the residual itself would be rounded there
            return product == 0 && (a == 0 || b == 0) ? 0 : Math.ulp(product);
        }
        return Math.abs(Math.fma(a, b, -product));
    }

    /** Error of the quotient of a ± ea and b ± eb: |a/b - true| <= (ea + |a/b| eb)/(|b| - eb) + rounding; infinite when b may be zero. */
    public static double ofQuotient(double a, double ea, double b, double eb, double quotient) {
        double rounding = Double.isFinite(quotient) && Math.fma(quotient, b, -a) != 0 || Math.abs(quotient) < 1e-280 && quotient != 0
            ? Math.ulp(quotient) : 0;
        if (Double.isNaN(ea + eb)) {
            return Double.NaN;
        }
        double room = Math.nextDown(Math.abs(b) - eb);
        if (!(room > 0)) {
            return ea == 0 && eb == 0 ? rounding : Double.POSITIVE_INFINITY;
        }
        double top = sum(ea, product(Math.abs(quotient), eb), product(rounding, eb));
        return sum(top == 0 ? 0 : Math.nextUp(top / room), rounding);
    }
}

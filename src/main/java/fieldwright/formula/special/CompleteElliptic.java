package fieldwright.formula.special;

/**
 * Complete elliptic integrals of parameter m (the square of the modulus), m from -infinity to 1, or of the
 * complementary parameter 1 - m, which keeps all digits near m = 1. Source: DLMF 19.25(i).
 */
public final class CompleteElliptic {
    private CompleteElliptic() {
    }

    /** K(m); infinite at m = 1, NaN above. DLMF 19.25.1. */
    public static double firstKindOfParameter(double m) {
        return firstKindOfComplement(1 - m);
    }

    /** K as a function of 1 - m. */
    public static double firstKindOfComplement(double complement) {
        return complement == 0 ? Double.POSITIVE_INFINITY : Carlson.rf(0, complement, 1);
    }

    /** E(m); 1 at m = 1, NaN above. DLMF 19.25.1 in the form without cancellation. */
    public static double secondKindOfParameter(double m) {
        return secondKindOfComplement(1 - m);
    }

    /** E as a function of 1 - m. */
    public static double secondKindOfComplement(double complement) {
        return complement == 0 ? 1 : complement / 3 * (Carlson.rd(0, complement, 1) + Carlson.rd(0, 1, complement));
    }

    /** Π(n, m) with characteristic n < 1; NaN for n >= 1. DLMF 19.25.2. */
    public static double thirdKindOfParameter(double n, double m) {
        if (m == 1 && n < 1) {
            return Double.POSITIVE_INFINITY;
        }
        return Carlson.rf(0, 1 - m, 1) + n / 3 * Carlson.rj(0, 1 - m, 1, 1 - n);
    }
}

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

    /**
     * Π(n, m) with characteristic n < 1; NaN for n >= 1. DLMF 19.25.2; for negative n, where its two terms would cancel,
     * with the characteristic (m-n)/(1-n) instead: Abramowitz-Stegun 17.7.17.
     */
    public static double thirdKindOfParameter(double n, double m) {
        if (m == 1 && n < 1) {
            return Double.POSITIVE_INFINITY;
        }
        if (n < -0.25 && m >= 0) {
            double other = third((m - n) / (1 - n), (1 - m) / (1 - n), m);
            return (-n * (1 - m) / (1 - n) * other + m * firstKindOfParameter(m)) / (m - n);
        }
        return third(n, 1 - n, m);
    }

    private static double third(double n, double complementOfN, double m) {
        return Carlson.rf(0, 1 - m, 1) + n / 3 * Carlson.rj(0, 1 - m, 1, complementOfN);
    }
}

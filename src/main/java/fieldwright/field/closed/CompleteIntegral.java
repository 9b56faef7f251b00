package fieldwright.field.closed;

/**
 * Complete elliptic integrals in Bulirsch's general form and the combinations that rings and discs need. Written with the
 * complementary modulus, so nothing is lost when the place is near the ring (modulus near 1).
 */
final class CompleteIntegral {
    private static final double CLOSE = 1e-8; // the iteration converges quadratically: 1e-16 next

    private CompleteIntegral() {
    }

    /**
     * ∫ (c cos² + s sin²)/((cos² + p sin²) sqrt(cos² + kc² sin²)) from 0 to pi/2, for kc > 0, p > 0. All sums are of one sign
     * when c, s >= 0.
     *
     * <p>Source: Bulirsch, Numer. Math. 13 (1969) 305, procedure cel; the iteration from memory.
     */
    static double cel(double kc, double p, double c, double s) {
        double pp = Math.sqrt(p);
        double ss = s / pp;
        double em = 1;
        double kk = kc;
        double f = c;
        double cc = c + ss / pp;
        double g = kc / pp;
        ss = 2 * (ss + f * g);
        pp += g;
        g = em;
        em += kc;
        double k = kc;
        while (Math.abs(g - k) > g * CLOSE) {
            k = 2 * Math.sqrt(kk);
            kk = k * em;
            f = cc;
            cc += ss / pp;
            g = kk / pp;
            ss = 2 * (ss + f * g);
            pp += g;
            g = em;
            em += k;
        }
        return Math.PI / 2 * (ss + cc * em) / (em * (em + pp));
    }

    /** K: ∫ dθ/Δ, Δ² = cos² + kc² sin². */
    static double first(double kc) {
        return cel(kc, 1, 1, 1);
    }

    /** E: ∫ Δ dθ. */
    static double second(double kc) {
        return cel(kc, 1, 1, kc * kc);
    }

    /** B: ∫ cos²/Δ dθ. */
    static double cosineSquare(double kc) {
        return cel(kc, 1, 1, 0);
    }

    /** D: ∫ sin²/Δ dθ. */
    static double sineSquare(double kc) {
        return cel(kc, 1, 0, 1);
    }

    /**
     * C: ∫ sin² cos²/Δ³ dθ = (D - B)/m, by its series in the parameter m = 1 - kc² where the difference would cancel.
     *
     * <p>Source: series from the binomial expansion of Δ^(-3) and Wallis' integrals (derived here).
     */
    static double mixed(double m, double kc) {
        if (m > 0.4) {
            return (sineSquare(kc) - cosineSquare(kc)) / m;
        }
        double term = Math.PI / 16;
        double sum = 0;
        for (int j = 0; term > 1e-18; j++) {
            sum += term;
            // ratio of (3/2)_j/j! · ∫ sin^(2j+2) cos²
            term *= m * (j + 1.5) / (j + 1) * (2 * j + 3) / (2 * j + 6);
        }
        return sum;
    }
}

package fieldwright.field.closed;

/** Gauss-Legendre rules on [-1, 1], orders 1 to 32, by Newton's method on the three-term recurrence (DLMF §18.9, §3.5(v)). */
record GaussRule(double[] nodes, double[] weights) {
    private static final int MOST = 32;
    private static final GaussRule[] RULES = new GaussRule[MOST + 1];

    static {
        for (int n = 1; n <= MOST; n++) {
            RULES[n] = make(n);
        }
    }

    /** The rule of n points. */
    static GaussRule of(int n) {
        return RULES[n];
    }

    /**
     * Points needed for a relative truncation of about 1e-18 when the nearest singularity lies on the Bernstein ellipse of
     * parameter b (the error falls as b^(-2n); Trefethen, Approximation Theory and Approximation Practice, 2013, theorem 19.3).
     */
    static int pointsFor(double bernstein) {
        return (int) Math.min(MOST, 2 + Math.ceil(20.7 / Math.log(bernstein)));
    }

    /** Bernstein parameter |w + sqrt(w² - 1)| of w = u + iv: half the sum of the axes of the ellipse with foci ±1 through w. */
    static double bernstein(double u, double v) {
        double half = 0.5 * (Math.hypot(u - 1, v) + Math.hypot(u + 1, v));
        return half + Math.sqrt(Math.max(0, half * half - 1));
    }

    private static GaussRule make(int n) {
        double[] x = new double[n];
        double[] w = new double[n];
        for (int i = 0; i < n; i++) {
            double t = Math.cos(Math.PI * (i + 0.75) / (n + 0.5));
            double slope = 0;
            for (int step = 0; step < 8; step++) {
                double p0 = 1;
                double p1 = t;
                for (int k = 2; k <= n; k++) {
                    double p2 = ((2 * k - 1) * t * p1 - (k - 1) * p0) / k;
                    p0 = p1;
                    p1 = p2;
                }
                slope = n * (p0 - t * p1) / ((1 - t) * (1 + t));
                t -= p1 / slope;
            }
            x[n - 1 - i] = 2 * i + 1 == n ? 0 : t;
            w[n - 1 - i] = 2 / ((1 - t) * (1 + t) * slope * slope);
        }
        return new GaussRule(x, w);
    }
}

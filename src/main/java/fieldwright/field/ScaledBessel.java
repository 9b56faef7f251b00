package fieldwright.field;

import fieldwright.formula.special.Bessel;

/**
 * e^-x I_0(x), e^-x I_1(x), e^x K_0(x), e^x K_1(x) for x >= 0, fast. I: Chebyshev sums on [0, 8] and, times √x, in 16/x − 1 beyond, built at
 * start from the downward recurrence; from 64 on DLMF 10.40.1. K: {@link Bessel} below 2, Temme's continued fraction above (Temme 1975).
 * Accuracy: a few 1e-15 relative.
 */
final class ScaledBessel {
    private static final int DEGREE = 36;
    private static final double[][] SMALL = {sum(0, false), sum(1, false)};
    private static final double[][] LARGE = {sum(0, true), sum(1, true)};
    private static final double[][] ASYMPTOTIC = {asymptotic(0), asymptotic(4)};

    private ScaledBessel() {
    }

    static double i0(double x) {
        return i(0, x);
    }

    static double i1(double x) {
        return i(1, x);
    }

    private static double i(int order, double x) {
        if (x <= 8) {
            return clenshaw(SMALL[order], x / 4 - 1);
        }
        if (x < 64) {
            return clenshaw(LARGE[order], 16 / x - 1) / Math.sqrt(x);
        }
        double[] c = ASYMPTOTIC[order];
        double sum = 0;
        double inverse = 1 / x;
        for (int n = c.length - 1; n >= 0; n--) {
            sum = sum * inverse + c[n];
        }
        return sum / Math.sqrt(x);
    }

    static double k0(double x) {
        return x < 2 ? Bessel.k(0, x) * Math.exp(x) : k(x)[0];
    }

    static double k1(double x) {
        return x < 2 ? Bessel.k(1, x) * Math.exp(x) : k(x)[1];
    }

    private static double[] k(double x) {
        double b = 2 * (1 + x);
        double d = 1 / b;
        double step = d;
        double h = d;
        double a = -0.25;
        double before = 0;
        double here = 1;
        double c = 0.25;
        double q = 0.25;
        double s = 1 + q * step;
        for (int i = 2; i < 500; i++) {
            a -= 2 * (i - 1);
            c = -a * c / i;
            double next = (before - b * here) / a;
            before = here;
            here = next;
            q += c * next;
            b += 2;
            d = 1 / (b + a * d);
            step *= b * d - 1;
            h += step;
            double more = q * step;
            s += more;
            if (Math.abs(more) < 1e-17 * s) {
                break;
            }
        }
        double zero = Math.sqrt(Math.PI / (2 * x)) / s;
        return new double[] {zero, zero * (x + 0.5 - 0.25 * h) / x};
    }

    private static double[] asymptotic(double mu) {
        double[] c = new double[14];
        c[0] = 1 / Math.sqrt(2 * Math.PI);
        for (int n = 1; n < c.length; n++) {
            c[n] = -c[n - 1] * (mu - (2 * n - 1.0) * (2 * n - 1.0)) / (8 * n);
        }
        return c;
    }

    /** Chebyshev coefficients from values at DEGREE + 1 nodes. */
    private static double[] sum(int order, boolean large) {
        int n = DEGREE + 1;
        double[] value = new double[n];
        for (int i = 0; i < n; i++) {
            double t = Math.cos(Math.PI * (i + 0.5) / n);
            double x = large ? 16 / (1 + t) : 4 * (1 + t);
            double[] q = new double[2];
            double zero = RoundGreen.ratios(x, q);
            value[i] = (order == 0 ? 1 : x * q[0]) * zero * (large ? Math.sqrt(x) : 1);
        }
        double[] c = new double[n];
        for (int k = 0; k < n; k++) {
            for (int i = 0; i < n; i++) {
                c[k] += 2.0 / n * value[i] * Math.cos(Math.PI * k * (i + 0.5) / n);
            }
        }
        c[0] /= 2;
        int last = n;
        while (last > 1 && Math.abs(c[last - 1]) < 1e-17 * Math.abs(c[0])) {
            last--;
        }
        return java.util.Arrays.copyOf(c, last);
    }

    private static double clenshaw(double[] c, double t) {
        double after = 0;
        double here = 0;
        for (int k = c.length - 1; k > 0; k--) {
            double next = 2 * t * here - after + c[k];
            after = here;
            here = next;
        }
        return t * here - after + c[0];
    }
}

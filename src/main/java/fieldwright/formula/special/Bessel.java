package fieldwright.formula.special;

import org.apache.commons.math3.special.BesselJ;

/**
 * Bessel functions of whole order n >= 0 and real argument. J from Commons Math (Cody's algorithm) up to 25, and from
 * Hankel's expansion above; Y, I, K by the formulas named at each method. NaN outside the domain.
 * Accuracy (see BesselTest): relative to sqrt(J²+Y²) for J and Y, relative for I and K, a few 1e-15.
 */
public final class Bessel {
    private static final double EULER = 0.57721566490153286061;
    private static final double LARGE = 25;

    private Bessel() {
    }

    /** J_n(x), every real x. */
    public static double j(int n, double x) {
        if (n < 0) {
            return Double.NaN;
        }
        if (x < 0) {
            return (n % 2 == 0 ? 1 : -1) * j(n, -x);
        }
        if (Double.isNaN(x) || Double.isInfinite(x)) {
            return Double.isNaN(x) ? x : 0;
        }
        return x > Math.max(LARGE, 0.5 * n * n) ? hankel(n, x, false) : x == 0 ? (n == 0 ? 1 : 0) : BesselJ.value(n, x);
    }

    /** Y_n(x), x > 0; -infinity at 0. */
    public static double y(int n, double x) {
        if (n < 0 || !(x >= 0)) {
            return Double.NaN;
        }
        if (x == 0) {
            return Double.NEGATIVE_INFINITY;
        }
        if (Double.isInfinite(x)) {
            return 0;
        }
        double before = x > LARGE ? hankel(0, x, true) : y0(x);
        if (n == 0) {
            return before;
        }
        double now = x > LARGE ? hankel(1, x, true) : y1(x);
        for (int k = 1; k < n; k++) {   // DLMF 10.6.1, stable upwards for Y
            double after = 2 * k / x * now - before;
            before = now;
            now = after;
            if (Double.isInfinite(now)) {
                return now;
            }
        }
        return now;
    }

    /** Neumann series, Abramowitz-Stegun 9.1.89 and DLMF 10.8: Y_0 from J_0, J_2, J_4, … */
    private static double y0(double x) {
        double[] j = downward(x);
        double sum = 0;
        for (int k = (j.length - 1) / 2; k >= 1; k--) {
            sum += (k % 2 == 0 ? 1 : -1) * j[2 * k] / k;
        }
        return 2 / Math.PI * ((Math.log(x / 2) + EULER) * j[0] - 2 * sum);
    }

    /** Neumann series, Abramowitz-Stegun 9.1.88 with n = 1. */
    private static double y1(double x) {
        double[] j = downward(x);
        double sum = 0;
        for (int k = (j.length - 2) / 2; k >= 1; k--) {
            sum += (k % 2 == 0 ? 1 : -1) * (1 + 2 * k) * j[1 + 2 * k] / (k * (k + 1.0));
        }
        return (-2 / x * j[0] + 2 * ((Math.log(x / 2) - (1 - EULER)) * j[1] - sum)) / Math.PI;
    }

    /** J_0 … by Miller's downward recurrence, normalised by 1 = J_0 + 2 (J_2 + J_4 + …), DLMF 10.12.4. */
    private static double[] downward(double x) {
        if (x < 1e-5) {
            return new double[] {1 - x * x / 4, x / 2, x * x / 8, 0};
        }
        int start = 2 * ((int) (x + 20 + 3 * Math.sqrt(x)) / 2 + 4);
        double[] j = new double[start + 2];
        j[start] = 1e-280;
        double norm = 0;
        for (int k = start; k >= 1; k--) {
            j[k - 1] = 2 * k / x * j[k] - j[k + 1];
            if (Math.abs(j[k - 1]) > 1e200) {
                for (int i = k - 1; i <= start; i++) {
                    j[i] *= 1e-250;
                }
                norm *= 1e-250;
            }
            if ((k - 1) % 2 == 0) {
                norm += (k == 1 ? 1 : 2) * j[k - 1];
            }
        }
        for (int k = 0; k < j.length; k++) {
            j[k] /= norm;
        }
        return j;
    }

    /** Hankel's expansion, DLMF 10.17.3 and 10.17.4; used where its smallest term is below rounding. */
    private static double hankel(int n, double x, boolean second) {
        double mu = 4.0 * n * n;
        double p = 1;
        double q = 0;
        double term = 1;
        double size = 1;
        for (int k = 1; k < 100; k++) {
            double next = term * (mu - (2 * k - 1.0) * (2 * k - 1.0)) / (8 * k * x);
            if (Math.abs(next) >= size && k > n || Math.abs(next) < 1e-17) {
                break;
            }
            term = next;
            size = Math.abs(next);
            double signed = k / 2 % 2 == 0 ? term : -term;
            if (k % 2 == 1) {
                q += signed;
            } else {
                p += signed;
            }
        }
        // omega = x - n pi/2 - pi/4: by the addition theorem, so that no digits of x are lost
        double s = Math.sin(x);
        double c = Math.cos(x);
        double root = Math.sqrt(0.5);
        double cos = root * (c + s);   // of x - pi/4
        double sin = root * (s - c);
        for (int k = 0; k < n % 4; k++) {
            double turned = sin;
            sin = -cos;
            cos = turned;
        }
        return Math.sqrt(2 / (Math.PI * x)) * (second ? p * sin + q * cos : p * cos - q * sin);
    }

    /** I_n(x), every real x; overflows to infinity above about 713. */
    public static double i(int n, double x) {
        if (n < 0 || Double.isNaN(x)) {
            return Double.NaN;
        }
        if (x < 0) {
            return (n % 2 == 0 ? 1 : -1) * i(n, -x);
        }
        if (x > 720) {
            return x > 720 + 0.5 * n * n ? Double.POSITIVE_INFINITY : iSeries(n, x);
        }
        return x > 40 + 0.5 * n * n ? iLarge(n, x) : iSeries(n, x);
    }

    /** DLMF 10.25.2: all terms positive. */
    private static double iSeries(int n, double x) {
        double half = x / 2;
        double term = 1;
        for (int k = 1; k <= n; k++) {
            term *= half / k;
        }
        double sum = term;
        double square = half * half;
        for (int k = 1; k < 10000 && term > 1e-17 * sum; k++) {
            term *= square / (k * (double) (k + n));
            sum += term;
        }
        return sum;
    }

    /** DLMF 10.40.1. */
    private static double iLarge(int n, double x) {
        double mu = 4.0 * n * n;
        double term = 1;
        double sum = 1;
        for (int k = 1; k < 200; k++) {
            double next = -term * (mu - (2 * k - 1.0) * (2 * k - 1.0)) / (8 * k * x);
            if (Math.abs(next) > Math.abs(term) && k > n || Math.abs(next) < 1e-17) {
                break;
            }
            term = next;
            sum += term;
        }
        double half = Math.exp(x / 2);   // in two halves: no overflow before the result does
        return half / Math.sqrt(2 * Math.PI * x) * sum * half;
    }

    /** K_n(x), x > 0; infinite at 0. */
    public static double k(int n, double x) {
        if (n < 0 || !(x >= 0)) {
            return Double.NaN;
        }
        if (x == 0) {
            return Double.POSITIVE_INFINITY;
        }
        double[] first = x <= 1 ? kSmall(x) : kTrapezoid(x);
        double before = first[0];
        double now = first[1];
        if (n == 0) {
            return before;
        }
        for (int k = 1; k < n; k++) {   // DLMF 10.29.1, stable upwards
            double after = before + 2 * k / x * now;
            before = now;
            now = after;
        }
        return now;
    }

    /** K_0 by DLMF 10.31.2, K_1 by the Wronskian I_0 K_1 + I_1 K_0 = 1/x (10.28.2). */
    private static double[] kSmall(double x) {
        double square = x * x / 4;
        double term = 1;
        double harmonic = 0;
        double sum = 0;
        for (int k = 1; k < 30; k++) {
            term *= square / ((double) k * k);
            harmonic += 1.0 / k;
            sum += harmonic * term;
        }
        double i0 = iSeries(0, x);
        double k0 = -(Math.log(x / 2) + EULER) * i0 + sum;
        return new double[] {k0, (1 / x - iSeries(1, x) * k0) / i0};
    }

    /** DLMF 10.32.9 by the trapezoidal rule, whose error falls like exp(-pi²/h) and exp(-2 pi²/(x h²)). */
    private static double[] kTrapezoid(double x) {
        double h = Math.min(0.2, 0.6 / Math.sqrt(x));
        double k0 = 0.5;
        double k1 = 0.5;
        for (int i = 1; i < 2000; i++) {
            double t = i * h;
            double s = Math.sinh(t / 2);
            double weight = Math.exp(-2 * x * s * s);   // exp(-x (cosh t - 1))
            double cosh = 1 + 2 * s * s;
            k0 += weight;
            k1 += weight * cosh;
            if (weight * cosh < 1e-18) {
                break;
            }
        }
        double scale = h * Math.exp(-x);
        return new double[] {k0 * scale, k1 * scale};
    }
}

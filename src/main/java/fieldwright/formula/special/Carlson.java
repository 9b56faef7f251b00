package fieldwright.formula.special;

/**
 * Carlson's symmetric elliptic integrals R_F, R_C, R_D, R_J by duplication and a power series of fifth to seventh order.
 * Source: DLMF 19.36(i), eq. 19.36.1, 19.36.2; B. C. Carlson, "Numerical computation of real or complex elliptic
 * integrals", Numerical Algorithms 10 (1995) 13-26. NaN for negative arguments.
 * Accuracy: a few 1e-16 relative against the test values of Carlson 1995.
 */
public final class Carlson {
    private static final double SPREAD_SEVENTH = Math.pow(3 * 0x1p-54, -1.0 / 8);
    private static final double SPREAD_FIFTH = Math.pow(0x1p-54 / 4, -1.0 / 6);
    private static final int MOST_STEPS = 600;   // each step quarters the spread; reached by no pair of doubles

    private Carlson() {
    }

    /** R_F(x, y, z), arguments not negative, at most one of them zero (else infinite). */
    public static double rf(double x, double y, double z) {
        if (!(x >= 0 && y >= 0 && z >= 0)) {
            return Double.NaN;
        }
        if (x + y == 0 || y + z == 0 || z + x == 0) {
            return Double.POSITIVE_INFINITY;
        }
        double mean = (x + y + z) / 3;
        double spread = SPREAD_SEVENTH * max(Math.abs(mean - x), Math.abs(mean - y), Math.abs(mean - z));
        double dx = mean - x;
        double dy = mean - y;
        double quarter = 1;
        for (int i = 0; i < MOST_STEPS && quarter * spread > mean; i++) {
            double lambda = lambda(x, y, z);
            x = (x + lambda) / 4;
            y = (y + lambda) / 4;
            z = (z + lambda) / 4;
            mean = (mean + lambda) / 4;
            quarter /= 4;
        }
        double a = dx * quarter / mean;
        double b = dy * quarter / mean;
        double c = -a - b;
        double e2 = a * b - c * c;
        double e3 = a * b * c;
        return (1 - e2 / 10 + e3 / 14 + e2 * e2 / 24 - 3 * e2 * e3 / 44 - 5 * e2 * e2 * e2 / 208 + 3 * e3 * e3 / 104
            + e2 * e2 * e3 / 16) / Math.sqrt(mean);
    }

    /** R_C(x, y) = R_F(x, y, y), x not negative, y positive. */
    public static double rc(double x, double y) {
        if (!(x >= 0 && y > 0)) {
            return Double.NaN;
        }
        double mean = (x + 2 * y) / 3;
        double spread = SPREAD_SEVENTH * Math.abs(mean - x);
        double dy = y - mean;
        double quarter = 1;
        for (int i = 0; i < MOST_STEPS && quarter * spread > mean; i++) {
            double lambda = 2 * Math.sqrt(x) * Math.sqrt(y) + y;
            x = (x + lambda) / 4;
            y = (y + lambda) / 4;
            mean = (mean + lambda) / 4;
            quarter /= 4;
        }
        double s = dy * quarter / mean;
        return (1 + s * s * (3.0 / 10 + s * (1.0 / 7 + s * (3.0 / 8 + s * (9.0 / 22 + s * (159.0 / 208 + s * 9.0 / 8))))))
            / Math.sqrt(mean);
    }

    /** R_D(x, y, z), x and y not negative and not both zero, z positive. */
    public static double rd(double x, double y, double z) {
        if (!(x >= 0 && y >= 0 && z > 0)) {
            return Double.NaN;
        }
        if (x + y == 0) {
            return Double.POSITIVE_INFINITY;
        }
        double mean = (x + y + 3 * z) / 5;
        double spread = SPREAD_FIFTH * max(Math.abs(mean - x), Math.abs(mean - y), Math.abs(mean - z));
        double dx = mean - x;
        double dy = mean - y;
        double quarter = 1;
        double sum = 0;
        for (int i = 0; i < MOST_STEPS && quarter * spread > mean; i++) {
            double lambda = lambda(x, y, z);
            sum += quarter / (Math.sqrt(z) * (z + lambda));
            x = (x + lambda) / 4;
            y = (y + lambda) / 4;
            z = (z + lambda) / 4;
            mean = (mean + lambda) / 4;
            quarter /= 4;
        }
        double a = dx * quarter / mean;
        double b = dy * quarter / mean;
        double c = -(a + b) / 3;
        double ab = a * b;
        double cc = c * c;
        double e2 = ab - 6 * cc;
        double e3 = (3 * ab - 8 * cc) * c;
        double e4 = 3 * (ab - cc) * cc;
        double e5 = ab * cc * c;
        return quarter / (mean * Math.sqrt(mean)) * series(e2, e3, e4, e5) + 3 * sum;
    }

    /** R_J(x, y, z, p), x, y, z not negative and at most one of them zero, p positive. */
    public static double rj(double x, double y, double z, double p) {
        if (!(x >= 0 && y >= 0 && z >= 0 && p > 0)) {
            return Double.NaN;
        }
        if (x + y == 0 || y + z == 0 || z + x == 0) {
            return Double.POSITIVE_INFINITY;
        }
        double mean = (x + y + z + 2 * p) / 5;
        double spread = SPREAD_FIFTH * max(Math.max(Math.abs(mean - x), Math.abs(mean - y)), Math.abs(mean - z), Math.abs(mean - p));
        double delta = (p - x) * (p - y) * (p - z);
        double dx = mean - x;
        double dy = mean - y;
        double dz = mean - z;
        double quarter = 1;
        double sum = 0;
        for (int i = 0; i < MOST_STEPS && quarter * spread > mean; i++) {
            double rx = Math.sqrt(x);
            double ry = Math.sqrt(y);
            double rz = Math.sqrt(z);
            double rp = Math.sqrt(p);
            double lambda = rx * ry + rx * rz + ry * rz;
            double d = (rp + rx) * (rp + ry) * (rp + rz);
            double e = quarter * quarter * quarter * delta / (d * d);
            sum += quarter / d * rc(1, 1 + e);
            x = (x + lambda) / 4;
            y = (y + lambda) / 4;
            z = (z + lambda) / 4;
            p = (p + lambda) / 4;
            mean = (mean + lambda) / 4;
            quarter /= 4;
        }
        double a = dx * quarter / mean;
        double b = dy * quarter / mean;
        double c = dz * quarter / mean;
        double q = -(a + b + c) / 2;
        double abc = a * b * c;
        double e2 = a * b + a * c + b * c - 3 * q * q;
        double e3 = abc + 2 * e2 * q + 4 * q * q * q;
        double e4 = (2 * abc + e2 * q + 3 * q * q * q) * q;
        double e5 = abc * q * q;
        return quarter / (mean * Math.sqrt(mean)) * series(e2, e3, e4, e5) + 6 * sum;
    }

    /** DLMF 19.36.2, the series shared by R_D and R_J. */
    private static double series(double e2, double e3, double e4, double e5) {
        return 1 - 3 * e2 / 14 + e3 / 6 + 9 * e2 * e2 / 88 - 3 * e4 / 22 - 9 * e2 * e3 / 52 + 3 * e5 / 26 - e2 * e2 * e2 / 16
            + 3 * e3 * e3 / 40 + 3 * e2 * e4 / 20 + 45 * e2 * e2 * e3 / 272 - 9 * (e3 * e4 + e2 * e5) / 68;
    }

    private static double lambda(double x, double y, double z) {
        double rx = Math.sqrt(x);
        double ry = Math.sqrt(y);
        double rz = Math.sqrt(z);
        return rx * ry + rx * rz + ry * rz;
    }

    private static double max(double a, double b, double c) {
        return Math.max(a, Math.max(b, c));
    }
}

package fieldwright.formula;

/**
 * Sine and cosine of a block, free of branches so that the loops become vector code. Reduction by multiples of pi/2 in
 * three parts (Cody and Waite 1980) and the minimax polynomials of fdlibm's k_sin and k_cos (Sun Microsystems 1993).
 * Accuracy: 1.5 units in the last place for arguments up to 1e5, as measured in the test; beyond, and where an argument
 * is not a number, {@link Math#sin} and {@link Math#cos}.
 */
final class BlockTrig {
    private static final double LARGEST = 1e5;
    /** Below this many nodes arrays cost more than they gain. */
    private static final int FEW = 12;
    private static final double TWO_OVER_PI = 2 / Math.PI;
    // pi/2 = P1 + P2 + P3, the first two of 33 bits, so that n P1 and n P2 are exact (fdlibm e_rem_pio2)
    private static final double P1 = 1.57079632673412561417;
    private static final double P2 = 6.07710050630396597660e-11;
    private static final double P3 = 2.02226624879595063154e-21;

    private BlockTrig() {
    }

    static void sin(double[] x, double[] out, int n) {
        turned(x, out, n, 0);
    }

    static void cos(double[] x, double[] out, int n) {
        turned(x, out, n, 1);
    }

    /** sin(x + quarter pi/2). Each node on its own, whatever the others are, so that results do not depend on the block. */
    private static void turned(double[] x, double[] out, int n, int quarter) {
        if (n < FEW) {
            for (int i = 0; i < n; i++) {
                out[i] = turned(x[i], quarter);
            }
            return;
        }
        double[] outside = largest(x, n) < LARGEST ? null : x.clone();   // out may be x
        double[] turns = new double[n];
        double[] rest = new double[n];
        double[] sine = new double[n];
        reduce(x, turns, rest, n);
        sine(rest, sine, n);
        cosine(rest, rest, n);
        choose(turns, sine, rest, out, n, quarter);
        for (int i = 0; outside != null && i < n; i++) {
            if (!(Math.abs(outside[i]) < LARGEST)) {
                out[i] = quarter == 0 ? Math.sin(outside[i]) : Math.cos(outside[i]);
            }
        }
    }

    /** The same arithmetic for one node, without arrays in between. */
    private static double turned(double x, int quarter) {
        if (!(Math.abs(x) < LARGEST)) {
            return quarter == 0 ? Math.sin(x) : Math.cos(x);
        }
        double k = Math.rint(x * TWO_OVER_PI);
        double rest = ((x - k * P1) - k * P2) - k * P3;
        return chosen(k + quarter, sine(rest), cosine(rest));
    }

    private static double largest(double[] x, int n) {
        double largest = 0;
        for (int i = 0; i < n; i++) {
            largest = Math.max(largest, Math.abs(x[i]));
        }
        return largest;
    }

    private static void reduce(double[] x, double[] turns, double[] rest, int n) {
        for (int i = 0; i < n; i++) {
            double k = Math.rint(x[i] * TWO_OVER_PI);
            turns[i] = k;
            rest[i] = ((x[i] - k * P1) - k * P2) - k * P3;
        }
    }

    private static void sine(double[] r, double[] out, int n) {
        for (int i = 0; i < n; i++) {
            out[i] = sine(r[i]);
        }
    }

    private static double sine(double r) {
        double z = r * r;
        double tail = -1.66666666666666324348e-01 + z * (8.33333333332248946124e-03 + z * (-1.98412698298579493134e-04
            + z * (2.75573137070700676789e-06 + z * (-2.50507602534068634195e-08 + z * 1.58969099521155010221e-10))));
        return r + r * z * tail;
    }

    private static void cosine(double[] r, double[] out, int n) {
        for (int i = 0; i < n; i++) {
            out[i] = cosine(r[i]);
        }
    }

    private static double cosine(double r) {
        double z = r * r;
        double tail = z * (4.16666666666666019037e-02 + z * (-1.38888888888741095749e-03 + z * (2.48015872894767294178e-05
            + z * (-2.75573143513906633035e-07 + z * (2.08757232129817482790e-09 + z * -1.13596475577881948265e-11)))));
        double half = 0.5 * z;
        double w = 1 - half;
        return w + (((1 - w) - half) + z * tail);
    }

    /** Of k quarter turns: odd ones take the cosine, and two of four the other sign. */
    private static void choose(double[] turns, double[] sine, double[] cosine, double[] out, int n, int quarter) {
        for (int i = 0; i < n; i++) {
            out[i] = chosen(turns[i] + quarter, sine[i], cosine[i]);
        }
    }

    private static double chosen(double k, double sine, double cosine) {
        double pairs = Math.floor(k * 0.5);
        double odd = k - 2 * pairs;
        double sign = 1 - 2 * (pairs - 2 * Math.floor(pairs * 0.5));
        return sign * (odd * cosine + (1 - odd) * sine);
    }
}

package fieldwright.field.honesty;

import java.util.Arrays;

/**
 * Tanh–sinh rule for four components at once (three of a field and one potential), with bisection where it is slow.
 * Source: Takahasi and Mori, Double exponential formulas for numerical integration, Publ. RIMS 9 (1974) 721.
 * Ends may have square-root or logarithmic behaviour; inside, the integrand should be analytic on each piece.
 * An instance is one level of a nest: it may be called from inside another instance's integrand, not from its own.
 */
final class DoubleExponential {
    static final int SIZE = 4;
    private static final int LEVELS = 5;
    private static final int DEEPEST = 45;
    private static final double SMALLEST = 1e-19;
    /** Angles and logarithms of order one have no digits beyond this. */
    private static final double RESOLUTION = 1e-14;
    /** Evaluations of an inner and an outer level beyond which nothing is bisected any more; the two settings then differ, which shows. */
    private static final long BUDGET = 100_000;
    private static final long OUTER_BUDGET = 1_500;

    /** f at x in [a, b]; both distances from the ends are exact to the last digits, x itself only to eps·|x|. */
    interface Integrand {
        void at(double x, double fromA, double toB, double[] out);
    }

    /** Two settings that differ in step, in the place of bisection and in tolerance, so that they do not share mistakes. */
    record Setting(double step, double cut, double tolerance, int extraRadialNodes) {
        static final Setting FIRST = new Setting(0.5, 0.5, 3e-14, 0);
        static final Setting SECOND = new Setting(0.41, 0.4375, 1e-14, 3);
    }

    private final Setting setting;
    private final double[][] fraction = new double[LEVELS][];
    private final double[][] weight = new double[LEVELS][];
    private final double[] node = new double[SIZE];
    private final double[] sum = new double[SIZE];
    private final double[] magnitude = new double[SIZE];
    private final double[] before = new double[SIZE];
    private double[] total;
    private double[] totalMagnitude;
    private Integrand integrand;
    private double a;
    private double b;
    private final double[] peak = new double[SIZE];
    private int deepest = DEEPEST;
    private long evaluations;
    private final long budget;

    DoubleExponential(Setting setting) {
        this(setting, BUDGET);
    }

    /** The outer level of a nest, each of whose evaluations is an integral. */
    static DoubleExponential outer(Setting setting) {
        return new DoubleExponential(setting, OUTER_BUDGET);
    }

    private DoubleExponential(Setting setting, long budget) {
        this.setting = setting;
        this.budget = budget;
        for (int level = 0; level < LEVELS; level++) {
            double h = setting.step / (1 << level);
            double[] q = new double[4096];
            double[] w = new double[4096];
            int n = 0;
            for (int k = level == 0 ? 0 : 1;; k += level == 0 ? 1 : 2) {
                double t = k * h;
                double e = Math.exp(-Math.PI * Math.sinh(t));
                if (e < SMALLEST) {
                    break;
                }
                q[n] = e / (1 + e);
                w[n] = Math.PI * Math.cosh(t) * e / ((1 + e) * (1 + e));
                n++;
            }
            fraction[level] = Arrays.copyOf(q, n);
            weight[level] = Arrays.copyOf(w, n);
        }
    }

    long evaluations() {
        return evaluations;
    }

    /** While rough, pieces are not bisected: a first look that tells how large the calls to come will be. */
    void setRough(boolean rough) {
        deepest = rough ? 0 : DEEPEST;
    }

    /** Adds the integral over [a, b] to sums and that of the absolute value to magnitudes. */
    void add(Integrand f, double from, double to, double[] sums, double[] magnitudes) {
        if (!(to > from)) {
            return;
        }
        integrand = f;
        a = from;
        b = to;
        total = sums;
        totalMagnitude = magnitudes;
        piece(0, to - from, 0, 0);
        for (int c = 0; c < SIZE; c++) {
            peak[c] = Math.max(peak[c], magnitudes[c]);
        }
    }

    /** A piece of [a, b]: its distance from a, its length, its distance from b. */
    private void piece(double start, double length, double after, int depth) {
        Arrays.fill(sum, 0);
        Arrays.fill(magnitude, 0);
        double h = setting.step;
        nodes(0, start, length, after);
        double former = Double.POSITIVE_INFINITY;
        for (int level = 1; level < LEVELS; level++) {
            for (int c = 0; c < SIZE; c++) {
                before[c] = sum[c] * h;
            }
            h /= 2;
            nodes(level, start, length, after);
            double change = change(h);
            boolean done = error(change, h, length) <= setting.tolerance && (level > 1 || change == 0);
            boolean last = depth >= deepest || length < RESOLUTION || evaluations > budget;
            if (done || last && level == LEVELS - 1) {
                for (int c = 0; c < SIZE; c++) {
                    total[c] += sum[c] * h * length;
                    totalMagnitude[c] += magnitude[c] * h * length;
                }
                return;
            }
            if (!last && (level >= 2 && change > 3e-3 || level == 3 && change > 1e-5
                    || level == LEVELS - 2 && change > 0.3 * former)) {
                break;
            }
            former = change;
        }
        double left = length * setting.cut;
        double right = length - left;
        piece(start, left, after + right, depth + 1);
        piece(start + left, right, after, depth + 1);
    }

    private void nodes(int level, double start, double length, double after) {
        double[] q = fraction[level];
        double[] w = weight[level];
        for (int k = 0; k < q.length; k++) {
            double near = length * q[k];
            double far = length * (1 - q[k]);
            one(start + near, after + far, w[k]);
            if (level > 0 || k > 0) {
                one(start + far, after + near, w[k]);
            }
        }
    }

    private void one(double fromA, double toB, double w) {
        evaluations++;
        integrand.at(fromA < toB ? a + fromA : b - toB, fromA, toB, node);
        for (int c = 0; c < SIZE; c++) {
            sum[c] += w * node[c];
            magnitude[c] += w * Math.abs(node[c]);
        }
    }

    /** Largest change against the last level, relative to the integral of the absolute value: field together, potential alone. */
    private double change(double h) {
        double field = 0;
        for (int c = 0; c < 3; c++) {
            field = Math.max(field, Math.abs(sum[c] * h - before[c]));
        }
        double size = largest(magnitude) * h;
        double potential = Math.abs(sum[3] * h - before[3]);
        return Math.max(field == 0 ? 0 : field / size, potential == 0 ? 0 : potential / (magnitude[3] * h));
    }

    /**
     * Error of the piece relative to the whole: convergence is nearly quadratic, so the error left is taken as the change to
     * the power 3/2. The whole is what this call has summed, or a hundredth of the largest call before.
     */
    private double error(double change, double h, double length) {
        double field = largest(magnitude) * h * length;
        double wholeField = Math.max(field, Math.max(largest(totalMagnitude), 1e-2 * largest(peak)));
        double potential = magnitude[3] * h * length;
        double wholePotential = Math.max(potential, Math.max(totalMagnitude[3], 1e-2 * peak[3]));
        double share = Math.max(field == 0 ? 0 : field / wholeField, potential == 0 ? 0 : potential / wholePotential);
        return Math.min(1, Math.sqrt(change)) * change * share;
    }

    private static double largest(double[] v) {
        return Math.max(v[0], Math.max(v[1], v[2]));
    }
}

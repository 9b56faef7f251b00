package fieldwright.field.honesty;

import java.util.Arrays;
import java.util.List;

/**
 * Field and potential of a charged body by rays from the place: E = −∫dΩ û ∫ρ dr and V = ∫dΩ ∫ρ r dr. The kernel cancels
 * exactly, so nothing is singular; what is left are the forms of the body's outline, whose places are known.
 * Directions by tanh–sinh, along the ray by Clenshaw and Curtis. The body's own parametrisation is not used.
 */
final class RayJudge {
    private static final double TWO_PI = 2 * Math.PI;
    private static final double QUARTER = Math.PI / 2;
    /** What the double above is short of π/2. */
    private static final double QUARTER_REST = 6.123233995736766e-17;

    private final RayBody body;
    private final SmoothDensity density;
    private final double[] from;
    private final DoubleExponential azimuth;
    private final DoubleExponential polar;
    private final double[] ray;
    private final double[] rayWeight;
    private final double[] crossings = new double[32];
    private final double[] polars = new double[64];
    private final double[] inner = new double[4];
    private final double[] innerMagnitude = new double[4];
    private double low;
    private double high;
    private double cosA;
    private double sinA;
    private final double[] direction = new double[3];
    private long evaluations;

    private RayJudge(RayBody body, SmoothDensity density, double[] from, int radialNodes, DoubleExponential.Setting setting) {
        this.body = body;
        this.density = density;
        this.from = from;
        azimuth = DoubleExponential.outer(setting);
        polar = new DoubleExponential(setting);
        double[][] rule = clenshawCurtis(radialNodes + setting.extraRadialNodes());
        ray = rule[0];
        rayWeight = rule[1];
    }

    static Answer judge(RayBody body, SmoothDensity density, int radialNodes, DoubleExponential.Setting setting) {
        return new RayJudge(body, density, null, radialNodes, setting).work();
    }

    /**
     * For a place well outside: rays from {@code body.place}, some point about the middle, and Coulomb's law to the place
     * {@code from} there. Seen from afar a thin body spans so small an angle that doubles of the direction lose it.
     */
    static Answer fromAfar(RayBody body, SmoothDensity density, double[] from, DoubleExponential.Setting setting) {
        return new RayJudge(body, density, from, 28, setting).work();
    }

    private Answer work() {
        double[] value = new double[4];
        double[] magnitude = new double[4];
        double[] breaks = breaks(body.azimuths());
        polar.setRough(true);
        for (int k = 0; k + 1 < breaks.length; k++) {
            halfPlane((breaks[k] + breaks[k + 1]) / 2, 0, 0, new double[4]);
        }
        polar.setRough(false);
        for (int k = 0; k + 1 < breaks.length; k++) {
            azimuth.add(this::halfPlane, breaks[k], breaks[k + 1], value, magnitude);
        }
        double[] turned = from == null ? new double[4] : value.clone();
        for (int c = 0; c < 3 && from == null; c++) {
            for (int axis = 0; axis < 3; axis++) {
                turned[c] += value[axis] * body.axes[axis][c];
            }
        }
        turned[3] = value[3];
        double size = Math.max(magnitude[0], Math.max(magnitude[1], magnitude[2]));
        return new Answer(turned, new double[] {size, size, size, magnitude[3]}, evaluations);
    }

    /** One full turn from the first break on; without breaks from an arbitrary azimuth. */
    private static double[] breaks(List<Double> azimuths) {
        double[] sorted = azimuths.stream().mapToDouble(a -> a - TWO_PI * Math.floor(a / TWO_PI)).sorted().distinct().toArray();
        if (sorted.length == 0) {
            return new double[] {0.3, 0.3 + TWO_PI};
        }
        double[] turn = Arrays.copyOf(sorted, sorted.length + 1);
        turn[sorted.length] = sorted[0] + TWO_PI;
        return turn;
    }

    private void halfPlane(double angle, double fromA, double toB, double[] out) {
        cosA = Math.cos(angle);
        sinA = Math.sin(angle);
        int n = body.polars(cosA, sinA, polars);
        polars[n++] = 0;
        polars[n++] = QUARTER;
        polars[n++] = Math.PI;
        Arrays.sort(polars, 0, n);
        Arrays.fill(inner, 0);
        Arrays.fill(innerMagnitude, 0);
        for (int k = 0; k + 1 < n; k++) {
            low = polars[k];
            high = polars[k + 1];
            polar.add(this::ray, polars[k], polars[k + 1], inner, innerMagnitude);
        }
        System.arraycopy(inner, 0, out, 0, 4);
    }

    private void ray(double theta, double fromA, double toB, double[] out) {
        // Near the equator and the poles of the directions the distances from there keep the digits that theta has lost.
        double sinT = low == 0 ? Math.sin(fromA) : high == Math.PI ? Math.sin(toB) : Math.sin(theta);
        double cosT = high <= QUARTER ? Math.sin(QUARTER - high + QUARTER_REST + toB) : -Math.sin(low - QUARTER - QUARTER_REST + fromA);
        int n = body.crossings(sinT, cosT, cosA, sinA, crossings);
        double charge = 0;
        double moment = 0;
        if (n > 0) {
            double u = sinT * cosA;
            double v = sinT * sinA;
            for (int c = 0; c < 3; c++) {
                direction[c] = u * body.axes[0][c] + v * body.axes[1][c] + cosT * body.axes[2][c];
            }
        }
        if (from != null) {
            Arrays.fill(out, 0);
        }
        for (int k = 0; k < n; k += 2) {
            double half = (crossings[k + 1] - crossings[k]) / 2;
            double middle = (crossings[k + 1] + crossings[k]) / 2;
            for (int i = 0; i < ray.length; i++) {
                double r = middle + half * ray[i];
                double q = half * rayWeight[i] * density.at(body.place[0] + r * direction[0],
                        body.place[1] + r * direction[1], body.place[2] + r * direction[2]);
                charge += q;
                moment += q * r;
                if (from != null) {
                    coulomb(q * r * r * sinT, r, out);
                }
            }
            evaluations += ray.length;
        }
        if (from != null) {
            return;
        }
        out[0] = -charge * sinT * sinT * cosA;
        out[1] = -charge * sinT * sinT * sinA;
        out[2] = -charge * sinT * cosT;
        out[3] = moment * sinT;
    }

    private void coulomb(double q, double r, double[] out) {
        double dx = from[0] - (body.place[0] + r * direction[0]);
        double dy = from[1] - (body.place[1] + r * direction[1]);
        double dz = from[2] - (body.place[2] + r * direction[2]);
        double square = dx * dx + dy * dy + dz * dz;
        double distance = Math.sqrt(square);
        out[0] += q * dx / (square * distance);
        out[1] += q * dy / (square * distance);
        out[2] += q * dz / (square * distance);
        out[3] += q / distance;
    }

    /** Nodes and weights on [-1, 1]; Clenshaw and Curtis 1960, weights as in Trefethen, SIAM Review 50 (2008) 67. */
    static double[][] clenshawCurtis(int nodes) {
        int n = nodes - 1;
        double[] x = new double[nodes];
        double[] w = new double[nodes];
        for (int k = 0; k <= n; k++) {
            x[k] = Math.cos(Math.PI * k / n);
            double sum = 1;
            for (int j = 1; j <= n / 2; j++) {
                sum -= (2 * j == n ? 1 : 2) / (4.0 * j * j - 1) * Math.cos(2 * Math.PI * j * k / n);
            }
            w[k] = (k == 0 || k == n ? 1 : 2) * sum / n;
        }
        return new double[][] {x, w};
    }
}

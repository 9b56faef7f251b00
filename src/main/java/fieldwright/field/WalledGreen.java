package fieldwright.field;

import fieldwright.integral.GaussLegendre;
import org.apache.commons.math3.special.Erf;

/**
 * Green function of the space between grounded planes across one, two or three axes (a parallel pair, a duct, a box), from
 * 1/d = 4π ∫₀^∞ (4πτ)^(-3/2) exp(−d²/4τ) dτ: under the integral the three axes separate, and along each the images sum to a theta
 * function, by the images themselves for small τ and by its sine series for large (Ewald's change of series at τ ~ L²; Ewald 1921,
 * Jacobi's identity DLMF 20.7(viii)). The integral over ln τ is taken by a Gauss rule.
 *
 * <p>The rest: without the nearest images, two along each walled axis, which are seen as probes. Below τ₀ the others are under
 * exp(−37); above it the near ones are taken out in closed form, erf(d/2√τ₀)/d. The whole: for a source at distance d with all of its
 * images, over the range of τ where exp(−d²/4τ − λτ), λ the lowest eigenvalue, is over exp(−40) of its largest: so that the exponential
 * decay along the walls keeps its relative accuracy.
 *
 * <p>Accuracy: rest 3e-14/L and 2e-13/L² with L the smallest distance of walls; whole 3e-13 of itself (measured in the tests against
 * series of other kinds, mpmath).
 */
final class WalledGreen implements Green {
    private static final int REST = 48;
    private static final int WHOLE = 48;
    private static final int TERMS = 17;
    /** In units of the square of the distance of walls: above it the sine series is shorter. */
    private static final double SINES = 0.015;
    private static final double NEGLIGIBLE = 38;

    private final double[] low;
    private final double[] length;
    private final double[] x = new double[3];
    private final boolean whole;
    private final double least;
    private final double lambda;
    private final double[] tau = new double[REST];
    private final double[] weight = new double[REST];
    private final double tau0;
    private final double[][] near;
    private final double[][] flips;
    private final double[][] sinX = new double[3][];
    private final double[][] cosX = new double[3][];
    private final double[][] sinY = new double[3][TERMS + 1];
    private final double[] y = new double[3];
    private final double[] theta = new double[3];
    private final double[] slope = new double[3];
    private final double[] gradient = new double[3];

    /** {@code length}: positive infinity for an open axis. */
    WalledGreen(double[] place, double[] low, double[] length, boolean whole) {
        this.low = low;
        this.length = length;
        this.whole = whole;
        double smallest = Double.POSITIVE_INFINITY;
        double sum = 0;
        for (int k = 0; k < 3; k++) {
            x[k] = place[k] - (isOpen(k) ? 0 : low[k]);
            smallest = Math.min(smallest, length[k]);
            sum += Math.PI * Math.PI / (length[k] * length[k]);
            sinX[k] = new double[TERMS + 1];
            cosX[k] = new double[TERMS + 1];
            if (!isOpen(k)) {
                sines(Math.PI * x[k] / length[k], sinX[k]);
                for (int m = 0; m <= TERMS; m++) {
                    cosX[k][m] = Math.cos(m * Math.PI * x[k] / length[k]);
                }
            }
        }
        least = smallest;
        lambda = sum;
        tau0 = least * least / (16 * (NEGLIGIBLE - 1));
        GaussLegendre rule = GaussLegendre.of(REST);
        double from = Math.log(tau0);
        double span = Math.log(NEGLIGIBLE / lambda) - from;
        for (int j = 0; j < REST; j++) {
            tau[j] = Math.exp(from + span * rule.node(j));
            weight[j] = span * rule.weight(j);
        }
        int walled = 0;
        for (int k = 0; k < 3; k++) {
            walled += isOpen(k) ? 0 : 1;
        }
        near = new double[1 << walled][3];
        flips = new double[1 << walled][4];
        for (int i = 0; i < near.length; i++) {
            int bit = 0;
            flips[i][3] = 1;
            for (int k = 0; k < 3; k++) {
                boolean flip = !isOpen(k) && (i >> bit++ & 1) == 1;
                near[i][k] = flip ? (x[k] > length[k] / 2 ? 2 * length[k] - x[k] : -x[k]) : x[k];
                flips[i][k] = flip ? -1 : 1;
                flips[i][3] *= flips[i][k];
            }
        }
    }

    private boolean isOpen(int k) {
        return length[k] == Double.POSITIVE_INFINITY;
    }

    /** The distance from which on the whole is the better choice. */
    static double farBeyond(double[] length) {
        return 0.7 * Math.min(length[0], Math.min(length[1], length[2]));
    }

    @Override
    public Green endless(Patch patch) {
        int axis = -1;
        for (int k = 0; k < 3; k++) {
            if (!isOpen(k)) {
                axis = k;
            }
        }
        boolean upper = x[axis] > length[axis] / 2;
        double[] place = new double[3];
        for (int k = 0; k < 3; k++) {
            place[k] = x[k] + (isOpen(k) ? 0 : low[k]);
        }
        return PairGreen.of(patch, axis, low[axis] + (upper ? length[axis] : 0), upper ? -1 : 1, length[axis], place);
    }

    @Override
    public void potential(double[][] s, int n, double[] out, double[] doubt) {
        for (int i = 0; i < n; i++) {
            out[i] = at(s[0][i], s[1][i], s[2][i], false);
            doubt[i] = whole ? 3e-13 * Math.abs(out[i]) : 3e-14 / least;
        }
    }

    @Override
    public void field(double[][] s, int n, double[][] out, double[] doubt) {
        for (int i = 0; i < n; i++) {
            at(s[0][i], s[1][i], s[2][i], true);
            double size = 0;
            for (int k = 0; k < 3; k++) {
                out[k][i] = -gradient[k];
                size += Math.abs(gradient[k]);
            }
            doubt[i] = whole ? 3e-13 * size : 2e-13 / (least * least);
        }
    }

    private double at(double sx, double sy, double sz, boolean slopes) {
        y[0] = sx;
        y[1] = sy;
        y[2] = sz;
        double square = 0;
        for (int k = 0; k < 3; k++) {
            if (!isOpen(k)) {
                y[k] = Math.min(length[k], Math.max(0, y[k] - low[k]));
                sines(Math.PI * y[k] / length[k], sinY[k]);
            }
            square += (x[k] - y[k]) * (x[k] - y[k]);
            gradient[k] = 0;
        }
        return whole ? whole(Math.sqrt(square), slopes) : rest(slopes);
    }

    private double rest(boolean slopes) {
        double sum = 0;
        for (int j = 0; j < REST; j++) {
            sum += add(tau[j], weight[j], slopes);
        }
        for (int i = 0; i < near.length; i++) {
            sum -= tail(near[i], flips[i], slopes);
        }
        return sum;
    }

    private double whole(double d, boolean slopes) {
        double decay = d * Math.sqrt(lambda);
        if (decay > 690) {
            return 0;
        }
        double reach = 1 + 40 / decay;
        double u = Math.log(reach + Math.sqrt(reach * reach - 1));
        double middle = Math.log(d / (2 * Math.sqrt(lambda)));
        GaussLegendre rule = GaussLegendre.of(WHOLE);
        double sum = 0;
        for (int j = 0; j < WHOLE; j++) {
            sum += add(Math.exp(middle + u * (2 * rule.node(j) - 1)), 2 * u * rule.weight(j), slopes);
        }
        return sum;
    }

    /** One node of the integral over ln τ. */
    private double add(double t, double w, boolean slopes) {
        for (int k = 0; k < 3; k++) {
            if (isOpen(k)) {
                double d = x[k] - y[k];
                theta[k] = Math.exp(-d * d / (4 * t)) / Math.sqrt(4 * Math.PI * t);
                slope[k] = -d / (2 * t) * theta[k];
            } else if (t > SINES * length[k] * length[k]) {
                bySines(k, t);
            } else {
                byImages(k, t);
            }
        }
        double f = 4 * Math.PI * t * w;
        if (slopes) {
            gradient[0] += f * slope[0] * theta[1] * theta[2];
            gradient[1] += f * theta[0] * slope[1] * theta[2];
            gradient[2] += f * theta[0] * theta[1] * slope[2];
        }
        return f * theta[0] * theta[1] * theta[2];
    }

    private void bySines(int k, double t) {
        double unit = Math.PI / length[k];
        double q = Math.exp(-unit * unit * t);
        double square = q * q;
        double step = q * square;
        double power = q;
        double sum = 0;
        double derivative = 0;
        for (int m = 1; m <= TERMS; m++) {
            double c = power * sinY[k][m];
            sum += c * sinX[k][m];
            derivative += c * (m * cosX[k][m]);
            power *= step;
            step *= square;
            if (power < 1e-17 * q) {
                break;
            }
        }
        theta[k] = 2 / length[k] * sum;
        slope[k] = 2 / length[k] * unit * derivative;
    }

    /** Images n = −1, 0, 1; next to a wall the place and its mirror image together, so that their difference keeps its digits. */
    private void byImages(int k, double t) {
        double l = length[k];
        double a = x[k];
        double b = y[k];
        double root = 1 / Math.sqrt(4 * Math.PI * t);
        double d = a - b;
        double own = Math.exp(-d * d / (4 * t));
        double lower = a * b / t;
        double upper = (l - a) * (l - b) / t;
        double atLower = Math.exp(-lower);
        double atUpper = Math.exp(-upper);
        double factor = lower < upper ? -Math.expm1(-lower) - atUpper : -Math.expm1(-upper) - atLower;
        double sum = own * factor;
        double derivative = -d / (2 * t) * sum + own * (b / t * atLower - (l - b) / t * atUpper);
        for (int n = -1; n <= 1; n += 2) {
            double e = d + 2 * n * l;
            double g = Math.exp(-e * e / (4 * t));
            double m = a + b + (n < 0 ? -4 : 2) * l;
            double h = Math.exp(-m * m / (4 * t));
            sum += g - h;
            derivative += (-e * g + m * h) / (2 * t);
        }
        theta[k] = root * sum;
        slope[k] = root * derivative;
    }

    /** 4π ∫ over τ > τ₀ of one image, erf(c d)/d with c = 1/(2 √τ₀). */
    private double tail(double[] image, double[] flip, boolean slopes) {
        double square = 0;
        for (int k = 0; k < 3; k++) {
            square += (image[k] - y[k]) * (image[k] - y[k]);
        }
        double c = 0.5 / Math.sqrt(tau0);
        double u = c * c * square;
        double scale = 2 * c / Math.sqrt(Math.PI);
        double value;
        double slopeOverD;
        if (u < 0.3) {
            value = 0;
            slopeOverD = 0;
            double term = 1;
            for (int n = 0; n < 16; n++) {
                value += term / (2 * n + 1);
                double next = -term * u / (n + 1);
                slopeOverD += -2 * c * c * term / (2 * n + 3);
                term = next;
            }
            value *= scale;
            slopeOverD *= scale;
        } else {
            double d = Math.sqrt(square);
            value = (u > 36 ? 1 : Erf.erf(c * d)) / d;
            slopeOverD = (scale * Math.exp(-u) - value) / square;
        }
        if (slopes) {
            for (int k = 0; k < 3; k++) {
                gradient[k] -= flip[3] * flip[k] * slopeOverD * (image[k] - y[k]);
            }
        }
        return flip[3] * value;
    }

    private static void sines(double angle, double[] out) {
        double twice = 2 * Math.cos(angle);
        out[0] = 0;
        out[1] = Math.sin(angle);
        for (int m = 2; m <= TERMS; m++) {
            out[m] = twice * out[m - 1] - out[m - 2];
        }
    }
}

package fieldwright.integral;

import java.util.concurrent.atomic.AtomicReferenceArray;

/**
 * Gauss-Legendre rule on [0, 1] together with its null rules.
 * Shape: {@code order} nodes, weights that sum to 1.
 * Accuracy: nodes and weights to a few units in the last place for orders up to 64 (Newton iteration on the
 * three-term recurrence); integrates polynomials up to degree 2·order − 1.
 * A null rule of degree k is the weighted sum Σ w_i P_k(x_i) f(x_i): the k-th orthonormal Legendre coefficient of f,
 * zero for polynomials below degree k (Berntsen &amp; Espelid 1991). Their decay tells how well f is resolved.
 */
public final class GaussLegendre {
    public static final int MAX_ORDER = 64;
    private static final AtomicReferenceArray<GaussLegendre> CACHE = new AtomicReferenceArray<>(MAX_ORDER + 1);

    final int order;
    final double[] nodes;
    final double[] weights;
    /** coefficient[k][i]: orthonormal Legendre polynomial of degree k at node i. */
    final double[][] legendre;

    private GaussLegendre(int order) {
        this.order = order;
        nodes = new double[order];
        weights = new double[order];
        for (int i = 0; i < order; i++) {
            double x = Math.cos(Math.PI * (i + 0.75) / (order + 0.5));
            double slope = 1;
            for (int step = 0; step < 100; step++) {
                double below = 1;
                double here = x;
                for (int k = 2; k <= order; k++) {
                    double next = ((2 * k - 1) * x * here - (k - 1) * below) / k;
                    below = here;
                    here = next;
                }
                slope = order * (x * here - below) / (x * x - 1);
                double move = here / slope;
                x -= move;
                if (Math.abs(move) < 1e-16) {
                    break;
                }
            }
            nodes[order - 1 - i] = (1 + x) / 2;
            weights[order - 1 - i] = 1 / ((1 - x * x) * slope * slope);
        }
        legendre = new double[order][order];
        for (int i = 0; i < order; i++) {
            double x = 2 * nodes[i] - 1;
            double below = 0;
            double here = 1;
            for (int k = 0; k < order; k++) {
                legendre[k][i] = here * Math.sqrt(2 * k + 1);
                double next = ((2 * k + 1) * x * here - k * below) / (k + 1);
                below = here;
                here = next;
            }
        }
    }

    /** The rule with this many nodes, 1 to 64. */
    public static GaussLegendre of(int order) {
        GaussLegendre rule = CACHE.get(order);
        if (rule == null) {
            rule = new GaussLegendre(order);
            CACHE.set(order, rule);
        }
        return rule;
    }

    public int order() {
        return order;
    }

    public double node(int i) {
        return nodes[i];
    }

    public double weight(int i) {
        return weights[i];
    }

    /** What the two pairs before the last predict counts by this part: the last may be small by chance. */
    private static final double DIP = 0.1;

    /**
     * Error of the rule for several components, from the decay of their highest Legendre coefficients.
     * {@code weighted[c][i]} is weight times component c at node i; {@code noise[c]} what rounding alone may leave; the result goes
     * to {@code error}. Pairs of coefficients are taken together because one of each pair vanishes for even or odd functions; the
     * decay is that of all components together. The rule's error is the function's coefficient near degree 2·order, so a geometric
     * decay is carried on over part of that distance, {@code carry} times the order, at most a half; where smoothness is not known
     * that is 0, and there, or without decay, the last coefficients themselves are the estimate.
     * Returns the factor by which errors go down per order, 1 when they do not.
     */
    double errors(double[][] weighted, int components, double carry, double[] noise, double[] error) {
        double[] last = new double[components];
        double top = 0;
        double before = 0;
        double first = 0;
        double allNoise = 0;
        for (int c = 0; c < components; c++) {
            last[c] = order < 4 ? tail(weighted[c], order - 1) : pair(weighted[c], order - 1);
            allNoise = Math.max(allNoise, noise[c]);
            if (order >= 6) {
                double b = pair(weighted[c], order - 3);
                double f = pair(weighted[c], order - 5);
                before += b * b;
                first += f * f;
                last[c] = Math.max(last[c], f > b ? DIP * b * b / f : DIP * b);
            }
            top += last[c] * last[c];
        }
        double factor = 20;
        double ratio = 1;
        if (order >= 6 && Math.sqrt(top) > allNoise) {
            ratio = Math.max(Math.sqrt(Math.sqrt(top / first)), 0.25 * Math.sqrt(top / before));
            factor = ratio < 0.9 ? 20 * Math.pow(ratio, carry * order) : 20;
        }
        for (int c = 0; c < components; c++) {
            error[c] = (last[c] <= noise[c] ? 0 : factor * last[c]) + noise[c];
        }
        return Math.min(1, Math.pow(ratio, 0.5 + carry));
    }

    /** Norm over all components of the two highest Legendre coefficients. */
    double lastPair(double[][] weighted) {
        double sum = 0;
        for (double[] component : weighted) {
            double p = pair(component, order - 1);
            sum += p * p;
        }
        return Math.sqrt(sum);
    }

    private double pair(double[] weighted, int degree) {
        double a = tail(weighted, degree);
        double b = degree > 0 ? tail(weighted, degree - 1) : 0;
        return Math.sqrt(a * a + b * b);
    }

    private double tail(double[] weighted, int degree) {
        double[] p = legendre[degree];
        double sum = 0;
        for (int i = 0; i < order; i++) {
            sum += weighted[i] * p[i];
        }
        return Math.abs(sum);
    }
}

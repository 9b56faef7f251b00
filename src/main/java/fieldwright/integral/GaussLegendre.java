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

    /**
     * Error of the rule, from the decay of the highest Legendre coefficients of the function.
     * {@code weighted[i]} is weight times function value at node i; {@code noise} what rounding alone may leave.
     * Pairs of coefficients are taken together because one of each pair vanishes for even or odd functions.
     * The rule's error is the function's coefficient near degree 2·order, so a geometric decay is carried on over part
     * of that distance; without decay the last coefficients themselves are the estimate.
     */
    double error(double[] weighted, double noise) {
        if (order < 4) {
            return Math.max(noise, 4 * tail(weighted, order - 1));
        }
        double last = pair(weighted, order - 1);
        if (last <= noise) {
            return noise;
        }
        double before = pair(weighted, order - 3);
        double ratio = last / before;
        if (order >= 6) {
            ratio = Math.max(ratio, before / Math.max(pair(weighted, order - 5), noise));
        }
        if (!(ratio < 0.9)) {
            return 10 * last + noise;
        }
        return 10 * last * Math.pow(ratio, 0.3 * order) + noise;
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

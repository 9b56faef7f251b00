package fieldwright.integral;

import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import java.util.concurrent.atomic.AtomicReferenceArray;

/** Product of Gauss rules on a unit box of 1 to 3 dimensions, laid out flat; immutable and shared. */
public final class TensorRule {
    private static final Map<Integer, TensorRule> CACHE = new ConcurrentHashMap<>();

    final int size;
    final GaussLegendre[] rules;
    /** node[d][i], index[d][i] and weight[i] of flat node i. */
    final double[][] node;
    final int[][] index;
    final double[] weight;

    private TensorRule(int[] orders) {
        int dimension = orders.length;
        int count = 1;
        rules = new GaussLegendre[dimension];
        for (int d = 0; d < dimension; d++) {
            rules[d] = GaussLegendre.of(orders[d]);
            count *= orders[d];
        }
        size = count;
        node = new double[dimension][size];
        index = new int[dimension][size];
        weight = new double[size];
        for (int i = 0; i < size; i++) {
            int rest = i;
            double w = 1;
            for (int d = dimension - 1; d >= 0; d--) {
                int k = rest % orders[d];
                rest /= orders[d];
                index[d][i] = k;
                node[d][i] = rules[d].nodes[k];
                w *= rules[d].weights[k];
            }
            weight[i] = w;
        }
    }

    public int size() {
        return size;
    }

    /** Of each flat node, its place in [0, 1] along one dimension. */
    public double[] nodes(int dimension) {
        return node[dimension];
    }

    /** Adds values at flat nodes first … first + n to the partial sums of component c over all but one dimension. */
    void addMarginals(double[] f, int first, int n, double[][][] marginal, int c) {
        int fast = rules[rules.length - 1].order;
        double[] inner = marginal[rules.length - 1][c];
        double[] outer = marginal[0][c];
        double[] middle = rules.length == 3 ? marginal[1][c] : null;
        int i = 0;
        while (i < n) {
            int at = first + i;
            int start = at % fast;
            int count = Math.min(fast - start, n - i);
            double sum = 0;
            for (int k = 0; k < count; k++) {
                double v = f[i + k];
                inner[start + k] += v;
                sum += v;
            }
            outer[index[0][at]] += sum;
            if (middle != null) {
                middle[index[1][at]] += sum;
            }
            i += count;
        }
    }

    private static final AtomicReferenceArray<TensorRule> LINES = new AtomicReferenceArray<>(128);
    private static final AtomicReferenceArray<TensorRule> SQUARES = new AtomicReferenceArray<>(128 * 128);

    static TensorRule of(int... orders) {
        if (orders.length < 3) {
            AtomicReferenceArray<TensorRule> known = orders.length == 1 ? LINES : SQUARES;
            int key = orders.length == 1 ? orders[0] : 128 * orders[0] + orders[1];
            TensorRule rule = known.get(key);
            if (rule == null) {
                rule = new TensorRule(orders.clone());
                known.set(key, rule);
            }
            return rule;
        }
        int key = 0;
        for (int order : orders) {
            key = key * 128 + order;
        }
        TensorRule rule = CACHE.get(key);
        if (rule == null) {
            rule = new TensorRule(orders.clone());
            CACHE.put(key, rule);
        }
        return rule;
    }
}

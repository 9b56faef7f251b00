package fieldwright.integral;

import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;

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

    static TensorRule of(int... orders) {
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

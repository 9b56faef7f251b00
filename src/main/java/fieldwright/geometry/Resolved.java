package fieldwright.geometry;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
import java.util.List;
import java.util.TreeSet;

/**
 * Whether a function of one coordinate is, between a few cuts, as good as a polynomial of low degree in the chart's parameter: found by
 * interpolation at Chebyshev points, compared at many places between. It is cheap to look closely along one coordinate, and
 * quadrature may then trust the decay it sees: 1/(1 + r), ln(2 + rho), sqrt(rho) away from the axis.
 */
final class Resolved {
    private static final int DEGREE = 16;
    private static final int LOOKS = 1024;
    private static final double ALIKE = 1e-12;
    private static final int MOST_CUTS = 4;

    private Resolved() {
    }

    /** Interior parameters where depth {@code k} is to be cut, many or none; null when the function is not resolved by them. */
    static double[] cuts(Formula f, Chart chart, int k) {
        String name = chart.coordinates().get(chart.coordinateOf(k));
        BlockFunction g = f.compile(List.of(name));
        TreeSet<Double> cuts = new TreeSet<>();
        return resolve(g, chart, k, 0, 1, cuts) ? cuts.stream().mapToDouble(Double::doubleValue).toArray() : null;
    }

    private static boolean resolve(BlockFunction g, Chart chart, int k, double from, double to, TreeSet<Double> cuts) {
        if (isPolynomial(g, chart, k, from, to)) {
            return true;
        }
        double middle = (from + to) / 2;
        cuts.add(middle);
        return cuts.size() <= MOST_CUTS && resolve(g, chart, k, from, middle, cuts) && resolve(g, chart, k, middle, to, cuts);
    }

    private static boolean isPolynomial(BlockFunction g, Chart chart, int k, double from, double to) {
        double[] node = new double[DEGREE + 1];
        double[] value = new double[DEGREE + 1];
        double size = 0;
        for (int i = 0; i <= DEGREE; i++) {
            node[i] = from + (to - from) * (0.5 - 0.5 * Math.cos(Math.PI * (i + 0.5) / (DEGREE + 1)));
            value[i] = g.at(chart.coordinateAt(k, node[i]));
            size = Math.max(size, Math.abs(value[i]));
        }
        if (!Double.isFinite(size)) {
            return false;
        }
        for (int j = 0; j < LOOKS; j++) {
            double u = from + (to - from) * (j + 0.5) / LOOKS;
            double exact = g.at(chart.coordinateAt(k, u));
            double sum = 0;
            double weights = 0;
            boolean onNode = false;
            for (int i = 0; i <= DEGREE; i++) {
                onNode |= u == node[i];
                double w = (i % 2 == 0 ? 1 : -1) * Math.sin(Math.PI * (i + 0.5) / (DEGREE + 1)) / (u - node[i]);
                sum += w * value[i];
                weights += w;
            }
            if (!onNode && !(Math.abs(sum / weights - exact) <= ALIKE * size)) {
                return false;
            }
        }
        return true;
    }
}

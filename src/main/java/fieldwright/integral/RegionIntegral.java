package fieldwright.integral;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;
import java.util.function.DoubleConsumer;
import java.util.function.DoubleUnaryOperator;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Formula;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Extent;
import fieldwright.geometry.Nodes;
import fieldwright.geometry.NodeFunction;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;

/**
 * ∫ f over a region, with its measure (arc length, area, volume), or over bare variables, without.
 * Value in the formula's unit times m^dimension (bare: times the variables' units).
 * Errors: AuthorException from the region's checks. Accuracy: error estimate by Cubature; status says whether the goal was met.
 */
public final class RegionIntegral {
    /** Of formula, measure and summation together, as a part of the sum of absolute contributions. */
    private static final double ROUNDING = 16 * 1.2e-16;

    private RegionIntegral() {
    }

    /** With the measure of the region. */
    public static Estimate over(Region region, Formula f, double relative, double absolute, int maxEvaluations) {
        List<Cubature.Piece> pieces = new ArrayList<>();
        for (Region.PlacedChart part : region.charts()) {
            add(part.chart(), f, true, pieces);
        }
        return integrate(pieces, relative, absolute, maxEvaluations);
    }

    /** Without measure, over up to three variables with their limits, outermost first unless limits demand another order. */
    public static Estimate bare(Map<String, Extent> limits, Formula f, double relative, double absolute, int maxEvaluations) {
        List<Cubature.Piece> pieces = new ArrayList<>();
        add(ParametricRegion.variables(limits), f, false, pieces);
        return integrate(pieces, relative, absolute, maxEvaluations);
    }

    private static Estimate integrate(List<Cubature.Piece> pieces, double relative, double absolute, int maxEvaluations) {
        Cubature.Result r = Cubature.integrate(pieces, 1, false, new Cubature.Goal(relative, 1e-3, absolute, maxEvaluations), null);
        return new Estimate(r.value()[0], r.error()[0] + ROUNDING * r.magnitude()[0], r.evaluations(), r.status());
    }

    private static void add(Chart chart, Formula f, boolean measure, List<Cubature.Piece> pieces) {
        int d = chart.dimension();
        NodeFunction function = NodeFunction.of(f, chart);
        if (d == 0) {
            throw new fieldwright.quantity.AuthorException("integral over a point: give at least one coordinate limits.");
        }
        Values values = new Values(chart, function, measure);
        double[][] cuts = breaks(chart, f);
        int[] orders = new int[d];
        java.util.Arrays.fill(orders, d == 1 ? 20 : d == 2 ? 14 : 10);
        Cubature.addBetween(values, cuts, orders, pieces);
    }

    /**
     * Where each depth of a chart should be cut: at zeros of the formula's kinks that depend on one coordinate with constant
     * limits, on a line at zeros of any kink. Always contains 0 and 1.
     */
    public static double[][] breaks(Chart chart, Formula f) {
        double[][] cuts = new double[chart.dimension()][];
        for (int k = 0; k < cuts.length; k++) {
            TreeSet<Double> found = new TreeSet<>(List.of(0.0, 1.0));
            if (!chart.isEndless(k)) {
                for (Formula kink : f.kinks()) {
                    if (cuts.length == 1) {
                        alongLine(chart, kink, found);
                    } else {
                        alongCoordinate(chart, k, kink, found);
                    }
                }
            }
            double[] resolving = NodeFunction.isSmooth(f) ? null : chart.resolvingCuts(f, k);
            if (resolving != null) {
                for (double u : resolving) {
                    found.add(u);
                }
            }
            cuts[k] = found.stream().mapToDouble(Double::doubleValue).toArray();
        }
        return cuts;
    }

    private static void alongCoordinate(Chart chart, int depth, Formula kink, TreeSet<Double> found) {
        String name = chart.coordinates().get(chart.coordinateOf(depth));
        if (chart.hasConstantLimits(depth) && kink.variables().equals(java.util.Set.of(name))) {
            BlockFunction value = kink.compile(List.of(name));
            roots(value::at, chart.lower(depth), chart.upper(depth), 200, at -> cut(chart.parameter(depth, at), found));
        }
    }

    private static void alongLine(Chart chart, Formula kink, TreeSet<Double> found) {
        NodeFunction value = NodeFunction.of(kink, chart);
        Chart.Anchor middle = chart.anchor(new double[] {0.5});
        Nodes nodes = new Nodes();
        double[][] du = new double[1][1];
        double[] out = new double[1];
        roots(u -> {
            du[0][0] = u - 0.5;
            chart.evaluate(middle, du, 1, nodes);
            value.evaluate(nodes, middle.position(), 1, out);
            return out[0];
        }, 0, 1, 1000, u -> cut(u, found));
    }

    private static void roots(DoubleUnaryOperator kink, double a, double b, int steps, DoubleConsumer found) {
        double before = kink.applyAsDouble(a);
        for (int i = 1; i <= steps; i++) {
            double low = a + (b - a) * (i - 1) / steps;
            double high = i == steps ? b : a + (b - a) * i / steps;
            double after = kink.applyAsDouble(high);
            if (before * after < 0) {
                double sign = before;
                for (int step = 0; step < 100 && high - low > 1e-16 * (b - a); step++) {
                    double middle = (low + high) / 2;
                    if (kink.applyAsDouble(middle) * sign > 0) {
                        low = middle;
                    } else {
                        high = middle;
                    }
                }
                found.accept((low + high) / 2);
            } else if (after == 0) {
                found.accept(high);
            }
            before = after;
        }
    }

    private static void cut(double u, TreeSet<Double> found) {
        if (u > 1e-12 && u < 1 - 1e-12) {
            found.add(u);
        }
    }

    private static final class Values implements Integrand {
        private final Chart chart;
        private final NodeFunction f;
        private final boolean measure;
        private final Chart.Anchor anchor;
        private final Nodes nodes = new Nodes();
        private final double[][] du;
        private final double[] weight = new double[BLOCK];

        Values(Chart chart, NodeFunction f, boolean measure) {
            this.chart = chart;
            this.f = f;
            this.measure = measure;
            double[] u = new double[chart.dimension()];
            java.util.Arrays.fill(u, 0.5);
            anchor = chart.anchor(u);
            du = new double[chart.dimension()][BLOCK];
        }

        @Override
        public int dimension() {
            return chart.dimension();
        }

        @Override
        public int components() {
            return 1;
        }

        @Override
        public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
            for (int k = 0; k < du.length; k++) {
                for (int i = 0; i < n; i++) {
                    du[k][i] = u[k][i] - 0.5;
                }
            }
            chart.evaluate(anchor, du, n, nodes);
            f.evaluate(nodes, anchor.position(), n, out[0]);
            double[] w = nodes.measure;
            if (!measure) {
                w = weight;
                chart.differentials(nodes, n, w);
            }
            for (int i = 0; i < n; i++) {
                out[0][i] = w[i] == 0 ? 0 : out[0][i] * w[i];
            }
        }
    }
}

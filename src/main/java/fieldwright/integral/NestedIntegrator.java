package fieldwright.integral;

import java.util.ArrayList;
import java.util.List;

import fieldwright.formula.BlockFunction;
import fieldwright.formula.Integrator;
import fieldwright.quantity.Standing;

/**
 * {@code integral(...)} in formulas: the nest of limits mapped to a unit box, halved adaptively. Every finite range is run through by
 * u²(3 − 2u), which removes square-root and logarithmic ends; endless ones by algebraic maps.
 * Accuracy: aims at relative 1e-12, counts as converged at 1e-9. One-dimensional kinks become cuts.
 */
public final class NestedIntegrator implements Integrator {
    private static final int MOST = 400_000;
    private static final double AIM = 1e-12;
    private static final double ENOUGH = 1e-9;

    @Override
    public Estimate integrate(Problem problem) {
        int d = problem.dimension();
        Mapped f = new Mapped(problem);
        List<Cubature.Piece> pieces = new ArrayList<>();
        double[] cuts = d == 1 ? cuts(f, problem.kinks()) : new double[] {0, 0.5, 1};
        int[] orders = new int[d];
        java.util.Arrays.fill(orders, d == 1 ? 20 : d == 2 ? 14 : 10);
        for (int i = 0; i + 1 < cuts.length; i++) {
            double[] from = new double[d];
            double[] to = new double[d];
            java.util.Arrays.fill(to, 1);
            from[0] = cuts[i];
            to[0] = cuts[i + 1];
            pieces.add(new Cubature.Piece(f, from, to, orders));
        }
        Cubature.Result r = Cubature.integrate(pieces, 1, false, new Cubature.Goal(AIM, 1e-3, 0, MOST), null);
        double value = r.value()[0];
        double error = r.error()[0];
        if (r.status() == fieldwright.integral.Estimate.Status.NOT_A_NUMBER) {
            return new Estimate(Double.NaN, Double.POSITIVE_INFINITY, Standing.notConverged("integral: the integrand is not a number somewhere "
                + "between the limits, or the integral has no finite value"));
        }
        if (error <= ENOUGH * Math.max(Math.abs(value), 1e-3 * r.magnitude()[0])) {
            return new Estimate(value, error, Standing.CONVERGED);
        }
        return new Estimate(value, error, Standing.notConverged(String.format(java.util.Locale.ROOT,
            "integral: %d evaluations, estimated error %.2g of %.6g", r.evaluations(), error, value)));
    }

    /** Parameters at which a kink function of one variable changes sign. */
    private static double[] cuts(Mapped f, List<BlockFunction> kinks) {
        List<Double> found = new ArrayList<>(List.of(0.0, 1.0));
        for (BlockFunction kink : kinks) {
            double before = kink.at(f.variable(1e-9));
            for (int i = 1; i <= 128; i++) {
                double high = i == 128 ? 1 - 1e-9 : i / 128.0;
                double low = i == 1 ? 1e-9 : (i - 1) / 128.0;
                double after = kink.at(f.variable(high));
                if (before * after < 0) {
                    found.add(root(kink, f, low, high, before));
                } else if (after == 0 && i < 128) {
                    found.add(high);
                }
                before = after;
            }
        }
        return found.stream().sorted().distinct().mapToDouble(Double::doubleValue).toArray();
    }

    private static double root(BlockFunction kink, Mapped f, double low, double high, double atLow) {
        double a = low;
        double b = high;
        for (int step = 0; step < 60; step++) {
            double middle = (a + b) / 2;
            if (kink.at(f.variable(middle)) * atLow > 0) {
                a = middle;
            } else {
                b = middle;
            }
        }
        return (a + b) / 2;
    }

    private static final class Mapped implements Integrand {
        private final Problem problem;
        private final double[][] v;
        private final double[] low = new double[BLOCK];
        private final double[] high = new double[BLOCK];
        private final double[] weight = new double[BLOCK];

        Mapped(Problem problem) {
            this.problem = problem;
            v = new double[problem.dimension()][BLOCK];
        }

        @Override
        public int dimension() {
            return problem.dimension();
        }

        @Override
        public int components() {
            return 1;
        }

        double variable(double u) {
            double[] unit = {u};
            step(0, unit, 1);
            return v[0][0];
        }

        @Override
        public void evaluate(double[][] u, int n, double[][] out, double[] noise) {
            java.util.Arrays.fill(weight, 0, n, 1);
            for (int k = 0; k < v.length; k++) {
                step(k, u[k], n);
            }
            problem.integrand().evaluate(v, n, out[0]);
            for (int i = 0; i < n; i++) {
                out[0][i] = weight[i] == 0 ? 0 : out[0][i] * weight[i];
            }
        }

        private void step(int k, double[] u, int n) {
            double[][] outer = java.util.Arrays.copyOf(v, k);
            problem.from().get(k).evaluate(outer, n, low);
            problem.to().get(k).evaluate(outer, n, high);
            for (int i = 0; i < n; i++) {
                double a = low[i];
                double b = high[i];
                double t = u[i];
                double s = 1 - t;
                if (Double.isInfinite(a) && Double.isInfinite(b)) {
                    double sign = a < b ? 1 : a > b ? -1 : 0;
                    v[k][i] = (2 * t - 1) / (4 * t * s);
                    weight[i] *= sign * (t * t + s * s) / (4 * t * t * s * s);
                } else if (Double.isInfinite(b)) {
                    v[k][i] = a + (b > 0 ? 1 : -1) * t / s;
                    weight[i] *= (b > 0 ? 1 : -1) / (s * s);
                } else if (Double.isInfinite(a)) {
                    v[k][i] = b + (a > 0 ? 1 : -1) * s / t;
                    weight[i] *= (a > 0 ? -1 : 1) / (t * t);
                } else {
                    double width = b - a;
                    double psi = t * t * (3 - 2 * t);
                    v[k][i] = psi <= 0.5 ? a + width * psi : b - width * (s * s * (3 - 2 * s));
                    weight[i] *= width * 6 * t * s;
                }
            }
        }
    }
}

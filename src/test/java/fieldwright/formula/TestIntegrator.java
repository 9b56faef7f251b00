package fieldwright.formula;

import fieldwright.quantity.Standing;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;

/** Nested Gauss-Legendre rules of 60 and 45 points; x = t/(1-t²) for endless limits. For tests of formulas only. */
final class TestIntegrator implements Integrator {
    private static final GaussIntegratorFactory RULES = new GaussIntegratorFactory();   // it keeps the rules it made

    @Override
    public Estimate integrate(Problem p) {
        double fine = nested(p, 60, new double[0]);
        double coarse = nested(p, 45, new double[0]);
        double error = Math.abs(fine - coarse) + 1e-14 * Math.abs(fine);
        return new Estimate(fine, error, Double.isFinite(fine) ? Standing.CONVERGED : Standing.notConverged("not finite"));
    }

    private static double nested(Problem p, int points, double[] outer) {
        int k = outer.length;
        if (k == p.dimension()) {
            return p.integrand().at(outer);
        }
        double a = p.from().get(k).at(outer);
        double b = p.to().get(k).at(outer);
        GaussIntegrator rule = RULES.legendre(points, -1, 1);
        boolean endless = Double.isInfinite(a) || Double.isInfinite(b);
        double low = endless ? (Double.isInfinite(a) ? -1 : a / (1 + Math.sqrt(1 + a * a))) : a;
        double high = endless ? (Double.isInfinite(b) ? 1 : b / (1 + Math.sqrt(1 + b * b))) : b;
        return rule.integrate(u -> {
            double t = (low + high) / 2 + u * (high - low) / 2;
            double x = endless ? 2 * t / (1 - t * t) : t;
            double scale = (high - low) / 2 * (endless ? 2 * (1 + t * t) / ((1 - t * t) * (1 - t * t)) : 1);
            double[] next = java.util.Arrays.copyOf(outer, k + 1);
            next[k] = x;
            return scale * nested(p, points, next);
        });
    }
}

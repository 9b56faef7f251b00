package fieldwright.formula;

import fieldwright.quantity.Standing;
import java.util.List;

/** Numeric integration, for {@code integral(…)} inside formulas. Implemented by the integral package; thread-safe. */
public interface Integrator {
    /**
     * ∫…∫ f dv₀ … dv_{d-1}, v₀ outermost, without any measure.
     *
     * @param integrand of d arguments, outermost first
     * @param from lower limits; the k-th is a function of the first k variables and may be -infinity
     * @param to upper limits, as {@code from}; may be below {@code from}, then the sign changes
     * @param kinks functions of all d variables on whose zero sets the integrand or a derivative of it jumps
     */
    record Problem(BlockFunction integrand, List<BlockFunction> from, List<BlockFunction> to, List<BlockFunction> kinks) {
        public Problem {
            from = List.copyOf(from);
            to = List.copyOf(to);
            kinks = List.copyOf(kinks);
            if (from.size() != to.size() || integrand.arguments() != from.size() || from.isEmpty()) {
                throw new IllegalArgumentException("integral with " + from.size() + " lower and " + to.size() + " upper limits");
            }
        }

        public int dimension() {
            return from.size();
        }
    }

    /** @param error estimate of |value - true|, not negative */
    record Estimate(double value, double error, Standing standing) {
    }

    Estimate integrate(Problem problem);
}

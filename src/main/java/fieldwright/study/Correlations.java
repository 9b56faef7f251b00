package fieldwright.study;

import java.util.HashMap;
import java.util.Map;
import java.util.Set;

/** Correlation coefficients between inputs; 0 for every pair not stated. Immutable. */
public final class Correlations {
    public static final Correlations NONE = new Correlations(Map.of());

    private final Map<Set<String>, Double> coefficients;

    private Correlations(Map<Set<String>, Double> coefficients) {
        this.coefficients = coefficients;
    }

    /**
     * These correlations and one more.
     *
     * @throws IllegalArgumentException if the names are equal, or the coefficient is not in [-1, 1]
     */
    public Correlations with(String a, String b, double coefficient) {
        if (a.equals(b)) {
            throw new IllegalArgumentException("corr(" + a + ", " + b + "): an input's correlation with itself is 1.");
        }
        if (!(Math.abs(coefficient) <= 1)) {
            throw new IllegalArgumentException(
                    "corr(" + a + ", " + b + ") = " + coefficient + ": must lie between -1 and 1.");
        }
        Map<Set<String>, Double> more = new HashMap<>(coefficients);
        more.put(Set.of(a, b), coefficient);
        return new Correlations(Map.copyOf(more));
    }

    public double between(String a, String b) {
        return a.equals(b) ? 1 : coefficients.getOrDefault(Set.of(a, b), 0.0);
    }

    public boolean isEmpty() {
        return coefficients.isEmpty();
    }
}

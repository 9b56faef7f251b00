package fieldwright.study;

import java.util.Map;

/**
 * Uncertainty of one number of a result from the inputs' tolerances.
 *
 * @param expanded U = 2 u (k = 2), or null when it could not be established
 * @param reason why not, null when established
 * @param contributions by input: signed change of the number with one standard uncertainty of the input
 * @param degreesOfFreedom effective, by Welch and Satterthwaite (JCGM 100 G.2b); NaN when inputs are correlated,
 *     where that formula does not hold
 */
public record Combined(Double expanded, String reason, Map<String, Double> contributions, double degreesOfFreedom) {
    /** Coverage factor of every expanded uncertainty given here. */
    public static final double COVERAGE = 2;

    public Combined {
        contributions = Map.copyOf(contributions);
    }

    static Combined absent(String reason) {
        return new Combined(null, reason, Map.of(), Double.NaN);
    }

    public boolean isEstablished() {
        return expanded != null;
    }
}

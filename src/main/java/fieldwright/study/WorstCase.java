package fieldwright.study;

import java.util.Map;

/**
 * The replay that uses most of an assessment's allowance.
 *
 * @param worst the assessed value there, or null when some replay failed or did not converge
 * @param at the inputs' values there in SI; empty when the stated values are the worst
 * @param reason why there is none, null when there is
 */
public record WorstCase(Assessed worst, Map<String, Double> at, String reason) {
    public WorstCase {
        at = Map.copyOf(at);
    }

    static WorstCase absent(String reason) {
        return new WorstCase(null, Map.of(), reason);
    }

    public boolean isEstablished() {
        return worst != null;
    }
}

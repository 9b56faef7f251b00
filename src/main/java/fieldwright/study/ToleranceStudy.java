package fieldwright.study;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * What the inputs' tolerances do to a sheet's results, found by working the sheet again.
 *
 * <p>Each input is moved to both ends of its tolerance, the others kept: 2 n replays serve every result and every
 * assessment. Contribution of an input: half the difference between its two ends, scaled to one standard uncertainty
 * (JCGM 100 5.1.3 note 2, with the ends of the tolerance as the steps). Replays are kept, so asking again is free.
 *
 * <p>Weakness, said aloud: the combination is linear. Where a result bends over a tolerance more than it slopes, it
 * is not established (see {@link #BEND_LIMIT}). The worst case looks at ends and corners only, so a peak that lies
 * inside a tolerance is not seen.
 */
public final class ToleranceStudy {
    /** Up to this many inputs every corner of the tolerances is worked for the worst case: 2⁴ = 16 replays. */
    public static final int ALL_CORNERS_UP_TO = 4;

    /** The even part of the response may reach this part of the combined standard uncertainty, root mean square. */
    static final double BEND_LIMIT = 0.5;

    private final List<InputTolerance> inputs;
    private final Correlations correlations;
    private final Replay replay;
    private final Map<Map<String, Double>, Replay.Outcome> worked = new HashMap<>();

    /**
     * @param inputs those with a tolerance; the others never move
     * @param correlations between them; pairs not stated are independent
     */
    public ToleranceStudy(List<InputTolerance> inputs, Correlations correlations, Replay replay) {
        this.inputs = List.copyOf(inputs);
        this.correlations = correlations;
        this.replay = replay;
    }

    /** Uncertainty of each number of a result: one for a scalar, three for a vector, six for a one-sided pair. */
    public List<Combined> tolerance(String result) {
        Reading stated = at(Map.of()).results().get(result);
        if (stated == null) {
            return List.of();
        }
        List<Combined> each = new ArrayList<>();
        for (int component = 0; component < stated.size(); component++) {
            each.add(combine(result, stated, component));
        }
        return List.copyOf(each);
    }

    /** Worst case of an assessment over the inputs' tolerances. */
    public WorstCase worstCase(String label) {
        Search search = new Search(label);
        search.visit(Map.of());
        Map<String, Double> corner = new LinkedHashMap<>();
        for (InputTolerance input : inputs) {
            double low = search.visit(Map.of(input.name(), input.low()));
            double high = search.visit(Map.of(input.name(), input.high()));
            corner.put(input.name(), high >= low ? input.high() : input.low());
        }
        if (inputs.size() <= ALL_CORNERS_UP_TO) {
            corners().forEach(search::visit);
        } else {
            search.visit(corner);
        }
        return search.found();
    }

    private Combined combine(String result, Reading stated, int component) {
        if (!stated.isUsable(component)) {
            return Combined.absent(result + " itself did not converge or is unbounded");
        }
        Map<String, Double> contributions = new LinkedHashMap<>();
        double bend = 0;    // sum of squares of the even parts, each root mean square over its tolerance
        for (InputTolerance input : inputs) {
            Reading low = at(Map.of(input.name(), input.low())).results().get(result);
            Reading high = at(Map.of(input.name(), input.high())).results().get(result);
            String failed = failure(input, "lower", low, component);
            failed = failed != null ? failed : failure(input, "upper", high, component);
            if (failed != null) {
                return Combined.absent(failed);
            }
            contributions.put(input.name(), (high.value(component) - low.value(component)) / 2 * input.standardPart());
            double even = (high.value(component) + low.value(component)) / 2 - stated.value(component);
            double noise = (high.error(component) + low.error(component)) / 2 + stated.error(component)
                    + 4 * Math.ulp(stated.value(component));
            bend += Math.abs(even) <= noise ? 0 : square(even * input.meanSquarePart());
        }
        double variance = variance(contributions);
        double squares = contributions.values().stream().mapToDouble(ToleranceStudy::square).sum();
        if (variance < -1e-9 * squares) {
            return Combined.absent("the correlations stated between inputs contradict each other");
        }
        double standard = Math.sqrt(Math.max(0, variance));
        if (Math.sqrt(bend) > BEND_LIMIT * standard) {
            return Combined.absent("the result bends over the tolerances more than it slopes: no linear combination");
        }
        return new Combined(Combined.COVERAGE * standard, null, contributions, freedom(contributions, standard));
    }

    private static String failure(InputTolerance input, String end, Reading reading, int component) {
        String where = "with " + input.name() + " at the " + end + " end of its tolerance it ";
        if (reading == null) {
            return where + "could not be worked";
        }
        return reading.isUsable(component) ? null : where + "did not converge or is unbounded";
    }

    /** JCGM 100 equation (16); with nothing correlated it is equation (10). */
    private double variance(Map<String, Double> contributions) {
        double sum = 0;
        for (Map.Entry<String, Double> a : contributions.entrySet()) {
            for (Map.Entry<String, Double> b : contributions.entrySet()) {
                sum += a.getValue() * b.getValue() * correlations.between(a.getKey(), b.getKey());
            }
        }
        return sum;
    }

    /** JCGM 100 equation (G.2b), Welch and Satterthwaite. */
    private double freedom(Map<String, Double> contributions, double standard) {
        if (!correlations.isEmpty()) {
            return Double.NaN;
        }
        double sum = 0;
        for (InputTolerance input : inputs) {
            sum += square(square(contributions.get(input.name()) / standard)) / input.degreesOfFreedom();
        }
        return standard == 0 || sum == 0 ? Double.POSITIVE_INFINITY : 1 / sum;
    }

    private List<Map<String, Double>> corners() {
        List<Map<String, Double>> all = new ArrayList<>();
        for (int bits = 0; bits < 1 << inputs.size(); bits++) {
            Map<String, Double> corner = new LinkedHashMap<>();
            for (int i = 0; i < inputs.size(); i++) {
                InputTolerance input = inputs.get(i);
                corner.put(input.name(), (bits >> i & 1) == 0 ? input.low() : input.high());
            }
            all.add(corner);
        }
        return all;
    }

    private Replay.Outcome at(Map<String, Double> changed) {
        Replay.Outcome known = worked.get(changed);
        if (known == null) {
            known = replay.with(Map.copyOf(changed));
            worked.put(Map.copyOf(changed), known);
        }
        return known;
    }

    private static double square(double x) {
        return x * x;
    }

    /** Looks for the replay that uses most of the allowance; one that failed spoils the search. */
    private final class Search {
        private final String label;
        private Assessed worst;
        private Map<String, Double> where = Map.of();
        private String reason;

        Search(String label) {
            this.label = label;
        }

        /** Part of the allowance used there; NaN if that replay is of no use. */
        double visit(Map<String, Double> changed) {
            Assessed here = at(changed).assessed().get(label);
            if (here == null || !here.isUsable()) {
                reason = reason != null ? reason : (here == null ? "could not be worked" : "did not converge or is unbounded")
                        + (changed.isEmpty() ? " with the stated inputs" : " with " + changed + " in SI");
                return Double.NaN;
            }
            if (worst == null || here.used() > worst.used()) {
                worst = here;
                where = changed;
            }
            return here.used();
        }

        WorstCase found() {
            return reason != null ? WorstCase.absent(reason) : new WorstCase(worst, where, null);
        }
    }
}

package fieldwright.study;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.function.ToDoubleFunction;
import org.junit.jupiter.api.Test;

class ToleranceStudyTest {
    private static final Map<String, Double> STATED = Map.of("a", 3.0, "b", 2.0, "c", -1.0);

    /** A sheet with one result "f" and one assessment "f" against an allowance of 10. */
    private static Replay sheet(ToDoubleFunction<Map<String, Double>> f) {
        return changed -> {
            Map<String, Double> all = new HashMap<>(STATED);
            all.putAll(changed);
            double value = f.applyAsDouble(all);
            return new Replay.Outcome(Map.of("f", Reading.of(value, 0)),
                    Map.of("f", new Assessed(value, 0, 10, true)));
        };
    }

    private static Combined only(ToleranceStudy study) {
        List<Combined> all = study.tolerance("f");
        assertEquals(1, all.size());
        return all.get(0);
    }

    @Test
    void rectangularLimitsGiveHalfWidthOverRootThree() {
        var study = new ToleranceStudy(List.of(InputTolerance.limits("a", 3, 0.6)), Correlations.NONE,
                sheet(x -> 5 * x.get("a")));
        assertEquals(2 * 5 * 0.6 / Math.sqrt(3), only(study).expanded(), 1e-14);
    }

    @Test
    void expandedUncertaintyIsDividedByItsCoverageFactor() {
        var study = new ToleranceStudy(List.of(InputTolerance.expanded("a", 3, 0.6, 3, 18)), Correlations.NONE,
                sheet(x -> -5 * x.get("a")));
        assertEquals(2 * 5 * 0.2, only(study).expanded(), 1e-14);
        assertEquals(18, only(study).degreesOfFreedom(), 1e-12);
        assertEquals(-1.0, only(study).contributions().get("a"), 1e-14);
    }

    @Test
    void endGaugeExampleOfTheGuide() {
        // JCGM 100:2008 table H.1: |c_i| u(x_i) in nm, nu of each; u_c = 32 nm, effective nu = 16.7 (H.1.6).
        // Numbers from memory; u_c and nu agree with each other.
        var names = List.of("standard", "comparison", "expansion", "temperature");
        double[] u = {25, 9.7, 2.9, 16.6};
        double[] nu = {18, 25.6, 50, 2};
        var inputs = new java.util.ArrayList<InputTolerance>();
        for (int i = 0; i < u.length; i++) {
            inputs.add(InputTolerance.expanded(names.get(i), 0, u[i], 1, nu[i]));
        }
        Replay sum = changed -> new Replay.Outcome(Map.of("f",
                Reading.of(changed.values().stream().mapToDouble(Double::doubleValue).sum(), 0)), Map.of());
        Combined combined = only(new ToleranceStudy(inputs, Correlations.NONE, sum));
        assertEquals(32, combined.expanded() / 2, 0.5);
        assertEquals(16.7, combined.degreesOfFreedom(), 0.1);    // the guide cuts, 16.76 unrounded
    }

    @Test
    void tenResistorsInSeriesCalibratedAgainstOneStandard() {
        // JCGM 100:2008 5.2.2 example: ten 1000 ohm resistors, u = 100 milliohm each, fully correlated: u_c = 1 ohm;
        // uncorrelated it would be 0.32 ohm.
        var inputs = new java.util.ArrayList<InputTolerance>();
        Correlations full = Correlations.NONE;
        for (int i = 0; i < 10; i++) {
            inputs.add(InputTolerance.expanded("R" + i, 1000, 0.1, 1, Double.POSITIVE_INFINITY));
            for (int j = 0; j < i; j++) {
                full = full.with("R" + i, "R" + j, 1);
            }
        }
        Replay series = changed -> new Replay.Outcome(Map.of("f", Reading.of(
                1000 * (10 - changed.size()) + changed.values().stream().mapToDouble(Double::doubleValue).sum(), 0)),
                Map.of());
        assertEquals(1.0, only(new ToleranceStudy(inputs, full, series)).expanded() / 2, 1e-9);
        assertEquals(0.316, only(new ToleranceStudy(inputs, Correlations.NONE, series)).expanded() / 2, 5e-4);
    }

    @Test
    void oppositeCorrelationCancels() {
        var inputs = List.of(InputTolerance.limits("a", 3, 0.5), InputTolerance.limits("b", 2, 0.5));
        Replay product = sheet(x -> x.get("a") - x.get("b"));
        assertEquals(0, only(new ToleranceStudy(inputs, Correlations.NONE.with("b", "a", 1), product)).expanded(), 1e-14);
        assertEquals(2 * Math.sqrt(2) * 0.5 / Math.sqrt(3),
                only(new ToleranceStudy(inputs, Correlations.NONE, product)).expanded(), 1e-14);
    }

    @Test
    void contradictingCorrelationsGiveNoTolerance() {
        var inputs = List.of(InputTolerance.limits("a", 3, 0.5), InputTolerance.limits("b", 2, 0.5), InputTolerance.limits("c", -1, 0.5));
        Correlations impossible = Correlations.NONE.with("a", "b", -1).with("b", "c", -1).with("a", "c", -1);
        Combined none = only(new ToleranceStudy(inputs, impossible, sheet(x -> x.get("a") + x.get("b") + x.get("c"))));
        assertNull(none.expanded());
        assertTrue(none.reason().contains("contradict"), none.reason());
    }

    @Test
    void absentWhenARerunDoesNotConvergeOrFails() {
        var input = List.of(InputTolerance.limits("a", 3, 0.5));
        Replay fails = changed -> changed.getOrDefault("a", 3.0) > 3.2
                ? new Replay.Outcome(Map.of(), Map.of())
                : new Replay.Outcome(Map.of("f", Reading.of(1, 0)), Map.of("f", new Assessed(1, 0, 10, true)));
        Replay wanders = changed -> new Replay.Outcome(
                Map.of("f", changed.isEmpty() ? Reading.of(1, 0) : Reading.notConverged(1)),
                Map.of("f", new Assessed(1, 0, 10, changed.isEmpty())));
        for (Replay bad : List.of(fails, wanders)) {
            var study = new ToleranceStudy(input, Correlations.NONE, bad);
            assertNull(only(study).expanded());
            assertTrue(only(study).reason().contains("a at the "), only(study).reason());
            assertNull(study.worstCase("f").worst());
            assertTrue(study.worstCase("f").reason().contains("a="), study.worstCase("f").reason());
        }
    }

    @Test
    void absentWhereTheResultBendsInsteadOfSloping() {
        var input = List.of(InputTolerance.limits("c", -1, 0.5));
        Combined even = only(new ToleranceStudy(input, Correlations.NONE, sheet(x -> Math.pow(x.get("c") + 1, 2))));
        assertFalse(even.isEstablished());
        Combined gentle = only(new ToleranceStudy(input, Correlations.NONE, sheet(x -> Math.pow(x.get("c") - 4, 2))));
        assertTrue(gentle.isEstablished());
    }

    @Test
    void eachNumberOfAVectorHasItsOwn() {
        Replay vector = changed -> {
            double a = changed.getOrDefault("a", 3.0);
            return new Replay.Outcome(Map.of("E", new Reading(new double[] {a, 2 * a, 7}, new double[3], true)), Map.of());
        };
        List<Combined> each = new ToleranceStudy(List.of(InputTolerance.expanded("a", 3, 0.1, 2, 9)),
                Correlations.NONE, vector).tolerance("E");
        assertEquals(0.1, each.get(0).expanded(), 1e-14);
        assertEquals(0.2, each.get(1).expanded(), 1e-14);
        assertEquals(0.0, each.get(2).expanded(), 0);
    }

    @Test
    void worstCaseIsACornerNotOnlyAnEnd() {
        var inputs = List.of(InputTolerance.limits("a", 3, 1), InputTolerance.limits("b", 2, 1));
        // Saddle: alone neither input raises it, together they do.
        Replay saddle = sheet(x -> 1 + (x.get("a") - 3) * (x.get("b") - 2));
        WorstCase worst = new ToleranceStudy(inputs, Correlations.NONE, saddle).worstCase("f");
        assertEquals(2, worst.worst().value(), 0);
        assertEquals(0.2, worst.worst().used(), 1e-15);
        assertEquals(2, worst.at().size());
    }

    @Test
    void manyInputsTakeTheCombinedWorstCorner() {
        var inputs = new java.util.ArrayList<InputTolerance>();
        for (int i = 0; i < 12; i++) {
            inputs.add(InputTolerance.limits("x" + i, 0, 1));
        }
        AtomicInteger replays = new AtomicInteger();
        Replay linear = changed -> {
            replays.incrementAndGet();
            double value = 100;
            for (int i = 0; i < 12; i++) {
                value += (i % 2 == 0 ? 1 : -1) * changed.getOrDefault("x" + i, 0.0);
            }
            return new Replay.Outcome(Map.of(), Map.of("f", new Assessed(-value, 0.5, 50, true)));
        };
        WorstCase worst = new ToleranceStudy(inputs, Correlations.NONE, linear).worstCase("f");
        assertEquals(-112, worst.worst().value(), 0);
        assertEquals(112.5 / 50, worst.worst().used(), 1e-15);
        assertEquals(1 + 2 * 12 + 1, replays.get());
    }

    @Test
    void noToleranceMeansZeroAndTheStatedCase() {
        var study = new ToleranceStudy(List.of(), Correlations.NONE, sheet(x -> x.get("a")));
        assertEquals(0, only(study).expanded(), 0);
        assertEquals(3, study.worstCase("f").worst().value(), 0);
        assertTrue(study.worstCase("f").at().isEmpty());
    }
}

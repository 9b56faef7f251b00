package fieldwright.words;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.judge.Assessment;
import fieldwright.judge.Threshold;
import fieldwright.output.Output;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import fieldwright.study.Assessed;
import fieldwright.study.Correlations;
import fieldwright.study.InputTolerance;
import fieldwright.study.Replay;
import fieldwright.study.ToleranceStudy;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;

class OutputsTest {
    private static final Threshold LIMIT = new Threshold("onset", Amount.of(10, "kV/m"), "test", "test only");

    private static Amount field(double value, double error) {
        return Amount.si(value, error, Units.FIELD);
    }

    @Test
    void amountsKeepUnitErrorAndStanding() {
        Value.Scalar shown = Outputs.scalar(Amount.of(2.5, "kV/m").withError(3));
        assertEquals(2500, shown.value(), 0);
        assertEquals(3, shown.numericalError(), 0);
        assertEquals("V/m", shown.unit());
        assertEquals("kV/m", shown.shown().unit());
        assertEquals(1000, shown.shown().factor(), 0);
        assertNull(Outputs.scalar(field(1, Double.NaN)).numericalError());
        Value.Scalar wandering = Outputs.scalar(Amount.si(1, 2, Units.FIELD, Standing.notConverged("limit reached")));
        assertEquals(Status.NOT_CONVERGED, wandering.status());
        assertEquals("limit reached", wandering.reason());
        assertEquals(1, wandering.value(), 0);
        Value.Scalar endless = Outputs.scalar(Amount.si(Double.NEGATIVE_INFINITY, Double.POSITIVE_INFINITY, Units.FIELD, Standing.unbounded("on the line")));
        assertEquals(Status.UNBOUNDED, endless.status());
        assertNull(endless.numericalError());
    }

    @Test
    void pairsNameTheirSides() {
        Place here = new Place(1, 2, 3);
        Vector up = Vector.of(here, field(0, 0), field(0, 0), field(5, 0.1));
        Value.Sides flat = (Value.Sides) Outputs.value(Vector.sided(here, new double[] {0, 0, -1}, up, up.times(-1)));
        assertEquals("-z", flat.plusSide());
        assertEquals("+z", flat.minusSide());
        assertEquals(3, flat.plus().place().z(), 0);
        Value.Sides tilted = (Value.Sides) Outputs.value(Vector.sided(here, new double[] {0.6, 0, 0.8}, up, up.times(-1)));
        assertEquals("(0.6000, 0.0000, 0.8000)", tilted.plusSide());
        assertEquals(6, Outputs.reading(flat).values().length);
        assertEquals(-5, Outputs.reading(flat).values()[5], 0);
    }

    @Test
    void tolerancesGoToEachNumber() {
        Place here = new Place(0, 0, 0);
        Value vector = Outputs.value(Vector.of(here, field(1, 0), field(2, 0), field(3, 0)));
        Replay scaled = changed -> {
            double a = changed.getOrDefault("a", 1.0);
            return new Replay.Outcome(Map.of("E", Outputs.reading(Outputs.value(Vector.of(here, field(a, 0), field(2 * a, 0), field(3, 0))))), Map.of());
        };
        var study = new ToleranceStudy(List.of(InputTolerance.expanded("a", 1, 0.1, 2, 9)), Correlations.NONE, scaled);
        Value.Triple with = (Value.Triple) Outputs.withTolerance(vector, study.tolerance("E"));
        assertEquals(0.1, with.x().tolerance(), 1e-15);
        assertEquals(0.2, with.y().tolerance(), 1e-15);
        assertEquals(0.0, with.z().tolerance(), 0);
    }

    private static Output.Assessment assessment(Amount value, double margin) {
        return Outputs.assessment(Assessment.of("roof", value, LIMIT, margin));
    }

    private static ToleranceStudy study(java.util.function.DoubleFunction<Amount> ofInput, double margin) {
        return new ToleranceStudy(List.of(InputTolerance.limits("a", 4000, 1000)), Correlations.NONE, changed -> {
            Output.Assessment shown = assessment(ofInput.apply(changed.getOrDefault("a", 4000.0)), margin);
            return new Replay.Outcome(Map.of(), Map.of("roof", Outputs.assessed(shown)));
        });
    }

    @Test
    void theWorstCaseDecides() {
        Output.Assessment stated = assessment(field(4000, 1), 2);
        assertTrue(stated.passed());
        Output.Assessment worst = Outputs.withWorstCase(stated, study(a -> field(a, 1), 2).worstCase("roof"));
        assertEquals(5000, worst.worstCase().value(), 0);
        assertFalse(worst.passed(), "5000 V/m + 1 V/m is over 10 kV/m / 2");
        assertEquals(10000 / 5001.0, worst.marginFound(), 1e-9);
        assertTrue(Outputs.withWorstCase(assessment(field(4000, 1), 1.9), study(a -> field(a, 1), 1.9).worstCase("roof")).passed());
        Output.Assessment gentle = Outputs.withWorstCase(assessment(field(4000, 1), 1.9), study(a -> field(4000, 1), 1.9).worstCase("roof"));
        assertEquals(4000, gentle.worstCase().value(), 0);
    }

    @Test
    void noWorstCaseNoPass() {
        ToleranceStudy lost = study(a -> a > 4500 ? Amount.si(a, 0, Units.FIELD, Standing.notConverged("limit reached")) : field(a, 0), 1);
        Output.Assessment judged = Outputs.withWorstCase(assessment(field(4000, 0), 1), lost.worstCase("roof"));
        assertFalse(judged.passed());
        assertEquals(Status.NOT_CONVERGED, judged.status());
        assertTrue(judged.worstCase().reason().contains("a=5000"), judged.worstCase().reason());
    }

    @Test
    void anAssessedValueInDoubtIsOfNoUse() {
        Assessed bare = Outputs.assessed(assessment(field(4000, Double.NaN), 1));
        assertFalse(bare.converged());
        Assessed good = Outputs.assessed(assessment(field(-4000, 10), 2));
        assertEquals(4010 / 5000.0, good.used(), 1e-12);
    }
}

package fieldwright.judge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Standing;
import fieldwright.quantity.Units;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class AssessmentTest {
    private static final Threshold LIMIT = new Threshold("onset", Amount.of(3, "MV/m"), "test", "none of it holds outdoors");

    private static Amount field(double value, double error) {
        return Amount.si(value, error, Units.FIELD);
    }

    @Test
    void passesUnderThresholdOverMargin() {
        Assessment half = Assessment.of("roof", field(1.4999e6, 0), LIMIT, 2);
        assertTrue(half.passed());
        assertEquals(3 / 1.4999, half.marginFound(), 1e-12);
        assertEquals(1.5e6, half.allowed(), 1e-9);
        assertFalse(Assessment.of("roof", field(-1.6e6, 0), LIMIT, 2).passed());
    }

    @Test
    void numericalErrorAndWorstCaseCount() {
        assertFalse(Assessment.of("roof", field(1.4999e6, 200), LIMIT, 2).passed());
        assertTrue(new Assessment("roof", field(1e6, 0), field(1.4e6, 1e3), LIMIT, 2).passed());
        assertFalse(new Assessment("roof", field(1e6, 0), field(1.4e6, 2e5), LIMIT, 2).passed());
        assertFalse(new Assessment("roof", field(1.6e6, 0), field(1e6, 0), LIMIT, 2).passed());
    }

    @Test
    void failsWhenNotConvergedUnboundedOrErrorNotCarried() {
        Amount wandering = Amount.si(1, 0, Units.FIELD, Standing.notConverged("limit"));
        Amount endless = Amount.si(Double.POSITIVE_INFINITY, Double.POSITIVE_INFINITY, Units.FIELD, Standing.unbounded("rim"));
        assertFalse(Assessment.of("x", wandering, LIMIT, 1).passed());
        assertTrue(Double.isNaN(Assessment.of("x", wandering, LIMIT, 1).marginFound()));
        assertFalse(Assessment.of("x", endless, LIMIT, 1).passed());
        assertFalse(new Assessment("x", field(1, 0), endless, LIMIT, 1).passed());
        assertFalse(new Assessment("x", field(1, 0), wandering, LIMIT, 1).passed());
        assertFalse(Assessment.of("x", field(1, Double.NaN), LIMIT, 1).passed());
    }

    @Test
    void wrongKindOrMarginIsTheAuthorsError() {
        var kind = assertThrows(AuthorException.class, () -> Assessment.of("roof", Amount.of(3, "V"), LIMIT, 1));
        assertTrue(kind.getMessage().contains("'roof'") && kind.getMessage().contains("'onset'"), kind.getMessage());
        for (double margin : new double[] {0, -1, Double.NaN, Double.POSITIVE_INFINITY}) {
            assertThrows(AuthorException.class, () -> Assessment.of("roof", field(1, 0), LIMIT, margin));
        }
    }

    @Test
    void aThresholdWithoutSourceOrCautionIsRefused() {
        assertThrows(AuthorException.class, () -> new Threshold("x", Amount.of(1, "V"), " ", "c"));
        assertThrows(AuthorException.class, () -> new Threshold("x", Amount.of(1, "V"), "s", null));
        assertThrows(AuthorException.class, () -> new Threshold("x", Amount.of(-1, "V"), "s", "c"));
    }

    static Stream<Threshold> builtIn() {
        return Stream.of(Thresholds.airBreakdown(), Thresholds.dischargeAtProjection(), Thresholds.surfaceChargeInAir(),
                Thresholds.surfacePotential());
    }

    @ParameterizedTest
    @MethodSource("builtIn")
    void builtInOnesSayWhereTheyComeFromAndDefer(Threshold threshold) {
        assertTrue(threshold.source().contains("common practice"), threshold.source());
        assertTrue(threshold.source().contains("from memory"), threshold.source());
        assertTrue(threshold.caution().contains("local code") && threshold.caution().contains("licensed practice"));
    }
}

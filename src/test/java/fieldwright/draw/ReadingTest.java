package fieldwright.draw;

import static org.junit.jupiter.api.Assertions.assertEquals;

import fieldwright.output.Display;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.util.List;
import org.junit.jupiter.api.Test;

class ReadingTest {
    private static Value.Scalar scalar(double v) {
        return Value.Scalar.of(v, 1e-9, "V/m");
    }

    @Test
    void aPartIsNotRoundedToNothingForTheSakeOfALargerOne() {
        Value.Scalar large = new Value.Scalar(276969, 2e-5, 8e4, "V/m", null, Status.CONVERGED, "");
        Value.Scalar small = new Value.Scalar(-1.5, 2e-5, 0.2, "V/m", null, Status.CONVERGED, "");
        Value.Scalar noise = new Value.Scalar(1e-6, 2e-5, 0.2, "V/m", null, Status.CONVERGED, "");
        List<Reading> parts = Reading.of(new Value.Triple(small, noise, large, null));
        assertEquals(List.of("−0.0015\u00a0kV/m", "0\u00a0kV/m", "277\u00a0kV/m"), parts.stream().map(Reading::figure).toList());
    }

    @Test
    void theUnitChosenOnTheSheetStands() {
        Value.Scalar inVolts = Value.Scalar.of(276969, 1e-4, "V/m").withDisplay(new Display("V/mm", 1e3));
        assertEquals("276.969\u00a0V/mm", Reading.of(inVolts).figure());
    }

    @Test
    void theComponentsOfAVectorShareTheUnitOfTheLargest() {
        List<Reading> parts = Reading.of(new Value.Triple(scalar(12), scalar(0), scalar(-45600), null));
        assertEquals(List.of("x", "y", "z"), parts.stream().map(Reading::part).toList());
        assertEquals(List.of("0.0120\u00a0kV/m", "0\u00a0kV/m", "−45.6000\u00a0kV/m"), parts.stream().map(Reading::figure).toList());
    }

    @Test
    void whatNoPartHasIsSaidOnce() {
        Value.Scalar none = new Value.Scalar(Double.NaN, null, null, "V/m", null, Status.UNBOUNDED, "on the rim");
        assertEquals(List.of(new Reading("", "unbounded", "", Status.UNBOUNDED, "on the rim")),
                Reading.of(new Value.Triple(none, none, none, null)));
        Value.Scalar down = new Value.Scalar(Double.NEGATIVE_INFINITY, null, null, "V/m", null, Status.UNBOUNDED, "on the rim");
        assertEquals("unbounded, towards −∞", Reading.of(new Value.Triple(none, none, down, null)).get(2).figure());
    }

    @Test
    void theWorstIsNeverShownMilder() {
        assertEquals("350\u00a0kV/m", Reading.worst(scalar(349451)));
        assertEquals("−350\u00a0kV/m", Reading.worst(scalar(-349451)));
        assertEquals("3.00\u00a0MV/m", Reading.worst(scalar(3e6)));
    }

    @Test
    void theWidestDoubtCoversEveryPart() {
        Value.Scalar a = new Value.Scalar(1000, 1e-6, 30.0, "V/m", null, Status.CONVERGED, "");
        Value.Scalar b = new Value.Scalar(10, 2e-3, 1.0, "V/m", null, Status.CONVERGED, "");
        assertEquals("± 0.030 kV/m (k = 2) · num. 0.002 V/m", Reading.widestDoubt(new Value.Triple(a, b, a, null)).replace('\u00a0', ' '));
        Value.Scalar unknown = new Value.Scalar(10, null, null, "V/m", null, Status.CONVERGED, "");
        assertEquals("num. error not carried", Reading.widestDoubt(new Value.Triple(a, unknown, a, null)));
    }

    @Test
    void aPairNamesItsSides() {
        Value.Triple up = new Value.Triple(scalar(0), scalar(0), scalar(1), null);
        List<Reading> parts = Reading.of(new Value.Sides("+z", up, "-z", up));
        assertEquals(List.of("side +z, x", "side +z, y", "side +z, z", "side −z, x", "side −z, y", "side −z, z"),
                parts.stream().map(Reading::part).toList());
    }

    @Test
    void unboundedAndNoNumberAreSaidWithTheirReason() {
        Value.Scalar unbounded = new Value.Scalar(Double.NaN, null, null, "V/m", null, Status.UNBOUNDED, "on the rim of 'film'");
        assertEquals(new Reading("", "unbounded", "", Status.UNBOUNDED, "on the rim of 'film'"), Reading.of(unbounded));
        Value.Scalar none = new Value.Scalar(Double.NaN, null, null, "V/m", null, Status.NOT_CONVERGED, "stopped at 20000");
        assertEquals("no number", Reading.of(none).figure());
    }
}

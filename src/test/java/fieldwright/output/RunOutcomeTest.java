package fieldwright.output;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.ObjectInputStream;
import java.io.ObjectOutputStream;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;

class RunOutcomeTest {

    private static final Value.Scalar GOOD = Value.Scalar.of(1, 1e-9, "V");
    private static final Value.Scalar DOUBTFUL = new Value.Scalar(1, 0.1, null, "V", null, Status.NOT_CONVERGED, "too many");
    private static final Value.Scalar BEYOND = new Value.Scalar(Double.NaN, null, null, "V", null, Status.UNBOUNDED, "at the rim");
    private static final Output.Check FAILED = new Output.Check("c", false, "", 2, 1, "");

    private static RunOutcome run(CellOutcome.State state, Output... outputs) {
        return new RunOutcome(List.of(new CellOutcome(1, state, List.of(outputs), Set.of())), List.of());
    }

    private static Output.Result result(Value value) {
        return new Output.Result("V", "V", value);
    }

    @Test
    void theHighestExitCodeCounts() {
        CellOutcome.State worked = CellOutcome.State.WORKED;
        Output.Problem problem = new Output.Problem(3, 1, "no quantity 'lamda'.");
        assertEquals(0, run(worked, result(GOOD), result(BEYOND)).exitCode());
        assertEquals(1, run(worked, result(GOOD), FAILED).exitCode());
        assertEquals(3, run(worked, result(DOUBTFUL), FAILED).exitCode());
        assertEquals(3, run(worked, result(new Value.Triple(GOOD, GOOD, DOUBTFUL, null))).exitCode());
        assertEquals(4, run(worked, result(DOUBTFUL), problem).exitCode());
        assertEquals(4, run(CellOutcome.State.STOPPED).exitCode());
        assertEquals(4, run(CellOutcome.State.NOT_REACHED).exitCode());
        assertEquals(0, run(CellOutcome.State.REUSED).exitCode());
        assertEquals(4, RunOutcome.refused(problem).exitCode());
        assertEquals(1, run(worked, new Output.Assessment("a", false, BEYOND, null, GOOD, 3, Double.NaN, "s", "c")).exitCode());
        assertEquals(3, run(worked, new Output.Assessment("a", false, GOOD, DOUBTFUL, GOOD, 3, 1, "s", "c")).exitCode());
    }

    @Test
    void statusAndReasonOfAVectorAreThoseOfItsWorstPart() {
        Value.Triple vector = new Value.Triple(GOOD, DOUBTFUL, BEYOND, null);
        assertEquals(Status.UNBOUNDED, vector.status());
        assertEquals("at the rim", vector.reason());
        Value.Sides sides = new Value.Sides("+z", new Value.Triple(GOOD, GOOD, GOOD, null), "-z", new Value.Triple(DOUBTFUL, GOOD, GOOD, null));
        assertEquals(Status.NOT_CONVERGED, sides.status());
        assertEquals("too many", sides.reason());
    }

    @Test
    void aNumberCannotContradictItsStatus() {
        assertThrows(IllegalArgumentException.class, () -> Value.Scalar.of(Double.NaN, 0.0, "V"));
        assertThrows(IllegalArgumentException.class, () -> Value.Scalar.of(1, -1.0, "V"));
        assertThrows(IllegalArgumentException.class, () -> Value.Scalar.of(1, Double.NaN, "V"));
        assertThrows(IllegalArgumentException.class, () -> new Value.Scalar(1, null, null, "V", null, Status.UNBOUNDED, ""));
        assertThrows(IllegalArgumentException.class, () -> new Value.Triple(GOOD, GOOD, Value.Scalar.of(1, 0.0, "V/m"), null));
        assertThrows(IllegalArgumentException.class, () -> new Output.Assessment("a", true, GOOD, null, GOOD, 1, 1, "", "c"));
        assertThrows(IllegalArgumentException.class, () -> new Output.Table("t", List.of("a", "b"), List.of(List.of("1")), List.of()));
    }

    @Test
    void allOfItCrossesThePipe() throws Exception {
        RunOutcome run = run(CellOutcome.State.WORKED, result(new Value.Triple(GOOD, GOOD, GOOD, new Point(0, 0, 4))), FAILED,
                new Output.Given("R_s", "R_{s}", GOOD, "1 V", "d", "s"), new Output.Typeset("f", "f = 1", "f = 1", "", ""),
                new Output.Plot("p", new Axis("z", "m"), new Axis("E", "kV/m"),
                        List.of(new Series("on axis", new double[] {1, 2}, new double[] {3, Double.NaN}, null)), List.of("one gap")),
                new Output.Table("t", List.of("a"), List.of(List.of("1")), List.of()), new Output.Caution("c", ""), new Output.Assumption("free space"),
                new Output.Printed("x"), new Output.Problem(1, 1, "m"), new Output.Note("n"),
                new Output.Assessment("a", true, GOOD, null, GOOD, 1, 1, "s", "c"));
        ByteArrayOutputStream bytes = new ByteArrayOutputStream();
        try (ObjectOutputStream out = new ObjectOutputStream(bytes)) {
            out.writeObject(run);
        }
        try (ObjectInputStream in = new ObjectInputStream(new ByteArrayInputStream(bytes.toByteArray()))) {
            assertEquals(run, in.readObject());
        }
    }

    @Test
    void aSeriesCannotBeChangedFromOutside() {
        double[] x = {1, 2};
        Series series = new Series("s", x, x, null);
        x[0] = 7;
        series.y()[1] = 7;
        assertArrayEquals(new double[] {1, 2}, series.x());
        assertArrayEquals(new double[] {1, 2}, series.y());
    }

    @Test
    void headingsAreQuantityOverUnit() {
        assertEquals("rho_0 / (uC/m^3)", Axis.heading("rho_0", "uC/m^3"));
        assertEquals("z / m", new Axis("z", "m").heading());
        assertEquals("n", new Axis("n", null).heading());
    }

    @Test
    void aProblemSaysWhere() {
        assertEquals("cell 7, line 41: no.", new Output.Problem(41, 7, "no.").text());
        assertEquals("line 1: no.", new Output.Problem(1, 0, "no.").text());
        assertEquals("no.", new Output.Problem(0, 0, "no.").text());
    }
}

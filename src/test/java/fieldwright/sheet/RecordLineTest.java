package fieldwright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.Status;
import fieldwright.output.Value;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class RecordLineTest {

    private static String line(String name, Value value) {
        return RecordLine.of(new Output.Result(name, "Q_{x}", value, "described", "")).text();
    }

    private static Value.Scalar field(double value) {
        return Value.Scalar.of(value, 2e-5, "V/m");
    }

    @Test
    void aNumber() {
        assertEquals(":rec Q = 5.98511e-5 C | num 3e-20 | tol 1.7e-5 | shown uC = 1e-6",
                line("Q", new Value.Scalar(5.98511e-5, 3e-20, 1.7e-5, "C", new Display("uC", 1e-6), Status.CONVERGED, "")));
        assertEquals(":rec k = 0.6", line("k", Value.Scalar.of(0.6, null, "")));
    }

    @Test
    void aVectorAtItsPlace() {
        assertEquals(":rec E = [0, -1250.5, 276969] V/m | at [0, 0, 4] | num [2e-5, 2e-5, 2e-5]",
                line("E", new Value.Triple(field(0), field(-1250.5), field(276969), new Point(0, 0, 4))));
        assertEquals(":rec p = [1, 2, 3] C*m | num [-, 1e-9, -]", line("p", new Value.Triple(Value.Scalar.of(1, null, "C*m"),
                Value.Scalar.of(2, 1e-9, "C*m"), Value.Scalar.of(3, null, "C*m"), null)));
    }

    @Test
    void aOneSidedPair() {
        Value.Triple up = new Value.Triple(field(0), field(0), field(3), new Point(0, 0, 0));
        Value.Triple down = new Value.Triple(field(0), field(0), field(-3), new Point(0, 0, 0));
        assertEquals(":rec E_s = +z [0, 0, 3] V/m, -z [0, 0, -3] V/m | at [0, 0, 0] | num [2e-5, 2e-5, 2e-5], [2e-5, 2e-5, 2e-5]",
                line("E_s", new Value.Sides("+z", up, "-z", down)));
    }

    @Test
    void whatIsNoNumber() {
        assertEquals(":rec V = 12.5? V | num 0.3 | because \"2000 evaluations\"",
                line("V", new Value.Scalar(12.5, 0.3, null, "V", null, Status.NOT_CONVERGED, "2000 evaluations")));
        assertEquals(":rec V = ? V | because \"stopped\"",
                line("V", new Value.Scalar(Double.NaN, null, null, "V", null, Status.NOT_CONVERGED, "stopped")));
        Value.Scalar beyond = new Value.Scalar(Double.POSITIVE_INFINITY, null, null, "V/m", null, Status.UNBOUNDED, "on the rim");
        assertEquals(":rec E = +unbounded V/m | because \"on the rim\"", line("E", beyond));
        assertEquals(":rec E = [0, 0, +unbounded] V/m | num [2e-5, 2e-5, -] | because [\"\", \"\", \"on the rim\"]",
                line("E", new Value.Triple(field(0), field(0), beyond, null)));
    }

    @Test
    void checksAndAssessments() {
        assertEquals(":rec check \"flux closes\" passed | measured 2e-10 | allowed 1e-9 | detail \"agrees to 2e-10\"",
                RecordLine.of(new Output.Check("flux closes", true, "agrees to 2e-10", 2e-10, 1e-9, "")).text());
        assertEquals(":rec check \"no number\" failed | measured - V/m | allowed 1 V/m",
                RecordLine.of(new Output.Check("no number", false, "", Double.NaN, 1, "V/m")).text());
        assertEquals(":rec assess \"breakdown\" passed | value 276969 V/m (num 2e-5, tol 80000) | worst 350000 V/m | threshold 3e6 V/m"
                        .replace("3e6", "3000000") + " | margin 8.5714 of 3 | source \"handbook\" | caution \"plain gap only\"",
                RecordLine.of(new Output.Assessment("breakdown", true, field(276969).withTolerance(8e4), Value.Scalar.of(3.5e5, null, "V/m"),
                        Value.Scalar.of(3e6, null, "V/m"), 3, 8.5714, "handbook", "plain gap only")).text());
    }

    @Test
    void onlyNameAndValueOfAResultAreStored() {
        RecordLine read = RecordLine.read(line("Q", field(1)));
        assertEquals(new Output.Result("Q", "", field(1)), read.content());
        assertTrue(read.matches(new Output.Result("Q", "Q", field(2))));
        assertFalse(read.matches(new Output.Result("P", "Q", field(1))));
        assertFalse(RecordLine.read(":rec check \"Q\" passed | measured 1 | allowed 2").matches(new Output.Result("Q", "", field(1))));
    }

    @Test
    void linesWrittenByHandInTheDesignersOwnWayAreRead() {
        RecordLine read = RecordLine.read(":rec E_roof = 2.76969e+05 V/m | num 2e-05 | tol 8.0e+04");
        assertEquals(field(276969).withTolerance(8e4), read.value());
    }

    @ParameterizedTest
    @ValueSource(strings = {":rec", ":rec Q", ":rec Q = ", ":rec Q = much C", ":rec Q = 1 C | nun 3", ":rec Q = 1 C | num -3", ":rec Q = 1 C | num 1 | num 1",
        ":rec Q = 1e999 C", ":rec Q = [1, 2] C", ":rec Q = [1, 2, 3 C", ":rec E = +z [1, 2, 3] V/m", ":rec E = +z [1, 2, 3] V/m, +z [1, 2, 3] V/m",
        ":rec check \"a\" maybe | measured 1 | allowed 2", ":rec check \"a passed", ":rec Q = 1 C because", ":rec Q = 1 C num 3", ":rec Q = 1 C | shown mC = 0",
        ":rec assess \"a\" passed | value 1 V | threshold 2 V | margin 2 of 1 | source \"\" | caution \"c\"", ":rec Q = 1 C | because \"\\q\""})
    void whatCannotBeReadSaysWhy(String text) {
        RecordLine read = RecordLine.read(text);
        assertFalse(read.isReadable());
        assertFalse(read.trouble().isBlank());
        assertEquals(text, read.text());
    }

    @Test
    void otherOutputsAreNotStored() {
        assertThrows(IllegalArgumentException.class, () -> RecordLine.of(new Output.Printed("x")));
    }
}

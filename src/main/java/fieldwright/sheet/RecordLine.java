package fieldwright.sheet;

import fieldwright.output.Output;
import fieldwright.output.Value;

/**
 * A line {@code :rec}: a result, a check or an assessment, exactly.
 * <pre>
 * :rec Q = 5.98511e-5 C | num 3e-20 | tol 1.7e-5 | shown uC = 1e-6
 * :rec E = [0, 0, 276969] V/m | at [0, 0, 4] | num [1e-12, 1e-12, 2e-5]
 * :rec E_s = +z [0, 0, 3] V/m, -z [0, 0, -3] V/m | num …           one-sided pair
 * :rec V = 12.5? V | num 0.3 | because "2000000 evaluations …"      not converged; a bare ? where there is no number
 * :rec E_w = unbounded V/m | because "on the line charge"           also +unbounded, -unbounded
 * :rec check "flux closes" passed | measured 2e-10 | allowed 1e-9 | detail "agrees to 2e-10"
 * :rec assess "breakdown" failed | value 2.8e6 V/m (num 20, tol 3e5) | worst 3.1e6 V/m | threshold 3e6 V/m
 *      | margin 0.97 of 1 | source "…" | caution "…"                (on one line)
 * </pre>
 * An absent {@code num} was not carried, an absent {@code tol} not established. Numbers are in SI.
 *
 * @param text    the whole line as it stands in the file
 * @param content an {@link Output.Result} (name and value only), {@link Output.Check} or {@link Output.Assessment};
 *                null when the line cannot be read
 * @param trouble why it cannot be read; empty when it can
 */
public record RecordLine(String text, Output content, String trouble) {

    /** The line that stores this. */
    static RecordLine of(Output output) {
        return new RecordLine(RecordWriter.write(output), stored(output), "");
    }

    /** Reads a line; never fails, an unreadable line says so. */
    static RecordLine read(String text) {
        try {
            return new RecordLine(text, RecordReader.read(text), "");
        } catch (RecordReader.Unreadable | IllegalArgumentException e) {
            return new RecordLine(text, null, e.getMessage());
        }
    }

    /** True for what a record holds: results, checks, assessments. */
    public static boolean isStored(Output output) {
        return output instanceof Output.Result || output instanceof Output.Check || output instanceof Output.Assessment;
    }

    public boolean isReadable() {
        return content != null;
    }

    /** True when both store the very same. */
    boolean sameContent(RecordLine other) {
        return isReadable() && content.equals(other.content);
    }

    /** True when a run's output is matched with this line: results by name, checks and assessments by label. */
    public boolean matches(Output output) {
        return isReadable() && content.getClass() == output.getClass() && key(content).equals(key(output));
    }

    /** The value of a result line; null for a check, an assessment or an unreadable line. */
    public Value value() {
        return content instanceof Output.Result result ? result.value() : null;
    }

    private static String key(Output output) {
        if (output instanceof Output.Result result) {
            return result.name();
        } else if (output instanceof Output.Check check) {
            return check.label();
        } else if (output instanceof Output.Assessment assessment) {
            return assessment.label();
        }
        return "";
    }

    /** What of an output is stored: of a result only name and value. */
    private static Output stored(Output output) {
        return output instanceof Output.Result result ? new Output.Result(result.name(), "", result.value()) : output;
    }
}

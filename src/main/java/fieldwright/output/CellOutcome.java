package fieldwright.output;

import java.io.Serializable;
import java.util.List;
import java.util.Objects;
import java.util.Set;

/**
 * What one cell gave in a run.
 *
 * @param cell    its number on the sheet, 1-based
 * @param outputs in the order they were shown
 * @param reads   names of the sheet it really read
 */
public record CellOutcome(int cell, State state, List<Output> outputs, Set<String> reads) implements Serializable {

    /** How the cell ended. */
    public enum State {
        /** Worked now. */
        WORKED,
        /** Nothing it depends on has changed: what it gave before stands. */
        REUSED,
        /** The author's error; the problem is among the outputs. */
        FAILED,
        /** A stop was asked while it was worked. */
        STOPPED,
        /** The run ended above it. */
        NOT_REACHED
    }

    public CellOutcome {
        Objects.requireNonNull(state, "state");
        outputs = List.copyOf(outputs);
        reads = Set.copyOf(reads);
    }

    /** The outputs of one type, in order. */
    public <T extends Output> List<T> all(Class<T> type) {
        return outputs.stream().filter(type::isInstance).map(type::cast).toList();
    }

    /** True when the cell was worked to its end. */
    public boolean isComplete() {
        return state == State.WORKED || state == State.REUSED;
    }
}

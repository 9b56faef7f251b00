package fieldwright.session;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.sheet.Cell;
import java.util.List;
import java.util.Map;

/**
 * What one working of a cell took and gave; a cell of the same text that would take the same gives the same.
 *
 * @param code   the compiled pieces of a working cell; null for other kinds
 * @param spread tolerances of the inputs of an input cell; nothing for other kinds
 * @param writes the names it writes
 */
record CellRun(Cell.Kind kind, String source, WorkingCode code, InputSpread spread, Reads reads, Map<String, SheetName> writes,
               List<Output> outputs, CellOutcome.State state) {

    boolean isComplete() {
        return state == CellOutcome.State.WORKED;
    }

    /** True when nothing it depends on has changed and nothing above writes one of its names. */
    boolean standsIn(NameTable table) {
        return isComplete() && reads.meanSameIn(table) && writes.keySet().stream().allMatch(name -> table.get(name) == null);
    }

    CellOutcome outcome(int cell, CellOutcome.State as) {
        return new CellOutcome(cell, as, outputs, reads.found());
    }
}

package fieldwright.output;

import java.io.Serializable;
import java.util.List;
import java.util.stream.Stream;

/**
 * One run of a sheet.
 *
 * @param cells         one per cell of the sheet, in order; empty when the text is not a sheet
 * @param sheetProblems errors outside any cell: the header, the form
 */
public record RunOutcome(List<CellOutcome> cells, List<Output.Problem> sheetProblems) implements Serializable {

    /** Exit codes of the commands; the highest that applies counts. */
    public static final int ALL_WELL = 0, JUDGED_BAD = 1, RECORD_DIFFERS = 2, NOT_CONVERGED = 3, SHEET_ERROR = 4, WRONG_USE = 64;

    public RunOutcome {
        cells = List.copyOf(cells);
        sheetProblems = List.copyOf(sheetProblems);
    }

    /** Nothing was run, for this reason. */
    public static RunOutcome refused(Output.Problem problem) {
        return new RunOutcome(List.of(), List.of(problem));
    }

    /** The outputs of one type in all cells, in order of the sheet. */
    public <T extends Output> List<T> all(Class<T> type) {
        return cells.stream().flatMap(cell -> cell.all(type).stream()).toList();
    }

    /** All errors: of the sheet as a whole, then cell by cell. */
    public List<Output.Problem> problems() {
        return Stream.concat(sheetProblems.stream(), all(Output.Problem.class).stream()).toList();
    }

    /** True when there is an error or a cell was not worked to its end. */
    public boolean hasError() {
        return !problems().isEmpty() || !cells.stream().allMatch(CellOutcome::isComplete);
    }

    /** True when the run was stopped by hand. */
    public boolean isStopped() {
        return cells.stream().anyMatch(cell -> cell.state() == CellOutcome.State.STOPPED);
    }

    /** The highest exit code that applies to this run: 4 error, 3 not converged, 1 check or assessment failed, 0 all well. */
    public int exitCode() {
        if (hasError()) {
            return SHEET_ERROR;
        }
        if (statuses().anyMatch(status -> status == Status.NOT_CONVERGED)) {
            return NOT_CONVERGED;
        }
        boolean judgedBad = all(Output.Check.class).stream().anyMatch(check -> !check.passed())
                || all(Output.Assessment.class).stream().anyMatch(assessment -> !assessment.passed());
        return judgedBad ? JUDGED_BAD : ALL_WELL;
    }

    private Stream<Status> statuses() {
        return Stream.concat(all(Output.Result.class).stream().map(result -> result.value().status()),
                all(Output.Assessment.class).stream().map(Output.Assessment::status));
    }
}

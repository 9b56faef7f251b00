package fieldwright.session;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Consumer;

/** The outcome of a run while it is put together: cells as worked, then notes, tolerances and worst cases filled in. */
final class Outcomes {
    private final List<Cell> cells;
    private final NameTable names;
    private final List<CellOutcome> outcomes = new ArrayList<>();
    private final List<Output.Problem> problems;

    Outcomes(List<Cell> cells, Pass pass, List<Output.Problem> problems) {
        this.cells = cells;
        this.names = pass.names();
        this.problems = new ArrayList<>(problems);
        Map<String, Integer> labels = new HashMap<>();
        for (int number = 1; number <= cells.size(); number++) {
            if (number > pass.runs().size()) {
                outcomes.add(new CellOutcome(number, CellOutcome.State.NOT_REACHED, List.of(), Set.of()));
            } else {
                CellRun run = pass.runs().get(number - 1);
                outcomes.add(withoutDoubles(run.outcome(number, pass.isReused(number) ? CellOutcome.State.REUSED : run.state()), labels));
            }
        }
    }

    /** Checks and assessments are known by their labels; one that stands twice would be taken for the other. */
    private CellOutcome withoutDoubles(CellOutcome outcome, Map<String, Integer> labels) {
        List<Output> outputs = new ArrayList<>(outcome.outputs());
        CellOutcome.State state = outcome.state();
        for (Output output : outcome.outputs()) {
            String label = output instanceof Output.Check check ? "check '" + check.label() + "'"
                    : output instanceof Output.Assessment assessment ? "assessment '" + assessment.label() + "'" : null;
            Integer first = label == null ? null : labels.putIfAbsent(label, outcome.cell());
            if (first != null) {
                outputs.add(new Output.Problem(cells.get(outcome.cell() - 1).headLine(), outcome.cell(),
                        label + " stands in cell " + first + " and again in cell " + outcome.cell() + ". Give one of them another label."));
                state = CellOutcome.State.FAILED;
            }
        }
        return new CellOutcome(outcome.cell(), state, outputs, outcome.reads());
    }

    void addProblem(Output.Problem problem) {
        problems.add(problem);
    }

    /** Puts the results as they now stand into the notes that quote them, and tells of each note. */
    void resolveNotes(Consumer<Progress> listener) {
        Map<String, Output.Result> results = new HashMap<>();
        outcomes.forEach(outcome -> outcome.all(Output.Result.class).forEach(result -> results.put(result.name(), result)));
        for (int i = 0; i < outcomes.size(); i++) {
            if (cells.get(i).kind() == Cell.Kind.NOTE && outcomes.get(i).state() != CellOutcome.State.NOT_REACHED) {
                replace(i, new NoteText(cells.get(i), i + 1, results, names).outcome(), listener);
            }
        }
    }

    /** Fills in tolerances and worst cases, and tells of each cell that has any. */
    void fill(Tolerances tolerances, Consumer<Progress> listener) {
        for (int i = 0; i < outcomes.size(); i++) {
            CellOutcome before = outcomes.get(i);
            List<Output> filled = before.outputs().stream().map(tolerances::fill).toList();
            replace(i, new CellOutcome(before.cell(), before.state(), filled, before.reads()), listener);
        }
    }

    private void replace(int index, CellOutcome outcome, Consumer<Progress> listener) {
        if (!outcome.equals(outcomes.get(index))) {
            outcomes.set(index, outcome);
            listener.accept(new Progress.Finished(outcome));
        }
    }

    RunOutcome finished() {
        return new RunOutcome(outcomes, problems);
    }
}

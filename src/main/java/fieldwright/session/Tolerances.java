package fieldwright.session;

import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.study.Combined;
import fieldwright.study.Replay;
import fieldwright.study.ToleranceStudy;
import fieldwright.words.Outputs;
import java.util.List;

/** What the inputs' tolerances do to the results of one run. Works when it is first asked, and remembers. */
final class Tolerances {
    private final List<CellRun> runs;
    private final InputSpread spread;
    private final ToleranceStudy study;

    Tolerances(List<CellRun> runs, Replay replay) {
        this.runs = runs;
        this.spread = runs.stream().map(CellRun::spread).reduce(InputSpread.NONE, InputSpread::and);
        this.study = new ToleranceStudy(spread.tolerances(), spread.asCorrelations(), replay);
    }

    /** True when these very workings of cells are meant. */
    boolean isOf(List<CellRun> others) {
        boolean same = runs.size() == others.size();
        for (int i = 0; same && i < runs.size(); i++) {
            same = runs.get(i) == others.get(i);
        }
        return same;
    }

    /** False when no input has a tolerance: then there is nothing to say about any result. */
    boolean isNeeded() {
        return !spread.tolerances().isEmpty();
    }

    /** The output with tolerance or worst case, where it has one. */
    Output fill(Output output) {
        if (output instanceof Output.Result result) {
            return result.withValue(withTolerance(result.name(), result.value()));
        }
        if (output instanceof Output.Assessment assessment) {
            return Outputs.withWorstCase(assessment, study.worstCase(assessment.label()));
        }
        return output;
    }

    private Value withTolerance(String name, Value value) {
        List<Combined> each = study.tolerance(name).stream().map(Tolerances::orAbsent).toList();
        int numbers = Outputs.reading(value).values().length;
        return each.size() == numbers ? Outputs.withTolerance(value, each) : value;
    }

    /** A number that does not move with any tolerance is not thereby exact: its inputs just state none. */
    private static Combined orAbsent(Combined combined) {
        boolean unmoved = combined.isEstablished() && combined.expanded() == 0;
        return unmoved ? new Combined(null, "no tolerance reaches it", combined.contributions(), combined.degreesOfFreedom()) : combined;
    }
}

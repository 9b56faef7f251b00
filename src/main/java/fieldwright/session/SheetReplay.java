package fieldwright.session;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.quantity.StoppedException;
import fieldwright.session.snippet.Declaration;
import fieldwright.session.snippet.SnippetCompiler;
import fieldwright.session.snippet.Workspace;
import fieldwright.sheet.Cell;
import fieldwright.study.Assessed;
import fieldwright.study.Reading;
import fieldwright.study.Replay;
import fieldwright.words.Outputs;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * A finished run as a function of its inputs. Cells that read none of the changed inputs keep what the run gave; the
 * others are worked again with the code already compiled, over classes of their own.
 */
final class SheetReplay implements Replay {
    private static final Pass.Listener UNHEARD = new Pass.Listener() {
        @Override
        public void begun(int cell) { }

        @Override
        public void finished(int cell, CellRun run, boolean reused) { }
    };

    private final List<Cell> cells;
    private final Setting setting;
    private final List<CellRun> base;
    private final SnippetCompiler compiler;
    private final AuthorCode authorCode;
    private final Printing printing;
    /** Objects of a class declared on the sheet belong to the classes of the run; they are of no use to the replay's. */
    private final boolean ownTypes;
    private Workspace workspace;
    private boolean fresh = true;

    SheetReplay(List<Cell> cells, Setting setting, List<CellRun> base, SnippetCompiler compiler, AuthorCode authorCode, Printing printing) {
        this.cells = cells;
        this.setting = setting;
        this.base = base;
        this.compiler = compiler;
        this.authorCode = authorCode;
        this.printing = printing;
        this.workspace = new Workspace(compiler);
        this.ownTypes = base.stream().filter(run -> run.code() != null).flatMap(run -> run.code().snippets().stream())
                .anyMatch(snippet -> snippet.declares() instanceof Declaration.Code code && code.isType());
    }

    /** @throws StoppedException when a stop is asked meanwhile */
    @Override
    public Outcome with(Map<String, Double> changed) {
        Set<Integer> forced = new HashSet<>();
        boolean keepWorking = !ownTypes;
        while (true) {
            Pass pass = pass(changed, keepWorking);
            boolean unused = fresh;
            fresh = false;
            try {
                pass.work(forced, unused);
                return read(pass.runs());
            } catch (Again again) {
                if (again.cell() == 0) {
                    workspace = new Workspace(compiler);
                    fresh = true;
                    keepWorking = false;
                } else {
                    forced.add(again.cell());
                }
            }
        }
    }

    private Pass pass(Map<String, Double> changed, boolean keepWorking) {
        Pass.Code compiled = new Pass.Code() {
            @Override
            public WorkingCode of(int cell, Draft draft) {
                return base.get(cell - 1).code();
            }

            @Override
            public String below(int cell, String name) {
                return null;
            }
        };
        return new Pass(cells, setting.replay(changed), workspace, compiled,
                cell -> keepWorking || cells.get(cell - 1).kind() != Cell.Kind.WORKING ? base.get(cell - 1) : null,
                authorCode, printing, UNHEARD);
    }

    private static Outcome read(List<CellRun> runs) {
        Map<String, Reading> results = new HashMap<>();
        Map<String, Assessed> assessed = new HashMap<>();
        for (CellRun run : runs) {
            if (run.state() == CellOutcome.State.STOPPED) {
                throw new StoppedException();
            }
            for (Output output : run.outputs()) {
                if (output instanceof Output.Result result) {
                    results.put(result.name(), Outputs.reading(result.value()));
                } else if (output instanceof Output.Assessment assessment) {
                    assessed.put(assessment.label(), Outputs.assessed(assessment));
                }
            }
        }
        return new Outcome(results, assessed);
    }
}

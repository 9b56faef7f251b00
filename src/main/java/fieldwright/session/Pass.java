package fieldwright.session;

import fieldwright.formula.Integrator;
import fieldwright.integral.NestedIntegrator;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.quantity.Stop;
import fieldwright.session.snippet.CompiledSnippet;
import fieldwright.session.snippet.Declaration;
import fieldwright.session.snippet.Workspace;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Objects;
import java.util.Set;

/**
 * One working of a sheet from top to bottom. A cell that would take what it took in an earlier working is not worked
 * again; what it gave then stands. The outcome is that of a working without any earlier one.
 *
 * <p>Objects that may change (a list, an array, a class with static fields) would break that promise: a cell that changes
 * one must not meet it as an earlier working left it. So when a cell is to be worked that uses such an object, the cell
 * that makes it is worked again too ({@link Again}).
 */
final class Pass {
    private static final Integrator INTEGRATOR = new NestedIntegrator();

    /** Where the code of a working cell comes from. */
    interface Code {
        WorkingCode of(int cell, Draft draft);

        /** Says that a name is declared below that cell; null when it is not. */
        String below(int cell, String name);
    }

    /** What an earlier working has for a cell; null when nothing. */
    interface Earlier {
        CellRun of(int cell);
    }

    /** Told how the pass goes on; cells from 1. */
    interface Listener {
        void begun(int cell);

        /** @param reused true when what it gave before stands */
        void finished(int cell, CellRun run, boolean reused);
    }

    private final List<Cell> cells;
    private final Setting setting;
    private final Workspace workspace;
    private final Code code;
    private final Earlier earlier;
    private final AuthorCode authorCode;
    private final Printing printing;
    private final Listener listener;
    private final NameTable names = new NameTable();
    private final List<CellRun> runs = new ArrayList<>();
    private final Set<Integer> reused = new HashSet<>();

    Pass(List<Cell> cells, Setting setting, Workspace workspace, Code code, Earlier earlier, AuthorCode authorCode, Printing printing,
         Listener listener) {
        this.cells = cells;
        this.setting = setting;
        this.workspace = workspace;
        this.code = code;
        this.earlier = earlier;
        this.authorCode = authorCode;
        this.printing = printing;
        this.listener = listener;
    }

    /**
     * Works the cells; fewer than all when it is stopped. Once.
     *
     * @param forced cells that are worked even if what they gave before would stand
     * @param fresh  true when the workspace has never been used
     */
    void work(Set<Integer> forced, boolean fresh) {
        workspace.clear();
        setting.libraries().forEach(library -> library.names().forEach(names::put));
        for (int number = 1; number <= cells.size(); number++) {
            CellRun run = work(number, forced.contains(number), fresh);
            runs.add(run);
            listener.finished(number, run, reused.contains(number));
            names.touch(run);
            for (SheetName name : run.writes().values()) {
                put(name.inCell(number));
            }
            if (run.state() == CellOutcome.State.STOPPED) {
                break;
            }
        }
    }

    private void put(SheetName name) {
        names.put(name);
        if (name.declares() instanceof Declaration.Variable variable) {
            workspace.set(variable, name.value());
        }
    }

    NameTable names() {
        return names;
    }

    /** What the cells gave, as many as were reached. */
    List<CellRun> runs() {
        return List.copyOf(runs);
    }

    boolean isReused(int number) {
        return reused.contains(number);
    }

    private CellRun work(int number, boolean forced, boolean fresh) {
        Cell cell = cells.get(number - 1);
        Draft draft = new Draft(number, cell, names, INTEGRATOR, name -> code.below(number, name));
        if (Stop.isRequested()) {
            draft.stop();
            return draft.finished();
        }
        listener.begun(number);
        WorkingCode compiled = cell.kind() == Cell.Kind.WORKING ? code.of(number, draft) : null;
        draft.setCode(compiled);
        CellRun before = earlier.of(number);
        if (before != null && !forced && (stands(before, compiled) || setting.isReplay() && isForLooks(before))) {
            reused.add(number);
            return before;
        }
        switch (cell.kind()) {
            case NOTE -> { }
            case INPUT -> new InputCell(draft, setting).work();
            case DERIVE -> new DeriveCell(draft, setting.mode()).work();
            case WORKING -> {
                requireUntouched(compiled, fresh);
                new WorkingCell(draft, compiled, workspace, setting.accuracy(), setting.mode(), authorCode, printing).work();
            }
        }
        return draft.finished();
    }

    private boolean stands(CellRun before, WorkingCode compiled) {
        boolean untouched = before.kind() != Cell.Kind.INPUT
                || before.writes().keySet().stream().noneMatch(setting.changed()::containsKey);
        return untouched && before.standsIn(names) && Objects.equals(before.code(), compiled);
    }

    /** A replay is asked for results and assessments: a cell that gives none and can change nothing is left as it was. */
    private boolean isForLooks(CellRun before) {
        boolean givesNumbers = before.outputs().stream().anyMatch(o -> o instanceof Output.Result || o instanceof Output.Assessment);
        return before.kind() == Cell.Kind.WORKING && before.isComplete() && before.writes().isEmpty() && !givesNumbers
                && before.code().snippets().stream().noneMatch(this::mayChangeSomething);
    }

    private boolean mayChangeSomething(CompiledSnippet snippet) {
        return keepsState(snippet) || JavaReads.of(snippet).stream().map(names::get)
                .anyMatch(used -> used != null && !Constancy.isConstant(used.value()));
    }

    private void requireUntouched(WorkingCode compiled, boolean fresh) {
        for (CompiledSnippet snippet : compiled.snippets()) {
            if (!fresh && keepsState(snippet)) {
                throw new Again(0);
            }
            for (String name : JavaReads.of(snippet)) {
                SheetName used = names.get(name);
                if (used != null && reused.contains(used.cell()) && !Constancy.isConstant(used.value())) {
                    throw new Again(used.cell());
                }
            }
        }
    }

    private boolean keepsState(CompiledSnippet snippet) {
        return workspace.keepsState(snippet) || snippet.environment().values().stream()
                .anyMatch(used -> used instanceof Declaration.Code other && keepsState(other.snippet()));
    }
}

package fieldwright.session;

import fieldwright.field.Accuracy;
import fieldwright.formula.Formula;
import fieldwright.formula.Scope;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Stop;
import fieldwright.quantity.Vector;
import fieldwright.session.snippet.CompiledSnippet;
import fieldwright.session.snippet.Declaration;
import fieldwright.session.snippet.Workspace;
import fieldwright.words.Desk;
import fieldwright.words.Outputs;
import java.util.Arrays;
import java.util.HashSet;
import java.util.Map;
import java.util.Set;

/** Runs the compiled pieces of one working cell and makes names and results of what they leave. */
final class WorkingCell extends Desk {
    private final Draft draft;
    private final WorkingCode code;
    private final Workspace workspace;
    private final Accuracy accuracy;
    private final Mode mode;
    private final AuthorCode authorCode;
    private final Printing printing;
    /** Names given to {@link #result}: their result is shown as said there. */
    private final Set<String> shown = new HashSet<>();

    WorkingCell(Draft draft, WorkingCode code, Workspace workspace, Accuracy accuracy, Mode mode, AuthorCode authorCode, Printing printing) {
        this.draft = draft;
        this.code = code;
        this.workspace = workspace;
        this.accuracy = accuracy;
        this.mode = mode;
        this.authorCode = authorCode;
        this.printing = printing;
    }

    void work() {
        noteJavaReads();
        for (int i = 0; i < code.steps().size(); i++) {
            if (!run(code.steps().get(i))) {
                code.steps().subList(i, code.steps().size()).forEach(this::lose);
                code.lost().forEach(name -> draft.writeFailed(name, "failed"));
                return;
            }
        }
        code.faults().forEach(fault -> draft.fail(draft.cell().lineOf(fault.line()), fault.message()));
        code.lost().forEach(name -> draft.writeFailed(name, "failed"));
    }

    private void lose(WorkingCode.Step step) {
        if (step.snippet().declares() instanceof Declaration.Variable variable) {
            draft.writeFailed(variable.name(), "failed");
        }
    }

    /** Names that stand in the Java text count as read, also when a branch that uses them is not taken. */
    private void noteJavaReads() {
        code.snippets().forEach(snippet -> JavaReads.of(snippet).forEach(name -> {
            if (!isDeclaredHere(name)) {
                draft.read(name);
            }
        }));
    }

    private boolean isDeclaredHere(String name) {
        return code.snippets().stream().anyMatch(s -> s.declares() != null && s.declares().name().equals(name));
    }

    /** False when it failed or was stopped. */
    private boolean run(WorkingCode.Step step) {
        CompiledSnippet snippet = step.snippet();
        if (!snippet.runs()) {
            declare(snippet);
            return true;
        }
        printing.begin();
        try {
            Map<Declaration.Variable, Object> changed = Desk.at(this, () -> authorCode.run(() -> runChecked(snippet)));
            draft.printed(printing.end());
            for (Map.Entry<Declaration.Variable, Object> change : changed.entrySet()) {
                take(change.getKey(), change.getValue(), snippet);
            }
            Stop.check();   // the author's code may have taken the stop for its own affair
            return true;
        } catch (ThreadDeath e) {
            throw e;
        } catch (Throwable e) {
            draft.printed(printing.end());
            draft.fail(draft.cell().lineOf(step.lineOf(e)), e);
            return false;
        }
    }

    /** {@link Workspace#run} throws whatever the author's code throws; errors and exceptions pass, nothing else exists. */
    private Map<Declaration.Variable, Object> runChecked(CompiledSnippet snippet) throws Exception {
        try {
            return workspace.run(snippet);
        } catch (Exception | Error e) {
            throw e;
        } catch (Throwable e) {
            throw new IllegalStateException(e);
        }
    }

    private void declare(CompiledSnippet snippet) {
        if (snippet.declares() != null) {
            draft.write(new SheetName(snippet.declares().name(), draft.number(), snippet, null, snippet.declares(), null));
        }
    }

    /** A variable has a new value. */
    private void take(Declaration.Variable variable, Object value, CompiledSnippet by) {
        if (!variable.equals(by.declares()) && draft.own(variable.name()) == null) {
            SheetName foreign = draft.above().get(variable.name());
            workspace.set(variable, foreign.value());
            throw new AuthorException("'" + variable.name() + "' is written by cell " + foreign.cell() + " and assigned in cell "
                    + draft.number() + ": a name is written by the one cell that declares it. Give the new value a name of its own.");
        }
        if (shown.contains(variable.name()) && !isSameNumber(draft.own(variable.name()).value(), value)) {
            throw new AuthorException("'" + variable.name() + "' changes after its result was given. Give the result last.");
        }
        draft.write(new SheetName(variable.name(), draft.number(), value, value == null ? null : SheetTypes.binding(value), variable, null));
        if (SheetTypes.isNamed(variable.type()) && value != null && !shown.contains(variable.name())) {
            showResult(variable.name(), value);
        }
    }

    private void showResult(String name, Object value) {
        if (mode == Mode.REPLAY && value instanceof Formula) {
            return;
        }
        draft.showResult(name, Results.output(name, value));
    }

    // -- what the words of this cell see --

    @Override
    public Scope scope() {
        return draft;
    }

    @Override
    public Accuracy accuracy() {
        return accuracy;
    }

    @Override
    public Mode mode() {
        return mode;
    }

    @Override
    public void show(Output output) {
        draft.show(output);
    }

    @Override
    public void result(String name, Object value) {
        if (!(value instanceof Amount || value instanceof Vector)) {
            throw new AuthorException("result '" + name + "': give an Amount or a Vector.");
        }
        SheetName own = draft.own(name);
        if (own == null) {
            draft.requireFree(name, true);
        } else if (!(own.declares() instanceof Declaration.Variable) || shown.contains(name)) {
            throw new AuthorException("result '" + name + "' is given twice in this cell. Choose another name for one of them.");
        } else if (!isSameNumber(own.value(), value)) {
            throw new AuthorException("result '" + name + "' is also a variable of this cell, with another value. Choose another name for one of them.");
        }
        shown.add(name);
        if (own == null) {
            draft.write(new SheetName(name, draft.number(), value, SheetTypes.binding(value), SheetTypes.variable(name, value), null));
        }
        draft.showResult(name, new Output.Result(name, Results.latex(name), Outputs.value(value)));
    }

    private static boolean isSameNumber(Object a, Object b) {
        boolean comparable = a instanceof Amount && b instanceof Amount || a instanceof Vector && b instanceof Vector;
        return comparable && Arrays.equals(Outputs.reading(Outputs.value(a)).values(), Outputs.reading(Outputs.value(b)).values());
    }
}

package fieldwright.session;

import fieldwright.formula.DeriveDefinition;
import fieldwright.formula.Formula;
import fieldwright.formula.Names;
import fieldwright.formula.Parameter;
import fieldwright.judge.Check;
import fieldwright.output.Output;
import fieldwright.quantity.Amount;
import fieldwright.sheet.DeriveEntry;
import fieldwright.sheet.DeriveLine;
import fieldwright.sheet.MalformedLine;
import fieldwright.words.Desk;
import fieldwright.words.Outputs;
import java.util.List;
import java.util.stream.Collectors;

/** Works the formulas of one derive cell, line by line; a line that fails does not keep the others from being worked. */
final class DeriveCell {
    /** Two ways of writing one number agree when they differ by no more than this part of it, numerical errors included. */
    private static final Amount SAME = Amount.of(1e-9);

    private final Draft draft;
    private final Desk.Mode mode;

    DeriveCell(Draft draft, Desk.Mode mode) {
        this.draft = draft;
        this.mode = mode;
    }

    void work() {
        for (DeriveLine line : draft.cell().derives()) {
            if (line instanceof DeriveEntry entry) {
                attempt(entry.line(), Names.fold(entry.name()), () -> work(entry));
            } else if (line instanceof MalformedLine malformed) {
                draft.fail(malformed.line(), malformed.message());
            }
            if (draft.isStopped()) {
                return;
            }
        }
    }

    private void attempt(int line, String name, Runnable work) {
        try {
            work.run();
        } catch (RuntimeException | StackOverflowError e) {
            draft.fail(line, e);
            draft.writeFailed(name, "failed");
        }
    }

    private void work(DeriveEntry entry) {
        draft.requireNew(Names.fold(entry.name()), true);
        List<Parameter> parameters = entry.parameters().stream()
                .map(parameter -> DeriveDefinition.parameter(parameter.name(), parameter.unit())).toList();
        DeriveDefinition definition = DeriveDefinition.parse(entry.name(), parameters, entry.formula(), entry.unit(), entry.condition());
        DeriveDefinition.Bound bound = definition.bind(draft);
        String name = definition.name();
        Object value = bound.isNumber() ? bound.amount() : bound.asFormula();
        draft.write(new SheetName(name, draft.number(), value, value instanceof Amount ? SheetTypes.binding(value) : bound.binding(),
                SheetTypes.variable(name, value), null));
        if (mode == Desk.Mode.WORKING) {
            draft.show(new Output.Typeset(name, definition.latex(), plain(definition, entry), entry.description(), entry.source()));
        }
        if (value instanceof Amount amount) {
            draft.showResult(name, new Output.Result(name, Results.latex(name), Outputs.value(amount), entry.description(), entry.source()));
        }
        if (mode == Desk.Mode.WORKING) {
            steps(entry, bound, value);
        }
    }

    private static String plain(DeriveDefinition definition, DeriveEntry entry) {
        String arguments = definition.parameters().isEmpty() ? ""
                : definition.parameters().stream().map(Parameter::name).collect(Collectors.joining(", ", "(", ")"));
        return definition.name() + arguments + " = " + entry.formula() + forCondition(entry.condition());
    }

    private static String forCondition(String condition) {
        return condition.isEmpty() ? "" : " for " + condition;
    }

    /**
     * The lines that continue an entry. A number written in another way is worked and compared; what would need a proof
     * over coordinates or a limit is typeset and said to be unchecked.
     */
    private void steps(DeriveEntry entry, DeriveDefinition.Bound bound, Object value) {
        int index = 0;
        for (DeriveEntry.Continuation line : entry.continuations()) {
            int number = ++index;
            attempt(line.line(), bound.definition().name(), () -> step(line, number, bound, value));
        }
    }

    private void step(DeriveEntry.Continuation line, int number, DeriveDefinition.Bound bound, Object value) {
        boolean limiting = line.relation() == DeriveEntry.Relation.LIMIT;
        DeriveDefinition.Step step = DeriveDefinition.Step.parse(limiting, line.formula(), line.condition());
        DeriveDefinition.Step inScope = bound.bindStep(step, draft);
        Formula formula = inScope.formula();
        boolean checkable = !limiting && value instanceof Amount && formula.variables().isEmpty();
        draft.show(new Output.Typeset("", step.latex(), (limiting ? "~ " : "= ") + line.formula() + forCondition(line.condition()),
                (line.description() + (checkable ? "" : " (not checked)")).strip(), line.source()));
        if (checkable) {
            draft.show(Outputs.check(Check.of(bound.definition().name() + ", step " + number, formula.amount(), (Amount) value, SAME)));
        }
    }
}

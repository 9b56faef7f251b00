package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.formula.Correlation;
import fieldwright.formula.InputDefinition;
import fieldwright.formula.Names;
import fieldwright.formula.Tolerance;
import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.UnknownNameException;
import fieldwright.session.snippet.Declaration;
import fieldwright.sheet.CorrelationEntry;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.InputLine;
import fieldwright.sheet.MalformedLine;
import fieldwright.study.Combined;
import fieldwright.study.InputTolerance;
import fieldwright.words.Outputs;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** Reads the lines of one input cell. A line that fails does not keep the others from being read. */
final class InputCell {
    private static final String AMOUNTS = "java.util.List<fieldwright.quantity.Amount>";

    private final Draft draft;
    private final Setting setting;
    private final List<InputTolerance> tolerances = new ArrayList<>();
    private final List<Correlation> correlations = new ArrayList<>();

    InputCell(Draft draft, Setting setting) {
        this.draft = draft;
        this.setting = setting;
    }

    void work() {
        for (InputLine line : draft.cell().inputs()) {
            try {
                work(line);
            } catch (RuntimeException e) {
                draft.fail(line.line(), e);
                if (line instanceof InputEntry entry) {
                    draft.writeFailed(Names.fold(entry.name()), "failed");
                }
            }
        }
        draft.setSpread(new InputSpread(tolerances, correlations));
    }

    private void work(InputLine line) {
        if (line instanceof InputEntry entry) {
            work(entry, Names.fold(entry.name()));
        } else if (line instanceof CorrelationEntry correlation) {
            work(correlation);
        } else {
            throw new AuthorException(((MalformedLine) line).message());
        }
    }

    private void work(InputEntry entry, String name) {
        draft.requireNew(name, true);
        InputDefinition definition = InputDefinition.parse(entry.definition());
        Value.Scalar shown = null;
        if (definition instanceof InputDefinition.Quantity quantity) {
            Double moved = setting.changed().get(name);
            Amount value = moved == null ? quantity.value() : quantity.moved(moved);
            write(name, value, Amount.class.getName(), definition);
            shown = Outputs.scalar(value).withTolerance(tolerance(name, quantity));
        } else if (definition instanceof InputDefinition.Whole whole) {
            write(name, whole.value(), "int", definition);
            shown = Outputs.scalar(Amount.of(whole.value()));
        } else if (definition instanceof InputDefinition.Listed list) {
            write(name, list.values(), AMOUNTS, definition);
        } else if (definition instanceof InputDefinition.Table table) {
            write(name, columns(table), "java.util.Map<java.lang.String, " + AMOUNTS + ">", definition);
        } else if (definition instanceof InputDefinition.Choice choice) {
            write(name, choice.chosen(), "java.lang.String", definition);
        }
        draft.show(new Output.Given(name, Results.latex(name), shown, entry.definition(), entry.description(), entry.source()));
    }

    private void write(String name, Object value, String type, InputDefinition definition) {
        Binding binding = value instanceof Amount amount ? SheetTypes.binding(amount) : definition.binding();
        draft.write(new SheetName(name, draft.number(), value, binding, new Declaration.Variable(name, type), null));
    }

    private static Columns columns(InputDefinition.Table table) {
        Map<String, List<Amount>> columns = new LinkedHashMap<>();
        table.columns().forEach(column -> columns.put(column.name(), column.values()));
        return new Columns(columns);
    }

    /** Expanded uncertainty, k = 2, of what the input states; null when it states nothing. */
    private Double tolerance(String name, InputDefinition.Quantity quantity) {
        Tolerance stated = quantity.tolerance();
        if (stated == null) {
            return null;
        }
        double value = quantity.value().si();
        tolerances.add(stated.form() == Tolerance.Form.LIMITS ? InputTolerance.limits(name, value, stated.halfWidth())
                : InputTolerance.expanded(name, value, stated.halfWidth(), stated.coverage(), stated.degreesOfFreedom()));
        return Combined.COVERAGE * stated.standardUncertainty();
    }

    private void work(CorrelationEntry entry) {
        Correlation correlation = Correlation.of(entry.first(), entry.second(), entry.coefficient());
        for (String name : List.of(correlation.first(), correlation.second())) {
            SheetName input = draft.read(name);
            if (input == null) {
                throw new UnknownNameException(name, draft.names());
            }
            if (!(input.value() instanceof Amount)) {
                throw new AuthorException("'" + name + "' is no input with a tolerance: only such can be correlated.");
            }
        }
        correlations.add(correlation);
    }
}

package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import javax.measure.Dimension;

/**
 * A derive line, read but not worked: {@code name(arg: unit, …) = formula [in unit] [for condition]} and the steps that
 * go on from it.
 *
 * @param unit unit in which to show it, or null
 * @param condition where it holds, or null
 */
public record DeriveDefinition(String name, List<Parameter> parameters, Formula formula, String unit, Formula condition) {
    public DeriveDefinition {
        parameters = List.copyOf(parameters);
    }

    /**
     * A line that goes on: equal, or equal in a limiting case.
     *
     * @param condition of the limiting case, or null
     */
    public record Step(boolean limiting, Formula formula, Formula condition) {
        /** Blank texts are "not given". Errors: {@link FormulaException} in the text that is wrong. */
        public static Step parse(boolean limiting, String formula, String condition) {
            return new Step(limiting, Formula.parseValue(formula), given(condition) ? Formula.parseCondition(condition) : null);
        }

        public String latex() {
            return (limiting ? "\\approx " : "=") + formula.latex() + when(condition);
        }
    }

    /**
     * Reads the pieces of a line; blank texts are "not given". Errors: {@link FormulaException} in the text that is wrong,
     * {@link AuthorException} for a reserved name or an argument given twice.
     */
    public static DeriveDefinition parse(String name, List<Parameter> parameters, String formula, String unit, String condition) {
        String folded = Names.fold(name.strip());
        String reserved = Names.whyReserved(folded);
        if (reserved != null) {
            throw new AuthorException(reserved);
        }
        Set<String> seen = new HashSet<>();
        for (Parameter p : parameters) {
            if (!seen.add(p.name())) {
                throw new AuthorException("argument '" + p.name() + "' of " + folded + " is given twice. Remove one.");
            }
        }
        if (given(unit)) {
            Units.parse(unit);
        }
        return new DeriveDefinition(folded, parameters, Formula.parseValue(formula), given(unit) ? unit.strip() : null,
            given(condition) ? Formula.parseCondition(condition) : null);
    }

    /** An argument from its two texts; a blank unit is a plain number. A coordinate may be one, with its own kind of unit. */
    public static Parameter parameter(String name, String unit) {
        String folded = Names.fold(name.strip());
        Dimension d = Units.parse(unit).dimension();
        if (Coordinates.is(folded)) {
            if (!d.equals(Coordinates.DIMENSIONS.get(folded))) {
                throw new AuthorException("argument '" + folded + "' is a coordinate and must be " + Units.describe(Coordinates.DIMENSIONS.get(folded))
                    + ", not " + Units.describe(d) + ". Give it its unit or another name.");
            }
        } else if (Names.whyReserved(folded) != null) {
            throw new AuthorException(Names.whyReserved(folded));
        }
        return new Parameter(folded, d);
    }

    private static boolean given(String s) {
        return s != null && !s.isBlank();
    }

    /** The definition with names bound and units checked. */
    public Bound bind(Scope scope) {
        Set<String> arguments = new LinkedHashSet<>();
        Map<String, Dimension> dimensions = new HashMap<>();
        for (Parameter p : parameters) {
            arguments.add(p.name());
            dimensions.put(p.name(), p.dimension());
        }
        Formula bound = formula.bind(scope, arguments);
        Formula where = condition == null ? null : condition.bind(scope, arguments);
        Dimension dimension = bound.dimension(dimensions);
        if (where != null) {
            where.dimension(dimensions);
        }
        if (unit != null) {
            TradeUnit shown = Units.parse(unit);
            if (!shown.dimension().equals(dimension) && !bound.fitsAnyUnit()) {
                throw new FormulaException(formula.text(), 0, name + " is " + Units.describe(dimension) + " and cannot be shown in '" + unit + "' ("
                    + Units.describe(shown.dimension()) + "). Choose a unit that fits, or check the formula.");
            }
            dimension = shown.dimension();
        }
        return new Bound(this, bound, where, dimension, dimensions);
    }

    /** The line typeset: name, formula, condition. */
    public String latex() {
        List<String> names = parameters.stream().map(p -> Latex.name(p.name())).toList();
        return Latex.name(name) + (names.isEmpty() ? "" : "\\left(" + String.join(",\\,", names) + "\\right)") + "=" + formula.latex() + when(condition);
    }

    private static String when(Formula condition) {
        return condition == null ? "" : "\\quad\\text{for }" + condition.latex();
    }

    /**
     * A definition in its scope.
     *
     * @param variables dimension of each argument
     */
    public record Bound(DeriveDefinition definition, Formula formula, Formula condition, Dimension dimension, Map<String, Dimension> variables) {
        /** True when it has a value; false when it is a formula of arguments or coordinates. */
        public boolean isNumber() {
            Set<String> free = new HashSet<>(formula.variables());
            if (condition != null) {
                free.addAll(condition.variables());
            }
            return definition.parameters().isEmpty() && free.isEmpty();
        }

        /** The value, in the unit asked for. Errors: {@link FormulaException} when its condition does not hold. */
        public Amount amount() {
            Amount value = guarded().amount();
            Amount dimensioned = new Amount(value.si(), value.error(), dimension, value.shown(), value.standing());
            return definition.unit() == null ? dimensioned : dimensioned.in(definition.unit());
        }

        private Formula guarded() {
            return condition == null ? formula : formula.guarded(definition.name(), condition);
        }

        /** What the name means below this line. */
        public Binding binding() {
            return isNumber() ? new Binding.Value(amount()) : new Binding.Definition(definition.parameters(), formula, condition);
        }

        /** The formula to hand on as a value: arguments and coordinates free, its condition kept. */
        public Formula asFormula() {
            return guarded();
        }

        /** A step of the derivation, bound and with the unit of the line; errors carry the place in the step's text. */
        public Step bindStep(Step step, Scope scope) {
            Set<String> arguments = variables.keySet();
            Formula bound = step.formula().bind(scope, arguments);
            bound.requireDimension(dimension, "the step", variables);
            Formula where = step.condition() == null ? null : step.condition().bind(scope, arguments);
            if (where != null) {
                where.dimension(variables);
            }
            return new Step(step.limiting(), bound, where);
        }
    }

    /** All lines typeset, the steps below the first. */
    public List<String> latex(List<Step> steps) {
        List<String> lines = new ArrayList<>(List.of(latex()));
        steps.forEach(s -> lines.add(s.latex()));
        return lines;
    }
}

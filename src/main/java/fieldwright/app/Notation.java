package fieldwright.app;

import fieldwright.formula.Formula;
import fieldwright.formula.FormulaException;
import fieldwright.formula.Names;
import fieldwright.sheet.DeriveEntry;
import java.util.stream.Collectors;

/**
 * Names and formulas of the sheet as LaTeX, before anything was worked out: the text is read, nothing is computed. A
 * formula that cannot be read stands as it is written; the run says what is wrong with it.
 */
final class Notation {
    private Notation() { }

    /** {@code rho_0} as {@code \rho_{0}}. */
    static String name(String name) {
        return formula(name);
    }

    /** A derive line as it is read: name, formula, the unit it is shown in, where it holds. */
    static String line(DeriveEntry entry) {
        String arguments = entry.parameters().stream().map(p -> name(p.name())).collect(Collectors.joining(",\\,"));
        return name(entry.name()) + (arguments.isEmpty() ? "" : "\\left(" + arguments + "\\right)") + " = " + formula(entry.formula())
                + condition(entry.condition());
    }

    /** A line that goes on: equal, or what it becomes in a limiting case. */
    static String line(DeriveEntry.Continuation next) {
        return (next.relation() == DeriveEntry.Relation.EQUAL ? "= " : "\\simeq ") + formula(next.formula()) + condition(next.condition());
    }

    /** A derive line in plain text, as a run words it. */
    static String words(DeriveEntry entry) {
        String arguments = entry.parameters().stream().map(p -> Names.fold(p.name())).collect(Collectors.joining(", "));
        return Names.fold(entry.name()) + (arguments.isEmpty() ? "" : "(" + arguments + ")") + " = " + entry.formula()
                + conditionWords(entry.condition());
    }

    static String words(DeriveEntry.Continuation next) {
        return (next.relation() == DeriveEntry.Relation.EQUAL ? "= " : "~ ") + next.formula() + conditionWords(next.condition());
    }

    private static String conditionWords(String condition) {
        return condition.isEmpty() ? "" : " for " + condition;
    }

    private static String condition(String text) {
        return text.isEmpty() ? "" : "\\qquad \\text{for }\\; " + formula(text);
    }

    static String formula(String text) {
        try {
            return Formula.parse(text).latex();
        } catch (FormulaException e) {
            return "\\mathtt{" + text.replaceAll("[^\\p{Alnum}+\\-*/=().,:;<>|]+", "\\\\ ") + "}";
        }
    }
}

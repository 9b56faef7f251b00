package fieldwright.formula;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;

/** The order in which the variables of an integral nest: a limit may use only variables further out. */
final class Nesting {
    private Nesting() {
    }

    /**
     * The ranges, outermost first; among those that may come next, the one written first.
     * Errors: {@link FormulaException} naming the variables of a cycle, or one that is given twice.
     */
    static List<Node.Range> order(Node.Integral integral, String text) {
        List<Node.Range> left = new ArrayList<>(integral.ranges());
        for (int i = 0; i < left.size(); i++) {
            for (int j = 0; j < i; j++) {
                if (left.get(i).variable().equals(left.get(j).variable())) {
                    throw new FormulaException(text, left.get(i).at().offset(), "variable '" + left.get(i).variable()
                        + "' is integrated twice. Remove one of its limits.");
                }
            }
        }
        List<Node.Range> ordered = new ArrayList<>();
        while (!left.isEmpty()) {
            Node.Range free = left.stream().filter(r -> left.stream().noneMatch(o -> uses(r, o.variable()))).findFirst().orElse(null);
            if (free == null) {
                List<String> names = left.stream().map(Node.Range::variable).toList();
                throw new FormulaException(text, left.get(0).at().offset(), left.size() == 1
                    ? "the limits of '" + names.get(0) + "' depend on " + names.get(0) + " itself. Give limits that do not."
                    : "the limits of " + String.join(", ", names) + " depend on each other in a circle. Give one of them limits that do not.");
            }
            left.remove(free);
            ordered.add(free);
        }
        return ordered;
    }

    private static boolean uses(Node.Range r, String variable) {
        return Trees.mentions(r.from(), variable) || Trees.mentions(r.to(), variable);
    }

    static Set<String> variables(Node.Integral integral) {
        Set<String> names = new java.util.LinkedHashSet<>();
        integral.ranges().forEach(r -> names.add(r.variable()));
        return names;
    }
}

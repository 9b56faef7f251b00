package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.session.snippet.Declaration;
import java.util.Objects;

/**
 * A name as it stands below the cell that writes it.
 *
 * @param cell     the cell that writes it, 1-based
 * @param value    what Java code sees; null when there is none
 * @param binding  what formulas see; null when they do not see it at all
 * @param declares how Java code names it; null when it cannot
 * @param failure  why it has no value; null when it has one
 */
record SheetName(String name, int cell, Object value, Binding binding, Declaration declares, String failure) {

    /** A name that its cell should have given a value and did not. */
    static SheetName failed(String name, int cell, String failure) {
        return new SheetName(name, cell, null, null, null, failure);
    }

    SheetName inCell(int newCell) {
        return new SheetName(name, newCell, value, binding, declares, failure);
    }

    SheetName withValue(Object newValue, Binding newBinding) {
        return new SheetName(name, cell, newValue, newBinding, declares, failure);
    }

    boolean isFailed() {
        return failure != null;
    }

    /**
     * True when whoever reads the one would find the same in the other. Of objects that may change under way only the
     * very same object is the same.
     */
    boolean meansSame(SheetName other) {
        boolean sameValue = value == other.value
                || Constancy.isConstant(value) && Constancy.isConstant(other.value) && Objects.equals(value, other.value);
        return sameValue && Objects.equals(binding, other.binding) && Objects.equals(declares, other.declares)
                && Objects.equals(failure, other.failure);
    }
}

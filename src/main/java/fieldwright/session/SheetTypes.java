package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.formula.Formula;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Vector;
import fieldwright.session.snippet.Declaration;
import java.util.List;
import java.util.Set;

/** Which Java types are quantities of a sheet, and what formulas make of a Java value. */
final class SheetTypes {
    private static final Set<String> NAMED = Set.of(Amount.class.getName(), Vector.class.getName(), Formula.class.getName());

    private SheetTypes() { }

    /** True when a top-level variable of this type is a name of the sheet and a result. */
    static boolean isNamed(String type) {
        return NAMED.contains(type);
    }

    /** The variable through which Java code below reads a name of the sheet. */
    static Declaration.Variable variable(String name, Object value) {
        return new Declaration.Variable(name, value.getClass().getName());
    }

    /** What formulas see of a value that a name of the sheet holds. */
    static Binding binding(Object value) {
        if (value instanceof Amount amount) {
            return new Binding.Value(amount);
        }
        if (value instanceof Formula formula) {
            return new Binding.Definition(List.of(), formula, null);
        }
        if (value instanceof Vector) {
            return new Binding.Unfit("a vector", "Give one of its components a name in a working cell, such as 'var E_z = E.z();'.");
        }
        return new Binding.Unfit("a Java value", "Formulas know amounts, vectors and formulas only.");
    }
}

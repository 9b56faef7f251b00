package fieldwright.words;

import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.formula.Names;
import fieldwright.output.NumberText;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.math.BigDecimal;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.Map;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javax.measure.Dimension;

/** What an author gives as an argument: a formula text, a {@link Formula}, an {@link Amount} or a number. */
final class Given {
    private static final Pattern QUANTITY = Pattern.compile("\\s*([0-9]+(?:\\.[0-9]*)?(?:[eE][+-]?[0-9]+)?)\\s+([^0-9\\s(][^\\s(]*[/*\u00b7][^\\s(]*)\\s*");

    private Given() { }

    /** Names bound by the desk; coordinates stay free. */
    static Formula formula(String what, Object given) {
        return formula(what, given, Set.of());
    }

    /** Names bound by the desk; coordinates and the names in {@code free} stay free. */
    static Formula formula(String what, Object given, Set<String> free) {
        if (given instanceof String text) {
            if (text.isBlank()) {
                throw new AuthorException(what + " is empty. Write a formula, for example \"2*pi\" or \"0.3 m\".");
            }
            Amount quantity = quantity(text);
            return quantity != null ? Formula.constant(quantity) : Formula.parseValue(text).bind(Desk.current().scope(), free);
        }
        if (given instanceof Formula formula) {
            return formula.bind(Desk.current().scope(), free);
        }
        if (given instanceof Amount amount) {
            return Formula.constant(amount);
        }
        if (given instanceof Number number) {
            return Formula.parseValue(exact(what, number));
        }
        throw new AuthorException(what + " is " + (given == null ? "null" : "a " + given.getClass().getSimpleName())
                + ". Give a formula in quotes, a Formula, an Amount or a number.");
    }

    /**
     * A text that is nothing but a number and a compound unit, {@code 5 kV/m}, as on an input line; null for any other, and
     * where a name of the sheet could be meant.
     */
    private static Amount quantity(String text) {
        Matcher m = QUANTITY.matcher(text);
        if (!m.matches() || Desk.current().scope().names().stream().anyMatch(name -> m.group(2).matches(".*\\b" + name + "\\b.*"))) {
            return null;
        }
        try {
            return Amount.of(new BigDecimal(m.group(1)), m.group(2));
        } catch (AuthorException noUnit) {
            return null;    // the formula parser says what is wrong with it
        }
    }

    /** A number with unit; a formula may not mention coordinates. */
    static Amount amount(String what, Object given) {
        return amount(what, given, Map.of());
    }

    /** A number with unit; locals and coordinates take the values given. */
    static Amount amount(String what, Object given, Map<String, Amount> locals) {
        if (given instanceof Amount amount) {
            return amount;
        }
        Formula formula = formula(what, given, locals.keySet());
        Set<String> missing = new LinkedHashSet<>(formula.variables());
        missing.removeAll(locals.keySet());
        if (!missing.isEmpty()) {
            String first = missing.iterator().next();
            throw new AuthorException(what + " = " + formula.text() + " still depends on " + String.join(", ", missing)
                    + ". A number is needed here: give each a value, for example calc(\"" + formula.text() + "\", \"" + first + "\", …).");
        }
        return formula.amount(locals);
    }

    /** A number of the given kind, in SI; a bare 0 fits every kind. */
    static double si(String what, Object given, Dimension dimension) {
        Amount amount = amount(what, given);
        boolean bareZero = amount.isPlain() && amount.si() == 0;
        if (!amount.dimension().equals(dimension) && !bareZero) {
            String example = dimension.equals(Units.LENGTH) ? " Write the unit, for example \"0.3 m\"." : "";
            throw new AuthorException(what + " = " + text(given) + " is " + Units.describe(amount.dimension()) + ", not "
                    + Units.describe(dimension) + "." + example);
        }
        if (!amount.isConverged()) {
            throw new AuthorException(what + " = " + text(given) + " did not converge or is unbounded: " + amount.standing().reason()
                    + ". A place or size needs a number that can be relied on.");
        }
        return amount.si();
    }

    static double length(String what, Object given) {
        return si(what, given, Units.LENGTH);
    }

    static double plain(String what, Object given) {
        return si(what, given, Units.NONE);
    }

    static String text(Object given) {
        return given instanceof Formula formula ? formula.text() : String.valueOf(given);
    }

    /** The text the formula language reads as the same thing. */
    static String formulaText(String what, Object given) {
        return given instanceof Number number ? exact(what, number) : given instanceof String text ? text : formula(what, given).text();
    }

    private static String exact(String what, Number number) {
        double value = number.doubleValue();
        if (Double.isNaN(value)) {
            throw new AuthorException(what + " is not a number. Look for 0/0 or the root of a negative number in the Java above.");
        }
        return Double.isInfinite(value) ? (value < 0 ? "-inf" : "inf") : NumberText.exact(value);
    }

    /** Locals by name, as in {@code calc("Q/(4*pi*eps0*a^2)", "a", a)}. */
    static Map<String, Amount> locals(String call, Object... pairs) {
        if (pairs.length % 2 != 0) {
            throw new AuthorException(call + ": locals come in pairs, a name in quotes and its value; one of them is missing.");
        }
        Map<String, Amount> locals = new LinkedHashMap<>();
        for (int i = 0; i < pairs.length; i += 2) {
            if (!(pairs[i] instanceof String name)) {
                throw new AuthorException(call + ": '" + text(pairs[i]) + "' stands where the name of a local is expected. Write it in quotes.");
            }
            if (pairs[i + 1] instanceof Vector) {
                throw new AuthorException(call + ": local '" + name + "' is a vector. Give one of its components, for example " + name + ".z().");
            }
            String folded = Names.fold(name);
            String reserved = Coordinates.is(folded) ? null : Names.whyReserved(folded);
            if (reserved != null) {
                throw new AuthorException(call + ": " + reserved);
            }
            locals.put(folded, amount(call + ", local '" + name + "'", pairs[i + 1]));
        }
        return locals;
    }

    /** A formula in which locals stand for their names. */
    static Formula withLocals(String what, Object given, Map<String, Amount> locals) {
        Formula bound = formula(what, given, locals.keySet());
        Map<String, Formula> values = new LinkedHashMap<>();
        locals.forEach((name, amount) -> values.put(name, Formula.constant(amount)));
        return values.isEmpty() ? bound : bound.substitute(values);
    }
}

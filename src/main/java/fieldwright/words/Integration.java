package fieldwright.words;

import fieldwright.formula.Formula;
import fieldwright.formula.Names;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * An integral being written: {@code integral(f).over(region)} with the region's measure, or
 * {@code integral(f).d("y", "0", "1").d("x", "0", "y").value()} without any. Immutable.
 */
public final class Integration {
    private final Object integrand;
    private final List<Variable> variables;

    private record Variable(String name, Object from, Object to) { }

    private Integration(Object integrand, List<Variable> variables) {
        this.integrand = integrand;
        this.variables = variables;
    }

    static Integration of(Object integrand) {
        return new Integration(integrand, List.of());
    }

    /** ∫ f dl, dA or dV over a line, surface or volume; f in any coordinates, read in the region's own frame. */
    public Amount over(Shape region) {
        if (!variables.isEmpty()) {
            throw new AuthorException("integral(…): .d(…) and .over(region) exclude each other. over(region) has its own limits and measure.");
        }
        return Spread.of("integrand", integrand, region).integral(Desk.current().accuracy());
    }

    /** One more variable between limits, inside the ones before it; its limits may use those. */
    public Integration d(String variable, Object from, Object to) {
        List<Variable> more = new ArrayList<>(variables);
        more.add(new Variable(Names.fold(variable), from, to));
        return new Integration(integrand, List.copyOf(more));
    }

    /** The number of an integral written with {@code .d(…)}. */
    public Amount value() {
        if (variables.isEmpty()) {
            throw new AuthorException("integral(…): nothing to integrate over. Add .d(\"x\", from, to), or .over(region).");
        }
        Map<String, Amount> numbers = new LinkedHashMap<>();
        Formula whole = Given.formula("integral", text(numbers), numbers.keySet());
        return Given.amount("integral", whole, numbers);
    }

    /** The integral as the formula language writes it; amounts stand for themselves by a name, so that their error is carried. */
    private String text(Map<String, Amount> numbers) {
        StringBuilder text = new StringBuilder("integral(").append(part(integrand, numbers));
        for (Variable v : variables) {
            text.append(", ").append(v.name()).append(": ").append(part(v.from(), numbers)).append(" to ").append(part(v.to(), numbers));
        }
        return text.append(")").toString();
    }

    private static String part(Object given, Map<String, Amount> numbers) {
        if (given instanceof Amount amount) {
            String name = "number_" + (numbers.size() + 1);
            numbers.put(name, amount);
            return name;
        }
        return Given.formulaText("integral", given);
    }
}

package fieldwright.formula;

import fieldwright.quantity.Amount;
import java.util.List;
import java.util.Objects;

/** What a name means in a formula. */
public sealed interface Binding {
    /** A number with unit. */
    record Value(Amount amount) implements Binding {
        public Value {
            Objects.requireNonNull(amount, "amount");
        }
    }

    /**
     * A formula of its parameters, or, without parameters, of the coordinates it mentions.
     *
     * @param condition where it holds, or null: using it elsewhere is an error that names the condition
     */
    record Definition(List<Parameter> parameters, Formula body, Formula condition) implements Binding {
        public Definition {
            parameters = List.copyOf(parameters);
            Objects.requireNonNull(body, "body");
        }
    }

    /**
     * A name that exists but is no number: a vector, a list, a choice.
     *
     * @param what for the message: "a vector"
     * @param remedy a sentence: "Use a component, such as calc(...)."
     */
    record Unfit(String what, String remedy) implements Binding {
    }
}

package fieldwright.formula;

import fieldwright.quantity.Amount;
import java.util.List;

/**
 * What stands behind the {@code =} of an input line.
 *
 * <pre>
 * 1.80 m ± 0.02 m                      limits, absolute; +- and +/- are ± too
 * 2.1 uC/m^3 ± 25 %                    limits in percent of the value
 * 3.0 kV ± 0.1 kV (k=2)                expanded uncertainty with coverage factor
 * 3.0 kV ± 0.1 kV (k=1, nu=18)         and degrees of freedom
 * 12 (whole)                           a whole number
 * [1, 2, 5] mm    or  [1 mm, 2 cm]     a list
 * table(d / mm: 1, 2, 5; U / kV: 3.1, 5.4, 9.8)
 * PE of {PE, PTFE, glass}              a choice
 * </pre>
 */
public sealed interface InputDefinition {
    /**
     * Reads a definition. Errors: {@link FormulaException} with the place and a remedy.
     */
    static InputDefinition parse(String text) {
        return new InputParser(text).definition();
    }

    /** What the name means in formulas. */
    Binding binding();

    /**
     * One number.
     *
     * @param written its decimal as written, without unit
     * @param tolerance null when not stated
     */
    record Quantity(Amount value, String written, Tolerance tolerance) implements InputDefinition {
        @Override
        public Binding binding() {
            return new Binding.Value(value);
        }

        /** The same input with another value, SI; the shown unit stays. For reruns within the tolerance. */
        public Amount moved(double si) {
            return new Amount(si, Math.ulp(si), value.dimension(), value.shown(), value.standing());
        }
    }

    /** A whole number, exact. */
    record Whole(int value) implements InputDefinition {
        @Override
        public Binding binding() {
            return new Binding.Value(Amount.of(value));
        }
    }

    /** Several numbers of one kind. */
    record Listed(List<Amount> values) implements InputDefinition {
        public Listed {
            values = List.copyOf(values);
        }

        @Override
        public Binding binding() {
            return new Binding.Unfit("a list", "Pick one of its numbers in a working cell.");
        }
    }

    /** Columns of equal length. */
    record Table(List<Column> columns) implements InputDefinition {
        public record Column(String name, List<Amount> values) {
            public Column {
                values = List.copyOf(values);
            }
        }

        public Table {
            columns = List.copyOf(columns);
        }

        @Override
        public Binding binding() {
            return new Binding.Unfit("a table", "Pick one of its numbers in a working cell.");
        }
    }

    /** One of several words. */
    record Choice(String chosen, List<String> options) implements InputDefinition {
        public Choice {
            options = List.copyOf(options);
        }

        @Override
        public Binding binding() {
            return new Binding.Unfit("a choice", "Compare it in a working cell.");
        }
    }
}

package fieldwright.words;

import fieldwright.output.Axis;
import fieldwright.output.NumberText;
import fieldwright.quantity.Amount;
import java.util.ArrayList;
import java.util.List;

/**
 * One column of a table: a quantity, the unit it is shown in, and its values.
 *
 * @param quantity what stands in it, for instance {@code E_roof}
 * @param unit unit shown; empty for plain numbers
 */
public record Column(String quantity, String unit, List<Amount> values) {
    /** Digits shown; fewer where the numerical error says so. */
    private static final int DIGITS = 6;

    /** @throws fieldwright.quantity.AuthorException if a value does not have the unit's dimension */
    public Column {
        List<Amount> fitting = new ArrayList<>();
        for (Amount value : values) {
            fitting.add(value.in(unit));
        }
        values = List.copyOf(fitting);
    }

    /** Quantity over unit, as every heading: {@code E_roof / (kV/m)}. */
    String heading() {
        return Axis.heading(quantity, unit);
    }

    /** One value as text; a value in doubt says so in words. */
    static String text(Amount value) {
        String number = Double.isFinite(value.si()) ? NumberText.rounded(value.value(value.unitText()), digits(value)) : "";
        return switch (value.standing().kind()) {
            case CONVERGED -> number;
            case NOT_CONVERGED -> (number + " not converged").strip();
            case UNBOUNDED -> "unbounded";
        };
    }

    /** No digit is shown that the numerical error makes doubtful. */
    private static int digits(Amount value) {
        if (!(value.error() > 0) || value.si() == 0) {
            return DIGITS;
        }
        double sure = Math.floor(Math.log10(Math.abs(value.si()) / value.error()));
        return (int) Math.max(1, Math.min(DIGITS, sure));
    }

}

package fieldwright.output;

import java.io.Serializable;

/**
 * An axis of a plot, headed as quantity over unit.
 *
 * @param quantity what is drawn, for instance {@code height on the axis, z}
 * @param unit     unit of the numbers in the series; empty for plain numbers
 */
public record Axis(String quantity, String unit) implements Serializable {

    public Axis {
        unit = unit == null ? "" : unit;
    }

    /** {@code z / m}, with a compound unit in brackets: {@code |E| / (kV/m)}; the quantity alone when it has no unit. */
    public String heading() {
        return heading(quantity, unit);
    }

    /** Quantity over unit, as in the headings of tables. */
    public static String heading(String quantity, String unit) {
        if (unit.isEmpty()) {
            return quantity;
        }
        boolean compound = unit.matches(".*[/*·^ ].*");
        return quantity + " / " + (compound ? "(" + unit + ")" : unit);
    }
}

package fieldwright.output;

import java.io.Serializable;

/**
 * The unit a reader sees: shown number = SI value / factor.
 *
 * @param unit   as written, for instance {@code kV/m}; empty for a plain number
 * @param factor how much one of this unit is in SI, for instance 1000; finite and &gt; 0
 */
public record Display(String unit, double factor) implements Serializable {

    public Display {
        unit = unit == null ? "" : unit;
        if (!(factor > 0) || Double.isInfinite(factor)) {
            throw new IllegalArgumentException("factor of the shown unit '" + unit + "' = " + factor + ": must be finite and > 0.");
        }
    }

    /** Shown as it is held, in SI. */
    public static Display si(String unit) {
        return new Display(unit, 1);
    }
}

package fieldwright.study;

/**
 * Tolerance of one input, in SI.
 *
 * @param name the input
 * @param value its stated value
 * @param halfWidth distance from the value to either end, {@code > 0}
 * @param form what the half-width means
 * @param coverage coverage factor k of an expanded uncertainty; unused for limits
 * @param degreesOfFreedom nu of an expanded uncertainty; infinite when not stated and for limits
 */
public record InputTolerance(String name, double value, double halfWidth, Form form, double coverage,
                             double degreesOfFreedom) {

    public enum Form {
        /** The value lies between the ends, no place likelier than another: u = a/√3 (JCGM 100 4.3.7). */
        LIMITS,
        /** The half-width is U = k u (JCGM 100 6.2.1). */
        EXPANDED
    }

    public InputTolerance {
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException(name + " = " + value + ": an input with a tolerance must be finite.");
        }
        if (!(halfWidth > 0) || Double.isInfinite(halfWidth)) {
            throw new IllegalArgumentException("tolerance of " + name + " = " + halfWidth + ": must be finite and > 0.");
        }
        if (form == Form.EXPANDED && (!(coverage > 0) || Double.isInfinite(coverage))) {
            throw new IllegalArgumentException("k of " + name + " = " + coverage + ": must be finite and > 0.");
        }
        if (!(degreesOfFreedom > 0)) {
            throw new IllegalArgumentException("nu of " + name + " = " + degreesOfFreedom + ": must be > 0.");
        }
    }

    /** Limits ± half-width, rectangular. */
    public static InputTolerance limits(String name, double value, double halfWidth) {
        return new InputTolerance(name, value, halfWidth, Form.LIMITS, Double.NaN, Double.POSITIVE_INFINITY);
    }

    /** Expanded uncertainty U with its coverage factor k; nu infinite if not known. */
    public static InputTolerance expanded(String name, double value, double expanded, double k, double nu) {
        return new InputTolerance(name, value, expanded, Form.EXPANDED, k, nu);
    }

    public double low() {
        return value - halfWidth;
    }

    public double high() {
        return value + halfWidth;
    }

    /** Standard uncertainty as a part of the half-width. */
    public double standardPart() {
        return form == Form.LIMITS ? 1 / Math.sqrt(3) : 1 / coverage;
    }

    /** Standard uncertainty u, in the input's SI unit. */
    public double standard() {
        return halfWidth * standardPart();
    }

    /** Root mean square of (deviation/half-width)² : √(1/5) for a rectangle, √3/k² for a normal distribution. */
    double meanSquarePart() {
        return form == Form.LIMITS ? Math.sqrt(0.2) : Math.sqrt(3) / (coverage * coverage);
    }
}

package fieldwright.field.closed;

/** The unit of rounding and the checks that all forms share. */
final class Rounding {
    /** Spacing of doubles at 1; one rounding is at most half of it. */
    static final double EPS = Math.ulp(1.0);
    /** Beyond this many sizes squares of distances could overflow; sizes themselves stay far inside. */
    static final double LARGEST = 1e90;
    static final double SMALLEST = 1e-90;

    private Rounding() {
    }

    /** What a place is rounded by when nothing better is known: one spacing of its largest coordinate or of the body. */
    static double ofPlace(double x, double y, double z, double size) {
        return EPS * Math.max(Math.max(Math.abs(x), Math.abs(y)), Math.max(Math.abs(z), size));
    }

    /** How large the logarithm of a distance gets beside an edge: ln(16 length/gap), at least 4, finite for a gap of 0. */
    static double logarithm(double length, double gap) {
        return Math.max(4, Math.log(16 * length) - Math.log(Math.max(gap, Double.MIN_NORMAL)));
    }

    static void requirePlace(double x, double y, double z, double placeError) {
        requireCoordinate("x", x);
        requireCoordinate("y", y);
        requireCoordinate("z", z);
        if (!(placeError >= 0) || placeError > LARGEST) {
            throw new IllegalArgumentException("rounding of the place = " + placeError + ": must be finite and >= 0.");
        }
    }

    private static void requireCoordinate(String name, double value) {
        if (!(Math.abs(value) <= LARGEST)) {
            throw new IllegalArgumentException("place " + name + " = " + value + ": must be a number of size at most "
                    + LARGEST + ". Check the unit prefix.");
        }
    }

    static void requireLength(String thing, double value) {
        if (!(value >= SMALLEST && value <= LARGEST)) {
            throw new IllegalArgumentException(thing + " = " + value + ": must be between " + SMALLEST + " and " + LARGEST
                    + ". Check the sign and the unit prefix.");
        }
    }

    static void requireFinite(String thing, double value) {
        if (!Double.isFinite(value)) {
            throw new IllegalArgumentException(thing + " = " + value + ": must be finite.");
        }
    }
}

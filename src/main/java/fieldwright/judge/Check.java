package fieldwright.judge;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;
import fieldwright.quantity.Vector;
import java.util.Locale;

/**
 * A comparison of two values. It passes when |a − b| and both numerical errors together are within the tolerance and
 * both values converged.
 *
 * @param label what is compared; names the check in the record
 * @param passed the verdict
 * @param measured |a − b| plus the numerical errors: as a part of |b| for a relative tolerance, else in SI; NaN when
 *     there is no such number
 * @param allowed the tolerance, in the same terms
 * @param unit unit text of {@code measured} and {@code allowed}, SI; empty when relative
 * @param detail the finding in words
 */
public record Check(String label, boolean passed, double measured, double allowed, String unit, String detail) {

    /**
     * Compares two numbers of one dimension.
     *
     * @param b the reference: a relative tolerance is a part of its size
     * @param tolerance a plain number or percentage is relative; a quantity of the dimension of a and b is absolute.
     *     Between two plain numbers the tolerance is relative.
     * @throws AuthorException if the dimensions do not fit, or the tolerance is negative
     */
    public static Check of(String label, Amount a, Amount b, Amount tolerance) {
        requireSame(label, a, b);
        return verdict(label, new Difference(a.si() - b.si(), a.error() + b.error(), Math.abs(b.si()), a, b, trouble(a, b)), tolerance);
    }

    /** Compares two vectors by the length of their difference; relative to the length of the second. */
    public static Check of(String label, Vector a, Vector b, Amount tolerance) {
        Amount size = b.magnitude();
        requireSame(label, a.magnitude(), size);
        double distance = Math.hypot(Math.hypot(a.x().si() - b.x().si(), a.y().si() - b.y().si()), a.z().si() - b.z().si());
        double errors = a.x().error() + a.y().error() + a.z().error() + b.x().error() + b.y().error() + b.z().error();
        return verdict(label, new Difference(distance, errors, size.si(), a.magnitude(), size, trouble(a.magnitude(), size)), tolerance);
    }

    /** a − b with the errors of both, the reference's size, and why it cannot be judged (or null). */
    private record Difference(double value, double errors, double reference, Amount a, Amount b, String trouble) { }

    private static Check verdict(String label, Difference d, Amount tolerance) {
        boolean relative = tolerance.isPlain();
        if (!relative && !tolerance.dimension().equals(d.b.dimension())) {
            throw new AuthorException("check '" + label + "': tolerance is " + Units.describe(tolerance.dimension())
                    + " but the values are " + Units.describe(d.b.dimension())
                    + ". Give a plain number or a percentage (relative), or a quantity of the same kind.");
        }
        if (!(tolerance.si() >= 0)) {
            throw new AuthorException("check '" + label + "': tolerance = " + tolerance + ": must be >= 0.");
        }
        String unit = relative ? "" : Units.preferred(d.b.dimension());
        if (d.trouble != null) {
            return new Check(label, false, Double.NaN, tolerance.si(), unit, d.trouble);
        }
        double found = Math.abs(d.value) + d.errors;
        double measured = !relative || found == 0 ? found : found / d.reference;
        boolean passed = measured <= tolerance.si();
        return new Check(label, passed, measured, tolerance.si(), unit, detail(d, measured, relative, passed));
    }

    private static String detail(Difference d, double measured, boolean relative, boolean passed) {
        if (relative && d.reference == 0 && measured > 0) {
            return "the reference is 0 and the other value " + d.a
                    + ": a relative tolerance cannot judge that. Give the tolerance as a quantity with a unit.";
        }
        String size = relative ? String.format(Locale.ROOT, "%.2g", measured) : Amount.si(measured, 0, d.b.dimension()).toString();
        return passed ? "agree to " + size + ", numerical error included"
                : d.a + " and " + d.b + " differ by " + size + ", numerical error included";
    }

    private static String trouble(Amount a, Amount b) {
        for (Amount each : new Amount[] {a, b}) {
            if (!each.isConverged()) {
                return each.standing().kind() == fieldwright.quantity.Standing.Kind.UNBOUNDED
                        ? "unbounded: " + each.standing().reason()
                        : "did not converge: " + each.standing().reason();
            }
            if (Double.isNaN(each.error())) {
                return each + " came in as a bare number: its numerical error was not carried. Keep it an Amount.";
            }
        }
        return null;
    }

    private static void requireSame(String label, Amount a, Amount b) {
        if (!a.dimension().equals(b.dimension())) {
            throw new AuthorException("check '" + label + "': cannot compare " + Units.describe(a.dimension()) + " with "
                    + Units.describe(b.dimension()) + ". Both must have one unit.");
        }
    }
}

package fieldwright.field.closed;

/**
 * What a closed form says at one place: field and potential, with a bound on the error of each.
 *
 * <p>{@code errE} bounds the length of the error vector, {@code errV} the error of v; both absolute, and both contain
 * what the rounding of the place itself does to the answer.
 *
 * <ul>
 *   <li>REGULAR: the values as they stand; {@code direction} is {@link Direction#NONE} and {@code jump} 0.
 *   <li>ON_SURFACE: the place lies on a charged surface within its own rounding. E is the mean of the two one-sided
 *       fields; on the side {@code direction} (unit normal) points to, the field is E + jump/2 · direction, on the
 *       other E - jump/2 · direction. V is continuous.
 *   <li>UNBOUNDED: E grows without bound towards the place. {@code direction} is the direction of growth, or NONE where
 *       it depends on the side of approach (a line). ex, ey, ez hold no value and are 0; errE is infinite. v is finite
 *       on the edge of a surface, infinite with infinite errV on a line.
 * </ul>
 */
public record Closed(double ex, double ey, double ez, double v, double errE, double errV, Status status,
        Direction direction, double jump) {

    public enum Status { REGULAR, ON_SURFACE, UNBOUNDED }

    /** A unit vector, or three zeros for no direction. */
    public record Direction(double x, double y, double z) {
        public static final Direction NONE = new Direction(0, 0, 0);

        static Direction of(double x, double y, double z) {
            double length = Math.sqrt(x * x + y * y + z * z);
            return length > 0 ? new Direction(x / length, y / length, z / length) : NONE;
        }
    }

    static Closed regular(double ex, double ey, double ez, double v, double errE, double errV) {
        return new Closed(ex, ey, ez, v, errE, errV, Status.REGULAR, Direction.NONE, 0);
    }

    static Closed onSurface(double ex, double ey, double ez, double v, double errE, double errV, Direction normal, double jump) {
        return new Closed(ex, ey, ez, v, errE, errV, Status.ON_SURFACE, normal, jump);
    }

    /** On the edge of a charged surface: E unbounded along one direction, V finite. */
    static Closed onEdge(Direction direction, double v, double errV) {
        return new Closed(0, 0, 0, v, Double.POSITIVE_INFINITY, errV, Status.UNBOUNDED, direction, 0);
    }

    /** On a charged line: E and V unbounded. */
    static Closed onLine(double density) {
        double inf = Double.POSITIVE_INFINITY;
        return new Closed(0, 0, 0, density < 0 ? -inf : inf, inf, inf, Status.UNBOUNDED, Direction.NONE, 0);
    }

    /** Field and potential of an uncharged body. */
    static Closed zero() {
        return regular(0, 0, 0, 0, 0, 0);
    }

    /** From cylindrical components about the z axis, turned to the azimuth of (x, y). */
    static Closed turned(double x, double y, double rho, double eRho, double ez, double v, double errE, double errV) {
        double c = rho > 0 ? x / rho : 0;
        double s = rho > 0 ? y / rho : 0;
        return regular(eRho * c, eRho * s, ez, v, errE + Rounding.EPS * 2 * Math.abs(eRho), errV);
    }

    /** This answer with the place on a surface: same mean, the jump added. */
    Closed withJump(Direction normal, double jump) {
        return onSurface(ex, ey, ez, v, errE, errV, normal, jump);
    }

    double fieldLength() {
        return Math.sqrt(ex * ex + ey * ey + ez * ez);
    }
}

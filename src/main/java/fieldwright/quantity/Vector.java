package fieldwright.quantity;

import java.util.Objects;
import javax.measure.Dimension;

/**
 * A vector at a place: three Cartesian components, each an {@link Amount} with its own error; or, on a charged surface
 * or a conductor, a pair of one-sided values; or a statement that it is unbounded there.
 *
 * <p>Using a pair as one value is an {@link AuthorException} until {@link #onSide} or {@link #mean} is written.
 */
public final class Vector {
    private final Place place;
    private final Amount x;
    private final Amount y;
    private final Amount z;
    private final double[] normal;   // unit, from the minus to the plus side; null unless a pair
    private final Vector plus;
    private final Vector minus;

    private Vector(Place place, Amount x, Amount y, Amount z, double[] normal, Vector plus, Vector minus) {
        this.place = Objects.requireNonNull(place, "place");
        this.x = x;
        this.y = y;
        this.z = z;
        this.normal = normal;
        this.plus = plus;
        this.minus = minus;
    }

    public static Vector of(Place at, Amount x, Amount y, Amount z) {
        if (!x.dimension().equals(y.dimension()) || !x.dimension().equals(z.dimension())) {
            throw new AuthorException("a vector of " + Units.describe(x.dimension()) + ", " + Units.describe(y.dimension()) + " and "
                + Units.describe(z.dimension()) + ". The three components must have one unit.");
        }
        return new Vector(at, x, y, z, null, null, null);
    }

    /** @param normal unit vector from the minus side to the plus side */
    public static Vector sided(Place at, double[] normal, Vector plus, Vector minus) {
        if (plus.isSided() || minus.isSided()) {
            throw new IllegalArgumentException("a side must be a single vector");
        }
        double length = Math.sqrt(normal[0] * normal[0] + normal[1] * normal[1] + normal[2] * normal[2]);
        if (!(Math.abs(length - 1) < 1e-9)) {
            throw new IllegalArgumentException("normal of length " + length);
        }
        return new Vector(at, null, null, null, normal.clone(), plus, minus);
    }

    /** @param direction unit vector along which it grows without bound, or null when it has none */
    public static Vector unbounded(Place at, Dimension dimension, double[] direction, String reason) {
        Standing standing = Standing.unbounded(reason);
        Amount[] c = new Amount[3];
        for (int i = 0; i < 3; i++) {
            double value = direction == null ? Double.NaN : Math.abs(direction[i]) < 1e-9 ? 0 : Math.copySign(Double.POSITIVE_INFINITY, direction[i]);
            c[i] = new Amount(value, Double.POSITIVE_INFINITY, dimension, null, standing);
        }
        return new Vector(at, c[0], c[1], c[2], null, null, null);
    }

    public Place place() {
        return place;
    }

    public boolean isSided() {
        return normal != null;
    }

    /** Unit normal from the minus to the plus side of a pair. */
    public double[] normal() {
        return normal == null ? null : normal.clone();
    }

    public Vector plusSide() {
        return isSided() ? plus : this;
    }

    public Vector minusSide() {
        return isSided() ? minus : this;
    }

    public Dimension dimension() {
        return isSided() ? plus.dimension() : x.dimension();
    }

    public Standing standing() {
        return isSided() ? plus.standing().worse(minus.standing()) : x.standing().worse(y.standing()).worse(z.standing());
    }

    public Amount x() {
        single();
        return x;
    }

    public Amount y() {
        single();
        return y;
    }

    public Amount z() {
        single();
        return z;
    }

    /** Component away from the z axis. On the axis it has a value only when the transverse part is zero within its error. */
    public Amount rho() {
        single();
        double d = place.rho();
        return d == 0 ? zeroTransverse("rho") : along(place.x() / d, place.y() / d, 0);
    }

    /** Component in the direction of growing phi. */
    public Amount phi() {
        single();
        double d = place.rho();
        return d == 0 ? zeroTransverse("phi") : along(-place.y() / d, place.x() / d, 0);
    }

    /** Component away from the origin. */
    public Amount r() {
        single();
        double r = place.r();
        if (r == 0) {
            throw new AuthorException("component r at the origin: no direction is 'away from the origin' there. Ask for x, y or z.");
        }
        return along(place.x() / r, place.y() / r, place.z() / r);
    }

    /** Component in the direction of growing theta. */
    public Amount theta() {
        single();
        double d = place.rho();
        double r = place.r();
        if (d == 0) {
            return zeroTransverse("theta");
        }
        double cos = place.z() / r;
        return along(cos * place.x() / d, cos * place.y() / d, -d / r);
    }

    private Amount zeroTransverse(String component) {
        boolean zero = !(Math.abs(x.si()) > x.error()) && !(Math.abs(y.si()) > y.error()) && x.isConverged() && y.isConverged();
        if (!zero) {
            throw new AuthorException("component " + component + " on the z axis: the direction is not defined there and the field across the "
                + "axis is not zero (" + x + ", " + y + "). Ask for x, y or z.");
        }
        return new Amount(0, Bounds.sum(Math.abs(x.si()), x.error(), Math.abs(y.si()), y.error()), x.dimension(), x.shown(), x.standing());
    }

    public Amount magnitude() {
        single();
        if (!Double.isFinite(x.si()) || !Double.isFinite(y.si()) || !Double.isFinite(z.si())) {
            double size = standing().kind() == Standing.Kind.UNBOUNDED ? Double.POSITIVE_INFINITY : Double.NaN;
            return new Amount(size, Double.POSITIVE_INFINITY, x.dimension(), x.shown(), standing());
        }
        double size = Math.hypot(Math.hypot(x.si(), y.si()), z.si());
        double carried = Math.nextUp(Math.hypot(Math.hypot(x.error(), y.error()), z.error()));
        return new Amount(size, Bounds.sum(x.error() + y.error() + z.error() == 0 ? 0 : carried, 3 * Math.ulp(size)),
            x.dimension(), x.shown(), standing());
    }

    /** Component along a direction; the direction need not be a unit vector. */
    public Amount along(double dx, double dy, double dz) {
        single();
        double length = Math.sqrt(dx * dx + dy * dy + dz * dz);
        if (!(length > 0) || Double.isInfinite(length)) {
            throw new AuthorException("direction (" + dx + ", " + dy + ", " + dz + "): must have a length.");
        }
        return part(x, dx / length).plus(part(y, dy / length)).plus(part(z, dz / length));
    }

    /** A direction cosine carries a few units of rounding; a zero one removes an infinite component. */
    private static Amount part(Amount component, double cosine) {
        if (cosine == 0) {
            return new Amount(0, 0, component.dimension(), component.shown(), component.standing());
        }
        boolean axis = Math.abs(cosine) == 1;
        return component.times(new Amount(cosine, axis ? 0 : 4 * Math.ulp(cosine), Units.NONE, null, Standing.CONVERGED));
    }

    /**
     * The value on one side of a charged surface: "+z", "-x", "+rho", "-r", … names the side by a direction that points
     * into it. A vector that is not a pair has the same value on all sides.
     */
    public Vector onSide(String side) {
        double[] d = Directions.at(place, side);
        return onSide(d[0], d[1], d[2]);
    }

    public Vector onSide(double dx, double dy, double dz) {
        double length = Math.sqrt(dx * dx + dy * dy + dz * dz);
        if (!(length > 0)) {
            throw new AuthorException("side (" + dx + ", " + dy + ", " + dz + "): must be a direction with a length.");
        }
        if (!isSided()) {
            return this;
        }
        double cosine = (normal[0] * dx + normal[1] * dy + normal[2] * dz) / length;
        if (Math.abs(cosine) < 1e-6) {
            throw new AuthorException("side (" + dx + ", " + dy + ", " + dz + ") runs along the surface, whose normal is (" + normal[0] + ", "
                + normal[1] + ", " + normal[2] + "). Name a direction away from it.");
        }
        return cosine > 0 ? plus : minus;
    }

    /** Mean of the two sides: the field that acts on the surface's own charge. */
    public Vector mean() {
        return isSided() ? plus.plus(minus).times(0.5) : this;
    }

    /** Plus side minus minus side; zero when it is not a pair. */
    public Vector jump() {
        return isSided() ? plus.minus(minus) : minus(this);
    }

    public Vector in(String unit) {
        return isSided() ? new Vector(place, null, null, null, normal, plus.in(unit), minus.in(unit))
            : new Vector(place, x.in(unit), y.in(unit), z.in(unit), null, null, null);
    }

    public Vector times(Amount factor) {
        return isSided() ? new Vector(place, null, null, null, normal, plus.times(factor), minus.times(factor))
            : of(place, x.times(factor), y.times(factor), z.times(factor));
    }

    public Vector times(double factor) {
        return times(Amount.of(factor));
    }

    /** Sum at one place; a pair plus a single value stays a pair. */
    public Vector plus(Vector b) {
        if (!place.equals(b.place)) {
            throw new AuthorException("cannot add vectors at different places, " + place + " and " + b.place + ".");
        }
        if (isSided() || b.isSided()) {
            double[] n = isSided() ? normal : b.normal;
            if (isSided() && b.isSided() && Math.abs(Math.abs(n[0] * b.normal[0] + n[1] * b.normal[1] + n[2] * b.normal[2]) - 1) > 1e-9) {
                throw new AuthorException("two charged surfaces with normals " + Directions.text(normal) + " and " + Directions.text(b.normal)
                    + " meet here: the field has more than two sides. Move the place off one of them.");
            }
            return sided(place, n, onSide(n[0], n[1], n[2]).plus(b.onSide(n[0], n[1], n[2])),
                onSide(-n[0], -n[1], -n[2]).plus(b.onSide(-n[0], -n[1], -n[2])));
        }
        return of(place, x.plus(b.x), y.plus(b.y), z.plus(b.z));
    }

    public Vector minus(Vector b) {
        return plus(b.times(-1));
    }

    private void single() {
        if (isSided()) {
            throw new AuthorException("this vector has two values, one on each side of the surface it lies on (normal " + Directions.text(normal)
                + "). Write .onSide(\"" + Directions.nearest(normal) + "\") or .mean().");
        }
    }

    @Override
    public String toString() {
        return isSided() ? "plus side " + plus + ", minus side " + minus : "(" + x + ", " + y + ", " + z + ")";
    }
}

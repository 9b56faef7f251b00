package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * All space between the planes z1 and z2 with one charge per volume. V is zero on the plane midway.
 *
 * <p>Source: Gauss's law.
 */
public record Slab(double z1, double z2, double density) implements ClosedForm {
    public Slab {
        Rounding.requireFinite("slab face z1", z1);
        Rounding.requireLength("slab thickness z2 - z1", z2 - z1);
        Rounding.requireFinite("slab charge density", density);
    }

    @Override
    public double reach() {
        return Math.max(Math.abs(z1), Math.abs(z2));
    }

    /** {@inheritDoc} Finite and continuous everywhere. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double half = 0.5 * (z2 - z1);
        double up = 0.5 * ((z - z1) + (z - z2)); // from the middle
        double within = Math.max(-half, Math.min(half, up));
        double beyond = Math.abs(up) - Math.abs(within);
        double e = 4 * Math.PI * density * within;
        double v = -2 * Math.PI * density * (within * within + 2 * half * beyond);
        double q = 4 * Math.PI * Math.abs(density);
        double moved = placeError + EPS * reach();
        boolean inside = Math.abs(up) <= half + moved;
        double errE = (inside ? q * moved : 0) + 4 * EPS * Math.abs(e);
        return Closed.regular(0, 0, e, v, errE, 4 * EPS * Math.abs(v) + Math.abs(e) * moved + q * moved * moved);
    }
}

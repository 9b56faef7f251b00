package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * The whole plane z = 0 with one charge per area. V is zero on the plane: V = -2 pi density |z|.
 *
 * <p>Source: Gauss's law.
 */
public record EndlessPlane(double density) implements ClosedForm {
    public EndlessPlane {
        Rounding.requireFinite("charge density of the endless plane", density);
    }

    @Override
    public double reach() {
        return 0;
    }

    /** {@inheritDoc} On the plane E is the mean 0 with a jump of 4 pi density. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double e = 2 * Math.PI * density;
        double v = -e * Math.abs(z);
        double errE = 2 * EPS * Math.abs(e);
        double errV = Math.abs(e) * (placeError + 2 * EPS * Math.abs(z));
        if (density != 0 && Math.abs(z) <= placeError) {
            return Closed.onSurface(0, 0, 0, v, errE, errV, new Closed.Direction(0, 0, 1), 2 * e);
        }
        return Closed.regular(0, 0, e * Math.signum(z), v, errE, errV);
    }
}

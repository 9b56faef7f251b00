package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * The whole z axis with one charge per length. V is zero at distance 1 (in the unit of length): V = -2 density ln(distance).
 *
 * <p>Source: Gauss's law.
 */
public record EndlessLine(double density) implements ClosedForm {
    public EndlessLine {
        Rounding.requireFinite("charge density of the endless line", density);
    }

    @Override
    public double reach() {
        return 0;
    }

    /** {@inheritDoc} On the line E and V are unbounded. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double rho = Math.sqrt(x * x + y * y);
        if (density == 0) {
            return Closed.zero();
        }
        if (rho <= placeError || rho == 0) {
            return Closed.onLine(density);
        }
        double e = 2 * density / rho;
        double v = -density * Math.log(x * x + y * y);
        double errV = 4 * EPS * (Math.abs(v) + Math.abs(density)) + Math.abs(e) * placeError;
        return Closed.regular(e / rho * x, e / rho * y, 0, v, Math.abs(e) * (4 * EPS + 2 * placeError / rho), errV);
    }
}

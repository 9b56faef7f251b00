package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * An endless cylindrical shell of the given radius about the z axis with one charge per area. V outside is that of the same
 * charge on the axis, zero at distance 1 (in the unit of length) from it: V = -4 pi radius density ln(max(distance, radius)).
 *
 * <p>Source: Gauss's law.
 */
public record EndlessTube(double radius, double density) implements ClosedForm {
    public EndlessTube {
        Rounding.requireLength("radius of the endless tube", radius);
        Rounding.requireFinite("charge density of the endless tube", density);
    }

    @Override
    public double reach() {
        return radius;
    }

    /** {@inheritDoc} On the shell the mean of both sides, normal outward, jump 4 pi density. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double rho = Math.sqrt(x * x + y * y);
        double moved = placeError + EPS * rho;
        double twice = 4 * Math.PI * radius * density; // 2 · charge per length
        double v = -twice * Math.log(Math.max(rho, radius));
        double errV = 4 * EPS * (Math.abs(v) + Math.abs(twice));
        if (rho < radius - moved) {
            return Closed.regular(0, 0, 0, v, 0, errV);
        }
        double e = twice / rho;
        double errE = Math.abs(e) * (4 * EPS + 2 * moved / rho);
        errV += Math.abs(e) * moved;
        if (density != 0 && Math.abs(rho - radius) <= moved) {
            return Closed.onSurface(0.5 * e / rho * x, 0.5 * e / rho * y, 0, v, errE, errV, Closed.Direction.of(x, y, 0),
                    4 * Math.PI * density);
        }
        return Closed.regular(e / rho * x, e / rho * y, 0, v, errE, errV);
    }
}

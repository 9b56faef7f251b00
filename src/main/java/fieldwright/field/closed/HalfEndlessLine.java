package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * The z axis from 0 upwards with one charge per length. V = -density ln(r - z), zero where r - z is 1 (in the unit of
 * length), for example at distance 1 beside the end.
 *
 * <p>Source: limit of the rod's form as its far end moves off; r - z = rho²/(r + z) where z > 0.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 within 1e-3 of max(1e-12, 8 eps distance/gap); stated bound at least 4
 * times the true error.
 */
public record HalfEndlessLine(double density) implements ClosedForm {
    public HalfEndlessLine {
        Rounding.requireFinite("charge density of the half-endless line", density);
    }

    @Override
    public double reach() {
        return 0;
    }

    /** {@inheritDoc} On the line E and V are unbounded. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double square = x * x + y * y;
        double r = Math.sqrt(square + z * z);
        double gap = z > 0 ? Math.sqrt(square) : r;
        if (density == 0) {
            return Closed.zero();
        }
        if (gap <= placeError || gap == 0) {
            return Closed.onLine(density);
        }
        double less = z > 0 ? square / (r + z) : r - z;
        double across = z > 0 ? (r + z) / (square * r) : 1 / (r * less); // Erho/rho
        double ez = -density / r;
        double v = -density * Math.log(less);
        double size = Math.abs(density) * (across * Math.sqrt(square) + 1 / r);
        double errE = size * 8 * EPS + placeError * 2 * size / gap;
        double errV = 4 * EPS * (Math.abs(v) + Math.abs(density)) + placeError * size;
        return Closed.regular(density * across * x, density * across * y, ez, v, errE, errV);
    }
}

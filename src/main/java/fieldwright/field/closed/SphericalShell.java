package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A uniformly charged sphere surface of the given radius about the origin; density is charge per area.
 *
 * <p>Source: Newton's shell theorem; E = Q r/r³ outside, 0 inside, V = Q/max(r, radius), Q = 4 pi radius² density.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 from the surface, 1e-15 relative; stated bound at least 4 times the true error.
 */
public record SphericalShell(double radius, double density) implements ClosedForm {
    public SphericalShell {
        Rounding.requireLength("sphere radius", radius);
        Rounding.requireFinite("sphere charge density", density);
    }

    @Override
    public double reach() {
        return radius;
    }

    /** {@inheritDoc} On the sphere the mean of both sides, normal outward, jump 4 pi density. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double r = Math.sqrt(x * x + y * y + z * z);
        double q = 4 * Math.PI * radius * radius * density;
        double moved = placeError + EPS * r;
        if (r < radius && radius - r > moved) {
            double v = q / radius;
            return Closed.regular(0, 0, 0, v, 0, 4 * EPS * Math.abs(v));
        }
        double e = q / (r * r);
        double v = q / Math.max(r, radius);
        double errE = Math.abs(e) * (6 * EPS + 2 * moved / r);
        double errV = Math.abs(v) * (4 * EPS + moved / r);
        if (Math.abs(r - radius) <= moved) {
            double mean = 0.5 * e / r;
            return Closed.onSurface(mean * x, mean * y, mean * z, v, errE, errV, Closed.Direction.of(x, y, z), 4 * Math.PI * density);
        }
        return Closed.regular(e / r * x, e / r * y, e / r * z, v, errE, errV);
    }
}

package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A ball, or thick shell, about the origin, uniformly charged between the radii inner (0 for a full ball) and outer; density
 * is charge per volume.
 *
 * <p>Source: Newton's shell theorem. The charge within r is formed as 4 pi/3 (r - b)(r² + r b + b²), so nothing cancels just
 * outside the inner face.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 from the surface, full and with a wall of 1e-4, 1e-15 relative (in the wall eps
 * size/wall); stated bound at least 4 times the true error.
 */
public record Ball(double inner, double outer, double density) implements ClosedForm {
    public Ball {
        if (!(inner >= 0 && inner < outer)) {
            throw new IllegalArgumentException("inner radius = " + inner + ", outer radius = " + outer
                    + ": needs 0 <= inner < outer. Check the order and the unit prefixes.");
        }
        Rounding.requireLength("ball outer radius", outer);
        Rounding.requireFinite("ball charge density", density);
    }

    /** A full ball. */
    public static Ball full(double radius, double density) {
        return new Ball(0, radius, density);
    }

    @Override
    public double reach() {
        return outer;
    }

    /** {@inheritDoc} Finite and continuous everywhere. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double r = Math.sqrt(x * x + y * y + z * z);
        double moved = placeError + EPS * r;
        if (r <= inner) {
            double v = 2 * Math.PI * density * (outer - inner) * (outer + inner);
            return Closed.regular(0, 0, 0, v, r + moved > inner ? tide() * moved : 0, 6 * EPS * Math.abs(v));
        }
        double within = Math.min(r, outer);
        double charge = 4 * Math.PI / 3 * density * cubes(within, inner);
        double e = charge / (r * r);
        double around = 2 * Math.PI * density * (outer - within) * (outer + within); // potential of what lies farther out
        double v = charge / r + around;
        double errE = 8 * EPS * Math.abs(e) + (r > outer + moved ? 2 * Math.abs(e) / r : tide()) * moved;
        double errV = 8 * EPS * Math.abs(v) + Math.abs(e) * moved;
        return Closed.regular(e / r * x, e / r * y, e / r * z, v, errE, errV);
    }

    /** Bound on the gradient of the field anywhere: 4 pi/3 density times at most 3 (the density itself). */
    private double tide() {
        return 4 * Math.PI * Math.abs(density);
    }

    /** a³ - b³. */
    private static double cubes(double a, double b) {
        return (a - b) * (a * a + a * b + b * b);
    }
}

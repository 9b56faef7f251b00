package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A flat strip in the plane z = 0 from x1 to x2, endless along y, with one charge per area. V is the sum of
 * -2 density ln(distance) over its lines, so that of the same charge on one line far away.
 *
 * <p>Source: integral of the endless line's field and potential over x (Durand, Électrostatique I, 1964, on plane strips; from memory).
 * The logarithm is of a ratio formed without cancellation.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 widths within 1e-3 of max(1e-12, 8 eps size/gap); stated bound at least 3
 * times the true error.
 */
public record Strip(double x1, double x2, double density) implements ClosedForm {
    public Strip {
        Rounding.requireFinite("strip edge x1", x1);
        Rounding.requireLength("strip width x2 - x1", x2 - x1);
        Rounding.requireFinite("strip charge density", density);
    }

    @Override
    public double reach() {
        return Math.max(Math.abs(x1), Math.abs(x2));
    }

    /** {@inheritDoc} On the strip Ez is the mean 0 with a jump of 4 pi density; on an edge Ex is unbounded, away from the strip. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        if (density == 0) {
            return Closed.zero();
        }
        double width = x2 - x1;
        double u1 = x1 - x;
        double u2 = x2 - x;
        double h = Math.abs(z);
        double near1 = u1 * u1 + h * h;
        double near2 = u2 * u2 + h * h;
        double touch = placeError * placeError;
        double q = Math.abs(density);
        boolean onEdge = near1 <= touch || near2 <= touch;
        double angle = Math.atan2(h * width, h * h + u1 * u2);
        double pull = logOfRatio(near1, near2, width * -(u1 + u2)); // ln(near1/near2)
        boolean first = near1 <= near2;
        double whole = width * Math.log(first ? near2 : near1); // far away the two moments nearly cancel
        double rest = onEdge ? 0 : (first ? u1 : u2) * pull;
        double v = -density * (whole - rest - 2 * width + 2 * h * angle);
        double terms = Math.abs(whole) + Math.abs(rest) + 4 * width + 2 * h * angle;
        if (onEdge) {
            double big = Rounding.logarithm(width, placeError);
            return Closed.onEdge(new Closed.Direction((first ? -1 : 1) * Math.signum(density), 0, 0), v,
                    q * (4 * EPS * terms + 2 * placeError * (big + Math.abs(Math.log(width)) + Math.PI)));
        }
        double nearest = Math.sqrt(Math.min(near1, near2));
        double errE = q * (8 * EPS * (Math.abs(pull) + 2 * angle) + 4 * placeError * Math.min(1 / nearest, 2 * width / (nearest * nearest)));
        double errV = q * (4 * EPS * terms + placeError * (Math.abs(pull) + 2 * angle));
        if (h <= placeError && u1 < 0 && u2 > 0) {
            return Closed.onSurface(density * pull, 0, 0, v, errE, errV, new Closed.Direction(0, 0, 1), 4 * Math.PI * density);
        }
        return Closed.regular(density * pull, 0, 2 * density * Math.signum(z) * angle, v, errE, errV);
    }

    private static double logOfRatio(double a, double b, double aLessB) {
        return Math.abs(aLessB) < 0.5 * Math.max(a, b) ? Math.log1p(aLessB / b) : Math.log(a / b);
    }
}

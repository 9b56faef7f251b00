package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A uniformly charged circle of the given radius about the z axis in the plane z = 0; density is charge per length.
 *
 * <p>Source: V = 4 a K/r1, Ez = 4 a z E/(r1 r2²), Erho from ∫ (rho - a cos φ)/R³ (e.g. Zypman, Am. J. Phys. 74 (2006) 295;
 * Ciftja and Hysi 2011; equations from memory), rewritten with Bulirsch's B, D and the mixed integral C so that nothing cancels near
 * the circle, near the axis or far away. One form for all distances.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 radii within 0.08 of max(1e-12, 8 eps size/gap); stated bound at least 4
 * times the true error.
 */
public record Ring(double radius, double density) implements ClosedForm {
    public Ring {
        Rounding.requireLength("ring radius", radius);
        Rounding.requireFinite("ring charge density", density);
    }

    @Override
    public double reach() {
        return radius;
    }

    /** {@inheritDoc} On the circle E and V are unbounded. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        if (density == 0) {
            return Closed.zero();
        }
        double rho = Math.sqrt(x * x + y * y);
        Rim rim = new Rim(radius, rho, z);
        if (rim.near <= placeError) {
            return Closed.onLine(density);
        }
        double a = radius;
        double q = Math.abs(density);
        double far3 = rim.far * rim.far * rim.far;
        double d = CompleteIntegral.sineSquare(rim.kc);
        double b = CompleteIntegral.cosineSquare(rim.kc);
        double kc2 = rim.kc * rim.kc;
        double second = kc2 * d + b;
        double cubed = 4 * a * second / (far3 * kc2); // ∫ dl/R³
        double ez = z * cubed;
        double eRho = rim.rho < a && rim.m < 0.5 ? inner(rim, second, d, far3 * kc2)
                : 4 * a / far3 * ((rho + a) * d + (rho - a) * b / kc2);
        double v = 4 * a / rim.far * (d + b);
        double moved = placeError + EPS * rho;
        double errE = q * (8 * EPS * (Math.abs(ez) + fieldScale(rim, eRho, b, d, far3 * kc2)) + 2 * moved * cubed);
        double errV = q * (8 * EPS * v + moved * rim.inverseSquare());
        return Closed.turned(x, y, rho, density * eRho, density * ez, density * v, errE, errV);
    }

    /** Near the middle: Erho = 4 a rho/(r1 r2²) · (E - 4 a²/r1² (D - C)), whose bracket stays clear of 0 next to its terms. */
    private static double inner(Rim rim, double second, double d, double far3kc2) {
        double share = 4 * rim.a * rim.a / (rim.far * rim.far);
        return 4 * rim.a * rim.rho / far3kc2 * (second - share * (d - CompleteIntegral.mixed(rim.m, rim.kc)));
    }

    /** The sum of the sizes of the terms that made Erho. */
    private static double fieldScale(Rim rim, double eRho, double b, double d, double far3kc2) {
        boolean inner = rim.rho < rim.a && rim.m < 0.5;
        return inner ? Math.abs(eRho) + 4 * rim.a * rim.rho / far3kc2 * 5
                : 4 * rim.a / far3kc2 * ((rim.rho + rim.a) * d * rim.kc * rim.kc + Math.abs(rim.rho - rim.a) * b);
    }
}

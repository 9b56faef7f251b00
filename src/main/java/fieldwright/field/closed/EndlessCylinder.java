package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * An endless cylinder about the z axis, charged between the radii inner (0 for a full one) and outer, with one charge per
 * volume. V outside is that of the same charge on the axis, zero at distance 1 (in the unit of length) from it.
 *
 * <p>Source: Gauss's law.
 */
public record EndlessCylinder(double inner, double outer, double density) implements ClosedForm {
    public EndlessCylinder {
        if (!(inner >= 0 && inner < outer)) {
            throw new IllegalArgumentException("inner radius = " + inner + ", outer radius = " + outer
                    + ": needs 0 <= inner < outer. Check the order and the unit prefixes.");
        }
        Rounding.requireLength("outer radius of the endless cylinder", outer);
        Rounding.requireFinite("charge density of the endless cylinder", density);
    }

    @Override
    public double reach() {
        return outer;
    }

    /** {@inheritDoc} Finite and continuous everywhere. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double rho = Math.sqrt(x * x + y * y);
        double moved = placeError + EPS * rho;
        double within = Math.max(inner, Math.min(rho, outer));
        double charge = Math.PI * density * (within - inner) * (within + inner); // per length, nearer than the place
        double all = Math.PI * density * (outer - inner) * (outer + inner);
        double e = rho > 0 ? 2 * charge / rho : 0;
        double outside = -2 * all * Math.log(Math.max(rho, outer));
        double rise = Math.PI * density * (outer - within) * (outer + within);
        double core = inner > 0 ? 2 * Math.PI * density * inner * inner * Math.log1p((outer - within) / within) : 0;
        double v = outside + rise - core;
        double tide = rho > outer + moved ? 2 * Math.abs(e) / rho : rho < inner - moved ? 0 : 4 * Math.PI * Math.abs(density);
        double errE = 6 * EPS * Math.abs(e) + tide * moved;
        double errV = 4 * EPS * (Math.abs(outside) + 2 * Math.abs(all) + Math.abs(rise) + Math.abs(core)) + (Math.abs(e) + tide * moved) * moved;
        double c = rho > 0 ? e / rho : 0;
        return Closed.regular(c * x, c * y, 0, v, errE, errV);
    }
}

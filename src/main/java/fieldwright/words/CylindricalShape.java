package fieldwright.words;

import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;

/**
 * A region in cylindrical coordinates: one call for each. Two arguments are limits, one holds the coordinate fixed; either may be
 * a formula of the other coordinates. Lengths, phi in radian.
 */
public final class CylindricalShape extends Shape {
    private final CoordinateRegion inner;

    private CylindricalShape(CoordinateRegion inner) {
        super(inner);
        this.inner = inner;
    }

    static CylindricalShape open() {
        return new CylindricalShape(CoordinateRegion.in(CoordinateSystem.CYLINDRICAL));
    }

    public CylindricalShape rho(Object from, Object to) {
        return limits("rho", from, to);
    }

    public CylindricalShape rho(Object at) {
        return fixed("rho", at);
    }

    public CylindricalShape phi(Object from, Object to) {
        return limits("phi", from, to);
    }

    public CylindricalShape phi(Object at) {
        return fixed("phi", at);
    }

    public CylindricalShape z(Object from, Object to) {
        return limits("z", from, to);
    }

    public CylindricalShape z(Object at) {
        return fixed("z", at);
    }

    private CylindricalShape limits(String name, Object from, Object to) {
        return new CylindricalShape(inner.limits(name, Given.formula("lower limit of " + name, from), Given.formula("upper limit of " + name, to)));
    }

    private CylindricalShape fixed(String name, Object at) {
        return new CylindricalShape(inner.fixed(name, Given.formula(name, at)));
    }
}

package fieldwright.words;

import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;

/**
 * A region in spherical coordinates: one call for each. Two arguments are limits, one holds the coordinate fixed; either may be
 * a formula of the other coordinates. Length and two angles in radian, theta from the polar axis.
 */
public final class SphericalShape extends Shape {
    private final CoordinateRegion inner;

    private SphericalShape(CoordinateRegion inner) {
        super(inner);
        this.inner = inner;
    }

    static SphericalShape open() {
        return new SphericalShape(CoordinateRegion.in(CoordinateSystem.SPHERICAL));
    }

    public SphericalShape r(Object from, Object to) {
        return limits("r", from, to);
    }

    public SphericalShape r(Object at) {
        return fixed("r", at);
    }

    public SphericalShape theta(Object from, Object to) {
        return limits("theta", from, to);
    }

    public SphericalShape theta(Object at) {
        return fixed("theta", at);
    }

    public SphericalShape phi(Object from, Object to) {
        return limits("phi", from, to);
    }

    public SphericalShape phi(Object at) {
        return fixed("phi", at);
    }

    private SphericalShape limits(String name, Object from, Object to) {
        return new SphericalShape(inner.limits(name, Given.formula("lower limit of " + name, from), Given.formula("upper limit of " + name, to)));
    }

    private SphericalShape fixed(String name, Object at) {
        return new SphericalShape(inner.fixed(name, Given.formula(name, at)));
    }
}

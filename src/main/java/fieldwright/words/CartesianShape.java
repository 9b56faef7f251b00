package fieldwright.words;

import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;

/**
 * A region in cartesian coordinates: one call for each. Two arguments are limits, one holds the coordinate fixed; either may be
 * a formula of the other coordinates. Lengths.
 */
public final class CartesianShape extends Shape {
    private final CoordinateRegion inner;

    private CartesianShape(CoordinateRegion inner) {
        super(inner);
        this.inner = inner;
    }

    static CartesianShape open() {
        return new CartesianShape(CoordinateRegion.in(CoordinateSystem.CARTESIAN));
    }

    public CartesianShape x(Object from, Object to) {
        return limits("x", from, to);
    }

    public CartesianShape x(Object at) {
        return fixed("x", at);
    }

    public CartesianShape y(Object from, Object to) {
        return limits("y", from, to);
    }

    public CartesianShape y(Object at) {
        return fixed("y", at);
    }

    public CartesianShape z(Object from, Object to) {
        return limits("z", from, to);
    }

    public CartesianShape z(Object at) {
        return fixed("z", at);
    }

    private CartesianShape limits(String name, Object from, Object to) {
        return new CartesianShape(inner.limits(name, Given.formula("lower limit of " + name, from), Given.formula("upper limit of " + name, to)));
    }

    private CartesianShape fixed(String name, Object at) {
        return new CartesianShape(inner.fixed(name, Given.formula(name, at)));
    }
}

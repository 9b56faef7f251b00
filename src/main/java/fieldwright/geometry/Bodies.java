package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;

import fieldwright.formula.Formula;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/**
 * The usual bodies. Ring, arc, disc, annulus, rectangle, shell, ball, box and torus are centred on the origin, flat ones in z = 0;
 * tube, cylinder, helix stand on z = 0 about the z axis; a cone has its apex at the origin and opens upwards. Move and turn them with
 * {@link Region#movedBy} and {@link Region#turnedAbout}. Lengths are formulas in m, without free names.
 */
public final class Bodies {
    private static final Formula ZERO = Formula.constant(0);
    private static final Formula ORIGIN = length(0);
    private static final Formula FULL_TURN = Formula.constant(2 * Math.PI);

    private Bodies() {
    }

    private static Formula length(double si) {
        return Formula.constant(Amount.si(si, 0, Units.LENGTH));
    }

    private static Formula half(Formula f, int sign) {
        return f.times(Formula.constant(0.5 * sign));
    }

    /** Errors: AuthorException unless the formula is a finite length > 0. */
    private static double positive(String what, Formula f) {
        f.requireDimension(Units.LENGTH, what, Map.of());
        double v = f.amount().si();
        if (!(v > 0) || Double.isInfinite(v)) {
            throw new AuthorException(what + " = " + v + " m: must be finite and > 0. Check the sign and the unit prefix.");
        }
        return v;
    }

    private static CoordinateRegion round() {
        return CoordinateRegion.in(CoordinateSystem.CYLINDRICAL);
    }

    /** Straight from one place to another; the parameter u runs from 0 to 1 and may be used in the density. */
    public static Region rod(Place a, Place b) {
        if (a.equals(b)) {
            throw new AuthorException("rod from (" + a.x() + ", " + a.y() + ", " + a.z() + ") m to the same place: it has no length.");
        }
        Formula u = Formula.variable("u");
        return ParametricRegion.of(between(a.x(), b.x(), u), between(a.y(), b.y(), u), between(a.z(), b.z(), u))
            .over("u", ZERO, Formula.constant(1));
    }

    private static Formula between(double a, double b, Formula u) {
        return a == b ? length(a) : length(a).plus(length(b - a).times(u));
    }

    /** Rods from each place to the next. */
    public static Region polyline(List<Place> places) {
        if (places.size() < 2) {
            throw new AuthorException("polyline of " + places.size() + " place(s): give at least two.");
        }
        List<Region> rods = new ArrayList<>();
        for (int i = 0; i + 1 < places.size(); i++) {
            rods.add(rod(places.get(i), places.get(i + 1)));
        }
        return new RegionParts(rods);
    }

    public static CoordinateRegion ring(Formula radius) {
        return arc(radius, ZERO, FULL_TURN);
    }

    /** Part of a ring between two values of phi. */
    public static CoordinateRegion arc(Formula radius, Formula from, Formula to) {
        positive("ring radius", radius);
        return round().fixed("rho", radius).limits("phi", from, to).fixed("z", ORIGIN);
    }

    public static CoordinateRegion disc(Formula radius) {
        positive("disc radius", radius);
        return round().limits("rho", ORIGIN, radius).limits("phi", ZERO, FULL_TURN).fixed("z", ORIGIN);
    }

    public static CoordinateRegion annulus(Formula inner, Formula outer) {
        positive("inner radius", inner);
        positive("outer radius", outer);
        return round().limits("rho", inner, outer).limits("phi", ZERO, FULL_TURN).fixed("z", ORIGIN);
    }

    /** Sides along x and y. */
    public static CoordinateRegion rectangle(Formula alongX, Formula alongY) {
        positive("side along x", alongX);
        positive("side along y", alongY);
        return CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", half(alongX, -1), half(alongX, 1))
            .limits("y", half(alongY, -1), half(alongY, 1)).fixed("z", ORIGIN);
    }

    /**
     * Flat, simple polygon by its corners in order (either way round), cut into triangles by ears.
     * Errors: AuthorException for fewer than three corners, corners not in one plane, or sides that cross.
     */
    public static Region polygon(List<Place> corners) {
        return new RegionParts(PolygonEars.triangles(corners));
    }

    static Region triangle(double[] a, double[] b, double[] c) {
        return TriangleRegion.of(a, b, c);
    }

    /** Spherical surface. */
    public static CoordinateRegion shell(Formula radius) {
        positive("shell radius", radius);
        return CoordinateRegion.in(CoordinateSystem.SPHERICAL).fixed("r", radius).limits("theta", ZERO, Formula.constant(Math.PI))
            .limits("phi", ZERO, FULL_TURN);
    }

    /** Open cylindrical surface from z = 0 to its length. */
    public static CoordinateRegion tube(Formula radius, Formula length) {
        positive("tube radius", radius);
        positive("tube length", length);
        return round().fixed("rho", radius).limits("phi", ZERO, FULL_TURN).limits("z", ORIGIN, length);
    }

    public static CoordinateRegion ball(Formula radius) {
        positive("ball radius", radius);
        return CoordinateRegion.in(CoordinateSystem.SPHERICAL).limits("r", ORIGIN, radius).limits("theta", ZERO, Formula.constant(Math.PI))
            .limits("phi", ZERO, FULL_TURN);
    }

    public static CoordinateRegion box(Formula alongX, Formula alongY, Formula alongZ) {
        positive("side along x", alongX);
        positive("side along y", alongY);
        positive("side along z", alongZ);
        return CoordinateRegion.in(CoordinateSystem.CARTESIAN).limits("x", half(alongX, -1), half(alongX, 1))
            .limits("y", half(alongY, -1), half(alongY, 1)).limits("z", half(alongZ, -1), half(alongZ, 1));
    }

    /** Solid, from z = 0 to its height. */
    public static CoordinateRegion cylinder(Formula radius, Formula height) {
        positive("cylinder radius", radius);
        positive("cylinder height", height);
        return round().limits("rho", ORIGIN, radius).limits("phi", ZERO, FULL_TURN).limits("z", ORIGIN, height);
    }

    /** Solid, apex at the origin, base of this radius at z = height. */
    public static CoordinateRegion cone(Formula radius, Formula height) {
        positive("cone radius", radius);
        positive("cone height", height);
        Formula slope = radius.over(height);
        return round().limits("z", ORIGIN, height).limits("phi", ZERO, FULL_TURN).limits("rho", ORIGIN, slope.times(Formula.variable("z")));
    }

    /** Solid torus about the z axis: radius of the centre line, radius of the tube. Parameters s (0 to 1 outwards), alpha, beta. */
    public static Region torus(Formula major, Formula minor) {
        double a = positive("torus radius", major);
        double b = positive("tube radius", minor);
        if (b > a) {
            throw new AuthorException("torus: tube radius = " + b + " m is above the radius of its centre line = " + a
                + " m, so that it would cut itself. Make the tube thinner.");
        }
        Formula s = Formula.variable("s");
        Formula distance = Formula.parse("A + B*s*cos(beta)").substitute(Map.of("A", major, "B", minor));
        Formula x = distance.times(Formula.parse("cos(alpha)"));
        Formula y = distance.times(Formula.parse("sin(alpha)"));
        Formula z = minor.times(s).times(Formula.parse("sin(beta)"));
        return ParametricRegion.of(x, y, z).over("alpha", ZERO, FULL_TURN).over("s", ZERO, Formula.constant(1)).over("beta", ZERO, FULL_TURN);
    }

    /** Wire helix about the z axis from z = 0; the parameter t runs from 0 to 2π·turns. */
    public static Region helix(Formula radius, Formula pitch, Formula turns) {
        positive("helix radius", radius);
        positive("helix pitch", pitch);
        Formula x = radius.times(Formula.parse("cos(t)"));
        Formula y = radius.times(Formula.parse("sin(t)"));
        Formula z = pitch.times(Formula.variable("t")).over(FULL_TURN);
        return ParametricRegion.of(x, y, z).over("t", ZERO, turns.times(FULL_TURN));
    }
}

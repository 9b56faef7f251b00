package fieldwright.words;

import fieldwright.geometry.Region;

/** A region in the words of a sheet: point, line, surface or volume, placed where it stands. Immutable. */
public class Shape {
    private final Region region;

    Shape(Region region) {
        this.region = region;
    }

    /** The region as the engine takes it. */
    public Region region() {
        return region;
    }

    /** How many coordinates have limits: 0 point, 1 line, 2 surface, 3 volume. */
    public final int dimension() {
        return region().dimension();
    }

    /** The same region displaced; its limits and the density on it are read in its own frame and travel with it. */
    public final Shape movedBy(Object dx, Object dy, Object dz) {
        return new Shape(region().movedBy(Given.length("movedBy, x", dx), Given.length("movedBy, y", dy), Given.length("movedBy, z", dz)));
    }

    /**
     * The same region turned about an axis of the sheet through the origin, right-handed.
     *
     * @param axis {@code "x"}, {@code "y"} or {@code "z"}
     * @param angle in radian unless a unit says otherwise: {@code "30 deg"}
     */
    public final Shape turnedAbout(String axis, Object angle) {
        double[] direction = Words.axis("turnedAbout", axis);
        return new Shape(region().turnedAbout(direction[0], direction[1], direction[2], Given.plain("turnedAbout, angle", angle)));
    }
}

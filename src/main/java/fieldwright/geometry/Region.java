package fieldwright.geometry;

import java.util.ArrayList;
import java.util.List;

/**
 * A point, line, surface or volume. Data only: building one costs nothing, {@link #charts} makes the numeric maps and
 * checks everything the formulas say.
 */
public sealed interface Region permits CoordinateRegion, ParametricRegion, TriangleRegion, PlacedRegion, RegionParts {

    /** 0 point, 1 line, 2 surface, 3 volume. */
    int dimension();

    /**
     * Numeric maps, one per part, each with the frame it stands in.
     * Errors: AuthorException naming coordinate, values and remedy for a missing coordinate, a cycle in the limits, a
     * unit that does not fit, a lower limit above the upper.
     */
    List<PlacedChart> charts();

    /** One part's map in its own frame, and where that frame stands. */
    record PlacedChart(Chart chart, Frame frame) { }

    /** The region displaced (m); limits and density go on being read in its own frame. */
    default Region movedBy(double dx, double dy, double dz) {
        return new PlacedRegion(this, Frame.moved(dx, dy, dz));
    }

    /** The region turned about an axis through the sheet's origin, right-handed, angle in rad. */
    default Region turnedAbout(double ax, double ay, double az, double angle) {
        if (!(ax * ax + ay * ay + az * az > 0) || !Double.isFinite(angle)) {
            throw new fieldwright.quantity.AuthorException("turnedAbout: axis (" + ax + ", " + ay + ", " + az + ") and angle "
                + angle + " rad: give an axis that is not zero and a finite angle, for example turnedAbout(\"z\", \"30 deg\").");
        }
        return new PlacedRegion(this, Frame.turned(ax, ay, az, angle));
    }

    static String kind(int dimension) {
        return switch (dimension) {
            case 0 -> "point";
            case 1 -> "line";
            case 2 -> "surface";
            default -> "volume";
        };
    }

    static List<PlacedChart> placed(List<PlacedChart> charts, Frame frame) {
        List<PlacedChart> all = new ArrayList<>();
        for (PlacedChart c : charts) {
            all.add(new PlacedChart(c.chart(), c.frame().isOwn() ? frame : c.frame().then(frame)));
        }
        return all;
    }
}

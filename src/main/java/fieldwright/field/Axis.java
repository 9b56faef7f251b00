package fieldwright.field;

import java.util.List;

import fieldwright.charge.Charge;
import fieldwright.charge.PointCharge;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.geometry.Frame;
import fieldwright.geometry.PlacedRegion;
import fieldwright.geometry.Region;

/** A line about which charge may be turned without any change: sums over such a body need no azimuth. */
record Axis(double[] at, double[] along) {
    private static final double ROUNDING = 1e-14;

    /** The axis a charge is stated about; null when it has none, or is stated otherwise. */
    static Axis of(Source source) {
        return source instanceof Charge charge ? of(charge.region(), charge.density(), Frame.OWN) : null;
    }

    private static Axis of(Region region, Formula density, Frame frame) {
        if (region instanceof PlacedRegion placed) {
            return of(placed.inner(), density, placed.frame().then(frame));
        }
        if (!(region instanceof CoordinateRegion c) || c.system() == CoordinateSystem.CARTESIAN || dependsOnAzimuth(density)) {
            return null;
        }
        for (Extent e : c.extents().values()) {
            if (e.variables().contains("phi")) {
                return null;
            }
        }
        boolean full = c.extents().get("phi") instanceof Extent.Limits l && l.variables().isEmpty()
            && Math.abs(l.to().compile(List.of()).at() - l.from().compile(List.of()).at() - 2 * Math.PI) < 1e-14;
        return full ? new Axis(frame.toSheet(new double[3]), frame.directionToSheet(new double[] {0, 0, 1})) : null;
    }

    private static boolean dependsOnAzimuth(Formula density) {
        return density.variables().contains("phi") || density.variables().contains("x") || density.variables().contains("y");
    }

    /** Whether a turn about this axis changes nothing in the source; null is no source. */
    boolean fits(Source source) {
        if (source instanceof Sources many) {
            return many.parts().stream().allMatch(this::fits);
        }
        if (source instanceof PointCharge point) {
            return contains(Images.coordinates(point.at()));
        }
        Axis other = of(source);
        return other != null && contains(other.at) && isParallel(other.along);
    }

    /** Whether a turn about this axis changes nothing in the surroundings; false for any it does not know. */
    boolean fits(Surroundings around) {
        if (around instanceof Surroundings.GroundPlane g) {
            return isParallel(unit(g.axis()));
        }
        if (around instanceof Surroundings.DielectricHalfSpace d) {
            return isParallel(unit(d.axis()));
        }
        if (around instanceof Surroundings.GroundedPair p) {
            return isParallel(unit(p.axis()));
        }
        if (around instanceof Surroundings.ConductingSphere s) {
            return contains(new double[] {s.x(), s.y(), s.z()});
        }
        if (around instanceof Surroundings.Applied a) {
            double[] e = {a.ex(), a.ey(), a.ez()};
            return fits(a.around()) && Vectors.norm(Vectors.cross(e, along)) <= ROUNDING * Vectors.norm(e);
        }
        return around instanceof Surroundings.FreeSpace || around instanceof Surroundings.Medium;
    }

    boolean contains(double[] p) {
        double[] d = Vectors.minus(p, at);
        double size = Vectors.norm(p) + Vectors.norm(at);
        return Vectors.norm(Vectors.cross(d, along)) <= ROUNDING * size;
    }

    private boolean isParallel(double[] other) {
        return Vectors.norm(Vectors.cross(other, along)) <= ROUNDING;
    }

    private static double[] unit(String axis) {
        double[] v = new double[3];
        v["xyz".indexOf(axis)] = 1;
        return v;
    }

    /** The component along the axis, which is all that is left of a vector over a full turn. */
    double[] projected(double[] v) {
        double length = Vectors.dot(v, along);
        return new double[] {length * along[0], length * along[1], length * along[2]};
    }
}

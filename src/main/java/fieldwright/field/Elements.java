package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.charge.Charge;
import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.PointCharge;
import fieldwright.charge.PointCloud;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.quantity.AuthorException;

/** A source taken apart: point charges and spread charges, each alone. */
final class Elements {
    private Elements() {
    }

    /** Parts without zero charges, in the order stated. */
    static List<Source> of(Source source) {
        List<Source> all = new ArrayList<>();
        add(source, all);
        return all;
    }

    private static void add(Source source, List<Source> all) {
        if (source instanceof Sources many) {
            many.parts().forEach(p -> add(p, all));
        } else if (!isZero(source)) {
            all.add(source);
        }
    }

    private static boolean isZero(Source part) {
        if (part instanceof PointCharge point) {
            return point.charge().si() == 0 && point.charge().error() == 0;
        }
        return part instanceof Charge charge && charge.density().variables().isEmpty() && charge.density().amount().si() == 0 && charge.density().amount().error() == 0;
    }

    /** 0 point, 1 line, 2 surface, 3 volume. */
    static int dimension(Source part) {
        return part instanceof Charge charge ? charge.region().dimension() : part instanceof ChargedPolyline ? 1 : 0;
    }

    static boolean isEndless(Source part) {
        if (!(part instanceof Charge)) {
            return false;
        }
        Compiled c = Compiled.of(part, ClosedForms.OFF);
        return c.hasEndlessKernel() || c.hasEndlessChart();
    }

    /** A place with its charge, and the relative error of that. */
    record Point(double[] at, double charge, double relative) { }

    /** The points of a point charge or a cloud. */
    static List<Point> points(Source part) {
        List<Point> all = new ArrayList<>();
        if (part instanceof PointCharge point) {
            double q = point.charge().si();
            all.add(new Point(Images.coordinates(point.at()), q, q == 0 ? 0 : point.charge().error() / Math.abs(q)));
        } else if (part instanceof PointCloud cloud) {
            double[][] c = cloud.columns();
            for (int i = 0; i < cloud.size(); i++) {
                all.add(new Point(new double[] {c[0][i], c[1][i], c[2][i]}, c[3][i], 0));
            }
        }
        return all;
    }

    static void refuseEndless(String question, Source part) {
        if (isEndless(part)) {
            throw new AuthorException(question + " of endless charge: the whole has no finite value. Give the region finite limits, "
                + "for one metre of it \"0\" to \"1 m\", and divide by the length.");
        }
    }
}

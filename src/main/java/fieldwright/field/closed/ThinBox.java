package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A thin box seen from outside as a Gauss sum of sheets across its thickness, or of rods across its width and thickness:
 * the difference of faces, which loses length/thickness digits, does not arise. The sheets' field is smooth across the thickness
 * up to the complex heights at which the place meets a side, which sets the number of points.
 */
final class ThinBox {
    /** Ratio of sides from which a box counts as thin. */
    private static final double THIN = 8;
    private static final double LEAST_BERNSTEIN = 3;

    private final Box box;
    private final double[] from;
    private final double[] to;
    private final double[] place;
    private final double[] slope;
    private final double placeError;
    /** Axes by length of side: thickness, width, length. */
    private final int thick;
    private final int wide;
    private final int along;

    private double errE;
    private double errV;
    private double v;
    private final double[] e = new double[3];

    private ThinBox(Box box, double x, double y, double z, double placeError) {
        this.box = box;
        from = new double[] {box.x1(), box.y1(), box.z1()};
        to = new double[] {box.x2(), box.y2(), box.z2()};
        place = new double[] {x, y, z};
        slope = new double[] {box.slopeX(), box.slopeY(), box.slopeZ()};
        this.placeError = placeError + EPS * box.reach();
        int least = 0;
        int most = 0;
        for (int i = 1; i < 3; i++) {
            least = side(i) < side(least) ? i : least;
            most = side(i) >= side(most) ? i : most;
        }
        thick = least;
        along = most;
        wide = 3 - least - most;
    }

    /** The answer for a thin box at a place far enough for it, else null. */
    static Closed at(Box box, double x, double y, double z, double placeError) {
        double least = Math.min(box.x2() - box.x1(), Math.min(box.y2() - box.y1(), box.z2() - box.z1()));
        double most = Math.max(box.x2() - box.x1(), Math.max(box.y2() - box.y1(), box.z2() - box.z1()));
        if (least * THIN > most) {
            return null;
        }
        ThinBox thin = new ThinBox(box, x, y, z, placeError);
        double asRods = thin.bernsteinOfRods();
        double asSheets = thin.bernsteinOfSheets();
        if (asRods >= LEAST_BERNSTEIN) {
            thin.addRods(GaussRule.of(GaussRule.pointsFor(asRods)));
        } else if (asSheets >= LEAST_BERNSTEIN) {
            thin.addSheets(GaussRule.of(GaussRule.pointsFor(asSheets)));
        } else {
            return null;
        }
        return Closed.regular(thin.e[0], thin.e[1], thin.e[2], thin.v, thin.errE, thin.errV);
    }

    private double side(int axis) {
        return to[axis] - from[axis];
    }

    private double middle(int axis) {
        return 0.5 * (from[axis] + to[axis]);
    }

    /** How far the place lies outside the limits of an axis; negative inside. */
    private double outside(int axis) {
        return Math.max(from[axis] - place[axis], place[axis] - to[axis]);
    }

    private double bernsteinOfRods() {
        if (side(wide) * THIN > side(along)) {
            return 0;
        }
        double across = Math.hypot(place[thick] - middle(thick), place[wide] - middle(wide));
        double distance = Math.hypot(across, Math.max(0, outside(along)));
        double reach = 0.5 * Math.hypot(side(thick), side(wide));
        return distance > 2 * reach ? GaussRule.bernstein(0.9 * distance / reach, 0) : 0;
    }

    private double bernsteinOfSheets() {
        double half = 0.5 * side(thick);
        double u = (place[thick] - middle(thick)) / half;
        double a = outside(wide);
        double b = outside(along);
        boolean over = a < 0 && b < 0;
        if (over && Math.abs(u) <= 1) {
            return 0;
        }
        double gap = over ? Math.min(-a, -b) : Math.hypot(Math.max(0, a), Math.max(0, b));
        return GaussRule.bernstein(u, gap / half);
    }

    private void addSheets(GaussRule rule) {
        double half = 0.5 * side(thick);
        for (int i = 0; i < rule.nodes().length; i++) {
            double t = middle(thick) + half * rule.nodes()[i];
            double w = half * rule.weights()[i];
            Polygon sheet = Polygon.rectangle(from[wide], to[wide], from[along], to[along], w * (box.density() + slope[thick] * t),
                    w * slope[wide], w * slope[along]);
            add(sheet.at(place[wide], place[along], place[thick] - t, placeError), wide, along, thick);
        }
    }

    private void addRods(GaussRule rule) {
        for (int i = 0; i < rule.nodes().length; i++) {
            double t = middle(thick) + 0.5 * side(thick) * rule.nodes()[i];
            for (int j = 0; j < rule.nodes().length; j++) {
                double s = middle(wide) + 0.5 * side(wide) * rule.nodes()[j];
                double w = 0.25 * side(thick) * side(wide) * rule.weights()[i] * rule.weights()[j];
                Rod rod = new Rod(from[along], to[along], w * (box.density() + slope[thick] * t + slope[wide] * s), w * slope[along]);
                add(rod.at(place[thick] - t, place[wide] - s, place[along], placeError), thick, wide, along);
            }
        }
    }

    /** Adds one part's answer, whose local x, y, z are the given axes. */
    private void add(Closed part, int x, int y, int z) {
        e[x] += part.ex();
        e[y] += part.ey();
        e[z] += part.ez();
        v += part.v();
        errE += part.errE() + 4 * EPS * part.fieldLength();
        errV += part.errV() + 4 * EPS * Math.abs(part.v());
    }
}

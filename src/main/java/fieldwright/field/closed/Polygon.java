package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

import java.util.Arrays;

/**
 * A flat polygon in the plane z = 0, convex or not, sides not crossing (a hole by a slit), corners in either sense of rotation; charge per
 * area density + slopeX·x + slopeY·y.
 *
 * <p>Source: Wilton, Rao, Glisson, Schaubert, Al-Bundak and Butler, IEEE Trans. Antennas Propag. 32 (1984) 276, uniform and
 * linear source on polygons (from memory; derived anew from ∇'(1/R) and the divergence theorem in the plane): sums over sides
 * of ∫ dl/R and of the angle β. Beyond three circumscribed radii a Gauss rule on the triangles of a fan, kernel less kernel at
 * the centroid.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 sizes (rectangle, triangle, L, uniform and sloping) within 0.03 of max(1e-12,
 * 8 eps size/gap); stated bound at least 10 times the true error there, and never below it for random polygons of width/length down to
 * 1e-4. Loose at narrow tips, where it does not see the pulls of two close sides cancel.
 */
public record Polygon(double[] cornerX, double[] cornerY, double density, double slopeX, double slopeY) implements ClosedForm {
    private static final double FAR = 3;

    public Polygon {
        if (cornerX.length != cornerY.length || cornerX.length < 3) {
            throw new IllegalArgumentException("polygon with " + cornerX.length + " x and " + cornerY.length
                    + " y values of corners: needs as many of each, at least 3.");
        }
        cornerX = cornerX.clone();
        cornerY = cornerY.clone();
        for (int i = 0; i < cornerX.length; i++) {
            Rounding.requireFinite("polygon corner " + (i + 1) + " x", cornerX[i]);
            Rounding.requireFinite("polygon corner " + (i + 1) + " y", cornerY[i]);
            int next = (i + 1) % cornerX.length;
            Rounding.requireLength("polygon side " + (i + 1), Math.hypot(cornerX[next] - cornerX[i], cornerY[next] - cornerY[i]));
        }
        Rounding.requireFinite("polygon charge density", density);
        Rounding.requireFinite("slope in x of the polygon's charge density", slopeX);
        Rounding.requireFinite("slope in y of the polygon's charge density", slopeY);
        double area = signedArea(cornerX, cornerY);
        double extent = reach(cornerX, cornerY);
        if (Math.abs(area) <= 16 * EPS * extent * extent) {
            throw new IllegalArgumentException("polygon area = " + area + ": the corners lie on one line. Use a rod.");
        }
        refuseCrossing(cornerX, cornerY);
        if (area < 0) {
            reverse(cornerX);
            reverse(cornerY);
        }
    }

    /** A rectangle from (x1, y1) to (x2, y2) with charge per area density + slopeX·x + slopeY·y. */
    public static Polygon rectangle(double x1, double x2, double y1, double y2, double density, double slopeX, double slopeY) {
        return new Polygon(new double[] {x1, x2, x2, x1}, new double[] {y1, y1, y2, y2}, density, slopeX, slopeY);
    }

    /** A polygon with the same charge on every area. */
    public static Polygon uniform(double[] cornerX, double[] cornerY, double density) {
        return new Polygon(cornerX, cornerY, density, 0, 0);
    }

    /** Sides may touch (a hole is cut by a slit of two equal sides) but not cross: the area between would count twice or not at all. */
    private static void refuseCrossing(double[] px, double[] py) {
        int n = px.length;
        for (int i = 0; i < n; i++) {
            for (int j = i + 1; j < n; j++) {
                int a = (i + 1) % n;
                int b = (j + 1) % n;
                if (side(px, py, i, a, j) * side(px, py, i, a, b) < 0 && side(px, py, j, b, i) * side(px, py, j, b, a) < 0) {
                    throw new IllegalArgumentException("polygon sides " + (i + 1) + " and " + (j + 1)
                            + " cross. Check the order of the corners, or give two polygons.");
                }
            }
        }
    }

    /** Which side of the line from corner i to corner j corner k lies on. */
    private static double side(double[] px, double[] py, int i, int j, int k) {
        return Math.signum((px[j] - px[i]) * (py[k] - py[i]) - (px[k] - px[i]) * (py[j] - py[i]));
    }

    private static void reverse(double[] values) {
        for (int i = 0, j = values.length - 1; i < j; i++, j--) {
            double kept = values[i];
            values[i] = values[j];
            values[j] = kept;
        }
    }

    private static double signedArea(double[] px, double[] py) {
        double twice = 0;
        for (int i = 1; i + 1 < px.length; i++) {
            twice += (px[i] - px[0]) * (py[i + 1] - py[0]) - (px[i + 1] - px[0]) * (py[i] - py[0]);
        }
        return 0.5 * twice;
    }

    private static double reach(double[] px, double[] py) {
        double most = 0;
        for (int i = 0; i < px.length; i++) {
            most = Math.max(most, Math.max(Math.abs(px[i]), Math.abs(py[i])));
        }
        return most;
    }

    @Override
    public double[] cornerX() {
        return cornerX.clone();
    }

    @Override
    public double[] cornerY() {
        return cornerY.clone();
    }

    @Override
    public double reach() {
        return reach(cornerX, cornerY);
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Polygon p && Arrays.equals(cornerX, p.cornerX) && Arrays.equals(cornerY, p.cornerY)
                && density == p.density && slopeX == p.slopeX && slopeY == p.slopeY;
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.hashCode(cornerX) + Arrays.hashCode(cornerY) + Double.hashCode(density);
    }

    @Override
    public String toString() {
        return "Polygon[" + Arrays.toString(cornerX) + ", " + Arrays.toString(cornerY) + ", " + density + ", " + slopeX + ", "
                + slopeY + "]";
    }

    /**
     * {@inheritDoc} On the area Ez is the mean 0 with a jump of 4 pi density. On a side or corner E is unbounded along the
     * outward normal of the side (at a corner along the sum of both), unless the density is zero there.
     */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double[] centre = centroid();
        double radius = 0;
        for (int i = 0; i < cornerX.length; i++) {
            radius = Math.max(radius, Math.hypot(cornerX[i] - centre[0], cornerY[i] - centre[1]));
        }
        double dx = x - centre[0];
        double dy = y - centre[1];
        boolean far = dx * dx + dy * dy + z * z > FAR * FAR * radius * radius;
        return far ? far(dx, dy, z, centre, radius, placeError) : near(x, y, z, placeError);
    }

    private double[] centroid() {
        double twice = 0;
        double mx = 0;
        double my = 0;
        for (int i = 1; i + 1 < cornerX.length; i++) {
            double ax = cornerX[i] - cornerX[0];
            double ay = cornerY[i] - cornerY[0];
            double bx = cornerX[i + 1] - cornerX[0];
            double by = cornerY[i + 1] - cornerY[0];
            double part = ax * by - bx * ay;
            twice += part;
            mx += part * (ax + bx);
            my += part * (ay + by);
        }
        return new double[] {cornerX[0] + mx / (3 * twice), cornerY[0] + my / (3 * twice)};
    }

    private Closed near(double x, double y, double z, double placeError) {
        boolean flat = Math.abs(z) <= placeError;
        double h = flat ? 0 : Math.abs(z);
        double atFoot = density + slopeX * x + slopeY * y;
        double slope = Math.hypot(slopeX, slopeY);
        double footError = 2 * EPS * (Math.abs(density) + Math.abs(slopeX * x) + Math.abs(slopeY * y)) + slope * placeError;
        SideSums sums = new SideSums(x, y, h, placeError, slopeX, slopeY);
        for (int i = 0; i < cornerX.length; i++) {
            int next = (i + 1) % cornerX.length;
            sums.addSide(cornerX[i], cornerY[i], cornerX[next], cornerY[next]);
        }
        double v0 = sums.potential();
        double v = atFoot * v0 + slopeX * sums.momentX + slopeY * sums.momentY;
        double q = Math.abs(atFoot);
        double errV = q * sums.errPotential() + footError * sums.potentialTerms + slope * sums.errMoment;
        if (sums.touched && q > footError) {
            double edge = Math.signum(atFoot);
            return Closed.onEdge(Closed.Direction.of(edge * sums.touchX, edge * sums.touchY, 0), v, errV);
        }
        double ex = atFoot * sums.fieldX + sums.weightedX - slopeX * v0;
        double ey = atFoot * sums.fieldY + sums.weightedY - slopeY * v0;
        double ez = Math.signum(z) * (atFoot * sums.angle - h * sums.slopeLog);
        double errE = q * (sums.errField + placeError * sums.tide()) + footError * sums.fieldTerms() + slope * (sums.errWeighted + sums.errPotential());
        if (!flat) {
            return Closed.regular(ex, ey, ez, v, errE, errV);
        }
        boolean inside = sums.angle > Math.PI;
        Closed there = Closed.regular(ex, ey, 0, v, errE, errV);
        return inside && !sums.touched ? there.withJump(new Closed.Direction(0, 0, 1), 4 * Math.PI * atFoot) : there;
    }

    private Closed far(double dx, double dy, double z, double[] centre, double radius, double placeError) {
        double distance = Math.sqrt(dx * dx + dy * dy + z * z);
        GaussRule rule = GaussRule.of(GaussRule.pointsFor(GaussRule.bernstein(0.9 * distance / radius, 0)));
        double atCentre = density + slopeX * centre[0] + slopeY * centre[1];
        FarSum sum = new FarSum(dx, dy, z);
        double twiceArea = 0;
        double crossTerms = 0;
        for (int i = 0; i < cornerX.length; i++) {
            int next = (i + 1) % cornerX.length;
            double px = cornerX[i] - centre[0];
            double py = cornerY[i] - centre[1];
            double ex = cornerX[next] - cornerX[i];
            double ey = cornerY[next] - cornerY[i];
            double twice = px * ey - ex * py;
            twiceArea += twice;
            crossTerms += radius * Math.hypot(ex, ey);
            addTriangle(sum, rule, px, py, ex, ey, twice, atCentre);
        }
        double total = 0.5 * twiceArea * atCentre;
        double sumOfSizes = Math.abs(density) + Math.abs(slopeX * centre[0]) + Math.abs(slopeY * centre[1]);
        // a narrow polygon's area and centroid are known to the rounding of length times length
        double totalError = 2 * EPS * crossTerms * (sumOfSizes + radius * Math.hypot(slopeX, slopeY))
                + EPS * Math.abs(twiceArea) * reach() * Math.hypot(slopeX, slopeY);
        return sum.with(total, totalError, placeError);
    }

    /** The triangle from the centre to a side p, p + e, in coordinates u (from the centre) and w (along the side). */
    private void addTriangle(FarSum sum, GaussRule rule, double px, double py, double ex, double ey, double twice, double atCentre) {
        for (int i = 0; i < rule.nodes().length; i++) {
            double u = 0.5 * (1 + rule.nodes()[i]);
            double outer = 0.25 * rule.weights()[i] * u * twice;
            for (int j = 0; j < rule.nodes().length; j++) {
                double w = 0.5 * (1 + rule.nodes()[j]);
                double sx = u * (px + w * ex);
                double sy = u * (py + w * ey);
                sum.add(outer * rule.weights()[j] * (atCentre + slopeX * sx + slopeY * sy), sx, sy, 0);
            }
        }
    }
}

package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A box with sides along the axes and charge per volume density + slopeX·x + slopeY·y + slopeZ·z.
 *
 * <p>Source: the polyhedron forms of Wilton et al., IEEE Trans. Antennas Propag. 32 (1984) 276, and MacMillan, The Theory of the
 * Potential, 1930, on the homogeneous rectangular parallelepiped (from memory; the linear part derived anew by the divergence theorem): E = Σ n V over
 * the faces, V = ½ Σ h V over the faces, every face by its four sides and its solid angle. Beyond three half-diagonals (two for a sloping density) a
 * Gauss rule on the kernel less the kernel at the middle; a thin box from outside by a Gauss sum of sheets or rods.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 sizes, sides 1:1e-4, within 0.1 of max(1e-12, 8 eps size/min(gap, thickness));
 * stated bound at least 2.7 times the true error. Inside or close above a thin box length/thickness digits are lost, and stated.
 */
public record Box(double x1, double x2, double y1, double y2, double z1, double z2, double density, double slopeX, double slopeY,
        double slopeZ) implements ClosedForm {
    private static final double FAR = 3;
    /** The sums of a sloping density lose digits sooner. */
    private static final double FAR_SLOPING = 2;

    public Box {
        requireSide("x", x1, x2);
        requireSide("y", y1, y2);
        requireSide("z", z1, z2);
        Rounding.requireFinite("box charge density", density);
        Rounding.requireFinite("slope in x of the box's charge density", slopeX);
        Rounding.requireFinite("slope in y of the box's charge density", slopeY);
        Rounding.requireFinite("slope in z of the box's charge density", slopeZ);
    }

    private static void requireSide(String axis, double from, double to) {
        Rounding.requireFinite("box " + axis + "1", from);
        Rounding.requireLength("box side " + axis + "2 - " + axis + "1", to - from);
    }

    /** A box with the same charge in every volume. */
    public static Box uniform(double x1, double x2, double y1, double y2, double z1, double z2, double density) {
        return new Box(x1, x2, y1, y2, z1, z2, density, 0, 0, 0);
    }

    @Override
    public double reach() {
        return Math.max(Math.max(Math.max(Math.abs(x1), Math.abs(x2)), Math.max(Math.abs(y1), Math.abs(y2))),
                Math.max(Math.abs(z1), Math.abs(z2)));
    }

    /** {@inheritDoc} Field and potential are finite and continuous everywhere, on faces, edges and corners too. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double ax = 0.5 * (x2 - x1);
        double ay = 0.5 * (y2 - y1);
        double az = 0.5 * (z2 - z1);
        double dx = x - 0.5 * (x1 + x2);
        double dy = y - 0.5 * (y1 + y2);
        double dz = z - 0.5 * (z1 + z2);
        double enough = slopeX == 0 && slopeY == 0 && slopeZ == 0 ? FAR : FAR_SLOPING;
        boolean far = dx * dx + dy * dy + dz * dz > enough * enough * (ax * ax + ay * ay + az * az);
        if (far) {
            return far(dx, dy, dz, ax, ay, az, placeError);
        }
        Closed thin = ThinBox.at(this, x, y, z, placeError);
        return thin != null ? thin : near(x, y, z, placeError);
    }

    private Closed near(double x, double y, double z, double placeError) {
        double[] from = {x1 - x, y1 - y, z1 - z};
        double[] to = {x2 - x, y2 - y, z2 - z};
        double[] side = {x2 - x1, y2 - y1, z2 - z1};
        double[] slope = {slopeX, slopeY, slopeZ};
        double atPlace = density + slopeX * x + slopeY * y + slopeZ * z;
        BoxSums sums = new BoxSums(from, to, side, slope, placeError);
        double[] e = new double[3];
        double v = atPlace * sums.potential;
        for (int i = 0; i < 3; i++) {
            e[i] = atPlace * sums.field[i] + sums.weighted[i] - slope[i] * sums.potential;
            v += slope[i] * sums.moment[i];
        }
        double steep = Math.abs(slopeX) + Math.abs(slopeY) + Math.abs(slopeZ);
        double q = Math.abs(atPlace);
        double placeDensityError = 2 * EPS * (Math.abs(density) + Math.abs(slopeX * x) + Math.abs(slopeY * y) + Math.abs(slopeZ * z))
                + steep * placeError;
        double errE = q * sums.errField + placeDensityError * sums.fieldTerms + steep * (sums.errWeighted + sums.errPotential);
        double errV = q * sums.errPotential + placeDensityError * sums.potentialTerms + steep * sums.errMoment;
        return Closed.regular(e[0], e[1], e[2], v, errE, errV);
    }

    private Closed far(double dx, double dy, double dz, double ax, double ay, double az, double placeError) {
        double half = Math.sqrt(ax * ax + ay * ay + az * az);
        double mx = 0.5 * (x1 + x2);
        double my = 0.5 * (y1 + y2);
        double mz = 0.5 * (z1 + z2);
        double atMiddle = density + slopeX * mx + slopeY * my + slopeZ * mz;
        GaussRule rule = GaussRule.of(GaussRule.pointsFor(GaussRule.bernstein(0.9 * Math.sqrt(dx * dx + dy * dy + dz * dz) / half, 0)));
        int n = rule.nodes().length;
        FarSum sum = new FarSum(dx, dy, dz);
        for (int i = 0; i < n; i++) {
            double px = ax * rule.nodes()[i];
            for (int j = 0; j < n; j++) {
                double py = ay * rule.nodes()[j];
                double w = ax * ay * az * rule.weights()[i] * rule.weights()[j];
                for (int k = 0; k < n; k++) {
                    double pz = az * rule.nodes()[k];
                    sum.add(w * rule.weights()[k] * (atMiddle + slopeX * px + slopeY * py + slopeZ * pz), px, py, pz);
                }
            }
        }
        double volume = 8 * ax * ay * az;
        double sizes = Math.abs(density) + Math.abs(slopeX * mx) + Math.abs(slopeY * my) + Math.abs(slopeZ * mz);
        return sum.with(volume * atMiddle, 4 * EPS * volume * sizes, placeError);
    }
}

package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A straight rod on the z axis from z1 to z2 with charge per length density + slope·z.
 *
 * <p>Source: elementary integrals of 1/R and s/R along a line (Durand, Électrostatique I, 1964, on the charged segment;
 * from memory), L = ln((R1 + R2 + l)/(R1 + R2 - l)) with its denominator rewritten in positive terms. Beyond three
 * half-lengths from the middle a Gauss rule on the kernel less the kernel at the middle.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 lengths within 0.01 of max(1e-12, 8 eps size/gap); the stated bound was at
 * least 2.5 times the true error in every row.
 */
public record Rod(double z1, double z2, double density, double slope) implements ClosedForm {
    private static final double FAR = 3;

    public Rod {
        Rounding.requireFinite("rod end z1", z1);
        Rounding.requireLength("rod length z2 - z1", z2 - z1);
        Rounding.requireFinite("rod charge density", density);
        Rounding.requireFinite("slope of the rod's charge density", slope);
    }

    /** A rod with the same charge on every length. */
    public static Rod uniform(double z1, double z2, double density) {
        return new Rod(z1, z2, density, 0);
    }

    @Override
    public double reach() {
        return Math.max(Math.abs(z1), Math.abs(z2));
    }

    /** {@inheritDoc} On the rod E and V are unbounded; on the axis beyond its ends they are not. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        double half = 0.5 * (z2 - z1);
        double d2 = x * x + y * y;
        double fromMiddle = z - 0.5 * (z1 + z2);
        return d2 + fromMiddle * fromMiddle > FAR * FAR * half * half ? far(x, y, fromMiddle, half, placeError)
                : near(x, y, z, d2, placeError);
    }

    private Closed near(double x, double y, double z, double d2, double placeError) {
        Edge e = new Edge(z1 - z, z2 - z, z2 - z1, d2, placeError);
        double atFoot = density + slope * z;
        double footError = EPS * (Math.abs(density) + Math.abs(slope * z)) + Math.abs(slope) * placeError;
        if (e.touched) {
            return onRod(e, atFoot, footError, placeError);
        }
        double ratio = e.cubed * d2; // [s/R]
        double along = e.inverseFall();
        double across = atFoot * e.cubed + slope * along;
        double ez = -(atFoot * along + slope * (e.log - ratio));
        double v = atFoot * e.log + slope * e.rise;
        double d = Math.sqrt(d2);
        double both = e.cubed * d + Math.abs(along); // bound on the field of unit density
        double absolute = Math.abs(atFoot) * both + Math.abs(slope) * (Math.abs(along) * d + e.log + Math.abs(ratio));
        // the tide of a point is at most 2/R³; ∫ |s|/R³ is at most 2/d beside the rod, |1/R1 - 1/R2| beyond its ends
        boolean beside = e.s1 < 0 && e.s2 > 0;
        double tide = 2 * Math.abs(atFoot) * e.cubed + 2 * Math.abs(slope) * (beside ? 2 / d : Math.abs(along));
        double errE = 4 * EPS * absolute + placeError * tide + footError * both;
        double errV = 4 * EPS * (Math.abs(atFoot) * e.log + Math.abs(slope) * (e.r1 + e.r2))
                + placeError * absolute + footError * e.log;
        return Closed.regular(x * across, y * across, ez, v, errE, errV);
    }

    private Closed onRod(Edge e, double atFoot, double footError, double placeError) {
        if (density == 0 && slope == 0) {
            return Closed.zero();
        }
        if (Math.abs(atFoot) > footError) {
            return Closed.onLine(atFoot);
        }
        // the density passes through zero here: V exists, E grows along the rod
        double errV = 4 * EPS * Math.abs(slope) * (e.r1 + e.r2) + 4 * Math.abs(slope) * placeError * Rounding.logarithm(z2 - z1, placeError);
        return Closed.onEdge(new Closed.Direction(0, 0, -Math.signum(slope)), slope * e.rise, errV);
    }

    private Closed far(double x, double y, double fromMiddle, double half, double placeError) {
        double middle = 0.5 * (z1 + z2);
        double atMiddle = density + slope * middle;
        double distance = Math.sqrt(x * x + y * y + fromMiddle * fromMiddle);
        GaussRule rule = GaussRule.of(GaussRule.pointsFor(GaussRule.bernstein(distance / half, 0)));
        FarSum sum = new FarSum(x, y, fromMiddle);
        for (int i = 0; i < rule.nodes().length; i++) {
            double s = half * rule.nodes()[i];
            sum.add(half * rule.weights()[i] * (atMiddle + slope * s), 0, 0, s);
        }
        double totalError = 4 * EPS * half * (Math.abs(density) + Math.abs(slope * middle));
        return sum.with(2 * half * atMiddle, totalError, placeError);
    }
}

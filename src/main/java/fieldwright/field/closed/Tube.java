package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A uniformly charged open cylindrical shell of the given radius about the z axis from z1 to z2; density is charge per area.
 *
 * <p>Source: Ez = difference of the potentials of the two end rings; Erho by complete elliptic integrals of the third kind, the
 * charged twin of the ideal solenoid (Derby and Olbert, Am. J. Phys. 78 (2010) 229; from memory), in Bulirsch's cel. V has no
 * such closed form: one integral over the azimuth of ∫ dz/R, by Gauss panels under a sinh transform. Where the shell is short beside
 * the distance from it, a Gauss sum of rings.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 (length/diameter 6e-4, 0.9 and 200) within 0.04 of max(1e-12, 8 eps
 * size/gap); stated bound at least 3 times the true error.
 */
public record Tube(double z1, double z2, double radius, double density) implements ClosedForm {
    private static final double LEAST_BERNSTEIN = 3;

    public Tube {
        Rounding.requireFinite("tube end z1", z1);
        Rounding.requireLength("tube length z2 - z1", z2 - z1);
        Rounding.requireLength("tube radius", radius);
        Rounding.requireFinite("tube charge density", density);
    }

    @Override
    public double reach() {
        return Math.max(radius, Math.max(Math.abs(z1), Math.abs(z2)));
    }

    /**
     * {@inheritDoc} On the shell the mean, normal outward, jump 4 pi density; on an end's rim Ez is unbounded, away from the tube.
     */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        if (density == 0) {
            return Closed.zero();
        }
        double rho = Math.sqrt(x * x + y * y);
        double half = 0.5 * (z2 - z1);
        double bernstein = GaussRule.bernstein((z - 0.5 * (z1 + z2)) / half, (rho - radius) / half);
        return bernstein >= LEAST_BERNSTEIN ? rings(x, y, z, placeError, GaussRule.of(GaussRule.pointsFor(bernstein)))
                : near(x, y, z, rho, placeError);
    }

    private Closed rings(double x, double y, double z, double placeError, GaussRule rule) {
        double half = 0.5 * (z2 - z1);
        double middle = 0.5 * (z1 + z2);
        double moved = placeError + EPS * (Math.abs(middle) + half);
        double[] e = new double[3];
        double v = 0;
        double errE = 0;
        double errV = 0;
        for (int i = 0; i < rule.nodes().length; i++) {
            Closed ring = new Ring(radius, half * rule.weights()[i] * density).at(x, y, z - (middle + half * rule.nodes()[i]), moved);
            e[0] += ring.ex();
            e[1] += ring.ey();
            e[2] += ring.ez();
            v += ring.v();
            errE += ring.errE() + 4 * EPS * ring.fieldLength();
            errV += ring.errV() + 4 * EPS * Math.abs(ring.v());
        }
        return Closed.regular(e[0], e[1], e[2], v, errE, errV);
    }

    private Closed near(double x, double y, double z, double rho, double placeError) {
        double moved = placeError + EPS * rho;
        double up = z2 - z;
        double down = z1 - z;
        Rim top = new Rim(radius, rho, up);
        Rim bottom = new Rim(radius, rho, down);
        boolean onTop = top.near <= moved;
        double v = potential(rho, down, up);
        double q = Math.abs(density);
        if (onTop || bottom.near <= moved) {
            double big = Rounding.logarithm(radius, moved);
            double errV = q * (16 * EPS * v + 4 * moved * (big + Math.PI));
            return Closed.onEdge(new Closed.Direction(0, 0, onTop == density > 0 ? 1 : -1), density * v, errV);
        }
        boolean onShell = Math.abs(rho - radius) <= moved && up > 0 && down < 0;
        double vTop = top.potential();
        double vBottom = bottom.potential();
        SolidAngle a = SolidAngle.ofDisc(top);
        SolidAngle b = SolidAngle.ofDisc(bottom);
        double side = onShell ? 0 : rho < radius ? -1 : 1; // on the shell the mean of both sides
        double eRho = Math.signum(up) * (a.first + side * a.second) - Math.signum(down) * (b.first + side * b.second);
        double ez = vTop - vBottom;
        double tide = 2 * (top.inverseSquare() + bottom.inverseSquare()) + Math.abs(eRho) / Math.max(rho, radius);
        double gap = Math.hypot(rho - radius, Math.max(0, Math.max(-up, down)));
        double place = moved * (gap > 0 ? Math.min(tide, 2 * v / (gap * gap)) : tide);
        double errE = q * (8 * EPS * (vTop + vBottom + a.first + a.second + b.first + b.second) + place);
        double errV = q * (16 * EPS * v + moved * (Math.abs(eRho) + Math.abs(ez) + 2 * Math.PI) + place * moved);
        Closed there = Closed.turned(x, y, rho, density * eRho, density * ez, density * v, errE, errV);
        return onShell ? there.withJump(Closed.Direction.of(x, y, 0), 4 * Math.PI * density) : there;
    }

    /** ∫ dA/R. */
    private double potential(double rho, double down, double up) {
        double gap = radius - rho;
        double spread = 4 * radius * rho;
        double length = z2 - z1;
        return 4 * radius * Azimuth.integral(Math.abs(gap) / Math.sqrt(spread),
                s -> Edge.log(down, up, length, gap * gap + spread * s));
    }
}

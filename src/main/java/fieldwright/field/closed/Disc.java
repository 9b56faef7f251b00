package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A uniformly charged disc of the given radius about the z axis in the plane z = 0; density is charge per area.
 *
 * <p>Source: solid angle and potential of a disc by complete elliptic integrals (Paxton, Rev. Sci. Instrum. 30 (1959) 254;
 * Ciftja and Hysi, Appl. Math. Lett. 24 (2011) 1919; from memory), here as rim integrals by Bulirsch's cel:
 * Erho = ∮ cos φ dl/R, Ez = solid angle = ∮ (1 - |z|/R) dψ, V = ∮ q dl/R - |z| Ω (Wilton et al., IEEE Trans. Antennas Propag. 32
 * (1984) 276, for the split of V). Beyond three radii the axial multipole series, whose moments follow from the potential on the axis.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 radii within 0.01 of max(1e-12, 8 eps size/gap); stated bound at least 4
 * times the true error.
 */
public record Disc(double radius, double density) implements ClosedForm {
    private static final double FAR = 3;
    private static final double[] MOMENTS = moments(24);

    public Disc {
        Rounding.requireLength("disc radius", radius);
        Rounding.requireFinite("disc charge density", density);
    }

    /** 2 pi binomial(1/2, n + 1): expansion of 2 pi (sqrt(z² + 1) - z). */
    private static double[] moments(int count) {
        double[] m = new double[count];
        double binomial = 0.5;
        for (int n = 0; n < count; n++) {
            m[n] = 2 * Math.PI * binomial;
            binomial *= (0.5 - (n + 1)) / (n + 2);
        }
        return m;
    }

    @Override
    public double reach() {
        return radius;
    }

    /** {@inheritDoc} On the disc Ez is the mean 0 with a jump of 4 pi density; on the rim Erho is unbounded outwards. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        if (density == 0) {
            return Closed.zero();
        }
        double rho = Math.sqrt(x * x + y * y);
        double moved = placeError + EPS * rho;
        Parts parts = parts(rho, z, moved);
        double q = Math.abs(density);
        double v = density * parts.v;
        double errV = q * parts.errV;
        if (parts.onRim) {
            return Closed.onEdge(Closed.Direction.of(density * x, density * y, 0), v, errV);
        }
        Closed there = Closed.turned(x, y, rho, density * parts.eRho, density * parts.ez, v, q * parts.errE, errV);
        return Math.abs(z) <= placeError && rho < radius ? there.withJump(new Closed.Direction(0, 0, 1), 4 * Math.PI * density) : there;
    }

    /** Field and potential of the unit disc density in cylindrical components, for this disc and for bodies built of discs. */
    record Parts(double eRho, double ez, double v, double errE, double errV, boolean onRim) {
    }

    private Parts parts(double rho, double z, double moved) {
        return rho * rho + z * z > FAR * FAR * radius * radius ? far(radius, rho, z, moved) : near(radius, rho, z, moved);
    }

    static Parts unit(double a, double rho, double z, double moved) {
        return new Disc(a, 1).parts(rho, z, moved);
    }

    private static Parts near(double a, double rho, double z, double moved) {
        Rim rim = new Rim(a, rho, z);
        if (rim.near <= moved) {
            double v = 4 * a;
            return new Parts(0, 0, v, 0, 8 * EPS * v + 2 * moved * Rounding.logarithm(a, moved) + 4 * Math.PI * moved, true);
        }
        double d = CompleteIntegral.sineSquare(rim.kc);
        double b = CompleteIntegral.cosineSquare(rim.kc);
        double scale = 4 * a / rim.far;
        double eRho = rim.m > 0.4 ? scale * (d - b) : scale * rim.m * CompleteIntegral.mixed(rim.m, rim.kc);
        double eRhoTerms = rim.m > 0.4 ? scale * (d + b) : eRho;
        SolidAngle angle = SolidAngle.ofDisc(rim);
        double flat = scale * ((a + rho) * b + (a - rho) * d);
        double flatTerms = scale * ((a + rho) * b + Math.abs(a - rho) * d);
        double h = Math.abs(z);
        double v = flat - h * angle.value;
        double tide = 2 * rim.inverseSquare();
        double errE = 8 * EPS * (eRhoTerms + angle.terms) + moved * tide;
        double errV = 8 * EPS * (flatTerms + h * angle.terms) + moved * (eRhoTerms + angle.value);
        double ez = h <= moved && rho < a ? 0 : Math.signum(z) * angle.value;
        return new Parts(eRho, ez, v, errE, errV, false);
    }

    private static Parts far(double a, double rho, double z, double moved) {
        ZonalSeries sum = new ZonalSeries(MOMENTS, a, rho, z);
        double r = Math.sqrt(rho * rho + z * z);
        double area = a * a;
        double field = Math.PI * area / (r * r);
        return new Parts(sum.eRho * area, sum.ez * area, sum.v * area, (16 * EPS + 3 * moved / r) * field, (16 * EPS * r + 2 * moved) * field, false);
    }
}

package fieldwright.field.closed;

import static fieldwright.field.closed.Rounding.EPS;

/**
 * A uniformly charged solid cylinder of the given radius about the z axis from z1 to z2; density is charge per volume.
 *
 * <p>Source: Ez = difference of the potentials of the two end discs; Erho = ∮ cos φ dA/R over the side, reduced to
 * complete elliptic integrals of the first and third kind (Derby and Olbert, Am. J. Phys. 78 (2010) 229, for the method, from memory;
 * reduction derived here). V = ½ ∮ h dA/R over all faces, the side by one integral over the azimuth. Where the cylinder is short
 * beside the distance from it, a Gauss sum of discs; beyond three radii beside a long one, a sum of rods.
 *
 * <p>Accuracy: measured against mpmath at gaps 1e-9 to 1e8 (length/diameter 6e-4, 0.9 and 200) within 0.25 of max(1e-12, 8 eps
 * size/min(gap, length)); stated bound at least 4 times the true error. Close to a flat one radius/length digits are lost, and stated.
 */
public record Cylinder(double z1, double z2, double radius, double density) implements ClosedForm {
    private static final double LEAST_BERNSTEIN = 3;
    private static final double SLENDER = 3;
    private static final int AROUND = 36;
    private static final int RADIAL = 8;

    public Cylinder {
        Rounding.requireFinite("cylinder end z1", z1);
        Rounding.requireLength("cylinder length z2 - z1", z2 - z1);
        Rounding.requireLength("cylinder radius", radius);
        Rounding.requireFinite("cylinder charge density", density);
    }

    @Override
    public double reach() {
        return Math.max(radius, Math.max(Math.abs(z1), Math.abs(z2)));
    }

    /** {@inheritDoc} Field and potential are finite and continuous everywhere. */
    @Override
    public Closed at(double x, double y, double z, double placeError) {
        Rounding.requirePlace(x, y, z, placeError);
        if (density == 0) {
            return Closed.zero();
        }
        double rho = Math.sqrt(x * x + y * y);
        double half = 0.5 * (z2 - z1);
        double u = (z - 0.5 * (z1 + z2)) / half;
        boolean inside = rho <= radius && Math.abs(u) <= 1;
        double bernstein = inside ? 1 : GaussRule.bernstein(u, (rho - radius) / half);
        if (bernstein >= LEAST_BERNSTEIN) {
            return discs(x, y, z, rho, placeError, GaussRule.of(GaussRule.pointsFor(bernstein)));
        }
        return rho > SLENDER * radius ? rods(x, y, z, rho, placeError) : near(x, y, z, rho, placeError);
    }

    /** Rods over the cross-section: trapezoidal in the azimuth (error as (radius/rho)^AROUND), Gauss in the square of the radius. */
    private Closed rods(double x, double y, double z, double rho, double placeError) {
        GaussRule rule = GaussRule.of(RADIAL);
        double eRho = 0;
        double ez = 0;
        double v = 0;
        double errE = 0;
        double errV = 0;
        for (int i = 0; i < RADIAL; i++) {
            double r = radius * Math.sqrt(0.5 * (1 + rule.nodes()[i]));
            double area = Math.PI * radius * radius * 0.5 * rule.weights()[i] / (AROUND / 2);
            for (int j = 0; j < AROUND / 2; j++) {
                double phi = 2 * Math.PI * (j + 0.5) / AROUND;
                Closed rod = Rod.uniform(z1, z2, area).at(rho - r * Math.cos(phi), r * Math.sin(phi), z, placeError + 2 * EPS * rho);
                eRho += rod.ex(); // across, the mirrored half cancels
                ez += rod.ez();
                v += rod.v();
                errE += rod.errE() + 4 * EPS * rod.fieldLength();
                errV += rod.errV() + 4 * EPS * rod.v();
            }
        }
        double q = Math.abs(density);
        return Closed.turned(x, y, rho, density * eRho, density * ez, density * v, q * errE, q * errV);
    }

    private Closed discs(double x, double y, double z, double rho, double placeError, GaussRule rule) {
        double half = 0.5 * (z2 - z1);
        double middle = 0.5 * (z1 + z2);
        double moved = placeError + EPS * (rho + Math.abs(middle) + half);
        double eRho = 0;
        double ez = 0;
        double v = 0;
        double errE = 0;
        double errV = 0;
        for (int i = 0; i < rule.nodes().length; i++) {
            double w = half * rule.weights()[i];
            Disc.Parts disc = Disc.unit(radius, rho, z - (middle + half * rule.nodes()[i]), moved);
            eRho += w * disc.eRho();
            ez += w * disc.ez();
            v += w * disc.v();
            errE += w * (disc.errE() + 4 * EPS * (Math.abs(disc.eRho()) + Math.abs(disc.ez())));
            errV += w * (disc.errV() + 4 * EPS * disc.v());
        }
        double q = Math.abs(density);
        return Closed.turned(x, y, rho, density * eRho, density * ez, density * v, q * errE, q * errV);
    }

    private Closed near(double x, double y, double z, double rho, double placeError) {
        double moved = placeError + 2 * EPS * rho;
        double up = z2 - z;
        double down = z1 - z;
        // rounding only: what the place does is told by the gradient below
        Disc.Parts top = Disc.unit(radius, rho, up, 0);
        Disc.Parts bottom = Disc.unit(radius, rho, down, 0);
        Side a = Side.of(new Rim(radius, rho, up));
        Side b = Side.of(new Rim(radius, rho, down));
        double ez = top.v() - bottom.v();
        double eRho = a.value - b.value;
        double side = sidePotential(rho, down, up);
        double v = 0.5 * (up * top.v() - down * bottom.v() + side);
        double terms = 0.5 * (Math.abs(up) * top.v() + Math.abs(down) * bottom.v() + Math.abs(side) + sideTerms(rho, down, up, side));
        double place = moved * tide(rho, down, up, top, bottom, eRho, v, moved);
        double errE = top.errV() + bottom.errV() + a.error + b.error + place;
        double errV = 8 * EPS * terms + 0.5 * (Math.abs(up) * top.errV() + Math.abs(down) * bottom.errV())
                + moved * (Math.abs(ez) + Math.abs(eRho)) + moved * place;
        double q = Math.abs(density);
        return Closed.turned(x, y, rho, density * eRho, density * ez, density * v, q * errE, q * errV);
    }

    /**
     * Bound on the gradient of the field: dEz/dz and dEz/drho are the fields of the end discs, dErho/drho follows from Gauss's law;
     * from outside also 2/R³ summed.
     */
    private double tide(double rho, double down, double up, Disc.Parts top, Disc.Parts bottom, double eRho, double v, double moved) {
        double big = 8 + 4 * Rounding.logarithm(radius, moved);
        double ends = (top.onRim() ? big : top.eRho()) + (bottom.onRim() ? big : bottom.eRho());
        double gradient = 4 * Math.PI + 2 * (Math.abs(top.ez()) + Math.abs(bottom.ez()) + ends) + Math.abs(eRho) / Math.max(rho, radius);
        double gap = Math.hypot(Math.max(0, rho - radius), Math.max(0, Math.max(-up, down)));
        return gap > 0 ? Math.min(gradient, 2 * Math.abs(v) / (gap * gap)) : gradient;
    }

    /** ∮ h dA/R over the side, h = radius - rho cos φ the distance of the place from the tangent plane. */
    private double sidePotential(double rho, double down, double up) {
        double gap = radius - rho;
        double spread = 4 * radius * rho;
        double length = z2 - z1;
        return 4 * radius * Azimuth.integral(Math.abs(gap) / Math.sqrt(spread),
                s -> (gap + 2 * rho * s) * Edge.log(down, up, length, gap * gap + spread * s));
    }

    /** Sum of the sizes of what the side's integral adds up: more than its value when the place is outside and h changes sign. */
    private double sideTerms(double rho, double down, double up, double side) {
        if (rho <= radius) {
            return side;
        }
        double gap = rho - radius;
        double spread = 4 * radius * rho;
        double length = z2 - z1;
        return side + 8 * radius * gap * Azimuth.integral(gap / Math.sqrt(spread),
                s -> Edge.log(down, up, length, gap * gap + spread * s));
    }

    /** H(ζ) = 4 a ζ/r1 · (D - p Π'), with Π' = ∫ sin²/((cos² + p sin²)Δ): the side below one end. Odd in ζ. */
    private static final class Side {
        private static final int POINTS = 13;
        final double value;
        final double error;

        private Side(double value, double error) {
            this.value = value;
            this.error = error;
        }

        static Side of(Rim rim) {
            if (rim.near == 0) {
                return new Side(0, 0);
            }
            double scale = 4 * rim.a * rim.z / rim.far;
            double root = Math.abs(rim.a - rim.rho) / (rim.a + rim.rho);
            double p = root * root;
            if (root > 2.0 / 3) { // rho below a fifth of the radius: D - p Π' = (1 - p) ∫ sin² cos²/(…)
                double width = rim.a + rim.rho;
                double value = scale * 4 * rim.a * rim.rho / (width * width) * mixed(rim, p);
                return new Side(value, 16 * EPS * Math.abs(value));
            }
            double d = CompleteIntegral.sineSquare(rim.kc);
            double third = p > 0 ? p * CompleteIntegral.cel(rim.kc, p, 0, 1) : 0;
            return new Side(scale * (d - third), 8 * EPS * Math.abs(scale) * (d + third));
        }

        /** ∫ sin² cos²/((cos² + p sin²)Δ), smooth here: the trapezoidal rule converges as (min/max radius)^(2 POINTS). */
        private static double mixed(Rim rim, double p) {
            double kc2 = rim.kc * rim.kc;
            double sum = 0;
            for (int i = 1; i < POINTS; i++) {
                double sine = Math.sin(Math.PI / 2 * i / POINTS);
                double s = sine * sine;
                double c = 1 - s;
                sum += s * c / ((c + p * s) * Math.sqrt(c + kc2 * s));
            }
            return sum * Math.PI / (2 * POINTS);
        }
    }
}

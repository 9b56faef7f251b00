package fieldwright.field;

import java.util.List;

import fieldwright.charge.Surroundings;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;

/** Surroundings as images: the field of an image charge is the charge's own field seen from a mirrored place, mirrored back. */
final class Images {
    private static final double EPS = 1e-15;

    private Images() {
    }

    /** Errors: AuthorException when the surroundings were not stated. */
    static Question question(Surroundings around, Place p) {
        if (around == null) {
            throw new AuthorException("surroundings not stated: say what stands around the charge, for example .inFreeSpace(), .inMedium(\"2.3\") or "
                + ".above(groundPlane(\"z\", \"0\")). Leaving out a grounded wall errs to the unsafe side.");
        }
        if (around instanceof Surroundings.GroundPlane plane) {
            return groundPlane(plane, p);
        }
        if (around instanceof Surroundings.DielectricHalfSpace half) {
            return halfSpace(half, p);
        }
        if (around instanceof Surroundings.GroundedSphere sphere) {
            return sphere(sphere, p);
        }
        return Question.of(List.of(Probe.direct(p.x(), p.y(), p.z())), around.permittivity());
    }

    private static int axis(String name) {
        return "xyz".indexOf(name);
    }

    static double[] coordinates(Place p) {
        return new double[] {p.x(), p.y(), p.z()};
    }

    /** Distance from a plane, positive on the charge's side, 0 within rounding. */
    static double depth(String axis, double offset, int side, double[] p) {
        double at = p[axis(axis)];
        double s = side * (at - offset);
        return Math.abs(s) <= EPS * (Math.abs(at) + Math.abs(offset)) ? 0 : s;
    }

    private static Probe mirrored(String axis, double offset, double[] p, double factor, boolean onPlane) {
        int k = axis(axis);
        double[] q = p.clone();
        q[k] = onPlane ? p[k] : 2 * offset - p[k];
        double[] a = {factor, 0, 0, 0, factor, 0, 0, 0, factor};
        a[4 * k] = -factor;
        return new Probe(q, a, null, factor);
    }

    private static double[] normal(String axis, int side) {
        double[] n = new double[3];
        n[axis(axis)] = side;
        return n;
    }

    private static Question groundPlane(Surroundings.GroundPlane g, Place place) {
        double[] p = coordinates(place);
        double s = depth(g.axis(), g.offset(), g.side(), p);
        if (s < 0) {
            return Question.of(List.of(), 1);
        }
        List<Probe> probes = List.of(Probe.direct(p[0], p[1], p[2]), mirrored(g.axis(), g.offset(), p, -1, s == 0));
        return s > 0 ? Question.of(probes, 1) : new Question(probes, 1, normal(g.axis(), g.side()), null, 1);
    }

    /** Image −q(ε₂ − ε₁)/(ε₂ + ε₁) before the interface, q·2ε₁/(ε₁ + ε₂) in place of q behind it. */
    private static Question halfSpace(Surroundings.DielectricHalfSpace d, Place place) {
        double[] p = coordinates(place);
        double s = depth(d.axis(), d.offset(), d.side(), p);
        double k = (d.behind() - d.here()) / (d.behind() + d.here());
        double through = 2 * d.here() / (d.here() + d.behind());
        Probe direct = Probe.direct(p[0], p[1], p[2]);
        List<Probe> before = List.of(direct, mirrored(d.axis(), d.offset(), p, -k, s == 0));
        List<Probe> behind = List.of(new Probe(p, new double[] {through, 0, 0, 0, through, 0, 0, 0, through}, null, through));
        if (s > 0) {
            return Question.of(before, d.here());
        }
        if (s < 0) {
            return new Question(behind, d.here(), null, null, d.behind());
        }
        return new Question(before, d.here(), normal(d.axis(), d.side()), behind, d.behind());
    }

    /** Kelvin's inversion: V = V₀(p) − (a/r) V₀(a² p/r²), places counted from the centre. */
    private static Question sphere(Surroundings.GroundedSphere g, Place place) {
        double[] p = {place.x() - g.x(), place.y() - g.y(), place.z() - g.z()};
        double r = Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]);
        double a = g.radius();
        boolean on = Math.abs(r - a) <= 4 * EPS * a;
        if (!on && g.outside() == r < a) {
            return Question.of(List.of(), 1);
        }
        Probe direct = Probe.direct(place.x(), place.y(), place.z());
        if (r < 3e-4 * a) {
            return Question.of(aroundCentre(g, p, direct), 1);
        }
        List<Probe> probes = List.of(direct, inverted(g, p, 1, on));
        if (!on) {
            return Question.of(probes, 1);
        }
        double sign = g.outside() ? 1 : -1;
        return new Question(probes, 1, new double[] {sign * p[0] / r, sign * p[1] / r, sign * p[2] / r}, null, 1);
    }

    /**
     * Near the centre the inverted place runs off to infinity: the induced field is harmonic, so its value is the mean over six places
     * round about (exact but for fourth order in their distance, 6e-4 radii).
     */
    private static List<Probe> aroundCentre(Surroundings.GroundedSphere g, double[] p, Probe direct) {
        double h = 6e-4 * g.radius();
        java.util.ArrayList<Probe> probes = new java.util.ArrayList<>(List.of(direct));
        for (int k = 0; k < 6; k++) {
            double[] q = p.clone();
            q[k / 2] += k % 2 == 0 ? h : -h;
            probes.add(inverted(g, q, 1.0 / 6, false));
        }
        return probes;
    }

    private static Probe inverted(Surroundings.GroundedSphere g, double[] p, double factor, boolean on) {
        double a = g.radius();
        double r = Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]);
        double ratio = on ? 1 : a / r;
        double[] n = {p[0] / r, p[1] / r, p[2] / r};
        double scale = on ? 1 : ratio * ratio;
        double[] q = {g.x() + scale * p[0], g.y() + scale * p[1], g.z() + scale * p[2]};
        double[] m = new double[9];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                m[3 * i + j] = -factor * ratio * ratio * ratio * ((i == j ? 1 : 0) - 2 * n[i] * n[j]);
            }
        }
        double v = -factor * ratio / r;
        return new Probe(q, m, new double[] {v * n[0], v * n[1], v * n[2]}, -factor * ratio);
    }
}

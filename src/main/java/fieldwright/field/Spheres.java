package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.charge.Surroundings;
import fieldwright.charge.Surroundings.ConductingSphere;
import fieldwright.formula.Constants;
import fieldwright.quantity.Place;

/**
 * Conducting spheres by Kelvin's inversion (Kelvin 1845; Jackson, Classical Electrodynamics, 3rd ed., 2.2 to 2.4):
 * V = V₀(p) − (a/r) V₀(a² p/r²), places counted from the centre, V₀ the source's own potential. An insulated sphere takes the potential
 * V₀(centre) of the sources outside, and its own charge adds Q/(4π eps0 r). A thin shell about the charge q shows outside the field of
 * q + Q in its centre.
 */
final class Spheres {
    private static final double EPS = 1e-15;
    private static final double K = 1 / (4 * Math.PI * Constants.EPS0);

    private Spheres() {
    }

    static Question question(ConductingSphere g, Place place) {
        double[] p = {place.x() - g.x(), place.y() - g.y(), place.z() - g.z()};
        double r = Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]);
        double size = g.radius() + Math.abs(g.x()) + Math.abs(g.y()) + Math.abs(g.z());
        boolean on = Math.abs(r - g.radius()) <= 4 * EPS * size;
        if (!on && g.outside() == r < g.radius()) {
            return Question.of(g.outside() ? conductor(g) : beyondShell(g, p, r), 1);
        }
        View here = charged(g, p, on ? g.radius() : r, View.of(images(g, place, p, r, on)));
        if (!on) {
            return Question.of(here, 1);
        }
        double sign = g.outside() ? 1 : -1;
        double[] side = {sign * p[0] / r, sign * p[1] / r, sign * p[2] / r};
        return Question.on(here, side, g.outside() ? conductor(g) : beyondShell(g, p, g.radius()));
    }

    private static List<Probe> images(ConductingSphere g, Place place, double[] p, double r, boolean on) {
        Probe direct = Probe.direct(place.x(), place.y(), place.z());
        return r < 3e-4 * g.radius() ? aroundCentre(g, p, direct) : List.of(direct, inverted(g, p, 1, on));
    }

    /** What the state of the sphere adds to the images of the grounded one. */
    private static View charged(ConductingSphere g, double[] p, double r, View view) {
        double a = g.radius();
        if (g instanceof Surroundings.HeldSphere held) {
            return g.outside() ? view.plus(radial(p, r, held.potential() * a / r / r), held.potential() * a / r)
                : view.plus(new double[3], held.potential());
        }
        if (!(g instanceof Surroundings.FloatingSphere floating)) {
            return view;
        }
        if (!g.outside()) {
            return view.with(new CentreGreen(new double[3], 1 / a)).plus(new double[3], K * floating.charge() / a);
        }
        List<Probe> probes = new ArrayList<>(view.probes());
        probes.add(new Probe(new double[] {g.x(), g.y(), g.z()}, new double[9], radial(p, r, a / r / r), a / r));
        return View.of(probes).plus(radial(p, r, K * floating.charge() / r / r), K * floating.charge() / r);
    }

    /** Within the sphere, the charge being outside. */
    private static View conductor(ConductingSphere g) {
        if (g instanceof Surroundings.HeldSphere held) {
            return View.GROUNDED.plus(new double[3], held.potential());
        }
        if (g instanceof Surroundings.FloatingSphere floating) {
            return View.conductor(List.of(Probe.direct(g.x(), g.y(), g.z()))).plus(new double[3], K * floating.charge() / g.radius());
        }
        return View.GROUNDED;
    }

    /** Outside the shell that has the charge in it. */
    private static View beyondShell(ConductingSphere g, double[] p, double r) {
        if (g instanceof Surroundings.HeldSphere held) {
            double v = held.potential() * g.radius() / r;
            return View.of(List.of()).plus(radial(p, r, v / r), v);
        }
        if (g instanceof Surroundings.FloatingSphere floating) {
            double v = K * floating.charge() / r;
            return View.of(List.of(), new CentreGreen(radial(p, r, 1 / r / r), 1 / r)).plus(radial(p, r, v / r), v);
        }
        return View.GROUNDED;
    }

    private static double[] radial(double[] p, double r, double size) {
        double length = Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]);
        return length == 0 ? new double[3] : new double[] {size * p[0] / length, size * p[1] / length, size * p[2] / length};
    }

    /** All of the charge acts as if at the centre: the same for every source. */
    private record CentreGreen(double[] unitField, double unitPotential) implements Green {
        @Override
        public void potential(double[][] s, int n, double[] out, double[] doubt) {
            java.util.Arrays.fill(doubt, 0, n, 4e-16 * unitPotential);
            java.util.Arrays.fill(out, 0, n, unitPotential);
        }

        @Override
        public void field(double[][] s, int n, double[][] out, double[] doubt) {
            java.util.Arrays.fill(doubt, 0, n, 4e-16 * unitPotential * unitPotential);
            for (int k = 0; k < 3; k++) {
                java.util.Arrays.fill(out[k], 0, n, unitField[k]);
            }
        }

        @Override
        public Green endless(Patch patch) {
            throw new fieldwright.quantity.AuthorException("endless charge within a sphere: give the region finite limits.");
        }
    }

    /**
     * Near the centre the inverted place runs off to infinity: the induced field is harmonic, so its value is the mean over six places
     * round about (exact but for fourth order in their distance, 6e-4 radii).
     */
    private static List<Probe> aroundCentre(ConductingSphere g, double[] p, Probe direct) {
        double h = 6e-4 * g.radius();
        List<Probe> probes = new ArrayList<>(List.of(direct));
        for (int k = 0; k < 6; k++) {
            double[] q = p.clone();
            q[k / 2] += k % 2 == 0 ? h : -h;
            probes.add(inverted(g, q, 1.0 / 6, false));
        }
        return probes;
    }

    private static Probe inverted(ConductingSphere g, double[] p, double factor, boolean on) {
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

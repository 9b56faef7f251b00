package fieldwright.field;

import fieldwright.formula.Polynomial;
import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;

/**
 * What a facet adds to the answer at one probe: geometry for the paver, values for the integrands. Distances are those that count for
 * the kernel.
 */
abstract class Sampler {
    static final double EPS = 1.2e-16;

    final Facet facet;
    final Patch patch;
    final Probe probe;
    final boolean potential;
    final Workspace space;
    final Chart chart;
    /** The place in the patch's frame, and as far as it counts for the kernel. */
    final double[] target;
    final double[] seen;
    private final double[] map;
    private final boolean plainMap;
    private final boolean rough;

    Sampler(Facet facet, Probe probe, boolean potential) {
        this.facet = facet;
        this.probe = probe;
        this.potential = potential;
        patch = facet.patch;
        space = facet.space;
        chart = facet.chart;
        target = patch.frame().toOwn(probe.place());
        Kernel kernel = patch.kernel();
        if (kernel.isEndless()) {
            seen = target.clone();
            for (int a = 0; a < 3; a++) {
                boolean across = kernel.kind == Kernel.Kind.PLANE && a != kernel.axis;
                if (across || a == kernel.alongAxis()) {
                    seen[a] = 0;
                }
            }
        } else {
            seen = target;
        }
        plainMap = probe.isPlain() && probe.c() == 1 && patch.frame().isUnturned();
        map = plainMap ? null : map(probe.a(), patch.frame().turn());
        rough = !chart.hasExactOffsets();
    }

    private static double[] map(double[] a, double[] turn) {
        double[] map = new double[9];
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                for (int k = 0; k < 3; k++) {
                    map[3 * i + j] += a[3 * i + k] * turn[3 * k + j];
                }
            }
        }
        return map;
    }

    int dimension() {
        return facet.dimension();
    }

    Chart.Anchor anchor(double... v) {
        return facet.anchor(v);
    }

    /** Source minus target of an anchor. */
    double[] toAnchor(Chart.Anchor anchor) {
        double[] p = anchor.position();
        return new double[] {p[0] - seen[0], p[1] - seen[1], p[2] - seen[2]};
    }

    Nodes place(Chart.Anchor anchor, double[][] du, int n) {
        return facet.place(anchor, du, n);
    }

    double[][] tangent(int k) {
        return facet.tangent(k);
    }

    /** Contributions of nodes at b + offset, b source minus target of their anchor. */
    abstract void act(NodeSet set, Chart.Anchor anchor, double[] b, int n, double[][] out, double[] noise);

    double reach() {
        return facet.reach();
    }

    /** Near a line, by what part of itself the field changes when the place moves by its distance. */
    double steepness() {
        return 1;
    }

    /** Density at an anchor. */
    double densityAt(Chart.Anchor anchor) {
        for (int k = 0; k < 3; k++) {
            space.full[k] = Workspace.ZEROS;
        }
        chart.evaluate(anchor, space.full, 1, space.nodes);
        patch.weight().evaluate(space.nodes, anchor.position(), 1, space.density);
        return space.density[0];
    }

    /** Direction in the patch's frame to the answer's frame. */
    double[] mapped(double x, double y, double z) {
        return plainMap ? new double[] {x, y, z} : new double[] {
            map[0] * x + map[1] * y + map[2] * z, map[3] * x + map[4] * y + map[5] * z, map[6] * x + map[7] * y + map[8] * z};
    }

    final void displacements(NodeSet set, double[] b, int n) {
        for (int a = 0; a < 3; a++) {
            double[] d = space.d[a];
            double[] o = set.offset()[a];
            double shift = b[a];
            for (int i = 0; i < n; i++) {
                d[i] = shift + o[i];
            }
        }
    }

    /** Turns field and potential in the patch's frame into the answer's components; potential mode: scales. */
    final void deliver(double[] v, int n, double[][] out) {
        if (potential) {
            double c = probe.c();
            if (c != 1) {
                for (int i = 0; i < n; i++) {
                    out[0][i] *= c;
                }
            }
            return;
        }
        if (plainMap) {
            return;
        }
        double[] b = probe.b();
        for (int i = 0; i < n; i++) {
            double x = out[0][i];
            double y = out[1][i];
            double z = out[2][i];
            double ex = map[0] * x + map[1] * y + map[2] * z;
            double ey = map[3] * x + map[4] * y + map[5] * z;
            double ez = map[6] * x + map[7] * y + map[8] * z;
            if (b != null) {
                ex += b[0] * v[i];
                ey += b[1] * v[i];
                ez += b[2] * v[i];
            }
            out[0][i] = ex;
            out[1][i] = ey;
            out[2][i] = ez;
        }
    }

    /** Adds the rounding of positions that were taken as differences of absolute ones. */
    final void roughen(NodeSet set, Chart.Anchor anchor, int n, double[][] out, double[] noise) {
        if (!rough) {
            return;
        }
        double[] p = anchor.position();
        double base = Math.abs(p[0]) + Math.abs(p[1]) + Math.abs(p[2]);
        int components = potential ? 1 : 3;
        for (int i = 0; i < n; i++) {
            double x = space.d[0][i];
            double y = space.d[1][i];
            double z = space.d[2][i];
            double distance = Math.sqrt(x * x + y * y + z * z);
            double size = 0;
            for (int c = 0; c < components; c++) {
                size += Math.abs(out[c][i]);
            }
            noise[i] += size * EPS * ((base + set.rounding()[i]) / distance + set.relative()[i] + 1);
        }
    }

    /** Charge as it stands: density times measure times kernel. */
    static final class Coulomb extends Sampler {
        Coulomb(Facet.Body facet, Probe probe, boolean potential) {
            super(facet, probe, potential);
        }

        @Override
        void act(NodeSet set, Chart.Anchor anchor, double[] b, int n, double[][] out, double[] noise) {
            double[] w = set.carried()[0];
            displacements(set, b, n);
            if (potential) {
                patch.kernel().potential(space.d, w, target, n, out[0]);
            } else {
                patch.kernel().field(space.d, w, target, n, out);
                if (probe.b() != null) {
                    patch.kernel().potential(space.d, w, target, n, space.v);
                }
            }
            roughen(set, anchor, n, out, noise);
            deliver(space.v, n, out);
        }
    }

    /**
     * A volume seen from inside or near by: one face of its box, the integral along each ray from the target done first:
     * E = −∮ dA (n·d) d/|d|³ ∫₀¹ ρ(target + t d) dt, V = ∮ dA (n·d)/|d| ∫₀¹ ρ t dt. The density is evaluated beyond the body
     * where rays leave it; what they add there cancels between faces.
     */
    static final class Face extends Sampler {
        /** Below this square of a distance, m², a node is the place itself, where the normal's product with d is zero. */
        private static final double NO_DISTANCE = 1e-200;

        private final Rays rays;

        Face(Facet.Face facet, Probe probe, boolean potential, Rays rays) {
            super(facet, probe, potential);
            this.rays = rays;
        }

        @Override
        void act(NodeSet set, Chart.Anchor anchor, double[] b, int n, double[][] out, double[] noise) {
            displacements(set, b, n);
            double[] dx = space.d[0];
            double[] dy = space.d[1];
            double[] dz = space.d[2];
            double[] nx = set.carried()[0];
            double[] ny = set.carried()[1];
            double[] nz = set.carried()[2];
            double[] sum = space.sum;
            if (!potential) {
                rays.along(seen, n, false, space);
                for (int i = 0; i < n; i++) {
                    double w = nx[i] * dx[i] + ny[i] * dy[i] + nz[i] * dz[i];
                    double square = Math.max(NO_DISTANCE, dx[i] * dx[i] + dy[i] * dy[i] + dz[i] * dz[i]);
                    double f = -w * sum[i] / (square * Math.sqrt(square));
                    out[0][i] = f * dx[i];
                    out[1][i] = f * dy[i];
                    out[2][i] = f * dz[i];
                }
            }
            if (potential || probe.b() != null) {
                rays.along(seen, n, true, space);
                double[] v = potential ? out[0] : space.v;
                for (int i = 0; i < n; i++) {
                    double w = nx[i] * dx[i] + ny[i] * dy[i] + nz[i] * dz[i];
                    double square = Math.max(NO_DISTANCE, dx[i] * dx[i] + dy[i] * dy[i] + dz[i] * dz[i]);
                    v[i] = w * sum[i] / Math.sqrt(square);
                }
            }
            roughen(set, anchor, n, out, noise);
            deliver(space.v, n, out);
        }
    }

    /** ∫₀¹ ρ(place + t d) dt and ∫₀¹ ρ t dt for many d from one place: closed for polynomials, by Gauss nodes along each ray otherwise. */
    static final class Rays {
        private final SpaceFunction density;
        private final int steps;
        private final double[] forField;
        private final double[] forPotential;
        private final int degree;

        private Rays(SpaceFunction density, int steps, double[] forField, double[] forPotential, int degree) {
            this.density = density;
            this.steps = steps;
            this.forField = forField;
            this.forPotential = forPotential;
            this.degree = degree;
        }

        static Rays sampled(SpaceFunction density, int steps) {
            return new Rays(density, steps, null, null, 0);
        }

        static Rays closed(Polynomial density, double[] place) {
            int degree = density.degree();
            double[] c = new double[Polynomial.count(degree)];
            density.about(place, c);
            return new Rays(null, 0, nested(c, degree, 1), nested(c, degree, 2), degree);
        }

        /** Coefficients over their degree plus {@code more}, in the order in which Horner's rule over z, y, x takes them. */
        private static double[] nested(double[] c, int degree, int more) {
            double[] out = new double[c.length];
            int at = 0;
            for (int k = degree; k >= 0; k--) {
                for (int j = degree - k; j >= 0; j--) {
                    for (int i = degree - k - j; i >= 0; i--) {
                        out[at++] = c[Polynomial.index(i, j, k)] / (i + j + k + more);
                    }
                }
            }
            return out;
        }

        /** Fills space.sum for the displacements in space.d. */
        void along(double[] seen, int n, boolean timesT, Workspace space) {
            double[] sum = space.sum;
            if (density == null) {
                horner(timesT ? forPotential : forField, space, n);
                return;
            }
            if (density.isConstant()) {
                java.util.Arrays.fill(sum, 0, n, timesT ? density.constant() / 2 : density.constant());
                return;
            }
            java.util.Arrays.fill(sum, 0, n, 0);
            var rule = fieldwright.integral.GaussLegendre.of(steps);
            for (int j = 0; j < steps; j++) {
                double step = rule.node(j);
                for (int a = 0; a < 3; a++) {
                    double[] r = space.ray[a];
                    double[] d = space.d[a];
                    for (int i = 0; i < n; i++) {
                        r[i] = step * d[i];
                    }
                }
                density.evaluate(seen, space.ray, n, space.density);
                double weight = rule.weight(j) * (timesT ? step : 1);
                for (int i = 0; i < n; i++) {
                    sum[i] += weight * space.density[i];
                }
            }
        }

        private void horner(double[] c, Workspace space, int n) {
            double[] out = space.sum;
            if (degree == 0) {
                java.util.Arrays.fill(out, 0, n, c[0]);
                return;
            }
            double[] s = space.horner[0];
            double[] t = space.horner[1];
            double[] x = space.d[0];
            double[] y = space.d[1];
            double[] z = space.d[2];
            java.util.Arrays.fill(out, 0, n, 0);
            int at = 0;
            for (int k = degree; k >= 0; k--) {
                java.util.Arrays.fill(t, 0, n, 0);
                for (int j = degree - k; j >= 0; j--) {
                    java.util.Arrays.fill(s, 0, n, c[at++]);
                    for (int i = degree - k - j; i > 0; i--) {
                        step(s, x, c[at++], n);
                    }
                    step(t, y, s, n);
                }
                step(out, z, t, n);
            }
        }

        private static void step(double[] sum, double[] by, double more, int n) {
            for (int m = 0; m < n; m++) {
                sum[m] = sum[m] * by[m] + more;
            }
        }

        private static void step(double[] sum, double[] by, double[] more, int n) {
            for (int m = 0; m < n; m++) {
                sum[m] = sum[m] * by[m] + more[m];
            }
        }
    }

    /** One edge of a flat face, with the integrals along rays in its plane done first. */
    static final class Edge extends Sampler {
        private final FlatFace face;

        Edge(Facet.Edge facet, Probe probe, boolean potential, FlatFace face) {
            super(facet, probe, potential);
            this.face = face;
        }

        /** Towards the edge of a charged surface it grows as 2σ ln(1/distance) beside 2πσ; at that of a volume it is bounded. */
        @Override
        double steepness() {
            return face.isSurface ? 0.3 : 0;
        }

        @Override
        void act(NodeSet set, Chart.Anchor anchor, double[] b, int n, double[][] out, double[] noise) {
            displacements(set, b, n);
            double[][] d = space.d;
            double[][] t = set.carried();
            double[] e1 = face.e1;
            double[] e2 = face.e2;
            double height = Math.abs(face.height);
            boolean both = potential || probe.b() != null;
            for (int i = 0; i < n; i++) {
                double u = d[0][i] * e1[0] + d[1][i] * e1[1] + d[2][i] * e1[2];
                double v = d[0][i] * e2[0] + d[1][i] * e2[1] + d[2][i] * e2[2];
                double du = t[0][i] * e1[0] + t[1][i] * e1[1] + t[2][i] * e1[2];
                double dv = t[0][i] * e2[0] + t[1][i] * e2[1] + t[2][i] * e2[2];
                double square = u * u + v * v;
                double r = Math.sqrt(square);
                double f = square > 0 ? (u * dv - v * du) / (square * r) : 0;
                face.radial(r, potential ? null : space.radialA, space.radialB);
                if (both) {
                    double sum = 0;
                    double size = 0;
                    for (int m = 0; m <= face.degree; m++) {
                        double term = homogeneous(face.forPotential, m, u, v) * space.radialB[m + 1];
                        sum += term;
                        size += Math.abs(term);
                    }
                    double factor = f * square;
                    (potential ? out[0] : space.v)[i] = factor * sum;
                    noise[i] += 6 * EPS * Math.abs(factor) * size;
                }
                if (!potential) {
                    double plane = 0;
                    double across = 0;
                    double size = 0;
                    for (int m = 0; m <= face.degree; m++) {
                        double q = homogeneous(face.forField, m, u, v);
                        plane += q * space.radialA[m + 2];
                        across += q * space.radialA[m + 1];
                        size += Math.abs(q) * (Math.abs(space.radialA[m + 2]) * r + space.radialA[m + 1] * height);
                    }
                    double fu = -f * plane * u;
                    double fv = -f * plane * v;
                    double fn = -f * across * face.height;
                    for (int a = 0; a < 3; a++) {
                        out[a][i] = fu * e1[a] + fv * e2[a] + fn * face.normal[a];
                    }
                    noise[i] += 6 * EPS * Math.abs(f) * size;
                }
            }
            roughen(set, anchor, n, out, noise);
            deliver(space.v, n, out);
        }

        private static double homogeneous(double[] q, int m, double u, double v) {
            int at = m * (m + 1) / 2;
            double sum = q[at];
            double power = 1;
            for (int j = 1; j <= m; j++) {
                power *= v;
                sum = sum * u + q[at + j] * power;
            }
            return sum;
        }
    }
}

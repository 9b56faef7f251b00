package fieldwright.field;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.quantity.AuthorException;

/**
 * What a patch, or one face of a volume, adds to the answer at one probe, as a function on its unit box: geometry for the
 * paver, values for the integrands. Distances are those that count for the kernel.
 */
abstract class Sampler {
    static final double EPS = 1.2e-16;

    final Patch patch;
    final Probe probe;
    final boolean potential;
    final Workspace space;
    final Chart chart;
    /** Chart depth of each parameter; other depths stay where {@link #held} says. */
    final int[] axes;
    final double[] held;
    final double[] target;
    final double[] seen;
    final double[] map;
    final boolean plainMap;
    private final double roughness;

    Sampler(Patch patch, Probe probe, boolean potential, Workspace space, Chart chart, int[] axes, double[] held) {
        this.patch = patch;
        this.probe = probe;
        this.potential = potential;
        this.space = space;
        this.chart = chart;
        this.axes = axes;
        this.held = held;
        target = patch.frame().toOwn(probe.place());
        seen = target.clone();
        Kernel kernel = patch.kernel();
        for (int a = 0; a < 3; a++) {
            boolean across = kernel.kind == Kernel.Kind.PLANE && a != kernel.axis;
            if (across || a == kernel.alongAxis()) {
                seen[a] = 0;
            }
        }
        map = new double[9];
        double[] turn = patch.frame().turn();
        for (int i = 0; i < 3; i++) {
            for (int j = 0; j < 3; j++) {
                for (int k = 0; k < 3; k++) {
                    map[3 * i + j] += probe.a()[3 * i + k] * turn[3 * k + j];
                }
            }
        }
        boolean unit = true;
        for (int i = 0; i < 9; i++) {
            unit &= map[i] == (i % 4 == 0 ? 1 : 0);
        }
        plainMap = unit && probe.b() == null;
        roughness = chart.hasExactOffsets() ? 0 : EPS;
    }

    int dimension() {
        return axes.length;
    }

    Chart.Anchor anchor(double... v) {
        double[] u = held.clone();
        for (int k = 0; k < axes.length; k++) {
            u[axes[k]] = v[k];
        }
        return chart.anchor(u);
    }

    /** Source minus target of an anchor. */
    double[] toAnchor(Chart.Anchor anchor) {
        double[] b = new double[3];
        for (int a = 0; a < 3; a++) {
            b[a] = anchor.position()[a] - seen[a];
        }
        return b;
    }

    /** Positions, tangents and measure at anchor + du. */
    Nodes place(Chart.Anchor anchor, double[][] du, int n) {
        double[][] full = space.full;
        for (int k = 0; k < 3; k++) {
            full[k] = Workspace.ZEROS;
        }
        for (int k = 0; k < axes.length; k++) {
            full[axes[k]] = du[k];
        }
        chart.evaluate(anchor, full, n, space.nodes);
        return space.nodes;
    }

    double[][] tangent(int k) {
        return space.nodes.tangent[axes[k]];
    }

    /** A line no longer than this, m, is a point: an edge at which a face has shrunk to nothing but rounding. */
    double leastLength() {
        return 0;
    }

    /** Parameter k of an anchor. */
    double parameter(Chart.Anchor anchor, int k) {
        return anchor.u()[axes[k]];
    }

    /**
     * Contributions of nodes placed last: {@code jacobian} is du per unit of the integration variables; {@code b} source minus
     * target of the anchor.
     */
    abstract void values(Chart.Anchor anchor, double[] b, double[] jacobian, int n, double[][] out, double[] noise);

    /** Whether the density is known to be smooth in the chart's parameters. */
    boolean isSmooth() {
        return patch.weight().isSmooth();
    }

    private double reach = -1;

    /** Distance from the frame's origin to the furthest corner: the size its coordinates are rounded at. */
    double reach() {
        if (reach < 0) {
            int n = axes.length;
            for (int i = 0; i < 1 << n; i++) {
                double[] v = new double[n];
                for (int k = 0; k < n; k++) {
                    v[k] = chart.isEndless(axes[k]) ? 0.5 : i >> k & 1;
                }
                double[] p = anchor(v).position();
                reach = Math.max(reach, Math.sqrt(p[0] * p[0] + p[1] * p[1] + p[2] * p[2]));
            }
        }
        return reach;
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
        return new double[] {
            map[0] * x + map[1] * y + map[2] * z, map[3] * x + map[4] * y + map[5] * z, map[6] * x + map[7] * y + map[8] * z};
    }

    final void displacements(double[] b, int n) {
        for (int a = 0; a < 3; a++) {
            double[] d = space.d[a];
            double[] o = space.nodes.offset[a];
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

    /** Rounding of positions that were taken as differences of absolute ones. */
    final void roughen(Chart.Anchor anchor, int n, double[][] out, double[] noise) {
        if (roughness != 0) {
            java.util.Arrays.fill(noise, 0, n, 0);
            addRoughness(anchor, n, out, noise);
        }
    }

    final void addRoughness(Chart.Anchor anchor, int n, double[][] out, double[] noise) {
        if (roughness == 0) {
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
            noise[i] += size * roughness * ((base + space.nodes.rounding[i]) / distance + space.nodes.relative[i] + 1);
        }
    }

    /** Charge as it stands: density times measure times kernel. */
    static final class Coulomb extends Sampler {
        Coulomb(Patch patch, Probe probe, boolean potential, Workspace space, Chart chart) {
            super(patch, probe, potential, space, chart, all(chart.dimension()), new double[chart.dimension()]);
        }

        private static int[] all(int n) {
            int[] axes = new int[n];
            for (int k = 0; k < n; k++) {
                axes[k] = k;
            }
            return axes;
        }

        @Override
        void values(Chart.Anchor anchor, double[] b, double[] jacobian, int n, double[][] out, double[] noise) {
            double[] w = space.weight;
            double[] measure = space.nodes.measure;
            if (patch.weight().isConstant()) {
                double density = patch.weight().constant();
                for (int i = 0; i < n; i++) {
                    w[i] = density * measure[i] * jacobian[i];
                }
            } else {
                patch.weight().evaluate(space.nodes, anchor.position(), n, w);
                for (int i = 0; i < n; i++) {
                    if (Double.isNaN(w[i])) {
                        throw notANumber(patch, space.nodes, i);
                    }
                    w[i] *= measure[i] * jacobian[i];
                }
            }
            displacements(b, n);
            if (potential) {
                patch.kernel().potential(space.d, w, target, n, out[0]);
            } else {
                patch.kernel().field(space.d, w, target, n, out);
                if (probe.b() != null) {
                    patch.kernel().potential(space.d, w, target, n, space.v);
                }
            }
            roughen(anchor, n, out, noise);
            deliver(space.v, n, out);
        }
    }

    static AuthorException notANumber(Patch patch, Nodes nodes, int i) {
        StringBuilder where = new StringBuilder();
        for (int m = 0; m < patch.chart().coordinates().size(); m++) {
            where.append(m == 0 ? "" : ", ").append(patch.chart().coordinates().get(m)).append(" = ")
                .append(String.format(java.util.Locale.ROOT, "%.6g", nodes.c[m][i]));
        }
        return new AuthorException("density " + patch.density().text() + " is not a number at " + where
            + " (SI). Check roots, logarithms and divisions in it against the region's limits.");
    }

    /**
     * A volume seen from inside or near by: one face of its box, the integral along each ray from the target done first:
     * E = −∮ dA (n·d) d/|d|³ ∫₀¹ ρ(target + t d) dt, V = ∮ dA (n·d)/|d| ∫₀¹ ρ t dt. The density is evaluated beyond the body
     * where rays leave it; what they add there cancels between faces.
     */
    static final class Face extends Sampler {
        private final int sign;
        private final int raySteps;

        Face(Patch patch, Probe probe, boolean potential, Workspace space, Chart chart, int depth, boolean upper, int handedness,
            int raySteps) {
            super(patch, probe, potential, space, chart, others(depth), held(depth, upper));
            this.raySteps = raySteps;
            sign = (upper ? 1 : -1) * handedness;
        }

        @Override
        boolean isSmooth() {
            return true;   // SpaceFunction admits no other
        }

        /** The two other depths, in cyclic order, so that their cross product points out of the upper face. */
        private static int[] others(int depth) {
            return new int[] {(depth + 1) % 3, (depth + 2) % 3};
        }

        private static double[] held(int depth, boolean upper) {
            double[] u = new double[3];
            u[depth] = upper ? 1 : 0;
            return u;
        }

        @Override
        void values(Chart.Anchor anchor, double[] b, double[] jacobian, int n, double[][] out, double[] noise) {
            displacements(b, n);
            double[] dx = space.d[0];
            double[] dy = space.d[1];
            double[] dz = space.d[2];
            double[][] s = tangent(0);
            double[][] t = tangent(1);
            double[] w = space.weight;
            for (int i = 0; i < n; i++) {
                double nx = s[1][i] * t[2][i] - s[2][i] * t[1][i];
                double ny = s[2][i] * t[0][i] - s[0][i] * t[2][i];
                double nz = s[0][i] * t[1][i] - s[1][i] * t[0][i];
                w[i] = sign * jacobian[i] * (nx * dx[i] + ny * dy[i] + nz * dz[i]);
            }
            boolean both = !potential && probe.b() != null;
            if (!potential) {
                rays(n, false);
                double[] sum = space.sum;
                for (int i = 0; i < n; i++) {
                    double square = dx[i] * dx[i] + dy[i] * dy[i] + dz[i] * dz[i];
                    double f = square > 0 ? -w[i] * sum[i] / (square * Math.sqrt(square)) : 0;
                    out[0][i] = f * dx[i];
                    out[1][i] = f * dy[i];
                    out[2][i] = f * dz[i];
                }
            }
            if (potential || both) {
                rays(n, true);
                double[] v = potential ? out[0] : space.v;
                for (int i = 0; i < n; i++) {
                    double square = dx[i] * dx[i] + dy[i] * dy[i] + dz[i] * dz[i];
                    v[i] = square > 0 ? w[i] * space.sum[i] / Math.sqrt(square) : 0;
                }
            }
            roughen(anchor, n, out, noise);
            deliver(space.v, n, out);
        }

        /** ∫₀¹ ρ dt, or ∫₀¹ ρ t dt, along each ray. */
        private void rays(int n, boolean timesT) {
            SpaceFunction rho = patch.inSpace();
            double[] sum = space.sum;
            if (rho.isConstant()) {
                java.util.Arrays.fill(sum, 0, n, timesT ? rho.constant() / 2 : rho.constant());
                return;
            }
            java.util.Arrays.fill(sum, 0, n, 0);
            var rule = fieldwright.integral.GaussLegendre.of(raySteps);
            for (int j = 0; j < raySteps; j++) {
                double step = rule.node(j);
                for (int a = 0; a < 3; a++) {
                    double[] r = space.ray[a];
                    double[] d = space.d[a];
                    for (int i = 0; i < n; i++) {
                        r[i] = step * d[i];
                    }
                }
                rho.evaluate(seen, space.ray, n, space.density);
                double weight = rule.weight(j) * (timesT ? step : 1);
                for (int i = 0; i < n; i++) {
                    sum[i] += weight * space.density[i];
                }
            }
        }
    }

    /** One edge of a flat face, run through from one corner of its parameters to another; the face to its left, seen against the normal. */
    static final class Edge extends Sampler {
        private final FlatFace face;
        private final int sign;
        private final double[] corner;
        private final double[] along;
        private final double leastLength;

        /** {@code corner} and {@code along} in all parameters of the chart; {@code sign} −1 when they run clockwise about the normal. */
        Edge(Patch patch, Probe probe, boolean potential, Workspace space, Chart chart, FlatFace face, double[] corner, double[] along, int sign,
            double leastLength) {
            super(patch, probe, potential, space, chart, new int[] {0}, corner);
            this.leastLength = leastLength;
            this.face = face;
            this.sign = sign;
            this.corner = corner;
            this.along = along;
        }

        @Override
        boolean isSmooth() {
            return true;
        }

        @Override
        Chart.Anchor anchor(double... v) {
            double[] u = corner.clone();
            for (int k = 0; k < u.length; k++) {
                u[k] += along[k] == 0 ? 0 : along[k] * v[0];
            }
            return chart.anchor(u);
        }

        @Override
        double leastLength() {
            return leastLength;
        }

        @Override
        double parameter(Chart.Anchor anchor, int k) {
            for (int j = 0; j < along.length; j++) {
                if (along[j] != 0) {
                    return (anchor.u()[j] - corner[j]) / along[j];
                }
            }
            return 0;
        }

        @Override
        Nodes place(Chart.Anchor anchor, double[][] du, int n) {
            double[][] full = space.full;
            double[] given = du[0];
            for (int k = 0; k < 3; k++) {
                full[k] = Workspace.ZEROS;
                if (k < along.length && along[k] != 0) {
                    full[k] = space.edge[k];
                    for (int i = 0; i < n; i++) {
                        full[k][i] = along[k] * given[i];
                    }
                }
            }
            chart.evaluate(anchor, full, n, space.nodes);
            double[][] t = space.along;
            for (int a = 0; a < 3; a++) {
                java.util.Arrays.fill(t[a], 0, n, 0);
                for (int k = 0; k < along.length; k++) {
                    double[] own = space.nodes.tangent[k][a];
                    double f = along[k];
                    for (int i = 0; f != 0 && i < n; i++) {
                        t[a][i] += f * own[i];
                    }
                }
            }
            return space.nodes;
        }

        @Override
        double[][] tangent(int k) {
            return space.along;
        }

        @Override
        void values(Chart.Anchor anchor, double[] b, double[] jacobian, int n, double[][] out, double[] noise) {
            displacements(b, n);
            double[][] d = space.d;
            double[][] t = space.along;
            double[] e1 = face.e1;
            double[] e2 = face.e2;
            double[] u = space.ray[0];
            double[] v = space.ray[1];
            double[] f = space.weight;
            double[] r = space.sum;
            for (int i = 0; i < n; i++) {
                u[i] = d[0][i] * e1[0] + d[1][i] * e1[1] + d[2][i] * e1[2];
                v[i] = d[0][i] * e2[0] + d[1][i] * e2[1] + d[2][i] * e2[2];
                double du = t[0][i] * e1[0] + t[1][i] * e1[1] + t[2][i] * e1[2];
                double dv = t[0][i] * e2[0] + t[1][i] * e2[1] + t[2][i] * e2[2];
                double square = u[i] * u[i] + v[i] * v[i];
                r[i] = Math.sqrt(square);
                f[i] = square > 0 ? sign * jacobian[i] * (u[i] * dv - v[i] * du) / (square * r[i]) : 0;
            }
            double height = Math.abs(face.height);
            for (int i = 0; i < n; i++) {
                noise[i] = 0;
                face.radial(r[i], potential ? null : space.radialA, space.radialB);
                if (potential || probe.b() != null) {
                    double sum = 0;
                    double size = 0;
                    for (int m = 0; m <= face.degree; m++) {
                        double term = homogeneous(face.forPotential, m, u[i], v[i]) * space.radialB[m + 1];
                        sum += term;
                        size += Math.abs(term);
                    }
                    double factor = f[i] * r[i] * r[i];
                    (potential ? out[0] : space.v)[i] = factor * sum;
                    noise[i] = 6 * EPS * Math.abs(factor) * size;
                }
                if (!potential) {
                    double plane = 0;
                    double across = 0;
                    double size = 0;
                    for (int m = 0; m <= face.degree; m++) {
                        double q = homogeneous(face.forField, m, u[i], v[i]);
                        plane += q * space.radialA[m + 2];
                        across += q * space.radialA[m + 1];
                        size += Math.abs(q) * (space.radialA[m + 2] * r[i] + space.radialA[m + 1] * height);
                    }
                    double fu = -f[i] * plane * u[i];
                    double fv = -f[i] * plane * v[i];
                    double fn = -f[i] * across * face.height;
                    for (int a = 0; a < 3; a++) {
                        out[a][i] = fu * e1[a] + fv * e2[a] + fn * face.normal[a];
                    }
                    noise[i] += 6 * EPS * Math.abs(f[i]) * size;
                }
            }
            addRoughness(anchor, n, out, noise);
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

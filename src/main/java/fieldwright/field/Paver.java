package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.geometry.Chart;
import fieldwright.geometry.Nodes;
import fieldwright.integral.Cubature.Piece;
import fieldwright.integral.Integrand;
import fieldwright.quantity.Stop;

/**
 * Cuts patches into pieces that suit a place. A box of parameters far from the place (against its own size) is integrated
 * as it stands; a near one that is bent is halved; a near one that is nearly flat is cut into rays from its nearest point.
 */
final class Paver {
    /** A box is far when the place is further from it than this many of its lengths. */
    private static final double FAR = 0.45;
    /** Tangents of a box that is cut into rays differ by less than this part of their own length. */
    private static final double BENT = 0.8;
    private static final int DEEPEST = 70;
    /** Extent of one piece along sinh coordinates; the kernel's poles are at π/2 from the real axis. */
    private static final double SPAN = 2.5;

    final List<Piece> pieces = new ArrayList<>();
    final double[] start;
    final Contact contact = new Contact();
    private final boolean potential;
    private final Workspace space;
    /** Natural logarithm of the reduction asked of a Gauss rule, halved, for its error goes as the square. */
    private final double decades;
    /** An order whose coefficients show how they decay. */
    private static final int LEAST = 6;
    private double roughness;
    private double offsetRounding;
    private double rimError;

    /**
     * Part of the answer that is lost where positions are differences of absolute ones (parametric surfaces), close above them: it is
     * in the error already, and no more can be had.
     */
    double offsetRounding() {
        return offsetRounding;
    }

    /** Part of the answer that is lost to the rounding of the place itself: near lines, eps·size/gap. */
    double roughness() {
        return roughness;
    }

    boolean isPotential() {
        return potential;
    }

    /** Error of the field by the rounding of places, kernel units: beside a rim the field of a surface grows as 2σ ln(1/distance). */
    double rimError() {
        return rimError;
    }

    /** {@code relative}: what will be asked of the sum, which sets the orders to begin with. */
    Paver(boolean potential, Workspace space, double relative) {
        decades = Math.min(17, Math.max(6, 2.6 - 0.5 * Math.log(relative)));
        this.potential = potential;
        this.space = space;
        start = new double[potential ? 1 : 3];
    }

    void pave(Patch patch, Probe probe) {
        if (patch.weight().isConstant() && patch.weight().constant() == 0) {
            return;
        }
        Facets facets = patch.facets();
        Facet.Body body = facets.body(space, probe);
        Sampler.Coulomb sampler = new Sampler.Coulomb(body, probe, potential);
        if (patch.dimension() == 0) {
            single(sampler);
            return;
        }
        if (patch.dimension() == 3 && patch.inSpace() != null && patch.kernel() == Kernel.POINT && !body.chart.isEndless()
            && faces(facets, sampler)) {
            return;
        }
        if (patch.dimension() == 2 && patch.polynomial() != null && flatSurface(facets, sampler)) {
            return;
        }
        if (patch.triangle()) {
            int first = pieces.size();
            polar(sampler, TRIANGLE, nearestInTriangle(sampler), 0);
            rebase(sampler, first);
            return;
        }
        boxes(patch, body.chart, sampler);
    }

    private static final double[][] TRIANGLE = {{0, 0}, {1, 0}, {0, 1}};

    /** A flat surface near by by its edges; false when it is far, or the place is on its edge, which other rules know better. */
    private boolean flatSurface(Facets facets, Sampler whole) {
        Facets.Extent extent = facets.extent();
        double[] b = whole.toAnchor(extent.middle());
        if (!extent.isNear(b, gap(whole), degree(whole.patch))) {
            return false;
        }
        Facet.Edges edges = facets.edges();
        if (edges.normal == null) {
            return false;
        }
        double height = dot(edges.normal, whole.toAnchor(edges.middle));
        if (!(Math.abs(height) > touching(whole, edges.middle))) {
            height = 0;
            if (!inPlane(whole, edges)) {
                return false;
            }
        }
        FlatFace face = FlatFace.surface(whole.patch.polynomial(), whole.target, edges.normal, height, extent.radius());
        paveEdges(whole.probe, edges, face);
        return true;
    }

    private static int degree(Patch patch) {
        return patch.polynomial() == null ? -1 : patch.polynomial().degree();
    }

    /** Distance from the nearest point by coordinates, which is near to the nearest. */
    private double gap(Sampler s) {
        if (s.patch.triangle()) {
            return norm(s.toAnchor(s.anchor(nearestInTriangle(s))));
        }
        return s.chart.system() == null ? Double.POSITIVE_INFINITY : norm(s.toAnchor(s.anchor(s.chart.nearest(s.target))));
    }

    /** A place in the plane of a flat surface, off its edge: notes the jump if it is on the surface. False on the edge. */
    private boolean inPlane(Sampler whole, Facet.Edges edges) {
        double[] at = whole.patch.triangle() ? nearestInTriangle(whole)
            : footOnSurface(whole, new double[2], new double[] {1, 1}, whole.chart.nearest(whole.target), Double.POSITIVE_INFINITY);
        Chart.Anchor foot = whole.anchor(at);
        double touching = touching(whole, foot);
        if (norm(whole.toAnchor(foot)) > 2 * touching) {
            return true;
        }
        for (Facet.Edge facet : edges.all) {
            Sampler.Edge edge = new Sampler.Edge(facet, whole.probe, potential, null);
            double t = footOnLine(edge, 0, 1, facet.project(at, whole.facet.axes), Double.POSITIVE_INFINITY);
            if (!(norm(edge.toAnchor(edge.anchor(t))) > 2 * touching)) {
                return false;
            }
        }
        double sigma = whole.densityAt(foot);
        if (!potential && sigma != 0) {
            contact.surface(sigma, 1, whole.mapped(edges.normal[0], edges.normal[1], edges.normal[2]), new double[3]);
        }
        return true;
    }

    private void paveEdges(Probe probe, Facet.Edges edges, FlatFace face) {
        for (Facet.Edge facet : edges.all) {
            Sampler.Edge edge = new Sampler.Edge(facet, probe, potential, face);
            int first = pieces.size();
            line(edge, facet.whole(), 0);
            rebase(edge, first);
        }
    }

    /** Nearest point of a flat triangle, u + v ≤ 1 in its own parameters: its foot if that is inside, else the nearest on a side. */
    private double[] nearestInTriangle(Sampler s) {
        Chart.Anchor corner = s.anchor(0, 0);
        double[] b = s.toAnchor(corner);
        for (double[] du : space.du) {
            du[0] = 0;
        }
        s.place(corner, space.du, 1);
        double[] p = column(s.tangent(0));
        double[] q = column(s.tangent(1));
        double det = dot(p, p) * dot(q, q) - dot(p, q) * dot(p, q);
        double u = -(dot(q, q) * dot(p, b) - dot(p, q) * dot(q, b)) / det;
        double v = -(dot(p, p) * dot(q, b) - dot(p, q) * dot(p, b)) / det;
        if (u > 0 && v > 0 && u + v < 1) {
            return refined(s, u, v);
        }
        double[] best = null;
        double least = Double.POSITIVE_INFINITY;
        for (int k = 0; k < 3; k++) {
            double[] a = TRIANGLE[k];
            double[] c = TRIANGLE[(k + 1) % 3];
            double[] start = new double[3];
            double[] side = new double[3];
            for (int i = 0; i < 3; i++) {
                start[i] = b[i] + a[0] * p[i] + a[1] * q[i];
                side[i] = (c[0] - a[0]) * p[i] + (c[1] - a[1]) * q[i];
            }
            double t = snap(-dot(start, side) / dot(side, side), 0, 1);
            double[] d = {start[0] + t * side[0], start[1] + t * side[1], start[2] + t * side[2]};
            if (norm(d) < least) {
                least = norm(d);
                best = new double[] {a[0] + t * (c[0] - a[0]), a[1] + t * (c[1] - a[1])};
            }
        }
        return best;
    }

    /** One more step from the foot itself, whose position is rounded less than the corner's. */
    private double[] refined(Sampler s, double u, double v) {
        Chart.Anchor foot = s.anchor(u, v);
        double[] b = s.toAnchor(foot);
        s.place(foot, space.du, 1);
        double[] p = column(s.tangent(0));
        double[] q = column(s.tangent(1));
        double det = dot(p, p) * dot(q, q) - dot(p, q) * dot(p, q);
        double nu = u - (dot(q, q) * dot(p, b) - dot(p, q) * dot(q, b)) / det;
        double nv = v - (dot(p, p) * dot(q, b) - dot(p, q) * dot(p, b)) / det;
        return nu > 0 && nv > 0 && nu + nv < 1 ? new double[] {nu, nv} : new double[] {u, v};
    }

    private static double[] column(double[][] t) {
        return new double[] {t[0][0], t[1][0], t[2][0]};
    }

    /** An endless line or plane: the kernel itself is the answer. */
    private void single(Sampler s) {
        Chart.Anchor anchor = s.anchor();
        double[] b = s.toAnchor(anchor);
        double distance = norm(b);
        Kernel kernel = s.patch.kernel();
        double lift = lift(s);
        if (!(Math.hypot(distance, lift) > touching(s, anchor))) {
            double sigma = s.densityAt(anchor);
            if (sigma == 0) {
                return;
            }
            if (kernel.kind != Kernel.Kind.PLANE) {
                contact.unbounded("on a line charge: the field grows without bound as 1 over the distance", null);
                return;
            }
            if (!potential) {
                double[] n = new double[3];
                n[kernel.axis] = 1;
                contact.surface(sigma, 1, s.mapped(n[0], n[1], n[2]), new double[3]);
            }
            return;
        }
        s.place(anchor, space.du, 1);
        space.jacobian[0] = 1;
        s.facet.carry(anchor, space.jacobian, 1, space.set);
        double[][] out = new double[3][1];
        s.act(space.set, anchor, b, 1, out, new double[1]);
        for (int c = 0; c < start.length; c++) {
            start[c] += out[c][0];
        }
    }

    /** Boxes between the breaks and, for endless coordinates, the tails beyond a few lengths, which are taken whole. */
    private void boxes(Patch patch, Chart chart, Sampler sampler) {
        int dims = chart.dimension();
        double[][] cuts = new double[dims][];
        boolean[][] tail = new boolean[dims][];
        for (int k = 0; k < dims; k++) {
            cuts[k] = patch.breaks()[k];
            tail[k] = new boolean[cuts[k].length - 1];
            if (chart.isEndless(k)) {
                endlessCuts(chart, k, cuts, tail);
            }
        }
        int first = pieces.size();
        if (!chart.isEndless()) {
            for (Panel panel : sampler.facet.between(cuts)) {
                pave(sampler, panel, 0);
            }
            rebase(sampler, first);
            return;
        }
        int[] index = new int[dims];
        while (true) {
            double[] from = new double[dims];
            double[] to = new double[dims];
            boolean isTail = false;
            for (int k = 0; k < dims; k++) {
                from[k] = cuts[k][index[k]];
                to[k] = cuts[k][index[k] + 1];
                isTail |= tail[k][index[k]];
            }
            if (isTail) {
                addTail(sampler, from, to);
            } else {
                pave(sampler, new Panel(sampler.facet, from, to), 0);
            }
            int k = 0;
            while (k < dims && ++index[k] == cuts[k].length - 1) {
                index[k++] = 0;
            }
            if (k == dims) {
                rebase(sampler, first);
                return;
            }
        }
    }

    /** One anchor, the nearest, for all pieces of a sampler whose offsets are exact. */
    private void rebase(Sampler sampler, int first) {
        if (pieces.size() == first || !sampler.chart.hasExactOffsets()) {
            return;
        }
        Pieces.Base nearest = null;
        for (Piece piece : pieces.subList(first, pieces.size())) {
            Pieces.Base f = (Pieces.Base) piece.integrand();
            if (nearest == null || norm(f.b) < norm(nearest.b)) {
                nearest = f;
            }
        }
        if (nearest == null) {
            return;
        }
        Chart.Anchor base = nearest.anchor;
        double[] b = nearest.b;
        Pieces.Base last = null;
        for (Piece piece : pieces.subList(first, pieces.size())) {
            Pieces.Base f = (Pieces.Base) piece.integrand();
            if (f != last && f.anchor != base) {
                f.rebase(nearestTurn(sampler, base, f.anchor), b);
            }
            last = f;
        }
    }

    /** The anchor itself or, where a full turn begins and ends, its other end when that is nearer: an angle less a whole turn loses its digits. */
    private static Chart.Anchor nearestTurn(Sampler s, Chart.Anchor base, Chart.Anchor from) {
        double[] u = base.u().clone();
        boolean moved = false;
        for (int depth : s.facet.axes) {
            double other = 1 - u[depth];
            boolean seam = u[depth] == 0 || u[depth] == 1;
            if (seam && Math.abs(from.u()[depth] - other) < 0.5 && s.chart.isFullTurn(depth)) {
                u[depth] = other;
                moved = true;
            }
        }
        return moved ? s.chart.anchor(u) : base;
    }

    private static void endlessCuts(Chart chart, int k, double[][] cuts, boolean[][] tail) {
        double far = 8;
        boolean down = chart.lower(k) == Double.NEGATIVE_INFINITY;
        boolean up = chart.upper(k) == Double.POSITIVE_INFINITY;
        if (down && up) {
            double t = (Math.sqrt(1 + 4 * far * far) - 1) / (4 * far);
            cuts[k] = new double[] {0, 0.5 - t, 0.5 + t, 1};
            tail[k] = new boolean[] {true, false, true};
        } else if (up) {
            cuts[k] = new double[] {0, far / (1 + far), 1};
            tail[k] = new boolean[] {false, true};
        } else {
            cuts[k] = new double[] {0, 1 / (1 + far), 1};
            tail[k] = new boolean[] {true, false};
        }
    }

    private void addTail(Sampler s, double[] from, double[] to) {
        int dims = from.length;
        int[] orders = new int[dims];
        java.util.Arrays.fill(orders, dims == 3 ? 16 : 24);
        pieces.add(Piece.whole(new Pieces.Box(s, from, to), orders));
    }

    private void pave(Sampler s, Panel panel, int depth) {
        Stop.check();
        switch (panel.from.length) {
            case 1 -> line(s, panel, depth);
            case 2 -> surface(s, panel, depth);
            default -> volume(s, panel, depth);
        }
    }

    // ---- common

    private static double norm(double[] v) {
        return Math.sqrt(v[0] * v[0] + v[1] * v[1] + v[2] * v[2]);
    }

    /** A distance below this cannot be told from zero. */
    private static double touching(Sampler s, Chart.Anchor anchor) {
        return 4 * Sampler.EPS * (norm(s.seen) + norm(anchor.position()) + s.reach());
    }

    /** For half-endless kernels: how far the place is beyond the end, which keeps it away from all sources. */
    private static double lift(Sampler s) {
        Kernel k = s.patch.kernel();
        return k.kind == Kernel.Kind.HALF_LINE ? Math.max(0, k.sign * (k.end - s.target[k.axis])) : 0;
    }

    /** Gauss order for a pole at {@code distance} from an interval of length {@code length} (Bernstein ellipse), and for bends. */
    private int order(double distance, double length, double bend) {
        double delta = 2 * distance / Math.max(length, 1e-300);
        double rho = delta + Math.sqrt(delta * delta + 1);
        int n = (int) Math.ceil(decades / Math.log(rho)) + (int) Math.round(2.5 * bend);
        return Math.max(LEAST, Math.min(24, n));
    }

    private void split(Sampler s, Panel panel, int direction, int depth) {
        pave(s, panel.half(direction, true), depth + 1);
        pave(s, panel.half(direction, false), depth + 1);
    }

    /** Cuts [0, 1]² of a piece so that no part spans more than SPAN in sinh coordinates. */
    private void add(Integrand f, double span0, double span1, int least0, int least1) {
        int n0 = Math.max(1, (int) Math.ceil(span0 / SPAN));
        int n1 = Math.max(1, (int) Math.ceil(span1 / SPAN));
        int[] orders = {Math.max(least0, order(Math.PI / 2, span0 / n0, 0)), Math.max(least1, order(Math.PI / 2, span1 / n1, 0))};
        for (int i = 0; i < n0; i++) {
            for (int j = 0; j < n1; j++) {
                pieces.add(new Piece(f, new double[] {(double) i / n0, (double) j / n1},
                    new double[] {(i + 1.0) / n0, (j + 1.0) / n1}, orders));
            }
        }
    }

    // ---- lines

    private static final double[] ALONG = {0, 0.23, 0.5, 0.71, 1};

    private void line(Sampler s, Panel panel, int depth) {
        double length = panel.length[0];
        if (!(length > s.facet.leastLength())) {
            return;
        }
        double[] b = s.toAnchor(panel.anchor);
        double least = Double.POSITIVE_INFINITY;
        int nearest = 0;
        for (int i = 0; i < ALONG.length; i++) {
            double d = distance(panel.sample, b, i);
            if (d < least) {
                least = d;
                nearest = i;
            }
        }
        double bend = panel.bend[0][0];
        double lift = lift(s);
        if (Math.hypot(least, lift) > FAR * length && bend < 1.5) {
            double distance = Math.hypot(Math.max(0, least - length / 8), lift);
            pieces.add(Piece.whole(new Pieces.Box(s, panel), order(distance, length, bend)));
            return;
        }
        if (bend > BENT && depth < DEEPEST) {
            split(s, panel, 0, depth);
            return;
        }
        double from = panel.from[0];
        double to = panel.to[0];
        nearLine(s, from, to, from + (to - from) * ALONG[nearest], lift, length);
    }

    private void nearLine(Sampler s, double from, double to, double guess, double lift, double length) {
        double at = footOnLine(s, from, to, guess, length);
        Chart.Anchor foot = s.anchor(at);
        double[] b = s.toAnchor(foot);
        for (double[] du : space.du) {
            du[0] = 0;
        }
        s.place(foot, space.du, 1);
        double[][] t = s.tangent(0);
        double[] tangent = {t[0][0], t[1][0], t[2][0]};
        double speed = norm(tangent);
        if (s.patch.kernel().kind == Kernel.Kind.PLANE) {
            layers(s, from, to, at);
            return;
        }
        double height = Math.hypot(norm(b), lift);
        double[] pole = null;
        boolean isEdge = s instanceof Sampler.Edge;
        if (!s.patch.kernel().isEndless() && s.steepness() > 0) {
            roughness = Math.max(roughness, (potential ? 0.1 : 1) * s.steepness() * Sampler.EPS * (norm(s.seen) + norm(foot.position())) / height);
        }
        if (isEdge && s.patch.dimension() == 2) {
            besideRim(s, foot, height);
        }
        if (s.patch.kernel().isEndless()) {
            besideRims(s, from, to);
        }
        if (!isEdge && !(height > touching(s, foot))) {
            height = 0;
            double sigma = s.densityAt(foot);
            if (!s.patch.kernel().isEndless()) {
                contact.unbounded("on a line charge: the field grows without bound as 1 over the distance", null);
                return;
            }
            if (!potential && sigma != 0) {
                pole = onEndlessSheet(s, tangent, speed, sigma, to - at > 0, at - from > 0);
                if (contact.unboundedReason() != null && contact.isUnboundedLine()) {
                    return;
                }
            }
        }
        segment(s, at, to, speed, height, pole, 1);
        segment(s, at, from, speed, height, pole, -1);
    }

    /** Edges of a sheet that is endless along the kernel's axis. */
    private void besideRims(Sampler s, double from, double to) {
        for (double end : new double[] {from, to}) {
            if ((end == 0 || end == 1) && !s.chart.isFullTurn(s.facet.axes[0])) {
                Chart.Anchor rim = s.anchor(end);
                besideRim(s, rim, norm(s.toAnchor(rim)));
            }
        }
    }

    /** A stack of endless planes: the field of each jumps at itself, so the stack is cut at the place. */
    private void layers(Sampler s, double from, double to, double at) {
        if (at > from) {
            pieces.add(Piece.whole(new Pieces.Box(s, new double[] {from}, new double[] {at}), 12));
        }
        if (at < to) {
            pieces.add(Piece.whole(new Pieces.Box(s, new double[] {at}, new double[] {to}), 12));
        }
    }

    private void segment(Sampler s, double at, double end, double speed, double height, double[] pole, int sign) {
        if (end == at) {
            return;
        }
        double length = Math.max(speed * Math.abs(end - at), 1e-300);
        double[] own = null;
        if (pole != null) {
            own = new double[] {sign * pole[0], sign * pole[1], sign * pole[2]};
            for (int c = 0; c < 3; c++) {
                start[c] += own[c] * Math.log(length);
            }
        }
        Pieces.Segment piece = new Pieces.Segment(s, at, end, length, height, own);
        double span = piece.span();
        int n = Math.max(1, (int) Math.ceil(span / SPAN));
        int order = Math.max(10, order(Math.PI / 2, span / n, 0));
        for (int i = 0; i < n; i++) {
            pieces.add(new Piece(piece, new double[] {(double) i / n}, new double[] {(i + 1.0) / n}, new int[] {order}));
        }
    }

    /** A sheet that is endless along the kernel's axis, touched: its jump, and the 1/s coefficient of its field along the tangent. */
    private double[] onEndlessSheet(Sampler s, double[] tangent, double speed, double sigma, boolean up, boolean down) {
        Kernel k = s.patch.kernel();
        double zeta = k.kind == Kernel.Kind.HALF_LINE ? k.sign * (k.end - s.target[k.axis]) : Double.NEGATIVE_INFINITY;
        if (zeta >= 0) {
            contact.unbounded("on an edge of a charged surface: the field grows without bound towards it", null);
            return null;
        }
        double[] t = {tangent[0] / speed, tangent[1] / speed, tangent[2] / speed};
        double[] axis = new double[3];
        axis[k.axis] = 1;
        double[] n = {t[1] * axis[2] - t[2] * axis[1], t[2] * axis[0] - t[0] * axis[2], t[0] * axis[1] - t[1] * axis[0]};
        double ends = (up ? 1 : 0) - (down ? 1 : 0);
        double share = (up ? 0.5 : 0) + (down ? 0.5 : 0);
        double[] along = s.mapped(t[0], t[1], t[2]);
        contact.surface(sigma, share, s.mapped(n[0], n[1], n[2]),
            new double[] {2 * sigma * ends * along[0], 2 * sigma * ends * along[1], 2 * sigma * ends * along[2]});
        return new double[] {-2 * sigma * along[0], -2 * sigma * along[1], -2 * sigma * along[2]};
    }

    /**
     * A foot need be no nearer to the nearest point than this part of the distance, unless that is itself small against the panel, when it
     * may have to be told from zero.
     */
    private static final double FOOT = 1e-3;

    private double footOnLine(Sampler s, double from, double to, double guess, double length) {
        double at = guess;
        for (int step = 0; step < 30; step++) {
            Chart.Anchor anchor = s.anchor(at);
            double[] b = s.toAnchor(anchor);
            for (double[] du : space.du) {
                du[0] = 0;
            }
            s.place(anchor, space.du, 1);
            double[][] t = s.tangent(0);
            double square = t[0][0] * t[0][0] + t[1][0] * t[1][0] + t[2][0] * t[2][0];
            double next = snap(at - (t[0][0] * b[0] + t[1][0] * b[1] + t[2][0] * b[2]) / square, from, to);
            double moved = Math.abs(next - at);
            at = next;
            if (!(moved > 1e-15 * (to - from)) || norm(b) > FOOT * length && moved * moved * square < FOOT * FOOT * dot(b, b)) {
                break;
            }
        }
        return at;
    }

    private static double snap(double u, double from, double to) {
        double near = 1e-14 * (to - from);
        return u < from + near ? from : u > to - near ? to : Double.isNaN(u) ? (from + to) / 2 : u;
    }

    private static double distance(double[][] offset, double[] b, int i) {
        double x = b[0] + offset[0][i];
        double y = b[1] + offset[1][i];
        double z = b[2] + offset[2][i];
        return Math.sqrt(x * x + y * y + z * z);
    }

    // ---- surfaces

    /** Nine samples of a box, index 3·i + j. */
    private void surface(Sampler s, Panel panel, int depth) {
        double[] b = s.toAnchor(panel.anchor);
        double[] length = panel.length;
        double size = Math.max(length[0], length[1]);
        if (!(size > 0)) {
            return;
        }
        double least = Double.POSITIVE_INFINITY;
        int nearest = 4;
        for (int i = 0; i < 9; i++) {
            double d = distance(panel.sample, b, i);
            if (d < least) {
                least = d;
                nearest = i;
            }
        }
        double lift = lift(s);
        double[][] bends = panel.bend;
        double bend0 = Math.max(bends[0][0], bends[1][0]);
        double bend1 = Math.max(bends[0][1], bends[1][1]);
        if (panel.uneven >= 0 && depth < DEEPEST) {
            split(s, panel, panel.uneven, depth);
            return;
        }
        if (Math.hypot(least, lift) > FAR * size && Math.max(bend0, bend1) < 2.5) {
            double distance = Math.hypot(Math.max(0.5 * least, least - size / 4), lift);
            pieces.add(Piece.whole(new Pieces.Box(s, panel), order(distance, length[0], bend0), order(distance, length[1], bend1)));
            return;
        }
        double[] from = panel.from;
        double[] to = panel.to;
        boolean fan0 = panel.shortest[1] < 1e-9 * size && panel.collapsed[0] != 1;
        boolean fan1 = panel.shortest[0] < 1e-9 * size && panel.collapsed[1] != 1;
        if (fan0 ^ fan1) {
            int ray = fan0 ? 0 : 1;
            boolean low = panel.collapsed[ray] == 0;
            int tip = ray == 0 ? low ? 1 : 7 : low ? 3 : 5;
            double tipDistance = Math.hypot(distance(panel.sample, b, tip), lift);
            boolean round = bends[ray][1 - ray] > 1.2 && length[1 - ray] > 0.5 * length[ray];
            int over = overTip(s, from, to, ray, low, tipDistance, length[ray], bends[ray][ray], depth);
            if (over == DONE) {
                return;
            }
            if (depth < DEEPEST) {
                split(s, panel, over == ASIDE && round ? 1 - ray : ray, depth);
                return;
            }
        }
        if (Math.max(bend0, bend1) > BENT && depth < DEEPEST) {
            double cost0 = bend0 * (bend0 > BENT ? 1 : 0) + 1e-3 * length[0] / size;
            double cost1 = bend1 * (bend1 > BENT ? 1 : 0) + 1e-3 * length[1] / size;
            boolean long0 = Math.hypot(least, lift) > 0.2 * size ? length[0] >= length[1] : cost0 >= cost1;
            split(s, panel, long0 ? 0 : 1, depth);
            return;
        }
        double[] guess = {from[0] + (to[0] - from[0]) * (nearest / 3) / 2.0, from[1] + (to[1] - from[1]) * (nearest % 3) / 2.0};
        nearSurface(s, panel, guess, lift, depth);
    }

    private static final int DONE = 0;
    private static final int ASIDE = 1;
    private static final int BENT_RAYS = 2;

    /** A box with one edge shrunk to the tip, and the place (nearly) straight over the tip. */
    private int overTip(Sampler s, double[] from, double[] to, int ray, boolean low, double tipDistance, double length, double bend,
        int depth) {
        double[] tip = {(from[0] + to[0]) / 2, (from[1] + to[1]) / 2};
        tip[ray] = low ? from[ray] : to[ray];
        Chart.Anchor apex = s.anchor(tip);
        double[] b = s.toAnchor(apex);
        if (aside(s, apex, b, from, to, tip, ray, low ? 1 : -1) > 0.15 * tipDistance && tipDistance > touching(s, apex)) {
            return ASIDE;
        }
        if (bend > BENT && depth < DEEPEST) {
            return BENT_RAYS;
        }
        double height = Math.hypot(norm(b), lift(s));
        roundsOffsets(s, apex, height);
        if (!(height > touching(s, apex))) {
            height = 0;
            if (!potential && s instanceof Sampler.Coulomb && s.patch.kernel() == Kernel.POINT && !onTip(s, from, to, tip, ray)) {
                return DONE;
            }
        }
        Pieces.Fan fan = new Pieces.Fan(s, tip, ray, low ? to[ray] : from[ray], from[1 - ray], to[1 - ray], length, height);
        double span = fan.span();
        int n = height > 0 ? Math.max(1, (int) Math.ceil(span / SPAN)) : 1;
        int order = Math.max(10, order(Math.PI / 2, span / n, 0));
        int parts = height > 0 ? 2 : 1;
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < parts; j++) {
                pieces.add(new Piece(fan, new double[] {(double) i / n, (double) j / parts},
                    new double[] {(i + 1.0) / n, (j + 1.0) / parts}, new int[] {order, height > 0 ? 14 : 24}));
            }
        }
        return DONE;
    }

    /** How far the place is from standing straight over the tip, towards some direction of the fan. */
    private double aside(Sampler s, Chart.Anchor apex, double[] b, double[] from, double[] to, double[] tip, int ray, int sign) {
        int n = 17;
        for (int i = 0; i < n; i++) {
            space.du[ray][i] = 0;
            space.du[1 - ray][i] = from[1 - ray] + (to[1 - ray] - from[1 - ray]) * i / (n - 1.0) - tip[1 - ray];
        }
        s.place(apex, space.du, n);
        double[][] t = s.tangent(ray);
        double most = 0;
        for (int i = 0; i < n; i++) {
            double speed = Math.sqrt(size2(t, i));
            most = Math.max(most, -sign * (t[0][i] * b[0] + t[1][i] * b[1] + t[2][i] * b[2]) / speed);
        }
        return most;
    }

    /** The place is on the tip of a fan: its jump and pull. False when a field without bound makes the pieces useless. */
    private boolean onTip(Sampler s, double[] from, double[] to, double[] tip, int ray) {
        int n = 24;
        var rule = fieldwright.integral.GaussLegendre.of(n);
        Chart.Anchor apex = s.anchor(tip);
        for (int i = 0; i < n; i++) {
            space.du[ray][i] = 0;
            space.du[1 - ray][i] = from[1 - ray] + (to[1 - ray] - from[1 - ray]) * rule.node(i) - tip[1 - ray];
        }
        Nodes nodes = s.place(apex, space.du, n);
        s.patch.weight().evaluate(nodes, apex.position(), n, space.density);
        double[][] t = s.tangent(ray);
        double[][] e = new double[n][3];
        for (int i = 0; i < n; i++) {
            double size = Math.sqrt(t[0][i] * t[0][i] + t[1][i] * t[1][i] + t[2][i] * t[2][i]);
            for (int a = 0; a < 3; a++) {
                e[i][a] = t[a][i] / size;
            }
        }
        double[] around = new double[3];
        double turn = 0;
        double sigma = 0;
        double[] normal = new double[3];
        double width = to[1 - ray] - from[1 - ray];
        double[] angleAt = new double[n];
        for (int i = 0; i < n; i++) {
            int j = i + 1 < n ? i + 1 : i - 1;
            double[] c = {e[i][1] * e[j][2] - e[i][2] * e[j][1], e[i][2] * e[j][0] - e[i][0] * e[j][2], e[i][0] * e[j][1] - e[i][1] * e[j][0]};
            angleAt[i] = Math.asin(Math.min(1, norm(c))) / Math.abs(rule.node(j) - rule.node(i));
            double sign = i + 1 < n ? 1 : -1;
            for (int a = 0; a < 3; a++) {
                normal[a] += sign * c[a];
            }
        }
        double largest = 0;
        for (int i = 0; i < n; i++) {
            turn += rule.weight(i) * angleAt[i];
            sigma += rule.weight(i) * space.density[i];
            largest = Math.max(largest, Math.abs(space.density[i]));
            for (int a = 0; a < 3; a++) {
                around[a] += rule.weight(i) * angleAt[i] * space.density[i] * e[i][a];
            }
        }
        if (!(largest > 0) || !(width > 0)) {
            return true;
        }
        double size = norm(normal);
        double[] unit = size > 0 ? new double[] {normal[0] / size, normal[1] / size, normal[2] / size} : new double[] {0, 0, 1};
        contact.surface(sigma, turn / (2 * Math.PI), s.mapped(unit[0], unit[1], unit[2]), s.mapped(around[0], around[1], around[2]));
        return true;
    }

    private void nearSurface(Sampler s, Panel panel, double[] guess, double lift, int depth) {
        double[] from = panel.from;
        double[] to = panel.to;
        double[] at = footOnSurface(s, from, to, guess, Math.max(panel.length[0], panel.length[1]));
        double[][] corners = {{from[0], from[1]}, {to[0], from[1]}, {to[0], to[1]}, {from[0], to[1]}};
        if (!polar(s, corners, at, lift)) {
            if (depth < DEEPEST) {
                split(s, panel, depth % 2, depth);
            } else {
                pieces.add(Piece.whole(new Pieces.Box(s, panel), 8, 8));
            }
        }
    }

    /** Triangles from the nearest point to each side of a flat or nearly flat polygon of parameters; false when the map is degenerate there. */
    private boolean polar(Sampler s, double[][] corners, double[] at, double lift) {
        Chart.Anchor foot = s.anchor(at);
        double[] b = s.toAnchor(foot);
        for (double[] du : space.du) {
            du[0] = 0;
        }
        s.place(foot, space.du, 1);
        double[][] t0 = s.tangent(0);
        double[][] t1 = s.tangent(1);
        double[] p = {t0[0][0], t0[1][0], t0[2][0]};
        double[] q = {t1[0][0], t1[1][0], t1[2][0]};
        double[] n = {p[1] * q[2] - p[2] * q[1], p[2] * q[0] - p[0] * q[2], p[0] * q[1] - p[1] * q[0]};
        double area = norm(n);
        double[] e1 = norm(p) >= norm(q) ? unit(p) : unit(q);
        if (!(area > 1e-12 * norm(p) * norm(q)) || e1 == null) {
            return false;
        }
        double[] normal = unit(n);
        double[] e2 = {normal[1] * e1[2] - normal[2] * e1[1], normal[2] * e1[0] - normal[0] * e1[2], normal[0] * e1[1] - normal[1] * e1[0]};
        double[] metric = {dot(p, e1), dot(q, e1), dot(p, e2), dot(q, e2)};
        double height = Math.hypot(norm(b), lift);
        double[][] pole = null;
        double sigma = 0;
        roundsOffsets(s, foot, height);
        if (!(height > touching(s, foot))) {
            height = 0;
            if (!potential && s instanceof Sampler.Coulomb && s.patch.kernel() == Kernel.POINT) {
                sigma = s.densityAt(foot);
                if (sigma != 0) {
                    double[] a = s.mapped(p[0], p[1], p[2]);
                    double[] c = s.mapped(q[0], q[1], q[2]);
                    pole = new double[2][3];
                    for (int i = 0; i < 3; i++) {
                        pole[0][i] = sigma * a[i];
                        pole[1][i] = sigma * c[i];
                    }
                }
            }
        }
        for (int k = 0; k < corners.length; k++) {
            double[] a = {corners[k][0] - at[0], corners[k][1] - at[1]};
            double[] c = {corners[(k + 1) % corners.length][0] - at[0], corners[(k + 1) % corners.length][1] - at[1]};
            Pieces.Triangle triangle = new Pieces.Triangle(s, at, a, c, metric, height, pole);
            if (s instanceof Sampler.Coulomb && isRim(s, corners[k], corners[(k + 1) % corners.length])) {
                besideRim(s, foot, triangle.toSide());
            }
            if (triangle.isEmpty()) {
                continue;
            }
            if (pole != null) {
                touch(s, sigma, a, c, metric, e1, e2, normal);
            }
            add(triangle, height > 0 ? triangle.spanW() : 1, triangle.spanV(), 8, 8);
        }
        return true;
    }

    private void roundsOffsets(Sampler s, Chart.Anchor foot, double height) {
        if (!s.chart.hasExactOffsets() && height > touching(s, foot)) {
            offsetRounding = Math.max(offsetRounding, touching(s, foot) / (4 * height));
        }
    }

    private void besideRim(Sampler s, Chart.Anchor foot, double distance) {
        double rounding = touching(s, foot) / 2;
        if (potential || !(rounding > 1e-14 * distance) || !(distance > 0)) {
            return;
        }
        double[] unit = s.mapped(1, 0, 0);
        rimError += 2 * Math.abs(s.densityAt(foot)) * norm(unit) * rounding / distance;
    }

    /** Whether a side between two corners, in parameters, is an edge of the patch. */
    private static boolean isRim(Sampler s, double[] corner, double[] next) {
        if (s.patch.triangle()) {
            return true;
        }
        for (int j = 0; j < 2; j++) {
            boolean end = corner[j] == next[j] && (corner[j] == 0 || corner[j] == 1);
            if (end && !s.chart.isFullTurn(s.facet.axes[j])) {
                return true;
            }
        }
        return false;
    }

    private static double dot(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }

    private static double[] unit(double[] v) {
        double size = norm(v);
        return size > 0 && Double.isFinite(size) ? new double[] {v[0] / size, v[1] / size, v[2] / size} : null;
    }

    /** One triangle's share of the turn about a place on the surface. */
    private void touch(Sampler s, double sigma, double[] a, double[] c, double[] metric, double[] e1, double[] e2, double[] normal) {
        double thetaA = Math.atan2(metric[2] * a[0] + metric[3] * a[1], metric[0] * a[0] + metric[1] * a[1]);
        double thetaB = Math.atan2(metric[2] * c[0] + metric[3] * c[1], metric[0] * c[0] + metric[1] * c[1]);
        double turn = thetaB - thetaA;
        if (turn > Math.PI) {
            turn -= 2 * Math.PI;
        } else if (turn < -Math.PI) {
            turn += 2 * Math.PI;
        }
        double sign = turn < 0 ? -1 : 1;
        double along1 = sign * sigma * (Math.sin(thetaB) - Math.sin(thetaA));
        double along2 = sign * sigma * (Math.cos(thetaA) - Math.cos(thetaB));
        contact.surface(sigma, Math.abs(turn) / (2 * Math.PI), s.mapped(normal[0], normal[1], normal[2]),
            s.mapped(along1 * e1[0] + along2 * e2[0], along1 * e1[1] + along2 * e2[1], along1 * e1[2] + along2 * e2[2]));
    }

    /** Nearest point of a box, by Gauss-Newton steps kept inside it. */
    private double[] footOnSurface(Sampler s, double[] from, double[] to, double[] guess, double length) {
        double[] at = guess;
        double best = Double.POSITIVE_INFINITY;
        double[] bestAt = guess.clone();
        for (int step = 0; step < 20; step++) {
            Chart.Anchor anchor = s.anchor(at);
            double[] b = s.toAnchor(anchor);
            double d = norm(b);
            if (d < best) {
                best = d;
                bestAt = at.clone();
            } else if (step > 8) {
                break;
            }
            for (double[] du : space.du) {
                du[0] = 0;
            }
            s.place(anchor, space.du, 1);
            double[][] t0 = s.tangent(0);
            double[][] t1 = s.tangent(1);
            double g00 = t0[0][0] * t0[0][0] + t0[1][0] * t0[1][0] + t0[2][0] * t0[2][0];
            double g01 = t0[0][0] * t1[0][0] + t0[1][0] * t1[1][0] + t0[2][0] * t1[2][0];
            double g11 = t1[0][0] * t1[0][0] + t1[1][0] * t1[1][0] + t1[2][0] * t1[2][0];
            double r0 = -(t0[0][0] * b[0] + t0[1][0] * b[1] + t0[2][0] * b[2]);
            double r1 = -(t1[0][0] * b[0] + t1[1][0] * b[1] + t1[2][0] * b[2]);
            double[] next = quadratic(at, from, to, g00, g01, g11, r0, r1);
            double move = Math.max(Math.abs(next[0] - at[0]) / (to[0] - from[0]), Math.abs(next[1] - at[1]) / (to[1] - from[1]));
            double du = next[0] - at[0];
            double dv = next[1] - at[1];
            at = next;
            if (!(move > 1e-15) || d > FOOT * length && du * du * g00 + 2 * du * dv * g01 + dv * dv * g11 < FOOT * FOOT * d * d) {
                break;
            }
        }
        double d = norm(s.toAnchor(s.anchor(at)));
        return d <= best ? at : bestAt;
    }

    /** Least of ½ dᵀGd − rᵀd for at + d in the box. */
    private static double[] quadratic(double[] at, double[] from, double[] to, double g00, double g01, double g11, double r0, double r1) {
        double det = g00 * g11 - g01 * g01;
        if (det > 1e-14 * g00 * g11) {
            double u = at[0] + (g11 * r0 - g01 * r1) / det;
            double v = at[1] + (g00 * r1 - g01 * r0) / det;
            if (u >= from[0] && u <= to[0] && v >= from[1] && v <= to[1]) {
                return new double[] {snap(u, from[0], to[0]), snap(v, from[1], to[1])};
            }
        }
        double[] best = at.clone();
        double least = Double.POSITIVE_INFINITY;
        for (int side = 0; side < 4; side++) {
            double u;
            double v;
            if (side < 2) {
                u = side == 0 ? from[0] : to[0];
                v = g11 > 0 ? at[1] + (r1 - g01 * (u - at[0])) / g11 : at[1];
                v = snap(v, from[1], to[1]);
            } else {
                v = side == 2 ? from[1] : to[1];
                u = g00 > 0 ? at[0] + (r0 - g01 * (v - at[1])) / g00 : at[0];
                u = snap(u, from[0], to[0]);
            }
            double du = u - at[0];
            double dv = v - at[1];
            double value = 0.5 * (g00 * du * du + 2 * g01 * du * dv + g11 * dv * dv) - r0 * du - r1 * dv;
            if (value < least) {
                least = value;
                best = new double[] {u, v};
            }
        }
        return best;
    }

    // ---- volumes

    /** Faces with the radial integral done first, when the place is inside or near and the density allows it. */
    private boolean faces(Facets facets, Sampler whole) {
        Facets.Extent extent = facets.extent();
        double[] b = whole.toAnchor(extent.middle());
        if (!extent.isNear(b, gap(whole), degree(whole.patch)) || growsTowards(facets, whole)) {
            return false;
        }
        Sampler.Rays rays = rays(whole, extent, b);
        if (rays == null) {
            return false;
        }
        for (Facet.Face facet : facets.faces()) {
            if (facet.edges != null) {
                flatFace(facet, whole, extent.radius());
                continue;
            }
            Sampler.Face face = new Sampler.Face(facet, whole.probe, potential, rays);
            int first = pieces.size();
            pave(face, facet.whole(), 0);
            rebase(face, first);
        }
        return true;
    }

    /**
     * Whether the density, read on to the place, is so much larger there than in the body that the faces' parts would cancel to less
     * than is asked.
     */
    private boolean growsTowards(Facets facets, Sampler whole) {
        SpaceFunction rho = whole.patch.inSpace();
        if (rho.isConstant()) {
            return false;
        }
        for (double[] ray : space.ray) {
            ray[0] = 0;
        }
        rho.evaluate(whole.seen, space.ray, 1, space.density);
        return !(Math.abs(space.density[0]) <= GROWN * facets.largestDensity());
    }

    private static final double GROWN = 1e3;

    private void flatFace(Facet.Face facet, Sampler whole, double size) {
        double[] normal = facet.edges.normal;
        if (normal == null) {
            return;
        }
        double height = dot(normal, whole.toAnchor(facet.edges.middle));
        if (Math.abs(height) > touching(whole, facet.edges.middle)) {
            paveEdges(whole.probe, facet.edges, FlatFace.ofVolume(whole.patch.polynomial(), whole.target, normal, height, size));
        }
    }

    private Sampler.Rays rays(Sampler s, Facets.Extent extent, double[] b) {
        if (s.patch.polynomial() != null) {
            return Sampler.Rays.closed(s.patch.polynomial(), s.target);
        }
        int steps = raySteps(s.patch.inSpace(), s, extent.sample(), b);
        return steps == 0 ? null : Sampler.Rays.sampled(s.patch.inSpace(), steps);
    }

    /**
     * How many Gauss nodes the density takes along rays from the place to the grid of the body; exact for polynomials, by
     * comparison of two orders otherwise; 0 when it is not smooth enough along them.
     */
    private int raySteps(SpaceFunction rho, Sampler s, double[][] offset, double[] b) {
        int n = offset[0].length;
        if (rho.isConstant()) {
            return 1;
        }
        if (rho.degree >= 0 && rho.degree <= 20) {
            return (rho.degree + 3) / 2;
        }
        double[][] d = new double[3][n];
        for (int a = 0; a < 3; a++) {
            for (int i = 0; i < n; i++) {
                d[a][i] = b[a] + offset[a][i];
            }
        }
        double[] coarse = rayIntegral(rho, s, d, n, 6);
        for (int order = 8; order <= 48; order += order < 24 ? 4 : 12) {
            double[] fine = rayIntegral(rho, s, d, n, order);
            double worst = 0;
            double size = 0;
            for (int i = 0; i < n; i++) {
                if (!Double.isFinite(fine[i])) {
                    return 0;
                }
                worst = Math.max(worst, Math.abs(fine[i] - coarse[i]));
                size = Math.max(size, Math.abs(fine[i]));
            }
            if (worst <= 1e-13 * size) {
                return Math.min(GAUSS_MOST, order + 2);
            }
            coarse = fine;
        }
        return 0;
    }

    private static final int GAUSS_MOST = 50;

    private double[] rayIntegral(SpaceFunction rho, Sampler s, double[][] d, int n, int order) {
        var rule = fieldwright.integral.GaussLegendre.of(order);
        double[] sum = new double[n];
        for (int j = 0; j < order; j++) {
            for (int a = 0; a < 3; a++) {
                for (int i = 0; i < n; i++) {
                    space.ray[a][i] = rule.node(j) * d[a][i];
                }
            }
            rho.evaluate(s.seen, space.ray, n, space.density);
            for (int i = 0; i < n; i++) {
                sum[i] += rule.weight(j) * space.density[i];
            }
        }
        return sum;
    }

    /** 27 samples of a box, index 9·i + 3·j + k. */
    private void volume(Sampler s, Panel panel, int depth) {
        double[] b = s.toAnchor(panel.anchor);
        double[] length = panel.length;
        double least = Double.POSITIVE_INFINITY;
        int nearest = 13;
        for (int i = 0; i < 27; i++) {
            double d = distance(panel.sample, b, i);
            if (d < least) {
                least = d;
                nearest = i;
            }
        }
        double[] bend = {panel.bend[0][0], panel.bend[1][1], panel.bend[2][2]};
        double size = Math.max(length[0], Math.max(length[1], length[2]));
        if (!(size > 0)) {
            return;
        }
        if (least > FAR * size && Math.max(bend[0], Math.max(bend[1], bend[2])) < 2.5) {
            double distance = Math.max(0.5 * least, least - size / 4);
            int[] orders = new int[3];
            for (int k = 0; k < 3; k++) {
                orders[k] = Math.min(20, order(distance, length[k], bend[k]));
            }
            pieces.add(Piece.whole(new Pieces.Box(s, panel), orders));
            return;
        }
        int worst = 0;
        for (int k = 1; k < 3; k++) {
            if (bend[k] * length[k] > bend[worst] * length[worst]) {
                worst = k;
            }
        }
        if (bend[worst] > BENT && depth < 40) {
            split(s, panel, worst, depth);
            return;
        }
        double[] from = panel.from;
        double[] to = panel.to;
        double[] guess = new double[3];
        int[] stride = {9, 3, 1};
        for (int k = 0; k < 3; k++) {
            guess[k] = from[k] + (to[k] - from[k]) * (nearest / stride[k] % 3) / 2.0;
        }
        nearVolume(s, from, to, guess);
    }

    private static double size2(double[][] t, int i) {
        return t[0][i] * t[0][i] + t[1][i] * t[1][i] + t[2][i] * t[2][i];
    }

    private void nearVolume(Sampler s, double[] from, double[] to, double[] guess) {
        double[] at = footInVolume(s, from, to, guess);
        Chart.Anchor foot = s.anchor(at);
        double height = Math.hypot(norm(s.toAnchor(foot)), lift(s));
        if (!(height > touching(s, foot))) {
            height = 0;
        }
        for (double[] du : space.du) {
            du[0] = 0;
        }
        s.place(foot, space.du, 1);
        double[] speed = new double[3];
        for (int k = 0; k < 3; k++) {
            speed[k] = Math.sqrt(size2(s.tangent(k), 0));
        }
        for (int k = 0; k < 3; k++) {
            double mean = meanSpeed(s, foot, from, to, k);
            speed[k] = speed[k] < 0.01 * mean ? mean : speed[k];
        }
        for (int depth = 0; depth < 3; depth++) {
            for (int side = 0; side < 2; side++) {
                double reach = (side == 1 ? to[depth] : from[depth]) - at[depth];
                if (reach == 0 || !(speed[depth] > 0)) {
                    continue;
                }
                double[] low = new double[3];
                double[] high = new double[3];
                double[] scale = new double[3];
                double length = speed[depth] * Math.abs(reach);
                for (int k = 0; k < 3; k++) {
                    low[k] = from[k] - at[k];
                    high[k] = to[k] - at[k];
                    scale[k] = speed[k] > 0 ? Math.hypot(length, height) / speed[k] : Double.POSITIVE_INFINITY;
                }
                Pieces.Pyramid pyramid = new Pieces.Pyramid(s, at, depth, reach, low, high, scale, length, height);
                double span = height > 0 ? pyramid.span() : 1;
                int n = height > 0 ? Math.max(1, (int) Math.ceil(span / SPAN)) : 1;
                for (int i = 0; i < n; i++) {
                    pieces.add(new Piece(pyramid, new double[] {(double) i / n, 0, 0}, new double[] {(i + 1.0) / n, 1, 1}, new int[] {10, 10, 10}));
                }
            }
        }
    }

    /** Way per parameter towards the further end: what counts at an end where a coordinate starts as a square. */
    private double meanSpeed(Sampler s, Chart.Anchor foot, double[] from, double[] to, int k) {
        double down = from[k] - s.facet.parameter(foot, k);
        double up = to[k] - s.facet.parameter(foot, k);
        double step = up > -down ? up : down;
        for (double[] du : space.du) {
            du[0] = 0;
        }
        space.du[k][0] = step;
        Nodes nodes = s.place(foot, space.du, 1);
        double[][] o = nodes.offset;
        return Math.sqrt(o[0][0] * o[0][0] + o[1][0] * o[1][0] + o[2][0] * o[2][0]) / Math.abs(step);
    }

    private double[] footInVolume(Sampler s, double[] from, double[] to, double[] guess) {
        double[] at = guess.clone();
        for (int round = 0; round < 60; round++) {
            double moved = 0;
            for (int k = 0; k < 3; k++) {
                Chart.Anchor anchor = s.anchor(at);
                double[] b = s.toAnchor(anchor);
                for (double[] du : space.du) {
                    du[0] = 0;
                }
                s.place(anchor, space.du, 1);
                double[][] t = s.tangent(k);
                double square = size2(t, 0);
                if (square > 0) {
                    double next = snap(at[k] - (t[0][0] * b[0] + t[1][0] * b[1] + t[2][0] * b[2]) / square, from[k], to[k]);
                    moved = Math.max(moved, Math.abs(next - at[k]) / (to[k] - from[k]));
                    at[k] = next;
                }
            }
            if (moved < 1e-14) {
                break;
            }
        }
        return at;
    }
}

package fieldwright.field;

import java.util.ArrayList;
import java.util.List;

import fieldwright.charge.Charge;
import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.Source;
import fieldwright.charge.Surroundings;
import fieldwright.formula.Formula;
import fieldwright.geometry.Bodies;
import fieldwright.geometry.Chart;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Frame;
import fieldwright.geometry.NodeFunction;
import fieldwright.geometry.Nodes;
import fieldwright.geometry.Region;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Place;
import fieldwright.quantity.Units;

/**
 * One part of what is integrated over: a line, surface or volume with its charge, a path with its tangent, a surface with its normal, or
 * one face of a volume. Parameters run over the unit box; an {@link #elements element} is the charge (C), the path (m) or the area
 * (m²) per unit of the parameters.
 */
final class Domain {
    private enum Kind { CHARGE, PATH, AREA }

    private final Kind kind;
    private final Chart chart;
    private final Frame frame;
    private final NodeFunction weight;
    private final boolean triangle;
    private final double[][] breaks;
    /** Depth held: at an end for a face of a volume, the azimuth where nothing depends on it; −1 otherwise. */
    private final int held;
    private final double at;
    private final double sign;
    private final Chart.Anchor anchor;
    private final Nodes nodes = new Nodes();
    private final double[][] du = new double[3][Nodes.BLOCK];
    private final double[] density = new double[Nodes.BLOCK];

    private Domain(Kind kind, Chart chart, Frame frame, NodeFunction weight, boolean triangle, double[][] breaks, int held, double at, double sign) {
        this.kind = kind;
        this.chart = chart;
        this.frame = frame;
        this.weight = weight;
        this.triangle = triangle;
        this.breaks = breaks;
        this.held = held;
        this.at = at;
        this.sign = sign;
        double[] middle = new double[chart.dimension()];
        java.util.Arrays.fill(middle, 0.5);
        if (held >= 0) {
            middle[held] = at;
        }
        anchor = chart.anchor(middle);
    }

    /**
     * Parts of spread charge; endless uniform ones must have been refused.
     * {@code turned}: what is summed does not depend on the azimuth phi, which is left out of surfaces and volumes.
     */
    static List<Domain> charge(Source source, boolean turned) {
        List<Domain> all = new ArrayList<>();
        if (source instanceof ChargedPolyline line) {
            sides(line).forEach(side -> all.addAll(charge(side, false)));
            return all;
        }
        for (Patch p : Compiled.of(source, ClosedForms.OFF).patches) {
            int held = turned && p.dimension() > 1 ? azimuth(p.chart()) : -1;
            all.add(new Domain(Kind.CHARGE, p.chart(), p.frame(), p.weight(), p.triangle(), p.breaks(), held, 0.5, 1));
        }
        return all;
    }

    private static List<Source> sides(ChargedPolyline line) {
        double[][] c = line.corners();
        double[] from = line.atStart();
        double[] to = line.atEnd();
        List<Source> all = new ArrayList<>();
        for (int i = 0; i < from.length; i++) {
            Place a = new Place(c[0][i], c[1][i], c[2][i]);
            Place b = new Place(c[0][i + 1], c[1][i + 1], c[2][i + 1]);
            if (!a.equals(b)) {
                Formula density = density(from[i]).plus(density(to[i] - from[i]).times(Formula.variable("u")));
                all.add(Charge.of(Bodies.rod(a, b), density));
            }
        }
        return all;
    }

    private static Formula density(double si) {
        return Formula.constant(Amount.si(si, 0, Units.LINE_DENSITY));
    }

    private static int azimuth(Chart chart) {
        for (int k = 0; k < chart.dimension(); k++) {
            if (chart.coordinates().get(chart.coordinateOf(k)).equals("phi")) {
                return k;
            }
        }
        return -1;
    }

    /** A line, along its parameter. */
    static List<Domain> path(Region line) {
        List<Domain> all = new ArrayList<>();
        for (Region.PlacedChart part : line.charts()) {
            all.add(new Domain(Kind.PATH, part.chart(), part.frame(), null, false, null, -1, 0, 1));
        }
        return all;
    }

    /**
     * A surface, or the boundary of a volume. The normal of a surface points where its fixed coordinate grows; that of a parametric surface
     * or polygon is right-handed about its parameters or corners in the order stated; that of a volume points outwards.
     */
    static List<Domain> area(Region region) {
        List<Domain> all = new ArrayList<>();
        for (Region.PlacedChart part : region.charts()) {
            if (region.dimension() == 2) {
                all.add(new Domain(Kind.AREA, part.chart(), part.frame(), null, false, null, -1, 0, orientation(part.chart())));
            } else {
                faces(part, all);
            }
        }
        return all;
    }

    private static double orientation(Chart chart) {
        CoordinateSystem system = chart.system();
        if (system == null) {
            return chart.coordinateOf(0) < chart.coordinateOf(1) ? 1 : -1;
        }
        double[] u = {0.41, 0.43};
        Chart.Anchor a = chart.anchor(u);
        Nodes nodes = new Nodes();
        chart.evaluate(a, new double[2][Nodes.BLOCK], 1, nodes);
        int fixed = 3 - chart.coordinateOf(0) - chart.coordinateOf(1);
        double[] n = Vectors.cross(tangent(nodes, 0, 0), tangent(nodes, 1, 0));
        return Vectors.dot(n, growing(system, fixed, a.position())) < 0 ? -1 : 1;
    }

    private static double[] growing(CoordinateSystem system, int coordinate, double[] p) {
        double phi = Math.atan2(p[1], p[0]);
        double theta = Math.atan2(Math.sqrt(p[0] * p[0] + p[1] * p[1]), p[2]);
        double[] r = {Math.sin(theta) * Math.cos(phi), Math.sin(theta) * Math.sin(phi), Math.cos(theta)};
        return switch (system.names().get(coordinate)) {
            case "x" -> new double[] {1, 0, 0};
            case "y" -> new double[] {0, 1, 0};
            case "z" -> new double[] {0, 0, 1};
            case "rho" -> new double[] {Math.cos(phi), Math.sin(phi), 0};
            case "phi" -> new double[] {-Math.sin(phi), Math.cos(phi), 0};
            case "r" -> r;
            default -> new double[] {Math.cos(theta) * Math.cos(phi), Math.cos(theta) * Math.sin(phi), -Math.sin(theta)};
        };
    }

    private static void faces(Region.PlacedChart part, List<Domain> all) {
        Chart chart = part.chart();
        int hand = chart.handedness(new Nodes());
        for (int k = 0; k < 3; k++) {
            Domain low = face(part, k, 0, -hand);
            Domain high = face(part, k, 1, hand);
            boolean seam = low.distanceTo(high) <= 1e-12 * low.size();
            if (!seam && !chart.closesAt(k, false) && !low.isCollapsed()) {
                all.add(low);
            }
            if (!seam && !chart.closesAt(k, true) && !high.isCollapsed()) {
                all.add(high);
            }
        }
    }

    private static Domain face(Region.PlacedChart part, int depth, double at, double sign) {
        return new Domain(Kind.AREA, part.chart(), part.frame(), null, false, null, depth, at, sign);
    }

    private static final double[][] SPOTS = {{0.31, 0.37}, {0.71, 0.23}, {0.43, 0.83}};

    private double distanceTo(Domain other) {
        double most = 0;
        for (double[] spot : SPOTS) {
            most = Math.max(most, Vectors.norm(Vectors.minus(place(spot), other.place(spot))));
        }
        return most;
    }

    /** Largest distance between three places of it (m). */
    double size() {
        double[] a = place(SPOTS[0]);
        double[] b = place(SPOTS[1]);
        double[] c = place(SPOTS[2]);
        return Math.max(Vectors.norm(Vectors.minus(a, b)), Math.max(Vectors.norm(Vectors.minus(a, c)), Vectors.norm(Vectors.minus(b, c))));
    }

    /** Whether a field may bend within a domain's size: on a coarse lattice a place of a source, or a wall, comes within {@code near} sizes. */
    static boolean isNear(List<Domain> domains, List<Source> others, Surroundings around, double near) {
        List<double[]> here = new ArrayList<>();
        domains.forEach(d -> d.lattice(here));
        double size = 0;
        for (double[] p : here) {
            size = Math.max(size, Vectors.norm(Vectors.minus(p, here.get(0))));
        }
        for (double[] p : here) {
            if (around != null && Images.clearance(around, p) < near * size) {
                return true;
            }
        }
        List<double[]> there = new ArrayList<>();
        for (Source other : others) {
            if (Elements.dimension(other) == 0) {
                Elements.points(other).forEach(p -> there.add(p.at()));
            } else if (Elements.isEndless(other)) {
                return true;
            } else {
                charge(other, false).forEach(d -> d.lattice(there));
            }
        }
        for (double[] p : here) {
            for (double[] q : there) {
                if (Vectors.norm(Vectors.minus(p, q)) < near * size) {
                    return true;
                }
            }
        }
        return false;
    }

    /** Adds places spread over it, ends among them. */
    private void lattice(List<double[]> places) {
        int side = 5;
        int d = dimension();
        int total = (int) Math.round(Math.pow(side, d));
        for (int i = 0; i < total; i++) {
            double[] t = new double[d];
            int rest = i;
            for (int k = 0; k < d; k++) {
                t[k] = rest % side / (side - 1.0);
                rest /= side;
            }
            places.add(place(t));
        }
    }

    private boolean isCollapsed() {
        double[][] t = {{SPOTS[0][0], SPOTS[1][0], SPOTS[2][0]}, {SPOTS[0][1], SPOTS[1][1], SPOTS[2][1]}};
        elements(t, 3);
        double most = 0;
        for (int i = 0; i < 3; i++) {
            most = Math.max(most, Vectors.norm(new double[] {element[0][i], element[1][i], element[2][i]}));
        }
        return !(most > 1e-14 * size() * size());
    }

    int dimension() {
        return held >= 0 ? chart.dimension() - 1 : chart.dimension();
    }

    /** Where the density bends, by parameter; 0 and 1 at least. */
    double[] breaks(int depth) {
        return breaks == null ? new double[] {0, 1} : breaks[held >= 0 && depth >= held ? depth + 1 : depth];
    }

    /** Position (m, sheet) at parameters. */
    double[] place(double... t) {
        double[] u = new double[chart.dimension()];
        for (int k = 0; k < u.length; k++) {
            u[k] = k == held ? at : t[depthOf(k)];
        }
        if (triangle) {
            u[1] *= 1 - u[0];
        }
        return frame.toSheet(chart.anchor(u).position());
    }

    private int depthOf(int k) {
        return held >= 0 && k > held ? k - 1 : k;
    }

    /** Results of {@link #elements}: position by place[axis][i], element by element[·][i] (charge: element[0] only). */
    final double[][] place = new double[3][Nodes.BLOCK];
    final double[][] element = new double[3][Nodes.BLOCK];

    /** Positions and elements at a block of parameters t[k][i]. */
    void elements(double[][] t, int n) {
        double[] u0 = anchor.u();
        for (int k = 0; k < chart.dimension(); k++) {
            double[] from = k == held ? null : t[depthOf(k)];
            for (int i = 0; i < n; i++) {
                double u = from == null ? at : from[i];
                du[k][i] = (triangle && k == 1 ? u * (1 - t[0][i]) : u) - u0[k];
            }
        }
        chart.evaluate(anchor, du, n, nodes);
        for (int i = 0; i < n; i++) {
            double[] own = new double[3];
            for (int a = 0; a < 3; a++) {
                own[a] = anchor.position()[a] + nodes.offset[a][i];
            }
            double[] p = frame.toSheet(own);
            for (int a = 0; a < 3; a++) {
                place[a][i] = p[a];
            }
        }
        if (kind == Kind.CHARGE) {
            weight.evaluate(nodes, anchor.position(), n, density);
            for (int i = 0; i < n; i++) {
                double m = nodes.measure[i] * (triangle ? 1 - t[0][i] : 1);
                element[0][i] = m == 0 ? 0 : density[i] * m;
            }
            return;
        }
        for (int i = 0; i < n; i++) {
            double[] own = kind == Kind.PATH ? tangent(nodes, 0, i)
                : held < 0 ? Vectors.cross(tangent(nodes, 0, i), tangent(nodes, 1, i))
                : Vectors.cross(tangent(nodes, (held + 1) % 3, i), tangent(nodes, (held + 2) % 3, i));
            double[] e = frame.directionToSheet(own);
            for (int a = 0; a < 3; a++) {
                element[a][i] = sign * e[a];
            }
        }
    }

    private static double[] tangent(Nodes nodes, int k, int i) {
        double[][] t = nodes.tangent[k];
        return new double[] {t[0][i], t[1][i], t[2][i]};
    }
}

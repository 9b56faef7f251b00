package fieldwright.field;

import fieldwright.field.SpreadBody.Placed;
import fieldwright.field.closed.Ball;
import fieldwright.field.closed.Box;
import fieldwright.field.closed.ClosedForm;
import fieldwright.field.closed.Cylinder;
import fieldwright.field.closed.Disc;
import fieldwright.field.closed.EndlessCylinder;
import fieldwright.field.closed.EndlessLine;
import fieldwright.field.closed.EndlessPlane;
import fieldwright.field.closed.EndlessTube;
import fieldwright.field.closed.HalfEndlessLine;
import fieldwright.field.closed.Polygon;
import fieldwright.field.closed.Ring;
import fieldwright.field.closed.Rod;
import fieldwright.field.closed.Slab;
import fieldwright.field.closed.SphericalShell;
import fieldwright.field.closed.Strip;
import fieldwright.field.closed.Tube;
import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.formula.Polynomial;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.geometry.Frame;
import fieldwright.geometry.ParametricRegion;
import fieldwright.geometry.Region;
import fieldwright.geometry.RegionParts;
import fieldwright.geometry.TriangleRegion;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/**
 * Which closed forms a region with its density is: round bodies with full turns and constant limits and one density; straight, flat or
 * rectangular ones, in any of the descriptions, with a density that is constant or linear. Decided from the formulas, never from samples:
 * a polynomial is expanded and all that is not linear must vanish.
 */
final class ClosedShapes {
    private static final double EPS = Math.ulp(1.0);
    private static final double FULL_TURN = 2 * Math.PI;

    /** The forms, or why there are none. */
    record Found(List<Placed> forms, String whyNot) {
        static Found of(ClosedForm form, Frame frame) {
            return new Found(List.of(new Placed(form, frame)), null);
        }

        static Found none(String why) {
            return new Found(List.of(), why);
        }
    }

    private final Formula density;
    private final Frame frame;

    /** A form in a frame of the region's own. */
    private Frame placed(Frame local) {
        return frame.isOwn() ? local : local.isOwn() ? frame : local.then(frame);
    }

    private ClosedShapes(Formula density, Frame frame) {
        this.density = density;
        this.frame = frame;
    }

    /** {@code density} as the patches have it: free of conditions that were seen to hold. */
    static Found of(Region region, Formula density, Frame frame) {
        ClosedShapes shapes = new ClosedShapes(density, frame);
        try {
            if (region instanceof CoordinateRegion c) {
                return shapes.coordinates(c);
            }
            if (region instanceof ParametricRegion p) {
                return shapes.parametric(p);
            }
            if (region instanceof TriangleRegion t) {
                return shapes.polygon(List.of(point(t.a()), point(t.b()), point(t.c())));
            }
            return region instanceof RegionParts parts && isPolygon(parts) ? shapes.polygon(outline(parts)) : Found.none("the region has several parts");
        } catch (IllegalArgumentException refused) {
            return Found.none(refused.getMessage());   // a form's own check of sizes; the panels say what is wrong, if anything is
        }
    }

    /** Whether all parts are triangles, as those of a polygon. */
    static boolean isPolygon(RegionParts parts) {
        return parts.parts().stream().allMatch(TriangleRegion.class::isInstance) && outline(parts) != null;
    }

    // ---- coordinates

    private Found coordinates(CoordinateRegion c) {
        Map<String, double[]> span = new LinkedHashMap<>();
        List<String> limited = new ArrayList<>();
        for (Map.Entry<String, Extent> e : c.extents().entrySet()) {
            if (!e.getValue().variables().isEmpty()) {
                return c.system() == CoordinateSystem.CARTESIAN && c.dimension() == 2 ? trapezoid(c)
                    : Found.none("limits of " + e.getKey() + " depend on other coordinates");
            }
            if (e.getValue() instanceof Extent.Limits limits) {
                limited.add(e.getKey());
                span.put(e.getKey(), new double[] {number(limits.from()), number(limits.to())});
            } else {
                double at = number(((Extent.Fixed) e.getValue()).at());
                span.put(e.getKey(), new double[] {at, at});
            }
        }
        return switch (c.system()) {
            case CARTESIAN -> flat(c.system(), span, limited);
            case CYLINDRICAL -> limited.contains("phi") ? round(span, limited) : flat(c.system(), span, limited);
            case SPHERICAL -> limited.contains("phi") ? spherical(span, limited)
                : limited.contains("theta") ? Found.none("an arc, or part of a plane between two angles") : flat(c.system(), span, limited);
        };
    }

    /** Values of one density: its fixed coordinates put in. Null when anything else is in it, or when it is not a finite number. */
    private Double uniform(Map<String, double[]> span, List<String> limited) {
        Map<String, Formula> fixed = new LinkedHashMap<>();
        for (Map.Entry<String, double[]> e : span.entrySet()) {
            if (!limited.contains(e.getKey())) {
                fixed.put(e.getKey(), Formula.constant(e.getValue()[0]));
            }
        }
        Formula f = density.variables().isEmpty() ? density : density.substitute(fixed);
        if (!f.variables().isEmpty()) {
            return null;
        }
        double value = number(f);
        return Double.isFinite(value) ? value : null;
    }

    private Found notUniform() {
        return Found.none("the density " + density.text() + " is not the same all over this round body");
    }

    private static boolean isFullTurn(double[] phi) {
        return Math.abs(phi[1] - phi[0] - FULL_TURN) <= 4 * EPS * (Math.abs(phi[0]) + Math.abs(phi[1]));
    }

    private Found round(Map<String, double[]> span, List<String> limited) {
        Double value = uniform(span, limited);
        if (value == null) {
            return notUniform();
        }
        if (!isFullTurn(span.get("phi"))) {
            return Found.none("phi does not run through a full turn");
        }
        double[] rho = span.get("rho");
        double[] z = span.get("z");
        boolean thick = limited.contains("rho");
        return limited.contains("z") ? (thick ? standing(rho, z, value) : tube(rho[0], z, value)) : lying(rho, thick, z[0], value);
    }

    /** Ring, disc, annulus or the whole plane at a height. */
    private Found lying(double[] rho, boolean thick, double z, double value) {
        Frame at = placed(z == 0 ? Frame.OWN : Frame.moved(0, 0, z));
        if (!thick) {
            return Found.of(new Ring(rho[0], value), at);
        }
        if (rho[1] == Double.POSITIVE_INFINITY) {
            return rho[0] == 0 ? Found.of(new EndlessPlane(value), at) : Found.none("an endless plane with a hole");
        }
        List<Placed> forms = new ArrayList<>(List.of(new Placed(new Disc(rho[1], value), at)));
        if (rho[0] > 0) {
            forms.add(new Placed(new Disc(rho[0], -value), at));
        }
        return rho[0] < rho[1] ? new Found(forms, null) : Found.none("it has no area");
    }

    private Found tube(double rho, double[] z, double value) {
        if (isEndless(z)) {
            return isWhole(z) ? Found.of(new EndlessTube(rho, value), frame) : Found.none("a tube endless to one side");
        }
        return Found.of(new Tube(z[0], z[1], rho, value), frame);
    }

    private Found standing(double[] rho, double[] z, double value) {
        if (rho[1] == Double.POSITIVE_INFINITY) {
            return rho[0] == 0 && !isEndless(z) ? Found.of(new Slab(z[0], z[1], value), frame) : Found.none("endless in rho, and no slab");
        }
        if (isEndless(z)) {
            return isWhole(z) ? Found.of(new EndlessCylinder(rho[0], rho[1], value), frame) : Found.none("a cylinder endless to one side");
        }
        List<Placed> forms = new ArrayList<>(List.of(new Placed(new Cylinder(z[0], z[1], rho[1], value), frame)));
        if (rho[0] > 0) {
            forms.add(new Placed(new Cylinder(z[0], z[1], rho[0], -value), frame));
        }
        return rho[0] < rho[1] ? new Found(forms, null) : Found.none("it has no volume");
    }

    private Found spherical(Map<String, double[]> span, List<String> limited) {
        Double value = uniform(span, limited);
        if (value == null) {
            return notUniform();
        }
        if (!isFullTurn(span.get("phi"))) {
            return Found.none("phi does not run through a full turn");
        }
        double[] r = span.get("r");
        double[] theta = span.get("theta");
        boolean thick = limited.contains("r");
        if (limited.contains("theta")) {
            if (theta[0] != 0 || Math.abs(theta[1] - Math.PI) > 2 * EPS * Math.PI) {
                return Found.none("theta does not run from pole to pole");
            }
            return Found.of(thick ? new Ball(r[0], r[1], value) : new SphericalShell(r[0], value), frame);
        }
        double sine = Math.sin(theta[0]);
        double cosine = Math.abs(theta[0] - Math.PI / 2) <= EPS ? 0 : Math.cos(theta[0]);
        if (thick) {
            return cosine == 0 ? lying(r, true, 0, value) : Found.none("a cone's surface");
        }
        return lying(new double[] {r[0] * sine, r[0] * sine}, false, r[0] * cosine, value);
    }

    // ---- straight, flat, rectangular

    /** Places start + Σ t_k edge_k, each t_k between limits; {@code names}: what stands in a density, as formulas of t_0, t_1, t_2 = x, y, z. */
    private record Flat(double[] start, List<double[]> edges, List<double[]> limits, Map<String, Formula> names) { }

    private static final double[] NONE = {0, 0, 0};

    private Found flat(CoordinateSystem system, Map<String, double[]> span, List<String> limited) {
        double[] start = new double[3];
        List<double[]> edges = new ArrayList<>();
        List<double[]> limits = new ArrayList<>();
        Map<String, Formula> names = new LinkedHashMap<>();
        for (Map.Entry<String, double[]> e : span.entrySet()) {
            double[] along = direction(system, e.getKey(), span);
            if (limited.contains(e.getKey())) {
                names.put(e.getKey(), parameter(edges.size()));
                edges.add(along);
                limits.add(e.getValue());
            } else {
                names.put(e.getKey(), Formula.constant(e.getValue()[0]));
                for (int a = 0; a < 3; a++) {
                    start[a] += e.getValue()[0] * along[a];
                }
            }
        }
        return flat(new Flat(start, edges, limits, names));
    }

    private static Formula parameter(int k) {
        return Formula.variable("xyz".substring(k, k + 1));
    }

    /** How the place moves with a coordinate, angles being fixed. */
    private static double[] direction(CoordinateSystem system, String name, Map<String, double[]> span) {
        double c = system == CoordinateSystem.CARTESIAN ? 0 : cosine(span.get("phi")[0]);
        double s = system == CoordinateSystem.CARTESIAN ? 0 : cosine(span.get("phi")[0] - Math.PI / 2);
        return switch (name) {
            case "x" -> new double[] {1, 0, 0};
            case "y" -> new double[] {0, 1, 0};
            case "z" -> new double[] {0, 0, 1};
            case "rho" -> new double[] {c, s, 0};
            case "r" -> {
                double sine = cosine(span.get("theta")[0] - Math.PI / 2);
                yield new double[] {sine * c, sine * s, cosine(span.get("theta")[0])};
            }
            default -> NONE;
        };
    }

    /** Exact at quarter turns. */
    private static double cosine(double angle) {
        double quarter = angle / (Math.PI / 2);
        return Math.abs(quarter - Math.rint(quarter)) <= EPS * Math.abs(quarter) ? Math.rint(Math.cos(angle)) : Math.cos(angle);
    }

    /** A shape of parameters in which the position is linear, without products of them. */
    private Found parametric(ParametricRegion p) {
        double[] start = new double[3];
        List<double[]> edges = new ArrayList<>();
        List<double[]> limits = new ArrayList<>();
        Map<String, Formula> names = new LinkedHashMap<>();
        for (Map.Entry<String, Extent> e : p.parameters().entrySet()) {
            Extent.Limits between = (Extent.Limits) e.getValue();
            if (!between.variables().isEmpty()) {
                return Found.none("limits of " + e.getKey() + " depend on other parameters");
            }
            names.put(e.getKey(), parameter(names.size()));
            limits.add(new double[] {number(between.from()), number(between.to())});
            edges.add(new double[3]);
        }
        Formula[] position = {p.x(), p.y(), p.z()};
        for (int a = 0; a < 3; a++) {
            double[] c = linear(position[a], names);
            if (c == null) {
                return Found.none("its " + "xyz".charAt(a) + " is not linear in the parameters");
            }
            start[a] = c[0];
            for (int k = 0; k < edges.size(); k++) {
                edges.get(k)[a] = c[k + 1];
            }
        }
        return flat(new Flat(start, edges, limits, names));
    }

    /** c₀ + Σ c_k t_k when the formula is that, else null. */
    static double[] linear(Formula f, Map<String, Formula> names) {
        if (!names.keySet().containsAll(f.variables())) {
            return null;
        }
        Polynomial p = Polynomial.of(f.substitute(names), new double[3]);
        if (p == null) {
            return null;
        }
        for (int i = 4; i < Polynomial.count(p.degree()); i++) {
            if (p.coefficient(i) != 0) {
                return null;
            }
        }
        double[] c = {p.coefficient(0), 0, 0, 0};
        for (int k = 1; k < 4 && p.degree() > 0; k++) {
            c[k] = p.coefficient(k);
        }
        return Double.isFinite(c[0] + c[1] + c[2] + c[3]) ? c : null;
    }

    /** The density by t_0, t_1, t_2, with x, y, z of the place where they are no names of the region itself. */
    private double[] linearDensity(Flat f) {
        Map<String, Formula> names = new LinkedHashMap<>(f.names);
        for (int a = 0; a < 3; a++) {
            Formula sum = Formula.constant(f.start[a]);
            for (int k = 0; k < f.edges.size(); k++) {
                sum = f.edges.get(k)[a] == 0 ? sum : sum.plus(Formula.constant(f.edges.get(k)[a]).times(parameter(k)));
            }
            names.putIfAbsent("xyz".substring(a, a + 1), sum);
        }
        return linear(density, names);
    }

    private Found flat(Flat f) {
        double[] q = linearDensity(f);
        if (q == null) {
            return Found.none("the density " + density.text() + " is neither constant nor linear");
        }
        return switch (f.edges.size()) {
            case 1 -> line(f, q);
            case 2 -> plane(f, q);
            default -> block(f, q);
        };
    }

    private static Found linearOnEndless() {
        return Found.none("an endless body whose density is not constant");
    }

    private Found line(Flat f, double[] q) {
        double[] edge = f.edges.get(0);
        double[] t = f.limits.get(0);
        double speed = norm(edge);
        if (!(speed > 0)) {
            return Found.none("it has no length");
        }
        if (!isEndless(t)) {
            return Found.of(new Rod(t[0] * speed, t[1] * speed, q[0], q[1] / speed), placed(upright(f.start, edge)));
        }
        if (q[1] != 0) {
            return linearOnEndless();
        }
        if (isWhole(t)) {
            return Found.of(new EndlessLine(q[0]), placed(upright(f.start, edge)));
        }
        boolean up = t[1] == Double.POSITIVE_INFINITY;
        double end = up ? t[0] : t[1];
        double[] from = {f.start[0] + end * edge[0], f.start[1] + end * edge[1], f.start[2] + end * edge[2]};
        return Found.of(new HalfEndlessLine(q[0]), placed(upright(from, up ? edge : times(edge, -1))));
    }

    private Found plane(Flat f, double[] q) {
        double[] first = f.edges.get(0);
        double[] second = f.edges.get(1);
        double[] s = f.limits.get(0);
        double[] t = f.limits.get(1);
        Frame local = lying(f.start, first, second);
        if (local == null) {
            return Found.none("it has no area");
        }
        double length = norm(first);
        double along = local.directionToOwn(second)[0];
        double across = local.directionToOwn(second)[1];
        boolean square = Math.abs(along) <= 8 * EPS * norm(second);
        if (isEndless(s) || isEndless(t)) {
            if (q[1] != 0 || q[2] != 0 || !square) {
                return linearOnEndless();
            }
            if (isWhole(s) && isWhole(t)) {
                return Found.of(new EndlessPlane(q[0]), placed(local));
            }
            if (isWhole(t) && !isEndless(s)) {
                return Found.of(new Strip(s[0] * length, s[1] * length, q[0]), placed(local));
            }
            return isWhole(s) && !isEndless(t) ? Found.of(new Strip(t[0] * across, t[1] * across, q[0]), placed(lying(f.start, second, first)))
                : Found.none("a plane endless to one side");
        }
        along = square ? 0 : along;
        double[] x = {s[0] * length + t[0] * along, s[1] * length + t[0] * along, s[1] * length + t[1] * along, s[0] * length + t[1] * along};
        double[] y = {t[0] * across, t[0] * across, t[1] * across, t[1] * across};
        double slopeX = q[1] / length;
        return Found.of(new Polygon(x, y, q[0], slopeX, (q[2] - slopeX * along) / across), placed(local));
    }

    private Found block(Flat f, double[] q) {
        List<double[]> e = f.edges;
        for (int k = 0; k < 3; k++) {
            if (Math.abs(product(e.get(k), e.get((k + 1) % 3))) > 8 * EPS * norm(e.get(k)) * norm(e.get((k + 1) % 3))) {
                return Found.none("its edges are not square to each other");
            }
        }
        Frame local = lying(f.start, e.get(0), e.get(1));
        if (local == null || !(norm(e.get(2)) > 0)) {
            return Found.none("it has no volume");
        }
        double[] size = {norm(e.get(0)), norm(e.get(1)), norm(e.get(2)) * Math.signum(local.directionToOwn(e.get(2))[2])};
        double[][] box = new double[3][];
        int finite = -1;
        int endless = 0;
        for (int k = 0; k < 3; k++) {
            double a = size[k] * f.limits.get(k)[0];
            double b = size[k] * f.limits.get(k)[1];
            box[k] = new double[] {Math.min(a, b), Math.max(a, b)};
            endless += isEndless(box[k]) ? 1 : 0;
            finite = isEndless(box[k]) ? finite : k;
        }
        if (endless == 0) {
            return Found.of(new Box(box[0][0], box[0][1], box[1][0], box[1][1], box[2][0], box[2][1], q[0], q[1] / size[0], q[2] / size[1], q[3] / size[2]),
                placed(local));
        }
        boolean slab = endless == 2 && isWhole(box[(finite + 1) % 3]) && isWhole(box[(finite + 2) % 3]);
        if (!slab || q[1] != 0 || q[2] != 0 || q[3] != 0) {
            return slab ? linearOnEndless() : Found.none("endless, and no slab");
        }
        double[] t = f.limits.get(finite);
        double thick = norm(e.get(finite));
        return Found.of(new Slab(t[0] * thick, t[1] * thick, q[0]), placed(upright(f.start, e.get(finite))));
    }

    /** A flat area in x, y or z whose inner limits are linear in the outer coordinate: three or four corners. */
    private Found trapezoid(CoordinateRegion c) {
        String outer = null;
        String inner = null;
        double[] corner = new double[3];
        for (Map.Entry<String, Extent> e : c.extents().entrySet()) {
            if (e.getValue() instanceof Extent.Limits limits) {
                outer = limits.variables().isEmpty() ? e.getKey() : outer;
                inner = limits.variables().isEmpty() ? inner : e.getKey();
            } else if (e.getValue().variables().isEmpty()) {
                corner["xyz".indexOf(e.getKey())] = number(((Extent.Fixed) e.getValue()).at());
            } else {
                return Found.none("the surface is not level in its fixed coordinate");
            }
        }
        Found none = Found.none("limits of " + inner + " are not linear in " + outer);
        if (outer == null || inner == null) {
            return none;
        }
        Extent.Limits o = (Extent.Limits) c.extents().get(outer);
        Extent.Limits i = (Extent.Limits) c.extents().get(inner);
        double[] low = linear(i.from(), Map.of(outer, parameter(0)));
        double[] high = linear(i.to(), Map.of(outer, parameter(0)));
        if (low == null || high == null) {
            return none;
        }
        double from = number(o.from());
        double to = number(o.to());
        List<double[]> corners = new ArrayList<>();
        for (double[] p : new double[][] {{from, low[0] + low[1] * from}, {to, low[0] + low[1] * to}, {to, high[0] + high[1] * to}, {from, high[0] + high[1] * from}}) {
            double[] next = corner.clone();
            next["xyz".indexOf(outer)] = p[0];
            next["xyz".indexOf(inner)] = p[1];
            if (!Double.isFinite(p[0] + p[1])) {
                return none;
            }
            if (corners.isEmpty() || !java.util.Arrays.equals(next, corners.get(corners.size() - 1)) && !java.util.Arrays.equals(next, corners.get(0))) {
                corners.add(next);
            }
        }
        return corners.size() > 2 ? polygon(corners) : Found.none("it has no area");
    }

    /** A flat polygon by its corners; density linear in x, y, z. */
    private Found polygon(List<double[]> corners) {
        double[] a = corners.get(0);
        int n = corners.size();
        double[] normal = new double[3];
        double extent = 0;
        for (int i = 0; i < n; i++) {
            double[] p = minus(corners.get(i), a);
            double[] c = cross(p, minus(corners.get((i + 1) % n), a));
            extent = Math.max(extent, norm(p));
            for (int k = 0; k < 3; k++) {
                normal[k] += c[k];
            }
        }
        double[] side = minus(corners.get(1), a);
        double[] across = cross(normal, side);
        Frame local = norm(across) > 0 ? lying(a, side, across) : null;
        if (local == null) {
            return Found.none("it has no area");
        }
        double[] x = new double[n];
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            double[] own = local.directionToOwn(minus(corners.get(i), a));
            x[i] = own[0];
            y[i] = own[1];
            if (Math.abs(own[2]) > 16 * EPS * extent) {
                return Found.none("its corners are not quite in one plane");
            }
        }
        if (density.variables().stream().anyMatch(v -> !Set.of("x", "y", "z").contains(v))) {
            return Found.none(Coordinates.NAMES.containsAll(density.variables()) ? "the density " + density.text() + " is neither constant nor linear in x, y, z"
                : "the density " + density.text() + " uses parameters of a triangle");
        }
        Flat f = new Flat(a, List.of(local.directionToSheet(new double[] {1, 0, 0}), local.directionToSheet(new double[] {0, 1, 0})), List.of(), Map.of());
        double[] q = linearDensity(f);
        return q == null ? Found.none("the density " + density.text() + " is neither constant nor linear in x, y, z")
            : Found.of(new Polygon(x, y, q[0], q[1], q[2]), placed(local));
    }

    /** Corners of the area that triangles of one polygon cover, in order: sides that two of them run both ways are inside. Null when there is no one such. */
    private static List<double[]> outline(RegionParts parts) {
        Map<List<Double>, List<List<Double>>> next = new LinkedHashMap<>();
        for (Region part : parts.parts()) {
            TriangleRegion t = (TriangleRegion) part;
            List<List<Double>> corner = List.of(t.a(), t.b(), t.c());
            for (int k = 0; k < 3; k++) {
                List<Double> from = corner.get(k);
                List<Double> to = corner.get((k + 1) % 3);
                if (!next.computeIfAbsent(to, key -> new ArrayList<>()).remove(from)) {
                    next.computeIfAbsent(from, key -> new ArrayList<>()).add(to);
                }
            }
        }
        next.values().removeIf(List::isEmpty);
        if (next.isEmpty() || next.values().stream().anyMatch(v -> v.size() > 1)) {
            return null;
        }
        List<double[]> corners = new ArrayList<>();
        List<Double> first = next.keySet().iterator().next();
        List<Double> at = first;
        do {
            corners.add(point(at));
            at = next.containsKey(at) ? next.get(at).get(0) : null;
        } while (at != null && !at.equals(first) && corners.size() < next.size());
        return first.equals(at) && corners.size() == next.size() ? corners : null;
    }

    // ---- frames and numbers

    /** z axis along {@code axis}. */
    private static Frame upright(double[] origin, double[] axis) {
        double[] z = times(axis, 1 / norm(axis));
        int least = Math.abs(z[0]) <= Math.abs(z[1]) && Math.abs(z[0]) <= Math.abs(z[2]) ? 0 : Math.abs(z[1]) <= Math.abs(z[2]) ? 1 : 2;
        double[] other = new double[3];
        other[least] = 1;
        double[] x = cross(other, z);
        x = times(x, 1 / norm(x));
        return columns(origin, x, cross(z, x), z);
    }

    /** x axis along {@code first}, y axis in the plane with {@code second}; null when the two are parallel. */
    private static Frame lying(double[] origin, double[] first, double[] second) {
        double[] normal = cross(first, second);
        if (!(norm(normal) > 1e-14 * norm(first) * norm(second))) {
            return null;
        }
        double[] x = times(first, 1 / norm(first));
        double[] z = times(normal, 1 / norm(normal));
        return columns(origin, x, cross(z, x), z);
    }

    private static Frame columns(double[] origin, double[] x, double[] y, double[] z) {
        double[] turn = {x[0], y[0], z[0], x[1], y[1], z[1], x[2], y[2], z[2]};
        return java.util.Arrays.equals(turn, Frame.OWN.turn()) && norm(origin) == 0 ? Frame.OWN : new Frame(turn, origin.clone());
    }

    private static double[] point(List<Double> p) {
        return new double[] {p.get(0), p.get(1), p.get(2)};
    }

    private static boolean isEndless(double[] t) {
        return Double.isInfinite(t[0]) || Double.isInfinite(t[1]);
    }

    private static boolean isWhole(double[] t) {
        return Double.isInfinite(t[0]) && Double.isInfinite(t[1]);
    }

    private static double number(Formula f) {
        return f.compile(List.of()).at();
    }

    private static double norm(double[] v) {
        return Math.sqrt(product(v, v));
    }

    private static double product(double[] a, double[] b) {
        return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
    }

    private static double[] times(double[] a, double f) {
        return new double[] {a[0] * f, a[1] * f, a[2] * f};
    }

    private static double[] minus(double[] a, double[] b) {
        return new double[] {a[0] - b[0], a[1] - b[1], a[2] - b[2]};
    }

    private static double[] cross(double[] a, double[] b) {
        return new double[] {a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]};
    }
}

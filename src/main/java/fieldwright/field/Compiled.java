package fieldwright.field;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

import javax.measure.Dimension;

import fieldwright.charge.Charge;
import fieldwright.charge.ChargedPolyline;
import fieldwright.charge.PointCharge;
import fieldwright.charge.PointCloud;
import fieldwright.charge.Source;
import fieldwright.charge.Sources;
import fieldwright.formula.BlockFunction;
import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.formula.Polynomial;
import fieldwright.geometry.Chart;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.geometry.Frame;
import fieldwright.geometry.NodeFunction;
import fieldwright.geometry.Nodes;
import fieldwright.geometry.PlacedRegion;
import fieldwright.geometry.Region;
import fieldwright.geometry.RegionParts;
import fieldwright.geometry.TriangleRegion;
import fieldwright.integral.RegionIntegral;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;

/** A source with its formulas compiled: patches and point charges. */
final class Compiled {
    private static final int GRID = 16;

    /** All charge that is spread, and the same body by body. */
    final List<Patch> patches = new ArrayList<>();
    final List<SpreadBody> bodies = new ArrayList<>();
    final List<PointCharge> points = new ArrayList<>();
    final List<Charge> charges = new ArrayList<>();
    final List<Crowd> crowds = new ArrayList<>();
    private List<Crowd> given;

    private final ClosedForms closedForms;

    private Compiled(ClosedForms closedForms) {
        this.closedForms = closedForms;
    }

    /** Errors: AuthorException where closed forms alone are asked for and there are none. */
    static Compiled of(Source source, ClosedForms closedForms) {
        Compiled c = new Compiled(closedForms);
        c.add(source);
        return c;
    }

    /** With these in place of the source's own crowds. */
    static Compiled of(Source source, ClosedForms closedForms, List<Crowd> crowds) {
        Compiled c = new Compiled(closedForms);
        c.given = crowds;
        c.add(source);
        c.crowds.addAll(crowds);
        return c;
    }

    private void add(Source source) {
        if (source instanceof Sources many) {
            many.parts().forEach(this::add);
        } else if (source instanceof PointCharge point) {
            points.add(point);
        } else if (source instanceof PointCloud cloud && given == null) {
            crowds.add(Crowd.of(cloud));
        } else if (source instanceof ChargedPolyline line && given == null) {
            crowds.add(Crowd.of(line));
        } else if (source instanceof Charge charge) {
            charges.add(charge);
            add(charge.region(), charge.density(), charge.region().dimension(), Frame.OWN);
        }
    }

    private void add(Region region, Formula density, int dimension, Frame frame) {
        if (region instanceof PlacedRegion placed) {
            add(placed.inner(), density, dimension, placed.frame().then(frame));
        } else if (region instanceof RegionParts parts && !ClosedShapes.isPolygon(parts)) {
            parts.parts().forEach(p -> add(p, density, dimension, frame));
        } else {
            int first = patches.size();
            pave(region, density, dimension, frame);
            List<Patch> own = List.copyOf(patches.subList(first, patches.size()));
            ClosedShapes.Found found = closedForms == ClosedForms.OFF ? ClosedShapes.Found.none("") : closedForms(region, own, frame);
            if (closedForms == ClosedForms.ONLY && found.forms().isEmpty()) {
                throw new AuthorException("closedForms(\"only\"): a charge of density " + density.text() + " has no closed form here: "
                    + found.whyNot() + ". Leave the word out, or write closedForms(\"auto\").");
            }
            bodies.add(new SpreadBody(found.forms(), first, own));
        }
    }

    private static ClosedShapes.Found closedForms(Region region, List<Patch> patches, Frame frame) {
        Formula density = patches.get(0).density();
        return patches.stream().allMatch(p -> p.density().equals(density)) ? ClosedShapes.of(region, density, frame)
            : ClosedShapes.Found.none("its density has a bend or a jump");
    }

    private void pave(Region region, Formula density, int dimension, Frame frame) {
        if (region instanceof RegionParts parts) {
            parts.parts().forEach(p -> pave(p, density, dimension, frame));
        } else {
            Kernel kernel = Kernel.POINT;
            Region reduced = region;
            if (region instanceof CoordinateRegion c) {
                Reduction r = Reduction.of(c, density);
                kernel = r.kernel;
                reduced = r.region;
                List<Kinked> parts = kernel == Kernel.POINT ? Kinked.parts(c, density) : List.of();
                if (parts.size() > 1) {
                    checkUnit(c.charts().get(0).chart(), density, dimension);
                    for (Kinked part : parts) {
                        patches.add(patch(part.region().charts().get(0).chart(), frame, part.density(), dimension, kernel, false));
                    }
                    return;
                }
            }
            for (Region.PlacedChart part : region instanceof TriangleRegion t ? t.parallelogram() : reduced.charts()) {
                Frame all = frame.isOwn() ? part.frame() : part.frame().then(frame);
                patches.add(patch(part.chart(), all, density, dimension, kernel, region instanceof TriangleRegion));
            }
        }
    }

    private static Patch patch(Chart plain, Frame frame, Formula stated, int dimension, Kernel kernel, boolean triangle) {
        checkUnit(plain, stated, dimension);
        Formula density = stated.isGuarded() ? holdingEverywhere(stated, plain, triangle) : stated;
        Chart chart = plain.dimension() == 3 ? suited(plain, density) : plain;
        NodeFunction weight = NodeFunction.of(density, chart);
        checkNumbers(chart, density, weight);
        SpaceFunction inSpace = chart.dimension() == 3 && kernel == Kernel.POINT ? SpaceFunction.of(density) : null;
        double[][] breaks = RegionIntegral.breaks(chart, density);
        Polynomial polynomial = kernel == Kernel.POINT && (inSpace != null || triangle || chart.isFlat()) ? polynomial(density, chart, weight, triangle) : null;
        Facets facets = new Facets();
        Patch patch = new Patch(chart, frame.isOwn() ? Frame.OWN : frame, density, weight, kernel, inSpace, breaks, triangle, polynomial, facets);
        facets.of(patch);
        return patch;
    }

    /** The density as a polynomial of position, if it is one and gives the same numbers as the formula at places all over the chart. */
    private static Polynomial polynomial(Formula density, Chart chart, NodeFunction weight, boolean triangle) {
        if (chart.isEndless()) {
            return null;
        }
        int d = chart.dimension();
        double[] middle = new double[d];
        java.util.Arrays.fill(middle, 0.3);
        Chart.Anchor anchor = chart.anchor(middle);
        boolean fromAxis = density.variables().contains("rho") || density.variables().contains("r");
        Polynomial polynomial = Polynomial.of(density, fromAxis ? new double[3] : anchor.position());
        if (polynomial == null || polynomial.degree() == 0) {
            return polynomial;
        }
        int n = d == 2 ? 16 : 27;
        double[][] du = new double[3][n];
        int side = d == 2 ? 4 : 3;
        for (int i = 0; i < n; i++) {
            int rest = i;
            for (int k = 0; k < d; k++) {
                du[k][i] = (rest % side + 0.1) / side - 0.3;
                rest /= side;
            }
            if (triangle) {
                du[1][i] = (du[1][i] + 0.3) * (0.7 - du[0][i]) - 0.3;
            }
        }
        Nodes nodes = new Nodes();
        chart.evaluate(anchor, du, n, nodes);
        double[] values = new double[n];
        weight.evaluate(nodes, anchor.position(), n, values);
        double worst = 0;
        double size = 0;
        double[] p = anchor.position();
        for (int i = 0; i < n; i++) {
            double v = polynomial.at(p[0] + nodes.offset[0][i], p[1] + nodes.offset[1][i], p[2] + nodes.offset[2][i]);
            worst = Math.max(worst, Math.abs(v - values[i]));
            size = Math.max(size, Math.abs(values[i]));
        }
        return worst <= 2e-14 * size ? polynomial : null;
    }

    /** The chart itself, or with rho or r run as a square where only then a density of it alone is resolved: sqrt(rho). */
    private static Chart suited(Chart chart, Formula density) {
        if (NodeFunction.isSmooth(density)) {
            return chart;
        }
        for (int k = 0; k < chart.dimension(); k++) {
            Chart squared = chart.squared(k);
            if (squared != null && chart.resolvingCuts(density, k) == null && squared.resolvingCuts(density, k) != null) {
                return squared;
            }
        }
        return chart;
    }

    /**
     * The density without the conditions of the sheet's formulas in it, once they were seen to hold over the region: on a grid
     * that reaches to its ends. It is then smooth, and may be read beyond the region where a rule needs that.
     * Errors: AuthorException naming the condition that does not hold.
     */
    private static Formula holdingEverywhere(Formula density, Chart chart, boolean triangle) {
        int d = chart.dimension();
        int side = d == 1 ? 4 * GRID : GRID;
        int total = (int) Math.round(Math.pow(side, d));
        NodeFunction guarded = NodeFunction.of(density, chart);
        double[] middle = new double[d];
        java.util.Arrays.fill(middle, 0.5);
        Chart.Anchor anchor = chart.anchor(middle);
        Nodes nodes = new Nodes();
        double[][] du = new double[d][Nodes.BLOCK];
        double[] out = new double[Nodes.BLOCK];
        for (int first = 0; first < total; first += Nodes.BLOCK) {
            int n = Math.min(Nodes.BLOCK, total - first);
            for (int i = 0; i < n; i++) {
                int rest = first + i;
                for (int k = 0; k < d; k++) {
                    du[k][i] = gridPoint(rest % side, side, chart.isEndless(k) ? 1e-3 : 1e-7) - 0.5;
                    rest /= side;
                }
                if (triangle) {
                    du[1][i] = (du[1][i] + 0.5) * (0.5 - du[0][i]) - 0.5;
                }
            }
            chart.evaluate(anchor, du, n, nodes);
            guarded.evaluate(nodes, anchor.position(), n, out);
        }
        return density.unguarded();
    }

    /** Evenly spread, the first and last close to the ends: on an end itself rounding could step over a condition. */
    private static double gridPoint(int i, int side, double margin) {
        return Math.min(1 - margin, Math.max(margin, i / (side - 1.0)));
    }

    /** Errors: AuthorException for a density that is no finite number, and for sizes whose squares leave the range of numbers. */
    private static void checkNumbers(Chart chart, Formula density, NodeFunction weight) {
        if (weight.isConstant() && !Double.isFinite(weight.constant())) {
            throw new AuthorException("density " + density.text() + " is " + weight.constant() + " (SI), not a finite number. Check roots, logarithms and divisions in it.");
        }
        double reach = 0;
        int corners = 1 << chart.dimension();
        for (int i = 0; i < corners; i++) {
            double[] u = new double[chart.dimension()];
            for (int k = 0; k < u.length; k++) {
                u[k] = chart.isEndless(k) ? 0.5 : i >> k & 1;
            }
            for (double c : chart.anchor(u).position()) {
                reach = Math.max(reach, Double.isNaN(c) ? Double.POSITIVE_INFINITY : Math.abs(c));
            }
        }
        if (reach > Images.LONGEST || reach > 0 && reach < 1 / Images.LONGEST) {
            throw new AuthorException("region of size " + reach + " m: lengths must be 0 or lie between " + 1 / Images.LONGEST + " and " + Images.LONGEST
                + " m, or their squares leave the range of numbers. Check the unit prefix; what has no end is written -inf or inf.");
        }
    }

    private static void checkUnit(Chart chart, Formula density, int dimension) {
        Map<String, Dimension> known = new LinkedHashMap<>(Coordinates.DIMENSIONS);
        for (String name : chart.coordinates()) {
            known.putIfAbsent(name, chart.coordinateDimension(name));
        }
        if (Coordinates.NAMES.containsAll(density.variables()) && density.fitsAnyUnit()) {
            return;
        }
        Dimension found = density.dimension(known);
        Dimension wanted = Charge.densityDimension(dimension);
        if (!found.equals(wanted)) {
            String kind = dimension == 1 ? "line" : dimension == 2 ? "surface" : "volume";
            throw new AuthorException("density " + density.text() + " is " + Units.describe(found) + ", but the region has " + dimension
                + (dimension == 1 ? " dimension" : " dimensions") + " and takes a " + kind + " density, " + Units.describe(wanted)
                + ". Check the unit, or which coordinates have limits.");
        }
    }

    /** Endless coordinates along which nothing changes, taken out of the region and into the kernel. */
    private record Reduction(CoordinateRegion region, Kernel kernel) {
        static Reduction of(CoordinateRegion region, Formula density) {
            List<String> uniform = new ArrayList<>();
            for (Map.Entry<String, Extent> e : region.extents().entrySet()) {
                if (e.getValue() instanceof Extent.Limits limits && isAxis(region.system(), e.getKey())
                    && (isInfinite(limits.from(), -1) || isInfinite(limits.to(), 1)) && isConstant(limits)
                    && isUniform(region, density, e.getKey())) {
                    uniform.add(e.getKey());
                }
            }
            uniform.sort((a, b) -> Boolean.compare(isWhole(region, b), isWhole(region, a)));
            if (uniform.isEmpty()) {
                return new Reduction(region, Kernel.POINT);
            }
            String first = uniform.get(0);
            int axis = "xyz".indexOf(first);
            if (uniform.size() > 1 && isWhole(region, first) && isWhole(region, uniform.get(1))) {
                int other = "xyz".indexOf(uniform.get(1));
                return new Reduction(held(held(region, first), uniform.get(1)), Kernel.plane(3 - axis - other));
            }
            if (isWhole(region, first)) {
                return new Reduction(held(region, first), Kernel.line(axis));
            }
            Extent.Limits limits = (Extent.Limits) region.extents().get(first);
            boolean up = isInfinite(limits.to(), 1);
            double end = number(up ? limits.from() : limits.to());
            return new Reduction(held(region, first), Kernel.halfLine(axis, end, up ? 1 : -1));
        }

        private static boolean isAxis(CoordinateSystem system, String name) {
            return system == CoordinateSystem.CARTESIAN || system == CoordinateSystem.CYLINDRICAL && name.equals("z");
        }

        private static boolean isConstant(Extent.Limits limits) {
            return limits.variables().isEmpty();
        }

        private static boolean isInfinite(Formula f, int sign) {
            return f.variables().isEmpty() && number(f) == sign * Double.POSITIVE_INFINITY;
        }

        private static double number(Formula f) {
            BlockFunction b = f.compile(List.of());
            double[] out = new double[1];
            b.evaluate(new double[0][], 1, out);
            return out[0];
        }

        private static boolean isWhole(CoordinateRegion region, String name) {
            Extent.Limits limits = (Extent.Limits) region.extents().get(name);
            return isInfinite(limits.from(), -1) && isInfinite(limits.to(), 1);
        }

        private static boolean isUniform(CoordinateRegion region, Formula density, String name) {
            for (Extent e : region.extents().values()) {
                if (e.variables().contains(name)) {
                    return false;
                }
            }
            Set<String> used = density.variables();
            if (used.contains(name) || used.contains("r") || used.contains("theta")) {
                return false;
            }
            return name.equals("z") || !used.contains("rho") && !used.contains("phi");
        }

        private static CoordinateRegion held(CoordinateRegion region, String name) {
            Map<String, Extent> all = new LinkedHashMap<>(region.extents());
            all.put(name, new Extent.Fixed(Formula.constant(fieldwright.quantity.Amount.si(0, 0, Units.LENGTH))));
            return new CoordinateRegion(region.system(), all);
        }
    }

    private Ball[] balls;

    /** A ball about patch i. */
    Ball ball(int i, Workspace space) {
        balls = balls == null ? new Ball[patches.size()] : balls;
        if (balls[i] == null) {
            balls[i] = Ball.of(patches.get(i), space);
        }
        return balls[i];
    }

    private final java.util.Map<SpreadBody, Boolean> round = new java.util.IdentityHashMap<>();

    /** Whether all parts of a body are the same all round the axis of a cylinder; there is one cylinder for a source. */
    boolean isRound(SpreadBody body, RoundGreen.Cylinder cylinder, Workspace space) {
        return round.computeIfAbsent(body, b -> b.patches().stream().allMatch(patch -> Turn.of(patch, cylinder) >= 0));
    }

    /** Whether the balls about all parts of a body are far in this sense; never for endless ones. */
    boolean isFar(SpreadBody body, Workspace space, java.util.function.Predicate<Ball> isFar) {
        for (int i = 0; i < body.patches().size(); i++) {
            Patch patch = body.patches().get(i);
            if (patch.kernel().isEndless() || patch.chart().isEndless() || !isFar.test(ball(body.first() + i, space))) {
                return false;
            }
        }
        return true;
    }

    boolean hasEndlessKernel() {
        return patches.stream().anyMatch(p -> p.kernel().isEndless());
    }

    boolean hasEndlessChart() {
        return patches.stream().anyMatch(p -> p.chart().isEndless());
    }
}

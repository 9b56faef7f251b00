package fieldwright.field;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

import fieldwright.formula.Coordinates;
import fieldwright.formula.Formula;
import fieldwright.formula.Function;
import fieldwright.formula.Node;
import fieldwright.geometry.Chart;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.integral.RegionIntegral;
import fieldwright.quantity.Amount;

/**
 * A volume cut where its density bends or jumps: at zeros of what stands in abs, sign, min or max, or of the two sides of a condition
 * of when, if those are values of one coordinate between numbers; boxes and rectangles also along a slanted line or plane of two
 * coordinates ({@link SlantedCut}). On each part one branch holds, so that abs(z) is z or −z, a polynomial, which the radial integral
 * takes.
 */
record Kinked(CoordinateRegion region, Formula density) {
    private static final Set<Function> BRANCHED = Set.of(Function.ABS, Function.SIGN, Function.MIN, Function.MAX);

    /** The parts; the whole as it is when nothing can be cut. */
    static List<Kinked> parts(CoordinateRegion region, Formula density) {
        List<Kinked> all = List.of(new Kinked(region, density));
        if (density.kinks().isEmpty() || region.dimension() < 2) {
            return all;
        }
        if (region.dimension() == 2) {
            List<CoordinateRegion> cut = SlantedCut.parts(region, density);
            return cut.size() == 1 ? all : cut.stream().map(r -> new Kinked(r, density).onOneBranch()).toList();
        }
        Chart chart = region.charts().get(0).chart();
        double[][] breaks = RegionIntegral.breaks(chart, density);
        for (int k = 0; k < 3; k++) {
            if (!chart.hasConstantLimits(k) || chart.isEndless(k)) {
                continue;
            }
            String name = chart.coordinates().get(chart.coordinateOf(k));
            TreeSet<Double> cuts = new TreeSet<>();
            for (int i = 1; i + 1 < breaks[k].length; i++) {
                double[] u = {0.5, 0.5, 0.5};
                u[k] = breaks[k][i];
                cuts.add(chart.anchor(u).coordinates()[chart.coordinateOf(k)]);
            }
            if (region.system() == CoordinateSystem.SPHERICAL && name.equals("theta") && bendsAtEquator(density)) {
                cuts.add(Math.PI / 2);
            }
            List<Double> ends = new ArrayList<>(List.of(chart.lower(k)));
            ends.addAll(chart.lower(k) < chart.upper(k) ? cuts.subSet(chart.lower(k), false, chart.upper(k), false) : Set.of());
            ends.add(chart.upper(k));
            List<Kinked> finer = new ArrayList<>();
            for (Kinked part : all) {
                for (int i = 0; i + 1 < ends.size(); i++) {
                    finer.add(ends.size() == 2 ? part : part.between(name, ends.get(i), ends.get(i + 1)));
                }
            }
            all = finer;
        }
        all = all.stream().flatMap(part -> SlantedCut.parts(part.region, density).stream().map(r -> new Kinked(r, density))).toList();
        return all.size() == 1 ? all : all.stream().map(Kinked::onOneBranch).toList();
    }

    private static int chartDepth(Chart chart, String name) {
        for (int k = 0; k < chart.dimension(); k++) {
            if (chart.coordinates().get(chart.coordinateOf(k)).equals(name)) {
                return k;
            }
        }
        return -1;
    }

    /** abs(z) and the like in spherical coordinates: the zero of c·z is theta = 90°. */
    private static boolean bendsAtEquator(Formula density) {
        return density.kinks().stream().anyMatch(Kinked::isZeroAtEquator);
    }

    private static boolean isZeroAtEquator(Formula kink) {
        return kink.variables().equals(Set.of("z")) && kink.degree("z").orElse(2) == 1 && kink.compile(List.of("z")).at(0) == 0;
    }

    private Kinked between(String name, double from, double to) {
        Map<String, Extent> extents = new LinkedHashMap<>(region.extents());
        extents.put(name, new Extent.Limits(number(name, from), number(name, to)));
        return new Kinked(new CoordinateRegion(region.system(), extents), density);
    }

    private static Formula number(String name, double value) {
        return Formula.constant(Amount.si(value, 0, Coordinates.DIMENSIONS.get(name)));
    }

    private Kinked onOneBranch() {
        Chart chart = region.charts().get(0).chart();
        return new Kinked(region, density.part(branch(density.tree(), chart)));
    }

    private Node branch(Node node, Chart chart) {
        Node n = node.mapChildren(c -> branch(c, chart));
        if (n instanceof Node.When w && w.condition() instanceof Node.Compare c) {
            int side = sign(density.part(c.left()).minus(density.part(c.right())), chart);
            return side == 0 ? n : c.relation().holds(side, 0) ? w.yes() : w.no();
        }
        if (!(n instanceof Node.Call call) || !BRANCHED.contains(call.function())) {
            return n;
        }
        Node first = call.arguments().get(0);
        boolean two = call.arguments().size() == 2;
        Formula kink = two ? density.part(first).minus(density.part(call.arguments().get(1))) : density.part(first);
        int sign = sign(kink, chart);
        if (sign == 0) {
            return n;
        }
        return switch (call.function()) {
            case ABS -> sign > 0 ? first : new Node.Negate(first, n.at());
            case MIN -> sign < 0 ? first : call.arguments().get(1);
            case MAX -> sign > 0 ? first : call.arguments().get(1);
            default -> Formula.constant(sign).tree();
        };
    }

    /** Sign of a kink all over a part; 0 when it was not cut by this kink. */
    private int sign(Formula kink, Chart chart) {
        if (kink.variables().size() != 1) {
            return SlantedCut.sign(kink, region, chart);
        }
        String name = kink.variables().iterator().next();
        int k = chartDepth(chart, name);
        if (k < 0) {
            int theta = chartDepth(chart, "theta");
            boolean cut = chart.system() == CoordinateSystem.SPHERICAL && isZeroAtEquator(kink) && theta >= 0 && chart.hasConstantLimits(theta)
                && (chart.upper(theta) <= Math.PI / 2 || chart.lower(theta) >= Math.PI / 2);
            return cut ? (int) Math.signum(kink.compile(List.of("z")).at(chart.upper(theta) <= Math.PI / 2 ? 1 : -1)) : 0;
        }
        if (!chart.hasConstantLimits(k) || chart.isEndless(k) || RegionIntegral.breaks(chart, kink)[k].length > 2) {
            return 0;
        }
        int sign = 0;
        for (double part : new double[] {0.013, 0.27, 0.5, 0.77, 0.99}) {
            double value = kink.compile(List.of(name)).at(chart.lower(k) + part * (chart.upper(k) - chart.lower(k)));
            if (sign != 0 && value * sign <= 0 || Double.isNaN(value) || value == 0) {
                return 0;
            }
            sign = (int) Math.signum(value);
        }
        return sign;
    }
}

package fieldwright.field;

import fieldwright.formula.Formula;
import fieldwright.geometry.Chart;
import fieldwright.geometry.CoordinateRegion;
import fieldwright.geometry.CoordinateSystem;
import fieldwright.geometry.Extent;
import fieldwright.quantity.Amount;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeSet;

/**
 * A rectangle or box between numbers, cut along a line or plane that is slanted in two coordinates, where a density bends or jumps:
 * abs(x − y), when(x + y &gt; a, …). The parts have limits that are linear in one coordinate.
 */
final class SlantedCut {
    private static final Map<String, Formula> NAMES = Map.of("x", Formula.variable("x"), "y", Formula.variable("y"), "z", Formula.variable("z"));

    private SlantedCut() {
    }

    /** The region by itself when no bend crosses it so; else cut along the first that does. */
    static List<CoordinateRegion> parts(CoordinateRegion region, Formula density) {
        if (region.system() == CoordinateSystem.CARTESIAN) {
            for (Formula kink : density.kinks()) {
                List<CoordinateRegion> parts = kink.variables().size() > 1 ? cut(region, kink) : List.of();
                if (parts.size() > 1) {
                    return parts;
                }
            }
        }
        return List.of(region);
    }

    private static List<CoordinateRegion> cut(CoordinateRegion region, Formula kink) {
        double[] c = ClosedShapes.linear(kink, NAMES);
        if (c == null) {
            return List.of();
        }
        double rest = c[0];
        List<String> slanted = new ArrayList<>();
        Map<String, double[]> span = new LinkedHashMap<>();
        for (Map.Entry<String, Extent> e : region.extents().entrySet()) {
            double slope = c[1 + "xyz".indexOf(e.getKey())];
            if (slope == 0) {
                continue;
            }
            if (!e.getValue().variables().isEmpty()) {
                return List.of();
            }
            if (e.getValue() instanceof Extent.Fixed held) {
                rest += slope * number(held.at());
                continue;
            }
            Extent.Limits limits = (Extent.Limits) e.getValue();
            double[] t = {number(limits.from()), number(limits.to())};
            if (!(t[0] < t[1]) || Double.isInfinite(t[0]) || Double.isInfinite(t[1])) {
                return List.of();
            }
            slanted.add(e.getKey());
            span.put(e.getKey(), t);
        }
        if (slanted.size() != 2) {
            return List.of();
        }
        String outer = slanted.get(0);
        String inner = slanted.get(1);
        double a = c[1 + "xyz".indexOf(outer)];
        double b = c[1 + "xyz".indexOf(inner)];
        return cut(region, outer, span.get(outer), inner, span.get(inner), -rest / b, -a / b);
    }

    /** Along inner = start + slope·outer. */
    private static List<CoordinateRegion> cut(CoordinateRegion region, String outer, double[] u, String inner, double[] v, double start, double slope) {
        TreeSet<Double> ends = new TreeSet<>(List.of(u[0], u[1]));
        for (double side : v) {
            double at = (side - start) / slope;
            if (at > u[0] && at < u[1]) {
                ends.add(at);
            }
        }
        List<CoordinateRegion> parts = new ArrayList<>();
        Double from = null;
        for (double to : ends) {
            if (from != null) {
                double middle = start + slope * (from + to) / 2;
                CoordinateRegion part = with(region, outer, number(from), number(to));
                if (middle > v[0] && middle < v[1]) {
                    Formula line = line(outer, from, to, snapped(start + slope * from, v), snapped(start + slope * to, v));
                    parts.add(with(part, inner, number(v[0]), line));
                    parts.add(with(part, inner, line, number(v[1])));
                } else {
                    parts.add(part);
                }
            }
            from = to;
        }
        return parts;
    }

    /** On an end of the range when it is that but for rounding. */
    private static double snapped(double value, double[] v) {
        double close = 1e-13 * (Math.abs(v[0]) + Math.abs(v[1]));
        return value <= v[0] + close ? v[0] : value >= v[1] - close ? v[1] : value;
    }

    /** Straight between two values, exact at both ends. */
    private static Formula line(String outer, double from, double to, double first, double last) {
        Formula at = Formula.variable(outer);
        Formula length = number(to).minus(number(from));
        return number(first).times(number(to).minus(at).over(length)).plus(number(last).times(at.minus(number(from)).over(length)));
    }

    private static CoordinateRegion with(CoordinateRegion region, String name, Formula from, Formula to) {
        Map<String, Extent> all = new LinkedHashMap<>(region.extents());
        all.put(name, new Extent.Limits(from, to));
        return new CoordinateRegion(region.system(), all);
    }

    /**
     * Sign of a bend that is linear in x, y, z all over a part whose limits are numbers or linear, so that corners decide; 0 when it changes there,
     * or when that is not known.
     */
    static int sign(Formula kink, CoordinateRegion region, Chart chart) {
        if (region.system() != CoordinateSystem.CARTESIAN || chart.isEndless() || !isLinear(region) || ClosedShapes.linear(kink, NAMES) == null) {
            return 0;
        }
        List<String> used = List.copyOf(kink.variables());
        double least = Double.POSITIVE_INFINITY;
        double most = Double.NEGATIVE_INFINITY;
        for (int i = 0; i < 1 << chart.dimension(); i++) {
            double[] u = new double[chart.dimension()];
            for (int k = 0; k < u.length; k++) {
                u[k] = i >> k & 1;
            }
            double[] p = chart.anchor(u).position();
            double value = kink.compile(used).at(used.stream().mapToDouble(n -> p["xyz".indexOf(n)]).toArray());
            least = Math.min(least, value);
            most = Math.max(most, value);
        }
        double close = 1e-12 * Math.max(Math.abs(least), Math.abs(most));
        return most > close && least >= -close ? 1 : least < -close && most <= close ? -1 : 0;
    }

    private static boolean isLinear(CoordinateRegion region) {
        for (Extent e : region.extents().values()) {
            List<Formula> formulas = e instanceof Extent.Limits limits ? List.of(limits.from(), limits.to()) : List.of(((Extent.Fixed) e).at());
            if (formulas.stream().anyMatch(f -> ClosedShapes.linear(f, NAMES) == null)) {
                return false;
            }
        }
        return true;
    }

    private static Formula number(double si) {
        return Formula.constant(Amount.si(si, 0, Units.LENGTH));
    }

    private static double number(Formula f) {
        return f.compile(List.of()).at();
    }
}

package fieldwright.words;

import fieldwright.field.search.Contours;
import fieldwright.field.search.FieldLine;
import fieldwright.output.Axis;
import fieldwright.output.NumberText;
import fieldwright.output.Output;
import fieldwright.output.Series;
import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Place;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;

/** Contours and field lines in a window, as plots: one curve for each level or line. */
final class Maps {
    /** Squares of the grid along each side of the window. */
    private static final int SQUARES = 40;
    private static final int LEVELS = 7;
    /** Field lines are followed so many window sizes. */
    private static final double REACH = 4;

    private Maps() { }

    /** Lines on which a curve's quantity takes each level; levels chosen here when none are given. */
    static Output.Plot contours(String title, String unit, Window window, Curve curve, List<Double> levels) {
        TradeUnit shown = Units.parse(unit);
        Contours.Plane plane = plane(window, curve, shown);
        double[] limits = window.limits();
        double[] wanted = levels.isEmpty() ? chosen(plane, limits) : levels.stream().mapToDouble(Double::doubleValue).sorted().toArray();
        List<Series> series = new ArrayList<>();
        List<String> remarks = new ArrayList<>();
        double worst = 0;
        for (Contours c : Contours.of(plane, limits[0], limits[1], limits[2], limits[3], SQUARES, wanted)) {
            String label = Axis.heading(curve.quantity(), "") + " = " + NumberText.rounded(c.level() / shown.factor(), 4)
                    + (unit.isEmpty() ? "" : " " + unit);
            if (c.lines().isEmpty()) {
                remarks.add(label + " is not taken in this window, or only within one square of the grid of " + SQUARES + " by " + SQUARES + ".");
            } else {
                series.add(new Series(label, scaled(c.joined(false), window.acrossUnit()), scaled(c.joined(true), window.upUnit()), null));
                worst = Math.max(worst, c.within());
            }
        }
        remarks.add("drawn to " + NumberText.rounded(worst, 2) + " m");
        return plot(title, window, series, remarks);
    }

    private static Contours.Plane plane(Window window, Curve curve, TradeUnit unit) {
        Function<List<Place>, List<Amount>> values = curve.sampling();
        return new Contours.Plane() {
            @Override
            public double at(double u, double v) {
                return at(new double[] {u}, new double[] {v})[0];
            }

            @Override
            public double[] at(double[] u, double[] v) {
                List<Place> places = new ArrayList<>();
                for (int i = 0; i < u.length; i++) {
                    places.add(window.at(u[i], v[i]));
                }
                return values.apply(places).stream().mapToDouble(a -> a.in(unit.text()).isConverged() ? a.si() : Double.NaN).toArray();
            }
        };
    }

    /** Round numbers over the values on a coarse grid: even steps, or 1, 2, 5 of each power of ten where the values span more than two. */
    private static double[] chosen(Contours.Plane plane, double[] limits) {
        int n = 24;
        double[] u = new double[n * n];
        double[] v = new double[n * n];
        for (int i = 0; i < n * n; i++) {
            u[i] = limits[0] + (limits[1] - limits[0]) * (i % n + 0.5) / n;
            v[i] = limits[2] + (limits[3] - limits[2]) * (i / n + 0.5) / n;
        }
        double[] found = Arrays.stream(plane.at(u, v)).filter(Double::isFinite).sorted().toArray();
        if (found.length == 0 || found[0] == found[found.length - 1]) {
            throw new AuthorException("map: the quantity has no value, or only one, in this window. Choose another window, or name levels.");
        }
        double low = found[found.length / 50];
        double high = found[found.length - 1 - found.length / 50];
        return low > 0 && high > 100 * low ? decades(low, high) : even(low, high);
    }

    private static double[] decades(double low, double high) {
        List<Double> levels = new ArrayList<>();
        for (int power = (int) Math.floor(Math.log10(low)); power <= Math.log10(high); power++) {
            for (int digit : new int[] {1, 2, 5}) {
                double level = digit * Math.pow(10, power);
                if (level > low && level < high) {
                    levels.add(level);
                }
            }
        }
        int step = (levels.size() + LEVELS - 1) / LEVELS;
        List<Double> few = new ArrayList<>();
        for (int i = levels.size() - 1; i >= 0; i -= step) {
            few.add(0, levels.get(i));
        }
        return few.stream().mapToDouble(Double::doubleValue).toArray();
    }

    private static double[] even(double low, double high) {
        double raw = (high - low) / LEVELS;
        double power = Math.pow(10, Math.floor(Math.log10(raw)));
        double step = raw <= power ? power : raw <= 2 * power ? 2 * power : raw <= 5 * power ? 5 * power : 10 * power;
        List<Double> levels = new ArrayList<>();
        for (double k = Math.ceil(low / step); k * step <= high; k++) {
            levels.add(k * step);
        }
        return levels.stream().mapToDouble(Double::doubleValue).toArray();
    }

    /** Field lines through places, seen square to the window; how they end stands in the remarks. */
    static Output.Plot lines(String title, Window window, Distribution charge, List<Place> starts) {
        List<Series> series = new ArrayList<>();
        Map<String, Integer> ends = new LinkedHashMap<>();
        for (FieldLine line : charge.fieldLines(starts, REACH * window.size())) {
            double[][] drawn = drawn(line, window);
            series.add(new Series("line " + (series.size() + 1), scaled(drawn[0], window.acrossUnit()), scaled(drawn[1], window.upUnit()), null));
            ends.merge("from " + line.tail().words() + " to " + line.head().words(), 1, Integer::sum);
        }
        List<String> remarks = new ArrayList<>();
        ends.forEach((way, count) -> remarks.add(count + (count == 1 ? " line" : " lines") + " " + way));
        return plot(title, window, series, remarks);
    }

    /** The part within the window; a gap where the line is outside. */
    private static double[][] drawn(FieldLine line, Window window) {
        List<double[]> points = new ArrayList<>();
        for (Place p : line.places()) {
            double[] seen = window.seen(p);
            boolean gapBefore = points.isEmpty() || Double.isNaN(points.get(points.size() - 1)[1]);
            if (window.holds(seen)) {
                points.add(seen);
            } else if (!gapBefore) {
                points.add(new double[] {seen[0], Double.NaN});
            }
        }
        return new double[][] {points.stream().mapToDouble(p -> p[0]).toArray(), points.stream().mapToDouble(p -> p[1]).toArray()};
    }

    private static Output.Plot plot(String title, Window window, List<Series> series, List<String> remarks) {
        return new Output.Plot(title, new Axis(window.across(), window.acrossUnit().text()), new Axis(window.up(), window.upUnit().text()), series,
                remarks);
    }

    private static double[] scaled(double[] si, TradeUnit unit) {
        return Arrays.stream(si).map(v -> v / unit.factor()).toArray();
    }

    /** Levels in SI. */
    static List<Double> levels(String unit, Object... given) {
        List<Double> levels = new ArrayList<>();
        for (Object each : given) {
            Amount level = Given.amount("level", each);
            if (!level.dimension().equals(Units.parse(unit).dimension())) {
                throw new AuthorException("level " + Given.text(each) + " is " + Units.describe(level.dimension()) + ", the map is in " + unit
                        + ". Write the level with its unit.");
            }
            levels.add(level.si());
        }
        return levels;
    }
}

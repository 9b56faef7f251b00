package fieldwright.words;

import fieldwright.output.Axis;
import fieldwright.output.Output;
import fieldwright.output.Series;
import fieldwright.quantity.Amount;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;

/** Curves along a path as a plot. A point in doubt is a gap, and a remark says why. */
final class Profile {
    private static final int POINTS = 61;

    private Profile() { }

    static Output.Plot plot(String title, String unit, Path path, Curve... curves) {
        TradeUnit shown = Units.parse(unit);
        List<Path.Stop> stops = path.stops(POINTS);
        Set<String> remarks = new LinkedHashSet<>();
        List<Series> series = Arrays.stream(curves).map(curve -> series(curve, stops, shown, remarks)).toList();
        String asked = Arrays.stream(curves).map(Curve::asked).filter(a -> !a.isEmpty()).distinct().collect(Collectors.joining(", "));
        String quantity = asked.isEmpty() ? curves.length == 1 ? curves[0].label() : title : asked;
        return new Output.Plot(title, new Axis(path.quantity(), path.unit()), new Axis(quantity, unit), series, List.copyOf(remarks));
    }

    private static Series series(Curve curve, List<Path.Stop> stops, TradeUnit unit, Set<String> remarks) {
        List<double[]> points = new ArrayList<>();
        int gaps = 0;
        String why = "";
        List<List<Amount>> values = curve.values(stops);
        for (int i = 0; i < stops.size(); i++) {
            for (Amount value : values.get(i)) {
                boolean sure = value.in(unit.text()).isConverged();
                points.add(new double[] {stops.get(i).drawnAt(), sure ? value.si() / unit.factor() : Double.NaN,
                        sure ? value.error() / unit.factor() : Double.NaN});
                gaps += sure ? 0 : 1;
                why = sure ? why : value.standing().reason();
            }
        }
        if (gaps > 0) {
            remarks.add(curve.label() + ": " + gaps + (gaps == 1 ? " point is" : " points are") + " left out: " + why);
        }
        return new Series(curve.label(), column(points, 0), column(points, 1), column(points, 2));
    }

    private static double[] column(List<double[]> points, int k) {
        return points.stream().mapToDouble(p -> p[k]).toArray();
    }
}

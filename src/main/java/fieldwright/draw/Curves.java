package fieldwright.draw;

import fieldwright.output.Axis;
import fieldwright.output.Output;
import fieldwright.output.Series;
import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.font.FontRenderContext;
import java.awt.geom.Line2D;
import java.awt.geom.Path2D;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.Function;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.knowm.xchart.XYChart;
import org.knowm.xchart.XYChartBuilder;
import org.knowm.xchart.XYSeries;
import org.knowm.xchart.style.AxesChartStyler;
import org.knowm.xchart.style.XYStyler;
import org.knowm.xchart.style.markers.Marker;
import org.knowm.xchart.style.markers.SeriesMarkers;

/**
 * A plot as a picture: thin axes, light horizontal rules, no frame, a legend only where there is more than one curve.
 * Curves differ in dash and marker as well as colour, so that a grey print can be read.
 *
 * <p>The chart library rounds its ticks to ten decimals and fails on infinities, so both axes are first brought to a
 * fitting prefix or power of ten, which their headings name, and points that are not finite are taken out;
 * {@link #remarks()} says which.
 */
public final class Curves implements Picture {
    private static final Color[] COLOURS = {Ink.ACCENT, Ink.BAD, Ink.INK, new Color(0x8a6400), new Color(0x6b4a86), Ink.SOFT};
    private static final Color NOTHING = new Color(0, true);
    private static final float[][] DASHES = {null, {7, 4}, {1.5f, 3.5f}, {9, 3, 1.5f, 3}, {14, 4}, {4, 2, 1.5f, 2, 1.5f, 2}};
    private static final Marker[] MARKERS = {SeriesMarkers.CIRCLE, SeriesMarkers.DIAMOND, SeriesMarkers.SQUARE,
        SeriesMarkers.TRIANGLE_UP, SeriesMarkers.CROSS, SeriesMarkers.TRIANGLE_DOWN};
    /** With more points than this not every one is marked. */
    private static final int MARKED = 15;
    private static final int MARKER = 6;
    /** Error bars shorter than this part of the axis cannot be seen. */
    private static final double VISIBLE = 0.004;

    /** The axes reach this part beyond the data: the chart library sets no tick on the very end. */
    private static final double EDGE = 0.006;

    private final Output.Plot plot;
    private final double width;
    private final double height;
    private final Ruler x;
    private final Ruler y;
    private final List<Series> series = new ArrayList<>();
    private final List<String> remarks;

    /** A picture of the plot, so wide and high, in 1/96 inch. */
    public Curves(Output.Plot plot, double width, double height) {
        this.plot = plot;
        this.width = width;
        this.height = height;
        this.remarks = new ArrayList<>(plot.remarks());
        plot.series().forEach(s -> series.add(finite(s)));
        if (remarks.isEmpty() && series.stream().anyMatch(s -> gaps(s) > 0)) {
            remarks.add("gaps: " + series.stream().mapToInt(Curves::gaps).sum() + " points have no number.");
        }
        x = Ruler.over(plot.x(), values(Series::x), false);
        y = Ruler.over(plot.y(), values(Series::y), true);
    }

    /** The plot's own remarks and what was left out of the picture. */
    public List<String> remarks() {
        return List.copyOf(remarks);
    }

    /** Heading of the axis across: {@code height on the axis, z / m}. */
    public String xHeading() {
        return x.heading();
    }

    /** Heading of the axis upwards: {@code |E| / (kV/m)}. */
    public String yHeading() {
        return y.heading();
    }

    /** Points as drawn: in the units of the headings, not finite ones made gaps. */
    List<Series> drawn() {
        return series.stream().map(s -> new Series(s.label(), x.shown(s.x()), y.shown(s.y()), bars(s))).toList();
    }

    private Series finite(Series s) {
        double[] xs = s.x();
        double[] ys = s.y();
        List<String> lost = new ArrayList<>();
        for (int i = 0; i < xs.length; i++) {
            if (Double.isInfinite(ys[i]) || Double.isInfinite(xs[i])) {
                lost.add(Double.isInfinite(xs[i]) ? "infinite " + plot.x().quantity() : Figures.brief(xs[i], 6));
            }
            if (!Double.isFinite(xs[i]) || !Double.isFinite(ys[i])) {
                ys[i] = Double.NaN;
            }
        }
        if (!lost.isEmpty()) {
            String shown = lost.stream().limit(5).collect(Collectors.joining(", "));
            remarks.add((s.label().isEmpty() ? "" : s.label() + ": ") + "left out, infinite: at " + plot.x().quantity() + " = "
                    + shown + (lost.size() > 5 ? " and " + (lost.size() - 5) + " more" : "")
                    + (plot.x().unit().isEmpty() ? "" : " " + Scale.print(plot.x().unit())) + ".");
        }
        return withoutNameless(s, xs, ys);
    }

    /** Points without a place on the axis across cannot be gaps; they are dropped. */
    private static Series withoutNameless(Series s, double[] xs, double[] ys) {
        double[] e = s.error();
        int n = 0;
        for (int i = 0; i < xs.length; i++) {
            if (Double.isFinite(xs[i])) {
                xs[n] = xs[i];
                ys[n] = ys[i];
                if (e != null) {
                    e[n] = Double.isFinite(e[i]) ? e[i] : 0;
                }
                n++;
            }
        }
        return new Series(s.label(), Arrays.copyOf(xs, n), Arrays.copyOf(ys, n),
                e == null ? null : Arrays.copyOf(e, n));
    }

    private static int gaps(Series s) {
        return (int) Arrays.stream(s.y()).filter(Double::isNaN).count();
    }

    private double[] values(Function<Series, double[]> of) {
        return series.stream().flatMapToDouble(s -> {
            double[] ys = s.y();
            double[] vs = of.apply(s);
            return IntStream.range(0, ys.length).filter(i -> !Double.isNaN(ys[i])).mapToDouble(i -> vs[i]);
        }).toArray();
    }

    private double[] bars(Series s) {
        double[] e = s.error();
        if (e == null || Arrays.stream(e).map(v -> v / y.factor()).max().orElse(0) < VISIBLE * (y.to() - y.from())) {
            return null;
        }
        return Arrays.stream(e).map(v -> v / y.factor()).toArray();
    }

    @Override
    public double width() {
        return width;
    }

    @Override
    public double height() {
        return height;
    }

    @Override
    public String inWords() {
        String what = plot.title().isEmpty() ? "Plot" : "Plot: " + plot.title();
        return what + ". " + yHeading() + " from " + Figures.brief(y.from(), 3) + " to " + Figures.brief(y.to(), 3) + " against "
                + xHeading() + " from " + Figures.brief(x.from(), 3) + " to " + Figures.brief(x.to(), 3) + "."
                + (remarks.isEmpty() ? "" : " " + String.join(" ", remarks));
    }

    @Override
    public void paint(Graphics2D g) {
        double chartHeight = height - legendHeight();
        XYChart chart = new XYChartBuilder().width((int) width).height((int) chartHeight)
                .xAxisTitle(x.heading()).yAxisTitle(y.heading()).title(plot.title()).build();
        style(chart.getStyler());
        List<Series> drawn = drawn();
        addUnseen(chart);
        chart.paint(g, (int) width, (int) chartHeight);
        for (int i = 0; i < drawn.size(); i++) {
            new Pen(g, chart, i).draw(drawn.get(i));
        }
        for (Entry entry : legend()) {
            entry.paint(g, chartHeight);
        }
    }

    /** A sample of a curve's line and its name, at a place below the chart. */
    private record Entry(int curve, String label, double x, double y) {
        void paint(Graphics2D g, double top) {
            double middle = top + y + LEGEND_LINE / 2;
            g.setColor(COLOURS[curve % COLOURS.length]);
            g.setStroke(stroke(curve));
            g.draw(new Line2D.Double(x, middle, x + SAMPLE, middle));
            MARKERS[curve % MARKERS.length].paint(g, x + SAMPLE / 2, middle, MARKER);
            g.setColor(Ink.INK);
            g.setFont(FONT);
            g.drawString(label, (float) (x + SAMPLE + 6), (float) (middle + 4));
        }
    }

    private static final Font FONT = new Font(Font.SANS_SERIF, Font.PLAIN, 11);
    private static final double LEGEND_LINE = 18;
    private static final double SAMPLE = 30;

    /** Names of the curves below the chart, where there is more than one; on as many lines as they need. */
    private List<Entry> legend() {
        List<Entry> entries = new ArrayList<>();
        double left = Math.min(44, width / 8);
        double at = left;
        double line = 0;
        for (int i = 0; i < series.size() && series.size() > 1; i++) {
            String label = name(series.get(i), i);
            double room = SAMPLE + 6 + FONT.getStringBounds(label, CONTEXT).getWidth() + 18;
            if (at > left && at + room > width) {
                at = left;
                line += LEGEND_LINE;
            }
            entries.add(new Entry(i, label, at, line));
            at += room;
        }
        return entries;
    }

    private double legendHeight() {
        return legend().stream().mapToDouble(e -> e.y + LEGEND_LINE + 2).max().orElse(0);
    }

    private static final FontRenderContext CONTEXT = new FontRenderContext(null, true, true);

    /**
     * Two points that are not seen, at uneven places. Without them the chart library takes evenly spaced data for its
     * ticks, however crooked; and it cannot draw a chart that has no points.
     */
    private void addUnseen(XYChart chart) {
        double[] parts = {0.1357, 0.7283};
        XYSeries unseen = chart.addSeries(" ", x.inside(parts), y.inside(parts), null);
        unseen.setLineColor(NOTHING);
        unseen.setMarker(SeriesMarkers.NONE);
    }

    private static BasicStroke stroke(int i) {
        return new BasicStroke(1.7f, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 4, DASHES[i % DASHES.length], 0);
    }

    /**
     * Draws one curve over the axes that the chart library has laid out; left to itself it would start the dashes anew
     * at every point.
     */
    private final class Pen {
        private final Graphics2D g;
        private final XYChart chart;
        private final int curve;

        Pen(Graphics2D g, XYChart chart, int curve) {
            this.g = g;
            this.chart = chart;
            this.curve = curve;
        }

        void draw(Series s) {
            double[] px = Arrays.stream(s.x()).map(chart::getScreenXFromChart).toArray();
            double[] py = Arrays.stream(s.y()).map(v -> Double.isNaN(v) ? v : chart.getScreenYFromChart(v)).toArray();
            g.setColor(COLOURS[curve % COLOURS.length]);
            if (s.error() != null) {
                bars(s, px);
            }
            g.setStroke(stroke(curve));
            g.draw(line(px, py));
            for (int i = 0; i < px.length; i++) {
                if (isMarked(py, i)) {
                    MARKERS[curve % MARKERS.length].paint(g, px[i], py[i], MARKER);
                }
            }
        }

        private Path2D line(double[] px, double[] py) {
            Path2D line = new Path2D.Double();
            boolean down = false;
            for (int i = 0; i < px.length; i++) {
                if (Double.isNaN(py[i])) {
                    down = false;
                } else if (down) {
                    line.lineTo(px[i], py[i]);
                } else {
                    line.moveTo(px[i], py[i]);
                    down = true;
                }
            }
            return line;
        }

        private void bars(Series s, double[] px) {
            g.setStroke(new BasicStroke(0.8f));
            double[] ys = s.y();
            double[] e = s.error();
            for (int i = 0; i < px.length; i++) {
                if (!Double.isNaN(ys[i]) && e[i] > 0) {
                    double low = chart.getScreenYFromChart(Math.max(y.from(), ys[i] - e[i]));
                    double high = chart.getScreenYFromChart(Math.min(y.to(), ys[i] + e[i]));
                    g.draw(new Line2D.Double(px[i], low, px[i], high));
                }
            }
        }

        /** Few points, a point alone between gaps that no line would show, or now and then to tell curves apart. */
        private boolean isMarked(double[] py, int i) {
            if (Double.isNaN(py[i])) {
                return false;
            }
            boolean left = i == 0 || Double.isNaN(py[i - 1]);
            boolean right = i == py.length - 1 || Double.isNaN(py[i + 1]);
            int every = py.length / MARKED + 1;
            return left && right || py.length <= MARKED || series.size() > 1 && (i + curve * every / 3) % every == every / 2;
        }
    }

    /** A name for every curve, even where two have the same label. */
    private String name(Series s, int i) {
        String label = Figures.letters(s.label().isEmpty() ? plot.y().quantity() : s.label());
        boolean taken = series.subList(0, i).stream().anyMatch(o -> o.label().equals(s.label()));
        return taken ? label + " (" + (i + 1) + ")" : label.isEmpty() ? "curve " + (i + 1) : label;
    }

    private void style(XYStyler style) {
        Font font = FONT;
        style.setBaseFont(font);
        style.setChartFontColor(Ink.INK);
        style.setChartBackgroundColor(NOTHING);
        style.setPlotBackgroundColor(NOTHING);
        style.setChartPadding(4);
        style.setPlotBorderVisible(false);
        style.setPlotMargin(0);
        style.setPlotContentSize(1);
        style.setPlotGridVerticalLinesVisible(false);
        style.setPlotGridHorizontalLinesVisible(true);
        style.setPlotGridLinesColor(Ink.RULE);
        style.setPlotGridLinesStroke(new BasicStroke(0.8f));
        style.setAxisTickMarksColor(Ink.INK);
        style.setAxisTickMarksStroke(new BasicStroke(0.9f));
        style.setAxisTickMarkLength(4);
        style.setAxisTickPadding(4);
        style.setAxisTickLabelsFont(font.deriveFont(10f));
        style.setAxisTickLabelsColor(Ink.INK);
        style.setAxisTitleFont(font);
        style.setAxisTitlePadding(6);
        style.setChartTitleFont(font.deriveFont(Font.PLAIN, 11.5f));
        style.setChartTitleVisible(!plot.title().isEmpty());
        style.setChartTitleBoxVisible(false);
        style.setLegendVisible(false);
        style.setAntiAlias(true);
        style.setXAxisMin(x.inside(-EDGE)[0]);
        style.setXAxisMax(x.inside(1 + EDGE)[0]);
        style.setYAxisMin(y.inside(-EDGE)[0]);
        style.setYAxisMax(y.inside(1 + EDGE)[0]);
        style.setXAxisTickMarkSpacingHint(64);
        style.setYAxisTickMarkSpacingHint(36);
        style.setYAxisLabelAlignment(AxesChartStyler.TextAlignment.Right);
        style.setxAxisTickLabelsFormattingFunction(v -> Figures.brief(v, 10));
        style.setyAxisTickLabelsFormattingFunction(v -> Figures.brief(v, 10));
    }

    /**
     * How numbers become lengths along one axis: shown = (value − offset) / factor, from and to in shown numbers.
     */
    private record Ruler(String heading, double offset, double factor, double from, double to) {
        /** Below this part of the largest value the spread alone is drawn, or every tick would read the same. */
        private static final double NARROW = 1e-4;

        static Ruler over(Axis axis, double[] values, boolean fromZero) {
            double least = Arrays.stream(values).min().orElse(0);
            double most = Arrays.stream(values).max().orElse(1);
            double largest = Math.max(Math.abs(least), Math.abs(most));
            double spread = most - least;
            boolean narrow = spread > 1e-13 * largest && spread < NARROW * largest;
            Scale whole = scale(largest, axis.unit());
            double offset = narrow ? offset(least, spread, whole) : 0;
            Scale scale = narrow ? scale(Math.max(Math.abs(least - offset), Math.abs(most - offset)), axis.unit()) : whole;
            String name = Figures.letters(axis.quantity());
            String quantity = narrow
                    ? "(" + name + " − " + Figures.withUnit(Figures.brief(whole.shown(offset), 16), whole.printed()) + ")"
                    : name;
            double from = scale.shown(least - offset);
            double to = scale.shown(most - offset);
            return fromZero ? round(scale.heading(quantity), offset, scale.factor(), from, to)
                    : new Ruler(scale.heading(quantity), offset, scale.factor(), from, to > from ? to : from + 1);
        }

        /** A prefix where the unit takes one; else, far from 1, a power of ten before the unit. */
        private static Scale scale(double largest, String unit) {
            Scale fitting = Scale.fitting(largest, unit);
            double shown = fitting.shown(largest);
            if (shown == 0 || shown >= 1e-2 && shown < 1e5) {
                return fitting;
            }
            int power = Figures.magnitude(shown);
            String times = "10" + Figures.superscript(Integer.toString(power));
            return new Scale(unit.isEmpty() ? times : times + " " + fitting.unit(), fitting.factor() * Math.pow(10, power));
        }

        private static double offset(double least, double spread, Scale whole) {
            double step = Math.pow(10, Math.ceil(Math.log10(whole.shown(spread))));
            return Math.floor(whole.shown(least) / step) * step * whole.factor();
        }

        /** Ends on round numbers; from zero when the least is nearer to zero than to the most. */
        private static Ruler round(String heading, double offset, double factor, double from, double to) {
            double low = from > 0 && from < 0.5 * to ? 0 : from;
            double high = to < 0 && to > 0.5 * from ? 0 : to;
            if (!(high > low)) {
                double half = low == 0 ? 1 : Math.abs(low) * 0.1;
                low -= half;
                high += half;
            }
            double step = step((high - low) / 6);
            return new Ruler(heading, offset, factor, Math.floor(low / step + 1e-9) * step, Math.ceil(high / step - 1e-9) * step);
        }

        private static double step(double rough) {
            double power = Math.pow(10, Math.floor(Math.log10(rough)));
            double part = rough / power;
            return power * (part <= 1 ? 1 : part <= 2 ? 2 : part <= 5 ? 5 : 10);
        }

        /** Shown numbers at these parts of the way from one end to the other. */
        double[] inside(double... parts) {
            return Arrays.stream(parts).map(p -> from + p * (to - from)).toArray();
        }

        double[] shown(double[] values) {
            return Arrays.stream(values).map(v -> (v - offset) / factor).toArray();
        }
    }
}

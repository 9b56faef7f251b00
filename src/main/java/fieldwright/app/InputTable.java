package fieldwright.app;

import java.util.ArrayList;
import java.util.List;
import javafx.geometry.Orientation;
import javafx.scene.Node;
import javafx.scene.layout.Region;

/** Inputs as a table: symbol, value, description, each line as high as its longest text; a remark goes across. */
final class InputTable extends Region {
    /** A line of three cells, or one across. */
    private record Line(List<Node> cells) { }

    private static final double VALUE_SHARE = 0.45;

    private final Zoom zoom;
    private final List<Line> lines = new ArrayList<>();

    InputTable(Zoom zoom) {
        this.zoom = zoom;
        getStyleClass().add("inputs");
    }

    void add(Node symbol, Node value, Node description) {
        lines.add(new Line(List.of(symbol, value, description)));
        getChildren().addAll(symbol, value, description);
    }

    void addAcross(Node remark) {
        lines.add(new Line(List.of(remark)));
        getChildren().add(remark);
    }

    @Override
    public Orientation getContentBias() {
        return Orientation.HORIZONTAL;
    }

    @Override
    protected double computePrefWidth(double height) {
        return zoom.em(40);
    }

    @Override
    protected double computeMinWidth(double height) {
        return 0;
    }

    @Override
    protected double computeMinHeight(double width) {
        return computePrefHeight(width);
    }

    @Override
    protected double computePrefHeight(double width) {
        return place(width < 0 ? computePrefWidth(-1) : width, false);
    }

    @Override
    protected void layoutChildren() {
        place(getWidth(), true);
    }

    private double[] widths(double width) {
        double gap = zoom.em(1.1);
        double symbol = column(0);
        double value = Math.min(column(1), Math.max(zoom.em(6), VALUE_SHARE * width));
        return new double[] {symbol, value, Math.max(zoom.em(4), width - symbol - value - 2 * gap)};
    }

    private double column(int c) {
        return Math.ceil(lines.stream().filter(l -> l.cells.size() > 1).mapToDouble(l -> l.cells.get(c).prefWidth(-1)).max().orElse(0));
    }

    /** Height of the whole; moves the cells to their places when asked to. Cells of a line stand on one base line. */
    private double place(double width, boolean move) {
        double[] widths = widths(width);
        double y = 0;
        for (Line line : lines) {
            double height = 0;
            if (line.cells.size() == 1) {
                height = Math.ceil(line.cells.get(0).prefHeight(width));
                if (move) {
                    line.cells.get(0).resizeRelocate(0, y, width, height);
                }
            } else {
                height = placeLine(line, widths, y, move);
            }
            y += height + zoom.em(0.3);
        }
        return Math.max(0, y - zoom.em(0.3));
    }

    private double placeLine(Line line, double[] widths, double y, boolean move) {
        double base = line.cells.stream().mapToDouble(InputTable::base).max().orElse(0);
        double bottom = 0;
        double x = 0;
        for (int c = 0; c < line.cells.size(); c++) {
            Node cell = line.cells.get(c);
            double height = Math.ceil(cell.prefHeight(widths[c]));
            double top = base - base(cell);
            if (move) {
                cell.resizeRelocate(Math.round(x), y + Math.round(top), widths[c], height);
            }
            bottom = Math.max(bottom, Math.round(top) + height);
            x += widths[c] + zoom.em(1.1);
        }
        return bottom;
    }

    private static double base(Node cell) {
        double base = cell.getBaselineOffset();
        return base == BASELINE_OFFSET_SAME_AS_HEIGHT ? cell.prefHeight(-1) : base;
    }
}

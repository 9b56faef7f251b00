package fieldwright.app;

import javafx.geometry.Orientation;
import javafx.scene.Node;
import javafx.scene.layout.Region;

/** A row of the page: Reference, Calculation and Output beside each other, all as high as the highest. */
class ThreeColumns extends Region {
    private final Zoom zoom;
    private final Region reference;
    private final Region calculation;
    private final Region output;
    private double keptHeight = -1;
    private double keptFor;
    private double keptAt;

    ThreeColumns(Zoom zoom, Region reference, Region calculation, Region output) {
        this.zoom = zoom;
        this.reference = reference;
        this.calculation = calculation;
        this.output = output;
        reference.getStyleClass().addAll("column", "reference");
        calculation.getStyleClass().addAll("column", "calculation");
        output.getStyleClass().addAll("column", "output");
        getChildren().addAll(reference, calculation, output);
    }

    @Override
    public Orientation getContentBias() {
        return Orientation.HORIZONTAL;
    }

    @Override
    protected double computePrefWidth(double height) {
        return zoom.em(70);
    }

    @Override
    protected double computeMinWidth(double height) {
        return zoom.em(28);
    }

    /** Measuring text costs most of laying out a page, and most rows do not change: the height last found is kept. */
    @Override
    protected double computePrefHeight(double width) {
        if (keptHeight < 0 || keptFor != width || keptAt != zoom.factor()) {
            keptHeight = measured(width);
            keptFor = width;
            keptAt = zoom.factor();
        }
        return keptHeight;
    }

    @Override
    public void requestLayout() {
        keptHeight = -1;
        super.requestLayout();
    }

    private double measured(double width) {
        double w = (width < 0 ? computePrefWidth(-1) : width) - snappedLeftInset() - snappedRightInset();
        Columns c = Columns.of(w, zoom);
        double left = reference.prefHeight(c.reference());
        double middle = calculation.prefHeight(c.calculation());
        double right = output.prefHeight(c.output());
        double inner = c.stacked() ? Math.max(left, middle + below(right)) : Math.max(left, Math.max(middle, right));
        return Math.ceil(inner) + snappedTopInset() + snappedBottomInset();
    }

    @Override
    protected double computeMinHeight(double width) {
        return computePrefHeight(width);
    }

    /** An empty Output takes no room below. */
    private double below(double height) {
        return output.getChildrenUnmodifiable().stream().noneMatch(Node::isManaged) ? 0 : height;
    }

    @Override
    protected void layoutChildren() {
        double x = snappedLeftInset();
        double y = snappedTopInset();
        double height = getHeight() - y - snappedBottomInset();
        Columns c = Columns.of(getWidth() - x - snappedRightInset(), zoom);
        reference.resizeRelocate(x, y, c.reference(), height);
        if (c.stacked()) {
            double middle = Math.min(height, calculation.prefHeight(c.calculation()));
            calculation.resizeRelocate(x + c.reference(), y, c.calculation(), middle);
            output.resizeRelocate(x + c.reference(), y + middle, c.output(), height - middle);
        } else {
            calculation.resizeRelocate(x + c.reference(), y, c.calculation(), height);
            output.resizeRelocate(x + c.reference() + c.calculation(), y, c.output(), height);
        }
    }
}

package fieldwright.app;

import fieldwright.draw.Picture;
import java.util.function.DoubleFunction;
import javafx.geometry.Orientation;
import javafx.scene.AccessibleRole;
import javafx.scene.canvas.Canvas;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.layout.Region;

/**
 * A picture on the page, made to the width it is given and painted anew at every zoom, so that it stays sharp.
 */
final class PictureView extends Region {
    /** Room around a picture, so that letters which lean out of their box are not cut. */
    private static final double MARGIN = 2;

    private final DoubleFunction<Picture> make;
    private final Zoom zoom;
    private final Canvas canvas = new Canvas();
    private final Picture natural;
    private Picture narrowed;
    private double narrowedTo = -1;
    private Picture painted;
    private double paintedAt;

    /** @param make gives the picture for a width in 1/96 inch before zoom, infinite for as wide as it likes */
    PictureView(DoubleFunction<Picture> make, Zoom zoom) {
        this.make = make;
        this.zoom = zoom;
        this.natural = make.apply(Double.POSITIVE_INFINITY);
        getStyleClass().add("picture");
        canvas.setManaged(false);
        getChildren().add(canvas);
        setAccessibleRole(AccessibleRole.IMAGE_VIEW);
        setAccessibleText(natural.inWords());
    }

    private Picture pictureFor(double width) {
        double room = Math.max(24, (width - 2 * MARGIN) / zoom.factor());
        if (natural.width() <= room + 0.5) {
            return natural;
        }
        if (narrowed == null || Math.abs(room - narrowedTo) > 0.5) {
            narrowed = make.apply(room);
            narrowedTo = room;
        }
        return narrowed;
    }

    /** Distance from the top to the line that text beside it stands on. */
    @Override
    public double getBaselineOffset() {
        return MARGIN + pictureFor(getWidth() > 0 ? getWidth() : Double.MAX_VALUE).baseline() * zoom.factor();
    }

    @Override
    public Orientation getContentBias() {
        return Orientation.HORIZONTAL;
    }

    @Override
    protected double computePrefWidth(double height) {
        return natural.width() * zoom.factor() + 2 * MARGIN;
    }

    @Override
    protected double computeMinWidth(double height) {
        return 0;
    }

    @Override
    protected double computePrefHeight(double width) {
        return pictureFor(width < 0 ? Double.MAX_VALUE : width).height() * zoom.factor() + 2 * MARGIN;
    }

    @Override
    protected double computeMinHeight(double width) {
        return computePrefHeight(width);
    }

    @Override
    protected double computeMaxHeight(double width) {
        return computePrefHeight(width);
    }

    @Override
    protected void layoutChildren() {
        Picture now = pictureFor(getWidth());
        if (now != painted || paintedAt != zoom.factor()) {
            paint(now);
        }
    }

    private void paint(Picture now) {
        double scale = zoom.factor();
        canvas.setWidth(Math.ceil(now.width() * scale) + 2 * MARGIN);
        canvas.setHeight(Math.ceil(now.height() * scale) + 2 * MARGIN);
        GraphicsContext context = canvas.getGraphicsContext2D();
        context.clearRect(0, 0, canvas.getWidth(), canvas.getHeight());
        context.save();
        OutlineGraphics g = new OutlineGraphics(context);
        g.translate(MARGIN, MARGIN);
        g.scale(scale, scale);
        now.paint(g);
        context.restore();
        painted = now;
        paintedAt = scale;
    }
}

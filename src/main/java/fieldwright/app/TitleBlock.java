package fieldwright.app;

import fieldwright.sheet.Header;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.BiConsumer;
import javafx.css.PseudoClass;
import javafx.geometry.Orientation;
import javafx.scene.control.Label;
import javafx.scene.layout.Pane;
import javafx.scene.layout.VBox;

/** The title block of the page, from the sheet's header; every field is changed in place. */
final class TitleBlock extends Pane {
    /** Header field, heading, share of the width in one row. */
    private record Field(String name, String heading, double share) { }

    private static final List<Field> FIELDS = List.of(new Field("project", "Project", 2.1), new Field("title", "Title", 3.3),
            new Field("number", "Number", 1.15), new Field("revision", "Rev.", 0.6), new Field("made", "Made", 1.2),
            new Field("checked", "Checked", 1.1), new Field("approved", "Approved", 1.1));
    /** Below this width, in letter heights, project and title stand on a row of their own. */
    private static final double ONE_ROW = 62;

    private final Zoom zoom;
    private final Map<String, InPlace> values = new LinkedHashMap<>();

    TitleBlock(Zoom zoom, BiConsumer<String, String> changed) {
        this.zoom = zoom;
        getStyleClass().add("title-block");
        for (Field field : FIELDS) {
            Label heading = new Label(field.heading);
            heading.getStyleClass().add("field-heading");
            InPlace value = new InPlace(field.heading, text -> changed.accept(field.name, text));
            VBox box = new VBox(heading, value);
            box.getStyleClass().add("field");
            values.put(field.name, value);
            getChildren().add(box);
        }
    }

    void show(Header header) {
        values.forEach((name, value) -> value.show(header.get(name)));
    }

    InPlace value(String name) {
        return values.get(name);
    }

    @Override
    public Orientation getContentBias() {
        return Orientation.HORIZONTAL;
    }

    private boolean isOneRow(double width) {
        return width >= zoom.em(ONE_ROW);
    }

    @Override
    protected double computePrefHeight(double width) {
        double w = width < 0 ? zoom.em(70) : width;
        double inner = isOneRow(w) ? rowHeight(w, 0, FIELDS.size()) : rowHeight(w, 0, 2) + rowHeight(w, 2, FIELDS.size());
        return inner + snappedTopInset() + snappedBottomInset();
    }

    @Override
    protected double computeMinHeight(double width) {
        return computePrefHeight(width);
    }

    @Override
    protected double computePrefWidth(double height) {
        return zoom.em(70);
    }

    @Override
    protected double computeMinWidth(double height) {
        return zoom.em(28);
    }

    private static double shares(int from, int to) {
        return FIELDS.subList(from, to).stream().mapToDouble(Field::share).sum();
    }

    private double rowHeight(double width, int from, int to) {
        double height = 0;
        for (int i = from; i < to; i++) {
            height = Math.max(height, getChildren().get(i).prefHeight(Math.floor(width * FIELDS.get(i).share / shares(from, to))));
        }
        return Math.ceil(height);
    }

    @Override
    protected void layoutChildren() {
        double width = getWidth();
        if (isOneRow(width)) {
            layoutRow(0, rowHeight(width, 0, FIELDS.size()), 0, FIELDS.size());
        } else {
            double first = rowHeight(width, 0, 2);
            layoutRow(0, first, 0, 2);
            layoutRow(first, rowHeight(width, 2, FIELDS.size()), 2, FIELDS.size());
        }
    }

    private static final PseudoClass ABOVE = PseudoClass.getPseudoClass("above");
    private static final PseudoClass LAST = PseudoClass.getPseudoClass("last");

    private void layoutRow(double y, double height, int from, int to) {
        double x = 0;
        for (int i = from; i < to; i++) {
            double w = i == to - 1 ? getWidth() - x : Math.floor(getWidth() * FIELDS.get(i).share / shares(from, to));
            getChildren().get(i).resizeRelocate(x, y, w, height);
            getChildren().get(i).pseudoClassStateChanged(ABOVE, to < FIELDS.size());
            getChildren().get(i).pseudoClassStateChanged(LAST, i == to - 1);
            x += w;
        }
    }
}

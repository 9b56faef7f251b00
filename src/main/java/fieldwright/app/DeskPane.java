package fieldwright.app;

import javafx.scene.Node;
import javafx.scene.layout.Pane;

/** The page and, at its right, the ledgers; on a narrow window the ledgers lie below. */
final class DeskPane extends Pane {
    private static final double NARROW = 62;   // letter heights
    private final Zoom zoom;
    private final Node page;
    private final Node side;

    DeskPane(Zoom zoom, Node page, Node side) {
        this.zoom = zoom;
        this.page = page;
        this.side = side;
        getStyleClass().add("desk");
        getChildren().addAll(page, side);
    }

    @Override
    protected void layoutChildren() {
        double width = getWidth();
        double height = getHeight();
        double letters = width / zoom.em(1);
        if (letters < NARROW) {
            double below = Math.min(Math.floor(height * 0.3), Math.ceil(side.prefHeight(width)));
            page.resizeRelocate(0, 0, width, height - below);
            side.resizeRelocate(0, height - below, width, below);
        } else {
            double beside = Math.floor(zoom.em(letters > 90 ? 22.5 : 19.5));
            page.resizeRelocate(0, 0, width - beside, height);
            side.resizeRelocate(width - beside, 0, beside, height);
        }
    }
}

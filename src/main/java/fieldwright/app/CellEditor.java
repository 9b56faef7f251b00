package fieldwright.app;

import fieldwright.sheet.Cell;
import java.time.Duration;
import java.util.Collection;
import java.util.List;
import java.util.function.Consumer;
import javafx.application.Platform;
import javafx.beans.value.ChangeListener;
import javafx.geometry.Bounds;
import javafx.geometry.Orientation;
import javafx.scene.Node;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.input.ScrollEvent;
import javafx.scene.layout.Region;
import org.fxmisc.flowless.VirtualizedScrollPane;
import org.fxmisc.richtext.CodeArea;
import org.fxmisc.richtext.model.StyleSpansBuilder;
import org.fxmisc.richtext.util.UndoUtils;
import org.reactfx.EventStreams;
import org.reactfx.Subscription;

/**
 * The text of one step while it is edited: as high as its text up to a limit, the wheel left to the page unless the
 * text is higher than that, undo of plain text alone (restyling is no step back). {@link #dispose()} ends it; an editor
 * that was not disposed of would be kept alive by its subscriptions.
 */
final class CellEditor extends Region {
    private static final int HIGHEST = 46;                       // lines, then it scrolls by itself
    private static final Duration PAUSE = Duration.ofMillis(90);

    /** The page around the editor. */
    interface Host {
        void leave();

        void workOut();

        /** The caret is here now, on the screen; it should be seen. */
        void caretAt(Bounds place);
    }

    private final CodeArea area = new CodeArea();
    private final VirtualizedScrollPane<CodeArea> scroll = new VirtualizedScrollPane<>(area);
    private final Cell.Kind kind;
    private final Zoom zoom;
    private Subscription subscriptions;
    private final ChangeListener<Number> heightListener = (o, was, is) -> requestLayout();

    CellEditor(Cell.Kind kind, String text, Zoom zoom, Host host, Consumer<String> typed) {
        this.kind = kind;
        this.zoom = zoom;
        getStyleClass().add("cell-editor");
        area.getStyleClass().add(kind == Cell.Kind.NOTE ? "prose-area" : "code-area");
        area.setWrapText(true);
        area.replaceText(text);
        area.setUndoManager(UndoUtils.plainTextUndoManager(area));
        area.setAccessibleText("text of the " + kind.word() + " step");
        getChildren().add(scroll);
        colour();
        subscriptions = area.multiPlainChanges().successionEnds(PAUSE).subscribe(changes -> {
            colour();
            typed.accept(area.getText());
        });
        subscriptions = subscriptions.and(area.multiPlainChanges().subscribe(changes -> requestParentLayout()));
        subscriptions = subscriptions.and(EventStreams.nonNullValuesOf(area.caretBoundsProperty())
                .subscribe(place -> place.ifPresent(host::caretAt)));
        area.totalHeightEstimateProperty().addListener(heightListener);
        area.addEventFilter(ScrollEvent.SCROLL, this::passOn);
        area.addEventFilter(KeyEvent.KEY_PRESSED, e -> key(e, host));
    }

    String text() {
        return area.getText();
    }

    CodeArea area() {
        return area;
    }

    /** Puts the caret before this letter and takes the keys. */
    void takeKeys(int caret) {
        area.moveTo(Math.max(0, Math.min(caret, area.getLength())));
        area.requestFocus();
    }

    /** Ends all it listens to; it shows nothing afterwards. */
    void dispose() {
        subscriptions.unsubscribe();
        subscriptions = Subscription.EMPTY;
        area.totalHeightEstimateProperty().removeListener(heightListener);
        area.getUndoManager().close();
        getChildren().clear();
        scroll.removeContent();
        area.dispose();
    }

    private void colour() {
        if (kind == Cell.Kind.WORKING && area.getLength() > 0) {
            StyleSpansBuilder<Collection<String>> spans = new StyleSpansBuilder<>();
            JavaColours.of(area.getText()).forEach(run -> spans.add(List.of(run.style()), run.text().length()));
            area.setStyleSpans(0, spans.create());
        }
    }

    private void key(KeyEvent e, Host host) {
        if (e.getCode() == KeyCode.ESCAPE) {
            e.consume();
            host.leave();
        } else if (e.getCode() == KeyCode.ENTER && e.isShortcutDown()) {
            e.consume();
            host.workOut();
        } else if (e.getCode() == KeyCode.ENTER && !e.isAltDown() && kind == Cell.Kind.WORKING) {
            e.consume();
            String line = area.getParagraph(area.getCurrentParagraph()).getText();
            String before = line.substring(0, Math.min(line.length(), area.getCaretColumn()));
            area.replaceSelection("\n" + before.substring(0, before.length() - before.stripLeading().length()));
        } else if (e.getCode() == KeyCode.TAB && kind == Cell.Kind.WORKING && !e.isShiftDown() && !e.isShortcutDown()) {
            e.consume();
            area.replaceSelection("    ");
        } else if (e.getCode() == KeyCode.TAB) {
            e.consume();
            host.leave();
        }
    }

    /** The text area takes the wheel even where it has nothing to scroll (a known habit of it); the page should move. */
    private void passOn(ScrollEvent e) {
        Node parent = getParent();
        if (parent != null && !isHigherThanShown()) {
            e.consume();
            parent.fireEvent(e.copyFor(parent, parent));
        }
    }

    private boolean isHigherThanShown() {
        return textHeight() > limit() + 1;
    }

    private double limit() {
        return zoom.em(HIGHEST * 1.35);
    }

    private double textHeight() {
        Double height = area.getTotalHeightEstimate();
        double oneLine = zoom.em(1.6);
        return height == null || height < oneLine ? Math.max(1, area.getParagraphs().size()) * oneLine : height;
    }

    @Override
    public Orientation getContentBias() {
        return Orientation.HORIZONTAL;
    }

    @Override
    protected double computePrefHeight(double width) {
        return Math.min(textHeight(), limit()) + snappedTopInset() + snappedBottomInset() + 2;
    }

    @Override
    protected double computeMinHeight(double width) {
        return computePrefHeight(width);
    }

    @Override
    protected double computePrefWidth(double height) {
        return zoom.em(30);
    }

    @Override
    protected double computeMinWidth(double height) {
        return 0;
    }

    @Override
    protected void layoutChildren() {
        scroll.resizeRelocate(snappedLeftInset(), snappedTopInset(), getWidth() - snappedLeftInset() - snappedRightInset(),
                getHeight() - snappedTopInset() - snappedBottomInset());
        if (Math.abs(computePrefHeight(getWidth()) - getHeight()) > 0.5) {
            Platform.runLater(this::requestParentLayout);
        }
    }
}

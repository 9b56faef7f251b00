package fieldwright.app;

import fieldwright.sheet.Cell;
import java.util.function.Consumer;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.MenuButton;
import javafx.scene.control.MenuItem;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;

/** The bar above the page: what is done most, two menus for the rest, and at the right how the sheet stands. */
final class Bar extends HBox {
    private final Pad pad;
    private final Button stop;
    private final Button fold;
    private final Label status = new Label();

    Bar(Pad pad) {
        this.pad = pad;
        getStyleClass().add("bar");
        Label name = new Label("Fieldwright");
        name.getStyleClass().add("bar-name");
        name.setMinWidth(USE_PREF_SIZE);
        Button workOut = button("Work out", "Ctrl+Enter", Pad::workOut);
        workOut.getStyleClass().add("main-button");
        stop = button("Stop", "Ctrl+.", Pad::stop);
        fold = button("Fold code", "Ctrl+K", p -> p.setFolded(!p.isFolded()));
        Region gap = new Region();
        setHgrow(gap, Priority.ALWAYS);
        status.getStyleClass().add("status");
        status.setMinWidth(0);
        getChildren().addAll(name, workOut, stop, fileMenu(), button("Save", "Ctrl+S", Pad::save), stepMenu(), fold,
                button("Keys", "F1", Pad::showKeys), gap, status);
    }

    private MenuButton fileMenu() {
        MenuButton menu = menu("File");
        menu.getItems().addAll(item("New", Pad::newSheet), item("Open…", Pad::open), item("Save", Pad::save),
                item("Save as…", Pad::saveAs));
        return menu;
    }

    private MenuButton stepMenu() {
        MenuButton menu = menu("Step");
        for (Cell.Kind kind : Cell.Kind.values()) {
            menu.getItems().add(item("Add " + kind.word() + " below", p -> p.addBelow(kind)));
        }
        menu.getItems().addAll(new SeparatorMenuItem(), item("Move up", p -> p.moveAtHand(-1)), item("Move down", p -> p.moveAtHand(1)),
                item("Remove", Pad::removeAtHand), new SeparatorMenuItem(), item("Undo", Pad::undo), item("Redo", Pad::redo));
        return menu;
    }

    private static MenuButton menu(String text) {
        MenuButton menu = new MenuButton(text);
        menu.setMinWidth(USE_PREF_SIZE);
        return menu;
    }

    private Button button(String text, String key, Consumer<Pad> deed) {
        Button button = new Button(text);
        button.setMinWidth(USE_PREF_SIZE);
        button.setTooltip(new Tooltip(key));
        button.setOnAction(e -> deed.accept(pad));
        return button;
    }

    private MenuItem item(String text, Consumer<Pad> deed) {
        MenuItem item = new MenuItem(text);
        item.setOnAction(e -> deed.accept(pad));
        return item;
    }

    /** Shows how the sheet stands now. */
    void show() {
        stop.setDisable(!pad.bench().isBusy());
        fold.setText(pad.isFolded() ? "Show code" : "Fold code");
        status.setText(pad.status());
    }

    String statusText() {
        return status.getText();
    }
}

package fieldwright.app;

import fieldwright.sheet.Cell;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.MenuButton;
import javafx.scene.control.MenuItem;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;

/** The bar above the page. */
final class Bar extends HBox {
    private final Pad pad;
    private final Button workOut = button("Work out", "Ctrl+Enter", p -> p.workOut());
    private final Button stop = button("Stop", "Ctrl+.", p -> p.stop());
    private final Button save = button("Save", "Ctrl+S", p -> p.save());
    private final Button fold = button("Fold code", "Ctrl+K", p -> p.setFolded(!p.isFolded()));
    private final MenuButton file = new MenuButton("File");
    private final MenuButton step = new MenuButton("Step");
    private final Label status = new Label();

    Bar(Pad pad) {
        this.pad = pad;
        getStyleClass().add("bar");
        Label name = new Label("Fieldwright");
        name.getStyleClass().add("bar-name");
        name.setMinWidth(USE_PREF_SIZE);
        workOut.getStyleClass().add("main-button");
        file.getItems().addAll(item("New", p -> p.newSheet()), item("Open…", p -> p.open()), item("Save", p -> p.save()),
                item("Save as…", p -> p.saveAs()));
        for (Cell.Kind kind : Cell.Kind.values()) {
            step.getItems().add(item("Add " + kind.word() + " below", p -> p.addBelow(kind)));
        }
        step.getItems().addAll(new SeparatorMenuItem(), item("Move up", p -> p.moveAtHand(-1)), item("Move down", p -> p.moveAtHand(1)),
                item("Remove", p -> p.removeAtHand()), new SeparatorMenuItem(), item("Undo", p -> p.undo()), item("Redo", p -> p.redo()));
        Button keys = button("Keys", "F1", p -> p.showKeys());
        Region gap = new Region();
        setHgrow(gap, Priority.ALWAYS);
        status.getStyleClass().add("status");
        status.setMinWidth(0);
        getChildren().addAll(name, workOut, stop, file, save, step, fold, keys, gap, status);
    }

    private interface Deed {
        void on(Pad pad);
    }

    private Button button(String text, String key, Deed deed) {
        Button button = new Button(text);
        button.setMinWidth(USE_PREF_SIZE);
        button.setTooltip(new Tooltip(key));
        button.setOnAction(e -> deed.on(pad()));
        return button;
    }

    /** The buttons are made before the constructor has set the field. */
    private Pad pad() {
        return pad;
    }

    private MenuItem item(String text, Deed deed) {
        MenuItem item = new MenuItem(text);
        item.setOnAction(e -> deed.on(pad));
        return item;
    }

    void show() {
        boolean busy = pad.bench() != null && pad.bench().isBusy();
        stop.setDisable(!busy);
        save.setDisable(false);
        fold.setText(pad.isFolded() ? "Show code" : "Fold code");
        status.setText(pad.status());
    }

    String statusText() {
        return status.getText();
    }
}

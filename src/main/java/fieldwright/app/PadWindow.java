package fieldwright.app;

import fieldwright.sheet.Trust;
import java.io.File;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.Executor;
import java.util.function.Supplier;
import javafx.application.Platform;
import javafx.scene.Scene;
import javafx.scene.control.Alert;
import javafx.scene.control.ButtonBar;
import javafx.scene.control.ButtonType;
import javafx.scene.control.Label;
import javafx.scene.control.TextInputControl;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.GridPane;
import javafx.stage.FileChooser;
import javafx.stage.Modality;
import javafx.stage.Screen;
import javafx.stage.Stage;

/** A window with one pad: title, keys, dialogs, closing. */
final class PadWindow implements Questions {
    private static final double WIDTH = 1400;
    private static final double HEIGHT = 940;

    private final Stage stage;
    private final Pad pad;

    PadWindow(Stage stage, SheetDesk desk, Supplier<Calculator> start) {
        this.stage = stage;
        Executor home = Platform::runLater;
        this.pad = new Pad(desk, this, Trust.ofUser(), start, home);
        var screen = Screen.getPrimary().getVisualBounds();
        Scene scene = new Scene(pad, Math.min(WIDTH, screen.getWidth()), Math.min(HEIGHT, screen.getHeight() - 30));
        install(scene, pad);
        stage.setScene(scene);
        stage.setMinWidth(560);
        stage.setMinHeight(400);
        pad.onTitleChanged(this::showTitle);
        showTitle();
        stage.setOnCloseRequest(e -> {
            if (!pad.mayLeaveSheet()) {
                e.consume();
            }
        });
        stage.setOnHidden(e -> pad.close());
        stage.show();
        pad.bench().warmUp();
    }

    /** The keys of the pad on a scene, and what happens when the focus moves. */
    static void install(Scene scene, Pad pad) {
        scene.addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            boolean writing = scene.getFocusOwner() instanceof TextInputControl;
            boolean editing = pad.page().edited() != null && pad.page().edited().editor().area().isFocused();
            if (!isOfText(e, writing || editing)) {
                Keys.handle(e, pad);
            }
        });
        scene.focusOwnerProperty().addListener((o, was, is) -> pad.focusMoved(is));
    }

    /** Undo, moving by word and the like belong to the text while one is written in. */
    private static boolean isOfText(KeyEvent e, boolean writing) {
        boolean undo = e.isShortcutDown() && (e.getCode() == KeyCode.Z || e.getCode() == KeyCode.Y);
        boolean move = (e.getCode() == KeyCode.UP || e.getCode() == KeyCode.DOWN) && (e.isShortcutDown() || e.isAltDown());
        return writing && (undo || move);
    }

    private void showTitle() {
        String title = pad.desk().sheet().header().get("title");
        stage.setTitle((pad.desk().isUnsaved() ? "• " : "") + pad.name() + (title.isEmpty() ? "" : " – " + title) + " – Fieldwright");
    }

    // --- questions ---

    @Override
    public boolean mayRun(String name) {
        ButtonType run = new ButtonType("Run it", ButtonBar.ButtonData.OK_DONE);
        Alert alert = alert("Run " + name + "?", "A sheet is a program. This one was not made here: run it only if you know where it "
                + "comes from, or have read its working steps. You are asked once for each text.", run,
                new ButtonType("Do not run", ButtonBar.ButtonData.CANCEL_CLOSE));
        return alert.showAndWait().filter(run::equals).isPresent();
    }

    @Override
    public Unsaved unsaved(String name) {
        ButtonType save = new ButtonType("Save", ButtonBar.ButtonData.YES);
        ButtonType discard = new ButtonType("Do not save", ButtonBar.ButtonData.NO);
        Alert alert = alert("Save the changes to " + name + "?", "They are lost otherwise.", save, discard,
                new ButtonType("Stay", ButtonBar.ButtonData.CANCEL_CLOSE));
        ButtonType answer = alert.showAndWait().orElse(null);
        return answer == save ? Unsaved.SAVE : answer == discard ? Unsaved.DISCARD : Unsaved.STAY;
    }

    @Override
    public boolean mayReplace(String name) {
        ButtonType replace = new ButtonType("Replace it", ButtonBar.ButtonData.YES);
        Alert alert = alert(name + " was changed by another program", "Saving replaces what stands in the file now. Save as keeps both.",
                replace, new ButtonType("Stay", ButtonBar.ButtonData.CANCEL_CLOSE));
        return alert.showAndWait().filter(replace::equals).isPresent();
    }

    @Override
    public Optional<Path> fileToOpen(Path near) {
        return Optional.ofNullable(chooser("Open a sheet", near).showOpenDialog(stage)).map(File::toPath);
    }

    @Override
    public Optional<Path> fileToSave(Path near, String suggested) {
        FileChooser chooser = chooser("Save the sheet", near);
        chooser.setInitialFileName(near == null ? suggested : near.getFileName().toString());
        return Optional.ofNullable(chooser.showSaveDialog(stage)).map(File::toPath)
                .map(path -> path.getFileName().toString().contains(".") ? path : path.resolveSibling(path.getFileName() + ".fws"));
    }

    private static FileChooser chooser(String title, Path near) {
        FileChooser chooser = new FileChooser();
        chooser.setTitle(title);
        chooser.getExtensionFilters().addAll(new FileChooser.ExtensionFilter("Sheets (*.fws)", "*.fws"),
                new FileChooser.ExtensionFilter("All files", "*"));
        Path folder = near == null ? null : near.toAbsolutePath().getParent();
        if (folder != null && Files.isDirectory(folder)) {
            chooser.setInitialDirectory(folder.toFile());
        }
        return chooser;
    }

    @Override
    public void tell(String heading, String text) {
        Alert alert = alert(heading, text, ButtonType.OK);
        if (text.contains("\t")) {
            alert.getDialogPane().setContent(table(text));
        }
        alert.showAndWait();
    }

    /** Lines with a tab as two columns, others across. */
    private static GridPane table(String text) {
        GridPane table = new GridPane();
        table.getStyleClass().add("keys");
        int row = 0;
        for (String line : text.split("\n")) {
            String[] parts = line.split("\t");
            Label first = new Label(parts[0]);
            if (parts.length == 1) {
                table.add(first, 0, row++, 2, 1);
            } else {
                first.getStyleClass().add("key");
                table.addRow(row++, first, new Label(parts[1]));
            }
        }
        return table;
    }

    private Alert alert(String heading, String text, ButtonType... answers) {
        Alert alert = new Alert(Alert.AlertType.NONE, text, answers);
        alert.initOwner(stage);
        alert.initModality(Modality.WINDOW_MODAL);
        alert.setTitle("Fieldwright");
        alert.setHeaderText(heading);
        alert.getDialogPane().getStylesheets().addAll(pad.getStylesheets());
        alert.getDialogPane().setStyle(pad.getStyle());
        return alert;
    }
}

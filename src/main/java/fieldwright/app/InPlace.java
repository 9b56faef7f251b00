package fieldwright.app;

import java.util.function.Consumer;
import javafx.scene.control.Label;
import javafx.scene.control.TextField;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.StackPane;

/**
 * Text on the page that becomes a field when it is clicked or reached by Tab, and text again when it is left. Enter and
 * leaving take the new text over, Esc gives it up.
 */
final class InPlace extends StackPane {
    private final Label shown = new Label();
    private final TextField field = new TextField();
    private final Consumer<String> changed;
    private String value = "";

    InPlace(String name, Consumer<String> changed) {
        this.changed = changed;
        getStyleClass().add("in-place");
        shown.setWrapText(true);
        shown.setMaxWidth(Double.MAX_VALUE);
        shown.setMinHeight(USE_PREF_SIZE);
        shown.setMouseTransparent(true);
        field.setAccessibleText(name);
        field.setOpacity(0);
        field.setMinHeight(0);
        field.setMaxHeight(Double.MAX_VALUE);
        field.setOnAction(e -> takeOver());
        field.addEventHandler(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() == KeyCode.ESCAPE) {
                field.setText(value);
            }
        });
        field.focusedProperty().addListener((o, was, is) -> {
            field.setOpacity(is ? 1 : 0);
            shown.setOpacity(is ? 0 : 1);
            if (!is) {
                takeOver();
            }
        });
        getChildren().addAll(shown, field);
    }

    void show(String text) {
        value = text;
        shown.setText(text.isEmpty() ? "—" : text);
        if (!field.isFocused() && !field.getText().equals(text)) {
            field.setText(text);
        }
    }

    /** The field itself, for those who drive the page. */
    TextField field() {
        return field;
    }

    private void takeOver() {
        String text = field.getText().strip();
        if (!text.equals(value)) {
            value = text;
            changed.accept(text);
        }
    }
}

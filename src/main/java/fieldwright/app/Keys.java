package fieldwright.app;

import fieldwright.sheet.Cell;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.function.Consumer;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyCodeCombination;
import javafx.scene.input.KeyCombination;
import javafx.scene.input.KeyEvent;

/**
 * Every key of the pad and what it does, in one place: the platform's for files, undo and zoom, our own for the rest.
 * The popup shows this list.
 */
final class Keys {
    /** A key, what it does in words, and the deed. */
    private record Key(KeyCombination combination, String words, Consumer<Pad> deed) { }

    private static final java.util.List<Key> KEYS = java.util.List.of(
            key("Work the sheet out", KeyCode.ENTER, Pad::workOut, KeyCombination.SHORTCUT_DOWN),
            key("Stop what is being worked out", KeyCode.PERIOD, Pad::stop, KeyCombination.SHORTCUT_DOWN),
            key("New sheet", KeyCode.N, Pad::newSheet, KeyCombination.SHORTCUT_DOWN),
            key("Open", KeyCode.O, Pad::open, KeyCombination.SHORTCUT_DOWN),
            key("Save", KeyCode.S, Pad::save, KeyCombination.SHORTCUT_DOWN),
            key("Save as", KeyCode.S, Pad::saveAs, KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_DOWN),
            key("Undo", KeyCode.Z, Pad::undo, KeyCombination.SHORTCUT_DOWN),
            key("Redo", KeyCode.Z, Pad::redo, KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_DOWN),
            key("Redo", KeyCode.Y, Pad::redo, KeyCombination.SHORTCUT_DOWN),
            key("Larger", KeyCode.PLUS, p -> p.zoom().larger(), KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_ANY),
            key("Larger", KeyCode.EQUALS, p -> p.zoom().larger(), KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_ANY),
            key("Larger", KeyCode.ADD, p -> p.zoom().larger(), KeyCombination.SHORTCUT_DOWN),
            key("Smaller", KeyCode.MINUS, p -> p.zoom().smaller(), KeyCombination.SHORTCUT_DOWN),
            key("Smaller", KeyCode.SUBTRACT, p -> p.zoom().smaller(), KeyCombination.SHORTCUT_DOWN),
            key("Plain size", KeyCode.DIGIT0, p -> p.zoom().reset(), KeyCombination.SHORTCUT_DOWN),
            key("Plain size", KeyCode.NUMPAD0, p -> p.zoom().reset(), KeyCombination.SHORTCUT_DOWN),
            key("Step above", KeyCode.UP, p -> p.step(-1), KeyCombination.SHORTCUT_DOWN),
            key("Step below", KeyCode.DOWN, p -> p.step(1), KeyCombination.SHORTCUT_DOWN),
            key("Move the step up", KeyCode.UP, p -> p.moveAtHand(-1), KeyCombination.ALT_DOWN),
            key("Move the step down", KeyCode.DOWN, p -> p.moveAtHand(1), KeyCombination.ALT_DOWN),
            key("Add a note below", KeyCode.DIGIT1, p -> p.addBelow(Cell.Kind.NOTE), KeyCombination.ALT_DOWN),
            key("Add inputs below", KeyCode.DIGIT2, p -> p.addBelow(Cell.Kind.INPUT), KeyCombination.ALT_DOWN),
            key("Add formulas below", KeyCode.DIGIT3, p -> p.addBelow(Cell.Kind.DERIVE), KeyCombination.ALT_DOWN),
            key("Add working below", KeyCode.DIGIT4, p -> p.addBelow(Cell.Kind.WORKING), KeyCombination.ALT_DOWN),
            key("Fold or show code", KeyCode.K, p -> p.setFolded(!p.isFolded()), KeyCombination.SHORTCUT_DOWN),
            key("To the inputs", KeyCode.I, Pad::toInputs, KeyCombination.SHORTCUT_DOWN),
            key("These keys", KeyCode.F1, Pad::showKeys));

    private static final String IN_PLACE = """
            On a step: Enter edits its text, Delete removes it, Tab goes on.
            In a text: Esc leaves it, Ctrl+Enter leaves it and works out.
            In an input: Enter takes the number over, Esc gives it up.""";

    /** What the popup says. */
    static final String TEXT = text();

    private Keys() { }

    private static Key key(String words, KeyCode code, Consumer<Pad> deed, KeyCombination.Modifier... modifiers) {
        return new Key(new KeyCodeCombination(code, modifiers), words, deed);
    }

    private static String text() {
        Map<String, String> keys = new LinkedHashMap<>();
        for (Key key : KEYS) {
            keys.putIfAbsent(key.words, key.combination.getDisplayText());
        }
        StringBuilder text = new StringBuilder();
        keys.forEach((words, display) -> text.append(display).append('\t').append(words).append('\n'));
        return text.append('\n').append(IN_PLACE).toString();
    }

    /** Does what the key stands for; false when it stands for nothing. */
    static boolean handle(KeyEvent event, Pad pad) {
        for (Key key : KEYS) {
            if (key.combination.match(event)) {
                event.consume();
                key.deed.accept(pad);
                return true;
            }
        }
        return false;
    }
}

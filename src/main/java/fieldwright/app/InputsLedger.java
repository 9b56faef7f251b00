package fieldwright.app;

import fieldwright.sheet.Cell;
import fieldwright.sheet.InputEntry;
import java.util.ArrayList;
import java.util.List;
import javafx.css.PseudoClass;
import javafx.geometry.VPos;
import javafx.scene.control.Label;
import javafx.scene.control.TextField;
import javafx.scene.control.Tooltip;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.ColumnConstraints;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;

/** The inputs of the sheet beside the page, each number to be changed in place. Enter or leaving takes it over. */
final class InputsLedger extends VBox {
    private static final PseudoClass WRONG = PseudoClass.getPseudoClass("wrong");

    /** Takes a typed number over; throws IllegalArgumentException with what to write instead. */
    interface Change {
        void apply(long step, InputEntry entry, String typed);
    }

    /** One line: which step it is in and what is shown for it. */
    private record Row(long step, String name, String unit, String tolerance) { }

    private final Zoom zoom;
    private final Change change;
    private final GridPane table = new GridPane();
    private final Label trouble = OutputColumn.line("", "problem");
    private List<Row> rows = List.of();
    private final List<InputEntry> entries = new ArrayList<>();
    private final List<TextField> fields = new ArrayList<>();

    InputsLedger(Zoom zoom, Change change) {
        this.zoom = zoom;
        this.change = change;
        getStyleClass().add("ledger");
        table.getStyleClass().add("ledger-table");
        Label heading = new Label("Inputs");
        heading.getStyleClass().add("ledger-heading");
        heading.setMaxWidth(Double.MAX_VALUE);
        say("");
        getChildren().addAll(heading, table, trouble);
    }

    void show(List<Step> steps) {
        List<Row> now = new ArrayList<>();
        entries.clear();
        List<String> numbers = new ArrayList<>();
        for (Step step : steps) {
            if (step.cell().kind() == Cell.Kind.INPUT) {
                step.cell().inputs().stream().filter(InputEntry.class::isInstance).map(InputEntry.class::cast).forEach(entry -> {
                    InputValue value = InputValue.of(entry.definition()).orElse(new InputValue(entry.definition(), "", ""));
                    now.add(new Row(step.id(), entry.name(), value.unit(), value.tolerance()));
                    entries.add(entry);
                    numbers.add(value.number());
                });
            }
        }
        if (!now.equals(rows)) {
            rows = now;
            build();
        }
        for (int i = 0; i < fields.size(); i++) {
            if (!fields.get(i).isFocused() || !fields.get(i).getPseudoClassStates().contains(WRONG)) {
                setText(fields.get(i), numbers.get(i));
            }
        }
        setVisible(!rows.isEmpty());
        setManaged(!rows.isEmpty());
    }

    private static void setText(TextField field, String text) {
        if (!field.getText().equals(text)) {
            field.setText(text);
        }
    }

    private void build() {
        table.getChildren().clear();
        fields.clear();
        ColumnConstraints symbols = new ColumnConstraints();
        symbols.setMinWidth(USE_PREF_SIZE);
        table.getColumnConstraints().setAll(symbols, growing(), new ColumnConstraints());
        for (int i = 0; i < rows.size(); i++) {
            Row row = rows.get(i);
            TextField field = field(i);
            fields.add(field);
            Label unit = new Label(CalculationColumn.printedUnit(row.unit));
            unit.getStyleClass().add("ledger-unit");
            unit.setMinWidth(USE_PREF_SIZE);
            boolean number = !row.unit.isEmpty() || InputValue.of(entries.get(i).definition()).isPresent();
            field.setMinWidth(USE_PREF_SIZE);
            if (!number) {
                field.getStyleClass().add("ledger-list");
                HBox.setHgrow(field, Priority.ALWAYS);
            }
            HBox value = new HBox(field, unit);
            value.getStyleClass().add("ledger-value");
            Label tolerance = new Label(CalculationColumn.printedTolerance(row.tolerance.replaceFirst("\\s*\\(.*", "")));
            tolerance.getStyleClass().add("ledger-tolerance");
            tolerance.setMinWidth(USE_PREF_SIZE);
            table.addRow(i, Typesetting.symbol(Notation.name(row.name), row.name, zoom), value);
            if (number) {
                table.add(tolerance, 2, i);
            } else {
                GridPane.setColumnSpan(value, 2);
            }
        }
        table.getChildren().forEach(n -> GridPane.setValignment(n, VPos.CENTER));
    }

    private static ColumnConstraints growing() {
        ColumnConstraints c = new ColumnConstraints();
        c.setHgrow(Priority.ALWAYS);
        return c;
    }

    private TextField field(int i) {
        TextField field = new TextField();
        field.getStyleClass().add("ledger-field");
        field.setAccessibleText(rows.get(i).name + " in " + rows.get(i).unit);
        field.setOnAction(e -> takeOver(i));
        field.addEventHandler(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() == KeyCode.ESCAPE) {
                field.setText(number(i));
                accept(field);
            }
        });
        field.focusedProperty().addListener((o, was, is) -> {
            if (!is && fields.contains(field)) {
                takeOver(i);
            }
        });
        String source = entries.get(i).source();
        Tooltip.install(field, new Tooltip(CalculationColumn.printed(entries.get(i).definition()) + " · " + entries.get(i).description() + (source.isEmpty() ? " · no source" : " · " + source)));
        return field;
    }

    private String number(int i) {
        return InputValue.of(entries.get(i).definition()).map(InputValue::number).orElse(entries.get(i).definition());
    }

    private void takeOver(int i) {
        TextField field = fields.get(i);
        if (field.getText().strip().equals(number(i))) {
            accept(field);
            return;
        }
        try {
            change.apply(rows.get(i).step, entries.get(i), field.getText());
            accept(field);
        } catch (IllegalArgumentException wrong) {
            field.pseudoClassStateChanged(WRONG, true);
            say(rows.get(i).name + ": " + wrong.getMessage());
        }
    }

    private void accept(TextField field) {
        field.pseudoClassStateChanged(WRONG, false);
        say("");
    }

    private void say(String text) {
        trouble.setText(text);
        trouble.setVisible(!text.isEmpty());
        trouble.setManaged(!text.isEmpty());
    }

    void takeKeys() {
        if (!fields.isEmpty()) {
            fields.get(0).requestFocus();
            fields.get(0).selectAll();
        }
    }

    /** The field of an input, for those who drive the page; null when there is none of that name. */
    TextField field(String name) {
        for (int i = 0; i < rows.size(); i++) {
            if (rows.get(i).name.equals(name)) {
                return fields.get(i);
            }
        }
        return null;
    }
}

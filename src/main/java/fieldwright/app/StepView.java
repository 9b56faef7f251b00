package fieldwright.app;

import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import javafx.css.PseudoClass;
import javafx.scene.AccessibleRole;
import javafx.scene.Node;
import javafx.scene.control.TextField;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.input.MouseButton;
import javafx.scene.layout.VBox;

/** One row of the page. Shows a step; holds its editor while it is edited. Builds anew only what changed. */
final class StepView extends ThreeColumns {
    private static final PseudoClass AT_HAND = PseudoClass.getPseudoClass("at-hand");
    private static final PseudoClass STALE = PseudoClass.getPseudoClass("stale");

    private final long id;
    private final Zoom zoom;
    private final StepActions actions;
    private final VBox reference;
    private final VBox calculation;
    private final VBox output;
    private final CalculationColumn calculationColumn;
    private Step step;
    private boolean folded;
    private boolean working;
    private boolean pending;
    private final Map<String, Double> tolerances = new HashMap<>();
    private String note = "";
    private CellEditor editor;
    private TextField labelField;

    StepView(long id, Zoom zoom, StepActions actions) {
        this(id, zoom, actions, new VBox(), new VBox(), new VBox());
    }

    private StepView(long id, Zoom zoom, StepActions actions, VBox reference, VBox calculation, VBox output) {
        super(zoom, reference, calculation, output);
        this.id = id;
        this.zoom = zoom;
        this.actions = actions;
        this.reference = reference;
        this.calculation = calculation;
        this.output = output;
        this.calculationColumn = new CalculationColumn(zoom);
        getStyleClass().add("step");
        setFocusTraversable(true);
        setAccessibleRole(AccessibleRole.PARENT);
        focusedProperty().addListener((o, was, is) -> {
            if (is) {
                actions.takeUp(id);
            }
        });
        addEventHandler(KeyEvent.KEY_PRESSED, this::key);
        reference.setOnMouseClicked(e -> requestFocus());
        output.setOnMouseClicked(e -> requestFocus());
        calculation.setOnMouseClicked(e -> {
            if (e.getButton() == MouseButton.PRIMARY && editor == null && e.isStillSincePress()) {
                actions.edit(id, -1);
            }
        });
    }

    long id() {
        return id;
    }

    Step step() {
        return step;
    }

    boolean isEdited() {
        return editor != null;
    }

    CellEditor editor() {
        return editor;
    }

    /**
     * @param note    the CommonMark of a note with its results filled in
     * @param working true while this step is being worked
     * @param pending true while tolerances may still come
     */
    void show(Step now, String note, boolean folded, boolean working, boolean pending) {
        Step before = step;
        boolean first = before == null;
        boolean text = first || before.cell().kind() != now.cell().kind() || !before.cell().source().equals(now.cell().source())
                || !note.equals(this.note) || folded != this.folded;
        boolean results = first || !before.outputs().equals(now.outputs());
        boolean head = first || before.number() != now.number() || !before.cell().label().equals(now.cell().label());
        boolean state = first || before.stale() != now.stale() || working != this.working || before.isRecorded() != now.isRecorded()
                || !Objects.equals(state(before), state(now)) || pending != this.pending && !now.all(Output.Result.class).isEmpty();
        step = now;
        this.note = note;
        this.folded = folded;
        this.working = working;
        this.pending = pending;
        if (results && before != null) {
            keepTolerances(before);
        }
        if (text || head || results) {
            fillReference();
        }
        if (text || results) {
            fillCalculation();
        }
        if (results || state || text) {
            new OutputColumn(zoom, pending ? tolerances : Map.of()).fill(output, now, working);
        }
        pseudoClassStateChanged(STALE, now.stale());
        if (first || head || text) {
            setAccessibleText("step " + now.number() + ", " + now.cell().kind().word() + " " + now.cell().label());
        }
    }

    private void keepTolerances(Step step) {
        for (Output.Result result : step.all(Output.Result.class)) {
            Value value = result.value();
            List<Value.Scalar> numbers = value instanceof Value.Scalar s ? List.of(s)
                    : value instanceof Value.Triple t ? List.of(t.x(), t.y(), t.z()) : List.of();
            numbers.stream().map(Value.Scalar::tolerance).filter(Objects::nonNull).max(Double::compare)
                    .ifPresent(widest -> tolerances.put(result.name(), widest));
        }
    }

    private static Object state(Step s) {
        return s.outcome() == null ? null : s.outcome().state();
    }

    void setAtHand(boolean atHand) {
        pseudoClassStateChanged(AT_HAND, atHand);
    }

    private void fillReference() {
        new ReferenceColumn(zoom).fill(reference, step, labelField);
    }

    private void fillCalculation() {
        List<Node> nodes = new ArrayList<>();
        if (editor == null) {
            nodes.addAll(calculationColumn.text(step.cell(), note, step.all(Output.Typeset.class), folded, caret -> actions.edit(id, caret)));
        } else {
            nodes.add(editor);
            nodes.addAll(preview(editor.text()));
        }
        nodes.addAll(calculationColumn.shown(step));
        calculation.getChildren().setAll(nodes);
    }

    /** While a derive or input step is edited its text stands typeset below. */
    private List<Node> preview(String text) {
        return step.cell().kind() == Cell.Kind.DERIVE || step.cell().kind() == Cell.Kind.INPUT
                ? calculationColumn.text(Cell.of(step.cell().kind(), "", text), "", List.of(), false, caret -> { })
                : List.of();
    }

    // --- editing ---

    /** Opens the editor; the caret stands before this letter, at the end for −1. */
    void edit(int caret, CellEditor.Host host) {
        if (editor == null) {
            editor = new CellEditor(step.cell().kind(), step.cell().source(), zoom, host, text -> fillCalculation());
            labelField = new TextField(step.cell().label());
            labelField.setPromptText("label");
            labelField.getStyleClass().add("label-field");
            labelField.setOnAction(e -> host.leave());
            labelField.addEventHandler(KeyEvent.KEY_PRESSED, e -> {
                if (e.getCode() == KeyCode.ESCAPE) {
                    e.consume();
                    host.leave();
                }
            });
            fillReference();
            fillCalculation();
        }
        editor.takeKeys(caret < 0 ? editor.text().length() : caret);
    }

    /** Closes the editor and gives its text. */
    String endEdit() {
        String text = editor.text();
        CellEditor closed = editor;
        editor = null;
        closed.dispose();
        return text;
    }

    /** Closes the label's field and gives its text. */
    String endLabel() {
        String label = labelField.getText();
        labelField = null;
        return label;
    }

    /** Shows the step again after its editor was closed. */
    void showText() {
        fillReference();
        fillCalculation();
    }

    /** Called when the row leaves the page. */
    void dispose() {
        if (editor != null) {
            endEdit();
            endLabel();
        }
    }

    // --- keys ---

    private void key(KeyEvent e) {
        if (editor != null || e.getTarget() != this) {
            return;
        }
        if (e.getCode() == KeyCode.ENTER && !e.isShortcutDown()) {
            e.consume();
            actions.edit(id, -1);
        } else if (e.getCode() == KeyCode.DELETE) {
            e.consume();
            actions.remove(id);
        } else if (e.isAltDown() && (e.getCode() == KeyCode.UP || e.getCode() == KeyCode.DOWN)) {
            e.consume();
            actions.move(id, e.getCode() == KeyCode.UP ? -1 : 1);
        }
    }
}

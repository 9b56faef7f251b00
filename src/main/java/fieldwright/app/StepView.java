package fieldwright.app;

import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Objects;
import java.util.function.Supplier;
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
    private final Part referencePart = new Part();
    private final Part textPart = new Part();
    private final Part shownPart = new Part();
    private final Part outputPart = new Part();
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
        if (step != null && !step.outputs().equals(now.outputs())) {
            keepTolerances(step);
        }
        step = now;
        this.note = note;
        this.folded = folded;
        this.working = working;
        this.pending = pending;
        build();
    }

    /** Nodes made from something; made anew only when that is no longer the same. Typesetting and styling cost time. */
    private static final class Part {
        private List<?> madeFrom;
        private List<Node> nodes = List.of();

        List<Node> of(List<?> source, Supplier<List<Node>> make) {
            if (!source.equals(madeFrom)) {
                madeFrom = source;
                nodes = make.get();
            }
            return nodes;
        }
    }

    private void build() {
        Cell cell = step.cell();
        set(reference, referencePart.of(Arrays.asList(step.number(), cell.kind(), cell.label(), cell.source(), ReferenceColumn.cited(step), labelField),
                () -> new ReferenceColumn(zoom).of(step, labelField)));
        List<Node> nodes = new ArrayList<>(editor == null
                ? textPart.of(List.of(cell.kind(), cell.source(), note, folded, settled()), this::text)
                : textPart.of(List.of(editor, editor.text()), this::edited));
        nodes.addAll(shownPart.of(CalculationColumn.pictured(step), () -> calculationColumn.shown(step)));
        set(calculation, nodes);
        boolean waits = pending && !step.all(Output.Result.class).isEmpty();
        set(output, outputPart.of(Arrays.asList(step.outputs(), step.stale(), step.isRecorded(), working, waits,
                step.outcome() == null ? null : step.outcome().state(), step.worked()),
                () -> new OutputColumn(zoom, waits ? tolerances : Map.of()).of(step, working)));
        pseudoClassStateChanged(STALE, step.stale());
        setAccessibleText("step " + step.number() + ", " + cell.kind().word() + " " + cell.label());
    }

    /** Leaves what stands first as it is: an editor that was taken out and put back would lose the keys. */
    private static void set(VBox column, List<Node> nodes) {
        List<Node> shown = column.getChildren();
        int same = 0;
        while (same < Math.min(shown.size(), nodes.size()) && shown.get(same) == nodes.get(same)) {
            same++;
        }
        shown.subList(same, shown.size()).clear();
        shown.addAll(nodes.subList(same, nodes.size()));
    }

    /** Lines of a derive step as the last run set them; they carry what it says of each. */
    private List<Output.Typeset> settled() {
        return step.cell().kind() == Cell.Kind.DERIVE ? step.all(Output.Typeset.class) : List.of();
    }

    private List<Node> text() {
        return calculationColumn.text(step.cell(), note, settled(), folded, caret -> actions.edit(id, caret));
    }

    /** The editor, and for formulas and inputs what they look like below. */
    private List<Node> edited() {
        List<Node> nodes = new ArrayList<>(List.of(editor));
        Cell.Kind kind = step.cell().kind();
        if (kind == Cell.Kind.DERIVE || kind == Cell.Kind.INPUT) {
            nodes.addAll(calculationColumn.text(Cell.of(kind, "", editor.text()), "", List.of(), false, caret -> { }));
        }
        return nodes;
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

    void setAtHand(boolean atHand) {
        pseudoClassStateChanged(AT_HAND, atHand);
    }

    // --- editing ---

    /** Opens the editor; the caret stands before this letter, at the end for −1. */
    void edit(int caret, CellEditor.Host host) {
        if (editor == null) {
            editor = new CellEditor(step.cell().kind(), step.cell().source(), zoom, host, text -> build());
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
            build();
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
        build();
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

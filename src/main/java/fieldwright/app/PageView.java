package fieldwright.app;

import fieldwright.draw.Reading;
import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.sheet.Cell;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import javafx.scene.Node;
import javafx.scene.control.Hyperlink;
import javafx.scene.control.Label;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.VBox;

/** The page: title block, headings of the columns, one row per step, and the row that adds steps. */
final class PageView extends VBox {
    private final Zoom zoom;
    private final StepActions actions;
    private final Map<Long, StepView> views = new HashMap<>();
    private final VBox problems = new VBox();
    private final VBox rows = new VBox();
    private long atHand = -1;

    PageView(Zoom zoom, TitleBlock title, StepActions actions) {
        this.zoom = zoom;
        this.actions = actions;
        getStyleClass().add("page");
        problems.getStyleClass().add("sheet-problems");
        rows.getStyleClass().add("rows");
        getChildren().addAll(title, problems, headings(), rows);
    }

    private ThreeColumns headings() {
        ThreeColumns headings = new ThreeColumns(zoom, heading("Reference"), heading("Calculation"), heading("Output"));
        headings.getStyleClass().add("headings");
        return headings;
    }

    private static VBox heading(String text) {
        return new VBox(new Label(text));
    }

    /**
     * Shows the steps; rows of steps that did not change are left as they are.
     *
     * @param workingNow number of the step that is marked as being worked; 0 for none
     * @param pending    true while tolerances may still come
     */
    void show(List<Step> steps, List<Output.Problem> sheetProblems, boolean folded, int workingNow, boolean pending) {
        problems.getChildren().setAll(sheetProblems.stream().map(p -> (Node) OutputColumn.line(p.text(), "problem")).toList());
        problems.setManaged(!sheetProblems.isEmpty());
        Map<String, Value> quotable = quotable(steps);
        List<Node> now = new ArrayList<>();
        Set<Long> kept = new HashSet<>();
        for (Step step : steps) {
            StepView view = views.computeIfAbsent(step.id(), id -> new StepView(id, zoom, actions));
            view.show(step, step.cell().kind() == Cell.Kind.NOTE ? step.filled(name -> figures(quotable.get(name))) : "", folded, step.number() == workingNow, pending);
            view.setAtHand(step.id() == atHand);
            now.add(view);
            kept.add(step.id());
        }
        views.entrySet().removeIf(entry -> {
            boolean gone = !kept.contains(entry.getKey());
            if (gone) {
                entry.getValue().dispose();
            }
            return gone;
        });
        now.add(adder(steps.size()));
        if (!sameRows(now)) {
            rows.getChildren().setAll(now);
        }
    }

    private boolean sameRows(List<Node> now) {
        List<Node> shown = rows.getChildren();
        return shown.size() == now.size() && shown.subList(0, shown.size() - 1).equals(now.subList(0, now.size() - 1));
    }

    private ThreeColumns adder(int steps) {
        Label number = new Label(Integer.toString(steps + 1));
        number.getStyleClass().add("number");
        FlowPane links = new FlowPane(new Label("Add a step:"));
        links.getStyleClass().add("adder-links");
        for (Cell.Kind kind : Cell.Kind.values()) {
            Hyperlink link = new Hyperlink(kind.word());
            link.setOnAction(e -> actions.add(Integer.MAX_VALUE, kind));
            links.getChildren().add(link);
        }
        ThreeColumns adder = new ThreeColumns(zoom, new VBox(number), new VBox(links), new VBox());
        adder.getStyleClass().add("adder");
        return adder;
    }

    void setAtHand(long id) {
        atHand = id;
        views.values().forEach(view -> view.setAtHand(view.id() == id));
    }

    long atHand() {
        return atHand;
    }

    /** Null when it is not on the page. */
    StepView view(long id) {
        return views.get(id);
    }

    /** The row whose text is being edited; null when there is none. */
    StepView edited() {
        return views.values().stream().filter(StepView::isEdited).findFirst().orElse(null);
    }

    // --- notes ---

    /** What notes can quote: inputs and results by name. */
    private static Map<String, Value> quotable(List<Step> steps) {
        Map<String, Value> values = new HashMap<>();
        for (Step step : steps) {
            step.all(Output.Given.class).stream().filter(g -> g.value() != null).forEach(g -> values.put(g.name(), g.value()));
            step.all(Output.Result.class).forEach(r -> values.put(r.name(), r.value()));
        }
        return values;
    }

    private static String figures(Value value) {
        return value == null ? null : String.join("; ", Reading.of(value).stream()
                .map(r -> (r.part().isEmpty() ? "" : r.part() + " ") + r.figure()).toList());
    }
}

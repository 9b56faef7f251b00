package fieldwright.app;

import fieldwright.output.Output;
import fieldwright.sheet.Cell;
import fieldwright.sheet.DeriveEntry;
import fieldwright.sheet.InputEntry;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.text.TextFlow;

/** Makes what stands under Reference: number, label, where the inputs come from, which thresholds are cited. */
final class ReferenceColumn {
    private final Zoom zoom;

    ReferenceColumn(Zoom zoom) {
        this.zoom = zoom;
    }

    /** @param labelField stands in place of the label while the step is edited; null otherwise */
    List<Node> of(Step step, Node labelField) {
        List<Node> nodes = new ArrayList<>();
        Label number = new Label(Integer.toString(step.number()));
        number.getStyleClass().add("number");
        nodes.add(number);
        if (labelField != null) {
            nodes.add(labelField);
        } else if (!step.cell().label().isEmpty()) {
            nodes.add(OutputColumn.line(step.cell().label(), "step-label"));
        }
        sources(step).forEach((source, names) -> nodes.add(source(source, names)));
        cited(step).forEach(source -> nodes.add(OutputColumn.line(source, "source")));
        return nodes;
    }

    /** Where thresholds and cautions come from, each source once. */
    static Set<String> cited(Step step) {
        Set<String> cited = new LinkedHashSet<>();
        step.all(Output.Assessment.class).forEach(a -> cited.add(a.source()));
        step.all(Output.Caution.class).stream().filter(c -> !c.source().isEmpty()).forEach(c -> cited.add(c.source()));
        return cited;
    }

    /** Source to the names it is given for, in the order of the text; only inputs owe a source. */
    private static Map<String, List<String>> sources(Step step) {
        Map<String, List<String>> sources = new LinkedHashMap<>();
        if (step.cell().kind() == Cell.Kind.INPUT) {
            step.cell().inputs().stream().filter(InputEntry.class::isInstance).map(InputEntry.class::cast)
                    .forEach(e -> sources.computeIfAbsent(e.source().isEmpty() ? "no source" : e.source(), s -> new ArrayList<>()).add(e.name()));
        } else if (step.cell().kind() == Cell.Kind.DERIVE) {
            step.cell().derives().stream().filter(DeriveEntry.class::isInstance).map(DeriveEntry.class::cast)
                    .filter(e -> !e.source().isEmpty())
                    .forEach(e -> sources.computeIfAbsent(e.source(), s -> new ArrayList<>()).add(e.name()));
        }
        return sources;
    }

    private Node source(String source, List<String> names) {
        TextFlow flow = new TextFlow();
        for (String name : names) {
            flow.getChildren().add(Typesetting.small(Notation.name(name), name, zoom));
            flow.getChildren().add(OutputColumn.text(" ", "source-text"));
        }
        flow.getChildren().add(OutputColumn.text(source, source.equals("no source") ? "source-missing" : "source-text"));
        flow.getStyleClass().addAll("letters", "source-line");
        return flow;
    }
}

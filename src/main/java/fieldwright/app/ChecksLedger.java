package fieldwright.app;

import fieldwright.draw.Figures;
import fieldwright.output.Output;
import java.util.Comparator;
import java.util.List;
import java.util.function.LongConsumer;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.VBox;

/** All checks and assessments of the sheet beside the page; each leads to its step. What fails stands first. */
final class ChecksLedger extends VBox {
    private record Row(long step, boolean passed, String text, boolean doubtful) { }

    private final LongConsumer goTo;
    private final Label heading = new Label("Checks");
    private final VBox list = new VBox();
    private List<Row> rows;

    ChecksLedger(LongConsumer goTo) {
        this.goTo = goTo;
        getStyleClass().add("ledger");
        heading.getStyleClass().add("ledger-heading");
        heading.setMaxWidth(Double.MAX_VALUE);
        getChildren().addAll(heading, list);
    }

    void show(List<Step> steps) {
        List<Row> now = steps.stream().flatMap(step -> step.outputs().stream().filter(ChecksLedger::judges)
                .map(output -> row(step, output))).sorted(Comparator.comparing(Row::passed)).toList();
        if (now.equals(rows)) {
            return;
        }
        rows = now;
        long held = rows.stream().filter(Row::passed).count();
        heading.setText(held == rows.size() ? "Checks" : "Checks: " + (rows.size() - held) + " of " + rows.size() + (rows.size() - held == 1 ? " fails" : " fail"));
        list.getChildren().setAll(rows.stream().map(this::line).toList());
        setVisible(!rows.isEmpty());
        setManaged(!rows.isEmpty());
    }

    private static boolean judges(Output output) {
        return output instanceof Output.Check || output instanceof Output.Assessment || output instanceof Output.Problem;
    }

    private static Row row(Step step, Output output) {
        boolean doubtful = step.stale() || step.isRecorded();
        if (output instanceof Output.Check check) {
            return new Row(step.id(), check.passed(), check.label(), doubtful);
        }
        if (output instanceof Output.Assessment a) {
            String margin = Double.isNaN(a.marginFound()) ? "no margin"
                    : "margin " + Figures.significant(a.marginFound(), 2);
            return new Row(step.id(), a.passed(), a.label() + ": " + margin + (a.passed() ? "" : ", asked "
                    + Figures.brief(a.marginAsked(), 3)), doubtful);
        }
        return new Row(step.id(), false, "step " + step.number() + " has an error", doubtful);
    }

    private Node line(Row row) {
        Label mark = new Label(row.passed ? "✓" : "✕");
        mark.getStyleClass().add(row.passed ? "tick" : "cross");
        mark.setMinWidth(USE_PREF_SIZE);
        Button line = new Button(row.text, mark);
        line.setMnemonicParsing(false);
        line.setWrapText(true);
        line.setMinHeight(USE_PREF_SIZE);
        line.getStyleClass().add(row.passed ? "line-holds" : "line-fails");
        line.setAccessibleText((row.passed ? "holds: " : "fails: ") + row.text);
        line.setMaxWidth(Double.MAX_VALUE);
        line.getStyleClass().add("ledger-line");
        line.setOnAction(e -> goTo.accept(row.step));
        line.setOpacity(row.doubtful ? 0.6 : 1);
        return line;
    }
}

package fieldwright.app;

import fieldwright.draw.Figures;
import fieldwright.draw.Reading;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import javafx.scene.text.Text;
import javafx.scene.text.TextFlow;

/** Makes what stands under Output: results, judgements, cautions, problems. Nothing here can be folded away. */
final class OutputColumn {
    private final Zoom zoom;
    private final Map<String, Double> expected;

    /**
     * @param expected while tolerances are still being worked, those found last by the results' names: new results are
     *                 shown to as many digits, so that nothing jumps twice; empty otherwise
     */
    OutputColumn(Zoom zoom, Map<String, Double> expected) {
        this.zoom = zoom;
        this.expected = expected;
    }

    /** @param working true while this step is being worked out */
    List<Node> of(Step step, boolean working) {
        List<Node> nodes = new ArrayList<>();
        if (working) {
            nodes.add(pill("working out …", "pill-working"));
        } else if (step.stale()) {
            nodes.add(pill(step.outcome() == null ? "not worked yet" : "stale", "pill-stale"));
        } else if (step.isRecorded()) {
            nodes.add(pill("on record", "pill-recorded"));
        }
        step.outputs().forEach(output -> add(nodes, step, output));
        if (step.outcome() != null && step.outcome().state() == CellOutcome.State.STOPPED) {
            nodes.add(line("stopped before its end", "problem"));
        }
        step.cell().records().stream().filter(r -> step.isRecorded() && !r.isReadable())
                .forEach(r -> nodes.add(line("a record line cannot be read: " + r.trouble(), "problem")));
        return nodes;
    }

    private void add(List<Node> nodes, Step step, Output output) {
        if (output instanceof Output.Result result) {
            nodes.add(result(result));
        } else if (output instanceof Output.Check check) {
            nodes.add(check(check));
        } else if (output instanceof Output.Assessment assessment) {
            nodes.add(assessment(assessment));
        } else if (output instanceof Output.Caution caution) {
            nodes.add(caution(caution.text()));
        } else if (output instanceof Output.Assumption assumption) {
            nodes.add(line("taken: " + assumption.text(), "assumption"));
        } else if (output instanceof Output.Problem problem) {
            int line = step.lineWithin(problem.line());
            nodes.add(line((line > 0 ? "line " + line + ": " : "") + problem.message(), "problem"));
        }
        // Given, typeset lines, plots, tables, notes and printed text stand under Calculation.
    }

    private Node result(Output.Result result) {
        VBox box = new VBox();
        box.getStyleClass().add("result");
        Value value = provisional(result);
        List<Reading> readings = Reading.of(value);
        String latex = result.latexName().isEmpty() ? Notation.name(result.name()) : result.latexName();
        boolean pending = value != result.value();
        if (readings.size() == 1) {
            box.getChildren().add(equation(latex, result.name(), readings.get(0)));
            addDoubt(box, readings.get(0).doubt(), pending);
        } else {
            TextFlow name = new TextFlow(Typesetting.symbol(latex, result.name(), zoom));
            name.getStyleClass().add("letters");
            box.getChildren().add(name);
            readings.forEach(reading -> box.getChildren().add(component(reading)));
            String doubt = Reading.widestDoubt(value);
            addDoubt(box, doubt.isEmpty() ? "" : "each part " + doubt, pending);
        }
        readings.stream().map(OutputColumn::reservation).filter(why -> !why.isEmpty()).distinct()
                .forEach(why -> box.getChildren().add(line(why, "unreliable")));
        return box;
    }

    /** The value with the tolerance it had last, while the new one is being worked; the value itself otherwise. */
    private Value provisional(Output.Result result) {
        Double last = expected.get(result.name());
        if (last == null) {
            return result.value();
        }
        if (result.value() instanceof Value.Scalar s && s.tolerance() == null) {
            return s.withTolerance(last);
        }
        if (result.value() instanceof Value.Triple t && t.x().tolerance() == null) {
            return new Value.Triple(t.x().withTolerance(last), t.y().withTolerance(last), t.z().withTolerance(last), t.place());
        }
        return result.value();
    }

    private static Node component(Reading reading) {
        TextFlow flow = new TextFlow(text(reading.part() + "  ", "soft"), text(reading.figure(), figureStyle(reading.status())));
        flow.getStyleClass().addAll("letters", "component");
        return flow;
    }

    private static void addDoubt(VBox box, String doubt, boolean pending) {
        if (!doubt.isEmpty()) {
            box.getChildren().add(line(pending ? doubt.replaceFirst("± .*? \\(k", "± … (k") : doubt, "doubt"));
        }
    }

    /** Why a number is not to be relied on; empty when it is. */
    private static String reservation(Reading reading) {
        return switch (reading.status()) {
            case CONVERGED -> "";
            case UNBOUNDED -> reading.reason();
            case NOT_CONVERGED -> "did not converge" + (reading.reason().isEmpty() ? "" : ": " + reading.reason());
        };
    }

    private TextFlow equation(String latex, String name, Reading reading) {
        TextFlow flow = new TextFlow(Typesetting.symbol(latex, name, zoom), text("= ", "figure"),
                text(reading.figure(), figureStyle(reading.status())));
        flow.getStyleClass().add("letters");
        return flow;
    }

    private static String figureStyle(Status status) {
        return status == Status.CONVERGED ? "figure" : "figure-doubtful";
    }

    private static Node check(Output.Check check) {
        VBox box = new VBox(verdict(check.passed(), check.label()));
        box.getStyleClass().add("check");
        if (!check.detail().isEmpty()) {
            box.getChildren().add(line(check.detail(), check.passed() ? "doubt" : "unreliable"));
        }
        return box;
    }

    private Node assessment(Output.Assessment a) {
        VBox box = new VBox();
        box.getStyleClass().add("assessment");
        box.getChildren().add(verdict(a.passed(), a.label()));
        box.getChildren().add(line(assessmentText(a, !expected.isEmpty()), "judged"));
        if (a.status() != Status.CONVERGED) {
            Value.Scalar doubtful = a.worstCase() != null && a.value().status() == Status.CONVERGED ? a.worstCase() : a.value();
            box.getChildren().add(line(doubtful.status() == Status.UNBOUNDED ? "unbounded: " + doubtful.reason()
                    : "did not converge: " + doubtful.reason(), "unreliable"));
        }
        box.getChildren().add(caution(a.caution()));
        return box;
    }

    /** {@code worst case 350 kV/m of 3 MV/m: margin 8.6 ≥ 3}. */
    static String assessmentText(Output.Assessment a, boolean pending) {
        Value.Scalar judged = a.worstCase() == null ? a.value() : a.worstCase();
        String what = a.worstCase() == null ? "value " : "worst case ";
        String of = what + Reading.worst(judged) + " against " + brief(a.threshold());
        if (Double.isNaN(a.marginFound())) {
            return of + ": no margin can be given, " + Figures.brief(a.marginAsked(), 3) + " asked";
        }
        return of + ": margin " + Figures.significant(a.marginFound(), 2) + (a.passed() ? " ≥ " : ", asked ") + Figures.brief(a.marginAsked(), 3)
                + (a.worstCase() != null ? "" : pending ? " (worst case being worked)" : " (worst case of the inputs not established)");
    }

    private static String brief(Value.Scalar threshold) {
        return Reading.of(new Value.Scalar(threshold.value(), 0.0, null, threshold.unit(), threshold.shown(), threshold.status(),
                threshold.reason())).figure();
    }

    static Node verdict(boolean passed, String text) {
        TextFlow flow = new TextFlow(text(passed ? "✓ " : "✕ ", passed ? "mark-holds" : "mark-fails"), text(text, passed ? "holds" : "fails"));
        flow.getStyleClass().addAll("letters", "verdict");
        flow.setAccessibleText((passed ? "holds: " : "fails: ") + text);
        return flow;
    }

    private static Node caution(String text) {
        return line(text, "caution");
    }

    static Label line(String text, String style) {
        // An error's text is left as it is: its remedy may be meant for copying.
        Label label = new Label(style.equals("problem") ? text : Figures.prose(text));
        label.setWrapText(true);
        label.setMinHeight(Region.USE_PREF_SIZE);
        label.setMaxWidth(Double.MAX_VALUE);
        label.getStyleClass().add(style);
        return label;
    }

    static Label pill(String text, String style) {
        Label label = new Label(text);
        label.getStyleClass().addAll("pill", style);
        return label;
    }

    static Text text(String letters, String style) {
        Text text = new Text(letters);
        text.getStyleClass().add(style);
        return text;
    }
}

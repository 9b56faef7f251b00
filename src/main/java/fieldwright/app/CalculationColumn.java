package fieldwright.app;

import fieldwright.draw.Curves;
import fieldwright.draw.Figures;
import fieldwright.draw.Scale;
import fieldwright.output.Output;
import fieldwright.sheet.Cell;
import fieldwright.sheet.CorrelationEntry;
import fieldwright.sheet.DeriveEntry;
import fieldwright.sheet.DeriveLine;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.InputLine;
import fieldwright.sheet.MalformedLine;
import java.util.ArrayList;
import java.util.List;
import java.util.function.IntConsumer;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import javafx.geometry.Insets;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import javafx.scene.text.Text;
import javafx.scene.text.TextFlow;

/** Makes what stands under Calculation: the step's text as it is read, and the pictures and tables it gave. */
final class CalculationColumn {
    private final Zoom zoom;

    CalculationColumn(Zoom zoom) {
        this.zoom = zoom;
    }

    /**
     * The text of a step as it is read.
     *
     * @param worked  lines of a derive step as the last run set them
     * @param folded  true when Java text is folded away
     * @param note    a note's CommonMark with its live results filled in
     * @param clicked told at which letter the reader clicked, −1 where no letter can be told
     */
    List<Node> text(Cell cell, String note, List<Output.Typeset> worked, boolean folded, IntConsumer clicked) {
        List<Node> nodes = new ArrayList<>();
        switch (cell.kind()) {
            case NOTE -> nodes.add(note.isBlank() ? hint("empty note") : NoteText.of(note));
            case INPUT -> nodes.add(inputs(cell.inputs()));
            case DERIVE -> derives(nodes, cell.derives(), worked);
            case WORKING -> {
                if (folded) {
                    long lines = cell.source().lines().count();
                    nodes.add(hint("working folded, " + lines + (lines == 1 ? " line" : " lines")));
                } else {
                    nodes.add(cell.source().isBlank() ? hint("empty working") : new CodeText(cell.source(), clicked));
                }
            }
        }
        return nodes;
    }

    static Label hint(String text) {
        return OutputColumn.line(text, "hint");
    }

    private Node inputs(List<InputLine> lines) {
        if (lines.isEmpty()) {
            return hint("no inputs yet: name = value unit ± tolerance | description | source");
        }
        InputTable table = new InputTable(zoom);
        lines.forEach(line -> input(table, line));
        return table;
    }

    private void input(InputTable table, InputLine line) {
        if (line instanceof InputEntry entry) {
            table.add(Typesetting.symbol(Notation.name(entry.name()), entry.name(), zoom),
                    cell(printed(entry.definition()), "input-value"), cell(entry.description(), "input-description"));
        } else if (line instanceof CorrelationEntry c) {
            Node names = Typesetting.symbol("r(" + Notation.name(c.first()) + ",\\," + Notation.name(c.second()) + ")",
                    "correlation of " + c.first() + " and " + c.second(), zoom);
            table.add(names, cell(c.coefficient(), "input-value"), cell("correlation", "input-description"));
        } else if (line instanceof MalformedLine bad) {
            table.addAcross(OutputColumn.line(bad.message(), "problem"));
        }
    }

    private static Label cell(String text, String style) {
        Label label = new Label(text);
        label.setWrapText(true);
        label.getStyleClass().add(style);
        return label;
    }

    private static final Pattern TOLERANCE = Pattern.compile("(?:±|\\+/-|\\+-)\\s*([\\d.eE+-]+)\\s*([^(]*?)\\s*(\\(.*\\))?");

    /** A definition with its units in print: {@code 2.1 uC/m^3 ± 25 %} as 2.1 µC/m³ ± 25 %. */
    static String printed(String definition) {
        return InputValue.of(definition).map(v -> {
            String head = Figures.withUnit(Figures.written(v.number()), printedUnit(v.unit()));
            return v.tolerance().isEmpty() ? head : head + " " + printedTolerance(v.tolerance());
        }).orElse(definition);
    }

    static String printedUnit(String unit) {
        return Scale.print(unit.startsWith("(") && unit.endsWith(")") ? unit.substring(1, unit.length() - 1) : unit);
    }

    static String printedTolerance(String tolerance) {
        Matcher m = TOLERANCE.matcher(tolerance);
        if (!m.matches()) {
            return tolerance;
        }
        String width = Figures.withUnit(Figures.written(m.group(1)), printedUnit(m.group(2)));
        return "±\u00a0" + width + (m.group(3) == null ? "" : " " + m.group(3));
    }

    private void derives(List<Node> nodes, List<DeriveLine> lines, List<Output.Typeset> worked) {
        if (lines.isEmpty()) {
            nodes.add(hint("no formulas yet: name = formula | description"));
        }
        for (DeriveLine line : lines) {
            if (line instanceof DeriveEntry entry) {
                nodes.add(derived(entry, worked));
            } else if (line instanceof MalformedLine bad) {
                nodes.add(OutputColumn.line(bad.message(), "problem"));
            }
        }
    }

    private Node derived(DeriveEntry entry, List<Output.Typeset> worked) {
        String words = Notation.words(entry);
        VBox box = derived(Notation.line(entry), words, remark(words, worked, entry.description()));
        for (DeriveEntry.Continuation next : entry.continuations()) {
            String nextWords = Notation.words(next);
            VBox line = derived(Notation.line(next), nextWords, remark(nextWords, worked, next.description()));
            VBox.setMargin(line, new Insets(0, 0, 0, zoom.em(1.5)));
            box.getChildren().add(line);
        }
        return box;
    }

    /** What the run says of a line, such as that it was not checked; before a run what its author says of it. */
    private static String remark(String words, List<Output.Typeset> worked, String description) {
        return worked.stream().filter(line -> line.plainText().equals(words)).map(Output.Typeset::description).findFirst().orElse(description);
    }

    private VBox derived(String latex, String words, String description) {
        VBox box = new VBox(Typesetting.formula(latex, words, zoom));
        box.getStyleClass().add("derived");
        if (!description.isEmpty()) {
            box.getChildren().add(OutputColumn.line(description, "description"));
        }
        return box;
    }

    /** What a run put under Calculation. Lines that a derive step's own text already shows are not shown twice. */
    static List<Output> pictured(Step step) {
        return step.outputs().stream().filter(output -> output instanceof Output.Typeset && step.cell().kind() != Cell.Kind.DERIVE
                || output instanceof Output.Plot || output instanceof Output.Table
                || output instanceof Output.Printed printed && !printed.text().isBlank()).toList();
    }

    /** The pictures and tables of a step. */
    List<Node> shown(Step step) {
        return pictured(step).stream().map(output -> output instanceof Output.Typeset line
                ? derived(line.latex(), line.plainText(), line.description())
                : output instanceof Output.Plot plot ? plot(plot)
                : output instanceof Output.Table table ? table(table)
                : printed((Output.Printed) output)).toList();
    }

    private Node plot(Output.Plot plot) {
        VBox box = new VBox(Typesetting.plot(plot, zoom));
        box.getStyleClass().add("plot-box");
        new Curves(plot, 400, 200).remarks().forEach(remark -> box.getChildren().add(OutputColumn.line(remark, "remark")));
        return box;
    }

    private Node table(Output.Table table) {
        VBox box = new VBox();
        box.getStyleClass().add("table-box");
        if (!table.title().isEmpty()) {
            box.getChildren().add(OutputColumn.line(table.title(), "table-title"));
        }
        GridPane grid = new GridPane();
        grid.getStyleClass().add("table");
        for (int c = 0; c < table.headings().size(); c++) {
            grid.add(tableCell(Figures.letters(table.headings().get(c)), "table-heading"), c, 0);
        }
        for (int r = 0; r < table.rows().size(); r++) {
            for (int c = 0; c < table.headings().size(); c++) {
                grid.add(tableCell(table.rows().get(r).get(c), "table-cell"), c, r + 1);
            }
        }
        ScrollPane wide = new ScrollPane(grid);
        wide.getStyleClass().add("wide-table");
        wide.setVbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        wide.setFocusTraversable(false);
        wide.setMinHeight(Region.USE_PREF_SIZE);
        box.getChildren().add(wide);
        table.remarks().forEach(remark -> box.getChildren().add(OutputColumn.line(remark, "remark")));
        return box;
    }

    private static Label tableCell(String text, String style) {
        Label label = new Label(Figures.prose(text).replaceAll("(?<![\\w)])-(?=\\d)", "−"));
        label.setMaxWidth(Double.MAX_VALUE);
        label.getStyleClass().add(style);
        return label;
    }

    /** Long prints are cut on the page: thousands of lines would hide the rest and slow every move. */
    private static final int PRINTED_LINES = 60;

    private static Node printed(Output.Printed printed) {
        List<String> lines = printed.text().stripTrailing().lines().toList();
        String shown = String.join("\n", lines.subList(0, Math.min(PRINTED_LINES, lines.size())));
        Text text = OutputColumn.text(lines.size() > PRINTED_LINES ? shown + "\n… " + (lines.size() - PRINTED_LINES) + " more lines" : shown,
                "code-letters");
        TextFlow flow = new TextFlow(text);
        flow.getStyleClass().addAll("letters", "printed");
        return flow;
    }
}

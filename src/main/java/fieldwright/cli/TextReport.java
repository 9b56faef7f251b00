package fieldwright.cli;

import fieldwright.draw.Figures;
import fieldwright.draw.Reading;
import fieldwright.output.CellOutcome;
import fieldwright.output.NumberText;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.RunOutcome;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.sheet.Cell;
import fieldwright.sheet.Header;
import fieldwright.sheet.Sheet;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** A run as a calculation sheet for a terminal: step by step, each with what it gave. */
final class TextReport {
    private static final String INDENT = "  ";
    private static final String GAP = "   ";

    private final List<String> lines = new ArrayList<>();

    private TextReport() { }

    /** The whole report, lines ended by {@code \n}. */
    static String of(Sheet sheet, RunOutcome run) {
        TextReport report = new TextReport();
        report.title(sheet.header());
        for (CellOutcome outcome : run.cells()) {
            report.cell(sheet.cells().get(outcome.cell() - 1), outcome);
        }
        report.lines.add("");
        run.sheetProblems().forEach(problem -> report.lines.add("✕ " + problem.text()));
        report.lines.add(summary(run));
        return String.join("\n", report.lines) + "\n";
    }

    private void title(Header header) {
        if (!header.get("title").isEmpty()) {
            lines.add(header.get("title"));
        }
        String below = Stream.of(header.get("project"), header.get("number"), named("revision", header), named("made", header),
                named("checked", header), named("approved", header)).filter(text -> !text.isEmpty()).collect(Collectors.joining(", "));
        if (!below.isEmpty()) {
            lines.add(below);
        }
    }

    private static String named(String field, Header header) {
        return header.get(field).isEmpty() ? "" : field + " " + header.get(field);
    }

    private void cell(Cell cell, CellOutcome outcome) {
        lines.add("");
        lines.add(outcome.cell() + " " + cell.kind().word() + (cell.label().isEmpty() ? "" : ": " + cell.label()));
        Inputs inputs = Inputs.of(outcome.all(Output.Given.class));
        outcome.outputs().forEach(output -> show(output, inputs));
        switch (outcome.state()) {
            case STOPPED -> lines.add(INDENT + "✕ stopped");
            case NOT_REACHED -> lines.add(INDENT + "not reached");
            default -> { }
        }
    }

    /** Widths of the columns of an input cell. */
    private record Inputs(int name, int written, int description) {

        static Inputs of(List<Output.Given> inputs) {
            return new Inputs(widest(inputs.stream().map(Output.Given::name)), widest(inputs.stream().map(Output.Given::written)),
                    widest(inputs.stream().map(Output.Given::description)));
        }

        String line(Output.Given given) {
            return padded(given.name(), name) + " = " + padded(given.written(), written) + GAP
                    + (description == 0 ? "" : padded(given.description(), description) + GAP)
                    + (given.source().isEmpty() ? "no source" : given.source());
        }
    }

    private static int widest(Stream<String> texts) {
        return texts.mapToInt(String::length).max().orElse(0);
    }

    private static String padded(String text, int width) {
        return text + " ".repeat(width - text.length());
    }

    private void show(Output output, Inputs inputs) {
        if (output instanceof Output.Result result) {
            result(result);
        } else if (output instanceof Output.Given given) {
            add(inputs.line(given));
        } else if (output instanceof Output.Typeset typeset) {
            add(typeset.plainText());
        } else if (output instanceof Output.Check check) {
            add(mark(check.passed()) + check.label() + ": " + found(check));
        } else if (output instanceof Output.Assessment assessment) {
            assessment(assessment);
        } else if (output instanceof Output.Caution caution) {
            add("! " + caution.text() + (caution.source().isEmpty() ? "" : " (" + caution.source() + ")"));
        } else if (output instanceof Output.Assumption assumption) {
            add("assumed: " + assumption.text());
        } else if (output instanceof Output.Problem problem) {
            add("✕ " + problem.text());
        } else if (output instanceof Output.Plot plot) {
            plot(plot);
        } else if (output instanceof Output.Table table) {
            table(table);
        } else if (output instanceof Output.Printed printed) {
            add(printed.text());
        } else if (output instanceof Output.Note note) {
            add(note.commonmark());
        } else {
            throw new IllegalArgumentException(output.getClass() + " has no form in a terminal");
        }
    }

    // ---- results

    private void result(Output.Result result) {
        List<Reading> readings = Reading.of(result.value());
        String remark = behind(result.description()) + behind(result.source());
        if (readings.size() == 1) {
            add(result.name() + " = " + reading(readings.get(0)) + remark);
            return;
        }
        add(result.name() + place(result.value()) + remark);
        int width = widest(readings.stream().map(Reading::part));
        readings.forEach(part -> add(INDENT + plain(padded(part.part(), width)) + " = " + reading(part)));
    }

    private static String place(Value value) {
        Point place = value instanceof Value.Triple triple ? triple.place() : value instanceof Value.Sides sides ? sides.plus().place() : null;
        return place == null ? "" : " at (" + NumberText.rounded(place.x(), 6) + ", " + NumberText.rounded(place.y(), 6) + ", "
                + NumberText.rounded(place.z(), 6) + ") m";
    }

    private static String reading(Reading reading) {
        String trouble = switch (reading.status()) {
            case CONVERGED -> "";
            case NOT_CONVERGED -> GAP + "did not converge" + because(reading.reason());
            case UNBOUNDED -> because(reading.reason());
        };
        String doubt = reading.doubt().isEmpty() ? "" : GAP + plain(reading.doubt()).replace(" · ", GAP);
        return plain(reading.figure()) + trouble + doubt;
    }

    private static String because(String reason) {
        return reason.isEmpty() ? "" : ": " + reason;
    }

    // ---- judgements

    private static String found(Output.Check check) {
        return check.detail().isEmpty()
                ? "found " + number(check.measured()) + unit(check) + ", allowed " + number(check.allowed()) + unit(check)
                : check.detail();
    }

    private static String unit(Output.Check check) {
        return check.unit().isEmpty() ? "" : " " + check.unit();
    }

    private void assessment(Output.Assessment assessment) {
        add(mark(assessment.passed()) + assessment.label() + ": " + figure(assessment.value())
                + (assessment.worstCase() == null ? "" : ", worst case " + figure(assessment.worstCase()))
                + ", threshold " + figure(assessment.threshold())
                + ", margin " + number(assessment.marginFound()) + ", asked " + number(assessment.marginAsked()));
        add(INDENT + "threshold from: " + assessment.source());
        add(INDENT + "! " + assessment.caution());
    }

    private static String figure(Value.Scalar value) {
        Reading reading = Reading.of(value);
        boolean doubtful = reading.status() == Status.NOT_CONVERGED;
        return plain(reading.figure()) + (doubtful ? " (did not converge" + because(reading.reason()) + ")" : "");
    }

    private static String mark(boolean passed) {
        return passed ? "✓ " : "✕ ";
    }

    private static String number(double value) {
        return Double.isFinite(value) ? plain(Figures.brief(value, 3)) : "without number";
    }

    // ---- charts and tables

    private void plot(Output.Plot plot) {
        String series = plot.series().stream().map(each -> each.label() + " (" + each.size() + " points)").collect(Collectors.joining(", "));
        add("chart" + (plot.title().isEmpty() ? "" : " '" + plot.title() + "'") + ": " + plot.y().heading() + " over " + plot.x().heading()
                + ": " + series);
        plot.remarks().forEach(remark -> add(INDENT + remark));
    }

    private void table(Output.Table table) {
        if (!table.title().isEmpty()) {
            add(table.title());
        }
        List<List<String>> rows = new ArrayList<>();
        rows.add(table.headings());
        rows.addAll(table.rows());
        int[] widths = new int[table.headings().size()];
        for (List<String> row : rows) {
            for (int column = 0; column < widths.length; column++) {
                widths[column] = Math.max(widths[column], row.get(column).length());
            }
        }
        for (List<String> row : rows) {
            StringBuilder line = new StringBuilder();
            for (int column = 0; column < widths.length; column++) {
                line.append(column == 0 ? INDENT : GAP).append(" ".repeat(widths[column] - row.get(column).length()))
                        .append(row.get(column));
            }
            add(line.toString());
        }
        table.remarks().forEach(remark -> add(INDENT + remark));
    }

    // ---- the end

    private static String summary(RunOutcome run) {
        List<String> bad = new ArrayList<>();
        count(bad, run.problems().size(), "error", "errors");
        count(bad, run.all(Output.Result.class).stream().filter(result -> result.value().status() == Status.NOT_CONVERGED).count(),
                "result did not converge", "results did not converge");
        count(bad, run.all(Output.Check.class).stream().filter(check -> !check.passed()).count(), "check failed", "checks failed");
        count(bad, run.all(Output.Assessment.class).stream().filter(assessment -> !assessment.passed()).count(),
                "assessment failed", "assessments failed");
        if (bad.isEmpty() && run.exitCode() != RunOutcome.ALL_WELL) {
            bad.add("not worked to the end");
        }
        List<String> all = new ArrayList<>();
        count(all, run.all(Output.Result.class).size(), "result", "results");
        count(all, run.all(Output.Check.class).size(), "check", "checks");
        count(all, run.all(Output.Assessment.class).size(), "assessment", "assessments");
        String counted = all.isEmpty() ? "" : " (" + String.join(", ", all) + ")";
        return (bad.isEmpty() ? "✓ all well" : "✕ " + String.join(", ", bad)) + counted;
    }

    private static void count(List<String> texts, long count, String one, String many) {
        if (count > 0) {
            texts.add(count + " " + (count == 1 ? one : many));
        }
    }

    // ---- text

    private void add(String text) {
        text.lines().forEach(line -> lines.add((INDENT + line).stripTrailing()));
    }

    private static String behind(String text) {
        return text.isEmpty() ? "" : GAP + text;
    }

    /** Numbers as a terminal's reader copies them: {@code 3e-20}, plain minus signs, plain spaces. */
    private static String plain(String figure) {
        return Ascii.powersOfTen(figure).replace('−', '-').replace('\u00a0', ' ');
    }
}

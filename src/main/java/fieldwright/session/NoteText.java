package fieldwright.session;

import fieldwright.formula.Binding;
import fieldwright.formula.Names;
import fieldwright.output.CellOutcome;
import fieldwright.output.NumberText;
import fieldwright.output.Output;
import fieldwright.output.Status;
import fieldwright.output.Value;
import fieldwright.quantity.UnknownNameException;
import fieldwright.sheet.Cell;
import fieldwright.words.Outputs;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** A note with the results it quotes, {@code {E_roof}}, filled in. A brace that quotes nothing is written {@code \{}. */
final class NoteText {
    private static final Pattern QUOTE = Pattern.compile("(\\\\?)\\{([\\p{L}_][\\p{L}\\p{N}_]*)\\}");
    private static final int DIGITS = 4;

    private final Cell cell;
    private final int number;
    private final Map<String, Output.Result> results;
    private final NameTable names;
    private final List<Output> problems = new ArrayList<>();
    private final Set<String> quoted = new TreeSet<>();

    NoteText(Cell cell, int number, Map<String, Output.Result> results, NameTable names) {
        this.cell = cell;
        this.number = number;
        this.results = results;
        this.names = names;
    }

    CellOutcome outcome() {
        String source = cell.source();
        Matcher quote = QUOTE.matcher(source);
        StringBuilder text = new StringBuilder();
        while (quote.find()) {
            String shown = quote.group(1).isEmpty() ? quoted(Names.fold(quote.group(2)), quote.start()) : quote.group().substring(1);
            quote.appendReplacement(text, Matcher.quoteReplacement(shown));
        }
        quote.appendTail(text);
        List<Output> outputs = new ArrayList<>();
        outputs.add(new Output.Note(text.toString()));
        outputs.addAll(problems);
        return new CellOutcome(number, problems.isEmpty() ? CellOutcome.State.WORKED : CellOutcome.State.FAILED, outputs, quoted);
    }

    private String quoted(String name, int offset) {
        Output.Result result = results.get(name);
        if (result != null) {
            quoted.add(name);
            return text(result.value());
        }
        SheetName other = names.get(name);
        if (other != null && other.isFailed()) {
            return "(" + name + ": no value)";
        }
        if (other != null && other.binding() instanceof Binding.Value input) {
            quoted.add(name);
            return text(Outputs.value(input.amount()));
        }
        int line = 1 + (int) cell.source().substring(0, offset).chars().filter(c -> c == '\n').count();
        String nearest = UnknownNameException.nearest(name, results.keySet());
        problems.add(new Output.Problem(cell.lineOf(line), number, "the note quotes {" + name + "}, but there is no such result."
                + (nearest == null ? "" : " Closest: '" + nearest + "'.") + " A brace that quotes nothing is written \\{."));
        return "{" + name + "}";
    }

    private static String text(Value value) {
        if (value instanceof Value.Scalar scalar) {
            return scalar.status() == Status.CONVERGED ? number(scalar) + unit(scalar) : "(" + status(scalar) + ")";
        }
        if (value instanceof Value.Triple triple) {
            boolean converged = triple.status() == Status.CONVERGED;
            return converged ? "(" + number(triple.x()) + ", " + number(triple.y()) + ", " + number(triple.z()) + ")" + unit(triple.x())
                    : "(" + status(triple) + ")";
        }
        Value.Sides sides = (Value.Sides) value;
        return sides.plusSide() + ": " + text(sides.plus()) + "; " + sides.minusSide() + ": " + text(sides.minus());
    }

    private static String status(Value value) {
        return value.status() == Status.UNBOUNDED ? "unbounded" : "did not converge";
    }

    private static String number(Value.Scalar scalar) {
        return NumberText.rounded(scalar.value() / scalar.shown().factor(), DIGITS);
    }

    private static String unit(Value.Scalar scalar) {
        return scalar.shown().unit().isEmpty() ? "" : " " + scalar.shown().unit();
    }
}

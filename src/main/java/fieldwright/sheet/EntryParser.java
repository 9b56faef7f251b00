package fieldwright.sheet;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Splits the lines of input and derive cells. What the pieces mean is not known here. */
final class EntryParser {
    private static final Pattern CORRELATION = Pattern.compile("corr\\s*\\(([^,()]*),([^,()]*)\\)");
    private static final Pattern SIGNATURE = Pattern.compile("([^\\s()\\[\\]{}<>!,:]+)\\s*(?:\\((.*)\\))?");
    private static final Pattern NAME = Pattern.compile("[^\\s()\\[\\]{}<>!,:]+");

    private EntryParser() { }

    static List<InputLine> inputs(Cell cell) {
        List<InputLine> entries = new ArrayList<>();
        List<Line> lines = Line.split(cell.source());
        for (int i = 0; i < lines.size(); i++) {
            if (!lines.get(i).isBlank()) {
                entries.add(input(lines.get(i).text(), cell.lineOf(i + 1)));
            }
        }
        return List.copyOf(entries);
    }

    private static InputLine input(String text, int line) {
        int equals = text.indexOf('=');
        String name = equals < 0 ? "" : text.substring(0, equals).strip();
        Pieces pieces = new Pieces(text, equals + 1);
        Matcher correlation = CORRELATION.matcher(name);
        if (equals < 0) {
            return malformed(line, text, "has no '='. Write 'name = value unit ± tolerance | description | source'.");
        }
        if (correlation.matches()) {
            return new CorrelationEntry(correlation.group(1).strip(), correlation.group(2).strip(), pieces.body, line, pieces.column);
        }
        if (!NAME.matcher(name).matches()) {
            return malformed(line, text, "has no name before '='. Write 'name = value unit ± tolerance | description | source', "
                    + "the name without blanks.");
        }
        if (pieces.body.isEmpty()) {
            return malformed(line, text, "gives '" + name + "' no value. Write 'name = value unit ± tolerance | description | source'.");
        }
        return new InputEntry(name, pieces.body, pieces.description, pieces.source, line, pieces.column);
    }

    static List<DeriveLine> derives(Cell cell) {
        List<DeriveLine> entries = new ArrayList<>();
        List<Line> lines = Line.split(cell.source());
        for (int i = 0; i < lines.size(); i++) {
            String text = lines.get(i).text();
            String start = text.strip();
            if (start.startsWith("=") || start.startsWith("~")) {
                goOn(entries, text, cell.lineOf(i + 1));
            } else if (!start.isEmpty()) {
                entries.add(derive(text, cell.lineOf(i + 1)));
            }
        }
        return List.copyOf(entries);
    }

    private static DeriveLine derive(String text, int line) {
        int equals = firstEquals(text);
        if (equals < 0) {
            return malformed(line, text, "has no '='. Write 'name = formula | description | source'. "
                    + "A line that goes on begins with '=' or '~'.");
        }
        String left = text.substring(0, equals).strip();
        Matcher signature = SIGNATURE.matcher(left);
        if (!signature.matches()) {
            return malformed(line, text, "has '" + left + "' before '='. Write a name without blanks, or 'name(argument: unit, …)'.");
        }
        int leftStart = text.indexOf(left);
        List<DeriveEntry.Parameter> parameters = new ArrayList<>();
        if (signature.group(2) != null) {
            for (int[] range : Scan.split(left, signature.start(2), signature.end(2), ',')) {
                DeriveEntry.Parameter parameter = parameter(left.substring(range[0], range[1]), leftStart + range[0]);
                if (!NAME.matcher(parameter.name()).matches()) {
                    return malformed(line, text, "has the argument '" + parameter.name() + "'. Write 'name(argument: unit, …)'.");
                }
                parameters.add(parameter);
            }
        }
        Pieces pieces = new Pieces(text, equals + 1);
        Conditioned formula = new Conditioned(pieces.body);
        if (formula.formula.isEmpty()) {
            return malformed(line, text, "gives '" + signature.group(1) + "' no formula. Write 'name = formula | description | source'.");
        }
        return new DeriveEntry(signature.group(1), parameters, formula.formula, formula.unit, formula.condition, pieces.description,
                pieces.source, List.of(), line, pieces.column);
    }

    private static DeriveEntry.Parameter parameter(String text, int start) {
        int colon = text.indexOf(':');
        String name = (colon < 0 ? text : text.substring(0, colon)).strip();
        String unit = colon < 0 ? "" : text.substring(colon + 1).strip();
        return new DeriveEntry.Parameter(name, unit, start + text.indexOf(name) + 1);
    }

    /** Adds a line that begins with {@code =} or {@code ~} to the entry above it. */
    private static void goOn(List<DeriveLine> entries, String text, int line) {
        int mark = text.indexOf(text.strip());
        Pieces pieces = new Pieces(text, mark + 1);
        Conditioned formula = new Conditioned(pieces.body);
        if (formula.formula.isEmpty()) {
            entries.add(malformed(line, text, "has no formula behind '" + text.charAt(mark) + "'."));
        } else if (entries.isEmpty()) {
            entries.add(malformed(line, text, "goes on with nothing: no formula stands above it in this cell."));
        } else if (entries.get(entries.size() - 1) instanceof DeriveEntry above) {
            List<DeriveEntry.Continuation> all = new ArrayList<>(above.continuations());
            all.add(new DeriveEntry.Continuation(
                    text.charAt(mark) == '=' ? DeriveEntry.Relation.EQUAL : DeriveEntry.Relation.LIMIT, formula.formula, formula.unit,
                    formula.condition, pieces.description, pieces.source, line, pieces.column));
            entries.set(entries.size() - 1, new DeriveEntry(above.name(), above.parameters(), above.formula(), above.unit(),
                    above.condition(), above.description(), above.source(), all, above.line(), above.column()));
        }
        // Below a malformed line there is nothing to add to; that line's message is enough.
    }

    /** The first {@code =} that is not part of a comparison. */
    private static int firstEquals(String text) {
        for (int i = text.indexOf('='); i >= 0; i = text.indexOf('=', i + 1)) {
            boolean after = i > 0 && "<>=!".indexOf(text.charAt(i - 1)) >= 0;
            boolean before = i + 1 < text.length() && text.charAt(i + 1) == '=';
            if (!after && !before) {
                return i;
            }
        }
        return -1;
    }

    private static MalformedLine malformed(int line, String text, String what) {
        return new MalformedLine(line, text.indexOf(text.strip()) + 1, "line '" + text.strip() + "' " + what);
    }

    /** {@code body | description | source}, and where the body begins. */
    private static final class Pieces {
        final String body;
        final String description;
        final String source;
        final int column;

        Pieces(String text, int from) {
            int bar = Scan.find(text, from, text.length(), '|');
            int end = bar < 0 ? text.length() : bar;
            int second = bar < 0 ? -1 : text.indexOf('|', bar + 1);
            body = text.substring(Math.min(from, end), end).strip();
            description = bar < 0 ? "" : text.substring(bar + 1, second < 0 ? text.length() : second).strip();
            source = second < 0 ? "" : text.substring(second + 1).strip();
            int start = from;
            while (start < end && Character.isWhitespace(text.charAt(start))) {
                start++;
            }
            column = start + 1;
        }
    }

    /** {@code formula [in unit] [for condition]}, the words outside all brackets. */
    private static final class Conditioned {
        final String formula;
        final String unit;
        final String condition;

        Conditioned(String body) {
            int[] condition = Scan.words(body, "for").stream().findFirst().orElse(null);
            String front = condition == null ? body : body.substring(0, condition[0]).strip();
            String back = condition == null ? "" : body.substring(condition[1]).strip();
            int[] unitInFront = last(Scan.words(front, "in"));
            int[] unitInBack = last(Scan.words(back, "in"));
            this.formula = unitInFront == null ? front : front.substring(0, unitInFront[0]).strip();
            this.condition = unitInFront != null || unitInBack == null ? back : back.substring(0, unitInBack[0]).strip();
            this.unit = unitInFront != null ? front.substring(unitInFront[1]).strip()
                    : unitInBack != null ? back.substring(unitInBack[1]).strip() : "";
        }

        private static int[] last(List<int[]> ranges) {
            return ranges.isEmpty() ? null : ranges.get(ranges.size() - 1);
        }
    }
}

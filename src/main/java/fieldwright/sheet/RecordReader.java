package fieldwright.sheet;

import fieldwright.output.Display;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.Status;
import fieldwright.output.Value;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Reads record lines; the forms stand at {@link RecordLine}. */
final class RecordReader {
    private static final Pattern NUMBER = Pattern.compile("[-+]?(\\d+(\\.\\d*)?|\\.\\d+)([eE][-+]?\\d+)?");
    private static final Pattern NAME = Pattern.compile(RecordWriter.NAME);
    private static final Pattern UNIT = Pattern.compile(RecordWriter.UNIT);
    private static final Pattern SIDE = Pattern.compile(RecordWriter.SIDE);

    /** The line is not of a known form; it is kept as text. */
    static final class Unreadable extends Exception {
        Unreadable(String message) {
            super(message);
        }
    }

    private interface Part<T> {
        T read() throws Unreadable;
    }

    private final String text;
    private int at;

    private RecordReader(String text) {
        this.text = text;
        this.at = ":rec".length();
    }

    static Output read(String text) throws Unreadable {
        RecordReader reader = new RecordReader(text);
        Output output = reader.output();
        if (!reader.atEnd()) {
            throw reader.expected("the end of the line or a known field");
        }
        return output;
    }

    private Output output() throws Unreadable {
        String name = quotedOr(NAME, "a name");
        if (name.equals("check") && peek('"')) {
            return check();
        }
        if (name.equals("assess") && peek('"')) {
            return assessment();
        }
        require("=");
        return new Output.Result(name, "", value());
    }

    // ---- values

    /** A number as read: the value and what is said of it by its own text. */
    private record Read(double value, Status status) { }

    private Value value() throws Unreadable {
        List<Read> numbers = new ArrayList<>();
        List<String> sides = new ArrayList<>();
        String unit;
        if (peek('[')) {
            numbers.addAll(bracket(this::number));
            unit = unit();
        } else if (!startsSide()) {
            numbers.add(number());
            unit = unit();
        } else {
            sides.add(quotedOr(SIDE, "a side"));
            numbers.addAll(bracket(this::number));
            unit = unit();
            require(",");
            sides.add(quotedOr(SIDE, "a side"));
            numbers.addAll(bracket(this::number));
            if (!unit().equals(unit)) {
                throw new Unreadable("the two sides have different units.");
            }
        }
        Fields fields = fields("|", numbers.size());
        List<Value.Scalar> parts = fields.scalars(numbers, unit);
        if (sides.isEmpty()) {
            return parts.size() == 1 ? parts.get(0) : triple(parts, fields.place);
        }
        return new Value.Sides(sides.get(0), triple(parts.subList(0, 3), fields.place), sides.get(1),
                triple(parts.subList(3, 6), fields.place));
    }

    /** A side's name stands before a bracket; a number does not. */
    private boolean startsSide() throws Unreadable {
        int start = at;
        try {
            quotedOr(SIDE, "a side");
            return peek('[');
        } catch (Unreadable noName) {
            return false;
        } finally {
            at = start;
        }
    }

    private static Value.Triple triple(List<Value.Scalar> parts, Point place) {
        return new Value.Triple(parts.get(0), parts.get(1), parts.get(2), place);
    }

    private Value.Scalar scalarWithBrackets() throws Unreadable {
        Read number = number();
        String unit = unit();
        Fields fields = new Fields(1);
        if (take("(")) {
            fields.readOne();
            while (take(",")) {
                fields.readOne();
            }
            require(")");
        }
        return fields.scalars(List.of(number), unit).get(0);
    }

    private Fields fields(String separator, int count) throws Unreadable {
        Fields fields = new Fields(count);
        while (take(separator)) {
            fields.readOne();
        }
        return fields;
    }

    /** The fields behind a value, for 1, 3 or 6 numbers. */
    private final class Fields {
        private final int count;
        private List<Double> errors;
        private List<Double> tolerances;
        private List<String> reasons;
        private Display shown;
        private Point place;

        Fields(int count) {
            this.count = count;
        }

        void readOne() throws Unreadable {
            String field = quotedOr(NAME, "a field");
            switch (field) {
                case "num" -> errors = once(field, errors, grouped(RecordReader.this::bound));
                case "tol" -> tolerances = once(field, tolerances, grouped(RecordReader.this::bound));
                case "because" -> reasons = once(field, reasons,
                        peek('"') ? Collections.nCopies(count, quoted()) : grouped(RecordReader.this::quoted));
                case "shown" -> shown = once(field, shown, display());
                case "at" -> place = once(field, place, place());
                default -> throw new Unreadable("no field '" + field + "' is known here.");
            }
        }

        private <T> List<T> grouped(Part<T> part) throws Unreadable {
            if (count == 1) {
                return Collections.singletonList(part.read());
            }
            List<T> all = new ArrayList<>(bracket(part));
            if (count == 6) {
                require(",");
                all.addAll(bracket(part));
            }
            return all;
        }

        List<Value.Scalar> scalars(List<Read> numbers, String unit) {
            List<Value.Scalar> scalars = new ArrayList<>();
            for (int i = 0; i < numbers.size(); i++) {
                scalars.add(new Value.Scalar(numbers.get(i).value(), errors == null ? null : errors.get(i),
                        tolerances == null ? null : tolerances.get(i), unit, shown, numbers.get(i).status(),
                        reasons == null ? "" : reasons.get(i)));
            }
            return scalars;
        }
    }

    private static <T> T once(String field, T before, T now) throws Unreadable {
        if (before != null) {
            throw new Unreadable("field '" + field + "' stands twice.");
        }
        return now;
    }

    private Display display() throws Unreadable {
        String unit = quotedOr(UNIT, "a unit");
        require("=");
        return new Display(unit, finite());
    }

    private Point place() throws Unreadable {
        List<Double> numbers = bracket(this::finite);
        return new Point(numbers.get(0), numbers.get(1), numbers.get(2));
    }

    // ---- checks and assessments

    private Output.Check check() throws Unreadable {
        String label = quoted();
        boolean passed = passed();
        field("measured");
        double measured = measured();
        String unit = unit();
        field("allowed");
        double allowed = measured();
        if (!unit().equals(unit)) {
            throw new Unreadable("measured and allowed have different units.");
        }
        String detail = take("|") ? detail() : "";
        return new Output.Check(label, passed, detail, measured, allowed, unit);
    }

    private String detail() throws Unreadable {
        word("detail");
        return quoted();
    }

    private Output.Assessment assessment() throws Unreadable {
        String label = quoted();
        boolean passed = passed();
        field("value");
        Value.Scalar value = scalarWithBrackets();
        require("|");
        Value.Scalar worst = null;
        if (take("worst")) {
            worst = scalarWithBrackets();
            require("|");
        }
        word("threshold");
        Value.Scalar threshold = scalarWithBrackets();
        field("margin");
        double found = measured();
        word("of");
        double asked = measured();
        field("source");
        String source = quoted();
        field("caution");
        return new Output.Assessment(label, passed, value, worst, threshold, asked, found, source, quoted());
    }

    private boolean passed() throws Unreadable {
        String word = quotedOr(NAME, "'passed' or 'failed'");
        if (!word.equals("passed") && !word.equals("failed")) {
            throw new Unreadable("'" + word + "' is neither 'passed' nor 'failed'.");
        }
        return word.equals("passed");
    }

    private void field(String name) throws Unreadable {
        require("|");
        word(name);
    }

    // ---- pieces of text

    private Read number() throws Unreadable {
        if (take("unbounded")) {
            return new Read(Double.NaN, Status.UNBOUNDED);
        } else if (take("+unbounded")) {
            return new Read(Double.POSITIVE_INFINITY, Status.UNBOUNDED);
        } else if (take("-unbounded")) {
            return new Read(Double.NEGATIVE_INFINITY, Status.UNBOUNDED);
        } else if (take("?")) {
            return new Read(Double.NaN, Status.NOT_CONVERGED);
        }
        double value = finite();
        return new Read(value, take("?") ? Status.NOT_CONVERGED : Status.CONVERGED);
    }

    private Double bound() throws Unreadable {
        return take("-") ? null : Double.valueOf(finite());
    }

    private double measured() throws Unreadable {
        if (take("+unbounded")) {
            return Double.POSITIVE_INFINITY;
        } else if (take("-unbounded")) {
            return Double.NEGATIVE_INFINITY;
        }
        Matcher number = matcher(NUMBER);
        if (!number.lookingAt() && take("-")) {
            return Double.NaN;
        }
        return finite();
    }

    private double finite() throws Unreadable {
        double value = Double.parseDouble(matched(NUMBER, "a number"));
        if (Double.isInfinite(value)) {
            throw new Unreadable("a number beyond the range of a double.");
        }
        return value;
    }

    private <T> List<T> bracket(Part<T> part) throws Unreadable {
        List<T> three = new ArrayList<>();
        require("[");
        three.add(part.read());
        require(",");
        three.add(part.read());
        require(",");
        three.add(part.read());
        require("]");
        return three;
    }

    private String unit() throws Unreadable {
        if (peek('"')) {
            return quoted();
        }
        return matcher(UNIT).lookingAt() ? matched(UNIT, "a unit") : "";
    }

    private String quotedOr(Pattern bare, String what) throws Unreadable {
        return peek('"') ? quoted() : matched(bare, what);
    }

    private String quoted() throws Unreadable {
        require("\"");
        StringBuilder plain = new StringBuilder();
        while (at < text.length() && text.charAt(at) != '"') {
            char c = text.charAt(at++);
            plain.append(c == '\\' ? escaped() : c);
        }
        if (at == text.length()) {
            throw expected("the closing quote");
        }
        at++;
        return plain.toString();
    }

    private char escaped() throws Unreadable {
        char c = at < text.length() ? text.charAt(at++) : ' ';
        switch (c) {
            case '"', '\\':
                return c;
            case 'n':
                return '\n';
            case 'r':
                return '\r';
            case 't':
                return '\t';
            case 'u':
                if (at + 4 <= text.length() && text.substring(at, at + 4).matches("[0-9a-fA-F]{4}")) {
                    at += 4;
                    return (char) Integer.parseInt(text.substring(at - 4, at), 16);
                }
                break;
            default:
                break;
        }
        throw expected("one of \\\" \\\\ \\n \\r \\t \\u0000");
    }

    private String matched(Pattern pattern, String what) throws Unreadable {
        Matcher matcher = matcher(pattern);
        if (!matcher.lookingAt()) {
            throw expected(what);
        }
        at = matcher.end();
        return matcher.group();
    }

    private Matcher matcher(Pattern pattern) {
        skipBlanks();
        return pattern.matcher(text).region(at, text.length());
    }

    private void word(String wanted) throws Unreadable {
        if (!matched(NAME, "'" + wanted + "'").equals(wanted)) {
            throw expected("'" + wanted + "'");
        }
    }

    private void require(String wanted) throws Unreadable {
        if (!take(wanted)) {
            throw expected("'" + wanted + "'");
        }
    }

    private boolean take(String wanted) {
        skipBlanks();
        boolean there = text.startsWith(wanted, at);
        if (there) {
            at += wanted.length();
        }
        return there;
    }

    private boolean peek(char wanted) {
        skipBlanks();
        return at < text.length() && text.charAt(at) == wanted;
    }

    private boolean atEnd() {
        skipBlanks();
        return at == text.length();
    }

    private void skipBlanks() {
        while (at < text.length() && Character.isWhitespace(text.charAt(at))) {
            at++;
        }
    }

    private Unreadable expected(String what) {
        return new Unreadable("column " + (at + 1) + ": expected " + what + ".");
    }
}

package fieldwright.sheet;

import fieldwright.output.Display;
import fieldwright.output.NumberText;
import fieldwright.output.Output;
import fieldwright.output.Point;
import fieldwright.output.Value;
import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.function.Function;

/** Writes record lines; {@link RecordReader} is its inverse. */
final class RecordWriter {
    static final String NAME = "[\\p{L}_][\\p{L}\\p{M}\\p{N}_]*";
    static final String UNIT = "[^\\s|\"\\[\\](),=?]+";
    static final String SIDE = "[+-]?[\\p{L}_]+";

    private RecordWriter() { }

    static String write(Output output) {
        if (output instanceof Output.Result result) {
            return ":rec " + bareOr(NAME, result.name()) + " = " + value(result.value());
        } else if (output instanceof Output.Check check) {
            return ":rec check " + quoted(check.label()) + " " + passed(check.passed()) + " | " + check(check);
        } else if (output instanceof Output.Assessment assessment) {
            return ":rec assess " + quoted(assessment.label()) + " " + passed(assessment.passed()) + " | " + assessment(assessment);
        }
        throw new IllegalArgumentException(output.getClass().getSimpleName() + " is not stored; only results, checks and assessments are.");
    }

    private static String value(Value value) {
        List<String> fields = new ArrayList<>();
        if (value instanceof Value.Scalar scalar) {
            fields.add(number(scalar) + behind(scalar.unit()));
        } else if (value instanceof Value.Triple triple) {
            fields.add(bracket(parts(triple), RecordWriter::number) + behind(triple.unit()));
        } else if (value instanceof Value.Sides sides) {
            fields.add(side(sides.plusSide(), sides.plus()) + ", " + side(sides.minusSide(), sides.minus()));
        }
        Point place = place(value);
        if (place != null) {
            fields.add("at [" + NumberText.exact(place.x()) + ", " + NumberText.exact(place.y()) + ", "
                    + NumberText.exact(place.z()) + "]");
        }
        fields.addAll(fieldsOf(parts(value)));
        return String.join(" | ", fields);
    }

    private static String side(String name, Value.Triple triple) {
        return bareOr(SIDE, name) + " " + bracket(parts(triple), RecordWriter::number) + behind(triple.unit());
    }

    /** The fields {@code num tol shown because}, each only where there is something to say. */
    private static List<String> fieldsOf(List<Value.Scalar> parts) {
        List<String> fields = new ArrayList<>();
        if (parts.stream().anyMatch(part -> part.numericalError() != null)) {
            fields.add("num " + grouped(parts, part -> bound(part.numericalError())));
        }
        if (parts.stream().anyMatch(part -> part.tolerance() != null)) {
            fields.add("tol " + grouped(parts, part -> bound(part.tolerance())));
        }
        Display shown = parts.get(0).shown();
        if (!shown.equals(Display.si(parts.get(0).unit()))) {
            fields.add("shown " + bareOr(UNIT, shown.unit()) + " = " + NumberText.exact(shown.factor()));
        }
        if (parts.stream().anyMatch(part -> !part.reason().isEmpty())) {
            boolean same = parts.stream().allMatch(part -> part.reason().equals(parts.get(0).reason()));
            fields.add("because " + (same ? quoted(parts.get(0).reason()) : grouped(parts, part -> quoted(part.reason()))));
        }
        return fields;
    }

    private static String check(Output.Check check) {
        return "measured " + measured(check.measured()) + behind(check.unit()) + " | allowed " + measured(check.allowed()) + behind(check.unit())
                + (check.detail().isEmpty() ? "" : " | detail " + quoted(check.detail()));
    }

    private static String assessment(Output.Assessment assessment) {
        return "value " + inBrackets(assessment.value())
                + (assessment.worstCase() == null ? "" : " | worst " + inBrackets(assessment.worstCase()))
                + " | threshold " + inBrackets(assessment.threshold())
                + " | margin " + measured(assessment.marginFound()) + " of " + measured(assessment.marginAsked())
                + " | source " + quoted(assessment.source()) + " | caution " + quoted(assessment.caution());
    }

    private static String inBrackets(Value.Scalar scalar) {
        List<String> fields = fieldsOf(List.of(scalar));
        return number(scalar) + behind(scalar.unit()) + (fields.isEmpty() ? "" : " (" + String.join(", ", fields) + ")");
    }

    /** A number with its status: {@code 12.5}, {@code 12.5?}, {@code ?}, {@code unbounded}, {@code -unbounded}. */
    private static String number(Value.Scalar scalar) {
        double value = scalar.value();
        return switch (scalar.status()) {
            case CONVERGED -> NumberText.exact(value);
            case NOT_CONVERGED -> (Double.isNaN(value) ? "" : NumberText.exact(value)) + "?";
            case UNBOUNDED -> (Double.isNaN(value) ? "" : value > 0 ? "+" : "-") + "unbounded";
        };
    }

    private static String measured(double value) {
        return Double.isNaN(value) ? "-" : Double.isInfinite(value) ? (value > 0 ? "+" : "-") + "unbounded" : NumberText.exact(value);
    }

    private static String bound(Double bound) {
        return bound == null ? "-" : NumberText.exact(bound);
    }

    /** One text alone, three in a bracket, six in two brackets: number, vector, pair. */
    private static String grouped(List<Value.Scalar> parts, Function<Value.Scalar, String> text) {
        return switch (parts.size()) {
            case 1 -> text.apply(parts.get(0));
            case 3 -> bracket(parts, text);
            default -> bracket(parts.subList(0, 3), text) + ", " + bracket(parts.subList(3, 6), text);
        };
    }

    private static String bracket(List<Value.Scalar> parts, Function<Value.Scalar, String> text) {
        return "[" + String.join(", ", parts.stream().map(text).toList()) + "]";
    }

    private static List<Value.Scalar> parts(Value value) {
        if (value instanceof Value.Scalar scalar) {
            return List.of(scalar);
        } else if (value instanceof Value.Triple triple) {
            return List.of(triple.x(), triple.y(), triple.z());
        }
        Value.Sides sides = (Value.Sides) value;
        List<Value.Scalar> parts = new ArrayList<>(parts(sides.plus()));
        parts.addAll(parts(sides.minus()));
        return parts;
    }

    private static Point place(Value value) {
        if (value instanceof Value.Triple triple) {
            return triple.place();
        }
        return value instanceof Value.Sides sides ? sides.plus().place() : null;
    }

    private static String behind(String unit) {
        return unit.isEmpty() ? "" : " " + bareOr(UNIT, unit);
    }

    private static String passed(boolean passed) {
        return passed ? "passed" : "failed";
    }

    private static String bareOr(String pattern, String text) {
        return text.matches(pattern) ? text : quoted(text);
    }

    /** On one line, without a bar or a bracket that could be taken for the form's own. */
    static String quoted(String text) {
        StringBuilder quoted = new StringBuilder("\"");
        for (char c : Objects.requireNonNull(text).toCharArray()) {
            switch (c) {
                case '"' -> quoted.append("\\\"");
                case '\\' -> quoted.append("\\\\");
                case '\n' -> quoted.append("\\n");
                case '\r' -> quoted.append("\\r");
                case '\t' -> quoted.append("\\t");
                default -> quoted.append(c < ' ' ? String.format(java.util.Locale.ROOT, "\\u%04x", (int) c) : String.valueOf(c));
            }
        }
        return quoted.append('"').toString();
    }
}

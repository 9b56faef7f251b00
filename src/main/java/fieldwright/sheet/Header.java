package fieldwright.sheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Objects;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The head of a sheet: lines {@code name: value} in their order, unknown ones kept. Names in use: title, project,
 * number, revision, made, checked, approved, use, accuracy.
 */
public final class Header {
    private static final Pattern FIELD = Pattern.compile("\\s*([\\p{L}_][\\p{L}\\p{N}_ .-]*?)\\s*:(.*)", Pattern.DOTALL);

    private final List<Line> lines;

    /** @param lines from the first line of the file to the line before the first cell */
    Header(List<Line> lines) {
        this.lines = List.copyOf(lines);
    }

    /** @param line line in the file, 1-based */
    public record Field(String name, String value, int line) { }

    /** All fields in their order. */
    public List<Field> fields() {
        List<Field> fields = new ArrayList<>();
        for (int i = 1; i < lines.size(); i++) {
            Matcher field = FIELD.matcher(lines.get(i).text());
            if (!lines.get(i).isForm() && field.matches()) {
                fields.add(new Field(field.group(1), field.group(2).strip(), i + 1));
            }
        }
        return List.copyOf(fields);
    }

    /** The value of the first field of that name; empty when there is none. */
    public String get(String name) {
        return fields().stream().filter(field -> field.name().equals(name)).map(Field::value).findFirst().orElse("");
    }

    static boolean isField(String text) {
        return FIELD.matcher(text).matches();
    }

    List<Line> lines() {
        return lines;
    }

    Header with(String name, String value, String end) {
        if (!isField(name + ":") || !value.equals(value.strip()) || !Line.isOne(value)) {
            throw new IllegalArgumentException("header line '" + name + ": " + value + "': a name of letters, and a value on one line.");
        }
        Line changed = new Line(value.isEmpty() ? name + ":" : name + ": " + value, end);
        List<Line> newLines = new ArrayList<>(lines);
        int last = 0;
        for (Field field : fields()) {
            if (field.name().equals(name)) {
                if (!field.value().equals(value)) {
                    newLines.set(field.line() - 1, changed);
                }
                return new Header(newLines);
            }
            last = field.line() - 1;
        }
        newLines.add(last + 1, changed);
        return new Header(newLines);
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Header that && lines.equals(that.lines);
    }

    @Override
    public int hashCode() {
        return Objects.hash(lines);
    }
}

package fieldwright.cli;

import fieldwright.output.NumberText;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;

/**
 * Writes maps, lists, texts, numbers, booleans and null as JSON (RFC 8259). A number that JSON does not know, NaN or
 * infinite, is written as null.
 */
final class JsonWriter {

    private JsonWriter() { }

    static String write(Object value) {
        return write(value, "\n");
    }

    private static String write(Object value, String newLine) {
        String inner = newLine + "  ";
        if (value instanceof Map<?, ?> map) {
            return map.isEmpty() ? "{}" : map.entrySet().stream()
                    .map(entry -> text((String) entry.getKey()) + ": " + write(entry.getValue(), inner))
                    .collect(Collectors.joining("," + inner, "{" + inner, newLine + "}"));
        } else if (value instanceof List<?> list) {
            boolean flat = list.stream().allMatch(element -> element == null || element instanceof Number);
            return list.isEmpty() ? "[]" : flat
                    ? list.stream().map(element -> write(element, inner)).collect(Collectors.joining(", ", "[", "]"))
                    : list.stream().map(element -> write(element, inner)).collect(Collectors.joining("," + inner, "[" + inner, newLine + "]"));
        } else if (value instanceof Double number) {
            return Double.isFinite(number) ? NumberText.exact(number) : "null";
        } else if (value instanceof String string) {
            return text(string);
        } else if (value == null || value instanceof Boolean || value instanceof Integer) {
            return String.valueOf(value);
        }
        throw new IllegalArgumentException(value.getClass() + " has no form in JSON here");
    }

    private static String text(String plain) {
        StringBuilder text = new StringBuilder("\"");
        for (int i = 0; i < plain.length(); i++) {
            char c = plain.charAt(i);
            switch (c) {
                case '"' -> text.append("\\\"");
                case '\\' -> text.append("\\\\");
                case '\n' -> text.append("\\n");
                case '\r' -> text.append("\\r");
                case '\t' -> text.append("\\t");
                default -> text.append(c < ' ' || Character.isSurrogate(c) || c == '\u2028' || c == '\u2029'
                        ? String.format(java.util.Locale.ROOT, "\\u%04x", (int) c) : String.valueOf(c));
            }
        }
        return text.append('"').toString();
    }
}

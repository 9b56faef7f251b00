package fieldwright.app;

import fieldwright.sheet.Cell;
import fieldwright.sheet.InputEntry;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * The number at the head of an input's definition, and the line with another number in its place. Everything else in
 * the line keeps its bytes.
 *
 * @param number    as written, {@code 1.80}
 * @param unit      as written behind it, {@code uC/m^3}; empty for a plain number
 * @param tolerance as written behind the unit, {@code ± 25 %}; empty when there is none
 */
record InputValue(String number, String unit, String tolerance) {
    private static final String NUMBER = "[-+−]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eE][-+−]?\\d+)?";
    private static final Pattern DEFINITION = Pattern.compile("(" + NUMBER + ")(?![\\w.])\\s*([^±|]*?)\\s*((?:±|\\+/-|\\+-).*)?");

    /** Empty when the definition does not begin with one number: a list, a table, a choice. */
    static Optional<InputValue> of(String definition) {
        Matcher m = DEFINITION.matcher(definition.strip());
        return m.matches() && !m.group(2).contains(",") && !m.group(2).startsWith("(") || m.matches() && isUnitInBrackets(m.group(2))
                ? Optional.of(new InputValue(m.group(1), m.group(2), m.group(3) == null ? "" : m.group(3)))
                : Optional.empty();
    }

    private static boolean isUnitInBrackets(String text) {
        return text.startsWith("(") && text.endsWith(")") && !text.contains(",");
    }

    /**
     * The text of the whole cell with another number in this input.
     *
     * @param typed what the reader typed
     * @throws IllegalArgumentException when it is not a number; says what to write
     */
    static String replaced(Cell cell, InputEntry entry, String typed) {
        String number = typed.strip();
        Optional<InputValue> old = of(entry.definition());
        if (old.isPresent() && !number.matches(NUMBER)) {
            throw new IllegalArgumentException("'" + number + "' is not a number. "
                    + (number.matches("[-+−]?\\d+,\\d+.*") ? "Write the decimals behind a point: " + number.replace(',', '.')
                            : "Write one number; the unit stands behind it and is changed in the step."));
        }
        if (number.isEmpty() || number.contains("\n") || number.contains("|")) {
            throw new IllegalArgumentException("an input needs a value, on one line and without '|'.");
        }
        String replacedPart = old.map(InputValue::number).orElse(entry.definition());
        String[] lines = cell.source().split("\n", -1);
        int index = lineIndex(cell, entry);
        String line = lines[index];
        int from = entry.column() - 1;
        lines[index] = line.substring(0, from) + number.replace('−', '-') + line.substring(from + replacedPart.length());
        return String.join("\n", lines);
    }

    private static int lineIndex(Cell cell, InputEntry entry) {
        int lines = cell.source().split("\n", -1).length;
        for (int i = 1; i <= lines; i++) {
            if (cell.lineOf(i) == entry.line()) {
                return i - 1;
            }
        }
        throw new IllegalArgumentException("input '" + entry.name() + "' is no longer where it was.");
    }
}

package fieldwright.words;

import fieldwright.quantity.AuthorException;
import fieldwright.quantity.TradeUnit;
import fieldwright.quantity.Units;
import java.util.List;
import javax.measure.Dimension;

/** Numbers of many places, in columns x, y, z and one more, as texts or arrays; brought to SI. */
final class Rows {
    private Rows() { }

    /**
     * Columns x, y, z and a quantity from lines of four numbers, apart by comma, semicolon, tab or space; what follows a # is left out.
     * The decimal mark is a point.
     */
    static double[][] parse(String word, String rows) {
        List<String> lines = rows.lines().toList();
        double[][] columns = new double[4][lines.size()];
        int n = 0;
        for (int i = 0; i < lines.size(); i++) {
            String line = lines.get(i).replaceAll("#.*", "").strip();
            if (line.isEmpty()) {
                continue;
            }
            String[] parts = line.split("\\s*[,;]\\s*|\\s+");
            if (parts.length != 4) {
                throw new AuthorException(word + ", line " + (i + 1) + " of the list: '" + line + "' has " + parts.length
                        + " numbers, not four: x, y, z and the quantity. Put a # before lines that are no numbers.");
            }
            for (int k = 0; k < 4; k++) {
                columns[k][n] = number(word, i + 1, parts[k]);
            }
            n++;
        }
        double[][] filled = new double[4][];
        for (int k = 0; k < 4; k++) {
            filled[k] = java.util.Arrays.copyOf(columns[k], n);
        }
        return filled;
    }

    private static double number(String word, int line, String text) {
        try {
            return Double.parseDouble(text);
        } catch (NumberFormatException e) {
            throw new AuthorException(word + ", line " + line + " of the list: '" + text + "' is not a number. Write it with a decimal point,"
                    + " for example 1.5e-9, and put a # before headings.");
        }
    }

    /** Of columns in these units; the last one must have the dimension named. */
    static double[][] si(String word, String lengthUnit, String unit, Dimension dimension, double[]... columns) {
        double length = factor(word, lengthUnit, Units.LENGTH);
        double last = factor(word, unit, dimension);
        double[][] si = new double[columns.length][];
        for (int k = 0; k < columns.length; k++) {
            double factor = k < 3 ? length : last;
            si[k] = java.util.Arrays.stream(columns[k]).map(v -> v * factor).toArray();
        }
        return si;
    }

    private static double factor(String word, String unit, Dimension dimension) {
        TradeUnit parsed = Units.parse(unit);
        if (!parsed.dimension().equals(dimension)) {
            throw new AuthorException(word + ": unit " + unit + " is " + Units.describe(parsed.dimension()) + ", not " + Units.describe(dimension)
                    + ". Name the unit of the lengths first, then that of the quantity.");
        }
        return parsed.factor();
    }
}

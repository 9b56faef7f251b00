package fieldwright.formula;

import fieldwright.quantity.AuthorException;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** {@code corr(a, b) = 0.9}: correlation of the tolerances of two inputs, from -1 to 1. Names are folded. */
public record Correlation(String first, String second, double coefficient) {
    private static final Pattern LINE = Pattern.compile("\\s*corr\\s*\\(([^,()]*),([^,()]*)\\)\\s*=(.*)");

    /** Errors: {@link AuthorException} for a name with itself or a coefficient that is no number from -1 to 1. */
    public static Correlation of(String first, String second, String coefficient) {
        String a = Names.fold(first.strip());
        String b = Names.fold(second.strip());
        String line = "corr(" + a + ", " + b + ") = " + coefficient.strip();
        if (!Names.isName(a) || !Names.isName(b) || a.equals(b)) {
            throw new AuthorException(line + ": two different inputs are expected.");
        }
        double value;
        try {
            value = Double.parseDouble(coefficient.strip().replace('\u2212', '-'));
        } catch (NumberFormatException e) {
            throw new AuthorException(line + ": the coefficient must be a number from -1 to 1.");
        }
        if (!(value >= -1 && value <= 1)) {
            throw new AuthorException(line + ": the coefficient must be a number from -1 to 1.");
        }
        return new Correlation(a, b, value);
    }

    public static Correlation parse(String line) {
        Matcher m = LINE.matcher(line);
        if (!m.matches()) {
            throw new AuthorException("'" + line.strip() + "' is no correlation. Write corr(a, b) = 0.9.");
        }
        return of(m.group(1), m.group(2), m.group(3));
    }
}

package fieldwright.formula;

import fieldwright.quantity.Amount;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.Units;
import java.math.BigDecimal;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Reads input definitions; see {@link InputDefinition} for what they look like. */
final class InputParser {
    private static final Pattern PLUS_MINUS = Pattern.compile("\u00b1|\\+/?-");
    private static final Pattern NUMBER = Pattern.compile("[+\\-\u2212]?(?:[0-9]+(?:\\.[0-9]*)?|\\.[0-9]+)(?:[eE][+\\-\u2212]?[0-9]+)?");
    private static final Pattern COVERAGE = Pattern.compile("\\(\\s*(k\\s*=|nu\\s*=|\u03bd\\s*=)[^()]*\\)\\s*$");
    private static final String FORMS = "Write value and unit, such as 1.80 m \u00b1 0.02 m, 2.1 uC/m^3 \u00b1 25 %, 12 (whole), [1, 2] mm.";

    private final String text;

    InputParser(String text) {
        this.text = text;
    }

    InputDefinition definition() {
        int from = skip(0);
        int to = text.length();
        while (to > from && blank(text.charAt(to - 1))) {
            to--;
        }
        if (from == to) {
            throw wrong(0, "the input has no value. " + FORMS);
        }
        if (text.charAt(from) == '[') {
            return list(from, to);
        }
        if (text.startsWith("table(", from)) {
            return table(from + 6, to);
        }
        if (text.charAt(to - 1) == '}') {
            return choice(from, to);
        }
        if (text.substring(from, to).endsWith("(whole)")) {
            return whole(from, to - 7);
        }
        return quantity(from, to);
    }

    // One number with tolerance

    /** A number and the unit behind it. */
    private record Read(String decimal, Amount amount) {
    }

    private InputDefinition.Quantity quantity(int from, int to) {
        Matcher sign = PLUS_MINUS.matcher(text).region(from, to);
        if (!sign.find()) {
            Read value = read(from, to, "");
            return new InputDefinition.Quantity(value.amount(), value.decimal(), null);
        }
        Read value = read(from, sign.start(), "");
        return new InputDefinition.Quantity(value.amount(), value.decimal(), tolerance(value.amount(), sign.end(), to));
    }

    private Tolerance tolerance(Amount value, int from, int to) {
        double coverage = Double.NaN;
        double freedom = Double.POSITIVE_INFINITY;
        String written = text.substring(from, to).strip();
        Matcher bracket = COVERAGE.matcher(text).region(from, to);
        if (bracket.find()) {
            coverage = setting(bracket.start(), to, "k");
            freedom = setting(bracket.start(), to, "nu");
            if (Double.isNaN(coverage)) {
                throw wrong(bracket.start(), "the coverage factor is missing. Write (k=2) or (k=1, nu=18).");
            }
            freedom = Double.isNaN(freedom) ? Double.POSITIVE_INFINITY : freedom;
            to = bracket.start();
        }
        Tolerance.Form form = Double.isNaN(coverage) ? Tolerance.Form.LIMITS : Tolerance.Form.EXPANDED;
        return new Tolerance(form, halfWidth(value, from, to), coverage, freedom, written);
    }

    private double halfWidth(Amount value, int from, int to) {
        int start = skip(from);
        Read u = read(start, to, "tolerance: ");
        double half;
        if ("%".equals(u.amount().shown())) {
            if ("%".equals(value.shown())) {
                throw wrong(start, "a tolerance in % of a value in % can mean two things. Write the value as a plain number, such as 0.25 \u00b1 0.05.");
            }
            if (value.si() == 0) {
                throw wrong(start, "a tolerance in percent of 0. Write it as an amount.");
            }
            half = Math.abs(value.si()) * u.amount().si();
        } else if (!u.amount().dimension().equals(value.dimension())) {
            throw wrong(start, "the tolerance is " + Units.describe(u.amount().dimension()) + " and the value " + Units.describe(value.dimension())
                + ". Write the unit with both, as in 1.80 m \u00b1 0.02 m, or the tolerance in %.");
        } else {
            half = u.amount().si();
        }
        if (!(half > 0)) {
            throw wrong(start, "the tolerance is " + u.amount() + " and must be > 0. Leave \u00b1 out for an exact value.");
        }
        return half;
    }

    /** k or nu in the bracket, > 0; NaN when it does not stand there. */
    private double setting(int from, int to, String name) {
        double found = Double.NaN;
        for (int[] part : split(text.indexOf('(', from) + 1, text.lastIndexOf(')', to), ',')) {
            int equals = text.indexOf('=', part[0]);
            String key = equals < 0 || equals >= part[1] ? "" : Names.fold(text.substring(part[0], equals).strip());
            if (!key.equals("k") && !key.equals("nu")) {
                throw wrong(part[0], "'" + text.substring(part[0], part[1]).strip() + "' behind the tolerance is not known. Write (k=2) or (k=1, nu=18).");
            }
            if (key.equals(name)) {
                Read value = read(skip(equals + 1), part[1], name + ": ");
                if (!(value.amount().si() > 0) || !value.amount().isPlain()) {
                    throw wrong(skip(equals + 1), name + " = " + value.amount() + ": must be a plain number > 0.");
                }
                found = value.amount().si();
            }
        }
        return found;
    }

    private Read read(int from, int to, String what) {
        return read(from, to, what, null);
    }

    /** A number and its unit; with {@code common}, a number without unit has that one. */
    private Read read(int from, int to, String what, String common) {
        int start = skip(from);
        Matcher number = NUMBER.matcher(text).region(start, to);
        if (!number.lookingAt()) {
            boolean formula = start < to && (Names.startsName(text.charAt(start)) || text.charAt(start) == '(');
            throw wrong(start, what + (start >= to ? "a number is missing. " + FORMS
                : formula ? "'" + text.substring(start, to).strip() + "' is no number. An input is one number with its unit; formulas belong into a derive cell."
                : "'" + text.substring(start, to).strip() + "' is no number. " + FORMS));
        }
        String decimal = number.group().replace('\u2212', '-');
        int unitFrom = skip(number.end());
        String unit = unitFrom >= to ? "" : text.substring(unitFrom, to).strip();
        if (unit.startsWith("(") && unit.endsWith(")") && unit.indexOf('(', 1) < 0) {
            unit = unit.substring(1, unit.length() - 1).strip();
        }
        if (unit.startsWith(",") || unit.startsWith(".")) {
            throw wrong(unitFrom, what + "a number is written with one decimal point and without separators, such as 1250.5.");
        }
        if (unit.startsWith("*") || unit.startsWith("+") || unit.startsWith("-") || unit.startsWith("\u00d7")) {
            throw wrong(unitFrom, what + "an input is one number with its unit; formulas belong into a derive cell. A power of ten is written 2.1e-6.");
        }
        try {
            String shown = unit.isEmpty() && common != null ? common : unit;
            Amount a = Amount.of(new BigDecimal(decimal), shown);
            return new Read(decimal, shown.isEmpty() ? new Amount(a.si(), a.error(), a.dimension(), null, a.standing()) : a);
        } catch (AuthorException e) {
            throw wrong(unitFrom, what + e.getMessage());
        }
    }

    // The other kinds

    private InputDefinition.Whole whole(int from, int to) {
        String number = text.substring(from, to).strip().replace('\u2212', '-');
        if (!number.matches("[+-]?[0-9]{1,9}")) {
            throw wrong(from, "'" + number + "' is no whole number below 1000000000. Write, for example, 12 (whole).");
        }
        return new InputDefinition.Whole(Integer.parseInt(number));
    }

    private InputDefinition.Listed list(int from, int to) {
        int close = text.indexOf(']', from);
        if (close < 0 || close >= to) {
            throw wrong(from, "the list is not closed. Add ']'.");
        }
        String common = text.substring(close + 1, to).strip();
        if (!common.isEmpty()) {
            unitAt(close + 1, common);
        }
        return new InputDefinition.Listed(amounts(from + 1, close, common.isEmpty() ? null : common));
    }

    private List<Amount> amounts(int from, int to, String common) {
        List<Amount> values = new ArrayList<>();
        for (int[] part : split(from, to, ',')) {
            Amount next = read(part[0], part[1], "", common).amount();
            if (!values.isEmpty() && !next.dimension().equals(values.get(0).dimension())) {
                throw wrong(skip(part[0]), "a list holds numbers of one kind, and here " + Units.describe(next.dimension()) + " stands with "
                    + Units.describe(values.get(0).dimension()) + ".");
            }
            values.add(next);
        }
        return values;
    }

    private InputDefinition.Table table(int from, int to) {
        String form = "Write table(d / mm: 1, 2; U / kV: 3.1, 5.4).";
        if (text.charAt(to - 1) != ')') {
            throw wrong(from - 1, "the table is not closed. Add ')'.");
        }
        List<InputDefinition.Table.Column> columns = new ArrayList<>();
        Set<String> names = new HashSet<>();
        for (int[] part : split(from, to - 1, ';')) {
            int colon = text.indexOf(':', part[0]);
            if (colon < 0 || colon >= part[1]) {
                throw wrong(skip(part[0]), "a column without ':'. " + form);
            }
            String heading = text.substring(part[0], colon);
            int slash = heading.indexOf('/');
            String name = Names.fold((slash < 0 ? heading : heading.substring(0, slash)).strip());
            if (!Names.isName(name) || !names.add(name)) {
                throw wrong(skip(part[0]), "the column '" + name + "' " + (Names.isName(name) ? "stands twice. " : "has no name. ") + form);
            }
            String unit = slash < 0 ? "" : heading.substring(slash + 1).strip();
            unitAt(part[0] + slash + 1, unit);
            List<Amount> values = amounts(colon + 1, part[1], unit);
            if (!columns.isEmpty() && values.size() != columns.get(0).values().size()) {
                throw wrong(skip(part[0]), "column '" + name + "' has " + values.size() + " numbers and '" + columns.get(0).name() + "' has "
                    + columns.get(0).values().size() + ". All columns must have as many.");
            }
            columns.add(new InputDefinition.Table.Column(name, values));
        }
        return new InputDefinition.Table(columns);
    }

    private InputDefinition.Choice choice(int from, int to) {
        int open = text.indexOf('{', from);
        String before = open < 0 ? "" : text.substring(from, open).strip();
        if (!before.endsWith(" of") || before.length() < 4) {
            throw wrong(from, "a choice is written with its options, such as PE of {PE, PTFE, glass}.");
        }
        String chosen = before.substring(0, before.length() - 3).strip();
        List<String> options = new ArrayList<>();
        for (int[] part : split(open + 1, to - 1, ',')) {
            String option = text.substring(part[0], part[1]).strip();
            if (option.isEmpty() || options.contains(option)) {
                throw wrong(part[0], option.isEmpty() ? "an option is empty. Remove the comma." : "the option '" + option + "' stands twice.");
            }
            options.add(option);
        }
        if (!options.contains(chosen)) {
            throw wrong(from, "'" + chosen + "' is none of the options " + String.join(", ", options) + ". Choose one of them or add it.");
        }
        return new InputDefinition.Choice(chosen, options);
    }

    private void unitAt(int from, String unit) {
        try {
            Units.parse(unit);
        } catch (AuthorException e) {
            throw wrong(skip(from), e.getMessage());
        }
    }

    private List<int[]> split(int from, int to, char separator) {
        List<int[]> parts = new ArrayList<>();
        int start = from;
        for (int i = from; i <= to; i++) {
            if (i == to || text.charAt(i) == separator) {
                parts.add(new int[] {start, i});
                start = i + 1;
            }
        }
        return parts;
    }

    private int skip(int from) {
        int i = from;
        while (i < text.length() && blank(text.charAt(i))) {
            i++;
        }
        return i;
    }

    private static boolean blank(char c) {
        return Character.isWhitespace(c) || Character.isSpaceChar(c);
    }

    private FormulaException wrong(int at, String message) {
        return new FormulaException(text, Math.min(at, text.length()), message);
    }
}

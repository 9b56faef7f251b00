package fieldwright.draw;

import java.util.Map;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A unit as it is read, and how many SI units make one of it: shown value = SI value / factor.
 *
 * @param unit   trade writing, as in {@code kV/m}; empty for a plain number
 * @param factor SI units in one shown unit; finite and &gt; 0
 */
public record Scale(String unit, double factor) {
    private static final Pattern LEADING = Pattern.compile("^(ohm|Hz|Pa|Wb|eV|[A-Za-zΩ])(?![A-Za-z^0-9⁰¹²³⁴-⁹⁻])");
    private static final Set<String> TAKES_PREFIX =
            Set.of("V", "C", "A", "N", "J", "W", "F", "S", "m", "s", "T", "H", "Hz", "Pa", "Wb", "eV", "ohm", "Ω");
    private static final Map<Integer, String> PREFIXES = Map.ofEntries(
            Map.entry(-18, "a"), Map.entry(-15, "f"), Map.entry(-12, "p"), Map.entry(-9, "n"), Map.entry(-6, "µ"),
            Map.entry(-3, "m"), Map.entry(0, ""), Map.entry(3, "k"), Map.entry(6, "M"), Map.entry(9, "G"),
            Map.entry(12, "T"));

    public Scale {
        if (!(factor > 0) || Double.isInfinite(factor)) {
            throw new IllegalArgumentException("scale factor = " + factor + ": must be finite and > 0");
        }
    }

    /** The unit as it stands. */
    public static Scale plain(String unit) {
        return new Scale(unit == null ? "" : unit, 1);
    }

    /**
     * The SI unit with the prefix that brings the largest magnitude between 1 and 1000, where the unit's first symbol
     * takes a prefix (V/m, C/m^3, not m^2, kg, 1/m); the unit itself otherwise. Lengths and times keep m and s from a
     * hundredth to ten thousand, as drawings do.
     *
     * @param largest largest magnitude to show, in the SI unit; 0 or not finite leaves the unit as it is
     */
    public static Scale fitting(double largest, String siUnit) {
        Scale plain = plain(siUnit);
        double magnitude = Math.abs(largest);
        if (!takesPrefix(plain.unit) || !(magnitude > 0) || Double.isInfinite(magnitude)) {
            return plain;
        }
        // The small excess keeps 0.9999999999 kV/m, a rounded 1, out of the 999.9999 V/m bracket.
        int step = (int) Math.floor((Math.log10(magnitude) + 1e-9) / 3) * 3;
        boolean everyday = plain.unit.equals("m") || plain.unit.equals("s");
        if (everyday && magnitude >= 0.01 && magnitude < 1e4) {
            return plain;
        }
        int power = Math.max(-18, Math.min(plain.unit.equals("s") ? 0 : plain.unit.equals("m") ? 3 : 12, step));
        return new Scale(PREFIXES.get(power) + plain.unit, Double.parseDouble("1e" + power));
    }

    private static boolean takesPrefix(String unit) {
        Matcher m = LEADING.matcher(unit);
        return m.find() && TAKES_PREFIX.contains(m.group(1));
    }

    /** SI value to the number shown beside the unit. */
    public double shown(double si) {
        return si / factor;
    }

    /** The unit in print: {@code uC/m^3} as µC/m³, {@code V*m} as V·m, {@code ohm} as Ω, {@code deg} as °. */
    public String printed() {
        return print(unit);
    }

    /** The heading of an axis or a column: {@code z / m}, {@code |E| / (kV/m)}; the bare name for a plain number. */
    public String heading(String quantity) {
        String u = printed();
        if (u.isEmpty()) {
            return quantity;
        }
        boolean compound = u.indexOf('/') >= 0 || u.indexOf('·') >= 0 || u.indexOf(' ') >= 0;
        return quantity + " / " + (compound ? "(" + u + ")" : u);
    }

    private static final Pattern EXPONENT = Pattern.compile("\\^\\(?(-?\\d+)\\)?");

    /** A unit's text in print; see {@link #printed()}. */
    public static String print(String unit) {
        if (unit == null || unit.isBlank() || unit.equals("1")) {
            return "";
        }
        String u = unit.strip().replace("μ", "µ").replace('*', '·');
        u = u.replaceAll("(?<![A-Za-zµ])u(?=[A-Za-zΩ])", "µ").replaceAll("ohm\\b", "Ω").replaceAll("\\bdeg\\b", "°");
        Matcher m = EXPONENT.matcher(u);
        StringBuilder out = new StringBuilder();
        while (m.find()) {
            m.appendReplacement(out, Matcher.quoteReplacement(Figures.superscript(m.group(1))));
        }
        return m.appendTail(out).toString();
    }
}

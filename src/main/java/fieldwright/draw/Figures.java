package fieldwright.draw;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Numbers as they stand on paper: rounded to what their doubt warrants, with real minus signs and superscripts.
 *
 * <p>How many digits. A value with a tolerance shows the decimals of the tolerance's second digit, or three digits of
 * its own where that says more (59.9 µC ± 17 µC), at most one decimal further. A value without shows six digits
 * (an exact one no more than it needs). Either way no digit stands that the numerical error reaches. Doubts are rounded away from zero, tolerances to two
 * digits (JCGM 100:2008, 7.2.6), numerical errors to one.
 */
public final class Figures {
    private static final int DIGITS_OF_ITS_OWN = 3;
    private static final int DIGITS_WITHOUT_TOLERANCE = 6;
    private static final String MINUS = "−";

    private Figures() { }

    /** The value alone, in the scale's unit: {@code 59.9 µC}. Values and doubts in SI; null or NaN doubts are unknown. */
    public static String value(double si, Double tolerance, Double numericalError, Scale scale) {
        return withUnit(number(si, tolerance, numericalError, scale), scale.printed());
    }

    /**
     * The same with no more than so many decimals: the parts of one value stand beside each other. A part that is more
     * than its own doubt is never rounded to 0 for the sake of the others.
     */
    static String value(double si, Double tolerance, Double numericalError, Scale scale, int mostDecimals) {
        if (!Double.isFinite(si) || decimals(si, tolerance, numericalError, scale) <= mostDecimals) {
            return value(si, tolerance, numericalError, scale);
        }
        double doubt = (tolerance == null ? 0 : tolerance) + (numericalError == null ? 0 : numericalError);
        boolean vanishes = new BigDecimal(scale.shown(si)).setScale(mostDecimals, RoundingMode.HALF_EVEN).signum() == 0;
        if (vanishes && Math.abs(si) > doubt) {
            return withUnit(significant(scale.shown(si), 2), scale.printed());
        }
        return withUnit(fixed(scale.shown(si), mostDecimals), scale.printed());
    }

    /** Decimals that the doubts warrant, in the scale's unit. */
    static int decimals(double si, Double tolerance, Double numericalError, Scale scale) {
        return decimals(scale.shown(si), shown(tolerance, scale), shown(numericalError, scale));
    }

    /** The value's digits without the unit; arguments as in {@link #value}. */
    public static String number(double si, Double tolerance, Double numericalError, Scale scale) {
        if (!Double.isFinite(si)) {
            return Double.isNaN(si) ? "no number" : si > 0 ? "∞" : MINUS + "∞";
        }
        double v = scale.shown(si);
        boolean exact = tolerance == null && numericalError != null && numericalError == 0;
        return exact ? brief(v, DIGITS_WITHOUT_TOLERANCE) : fixed(v, decimals(v, shown(tolerance, scale), shown(numericalError, scale)));
    }

    /**
     * What is known of the value's doubt: {@code ± 17 µC (k = 2) · num. 3·10⁻²⁰ C}. An unknown tolerance is left out;
     * an unknown numerical error is said.
     */
    public static String doubt(Double tolerance, Double numericalError, Scale scale, String siUnit) {
        String numerical = numericalError == null || numericalError.isNaN() ? "num. error not carried"
                : "num.\u00a0" + legible(numericalError, 1, scale, siUnit);
        return tolerance == null || tolerance.isNaN() ? numerical
                : "± " + legible(tolerance, 2, scale, siUnit) + " (k\u00a0=\u00a02) · " + numerical;
    }

    /** Rounded up, in the scale's unit where plain digits do, else in SI with a power of ten. */
    private static String legible(double doubt, int digits, Scale scale, String siUnit) {
        double shown = scale.shown(doubt);
        return shown == 0 || shown >= 1e-3 && shown < 1e4
                ? withUnit(roundedUp(shown, digits), scale.printed())
                : withUnit(roundedUp(doubt, digits), Scale.print(siUnit));
    }

    private static Double shown(Double doubt, Scale scale) {
        return doubt == null || !Double.isFinite(doubt) ? null : (Double) scale.shown(doubt);
    }

    /** Decimals after the point (negative: tens, hundreds) that the doubts warrant. Package-private for its test. */
    static int decimals(double v, Double tolerance, Double numericalError) {
        boolean tolerant = tolerance != null && tolerance > 0;
        int own = v == 0 ? 0 : (tolerant ? DIGITS_OF_ITS_OWN : DIGITS_WITHOUT_TOLERANCE) - 1 - magnitude(v);
        int wanted = own;
        if (tolerant) {
            int second = 1 - magnitude(tolerance);
            wanted = Math.max(second, Math.min(own, second + 1));
        }
        if (numericalError != null && numericalError > 0) {
            wanted = Math.min(wanted, -magnitude(numericalError));
        }
        // A double holds no more than 17 digits whatever the doubts say.
        return v == 0 ? Math.min(wanted, 6) : Math.min(wanted, 16 - magnitude(v));
    }

    /** Power of ten of the first digit: 0 for 1 to 9.99; what rounds to 10 within 12 digits counts as 10. */
    static int magnitude(double v) {
        BigDecimal d = new BigDecimal(Math.abs(v)).round(new MathContext(12, RoundingMode.HALF_EVEN));
        return d.precision() - d.scale() - 1;
    }

    /** A number rounded to so many decimals; as mantissa and power of ten where plain digits would be hard to read. */
    public static String fixed(double v, int decimals) {
        if (!Double.isFinite(v)) {
            return Double.isNaN(v) ? "no number" : v > 0 ? "∞" : MINUS + "∞";
        }
        BigDecimal d = new BigDecimal(Double.toString(v)).setScale(decimals, RoundingMode.HALF_EVEN);
        if (d.signum() == 0) {
            return decimals > 0 && decimals <= 6 ? d.abs().toPlainString() : "0";
        }
        int power = d.precision() - d.scale() - 1;
        return power < -4 || power > 6 ? scientific(d, power) : minus(d.toPlainString());
    }

    /** A number with so many significant digits: 2.77, −0.00123, 2.8·10⁻¹⁰. */
    public static String significant(double v, int digits) {
        return v == 0 || !Double.isFinite(v) ? fixed(v, 0) : fixed(v, digits - 1 - magnitude(v));
    }

    /** A number in as few digits as name it within so many significant ones: 0.5 stays 0.5, not 0.500. */
    public static String brief(double v, int digits) {
        if (v == 0 || !Double.isFinite(v)) {
            return fixed(v, 0);
        }
        BigDecimal d = new BigDecimal(Double.toString(v)).round(new MathContext(digits, RoundingMode.HALF_EVEN)).stripTrailingZeros();
        return fixed(d.doubleValue(), Math.max(0, d.scale()));
    }

    private static final Pattern GREEK = Pattern.compile("\\b(alpha|beta|gamma|delta|epsilon|eta|theta|lambda|mu|nu|rho|sigma|tau|phi|psi|omega)(?=\\b|_)");
    private static final Map<String, String> LETTERS = Map.ofEntries(Map.entry("alpha", "α"), Map.entry("beta", "β"),
            Map.entry("gamma", "γ"), Map.entry("delta", "δ"), Map.entry("epsilon", "ε"), Map.entry("eta", "η"), Map.entry("theta", "θ"),
            Map.entry("lambda", "λ"), Map.entry("mu", "μ"), Map.entry("nu", "ν"), Map.entry("rho", "ρ"), Map.entry("sigma", "σ"),
            Map.entry("tau", "τ"), Map.entry("phi", "φ"), Map.entry("psi", "ψ"), Map.entry("omega", "ω"));

    /** Names in plain print, where nothing can be typeset: {@code rho_0} as ρ_0. */
    public static String letters(String text) {
        return GREEK.matcher(text).replaceAll(m -> LETTERS.get(m.group(1)));
    }

    /** A doubt, or a value at its worst, rounded away from zero to so many digits. */
    public static String roundedUp(double doubt, int digits) {
        if (doubt == 0 || !Double.isFinite(doubt)) {
            return fixed(doubt, 0);
        }
        // 12 digits first: 0.30000000000000004 is three tenths, not a reason to print 0.4.
        BigDecimal d = new BigDecimal(doubt).round(new MathContext(12, RoundingMode.HALF_EVEN))
                .round(new MathContext(digits, RoundingMode.UP));
        int power = d.precision() - d.scale() - 1;
        return power < -4 || power > 4 ? scientific(d.stripTrailingZeros(), power) : minus(plainDigits(d, digits));
    }

    private static String plainDigits(BigDecimal d, int digits) {
        int power = d.precision() - d.scale() - 1;
        return d.setScale(Math.max(0, digits - 1 - power), RoundingMode.UNNECESSARY).toPlainString();
    }

    private static String scientific(BigDecimal d, int power) {
        String mantissa = d.movePointLeft(power).toPlainString();
        return minus(mantissa) + "·10" + superscript(Integer.toString(power));
    }

    private static String minus(String plain) {
        return plain.replace("-", MINUS);
    }

    /** A number as its author wrote it, in print: {@code 4e-3} as 4·10⁻³, a real minus sign, no digit added or lost. */
    public static String written(String number) {
        int e = Math.max(number.indexOf('e'), number.indexOf('E'));
        return minus(e < 0 ? number : number.substring(0, e)) + (e < 0 ? "" : "·10" + superscript(Integer.toString(Integer.parseInt(number.substring(e + 1)))));
    }

    private static final Pattern POWER = Pattern.compile("(?<![\\w.])(-?\\d+(?:\\.\\d+)?)[eE]([-+]?\\d+)(?![\\w.])|(?<=[A-Za-z)])\\^(-?\\d)(?!\\d)");

    /** Numbers and units within a sentence in print: {@code 1.9e-15} as 1.9·10⁻¹⁵, {@code C/m^3} as C/m³. */
    public static String prose(String text) {
        return POWER.matcher(text).replaceAll(m -> Matcher.quoteReplacement(m.group(3) != null ? superscript(m.group(3))
                : written(m.group(1) + "e" + m.group(2))));
    }

    /** Digits and minus sign raised: "-20" as ⁻²⁰. */
    public static String superscript(String digits) {
        StringBuilder out = new StringBuilder();
        for (char c : digits.toCharArray()) {
            out.append(switch (c) {
                case '-' -> '⁻';
                case '0' -> '⁰';
                case '1' -> '¹';
                case '2' -> '²';
                case '3' -> '³';
                default -> c >= '4' && c <= '9' ? (char) ('⁴' + (c - '4')) : c;
            });
        }
        return out.toString();
    }

    /** Number and unit with the space between, save before a degree sign. The space does not break. */
    public static String withUnit(String number, String printedUnit) {
        if (printedUnit.isEmpty()) {
            return number;
        }
        return printedUnit.equals("°") ? number + "°" : number + "\u00a0" + printedUnit;
    }
}

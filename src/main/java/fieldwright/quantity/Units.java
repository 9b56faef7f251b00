package fieldwright.quantity;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import javax.measure.Dimension;
import javax.measure.Unit;

/**
 * Unit texts of the trade: {@code uC/m^2}, {@code µC/m²}, {@code kV/cm}, {@code pF/m}, {@code m^2/(V*s)}, {@code deg}, {@code %}.
 *
 * <p>Writing: symbols with SI prefixes, {@code *} or {@code ·} between factors, one or more {@code /}, read from left to
 * right with brackets, powers as {@code ^3}, {@code ^-1}, {@code ²}. Micro is {@code u}, {@code µ} or {@code μ}. Definitions
 * and conversion factors of SI units come from JSR 385 (Indriya); factors are kept exactly and rounded once.
 */
public final class Units {
    public static final Dimension NONE = Dimensions.of(0, 0, 0, 0);
    public static final Dimension LENGTH = Dimensions.of(1, 0, 0, 0);
    public static final Dimension AREA = Dimensions.of(2, 0, 0, 0);
    public static final Dimension VOLUME = Dimensions.of(3, 0, 0, 0);
    public static final Dimension MASS = Dimensions.of(0, 1, 0, 0);
    public static final Dimension TIME = Dimensions.of(0, 0, 1, 0);
    public static final Dimension CURRENT = Dimensions.of(0, 0, 0, 1);
    public static final Dimension CHARGE = Dimensions.of(0, 0, 1, 1);
    public static final Dimension LINE_DENSITY = Dimensions.of(-1, 0, 1, 1);
    public static final Dimension SURFACE_DENSITY = Dimensions.of(-2, 0, 1, 1);
    public static final Dimension VOLUME_DENSITY = Dimensions.of(-3, 0, 1, 1);
    public static final Dimension POTENTIAL = Dimensions.of(2, 1, -3, -1);
    public static final Dimension FIELD = Dimensions.of(1, 1, -3, -1);
    public static final Dimension CAPACITANCE = Dimensions.of(-2, -1, 4, 2);
    public static final Dimension PERMITTIVITY = Dimensions.of(-3, -1, 4, 2);
    public static final Dimension FORCE = Dimensions.of(1, 1, -2, 0);
    public static final Dimension ENERGY = Dimensions.of(2, 1, -2, 0);

    private static final MathContext DIGITS = new MathContext(40);
    private static final BigDecimal PI = new BigDecimal("3.141592653589793238462643383279502884197169");
    private static final Map<String, Exact> PARSED = new ConcurrentHashMap<>();
    private static final Map<String, Integer> PREFIXES = prefixes();
    private static final Map<String, Symbol> SYMBOLS = symbols();
    private static final Map<Dimension, String> PREFERRED = preferredTexts();
    private static final Map<Dimension, String> NAMES = quantityNames();

    private Units() {
    }

    /** 1 unit = numerator/denominator in SI. */
    private record Exact(BigDecimal numerator, BigDecimal denominator, Dimensions dimension) {
        static final Exact ONE = new Exact(BigDecimal.ONE, BigDecimal.ONE, (Dimensions) NONE);

        Exact times(Exact o) {
            return new Exact(numerator.multiply(o.numerator, DIGITS), denominator.multiply(o.denominator, DIGITS),
                dimension.multiply(o.dimension));
        }

        Exact power(int n) {
            Exact base = n < 0 ? new Exact(denominator, numerator, dimension.pow(-1)) : this;
            Exact result = ONE;
            for (int i = 0; i < Math.abs(n); i++) {
                result = result.times(base);
            }
            return result;
        }

        double factor() {
            return numerator.divide(denominator, DIGITS).doubleValue();
        }
    }

    private record Symbol(Exact value, boolean prefixable) {
    }

    /**
     * Reads a unit text. Errors: {@link AuthorException} naming the part that is not understood.
     * The empty text and {@code 1} are the plain number.
     */
    public static TradeUnit parse(String text) {
        Exact exact = exact(text);
        return new TradeUnit(text.strip(), exact.factor(), exact.dimension());
    }

    /** True when the text alone is a unit symbol with or without prefix: {@code m}, {@code kV}, {@code %}. */
    public static boolean isSymbol(String text) {
        return symbol(normal(text)) != null;
    }

    /** {@code value} in SI, rounded once; see {@link Amount#of(BigDecimal, String)} for the error. */
    static double toSi(BigDecimal value, String unit) {
        Exact exact = exact(unit);
        return value.multiply(exact.numerator, DIGITS).divide(exact.denominator, DIGITS).doubleValue();
    }

    /** The SI number as a decimal in the unit, to 20 digits: for exact displays. */
    public static BigDecimal fromSi(double si, String unit) {
        Exact exact = exact(unit);
        return new BigDecimal(si).multiply(exact.denominator, DIGITS).divide(exact.numerator, new MathContext(20));
    }

    /** Unit for a number of this dimension when nobody chose one: V/m, C, F, …, else a product of base units; "" if plain. */
    public static String preferred(Dimension dimension) {
        String known = PREFERRED.get(Dimensions.of(dimension));
        return known != null ? known : product(Dimensions.of(dimension));
    }

    private static String product(Dimensions dimension) {
        StringBuilder above = new StringBuilder();
        List<String> below = new ArrayList<>();
        dimension.exponents().forEach((unit, e) -> {
            String size = e.startsWith("-") ? e.substring(1) : e;
            String power = size.equals("1") ? unit : unit + "^" + (size.contains("/") ? "(" + size + ")" : size);
            if (e.startsWith("-")) {
                below.add(power);
            } else {
                above.append(above.length() == 0 ? "" : "*").append(power);
            }
        });
        if (below.isEmpty()) {
            return above.toString();
        }
        String denominator = String.join("*", below);
        return (above.length() == 0 ? "1" : above) + "/" + (below.size() > 1 ? "(" + denominator + ")" : denominator);
    }

    /** For messages: "a length (m)", "a plain number", "a quantity in m^3*kg". */
    public static String describe(Dimension dimension) {
        Dimensions d = Dimensions.of(dimension);
        if (d.isNone()) {
            return "a plain number";
        }
        String name = NAMES.get(d);
        return name != null ? name + " (" + preferred(d) + ")" : "a quantity in " + preferred(d);
    }

    private static Exact exact(String text) {
        Exact known = PARSED.get(text);
        if (known == null) {
            known = new Reader(text, normal(text)).unit();
            if (PARSED.size() < 4096) {
                PARSED.put(text, known);
            }
        }
        return known;
    }

    /** One writing for each sign: u for micro, * for products, ^ for powers. */
    private static String normal(String text) {
        StringBuilder b = new StringBuilder(text.length());
        boolean inPower = false;
        for (int i = 0; i < text.length(); i++) {
            char c = text.charAt(i);
            int digit = "\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079".indexOf(c);
            if (digit >= 0 || c == '\u207b') {
                b.append(inPower ? "" : "^").append(c == '\u207b' ? "-" : Integer.toString(digit));
                inPower = true;
                continue;
            }
            inPower = false;
            switch (c) {
                case '\u00b5', '\u03bc' -> b.append('u');
                case '\u00b7', '\u22c5', '\u00d7' -> b.append('*');
                case '\u2212', '\u2010', '\u2011' -> b.append('-');
                case '\u2126', '\u03a9' -> b.append("Ohm");
                case '\u00b0' -> b.append("deg");
                default -> b.append(c);
            }
        }
        return b.toString().strip();
    }

    private static Exact symbol(String s) {
        Symbol plain = SYMBOLS.get(s);
        if (plain != null) {
            return plain.value();
        }
        for (int length = 1; length <= 2 && length < s.length(); length++) {
            Integer power = PREFIXES.get(s.substring(0, length));
            Symbol rest = SYMBOLS.get(s.substring(length));
            if (power != null && rest != null && rest.prefixable()) {
                return scaled(power).times(rest.value());
            }
        }
        return null;
    }

    private static Exact scaled(int powerOfTen) {
        return new Exact(BigDecimal.ONE.scaleByPowerOfTen(powerOfTen), BigDecimal.ONE, (Dimensions) NONE);
    }

    /** unit: factor { (*|/) factor }; factor: (symbol | 1 | bracket) [^ integer]. */
    private static final class Reader {
        private final String written;
        private final String s;
        private int at;

        Reader(String written, String normal) {
            this.written = written;
            this.s = normal;
        }

        Exact unit() {
            if (s.isEmpty()) {
                return Exact.ONE;
            }
            Exact result = product();
            if (at < s.length()) {
                throw wrong("unexpected '" + s.charAt(at) + "'");
            }
            return result;
        }

        private Exact product() {
            Exact result = factor();
            while (true) {
                blanks();
                if (at < s.length() && (s.charAt(at) == '*' || s.charAt(at) == '/')) {
                    boolean divide = s.charAt(at++) == '/';
                    result = result.times(factor().power(divide ? -1 : 1));
                } else {
                    return result;
                }
            }
        }

        private Exact factor() {
            blanks();
            Exact base;
            if (at < s.length() && s.charAt(at) == '(') {
                at++;
                base = product();
                blanks();
                if (at >= s.length() || s.charAt(at) != ')') {
                    throw wrong("a closing bracket is missing");
                }
                at++;
            } else {
                base = symbolHere();
            }
            blanks();
            if (at < s.length() && s.charAt(at) == '^') {
                at++;
                return base.power(exponent());
            }
            return base;
        }

        private Exact symbolHere() {
            int from = at;
            while (at < s.length() && (Character.isLetter(s.charAt(at)) || s.charAt(at) == '_' || s.charAt(at) == '%')) {
                at++;
            }
            String found = s.substring(from, at);
            if (found.isEmpty()) {
                if (s.startsWith("1", at)) {
                    at++;
                    return Exact.ONE;
                }
                throw wrong(at < s.length() ? "a unit is expected where '" + s.substring(at) + "' stands" : "it ends too early");
            }
            Exact value = symbol(found);
            if (value == null) {
                String near = UnknownNameException.nearest(found, SYMBOLS.keySet());
                throw wrong("no unit '" + found + "'" + (near == null ? "" : "; closest: '" + near + "'"));
            }
            return value;
        }

        private int exponent() {
            blanks();
            boolean bracket = at < s.length() && s.charAt(at) == '(';
            at += bracket ? 1 : 0;
            int from = at;
            if (at < s.length() && (s.charAt(at) == '-' || s.charAt(at) == '+')) {
                at++;
            }
            while (at < s.length() && Character.isDigit(s.charAt(at))) {
                at++;
            }
            String digits = s.substring(from, at);
            if (!digits.matches("[+-]?[0-9]{1,2}")) {
                throw wrong("after ^ a whole number is expected");
            }
            if (bracket) {
                if (at >= s.length() || s.charAt(at) != ')') {
                    throw wrong("after ^ a whole number is expected");
                }
                at++;
            }
            return Integer.parseInt(digits);
        }

        private void blanks() {
            while (at < s.length() && Character.isWhitespace(s.charAt(at))) {
                at++;
            }
        }

        private AuthorException wrong(String what) {
            return new AuthorException("unit '" + written.strip() + "': " + what
                + ". Write units like uC/m^3, kV/cm, pF/m, m^2/(V*s), deg, %.");
        }
    }

    private static Map<String, Integer> prefixes() {
        Map<String, Integer> p = new LinkedHashMap<>();
        String[] letters = {"f", "p", "n", "u", "m", "c", "d", "da", "h", "k", "M", "G", "T", "P", "a"};
        int[] powers = {-15, -12, -9, -6, -3, -2, -1, 1, 2, 3, 6, 9, 12, 15, -18};
        for (int i = 0; i < letters.length; i++) {
            p.put(letters[i], powers[i]);
        }
        return p;
    }

    private static Map<String, Symbol> symbols() {
        Map<String, Symbol> s = new LinkedHashMap<>();
        s.put("m", si(tech.units.indriya.unit.Units.METRE));
        s.put("g", si(tech.units.indriya.unit.Units.GRAM));
        s.put("s", si(tech.units.indriya.unit.Units.SECOND));
        s.put("A", si(tech.units.indriya.unit.Units.AMPERE));
        s.put("K", si(tech.units.indriya.unit.Units.KELVIN));
        s.put("mol", si(tech.units.indriya.unit.Units.MOLE));
        s.put("cd", si(tech.units.indriya.unit.Units.CANDELA));
        s.put("C", si(tech.units.indriya.unit.Units.COULOMB));
        s.put("V", si(tech.units.indriya.unit.Units.VOLT));
        s.put("F", si(tech.units.indriya.unit.Units.FARAD));
        s.put("N", si(tech.units.indriya.unit.Units.NEWTON));
        s.put("J", si(tech.units.indriya.unit.Units.JOULE));
        s.put("W", si(tech.units.indriya.unit.Units.WATT));
        s.put("Hz", si(tech.units.indriya.unit.Units.HERTZ));
        s.put("Ohm", si(tech.units.indriya.unit.Units.OHM));
        s.put("ohm", s.get("Ohm"));
        s.put("S", si(tech.units.indriya.unit.Units.SIEMENS));
        s.put("T", si(tech.units.indriya.unit.Units.TESLA));
        s.put("Wb", si(tech.units.indriya.unit.Units.WEBER));
        s.put("H", si(tech.units.indriya.unit.Units.HENRY));
        s.put("Pa", si(tech.units.indriya.unit.Units.PASCAL));
        s.put("L", si(tech.units.indriya.unit.Units.LITRE));
        s.put("min", fixed(si(tech.units.indriya.unit.Units.MINUTE).value()));
        s.put("h", fixed(si(tech.units.indriya.unit.Units.HOUR).value()));
        s.put("bar", new Symbol(scaled(5).times(s.get("Pa").value()), true));
        // Elementary charge and electronvolt: exact in the SI of 2019.
        Exact elementary = new Exact(new BigDecimal("1.602176634e-19"), BigDecimal.ONE, (Dimensions) CHARGE);
        s.put("q_e", fixed(elementary));
        s.put("e", fixed(elementary));
        s.put("eV", new Symbol(elementary.times(s.get("V").value()), true));
        s.put("rad", new Symbol(Exact.ONE, true));
        s.put("sr", fixed(Exact.ONE));
        s.put("deg", fixed(new Exact(PI, new BigDecimal(180), (Dimensions) NONE)));
        s.put("%", fixed(scaled(-2)));
        s.put("ppm", fixed(scaled(-6)));
        return s;
    }

    private static Symbol fixed(Exact value) {
        return new Symbol(value, false);
    }

    private static Symbol si(Unit<?> unit) {
        try {
            Number factor = unit.getConverterToAny(unit.getSystemUnit()).convert((Number) 1);
            return new Symbol(new Exact(decimal(factor), BigDecimal.ONE, Dimensions.of(unit.getDimension())), true);
        } catch (javax.measure.IncommensurableException e) {
            throw new IllegalStateException(e);
        }
    }

    /** Whole numbers and terminating fractions only: that is what the units above have. */
    private static BigDecimal decimal(Number n) {
        if (n instanceof tech.units.indriya.function.RationalNumber r) {
            return new BigDecimal(r.getDividend()).divide(new BigDecimal(r.getDivisor()));
        }
        return new BigDecimal(n.toString());
    }

    private static Map<Dimension, String> preferredTexts() {
        Map<Dimension, String> p = new LinkedHashMap<>();
        for (String text : new String[] {"V/m", "C", "F", "V", "C/m", "C/m^2", "C/m^3", "F/m", "N", "J", "W", "Ohm", "S",
            "H", "T", "Wb", "Pa", "m", "m^2", "m^3", "kg", "s", "A", "K", "mol", "cd", "Hz", "C*m", "C*m^2", "V*m", "V/m^2",
            "S/m", "Ohm*m", "A/m", "A/m^2", "N/m", "m^2/(V*s)", "H/m", "F/m^2", "C/kg"}) {
            p.putIfAbsent(exact(text).dimension(), text);
        }
        p.put(NONE, "");
        return p;
    }

    private static Map<Dimension, String> quantityNames() {
        Map<Dimension, String> n = new LinkedHashMap<>();
        String[][] names = {{"m", "a length"}, {"m^2", "an area"}, {"m^3", "a volume"}, {"kg", "a mass"}, {"s", "a time"},
            {"A", "a current"}, {"K", "a temperature"}, {"C", "a charge"}, {"C/m", "a line charge density"},
            {"C/m^2", "a surface charge density"}, {"C/m^3", "a volume charge density"}, {"V", "a potential"},
            {"V/m", "an electric field"}, {"F", "a capacitance"}, {"F/m", "a permittivity"}, {"N", "a force"},
            {"J", "an energy"}, {"W", "a power"}, {"Hz", "a rate"}, {"Ohm", "a resistance"}, {"Pa", "a pressure"},
            {"C*m", "a dipole moment"}, {"m/s", "a speed"}, {"T", "a magnetic flux density"}};
        for (String[] row : names) {
            n.put(exact(row[0]).dimension(), row[1]);
        }
        return n;
    }
}

package fieldwright.formula;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/** How names are written: one ASCII name for each, which is the Java name too; and which names are taken. */
public final class Names {
    private static final Map<Character, String> GREEK = greek();
    private static final String SUBSCRIPTS = "\u2080\u2081\u2082\u2083\u2084\u2085\u2086\u2087\u2088\u2089";
    private static final Set<String> JAVA = Set.of("abstract", "assert", "boolean", "break", "byte", "case", "catch", "char", "class",
        "const", "continue", "default", "do", "double", "else", "enum", "extends", "final", "finally", "float", "for", "goto", "if",
        "implements", "import", "instanceof", "int", "interface", "long", "native", "new", "package", "private", "protected", "public",
        "return", "short", "static", "strictfp", "super", "switch", "synchronized", "this", "throw", "throws", "transient", "try", "void",
        "volatile", "while", "true", "false", "null", "_", "var", "record", "yield", "sealed", "permits");
    static final Set<String> WORDS = Set.of("inf", "when", "integral", "and", "or", "not", "for", "to", "in", "corr");

    private Names() {
    }

    /** The ASCII name: Greek letters spelled out (ρ is rho, ϑ is theta, ε is eps), subscript digits after an underscore. */
    public static String fold(String name) {
        StringBuilder b = new StringBuilder(name.length());
        for (int i = 0; i < name.length(); i++) {
            char c = name.charAt(i);
            int subscript = SUBSCRIPTS.indexOf(c);
            if (subscript >= 0) {
                boolean first = i == 0 || SUBSCRIPTS.indexOf(name.charAt(i - 1)) < 0;
                b.append(first && i > 0 && name.charAt(i - 1) != '_' ? "_" : "").append(subscript);
            } else {
                b.append(GREEK.getOrDefault(c, String.valueOf(c)));
            }
        }
        String folded = b.toString();
        return folded.equals("eps_0") ? "eps0" : folded;
    }

    static boolean startsName(char c) {
        return c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c == '_' || GREEK.containsKey(c);
    }

    static boolean continuesName(char c) {
        return startsName(c) || c >= '0' && c <= '9' || SUBSCRIPTS.indexOf(c) >= 0;
    }

    /** True for a letter, then letters, digits and underscores, after folding. */
    public static boolean isName(String text) {
        return !text.isEmpty() && startsName(text.charAt(0)) && text.chars().allMatch(c -> continuesName((char) c));
    }

    /**
     * Why a quantity cannot have this (folded) name, as a message with remedy; null when it can. Unit symbols may be names:
     * only directly after a number is a name read as a unit.
     */
    public static String whyReserved(String name) {
        String what = !isName(name) ? "not a name: write a letter, then letters, digits and underscores"
            : Coordinates.is(name) ? "a coordinate"
            : Constants.is(name) ? "a constant"
            : Function.isName(name) ? "a function"
            : WORDS.contains(name) ? "a word of the formula language"
            : JAVA.contains(name) ? "a Java keyword"
            : null;
        return what == null ? null
            : "name '" + name + "' is " + (isName(name) ? "reserved (" + what + "). Choose another, such as '" + name + "_1'." : what + ".");
    }

    /** All names that cannot be declared, sorted. */
    public static List<String> reserved() {
        List<String> all = new ArrayList<>();
        for (Collection<String> part : List.of(Coordinates.NAMES, Constants.names(), Function.names(), WORDS, JAVA)) {
            all.addAll(part);
        }
        return all.stream().distinct().sorted().toList();
    }

    private static Map<Character, String> greek() {
        Map<Character, String> g = new HashMap<>();
        List<String> names = Arrays.asList("alpha", "beta", "gamma", "delta", "eps", "zeta", "eta", "theta", "iota", "kappa", "lambda",
            "mu", "nu", "xi", "omicron", "pi", "rho", "sigma", "sigma", "tau", "upsilon", "phi", "chi", "psi", "omega");
        for (int i = 0; i < names.size(); i++) {
            String small = names.get(i);
            g.put((char) (0x3b1 + i), small);
            if (i != 17) {   // capital final sigma does not exist
                g.put((char) (0x391 + i), Character.toUpperCase(small.charAt(0)) + small.substring(1));
            }
        }
        g.put('\u03d1', "theta");
        g.put('\u03d5', "phi");
        g.put('\u03f5', "eps");
        g.put('\u03f1', "rho");
        g.put('\u03f0', "kappa");
        g.put('\u03d6', "pi");
        g.put('\u00b5', "mu");
        g.put('\u2126', "Omega");
        return g;
    }
}

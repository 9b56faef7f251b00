package fieldwright.cli;

import java.util.Map;
import java.util.regex.Pattern;

/** Text for terminals that show ASCII only. */
final class Ascii {
    private static final String RAISED = "⁰¹²³⁴⁵⁶⁷⁸⁹⁻";
    private static final String PLAIN = "0123456789-";
    private static final Pattern POWER_OF_TEN = Pattern.compile("[·×]10([" + RAISED + "]+)");
    private static final Pattern RAISED_RUN = Pattern.compile("[" + RAISED + "]+");
    private static final Pattern GREEK = Pattern.compile("[αβγδεϵζηθϑικλμνξπρστφϕχψωΔΣΦΨΩΛΓ]");
    private static final Map<String, String> GREEK_NAMES = Map.ofEntries(
            Map.entry("α", "alpha"), Map.entry("β", "beta"), Map.entry("γ", "gamma"), Map.entry("δ", "delta"), Map.entry("ε", "epsilon"),
            Map.entry("ϵ", "epsilon"), Map.entry("ζ", "zeta"), Map.entry("η", "eta"), Map.entry("θ", "theta"), Map.entry("ϑ", "theta"),
            Map.entry("ι", "iota"), Map.entry("κ", "kappa"), Map.entry("λ", "lambda"), Map.entry("μ", "u"), Map.entry("ν", "nu"),
            Map.entry("ξ", "xi"), Map.entry("π", "pi"), Map.entry("ρ", "rho"), Map.entry("σ", "sigma"), Map.entry("τ", "tau"),
            Map.entry("φ", "phi"), Map.entry("ϕ", "phi"), Map.entry("χ", "chi"), Map.entry("ψ", "psi"), Map.entry("ω", "omega"),
            Map.entry("Δ", "Delta"), Map.entry("Σ", "Sigma"), Map.entry("Φ", "Phi"), Map.entry("Ψ", "Psi"), Map.entry("Ω", "ohm"),
            Map.entry("Λ", "Lambda"), Map.entry("Γ", "Gamma"));

    private Ascii() { }

    /** Marks, units and Greek letters by their usual stand-ins; what has none becomes a question mark. */
    static String of(String text) {
        String plain = powersOfTen(text);
        plain = RAISED_RUN.matcher(plain).replaceAll(run -> "^" + lowered(run.group()));
        plain = GREEK.matcher(plain).replaceAll(letter -> GREEK_NAMES.get(letter.group()));
        plain = plain.replace("✓", "ok  ").replace("✕", "FAIL").replace("±", "+/-").replace("µ", "u").replace("·", "*").replace("×", "x")
                .replace("−", "-").replace("–", "-").replace("—", "-").replace("°", " deg").replace("∞", "inf").replace("∫", "integral ")
                .replace("≤", "<=").replace("≥", ">=").replace("≈", "~").replace("≪", "<<").replace("≫", ">>").replace("…", "...")
                .replace("\u00a0", " ").replace("’", "'").replace("‘", "'").replace("“", "\"").replace("”", "\"");
        return plain.replaceAll("[^\\x00-\\x7F]", "?");
    }

    /** {@code 3·10⁻²⁰} as {@code 3e-20}. */
    static String powersOfTen(String text) {
        return POWER_OF_TEN.matcher(text).replaceAll(power -> "e" + lowered(power.group(1)));
    }

    private static String lowered(String raised) {
        StringBuilder plain = new StringBuilder();
        for (char c : raised.toCharArray()) {
            plain.append(PLAIN.charAt(RAISED.indexOf(c)));
        }
        return plain.toString();
    }
}

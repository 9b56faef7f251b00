package fieldwright.app;

import fieldwright.sheet.DeriveEntry;
import java.util.Set;
import java.util.stream.Collectors;

/** Names and formulas of the sheet as LaTeX, before anything was worked out: only the text is read. */
final class Notation {
    private static final Set<String> GREEK = Set.of("alpha", "beta", "gamma", "delta", "epsilon", "zeta", "eta", "theta", "kappa",
            "lambda", "mu", "nu", "xi", "pi", "rho", "sigma", "tau", "phi", "chi", "psi", "omega", "Gamma", "Delta", "Theta", "Lambda",
            "Xi", "Pi", "Sigma", "Phi", "Psi", "Omega");

    private Notation() { }

    /** {@code rho_0} as {@code \rho_{0}}, {@code E_roof} as {@code E_{\mathrm{roof}}}. */
    static String name(String name) {
        int bar = name.indexOf('_');
        if (bar <= 0 || bar == name.length() - 1) {
            return letters(name);
        }
        return letters(name.substring(0, bar)) + "_{" + letters(name.substring(bar + 1).replace("_", ",")) + "}";
    }

    private static String letters(String part) {
        if (GREEK.contains(part)) {
            return part.equals("epsilon") ? "\\varepsilon" : part.equals("phi") ? "\\varphi" : "\\" + part;
        }
        return part.length() == 1 ? part : "\\mathrm{" + part.replaceAll("[^\\p{Alnum},]", "\\\\,") + "}";
    }

    /** A derive line as it is read: name, formula, unit it is shown in, condition. */
    static String line(DeriveEntry entry) {
        return left(entry) + " = " + formula(entry.formula())
                + (entry.condition().isEmpty() ? "" : "\\quad\\text{for } " + formula(entry.condition()));
    }

    /** A line that goes on: {@code = …} or {@code ≈ … for …}. */
    static String line(DeriveEntry.Continuation next) {
        return (next.relation() == DeriveEntry.Relation.EQUAL ? "= " : "\\approx ") + formula(next.formula())
                + (next.condition().isEmpty() ? "" : "\\quad\\text{for } " + formula(next.condition()));
    }

    static String formula(String text) {
        return "\\text{" + text.replaceAll("[^\\p{Alnum} +\\-*/=().,:;<>|]", " ") + "}";
    }

    /** The left side of a derive line: {@code f(a,b)}. */
    static String left(DeriveEntry entry) {
        String arguments = entry.parameters().stream().map(p -> name(p.name())).collect(Collectors.joining(",\\,"));
        return name(entry.name()) + (arguments.isEmpty() ? "" : "\\left(" + arguments + "\\right)");
    }
}

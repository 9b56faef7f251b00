package fieldwright.draw;

import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Where a line of LaTeX may be broken: before a relation, else before a sum's operator, never inside brackets, braces
 * or an environment. Plain brackets count as much as {@code \left( \right)}.
 */
final class Breaks {
    /** A part of the line, with the rank of the place before it. */
    record Part(String latex, Rank before) { }

    enum Rank { START, RELATION, SUM }

    private static final Pattern TOKEN = Pattern.compile("\\\\(?:left|right)\\s*(?:\\\\[A-Za-z]+|\\\\.|.)|\\\\(?:begin|end)\\{[^}]*\\}|\\\\[A-Za-z]+|\\\\.|\\s+|.",
            Pattern.DOTALL);
    private static final Set<String> RELATIONS = Set.of("=", "<", ">", "\\approx", "\\le", "\\leq", "\\ge", "\\geq", "\\sim", "\\simeq",
            "\\equiv", "\\ne", "\\neq", "\\ll", "\\gg", "\\propto", "\\to");
    private static final Set<String> SUMS = Set.of("+", "-", "\\pm", "\\mp");
    private static final Set<String> SPACES = Set.of("\\,", "\\;", "\\:", "\\ ", "\\quad", "\\qquad", "\\!");

    private Breaks() { }

    /** The typesetter reads on past a missing brace and leaves out what follows; that must not pass for the formula. */
    static void requireClosedBraces(String latex) {
        int depth = 0;
        Matcher tokens = TOKEN.matcher(latex);
        while (tokens.find() && depth >= 0) {
            depth += tokens.group().equals("{") ? 1 : tokens.group().equals("}") ? -1 : 0;
        }
        if (depth != 0) {
            throw new IllegalArgumentException("braces do not close in " + latex);
        }
    }

    static List<Part> parts(String latex) {
        List<Part> parts = new ArrayList<>();
        StringBuilder part = new StringBuilder();
        Rank before = Rank.START;
        boolean operand = false;   // a sign after nothing or after another operator is no place to break
        int depth = 0;
        Matcher tokens = TOKEN.matcher(latex);
        while (tokens.find()) {
            String token = tokens.group();
            depth += step(token);
            Rank rank = depth != 0 ? null : RELATIONS.contains(token) ? Rank.RELATION : SUMS.contains(token) ? Rank.SUM : null;
            if (rank != null && operand) {
                parts.add(new Part(part.toString(), before));
                part.setLength(0);
                before = rank;
            }
            part.append(token);
            operand = rank == null && (operand || !token.isBlank() && !SPACES.contains(token));
        }
        parts.add(new Part(part.toString(), before));
        return parts;
    }

    private static int step(String token) {
        if (token.startsWith("\\left") && token.length() > 5 && !Character.isLetter(token.charAt(5)) || token.startsWith("\\begin{")
                || token.equals("{") || token.equals("(") || token.equals("[")) {
            return 1;
        }
        if (token.startsWith("\\right") && token.length() > 6 && !Character.isLetter(token.charAt(6)) || token.startsWith("\\end{")
                || token.equals("}") || token.equals(")") || token.equals("]")) {
            return -1;
        }
        return 0;
    }
}

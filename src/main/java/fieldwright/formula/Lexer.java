package fieldwright.formula;

import java.util.ArrayList;
import java.util.List;

/** Text to tokens. Unicode signs become the ASCII ones; offsets stay those of the text. */
final class Lexer {
    enum Kind { NUMBER, NAME, SUPERSCRIPT, SIGN, END }

    /** @param text folded; {@code written} as it stands in the text */
    record Token(Kind kind, String text, String written, int from) {
    }

    private static final String SUPERSCRIPTS = "\u2070\u00b9\u00b2\u00b3\u2074\u2075\u2076\u2077\u2078\u2079";
    private final String s;
    private final List<Token> tokens = new ArrayList<>();
    private int at;

    Lexer(String text) {
        this.s = text;
    }

    List<Token> tokens() {
        while (at < s.length()) {
            char c = s.charAt(at);
            if (Character.isWhitespace(c) || Character.isSpaceChar(c)) {
                at++;
            } else if (isDigit(c) || c == '.' && at + 1 < s.length() && isDigit(s.charAt(at + 1))) {
                number();
            } else if (Names.startsName(c)) {
                name();
            } else if (SUPERSCRIPTS.indexOf(c) >= 0 || c == '\u207b') {
                superscript();
            } else {
                sign(c);
            }
        }
        add(Kind.END, "", s.length());
        return tokens;
    }

    private void number() {
        int from = at;
        digits();
        if (at < s.length() && s.charAt(at) == '.') {
            at++;
            digits();
        }
        if (at < s.length() && (s.charAt(at) == 'e' || s.charAt(at) == 'E')) {
            int digit = at + 1;
            if (digit < s.length() && "+-\u2212".indexOf(s.charAt(digit)) >= 0) {
                digit++;
            }
            if (digit < s.length() && isDigit(s.charAt(digit))) {
                at = digit;
                digits();
            }
        }
        if (at < s.length() && s.charAt(at) == '.') {
            throw new FormulaException(s, at, "a second decimal point in " + s.substring(from, at + 1) + ". Remove one.");
        }
        if (at - from > 400) {
            throw new FormulaException(s, from, "a number of " + (at - from) + " characters. Write it shorter.");
        }
        add(Kind.NUMBER, s.substring(from, at).replace('\u2212', '-'), from);
    }

    private void digits() {
        while (at < s.length() && isDigit(s.charAt(at))) {
            at++;
        }
    }

    private static boolean isDigit(char c) {
        return c >= '0' && c <= '9';
    }

    /** {@code R_s}, and {@code closedForms.E_ring}: a name of a library sheet with that of the sheet before it. */
    private void name() {
        int from = at;
        word();
        while (at + 1 < s.length() && s.charAt(at) == '.' && Names.startsName(s.charAt(at + 1))) {
            at++;
            word();
        }
        String written = s.substring(from, at);
        tokens.add(new Token(Kind.NAME, Names.fold(written), written, from));
    }

    private void word() {
        while (at < s.length() && Names.continuesName(s.charAt(at))) {
            at++;
        }
    }

    private void superscript() {
        int from = at;
        StringBuilder b = new StringBuilder();
        while (at < s.length() && (SUPERSCRIPTS.indexOf(s.charAt(at)) >= 0 || s.charAt(at) == '\u207b')) {
            b.append(s.charAt(at) == '\u207b' ? "-" : Integer.toString(SUPERSCRIPTS.indexOf(s.charAt(at))));
            at++;
        }
        if (!b.toString().matches("-?[0-9]{1,3}")) {
            throw new FormulaException(s, from, "the raised " + s.substring(from, at) + " is not a whole number. Write ^ and the exponent.");
        }
        add(Kind.SUPERSCRIPT, b.toString(), from);
    }

    private void sign(char c) {
        int from = at++;
        char following = at < s.length() ? s.charAt(at) : 0;
        switch (c) {
            case '+', '-', '/', '^', '(', ')', ',', ':', '%', '\u00b0' -> add(Kind.SIGN, String.valueOf(c), from);
            case '*' -> {
                if (following == '*') {
                    throw new FormulaException(s, from, "'**' is no operator. A power is written a^2.");
                }
                add(Kind.SIGN, "*", from);
            }
            case '\u2212', '\u2013' -> add(Kind.SIGN, "-", from);
            case '\u00d7', '\u00b7', '\u22c5', '\u2217' -> add(Kind.SIGN, "*", from);
            case '\u00f7', '\u2215' -> add(Kind.SIGN, "/", from);
            case '\u221e' -> tokens.add(new Token(Kind.NAME, "inf", "\u221e", from));
            case '\u2264' -> add(Kind.SIGN, "<=", from);
            case '\u2265' -> add(Kind.SIGN, ">=", from);
            case '\u226a' -> add(Kind.SIGN, "<<", from);
            case '\u226b' -> add(Kind.SIGN, ">>", from);
            case '<', '>' -> {
                if (following == '=' || following == c) {
                    at++;
                    add(Kind.SIGN, c + String.valueOf(following), from);
                } else {
                    add(Kind.SIGN, String.valueOf(c), from);
                }
            }
            case '=' -> add(Kind.SIGN, "=", from);
            case ';' -> throw new FormulaException(s, from, "';' in a formula. Arguments are separated by commas.");
            case '[', ']', '{', '}' -> throw new FormulaException(s, from, "'" + c + "' in a formula. Use round brackets.");
            default -> throw new FormulaException(s, from, "the character '" + new String(Character.toChars(s.codePointAt(from)))
                + "' has no meaning in a formula. Remove it.");
        }
    }

    private void add(Kind kind, String text, int from) {
        tokens.add(new Token(kind, text, s.substring(from, Math.max(from, at)), from));
    }
}

package fieldwright.session.snippet;

import java.util.HashSet;
import java.util.Optional;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * What can be told of a piece of Java text without compiling it: its identifiers, and the name it declares when it is
 * the declaration of a variable.
 *
 * <p>It knows no scopes: a lambda's parameter counts like a use. Whoever asks must be content with more names than are
 * really used.
 */
final class JavaText {
    private static final Pattern WORD =
            Pattern.compile("(?<!\\p{javaJavaIdentifierPart})\\p{javaJavaIdentifierStart}\\p{javaJavaIdentifierPart}*");
    private static final Pattern PART_BEFORE = Pattern.compile("(?:::|(?<!\\.\\.)\\.)\\s*$");
    private static final Pattern MODIFIERS =
            Pattern.compile("(?:(?:final|static|public|private|protected|transient|volatile|@[\\p{javaJavaIdentifierPart}.]+(?:\\([^)]*\\))?)\\s+)*");
    /** Words that can stand before a name without being its type. */
    private static final Set<String> NO_TYPES = Set.of("return", "throw", "assert", "yield", "break", "continue", "new",
            "else", "do", "import", "package", "class", "interface", "enum", "record", "goto");

    private static final Pattern TYPE_HEAD = Pattern.compile("(?:^|\\s)(?:class|interface|enum|record)\\s+(\\p{javaJavaIdentifierStart}\\p{javaJavaIdentifierPart}*)");
    /** Type, name, arguments, perhaps exceptions: what stands before the body of a method. */
    private static final Pattern METHOD_HEAD = Pattern.compile("[\\p{javaJavaIdentifierPart}\\s.,<>?&\\[\\]@]*[\\p{javaJavaIdentifierPart}>\\]]\\s+"
            + "(\\p{javaJavaIdentifierStart}\\p{javaJavaIdentifierPart}*)\\s*\\([^()=;]*\\)\\s*(?:throws\\s[^{(=;]*)?");

    /** Where a variable's declaration has its name. */
    record Declared(String name, int start, boolean several) {
        int end() {
            return start + name.length();
        }
    }

    private final String masked;

    JavaText(String text) {
        this.masked = mask(text);
    }

    /** Offset of the first code. */
    int start() {
        return skipSpace(0);
    }

    /** The identifiers that stand by themselves; keywords among them. */
    Set<String> free() {
        return words(false);
    }

    /** All identifiers, also those that name a part of something: {@code a.b}. */
    Set<String> all() {
        return words(true);
    }

    private Set<String> words(boolean parts) {
        Set<String> words = new HashSet<>();
        Matcher word = WORD.matcher(masked);
        while (word.find()) {
            if (parts || !isPart(word.start())) {
                words.add(word.group());
            }
        }
        return words;
    }

    private boolean isPart(int start) {
        return PART_BEFORE.matcher(masked.substring(Math.max(0, start - 40), start)).find();
    }

    /** True when the name of a variable stands anywhere else than at one offset; a call of a method of that name is another thing. */
    boolean usesElsewhere(String name, int except) {
        Matcher word = WORD.matcher(masked);
        while (word.find()) {
            int next = skipSpace(word.end());
            boolean isCall = next < masked.length() && masked.charAt(next) == '(';
            if (word.start() != except && word.group().equals(name) && !isPart(word.start()) && !isCall) {
                return true;
            }
        }
        return false;
    }

    /** The variable declared, when the text is {@code Type name}, {@code Type name = …} or {@code var name = …}. */
    Optional<Declared> variable() {
        int at = skipSpace(0);
        Matcher modifiers = MODIFIERS.matcher(masked).region(at, masked.length());
        at = modifiers.lookingAt() ? modifiers.end() : at;
        int afterType = afterType(at);
        int start = afterType < 0 ? -1 : skipSpace(afterType);
        Matcher name = WORD.matcher(masked);
        if (start < 0 || start == afterType && masked.charAt(start - 1) != ']' && masked.charAt(start - 1) != '>'
                || !name.find(start) || name.start() != start) {
            return Optional.empty();
        }
        int next = skipSpace(name.end());
        boolean declares = next == masked.length() || "=;,[".indexOf(masked.charAt(next)) >= 0;
        return declares ? Optional.of(new Declared(name.group(), start, declaresMore(next))) : Optional.empty();
    }

    /** What stands before the first brace, without comments and superfluous space. */
    String head() {
        int brace = masked.indexOf('{');
        return brace < 0 ? "" : masked.substring(0, brace).strip().replaceAll("\\s+", " ");
    }

    /** The name of the method or type declared; null when the text declares none. */
    String code() {
        String head = head();
        Matcher type = TYPE_HEAD.matcher(head);
        if (type.find()) {
            return type.group(1);
        }
        Matcher method = METHOD_HEAD.matcher(head);
        Matcher first = WORD.matcher(head);
        return method.matches() && first.find() && !NO_TYPES.contains(first.group()) ? method.group(1) : null;
    }

    /** End of a type that begins at an offset, or -1 if none does. */
    private int afterType(int from) {
        int at = from;
        while (true) {
            Matcher word = WORD.matcher(masked);
            if (at >= masked.length() || !word.find(at) || word.start() != at || NO_TYPES.contains(word.group())) {
                return -1;
            }
            int end = afterBrackets(word.end());
            at = skipSpace(end);
            if (at >= masked.length() || masked.charAt(at) != '.') {
                return at >= masked.length() ? -1 : end;
            }
            at = skipSpace(at + 1);
        }
    }

    /** Type arguments and array brackets. */
    private int afterBrackets(int from) {
        int end = from;
        int at = skipSpace(from);
        if (at < masked.length() && masked.charAt(at) == '<') {
            int depth = 0;
            do {
                depth += masked.charAt(at) == '<' ? 1 : masked.charAt(at) == '>' ? -1 : 0;
                at++;
            } while (depth > 0 && at < masked.length());
            end = at;
            at = skipSpace(at);
        }
        while (at < masked.length() && masked.charAt(at) == '[' && skipSpace(at + 1) < masked.length()
                && masked.charAt(skipSpace(at + 1)) == ']') {
            end = skipSpace(at + 1) + 1;
            at = skipSpace(end);
        }
        return end;
    }

    /** {@code int a = 1, b = 2}: a comma outside all brackets. */
    private boolean declaresMore(int from) {
        int depth = 0;
        for (int at = from; at < masked.length(); at++) {
            char c = masked.charAt(at);
            depth += "([{".indexOf(c) >= 0 ? 1 : ")]}".indexOf(c) >= 0 ? -1 : 0;
            if (c == ',' && depth == 0 && !insideTypeArguments(from, at)) {
                return true;
            }
        }
        return false;
    }

    /** A comma within {@code new HashMap<String, Double>()}: what follows up to the closing bracket are types. */
    private boolean insideTypeArguments(int from, int comma) {
        Matcher arguments = Pattern.compile("<[\\p{javaJavaIdentifierPart}.,<>?\\[\\]\\s]*>\\s*[(:]").matcher(masked);
        arguments.region(from, masked.length());
        while (arguments.find()) {
            if (arguments.start() < comma && comma < arguments.end()) {
                return true;
            }
        }
        return false;
    }

    private int skipSpace(int from) {
        int at = from;
        while (at < masked.length() && Character.isWhitespace(masked.charAt(at))) {
            at++;
        }
        return at;
    }

    /** The text with comments and the insides of strings and character literals turned to spaces; offsets stay. */
    private static String mask(String text) {
        StringBuilder masked = new StringBuilder(text);
        int at = 0;
        while (at < text.length()) {
            int end = at + 1;
            if (text.startsWith("//", at)) {
                end = orEnd(text, text.indexOf('\n', at));
                blank(masked, at, end);
            } else if (text.startsWith("/*", at)) {
                int close = text.indexOf("*/", at + 2);
                end = close < 0 ? text.length() : close + 2;
                blank(masked, at, end);
            } else if (text.charAt(at) == '"' || text.charAt(at) == '\'') {
                String quote = text.startsWith("\"\"\"", at) ? "\"\"\"" : text.substring(at, at + 1);
                end = afterQuoted(text, at + quote.length(), quote);
                blank(masked, at + 1, end - 1);
            }
            at = end;
        }
        return masked.toString();
    }

    private static int orEnd(String text, int found) {
        return found < 0 ? text.length() : found;
    }

    private static int afterQuoted(String text, int from, String quote) {
        int at = from;
        while (at < text.length() && !text.startsWith(quote, at)) {
            if (text.charAt(at) == '\n' && quote.length() == 1) {
                return at;      // never closed; the compiler will say so
            }
            at += text.charAt(at) == '\\' ? 2 : 1;
        }
        return Math.min(text.length(), at + quote.length());
    }

    private static void blank(StringBuilder text, int from, int to) {
        for (int i = from; i < to; i++) {
            if (text.charAt(i) != '\n') {
                text.setCharAt(i, ' ');
            }
        }
    }
}

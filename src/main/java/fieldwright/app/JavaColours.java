package fieldwright.app;

import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Splits Java text into runs that differ in colour. Every character is in exactly one run. */
final class JavaColours {
    /** A run of text; the style is a class of the style sheet. */
    record Run(String text, String style) { }

    private static final String KEYWORDS = "abstract|assert|boolean|break|byte|case|catch|char|class|continue|default|do|double|else|"
            + "enum|extends|false|final|finally|float|for|if|implements|import|instanceof|int|interface|long|new|null|package|"
            + "private|protected|public|record|return|sealed|short|static|super|switch|this|throw|throws|true|try|var|void|while|yield";
    private static final Pattern PARTS = Pattern.compile(
            "(?<comment>//[^\\n]*|/\\*(?s:.*?)(?:\\*/|\\z))"
            + "|(?<string>\"\"\"(?s:.*?)(?:\"\"\"|\\z)|\"(?:\\\\.|[^\"\\\\\\n])*\"?|'(?:\\\\.|[^'\\\\\\n])*'?)"
            + "|(?<keyword>\\b(?:" + KEYWORDS + ")\\b)"
            + "|(?<number>\\b\\d[\\d_]*\\.?\\d*(?:[eE][-+]?\\d+)?[dDfFlL]?\\b)");

    private JavaColours() { }

    static List<Run> of(String java) {
        List<Run> runs = new ArrayList<>();
        Matcher m = PARTS.matcher(java);
        int from = 0;
        while (m.find()) {
            add(runs, java.substring(from, m.start()), "code-plain");
            add(runs, m.group(), m.group("comment") != null ? "code-comment" : m.group("string") != null ? "code-string"
                    : m.group("keyword") != null ? "code-keyword" : "code-number");
            from = m.end();
        }
        add(runs, java.substring(from), "code-plain");
        return runs;
    }

    private static void add(List<Run> runs, String text, String style) {
        if (!text.isEmpty()) {
            runs.add(new Run(text, style));
        }
    }
}

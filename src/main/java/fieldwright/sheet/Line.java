package fieldwright.sheet;

import java.util.ArrayList;
import java.util.List;

/** One line of the file: its text and the characters that end it, {@code \n} or {@code \r\n}. */
record Line(String text, String end) {

    /** Splits a text into lines. The last line has an empty end when the text does not end with a line end. */
    static List<Line> split(String text) {
        List<Line> lines = new ArrayList<>();
        int start = 0;
        while (start < text.length()) {
            int feed = text.indexOf('\n', start);
            int next = feed < 0 ? text.length() : feed + 1;
            int stop = feed < 0 ? next : feed > start && text.charAt(feed - 1) == '\r' ? feed - 1 : feed;
            lines.add(new Line(text.substring(start, stop), text.substring(stop, next)));
            start = next;
        }
        return lines;
    }

    /** True when a text stands on one line, in the eyes of every reader. */
    static boolean isOne(String text) {
        return text.indexOf('\n') < 0 && text.indexOf('\r') < 0;
    }

    /** True when it belongs to the form, not to the source of a cell. */
    boolean isForm() {
        return text.startsWith(":");
    }

    boolean isBlank() {
        return text.isBlank();
    }

    /** True for {@code :word} alone or followed by a blank. */
    boolean is(String word) {
        return text.startsWith(word) && (text.length() == word.length() || Character.isWhitespace(text.charAt(word.length())));
    }

    /** The text of a source line as its author sees it: one backslash less where backslashes stand before a colon. */
    String unescaped() {
        return text.startsWith("\\") && startsWithColonBehindBackslashes(text) ? text.substring(1) : text;
    }

    /** The form in the file of a source line: one backslash more where it would begin with (backslashes and) a colon. */
    static Line ofSource(String sourceLine, String end) {
        return new Line(startsWithColonBehindBackslashes(sourceLine) ? "\\" + sourceLine : sourceLine, end);
    }

    private static boolean startsWithColonBehindBackslashes(String text) {
        int i = 0;
        while (i < text.length() && text.charAt(i) == '\\') {
            i++;
        }
        return i < text.length() && text.charAt(i) == ':';
    }
}

package fieldwright.sheet;

import java.util.ArrayList;
import java.util.List;

/** Looks for marks in a line outside quotes, and where it says so outside brackets. */
final class Scan {

    private Scan() { }

    /** Index of the first such mark outside quotes, −1 when there is none. A quote that is never closed is no quote. */
    static int find(String text, int from, int to, char mark) {
        for (int i = from; i < to; i++) {
            if (text.charAt(i) == mark) {
                return i;
            }
            i = behindQuote(text, i, to);
        }
        return -1;
    }

    /** Ranges between separators outside brackets. */
    static List<int[]> split(String text, int from, int to, char separator) {
        List<int[]> ranges = new ArrayList<>();
        int start = from;
        int depth = 0;
        for (int i = from; i < to; i++) {
            depth = depthAfter(depth, text.charAt(i));
            if (depth == 0 && text.charAt(i) == separator) {
                ranges.add(new int[] {start, i});
                start = i + 1;
            }
        }
        ranges.add(new int[] {start, to});
        return ranges;
    }

    /** Ranges of a word that stands between blanks with text on both sides, outside brackets and quotes. */
    static List<int[]> words(String text, String word) {
        List<int[]> ranges = new ArrayList<>();
        int depth = 0;
        for (int i = 0; i < text.length(); i++) {
            int end = i + word.length();
            if (depth == 0 && i > 0 && end < text.length() && text.startsWith(word, i)
                    && Character.isWhitespace(text.charAt(i - 1)) && Character.isWhitespace(text.charAt(end))
                    && !text.substring(0, i).isBlank() && !text.substring(end).isBlank()) {
                ranges.add(new int[] {i, end});
            }
            depth = depthAfter(depth, text.charAt(i));
            i = behindQuote(text, i, text.length());
        }
        return ranges;
    }

    private static int behindQuote(String text, int i, int to) {
        if (text.charAt(i) != '"') {
            return i;
        }
        int close = text.indexOf('"', i + 1);
        return close < 0 || close >= to ? i : close;
    }

    private static int depthAfter(int depth, char c) {
        if ("([{".indexOf(c) >= 0) {
            return depth + 1;
        }
        return ")]}".indexOf(c) >= 0 ? Math.max(0, depth - 1) : depth;
    }
}

package fieldwright.app;

import java.nio.charset.StandardCharsets;
import java.util.Base64;
import java.util.List;
import java.util.Set;
import javafx.scene.text.Font;

/** The fonts of the page: the first there is of a few that have the superscripts and signs of the trade. */
final class Fonts {
    private static final List<String> TEXT = List.of("DejaVu Sans", "Segoe UI", "Helvetica Neue", "Noto Sans", "Arial");
    private static final List<String> CODE = List.of("DejaVu Sans Mono", "Consolas", "Menlo", "Noto Sans Mono", "Courier New");

    private Fonts() { }

    static String text() {
        return first(TEXT, "System");
    }

    static String code() {
        return first(CODE, "Monospaced");
    }

    /** Style rules that name the fonts; a style sheet cannot choose among several by itself. */
    static String styleSheet() {
        String css = ".code-letters, .cell-editor .code-area { -fx-font-family: \"" + code() + "\"; -fx-font-size: 0.9em; }"
                + ".cell-editor .prose-area { -fx-font-family: \"" + text() + "\"; -fx-font-size: 1em; }";
        return "data:text/css;base64," + Base64.getEncoder().encodeToString(css.getBytes(StandardCharsets.UTF_8));
    }

    private static String first(List<String> wanted, String otherwise) {
        Set<String> there = Set.copyOf(Font.getFamilies());
        return wanted.stream().filter(there::contains).findFirst().orElse(otherwise);
    }
}

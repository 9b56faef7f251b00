package fieldwright.sheet;

import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * A line {@code :signed role: name | revision B | …}. Only the revision is read here; the rest is kept as it stands.
 *
 * @param text     the whole line
 * @param revision the revision that was signed; null when the line does not say
 * @param line     line in the file, 1-based
 */
public record Signature(String text, String revision, int line) {
    private static final Pattern REVISION = Pattern.compile("\\|\\s*revision\\b\\s*([^|]*)");

    static Signature read(String text, int line) {
        Matcher revision = REVISION.matcher(text);
        return new Signature(text, revision.find() ? revision.group(1).strip() : null, line);
    }
}

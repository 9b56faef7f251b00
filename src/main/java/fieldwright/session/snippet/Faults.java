package fieldwright.session.snippet;

import fieldwright.quantity.UnknownNameException;
import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import jdk.jshell.DeclarationSnippet;
import jdk.jshell.Diag;
import jdk.jshell.JShell;
import jdk.jshell.Snippet;

/** Turns what JShell says of a snippet into faults in the author's terms: offsets in the text as written, no inner names. */
final class Faults {
    private static final Pattern SYMBOL = Pattern.compile("symbol:\\s*(\\w+)\\s+([^\\n]+)");
    private static final Pattern LOCATION = Pattern.compile("location:\\s*([^\\n]+)");
    private static final Pattern OF_TYPE = Pattern.compile("(?:variable \\S+ of type|class|interface|record|enum)\\s+([\\w.$]+)");
    private static final Pattern INNER = Pattern.compile("(?:REPL\\.)?\\$JShell\\$\\d+[A-Z]*\\.?");
    private static final Pattern PACKAGES = Pattern.compile("\\b(?:fieldwright|java|javax)(?:\\.[a-z]\\w*)+\\.(?=[A-Z])");

    private final JShell shell;
    private final String source;
    private final JavaText.Declared variable;
    private final String field;
    private final Collection<String> above;
    private final Collection<String> words;

    /**
     * @param variable the declared variable, or null
     * @param field    the name it was compiled under
     * @param above    names declared above
     * @param words    names that can be used anywhere, to suggest one
     */
    Faults(JShell shell, String source, JavaText.Declared variable, String field, Collection<String> above,
           Collection<String> words) {
        this.shell = shell;
        this.source = source;
        this.variable = variable;
        this.field = field;
        this.above = above;
        this.words = words;
    }

    List<SnippetException.Fault> of(Snippet snippet) {
        Set<SnippetException.Fault> faults = new LinkedHashSet<>();
        shell.diagnostics(snippet).filter(Diag::isError)
                .forEach(error -> faults.add(fault(error)));
        if (faults.isEmpty() && snippet instanceof DeclarationSnippet declaration) {
            shell.unresolvedDependencies(declaration).forEach(missing -> faults.add(unresolved(missing)));
        }
        if (faults.isEmpty()) {
            faults.add(new SnippetException.Fault(0, "this is not a complete Java statement or declaration."));
        }
        return new ArrayList<>(faults);
    }

    private int offset(Diag error) {
        int offset = (int) Math.max(0, error.getPosition());
        boolean shifted = variable != null && offset >= variable.end();
        return Math.min(shifted ? Math.max(variable.start(), offset - (field.length() - variable.name().length())) : offset, Math.max(0, source.length() - 1));
    }

    private SnippetException.Fault fault(Diag error) {
        String text = error.getMessage(Locale.ROOT);
        Matcher symbol = SYMBOL.matcher(text);
        if (text.startsWith("cannot find symbol") && symbol.find()) {
            return missing(offset(error), symbol.group(1), symbol.group(2).strip(), text);
        }
        String message = text.contains("reached end of file while parsing")
                ? "the statement does not end here: a ';', a bracket or a quote is missing." : clean(text) + ".";
        return new SnippetException.Fault(offset(error), message);
    }

    /** {@code variable zz} or {@code method foo(int)}, missing in a method or class that otherwise compiles. */
    private SnippetException.Fault unresolved(String missing) {
        String[] parts = missing.split("\\s+", 2);
        String symbol = parts.length > 1 ? parts[1] : missing;
        Matcher place = Pattern.compile("\\b" + Pattern.quote(symbol.replaceAll("\\(.*", "")) + "\\b").matcher(source);
        return missing(place.find() ? place.start() : 0, parts.length > 1 ? parts[0] : "name", symbol, "");
    }

    private SnippetException.Fault missing(int offset, String kind, String symbol, String text) {
        String name = symbol.replaceAll("\\(.*", "");
        if (variable != null && symbol.equals(variable.name())) {
            return new SnippetException.Fault(offset, "'" + name + "' is used in its own declaration, where it has no value yet. "
                    + "Declare it first, or choose another name within.");
        }
        Matcher location = LOCATION.matcher(text);
        Matcher type = OF_TYPE.matcher(location.find() ? location.group(1) : "");
        if (type.find() && !clean(type.group(1)).isBlank()) {
            return new SnippetException.Fault(offset, clean(type.group(1)) + " has no " + kind + " '" + clean(symbol) + "'."
                    + suggestion(name, members(type.group(1))));
        }
        Set<String> names = new LinkedHashSet<>(above);
        names.addAll(words);
        return new SnippetException.Fault(offset, "no " + kind + " '" + clean(symbol) + "'." + suggestion(name, names), name);
    }

    private static String suggestion(String name, Collection<String> names) {
        String nearest = UnknownNameException.nearest(name, names);
        return nearest == null || nearest.equals(name) ? "" : " Closest: '" + nearest + "'.";
    }

    private static Collection<String> members(String type) {
        Set<String> members = new LinkedHashSet<>();
        try {
            for (var method : Class.forName(type, false, Faults.class.getClassLoader()).getMethods()) {
                members.add(method.getName());
            }
        } catch (ClassNotFoundException | LinkageError e) {
            return members;     // a class of the sheet itself: nothing to suggest
        }
        return members;
    }

    private String clean(String text) {
        String cleaned = INNER.matcher(text).replaceAll("");
        if (variable != null) {
            cleaned = cleaned.replaceAll("\\b" + Pattern.quote(field) + "_?", Matcher.quoteReplacement(variable.name()));
        }
        return PACKAGES.matcher(cleaned).replaceAll("").replaceAll("\\s*\\n\\s*", "; ").strip();
    }
}

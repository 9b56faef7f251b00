package fieldwright.session.snippet;

import java.util.List;

/** A piece of Java that does not compile. Says where in its text, and what is wrong, in the author's terms. */
public final class SnippetException extends Exception {
    private static final long serialVersionUID = 1L;

    /**
     * @param offset 0-based in the text of the snippet
     * @param name   the name that is not known; null when the fault is another one
     */
    public record Fault(int offset, String message, String name) implements java.io.Serializable {
        Fault(int offset, String message) {
            this(offset, message, null);
        }
    }

    private final List<Fault> faults;

    SnippetException(List<Fault> faults) {
        super(faults.get(0).message());
        this.faults = List.copyOf(faults);
    }

    public SnippetException(int offset, String message) {
        this(List.of(new Fault(offset, message)));
    }

    public List<Fault> faults() {
        return faults;
    }
}

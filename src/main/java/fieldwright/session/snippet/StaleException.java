package fieldwright.session.snippet;

/**
 * JShell's state cannot follow the edited sheet any more. Not an error: whoever catches it takes a fresh
 * {@link SnippetCompiler} and begins the run anew; with a fresh one it is not thrown.
 */
public final class StaleException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    StaleException(String message) {
        super(message);
    }
}

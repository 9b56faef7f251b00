package fieldwright.quantity;

/**
 * Something the author of a sheet can put right. The message names the thing, the value and the remedy; the place
 * (cell and line) is added by whoever knows it.
 */
public class AuthorException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public AuthorException(String message) {
        super(message);
    }

    public AuthorException(String message, Throwable cause) {
        super(message, cause);
    }
}

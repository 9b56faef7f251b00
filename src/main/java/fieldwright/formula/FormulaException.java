package fieldwright.formula;

import fieldwright.quantity.AuthorException;

/** A formula that cannot be read, or whose units do not fit, with the place in its text. */
public final class FormulaException extends AuthorException {
    private static final long serialVersionUID = 1L;
    private final String text;
    private final int position;

    public FormulaException(String text, int position, String message) {
        super(message);
        this.text = text;
        this.position = position;
    }

    /** 0-based offset into {@link #text()}. */
    public int position() {
        return position;
    }

    public String text() {
        return text;
    }
}

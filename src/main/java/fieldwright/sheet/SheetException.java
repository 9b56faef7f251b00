package fieldwright.sheet;

/** The text is not a sheet. The message names the thing, the value and the remedy; the line stands beside it. */
public final class SheetException extends Exception {
    private final int line;

    /** @param line line in the file, 1-based; 0 when the file as a whole is meant */
    public SheetException(int line, String message) {
        super(message);
        this.line = line;
    }

    public int line() {
        return line;
    }
}

package fieldwright.quantity;

/** A stop was asked for while numbers were being worked. Nobody's fault; never wrapped, never swallowed. */
public final class StoppedException extends RuntimeException {
    private static final long serialVersionUID = 1L;

    public StoppedException() {
        super("stopped");
    }
}

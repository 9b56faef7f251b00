package fieldwright.session;

/** Stands for a fault in our own code. */
public final class OwnFault {
    public int fail() {
        throw new IllegalStateException("at fault");
    }
}

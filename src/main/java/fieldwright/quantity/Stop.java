package fieldwright.quantity;

/**
 * The stop request of this process. Long loops call {@link #check()} every few thousand operations; it costs one
 * volatile read and the read of the thread's interrupt flag.
 */
public final class Stop {
    private static volatile boolean requested;

    private Stop() {
    }

    /** Throws {@link StoppedException} when a stop was requested or the thread was interrupted (the flag is kept). */
    public static void check() {
        if (requested || Thread.currentThread().isInterrupted()) {
            throw new StoppedException();
        }
    }

    public static boolean isRequested() {
        return requested;
    }

    public static void request() {
        requested = true;
    }

    public static void clear() {
        requested = false;
    }
}

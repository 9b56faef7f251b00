package fieldwright.words;

import fieldwright.field.Accuracy;
import fieldwright.formula.Scope;
import fieldwright.output.Output;
import java.util.HashSet;
import java.util.Set;
import java.util.concurrent.Callable;

/**
 * What a working cell stands on while it is worked: the names above it, the accuracy asked, and where outputs go. The
 * session makes one for each cell and each run of it and binds it to the thread that works the cell.
 */
public abstract class Desk {
    /** Why the cell is being worked. */
    public enum Mode {
        /** For its outputs. */
        WORKING,
        /** For its results alone, with other inputs: pictures and tables are left out. */
        REPLAY
    }

    private static final ThreadLocal<Desk> CURRENT = new ThreadLocal<>();

    private final Set<String> said = new HashSet<>();

    /** The names of the sheet that stand above the cell; reading one is logged by the session. */
    public abstract Scope scope();

    /** What the sheet's header asks of every integral. */
    public abstract Accuracy accuracy();

    public abstract Mode mode();

    /** Puts an output under the cell. */
    public abstract void show(Output output);

    /**
     * Makes a name of the sheet hold a value, and a result of it.
     *
     * @param value an {@code Amount} or a {@code Vector}, in the unit to be shown
     */
    public abstract void result(String name, Object value);

    /** Puts an assumption or a caution under the cell, once however often it is said. */
    final void sayOnce(Output output) {
        if (said.add(output.toString())) {
            show(output);
        }
    }

    /**
     * The desk of the cell being worked by this thread.
     *
     * @throws IllegalStateException outside a cell; a cell that starts threads of its own must not use words in them
     */
    public static Desk current() {
        Desk desk = CURRENT.get();
        if (desk == null) {
            throw new IllegalStateException("no working cell is being worked on this thread. Use the words of a sheet in the cell's own thread.");
        }
        return desk;
    }

    /** Works something at a desk; the desk before is current again afterwards. */
    public static <T> T at(Desk desk, Callable<T> work) throws Exception {
        Desk before = CURRENT.get();
        CURRENT.set(desk);
        try {
            return work.call();
        } finally {
            if (before == null) {
                CURRENT.remove();
            } else {
                CURRENT.set(before);
            }
        }
    }
}

package fieldwright.app;

import java.util.List;
import java.util.logging.Level;
import java.util.logging.Logger;
import javafx.application.Application;

/**
 * Starts the app. Not an {@link Application} itself: a class that is cannot be the first of a jar that lies on the
 * class path.
 */
public final class AppLauncher {
    /** Held, since a logger that nobody holds may be collected with its level. */
    private static final Logger JAVAFX_LOG = Logger.getLogger("javafx");

    private AppLauncher() { }

    /**
     * Opens a window for each file, or one with a new sheet, and returns when the last is closed. Opening runs nothing.
     *
     * @param files paths of sheets
     */
    public static void main(String[] files) {
        JAVAFX_LOG.setLevel(Level.SEVERE);   // it would warn of lying on the class path, where a single jar must lie
        // Pictures are painted through Java2D, which must not start a window system of its own beside ours.
        System.setProperty("java.awt.headless", "true");
        Application.launch(PadApplication.class, List.of(files).toArray(String[]::new));
    }
}

package fieldwright.app;

import java.util.List;
import javafx.application.Application;

/**
 * Starts the app. Not an {@link Application} itself: a class that is cannot be the first of a jar that lies on the
 * class path.
 */
public final class AppLauncher {
    private AppLauncher() { }

    /**
     * Opens a window for each file, or one with a new sheet, and returns when the last is closed. Opening runs nothing.
     *
     * @param files paths of sheets
     */
    public static void main(String[] files) {
        // Pictures are painted through Java2D, which must not start a window system of its own beside ours.
        System.setProperty("java.awt.headless", "true");
        Application.launch(PadApplication.class, List.of(files).toArray(String[]::new));
    }
}

package fieldwright.app;

import java.nio.file.Path;
import java.util.Optional;

/** What the pad asks its reader. Dialogs in the window, prepared answers in tests. */
interface Questions {
    enum Unsaved { SAVE, DISCARD, STAY }

    /** Whether a sheet that was not made here may run. */
    boolean mayRun(String name);

    Unsaved unsaved(String name);

    /** Whether a file that was changed by another program meanwhile may be replaced. */
    boolean mayReplace(String name);

    Optional<Path> fileToOpen(Path near);

    Optional<Path> fileToSave(Path near, String suggested);

    /** Says what went wrong. */
    void tell(String heading, String text);
}

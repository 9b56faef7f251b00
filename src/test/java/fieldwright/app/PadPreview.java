package fieldwright.app;

import java.nio.file.Files;
import java.nio.file.Path;
import javafx.application.Application;
import javafx.stage.Stage;

/** The pad with a calculation that answers from samples: to look at it without the rest of the program. */
public final class PadPreview {
    private PadPreview() { }

    public static void main(String[] arguments) {
        System.setProperty("java.awt.headless", "true");
        Application.launch(Preview.class, arguments);
    }

    /** Made public for the toolkit. */
    public static final class Preview extends Application {
        @Override
        public void start(Stage stage) throws Exception {
            var files = getParameters().getRaw();
            SheetDesk desk = files.isEmpty() ? SheetDesk.of(Samples.SILO) : SheetDesk.of(Files.readString(Path.of(files.get(0))));
            new PadWindow(stage, desk, () -> new FakeCalculator(Samples::outcome));
        }
    }
}

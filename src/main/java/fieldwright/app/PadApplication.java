package fieldwright.app;

import fieldwright.draw.Mathematics;
import fieldwright.sheet.SheetException;
import java.io.IOException;
import java.nio.file.Path;
import java.util.List;
import javafx.application.Application;
import javafx.scene.control.Alert;
import javafx.scene.control.ButtonType;
import javafx.stage.Stage;

/** The app's life: one window for each file, gone when the last is closed. Made public for the toolkit, which starts it. */
public final class PadApplication extends Application {
    @Override
    public void init() {
        // The first formula loads the typesetter's fonts; meanwhile the window is made.
        Thread warmUp = new Thread(() -> Mathematics.of("\\rho_{0}", "rho_0", Typesetting.SYMBOL, 1000), "typesetter");
        warmUp.setDaemon(true);
        warmUp.start();
    }

    @Override
    public void start(Stage first) {
        List<String> files = getParameters().getRaw();
        int opened = 0;
        for (String file : files) {
            SheetDesk desk = open(Path.of(file));
            if (desk != null) {
                new PadWindow(opened++ == 0 ? first : new Stage(), desk, SessionCalculator::start);
            }
        }
        if (opened == 0) {
            new PadWindow(first, SheetDesk.blank(), SessionCalculator::start);
        }
    }

    private static SheetDesk open(Path file) {
        try {
            return SheetDesk.open(file);
        } catch (SheetException e) {
            tell(file, (e.line() > 0 ? "line " + e.line() + ": " : "") + e.getMessage());
        } catch (IOException e) {
            tell(file, "it cannot be read: " + e.getMessage());
        }
        return null;
    }

    private static void tell(Path file, String text) {
        Alert alert = new Alert(Alert.AlertType.NONE, text, ButtonType.OK);
        alert.setTitle("Fieldwright");
        alert.setHeaderText(file + " cannot be opened");
        alert.showAndWait();
    }
}

package fieldwright.cli;

import fieldwright.output.RunOutcome;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Parameters;

/** {@code fieldwright open FILE}: the app with this sheet. Opening runs nothing. */
@Command(name = "open", description = "Opens a sheet in the app. Opening runs nothing.", mixinStandardHelpOptions = true,
        exitCodeOnInvalidInput = RunOutcome.WRONG_USE, exitCodeOnExecutionException = RunOutcome.SHEET_ERROR)
final class OpenCommand implements Callable<Integer> {

    @Parameters(paramLabel = "FILE", description = "The sheet, *.fws.")
    private Path file;

    private final Terminal terminal;
    private final Window window;

    OpenCommand(Terminal terminal, Window window) {
        this.terminal = terminal;
        this.window = window;
    }

    @Override
    public Integer call() {
        if (!Files.isRegularFile(file)) {
            terminal.say(file + ": there is no such file. Check the path.");
            return RunOutcome.WRONG_USE;
        }
        return show(terminal, window, file.toString());
    }

    /** Opens the app; says what works without one where there is no display. */
    static int show(Terminal terminal, Window window, String... files) {
        try {
            window.open(files);
            return RunOutcome.ALL_WELL;
        } catch (UnsupportedOperationException noDisplay) {
            terminal.say("the app needs a display (" + noDisplay.getMessage() + "). 'fieldwright run FILE' works a sheet without one.");
            return RunOutcome.WRONG_USE;
        }
    }
}

package fieldwright.cli;

import fieldwright.app.AppLauncher;
import fieldwright.output.RunOutcome;
import fieldwright.session.Session;
import fieldwright.session.SessionOptions;
import fieldwright.session.WorkOptions;
import fieldwright.sheet.Trust;
import java.io.PrintWriter;
import java.util.concurrent.Callable;
import picocli.CommandLine;
import picocli.CommandLine.Command;

/** Entry point of the program. */
public final class Main {

    private Main() { }

    /** {@code fieldwright} alone. */
    @Command(name = "fieldwright", description = {"Worksheets for electric fields from charge.", "Without a command it opens the app."},
            mixinStandardHelpOptions = true, version = "fieldwright 0.1.0", synopsisSubcommandLabel = "[COMMAND]",
            exitCodeOnInvalidInput = RunOutcome.WRONG_USE, exitCodeOnExecutionException = RunOutcome.SHEET_ERROR)
    private record Root(Terminal terminal, Window window) implements Callable<Integer> {

        @Override
        public Integer call() {
            return OpenCommand.show(terminal, window);
        }
    }

    public static void main(String[] arguments) {
        System.exit(run(Terminal.real(), Trust.ofUser(), Main::workInSession, AppLauncher::main, arguments));
    }

    /** Works a sheet in a calculation process of its own, which ends with it. */
    static RunOutcome workInSession(String text) throws Exception {
        try (Session session = Session.start(SessionOptions.BRIEF)) {
            return session.work(text, WorkOptions.FULL, progress -> { }).get();
        }
    }

    /** Runs one command and gives its exit code. */
    static int run(Terminal terminal, Trust trust, Engine engine, Window window, String... arguments) {
        CommandLine commands = new CommandLine(new Root(terminal, window));
        commands.addSubcommand(new OpenCommand(terminal, window));
        commands.addSubcommand(new RunCommand(terminal, trust, engine));
        commands.setOut(new PrintWriter(terminal.out(), true));
        commands.setErr(new PrintWriter(terminal.err(), true));
        return commands.execute(arguments);
    }
}

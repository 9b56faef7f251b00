package fieldwright.cli;

import fieldwright.output.RunOutcome;
import fieldwright.session.Session;
import fieldwright.session.WorkOptions;
import fieldwright.sheet.Trust;
import java.io.PrintWriter;
import picocli.CommandLine;
import picocli.CommandLine.Command;

/** Entry point of the program. */
public final class Main {

    private Main() { }

    @Command(name = "fieldwright", description = "Worksheets for electric fields from charge.", mixinStandardHelpOptions = true,
            version = "fieldwright 0.1.0", exitCodeOnInvalidInput = RunOutcome.WRONG_USE,
            exitCodeOnExecutionException = RunOutcome.SHEET_ERROR)
    static final class Root { }

    public static void main(String[] arguments) {
        System.exit(run(Terminal.real(), Trust.ofUser(), Main::workInSession, arguments));
    }

    /** Works a sheet in a calculation process of its own, which ends with it. */
    static RunOutcome workInSession(String text) throws Exception {
        try (Session session = Session.start()) {
            return session.work(text, WorkOptions.FULL, progress -> { }).get();
        }
    }

    /** Runs one command and gives its exit code. */
    static int run(Terminal terminal, Trust trust, Engine engine, String... arguments) {
        CommandLine commands = new CommandLine(new Root());
        commands.addSubcommand(new RunCommand(terminal, trust, engine));
        commands.setOut(new PrintWriter(terminal.out(), true));
        commands.setErr(new PrintWriter(terminal.err(), true));
        return commands.execute(arguments);
    }
}

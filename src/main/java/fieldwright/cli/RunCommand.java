package fieldwright.cli;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import fieldwright.sheet.RecordLine;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import fieldwright.sheet.SheetFile;
import fieldwright.sheet.Signature;
import fieldwright.sheet.Trust;
import java.io.IOException;
import java.nio.file.FileSystemException;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import picocli.CommandLine.Command;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;

/** {@code fieldwright run FILE}: reads, asks for trust, works the sheet, prints, records. */
@Command(name = "run", description = "Works a sheet from top to bottom and prints its results.", mixinStandardHelpOptions = true,
        exitCodeOnInvalidInput = RunOutcome.WRONG_USE, exitCodeOnExecutionException = RunOutcome.SHEET_ERROR,
        footer = {"", "Exit code, the highest that applies: 64 wrong use, 4 the sheet has an error, 3 a result did not converge,",
            "1 a check or assessment failed, 0 all well."})
final class RunCommand implements Callable<Integer> {

    @Parameters(paramLabel = "FILE", description = "The sheet, *.fws.")
    private Path file;

    @Option(names = "--json", description = "Print one JSON object, numbers in SI, and nothing else.")
    private boolean json;

    @Option(names = "--record", description = "Store the results in the file, under their cells.")
    private boolean record;

    @Option(names = "--trust", description = "Run a sheet that was not made here without asking, this time.")
    private boolean trusted;

    private final Terminal terminal;
    private final Trust trust;
    private final Engine engine;

    RunCommand(Terminal terminal, Trust trust, Engine engine) {
        this.terminal = terminal;
        this.trust = trust;
        this.engine = engine;
    }

    /** Wrong use, found after the command line itself was read. */
    private static final class WrongUse extends Exception {
        WrongUse(String message) {
            super(message);
        }
    }

    @Override
    public Integer call() throws Exception {
        try {
            String text = SheetFile.readText(file);
            Sheet sheet = Sheet.parse(text);
            warnOfUnreadableRecords(sheet);
            requireRecordable(sheet);
            boolean known = isKnown(text);
            RunOutcome run = work(text);
            print(sheet, run);
            if (record) {
                record(text, sheet, run, known);
            }
            return run.exitCode();
        } catch (SheetException e) {
            return printNotASheet(e);
        } catch (WrongUse e) {
            return wrongUse(e.getMessage());
        } catch (NoSuchFileException e) {
            return wrongUse(e.getFile() + ": there is no such file. Check the path.");
        } catch (FileSystemException e) {
            return wrongUse(e.getFile() + ": " + (e.getReason() == null ? "cannot be read or written." : e.getReason()));
        } catch (IOException e) {
            return wrongUse(file + ": " + e.getMessage());
        }
    }

    // ---- before the run

    private void warnOfUnreadableRecords(Sheet sheet) {
        for (Cell cell : sheet.cells()) {
            for (RecordLine line : cell.records()) {
                if (!line.isReadable()) {
                    terminal.say("record not readable, kept as it is: '" + line.text() + "': " + line.trouble());
                }
            }
        }
    }

    private void requireRecordable(Sheet sheet) throws WrongUse {
        String revision = sheet.header().get("revision");
        for (Signature signature : sheet.signatures()) {
            if (record && (signature.revision() == null || signature.revision().equals(revision))) {
                throw new WrongUse(file + ", line " + signature.line() + ": signed for "
                        + (signature.revision() == null ? "a revision that is not named" : "revision '" + revision + "'")
                        + ", so its record may not change. Raise 'revision:' in the header first, or run without --record.");
            }
        }
    }

    /** True when the answer is kept for this text; false when it runs this once because of {@code --trust}. */
    private boolean isKnown(String text) throws WrongUse, IOException {
        if (trust.isTrusted(text)) {
            return true;
        }
        if (trusted) {
            return false;
        }
        if (terminal.ask() == null) {
            throw new WrongUse(file + ": not made here, and nobody at a terminal to ask; nothing was run. A sheet is a program: "
                    + "read it, then run it with --trust.");
        }
        String answer = terminal.ask().apply(terminal.shown(file + " was not made here. A sheet is a program and can do to your files what you can. "
                + "Run it? [y/N] "));
        if (answer == null || !answer.strip().toLowerCase(java.util.Locale.ROOT).matches("y|yes")) {
            throw new WrongUse(file + ": not trusted; nothing was run.");
        }
        trust.remember(text);
        return true;
    }

    /** An engine that fails is our own fault, not the author's: the trace goes to standard error. */
    private RunOutcome work(String text) {
        try {
            return engine.work(text);
        } catch (Exception e) {
            e.printStackTrace(terminal.err());
            return RunOutcome.refused(new Output.Problem(0, 0,
                    "the calculation broke off, which is a fault of the program: " + e.getMessage() + ". The sheet is unchanged."));
        }
    }

    // ---- after the run

    private void print(Sheet sheet, RunOutcome run) {
        if (json) {
            terminal.json().println(JsonReport.of(run));
        } else {
            terminal.out().print(terminal.shown(TextReport.of(sheet, run)));
        }
    }

    private void record(String text, Sheet sheet, RunOutcome run, boolean known) throws IOException, SheetException, WrongUse {
        if (run.hasError()) {
            terminal.say("nothing recorded: the sheet has an error.");
            return;
        }
        Sheet recorded = sheet;
        for (CellOutcome cell : run.cells()) {
            List<Output> stored = cell.outputs().stream().filter(RecordLine::isStored).toList();
            recorded = recorded.withRecords(cell.cell() - 1, stored);
        }
        String newText = recorded.write();
        if (newText.equals(text)) {
            return;
        }
        if (!SheetFile.readText(file).equals(text)) {
            throw new WrongUse(file + ": changed while it was worked; nothing recorded. Run it again.");
        }
        SheetFile.save(file, newText);
        if (known) {
            trust.remember(newText);
        }
    }

    private int printNotASheet(SheetException e) {
        RunOutcome refused = RunOutcome.refused(new Output.Problem(e.line(), 0, e.getMessage()));
        if (json) {
            terminal.json().println(JsonReport.of(refused));
        } else {
            terminal.say(file + ", " + refused.problems().get(0).text());
        }
        return refused.exitCode();
    }

    private int wrongUse(String message) {
        terminal.say(message);
        return RunOutcome.WRONG_USE;
    }
}

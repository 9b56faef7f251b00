package fieldwright.session;

import fieldwright.field.Accuracy;
import fieldwright.formula.Names;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.quantity.AuthorException;
import fieldwright.quantity.StoppedException;
import fieldwright.session.snippet.SnippetCompiler;
import fieldwright.session.snippet.StaleException;
import fieldwright.sheet.Cell;
import fieldwright.sheet.DeriveEntry;
import fieldwright.sheet.Header;
import fieldwright.sheet.InputEntry;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import fieldwright.words.Desk;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Consumer;

/**
 * Works sheets: text in, outcome out. It remembers the last run, so that a changed text costs what the change touches;
 * the outcome is that of a run from nothing all the same. In the calculation process, and directly in tests.
 *
 * <p>One thread works; {@link AuthorCode#stop()} may come from another.
 */
public final class SheetRunner implements AutoCloseable {
    private final Printing printing;
    private final AuthorCode authorCode;
    private Engine engine = new Engine();
    private Setting lastSetting;
    private Tolerances lastTolerances;

    SheetRunner(Printing printing, AuthorCode authorCode) {
        this.printing = printing;
        this.authorCode = authorCode;
    }

    /** A runner in this process, whose cells print to this process's streams. */
    public SheetRunner() {
        this(new Printing(), new AuthorCode());
    }

    public RunOutcome work(String text, WorkOptions options, Consumer<Progress> listener) {
        Sheet sheet;
        try {
            sheet = Sheet.parse(text);
        } catch (SheetException e) {
            return RunOutcome.refused(new Output.Problem(e.line(), 0, e.getMessage()));
        }
        List<Output.Problem> problems = new ArrayList<>();
        Setting setting = setting(sheet.header(), problems);
        if (!setting.equals(lastSetting)) {
            engine.restart();
            lastSetting = setting;
        }
        if (engine.compiler().isTired()) {
            renew();
        }
        while (true) {
            try {
                return work(sheet, setting, options, problems, listener);
            } catch (StaleException e) {
                renew();
            }
        }
    }

    /** Stops the run that goes on, from another thread. */
    public void stop() {
        authorCode.stop();
    }

    /** How often something was compiled since the compiler was last made anew; for tests that count instead of timing. */
    int compilations() {
        return engine.compiler().evaluations();
    }

    private void renew() {
        engine.close();
        engine = new Engine();
        lastTolerances = null;
    }

    private static Setting setting(Header header, List<Output.Problem> problems) {
        Accuracy accuracy = Accuracy.DEFAULT;
        List<Library> libraries = new ArrayList<>();
        for (Header.Field field : header.fields()) {
            try {
                if (field.name().equals("accuracy") && !field.value().isEmpty()) {
                    accuracy = accuracy(field.value());
                } else if (field.name().equals("use")) {
                    for (String name : field.value().split("\\s*,\\s*")) {
                        if (!name.isBlank()) {
                            libraries.add(Library.named(name.strip()));
                        }
                    }
                }
            } catch (AuthorException e) {
                problems.add(new Output.Problem(field.line(), 0, e.getMessage()));
            }
        }
        return new Setting(accuracy, Desk.Mode.WORKING, libraries, Map.of());
    }

    private static Accuracy accuracy(String text) {
        try {
            double relative = Double.parseDouble(text);
            if (relative >= 1e-14 && relative <= 0.1) {
                return Accuracy.relative(relative);
            }
        } catch (NumberFormatException e) {
            // said below
        }
        throw new AuthorException("accuracy: " + text + " is not a relative tolerance between 1e-14 and 0.1, such as 1e-9.");
    }

    private RunOutcome work(Sheet sheet, Setting setting, WorkOptions options, List<Output.Problem> problems, Consumer<Progress> listener) {
        List<Cell> cells = sheet.cells();
        Pass pass = pass(cells, setting, listener);
        List<CellRun> runs = pass.runs();
        engine.keep(runs);
        Outcomes outcomes = new Outcomes(cells, pass, problems);
        outcomes.resolveNotes(listener);
        if (!options.tolerances() || runs.size() < cells.size()) {
            return outcomes.finished();
        }
        return withTolerances(cells, setting, pass, outcomes, listener);
    }

    private RunOutcome withTolerances(List<Cell> cells, Setting setting, Pass pass, Outcomes outcomes, Consumer<Progress> listener) {
        try {
            if (lastTolerances == null || !lastTolerances.isOf(pass.runs())) {
                SheetReplay replay = new SheetReplay(cells, setting, pass.runs(), engine.compiler(), authorCode, printing);
                lastTolerances = new Tolerances(pass.runs(), replay);
            }
            if (lastTolerances.isNeeded()) {
                listener.accept(new Progress.Tolerances());
                outcomes.fill(lastTolerances, listener);
                outcomes.resolveNotes(listener);
            }
        } catch (StoppedException e) {
            outcomes.addProblem(new Output.Problem(0, 0, "stopped while the inputs' tolerances were worked: tolerances and worst cases "
                    + "are missing. Run the sheet again."));
        }
        return outcomes.finished();
    }

    private Pass pass(List<Cell> cells, Setting setting, Consumer<Progress> listener) {
        Set<Integer> forced = new HashSet<>();
        while (true) {
            List<CellRun> earlier = engine.earlier(cells);
            Pass pass = new Pass(cells, setting, engine.workspace(), new CompiledNow(cells, engine.maker(), Library.javaSources(setting.libraries())), number -> earlier.get(number - 1), authorCode, printing, new Telling(listener));
            boolean fresh = engine.isFresh();
            engine.used();
            try {
                pass.work(forced, fresh);
                return pass;
            } catch (Again again) {
                if (again.cell() == 0) {
                    engine.restart();
                    forced.clear();
                } else {
                    forced.add(again.cell());
                }
            }
        }
    }

    /** The text in front of us, compiled where it stands. */
    private record CompiledNow(List<Cell> cells, WorkingCode.Maker maker, Map<String, String> libraries) implements Pass.Code {
        @Override
        public WorkingCode of(int cell, Draft draft) {
            return maker.make(draft, libraries);
        }

        @Override
        public String below(int cell, String name) {
            for (int number = cell + 1; number <= cells.size(); number++) {
                if (declares(cells.get(number - 1), name)) {
                    return "Cell " + number + ", below, declares it; a cell sees what stands above it.";
                }
            }
            return null;
        }

        private boolean declares(Cell cell, String name) {
            return switch (cell.kind()) {
                case NOTE -> false;
                case INPUT -> cell.inputs().stream().anyMatch(line -> line instanceof InputEntry entry && Names.fold(entry.name()).equals(name));
                case DERIVE -> cell.derives().stream().anyMatch(line -> line instanceof DeriveEntry entry && Names.fold(entry.name()).equals(name));
                case WORKING -> maker.split(cell.source()).stream()
                        .anyMatch(piece -> name.equals(SnippetCompiler.declaredName(piece.source())));
            };
        }
    }

    /** Passes on what happens, as outcomes. Notes are told of when all results stand. */
    private record Telling(Consumer<Progress> listener) implements Pass.Listener {
        @Override
        public void begun(int cell) {
            listener.accept(new Progress.Started(cell));
        }

        @Override
        public void finished(int cell, CellRun run, boolean reused) {
            if (run.kind() != Cell.Kind.NOTE) {
                listener.accept(new Progress.Finished(run.outcome(cell, reused ? CellOutcome.State.REUSED : run.state())));
            }
        }
    }

    @Override
    public void close() {
        engine.close();
    }
}

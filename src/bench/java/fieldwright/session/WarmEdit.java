package fieldwright.session;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Level;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.TearDown;
import org.openjdk.jmh.annotations.Warmup;

/**
 * One line of the shipped silo sheet is edited in a warm session: time until the edited cell's new result is here, through
 * the pipe and the calculation process. {@code nothing} is the same with an unchanged text: the cost of asking.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 30)
@Measurement(iterations = WarmEdit.MEASURED)
@Fork(1)
public class WarmEdit {
    static final int MEASURED = 20;

    @Param({"nothing", "input", "code"})
    public String edit;

    private final List<Double> millis = new ArrayList<>();
    private Session session;
    private String sheet;
    private int edits;
    private CompletableFuture<RunOutcome> run;

    @Setup(Level.Trial)
    public void start() throws Exception {
        try (InputStream in = WarmEdit.class.getResourceAsStream("/fieldwright/worksheets/pellet-silo.fws")) {
            if (in == null) {
                throw new IOException("worksheets/pellet-silo.fws is not packed into the class path");
            }
            sheet = new String(in.readAllBytes(), StandardCharsets.UTF_8);
        }
        session = Session.start();
        session.work(sheet, WorkOptions.FULL, progress -> { }).get();
    }

    private String edited() {
        edits++;
        String text = switch (edit) {
            case "input" -> sheet.replaceFirst("(?m)^(rho_0\\s*=\\s*)[0-9.]+", "$1" + "2.0" + edits);
            case "code" -> sheet.replace("\"(h_c + H)/2\"", "\"(h_c + H)/2.0" + edits + "\"");
            default -> sheet;
        };
        if (text.equals(sheet) != edit.equals("nothing")) {
            throw new IllegalStateException("the line to edit is not on the sheet any more");
        }
        return text;
    }

    @Benchmark
    public RunOutcome untilTheResultIsHere() throws Exception {
        String text = edited();
        CompletableFuture<CellOutcome> shown = new CompletableFuture<>();
        long start = System.nanoTime();
        run = session.work(text, WorkOptions.FULL, progress -> {
            if (progress instanceof Progress.Finished finished
                    && finished.outcome().all(Output.Result.class).stream().anyMatch(result -> result.name().equals("V_mid"))) {
                shown.complete(finished.outcome());
            }
        });
        shown.get();
        millis.add((System.nanoTime() - start) / 1e6);
        return null;
    }

    /** The rest of the run, tolerances and pictures, is not part of the time. */
    @TearDown(Level.Invocation)
    public void finish() throws Exception {
        run.get();
    }

    @TearDown(Level.Trial)
    public void end() {
        session.close();
        List<Double> measured = new ArrayList<>(millis.subList(millis.size() - MEASURED, millis.size()));
        Collections.sort(measured);
        System.out.printf("%nedit of %s: median of %d = %.1f ms%n", edit, MEASURED, (measured.get(MEASURED / 2 - 1) + measured.get(MEASURED / 2)) / 2);
    }
}

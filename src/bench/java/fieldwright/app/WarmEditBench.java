package fieldwright.app;

import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.sheet.Trust;
import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.TimeUnit;
import javafx.application.Platform;
import javafx.scene.Scene;
import javafx.scene.control.TextField;
import javafx.stage.Stage;
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
 * A warm edit of one input in the app, from Enter in the ledger until the new result has been laid out on the page:
 * the pad, the pipe, the calculation process and the page, as a reader has them. The results come first, tolerances and
 * worst cases follow; both are measured. Medians are printed at the end, since JMH prints means of single shots.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.SingleShotTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 30)
@Measurement(iterations = 20)
@Fork(value = 1, jvmArgs = {"-Xmx1g", "-Dglass.platform=Monocle", "-Dmonocle.platform=Headless", "-Dprism.order=sw",
    "-Djava.awt.headless=true", "-Dfile.encoding=UTF-8"})
public class WarmEditBench {
    private static final int MEASURED = 20;

    /** A sheet of the jar or a path to one, the input that is edited, and the result that is watched. */
    @Param("pellet-silo H E_roof")
    public String sheet;

    private final List<Double> results = new ArrayList<>();
    private final List<Double> tolerances = new ArrayList<>();
    private String input;
    private String result;
    private double number;
    private int edits;
    private long begin;
    private Pad pad;
    private Stage stage;
    private volatile CompletableFuture<Void> shown;

    @Setup
    public void open() throws Exception {
        String[] words = sheet.split(" ");
        input = words[1];
        result = words[2];
        SheetDesk desk = SheetDesk.of(words[0].endsWith(".fws") ? Files.readString(Path.of(words[0]))
                : text("/fieldwright/worksheets/" + words[0] + ".fws"));
        Path folder = Files.createTempDirectory("bench");
        CompletableFuture<Void> up = new CompletableFuture<>();
        Platform.startup(() -> up.complete(null));
        up.get(30, TimeUnit.SECONDS);
        onWindow(() -> {
            pad = new Pad(desk, new NoQuestions(), new Trust(folder.resolve("trusted")), SessionCalculator::start, Platform::runLater);
            Scene scene = new Scene(pad, 1240, 760);
            PadWindow.install(scene, pad);
            stage = new Stage();
            stage.setScene(scene);
            stage.show();
            scene.addPostLayoutPulseListener(this::laidOut);
            number = Double.parseDouble(pad.inputs().field(input).getText());
        });
        onWindow(pad::workOut);
        untilIdle();
    }

    private static String text(String resource) throws IOException {
        try (InputStream in = WarmEditBench.class.getResourceAsStream(resource)) {
            if (in == null) {
                throw new IOException(resource + " is not on the class path");
            }
            return new String(in.readAllBytes(), StandardCharsets.UTF_8);
        }
    }

    private static void onWindow(Runnable task) throws Exception {
        CompletableFuture<Void> done = CompletableFuture.runAsync(task, Platform::runLater);
        done.get(120, TimeUnit.SECONDS);
    }

    private void untilIdle() throws Exception {
        boolean[] busy = {true};
        while (busy[0]) {
            Thread.sleep(1);
            onWindow(() -> busy[0] = pad.bench().isBusy());
        }
    }

    private volatile Value before;

    private Value watched() {
        return pad.desk().steps().stream().filter(s -> !s.stale()).flatMap(s -> s.all(Output.Result.class).stream())
                .filter(r -> r.name().equals(result)).map(Output.Result::value).findFirst().orElse(null);
    }

    /** Called when the page was laid out: the new value is then about to be painted. */
    private void laidOut() {
        Value now = watched();
        if (shown != null && now != null && !sameNumber(now, before)) {
            shown.complete(null);
        }
    }

    private static boolean sameNumber(Value a, Value b) {
        return a instanceof Value.Scalar x && b instanceof Value.Scalar y && x.value() == y.value();
    }

    @Benchmark
    public void edit() throws Exception {
        shown = new CompletableFuture<>();
        before = watched();
        String typed = String.format(Locale.ROOT, "%.4f", number * (1 + 0.001 * ++edits));
        begin = System.nanoTime();
        Platform.runLater(() -> {
            TextField field = pad.inputs().field(input);
            field.setText(typed);
            field.getOnAction().handle(null);
        });
        shown.get(60, TimeUnit.SECONDS);
        results.add((System.nanoTime() - begin) / 1e6);
    }

    /** Tolerances and worst cases of an edit are waited for before the next. */
    @TearDown(Level.Invocation)
    public void settle() throws Exception {
        untilIdle();
        tolerances.add((System.nanoTime() - begin) / 1e6);
    }

    @TearDown
    public void close() throws Exception {
        onWindow(() -> {
            pad.close();
            stage.hide();
        });
        System.out.printf(Locale.ROOT, "%n%s: new result on the page, median of %d: %.0f ms; with tolerances and worst cases: %.0f ms%n",
                sheet, MEASURED, median(results), median(tolerances));
    }

    private static double median(List<Double> all) {
        List<Double> last = new ArrayList<>(all.subList(Math.max(0, all.size() - MEASURED), all.size()));
        Collections.sort(last);
        return (last.get((last.size() - 1) / 2) + last.get(last.size() / 2)) / 2;
    }

    private static final class NoQuestions implements Questions {
        @Override
        public boolean mayRun(String name) {
            return true;
        }

        @Override
        public Unsaved unsaved(String name) {
            return Unsaved.DISCARD;
        }

        @Override
        public boolean mayReplace(String name) {
            return false;
        }

        @Override
        public Optional<Path> fileToOpen(Path near) {
            return Optional.empty();
        }

        @Override
        public Optional<Path> fileToSave(Path near, String suggested) {
            return Optional.empty();
        }

        @Override
        public void tell(String heading, String text) {
            throw new IllegalStateException(heading + ": " + text);
        }
    }
}

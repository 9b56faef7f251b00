package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.Value;
import fieldwright.sheet.Trust;
import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import javafx.application.Platform;
import javafx.scene.Scene;
import javafx.scene.control.TextField;
import javafx.stage.Stage;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;
import org.junit.jupiter.api.io.TempDir;

/** The pad with a real calculation process. The time limits only end a hanging test. */
@Timeout(value = 240, unit = TimeUnit.SECONDS)
class PadSessionTest {
    @TempDir
    Path folder;
    private Pad pad;
    private Stage stage;

    @BeforeAll
    static void toolkit() {
        Fx.start();
    }

    private void open(String text) {
        Fx.run(() -> {
            try {
                pad = new Pad(SheetDesk.of(text), new Silent(), new Trust(folder.resolve("trusted")), SessionCalculator::start,
                        Platform::runLater);
            } catch (Exception e) {
                throw new IllegalStateException(e);
            }
            Scene scene = new Scene(pad, 1240, 760);
            PadWindow.install(scene, pad);
            stage = new Stage();
            stage.setScene(scene);
            stage.show();
        });
    }

    @AfterEach
    void close() {
        Fx.run(() -> {
            pad.close();
            stage.hide();
        });
    }

    private void workOut() {
        Fx.run(() -> pad.workOut());
        untilIdle();
    }

    private void untilIdle() {
        Fx.until("the run ends", () -> !pad.bench().isBusy(), 200);
    }

    private Value.Scalar result(String name) {
        return (Value.Scalar) Fx.get(() -> pad.desk().steps().stream().flatMap(s -> s.all(Output.Result.class).stream())
                .filter(r -> r.name().equals(name)).findFirst().orElseThrow().value());
    }

    @Test
    void aSheetIsWorkedAndFollowsItsInputs() {
        open(Samples.SILO);
        workOut();
        assertEquals("", Fx.get(() -> String.join("; ", pad.desk().steps().stream()
                .flatMap(s -> s.all(Output.Problem.class).stream()).map(Output.Problem::text).toList())));
        // By hand: pi*rho_0*R_s^2*H*(1 - k/2) with 2.1e-6 C/m^3, 1.8 m, 4 m, 0.6.
        double charge = Math.PI * 2.1e-6 * 1.8 * 1.8 * 4 * 0.7;
        assertEquals(charge, result("Q").value(), 1e-9 * charge);
        assertTrue(result("Q").tolerance() > 0.25 * charge && result("Q").tolerance() < 0.35 * charge);
        assertTrue(Fx.get(() -> pad.desk().isCurrent()));
        Fx.run(() -> {
            TextField field = pad.inputs().field("H");
            field.setText("2");
            field.getOnAction().handle(null);
        });
        untilIdle();
        assertEquals(charge / 2, result("Q").value(), 1e-9 * charge);
        assertTrue(Fx.get(() -> pad.status()).contains("all steps agree with a clean run"));
    }

    @Test
    void aRunawayStepIsStoppedAndTheNextRunIsUnharmed() {
        open("fieldwright sheet 1\n\n:: derive\na = 2\n\n:: working\nwhile (true) { }\n");
        Fx.run(() -> pad.workOut());
        Fx.until("the step is under way", () -> pad.bench().reached() == 2, 100);
        Fx.run(() -> pad.stop());
        untilIdle();
        assertEquals(CellOutcome.State.STOPPED, Fx.get(() -> pad.desk().steps().get(1).outcome().state()));
        assertTrue(Fx.get(() -> pad.desk().steps().get(1).stale()));
        Fx.run(() -> pad.desk().editStep(pad.desk().steps().get(1).id(), "var b = calc(\"2*a\");"));
        workOut();
        assertEquals(4, result("b").value());
        assertTrue(Fx.get(() -> pad.desk().isCurrent()));
    }

    @Test
    void anErrorStandsAtItsStepWithItsLine() {
        open("fieldwright sheet 1\n\n:: derive\na = 2 m\n\n:: working\nvar b = 1;\nvar c = foo(b);\n");
        workOut();
        Step step = Fx.get(() -> pad.desk().steps().get(1));
        Output.Problem problem = step.all(Output.Problem.class).get(0);
        assertEquals(2, step.lineWithin(problem.line()));
        assertTrue(problem.message().contains("foo"), problem.message());
        assertEquals("1 step has an error", Fx.get(() -> pad.status()));
    }

    private static final class Silent implements Questions {
        @Override
        public boolean mayRun(String name) {
            throw new AssertionError("a new sheet is not asked about");
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
            throw new AssertionError(heading + ": " + text);
        }
    }
}

package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import fieldwright.sheet.Trust;
import java.lang.ref.WeakReference;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import javafx.application.Platform;
import javafx.event.Event;
import javafx.scene.Node;
import javafx.scene.Parent;
import javafx.scene.Scene;
import javafx.scene.control.Labeled;
import javafx.scene.control.TextField;
import javafx.scene.image.WritableImage;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.text.Text;
import javafx.stage.Stage;
import org.fxmisc.richtext.CodeArea;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class PadTest {
    @TempDir
    Path folder;
    private Path file;
    private FakeCalculator calculator;
    private int started;
    private Answers answers;
    private Pad pad;
    private Stage stage;

    /** Prepared answers, and what was asked. */
    private static final class Answers implements Questions {
        final List<String> asked = new ArrayList<>();
        boolean run = true;
        boolean replace;
        Unsaved unsaved = Unsaved.STAY;
        Path save;

        @Override
        public boolean mayRun(String name) {
            asked.add("run " + name);
            return run;
        }

        @Override
        public Unsaved unsaved(String name) {
            asked.add("unsaved " + name);
            return unsaved;
        }

        @Override
        public boolean mayReplace(String name) {
            asked.add("replace " + name);
            return replace;
        }

        @Override
        public Optional<Path> fileToOpen(Path near) {
            asked.add("open");
            return Optional.empty();
        }

        @Override
        public Optional<Path> fileToSave(Path near, String suggested) {
            asked.add("save " + suggested);
            return Optional.ofNullable(save);
        }

        @Override
        public void tell(String heading, String text) {
            asked.add("tell " + heading + ": " + text);
        }
    }

    @BeforeAll
    static void toolkit() {
        Fx.start();
    }

    @BeforeEach
    void open() throws Exception {
        file = folder.resolve("silo.fws");
        Files.writeString(file, Samples.SILO);
        open(Samples::outcome);
    }

    private void open(Function<String, RunOutcome> answer) {
        calculator = new FakeCalculator(answer);
        answers = new Answers();
        started = 0;
        Fx.run(() -> {
            try {
                show(SheetDesk.open(file));
            } catch (Exception e) {
                throw new IllegalStateException(e);
            }
        });
    }

    private void show(SheetDesk desk) {
        pad = new Pad(desk, answers, new Trust(folder.resolve("trusted")), () -> {
            started++;
            return calculator;
        }, Platform::runLater);
        Scene scene = new Scene(pad, 1240, 760);
        PadWindow.install(scene, pad);
        stage = new Stage();
        stage.setScene(scene);
        stage.show();
    }

    @AfterEach
    void close() {
        calculator.letGo();
        Fx.run(() -> {
            pad.close();
            stage.hide();
        });
    }

    private void untilIdle() {
        Fx.until("the run ends", () -> !pad.bench().isBusy());
    }

    private StepView view(int number) {
        return pad.page().view(pad.desk().steps().get(number - 1).id());
    }

    private static String words(Node node) {
        StringBuilder words = new StringBuilder();
        collect(node, words);
        return words.toString().replace('\u00a0', ' ');
    }

    private static void collect(Node node, StringBuilder words) {
        if (node instanceof Text text) {
            words.append(text.getText());
        } else if (node instanceof Labeled label && label.getGraphic() == null) {
            words.append(label.getText()).append('\n');
        } else if (node instanceof Parent parent) {
            if (node instanceof Labeled label) {
                words.append(label.getText()).append('\n');
            }
            parent.getChildrenUnmodifiable().forEach(child -> collect(child, words));
        }
    }

    private String page() {
        return Fx.get(() -> words(pad));
    }

    private void press(Node target, KeyCode code, boolean control) {
        Event.fireEvent(target, new KeyEvent(KeyEvent.KEY_PRESSED, "", "", code, false, control, false, false));
    }

    @Test
    void openingRunsNothing() throws Exception {
        Fx.run(() -> pad.applyCss());
        Thread.sleep(100);
        assertEquals(0, started);
        assertEquals(List.of(), calculator.orders);
        assertEquals(List.of(), answers.asked);
        String page = page();
        assertTrue(page.contains("Tarnwick pellet works") && page.contains("inner radius"), page);
        assertTrue(page.contains("nothing worked out yet"));
        assertFalse(page.contains("59.9"));
    }

    @Test
    void recordedResultsAreShownAndSaidToBe() throws Exception {
        Fx.run(() -> {
            pad.close();
            stage.hide();
        });
        Files.writeString(file, Samples.SILO.replace("\n:: derive", ":rec Q = 5.98511e-5 C | num 3e-20 | tol 1.7e-05\n\n:: derive"));
        open(Samples::outcome);
        String page = page();
        assertTrue(page.contains("on record") && page.contains("59.9 µC") && page.contains("± 17 µC (k = 2) · num. 3·10⁻²⁰ C"), page);
        assertEquals(List.of(), calculator.orders);
    }

    @Test
    void aSheetFromElsewhereRunsOnlyWhenItsReaderSaysSoAndIsAskedOnce() {
        answers.run = false;
        Fx.run(() -> pad.workOut());
        assertEquals(List.of(), calculator.orders);
        answers.run = true;
        Fx.run(() -> pad.workOut());
        untilIdle();
        assertEquals(List.of(Samples.SILO), calculator.orders);
        Fx.run(() -> pad.workOut());
        untilIdle();
        assertEquals(List.of("run silo.fws", "run silo.fws"), answers.asked);
        Fx.run(() -> {
            pad.close();
            stage.hide();
        });
        open(Samples::outcome);
        Fx.run(() -> pad.workOut());
        untilIdle();
        assertEquals(List.of(), answers.asked, "the text is known now");
        assertEquals(1, calculator.orders.size());
    }

    @Test
    void workingOutShowsResultsChecksAndCautions() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        String page = page();
        for (String shown : List.of("59.9 µC", "277 kV/m", "all steps agree with a clean run", "endless slab within 5 %", "3.3 times",
                "margin 8.6 ≥ 3", "3 MV/m holds for a plain gap", "taken: the roof is an earthed plane", "common practice, plain gap",
                "Checks: 1 of 3 fails", "no source")) {
            assertTrue(page.contains(shown), () -> shown + " in " + page);
        }
        assertFalse(page.contains("{E_roof}"), "the note quotes the result");
    }

    @Test
    void anInputChangedInTheLedgerRewritesItsNumberWorksOutAndIsSavedByteForByte() throws Exception {
        Fx.run(() -> pad.workOut());
        untilIdle();
        Fx.run(() -> {
            TextField field = pad.inputs().field("H");
            field.requestFocus();
            field.setText("8.00");
            press(field, KeyCode.ENTER, false);
        });
        Fx.until("the result follows", () -> words(view(3)).contains("554 kV/m"));
        untilIdle();
        String expected = Samples.SILO.replace("H     = 4.00 m ± 0.05 m ", "H     = 8.00 m ± 0.05 m ");
        assertEquals(expected, calculator.orders.get(1));
        assertTrue(page().startsWith("Fieldwright") && page().contains("unsaved"));
        assertTrue(Fx.get(() -> pad.save()));
        String saved = Files.readString(file);
        assertEquals(expected, String.join("\n", saved.lines().filter(l -> !l.startsWith(":rec")).toList()) + "\n");
        assertTrue(saved.contains(":rec E_roof = 553938 V/m"), saved);
        assertFalse(Fx.get(() -> pad.desk().isUnsaved()));
    }

    @Test
    void aNumberThatIsNoneIsRefusedWhereItStands() {
        Fx.run(() -> {
            TextField field = pad.inputs().field("H");
            field.requestFocus();
            field.setText("4,5");
            press(field, KeyCode.ENTER, false);
        });
        assertTrue(page().contains("Write the decimals behind a point: 4.5"));
        assertFalse(Fx.get(() -> pad.desk().isUnsaved()));
        assertEquals(List.of(), calculator.orders);
        Fx.run(() -> press(pad.inputs().field("H"), KeyCode.ESCAPE, false));
        assertEquals("4.00", Fx.get(() -> pad.inputs().field("H").getText()));
    }

    @Test
    void aStepIsEditedAsItsTextAndWorkedOutWhenItIsLeft() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        Fx.run(() -> {
            view(4).requestFocus();
            press(view(4), KeyCode.ENTER, false);
            view(4).editor().area().appendText("\nZ = 1 m");
            press(view(4).editor().area(), KeyCode.ESCAPE, false);
        });
        untilIdle();
        assertNull(Fx.get(() -> view(4).editor()));
        assertSame(Fx.get(() -> view(4)), Fx.get(() -> stage.getScene().getFocusOwner()), "the keys are back on the step");
        assertTrue(Fx.get(() -> pad.desk().sheet().cells().get(3).source()).endsWith("\nZ = 1 m"));
        assertEquals(2, calculator.orders.size());
        Fx.run(() -> pad.undo());
        untilIdle();
        assertFalse(Fx.get(() -> pad.desk().isUnsaved()));
    }

    @Test
    void formulasAreTypesetBelowWhileTheyAreWrittenAndTheKeysStay() {
        Fx.run(() -> press(view(4), KeyCode.ENTER, false));
        int before = Fx.get(() -> pictures(view(4)).size());
        Fx.run(() -> view(4).editor().area().appendText("\nA_s = pi*R_s^2"));
        Fx.until("the new formula stands below", () -> pictures(view(4)).size() == before + 1);
        assertSame(Fx.get(() -> view(4).editor().area()), Fx.get(() -> stage.getScene().getFocusOwner()));
    }

    @Test
    void rowsThatDidNotChangeKeepTheirNodes() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        List<PictureView> formulas = Fx.get(() -> pictures(view(4)).stream().filter(p -> p.getStyleClass().contains("formula")).toList());
        Fx.run(() -> {
            pad.inputs().field("H").setText("8.00");
            press(pad.inputs().field("H"), KeyCode.ENTER, false);
        });
        untilIdle();
        assertEquals(formulas, Fx.get(() -> pictures(view(4)).stream().filter(p -> p.getStyleClass().contains("formula")).toList()));
    }

    @Test
    void editingWithoutAChangeRunsNothing() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        Fx.run(() -> {
            press(view(4), KeyCode.ENTER, false);
            press(view(4).editor().area(), KeyCode.ESCAPE, false);
        });
        assertEquals(1, calculator.orders.size());
        assertFalse(Fx.get(() -> pad.desk().isUnsaved()));
    }

    @Test
    void editorsThatWereLeftAreGone() throws Exception {
        List<WeakReference<CodeArea>> areas = new ArrayList<>();
        for (int i = 0; i < 30; i++) {
            int number = 1 + i % 5;
            Fx.run(() -> {
                press(view(number), KeyCode.ENTER, false);
                areas.add(new WeakReference<>(view(number).editor().area()));
            });
            Fx.run(() -> press(view(number).editor().area(), KeyCode.ESCAPE, false));
        }
        Fx.run(() -> stage.getScene().getRoot().layout());
        long survivors = areas.size();
        for (int i = 0; i < 50 && survivors > 1; i++) {
            System.gc();
            Thread.sleep(20);
            Fx.run(() -> pad.requestLayout());
            survivors = areas.stream().filter(a -> a.get() != null).count();
        }
        assertTrue(survivors <= 1, survivors + " of 30 editors are still alive");
    }

    @Test
    void theWindowAnswersWhileAStepRunsAndStopEndsIt() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        calculator.hold();
        Fx.run(() -> {
            press(view(3), KeyCode.ENTER, false);
            view(3).editor().area().appendText("//");
            press(view(3).editor().area(), KeyCode.ENTER, true);
        });
        Fx.until("the bar says so", () -> pad.bar().statusText().contains("working out"));
        Fx.run(() -> pad.title().value("revision").field().setText("C"));
        assertTrue(Fx.get(() -> pad.bench().isBusy()));
        Fx.run(() -> pad.stop());
        untilIdle();
        String status = Fx.get(() -> pad.bar().statusText());
        assertTrue(status.contains("stale"), status);
        assertTrue(page().contains("59.9 µC"), "old results stand, marked");
    }

    @Test
    void anEditDuringARunAsksAgainWithTheNewText() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        calculator.hold();
        Fx.run(() -> pad.workOut());
        Fx.run(() -> {
            pad.inputs().field("H").setText("8.00");
            press(pad.inputs().field("H"), KeyCode.ENTER, false);
        });
        Fx.until("the new text is worked", () -> !pad.bench().isBusy() && words(view(3)).contains("554 kV/m"));
        assertTrue(calculator.orders.get(calculator.orders.size() - 1).contains("8.00 m"));
        assertTrue(page().contains("all steps agree with a clean run"));
    }

    @Test
    void aCalculationThatDiesLeavesTheTextAndSaysSo() {
        Fx.run(() -> {
            pad.close();
            stage.hide();
        });
        open(text -> {
            throw new IllegalStateException("out of memory");
        });
        Fx.run(() -> pad.workOut());
        untilIdle();
        assertTrue(page().contains("the calculation ended: out of memory. The text is safe."), page());
        assertFalse(page().contains("all steps agree"));
        assertEquals(Samples.SILO, Fx.get(() -> pad.desk().sheet().write()));
    }

    @Test
    void leavingAnUnsavedSheetAsks() throws Exception {
        Fx.run(() -> {
            press(view(1), KeyCode.ENTER, false);
            view(1).editor().area().appendText(" More.");
        });
        assertFalse(Fx.get(() -> pad.mayLeaveSheet()));
        assertEquals(List.of("unsaved silo.fws"), answers.asked);
        answers.unsaved = Questions.Unsaved.SAVE;
        assertTrue(Fx.get(() -> pad.mayLeaveSheet()));
        assertTrue(Files.readString(file).contains(" More.\n"));
        assertTrue(Fx.get(() -> pad.mayLeaveSheet()));
        assertEquals(2, answers.asked.size());
    }

    @Test
    void aFileThatIsNotASheetIsNamedAndTheOldOneStays() throws Exception {
        Path other = folder.resolve("list.txt");
        Files.writeString(other, "milk\n");
        Fx.run(() -> pad.open(other));
        assertEquals(1, answers.asked.size());
        assertTrue(answers.asked.get(0).startsWith("tell list.txt cannot be opened: line 1: not a sheet"), answers.asked.get(0));
        assertEquals("silo.fws", Fx.get(() -> pad.name()));
    }

    @Test
    void aFileChangedByAnotherProgramIsNotReplacedUnasked() throws Exception {
        Fx.run(() -> pad.desk().setHeader("revision", "C"));
        String theirs = Samples.SILO.replace("revision: B", "revision: X");
        Files.writeString(file, theirs);
        assertFalse(Fx.get(() -> pad.save()));
        assertEquals(theirs, Files.readString(file));
        answers.replace = true;
        assertTrue(Fx.get(() -> pad.save()));
        assertTrue(Files.readString(file).contains("revision: C"));
        assertTrue(Fx.get(() -> pad.save()), "no question about one's own text");
        assertEquals(List.of("replace silo.fws", "replace silo.fws"), answers.asked);
    }

    @Test
    void aSheetThatCannotBeSavedStaysUnsaved() {
        Fx.run(() -> pad.title().value("revision").field().requestFocus());
        Fx.run(() -> {
            pad.title().value("revision").field().setText("C");
            press(pad.title().value("revision").field(), KeyCode.ENTER, false);
        });
        assertTrue(Fx.get(() -> pad.desk().isUnsaved()));
        answers.save = folder.resolve("no").resolve("such").resolve("folder.fws");
        assertFalse(Fx.get(() -> pad.saveAs()));
        assertTrue(answers.asked.get(1).startsWith("tell not saved: folder.fws"), answers.asked.toString());
        assertTrue(Fx.get(() -> pad.desk().isUnsaved()));
    }

    @Test
    void stepsAreAddedMovedAndRemovedByTheirKeys() {
        Fx.run(() -> {
            view(2).requestFocus();
            Event.fireEvent(view(2), new KeyEvent(KeyEvent.KEY_PRESSED, "", "", KeyCode.DIGIT3, false, false, true, false));
        });
        assertEquals(Cell.Kind.DERIVE, Fx.get(() -> pad.desk().steps().get(2).cell().kind()));
        assertNotNull(Fx.get(() -> view(3).editor()), "a new step is open for writing");
        Fx.run(() -> {
            view(3).editor().area().appendText("a = 2*R_s");
            press(view(3).editor().area(), KeyCode.ESCAPE, false);
            Event.fireEvent(view(3), new KeyEvent(KeyEvent.KEY_PRESSED, "", "", KeyCode.DOWN, false, false, true, false));
        });
        assertEquals("a = 2*R_s", Fx.get(() -> pad.desk().steps().get(3).cell().source()));
        Fx.run(() -> press(view(4), KeyCode.DELETE, false));
        assertEquals(5, Fx.get(() -> pad.desk().steps().size()));
        Fx.run(() -> pad.undo());
        assertEquals(6, Fx.get(() -> pad.desk().steps().size()));
    }

    @Test
    void codeFoldsCautionsDoNot() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        assertTrue(page().contains("totalCharge"));
        Fx.run(() -> pad.setFolded(true));
        String page = page();
        assertFalse(page.contains("totalCharge"));
        assertTrue(page.contains("3 MV/m holds for a plain gap") && page.contains("taken: the roof is an earthed plane"));
        Fx.run(() -> press(view(3), KeyCode.ENTER, false));
        assertNotNull(Fx.get(() -> view(3).editor()));
    }

    @Test
    void picturesArePaintedAndFollowTheZoom() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        List<PictureView> pictures = Fx.get(() -> pictures(pad));
        assertTrue(pictures.size() > 15, pictures.size() + " pictures");
        for (PictureView picture : pictures) {
            assertTrue(Fx.get(() -> inked(picture)) > 8, () -> "ink of " + picture.getAccessibleText());
        }
        PictureView plot = pictures.stream().filter(p -> p.getStyleClass().contains("plot")).findFirst().orElseThrow();
        PictureView symbol = pictures.stream().filter(p -> p.getStyleClass().contains("symbol")).findFirst().orElseThrow();
        double narrow = Fx.get(symbol::getWidth);
        double before = Fx.get(plot::getHeight);
        Fx.run(() -> {
            pad.zoom().larger();
            pad.applyCss();
            pad.layout();
        });
        // Not exactly 1.1: the columns share the width out anew.
        assertEquals(1.1, Fx.get(plot::getHeight) / before, 0.03);
        assertEquals(1.1 * (narrow - 4), Fx.get(symbol::getWidth) - 4, 1.5);
        assertTrue(Fx.get(() -> inked(plot)) > 400);
    }

    private static List<PictureView> pictures(Node node) {
        List<PictureView> found = new ArrayList<>();
        if (node instanceof PictureView picture) {
            found.add(picture);
        } else if (node instanceof Parent parent) {
            parent.getChildrenUnmodifiable().forEach(child -> found.addAll(pictures(child)));
        }
        return found;
    }

    private static int inked(Node node) {
        WritableImage image = node.snapshot(null, null);
        int ground = image.getPixelReader().getArgb(0, 0);
        int n = 0;
        for (int y = 0; y < image.getHeight(); y++) {
            for (int x = 0; x < image.getWidth(); x++) {
                n += image.getPixelReader().getArgb(x, y) != ground ? 1 : 0;
            }
        }
        return n;
    }

    @Test
    void aNarrowWindowLosesNothing() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        for (double width : new double[] {1600, 1000, 700, 560}) {
            Fx.run(() -> {
                pad.resize(width, 800);
                pad.applyCss();
                pad.layout();
            });
            Fx.run(() -> {
                for (int i = 1; i <= 5; i++) {
                    for (Node column : view(i).getChildrenUnmodifiable()) {
                        assertTrue(column.getBoundsInParent().getMaxX() <= view(i).getWidth() + 0.5 && column.getLayoutX() >= 0,
                                "column of step " + view(i).step().number() + " at width " + width);
                    }
                }
            });
        }
    }

    @Test
    void everyControlIsReachedByTab() {
        Fx.run(() -> pad.workOut());
        untilIdle();
        Fx.run(() -> {
            for (int i = 1; i <= 5; i++) {
                assertTrue(view(i).isFocusTraversable());
            }
            assertTrue(pad.inputs().field("k").isFocusTraversable());
            assertTrue(pad.title().value("approved").field().isFocusTraversable());
        });
    }
}

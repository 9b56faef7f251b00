package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class SheetDeskTest {
    private static SheetDesk worked() throws Exception {
        SheetDesk desk = SheetDesk.of(Samples.SILO);
        desk.take(desk.order(), Samples.outcome(Samples.SILO));
        return desk;
    }

    private static long id(SheetDesk desk, int number) {
        return desk.steps().get(number - 1).id();
    }

    private static String stale(SheetDesk desk) {
        return desk.steps().stream().filter(Step::stale).map(s -> Integer.toString(s.number())).collect(Collectors.joining(" "));
    }

    @Test
    void openingKnowsOnlyWhatIsOnRecord() throws Exception {
        SheetDesk desk = SheetDesk.of(Samples.SILO.replace("\n:: derive", ":rec Q = 5.98511e-5 C | num 3e-20\n\n:: derive"));
        assertFalse(desk.wasWorked());
        assertFalse(desk.isCurrent());
        assertEquals("", stale(desk));
        assertTrue(desk.steps().get(2).isRecorded());
        assertEquals(5.98511e-5, ((fieldwright.output.Value.Scalar) desk.steps().get(2).all(Output.Result.class).get(0).value()).value());
    }

    @Test
    void aWholeRunMakesEveryStepCurrent() throws Exception {
        SheetDesk desk = worked();
        assertTrue(desk.isCurrent());
        assertEquals("", stale(desk));
    }

    @Test
    void anEditMakesStaleWhatReadsItAndWhatReadsThat() throws Exception {
        SheetDesk desk = worked();
        Cell inputs = desk.sheet().cells().get(1);
        desk.editStep(id(desk, 2), inputs.source().replace("4.00 m", "5.00 m"));
        assertEquals("1 2 3 4 5", stale(desk), "the note quotes E_roof");
        desk.undo();
        assertEquals("", stale(desk), "with the old text the old results hold again");
        desk.redo();
        assertEquals("1 2 3 4 5", stale(desk));
    }

    @Test
    void aNoteChangesNothingElse() throws Exception {
        SheetDesk desk = worked();
        desk.editStep(id(desk, 1), "Nothing is asked.");
        assertEquals("1", stale(desk));
    }

    @Test
    void theLastStepChangesNothingAbove() throws Exception {
        SheetDesk desk = worked();
        desk.editStep(id(desk, 5), "check(\"a\", Q, Q, 1e-9);");
        assertEquals("5", stale(desk));
    }

    @Test
    void stepsBelowOneThatWasRemovedOrMovedAreStale() throws Exception {
        SheetDesk desk = worked();
        long cloud = id(desk, 3);
        desk.removeStep(cloud);
        assertEquals("1 3 4", stale(desk));
        desk.undo();
        assertEquals("", stale(desk));
        desk.moveStep(cloud, 1);
        assertEquals(cloud, id(desk, 4));
        assertEquals("1 3 4 5", stale(desk));
        assertTrue(desk.sheet().cells().get(3).source().contains("totalCharge"));
    }

    @Test
    void aStoppedRunLeavesOldResultsMarkedStale() throws Exception {
        SheetDesk desk = worked();
        List<CellOutcome> cells = new ArrayList<>(Samples.outcome(Samples.SILO).cells());
        cells.set(2, new CellOutcome(3, CellOutcome.State.STOPPED, List.of(), Set.of()));
        cells.set(3, new CellOutcome(4, CellOutcome.State.NOT_REACHED, List.of(), Set.of()));
        cells.set(4, new CellOutcome(5, CellOutcome.State.NOT_REACHED, List.of(), Set.of()));
        desk.editStep(id(desk, 2), desk.sheet().cells().get(1).source().replace("4.00 m", "5.00 m"));
        desk.take(desk.order(), new RunOutcome(cells, List.of()));
        assertEquals("3 4 5", stale(desk), "step 4 reads only inputs, but their old values");
        assertEquals(2, desk.steps().get(3).all(Output.Result.class).size());
        assertFalse(desk.isCurrent());
    }

    @Test
    void aRunThatDiesOnTheWayLeavesTheRestStale() throws Exception {
        SheetDesk desk = worked();
        desk.editStep(id(desk, 2), desk.sheet().cells().get(1).source().replace("4.00 m", "5.00 m"));
        SheetDesk.Order order = desk.order();
        desk.take(order, List.of(Samples.outcome(order.text()).cells().get(1)));
        assertEquals("1 3 4 5", stale(desk));
    }

    @Test
    void aStepIsCurrentAsSoonAsItIsWorkedForTheFirstTime() throws Exception {
        SheetDesk desk = SheetDesk.of(Samples.SILO);
        SheetDesk.Order order = desk.order();
        desk.take(order, Samples.outcome(order.text()).cells().subList(0, 4));
        assertEquals("5", stale(desk), "only what is still to come");
    }

    @Test
    void resultsOfAnOldTextDoNotPassForThoseOfANewOne() throws Exception {
        SheetDesk desk = SheetDesk.of(Samples.SILO);
        SheetDesk.Order order = desk.order();
        desk.editStep(id(desk, 3), "var Q = 1;");
        desk.take(order, Samples.outcome(Samples.SILO));
        assertTrue(desk.steps().get(2).stale());
        assertFalse(desk.isCurrent());
    }

    @Test
    void savingWithoutAChangeKeepsEveryByte(@TempDir Path folder) throws Exception {
        Path file = folder.resolve("a.fws");
        String text = Samples.SILO.replace("\n", "\r\n");
        Files.writeString(file, text);
        SheetDesk desk = SheetDesk.open(file);
        assertFalse(desk.isUnsaved());
        assertEquals("", desk.save(file));
        assertEquals(text, Files.readString(file));
    }

    @Test
    void savingCurrentResultsPutsThemOnRecord(@TempDir Path folder) throws Exception {
        Path file = folder.resolve("a.fws");
        SheetDesk desk = worked();
        desk.save(file);
        SheetDesk again = SheetDesk.open(file);
        assertTrue(again.steps().get(2).isRecorded());
        assertEquals(List.of("Q", "E_roof"), again.steps().get(2).all(Output.Result.class).stream().map(Output.Result::name).toList());
        String withoutRecords = Files.readString(file).lines().filter(l -> !l.startsWith(":rec")).collect(Collectors.joining("\n", "", "\n"));
        assertEquals(Samples.SILO, withoutRecords, "only record lines were added");
    }

    @Test
    void staleResultsAreNotPutOnRecord(@TempDir Path folder) throws Exception {
        SheetDesk desk = worked();
        desk.editStep(id(desk, 2), desk.sheet().cells().get(1).source().replace("4.00 m", "5.00 m"));
        desk.save(folder.resolve("a.fws"));
        assertFalse(Files.readString(folder.resolve("a.fws")).contains(":rec"));
    }

    @Test
    void theRecordOfASignedSheetIsLeftAlone(@TempDir Path folder) throws Exception {
        String signed = Samples.SILO + "\n:signed checked: KM | revision B | 2026-03-20\n";
        SheetDesk desk = SheetDesk.of(signed);
        desk.take(desk.order(), Samples.outcome(signed));
        String remark = desk.save(folder.resolve("a.fws"));
        assertTrue(remark.contains("signed"), remark);
        assertEquals(signed, Files.readString(folder.resolve("a.fws")));
    }

    @Test
    void undoGoesBackThroughEveryKindOfChange() throws Exception {
        SheetDesk desk = SheetDesk.of(Samples.SILO);
        desk.setHeader("revision", "C");
        long id = desk.insertStep(1, Cell.Kind.DERIVE);
        desk.editStep(id, "a = 1 m");
        desk.labelStep(id, "length");
        desk.moveStep(id, 1);
        desk.removeStep(id(desk, 1));
        assertTrue(desk.isUnsaved());
        for (int i = 0; i < 6; i++) {
            desk.undo();
        }
        assertFalse(desk.isUnsaved());
        assertFalse(desk.canUndo());
        for (int i = 0; i < 6; i++) {
            desk.redo();
        }
        assertEquals("length", desk.step(id).cell().label());
        assertEquals(2, desk.step(id).number());
    }
}

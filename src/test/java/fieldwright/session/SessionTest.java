package fieldwright.session;

import static fieldwright.session.SheetRunnerTest.sheet;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import fieldwright.output.CellOutcome;
import fieldwright.output.CellOutcome.State;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.Duration;
import java.util.List;
import java.util.Queue;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.regex.Matcher;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.TimeUnit;
import java.util.function.Consumer;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.Timeout;

/** Sheets worked in a real calculation process, which the cells do their worst to. The time limits only end a hanging test. */
@Timeout(value = 180, unit = TimeUnit.SECONDS)
class SessionTest {
    private static final String AFTER = "derive\nafter = 2";
    private static Session session;

    @BeforeAll
    static void start() {
        session = Session.start(new SessionOptions(192, Duration.ofSeconds(1), false));
    }

    @AfterAll
    static void end() {
        session.close();
    }

    private static RunOutcome work(String... cells) throws Exception {
        return session.work(sheet(cells), WorkOptions.FULL, progress -> { }).get();
    }

    /** Works a sheet and stops it once a cell's Java runs: it leaves a mark first, since compiling takes its own time. */
    private static RunOutcome workAndStop(int cell, String... cells) throws Exception {
        Path mark = Files.createTempFile("fieldwright", ".mark");
        cells[cell - 1] = cells[cell - 1].replaceFirst("^working\n",
                Matcher.quoteReplacement("working\njava.nio.file.Files.delete(java.nio.file.Path.of(\"" + mark.toString().replace("\\", "\\\\") + "\"));\n"));
        CompletableFuture<RunOutcome> run = session.work(sheet(cells), WorkOptions.FULL, progress -> { });
        while (Files.exists(mark) && !run.isDone()) {
            Thread.sleep(10);
        }
        assertFalse(run.isDone(), "the cell runs until it is stopped");
        Thread.sleep(100);
        session.stop();
        return run.get();
    }

    private static List<State> states(RunOutcome outcome) {
        return outcome.cells().stream().map(CellOutcome::state).toList();
    }

    private static String onlyProblem(RunOutcome outcome) {
        assertEquals(1, outcome.problems().size(), outcome.problems().toString());
        return outcome.problems().get(0).text();
    }

    /** The next run works as if nothing had been. */
    private static void assertUnharmed() throws Exception {
        RunOutcome outcome = work("input\na = 2 m", "working\nvar b = a.times(3);", AFTER);
        assertEquals(List.of(), outcome.problems());
        assertEquals(2, outcome.all(Output.Result.class).size());
    }

    @Test
    void worksASheetAndTellsOfEachCell() throws Exception {
        Queue<Progress> news = new ConcurrentLinkedQueue<>();
        RunOutcome outcome = session.work(sheet("input\na = 2 m ± 0.1 m", "working\nvar b = a.times(3);\nSystem.out.println(\"µ\");\nSystem.err.println(\"e\");"),
                WorkOptions.FULL, news::add).get();
        assertEquals(List.of(), outcome.problems());
        assertEquals(List.of("µ\n", "e\n"), outcome.all(Output.Printed.class).stream().map(Output.Printed::text).toList());
        assertTrue(news.contains(new Progress.Started(1)) && news.contains(new Progress.Started(2)));
        assertTrue(news.contains(new Progress.Tolerances()));
        assertTrue(news.contains(new Progress.Finished(outcome.cells().get(1))), "the last news of a cell is its outcome");
    }

    @Test
    void aRunawayLoopIsStopped() throws Exception {
        RunOutcome outcome = workAndStop(2, "derive\na = 1", "working\nwhile (true) { Thread.onSpinWait(); }", AFTER);
        assertEquals(List.of(State.STOPPED, State.NOT_REACHED), states(outcome).subList(1, 3));
        assertTrue(outcome.isStopped());
        assertEquals(List.of(), outcome.problems());
        assertUnharmed();
    }

    @Test
    void aSleepingCellIsStoppedAndTheProcessLives() throws Exception {
        assertUnharmed();
        long pid = session.childPid();
        RunOutcome outcome = workAndStop(1, "working\nThread.sleep(60_000);");
        assertEquals(List.of(State.STOPPED), states(outcome));
        assertUnharmed();
        assertEquals(pid, session.childPid());
    }

    @Test
    void aLoopThatCatchesEverythingIsKilled() throws Exception {
        RunOutcome outcome = workAndStop(1, "working\nwhile (true) { try { Thread.sleep(1); } catch (Throwable t) { } }", AFTER);
        assertEquals(List.of(State.STOPPED, State.NOT_REACHED), states(outcome));
        assertUnharmed();
    }

    @Test
    void printingWithoutEndIsCutAndStopped() throws Exception {
        RunOutcome outcome = work("working\nfor (int i = 0; i < 100_000; i++) System.out.println(\"line \" + i);");
        String printed = outcome.all(Output.Printed.class).get(0).text();
        assertTrue(printed.startsWith("line 0\nline 1\n") && printed.endsWith("line 199\n… cut"), printed.substring(printed.length() - 40));
        String one = work("working\nSystem.out.print(\"ä\".repeat(50_000));").all(Output.Printed.class).get(0).text();
        assertEquals("ä".repeat(20_000) + "\n… cut", one);
        assertEquals(List.of(State.STOPPED), states(workAndStop(1, "working\nwhile (true) System.out.println(\"again\");")));
        assertUnharmed();
    }

    @Test
    void outOfMemoryNamesTheCell() throws Exception {
        RunOutcome outcome = work("derive\na = 1", "working\nvar hoard = new ArrayList<byte[]>();\nwhile (true) hoard.add(new byte[1 << 20]);", AFTER);
        assertEquals(List.of(State.FAILED, State.NOT_REACHED), states(outcome).subList(1, 3));
        assertTrue(outcome.cells().get(0).isComplete(), "what was worked above stands");
        assertEquals("cell 2, line 6: the calculation process ended while this cell was worked: it ran out of memory (limit 192 MB). "
                + "The sheet is unharmed; change the cell and run again.", onlyProblem(outcome));
        assertUnharmed();
    }

    @Test
    void systemExitNamesTheCell() throws Exception {
        RunOutcome outcome = work("derive\na = 1", "working\nSystem.exit(0);", AFTER);
        assertTrue(onlyProblem(outcome).startsWith("cell 2, line 6: the calculation process ended while this cell was worked: "
                + "the cell called System.exit"), onlyProblem(outcome));
        assertUnharmed();
    }

    @Test
    void haltNamesTheCell() throws Exception {
        assertTrue(onlyProblem(work("working\nRuntime.getRuntime().halt(5);")).contains("it ended with exit code 5"));
        assertUnharmed();
    }

    @Test
    void aKilledProcessIsReplaced() throws Exception {
        assertUnharmed();
        long pid = session.childPid();
        CompletableFuture<Void> begun = new CompletableFuture<>();
        CompletableFuture<RunOutcome> run = session.work(sheet("working\nThread.sleep(60_000);"), WorkOptions.FULL, progress -> begun.complete(null));
        begun.get();
        ProcessHandle.of(pid).orElseThrow().destroyForcibly();
        assertTrue(onlyProblem(run.get()).contains("it was killed"));
        assertUnharmed();
        assertNotEquals(pid, session.childPid());
        ProcessHandle idle = ProcessHandle.of(session.childPid()).orElseThrow();
        idle.destroyForcibly();
        idle.onExit().get();
        assertUnharmed();
    }

    @Test
    void bytesOnTheRealOutputDoNoHarm() throws Exception {
        RunOutcome outcome = work("working\nvar raw = new java.io.FileOutputStream(java.io.FileDescriptor.out);\nraw.write(new byte[64]);\nraw.flush();");
        assertEquals(List.of(State.FAILED), states(outcome));
        assertUnharmed();
    }

    @Test
    void whatWaitsIsStoppedToo() throws Exception {
        CompletableFuture<RunOutcome> first = session.work(sheet("working\nThread.sleep(60_000);"), WorkOptions.FULL, progress -> { });
        CompletableFuture<RunOutcome> second = session.work(sheet(AFTER, AFTER), WorkOptions.FULL, progress -> { });
        Thread.sleep(200);
        session.stop();
        assertTrue(first.get().isStopped());
        assertEquals(List.of(State.STOPPED, State.NOT_REACHED), states(second.get()));
        assertUnharmed();
    }

    @Test
    void theProcessEndsWithItsParent() throws Exception {
        Session other = Session.start(new SessionOptions(128, Duration.ofSeconds(1), true));
        other.work(sheet(AFTER), WorkOptions.FULL, progress -> { }).get();
        ProcessHandle child = ProcessHandle.of(other.childPid()).orElseThrow();
        assertTrue(child.isAlive());
        other.close();
        child.onExit().get();
        assertFalse(child.isAlive());
        assertThrows(ExecutionException.class, () -> other.work(sheet(AFTER), WorkOptions.FULL, progress -> { }).get());
    }

    @Test
    void theProcessEndsWhenItsInputEnds() throws Exception {
        Process process = new ProcessBuilder(System.getProperty("java.home") + "/bin/java", "-cp",
                fieldwright.session.snippet.SnippetCompiler.absoluteClassPath(), CalculationProcess.class.getName()).start();
        assertEquals(new Reply.Ready(), new Pipe(process.getInputStream(), process.getOutputStream()).receive(Reply.class));
        process.getOutputStream().close();
        assertEquals(0, process.waitFor());
    }
}

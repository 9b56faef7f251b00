package fieldwright.session;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import fieldwright.sheet.Cell;
import fieldwright.sheet.Sheet;
import fieldwright.sheet.SheetException;
import java.io.IOException;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.Executors;
import java.util.concurrent.RejectedExecutionException;
import java.util.concurrent.ScheduledExecutorService;
import java.util.concurrent.TimeUnit;
import java.util.function.Consumer;

/**
 * Works sheets in a process of its own, one after the other. Text goes in, plain data comes out; whatever a cell does to
 * that process, the text is here and the next run begins in a fresh one.
 *
 * <p>All methods may be called from any thread and none of them waits for a run. The listener is called on a thread of
 * the session.
 */
public final class Session implements AutoCloseable {
    private final SessionOptions options;
    private final ScheduledExecutorService driver = Executors.newSingleThreadScheduledExecutor(task -> daemon(task, "session"));
    private final ScheduledExecutorService clock = Executors.newSingleThreadScheduledExecutor(task -> daemon(task, "session clock"));
    private Child child;
    private long submitted;
    private long running;
    private long stopped;
    private boolean closed;

    private Session(SessionOptions options) {
        this.options = options;
    }

    /** Starts a session; its process is made ready in the background. */
    public static Session start(SessionOptions options) {
        Session session = new Session(options);
        session.driver.execute(session::prepare);
        return session;
    }

    public static Session start() {
        return start(SessionOptions.STANDARD);
    }

    private static Thread daemon(Runnable task, String name) {
        Thread thread = new Thread(task, name);
        thread.setDaemon(true);
        return thread;
    }

    /**
     * Works a sheet after those asked for before.
     *
     * @param listener told how the run goes on
     * @return what the run gave; it completes exceptionally only when no process can be started, or after {@link #close()}
     */
    public CompletableFuture<RunOutcome> work(String text, WorkOptions work, Consumer<Progress> listener) {
        CompletableFuture<RunOutcome> future = new CompletableFuture<>();
        long run = nextRun();
        Runnable task = () -> {
            try {
                future.complete(new Run(run, text, work, listener).work());
            } catch (IOException | RuntimeException e) {
                future.completeExceptionally(e);
            }
        };
        try {
            driver.execute(task);
        } catch (RejectedExecutionException e) {
            future.completeExceptionally(new IllegalStateException("the session is closed", e));
        }
        return future;
    }

    private synchronized long nextRun() {
        return ++submitted;
    }

    /** Stops the run that goes on, and those that wait. */
    public synchronized void stop() {
        stopped = submitted;
        long run = running;
        Child working = child;
        if (run == 0 || working == null) {
            return;
        }
        try {
            working.pipe().send(new Request.Stop(run));
        } catch (IOException e) {
            return;     // it is dead already; whoever waits for its reply sees that
        }
        clock.schedule(() -> killIfStillRunning(run), options.patience().toMillis(), TimeUnit.MILLISECONDS);
    }

    private synchronized void killIfStillRunning(long run) {
        if (running == run && child != null) {
            child.kill();
        }
    }

    /** Process id of the process now in use; 0 when there is none. For tests. */
    synchronized long childPid() {
        return child == null ? 0 : child.pid();
    }

    @Override
    public void close() {
        synchronized (this) {
            closed = true;
            stopped = submitted;
            if (child != null) {
                child.kill();
            }
        }
        driver.shutdown();
        clock.shutdownNow();
    }

    private void prepare() {
        try {
            child();
        } catch (IOException e) {
            // the next run meets the same and says so
        }
    }

    private synchronized void prepareLater() {
        if (!closed) {
            driver.execute(this::prepare);
        }
    }

    private Child child() throws IOException {
        synchronized (this) {
            if (child != null && child.isAlive()) {
                return child;
            }
        }
        Child fresh = Child.start(options);
        synchronized (this) {
            child = fresh;
            if (closed) {
                fresh.kill();
                throw new IOException("the session is closed");
            }
            return fresh;
        }
    }

    private synchronized void setRunning(long run) {
        running = run;
    }

    private synchronized boolean isStopped(long run) {
        return run <= stopped;
    }

    /** One run, seen from here: what has been reported of it so far. */
    private final class Run {
        private final long number;
        private final String text;
        private final WorkOptions work;
        private final Consumer<Progress> listener;
        private final Map<Integer, CellOutcome> finished = new HashMap<>();
        private int at;
        private boolean begun;
        private boolean resultsStand;
        private String reason;

        Run(long number, String text, WorkOptions work, Consumer<Progress> listener) {
            this.number = number;
            this.text = text;
            this.work = work;
            this.listener = listener;
        }

        RunOutcome work() throws IOException {
            try {
                return isStopped(number) ? unfinished("") : attempt(child());
            } catch (IOException died) {
                if (begun || isStopped(number)) {
                    throw died;
                }
                return attempt(child());    // it had died before it was asked anything
            } finally {
                setRunning(0);
            }
        }

        private RunOutcome attempt(Child child) throws IOException {
            setRunning(number);
            try {
                child.pipe().send(new Request.Work(number, text, work));
                while (true) {
                    Reply reply = child.pipe().receive(Reply.class);
                    if (reply instanceof Reply.Done done && done.run() == number) {
                        return done.outcome() != null ? done.outcome() : unfinished("");
                    }
                    hear(reply);
                }
            } catch (IOException e) {
                child.kill();
                String cause = reason != null ? reason : child.causeOfDeath();
                prepareLater();
                if (!begun && !isStopped(number)) {
                    throw new IOException("the calculation process ended: " + cause, e);
                }
                return unfinished(cause);
            }
        }

        private void hear(Reply reply) {
            if (reply instanceof Reply.Ending ending) {
                reason = ending.reason();
            }
            if (!(reply instanceof Reply.News news) || news.run() != number) {
                return;
            }
            begun = true;
            if (news.progress() instanceof Progress.Started started) {
                at = started.cell();
            } else if (news.progress() instanceof Progress.Finished done) {
                finished.put(done.outcome().cell(), done.outcome());
            } else {
                resultsStand = true;
            }
            try {
                listener.accept(news.progress());
            } catch (RuntimeException e) {
                Thread.currentThread().getUncaughtExceptionHandler().uncaughtException(Thread.currentThread(), e);
            }
        }

        /** What there is of a run that was stopped hard or whose process is gone. */
        private RunOutcome unfinished(String cause) {
            List<Cell> cells;
            try {
                cells = Sheet.parse(text).cells();
            } catch (SheetException e) {
                return RunOutcome.refused(new Output.Problem(e.line(), 0, e.getMessage()));
            }
            if (resultsStand) {
                String missing = isStopped(number) ? "stopped" : "the calculation process ended (" + cause + ")";
                return new RunOutcome(cells(cells, ""), List.of(new Output.Problem(0, 0, missing
                        + " while the inputs' tolerances were worked: tolerances and worst cases are missing. Run the sheet again.")));
            }
            return new RunOutcome(cells(cells, cause), List.of());
        }

        private List<CellOutcome> cells(List<Cell> cells, String cause) {
            List<CellOutcome> outcomes = new ArrayList<>();
            for (int cell = 1; cell <= cells.size(); cell++) {
                outcomes.add(cell == Math.max(at, 1) && !resultsStand ? broken(cell, cells.get(cell - 1), cause)
                        : finished.getOrDefault(cell, new CellOutcome(cell, CellOutcome.State.NOT_REACHED, List.of(), Set.of())));
            }
            return outcomes;
        }

        private CellOutcome broken(int number, Cell cell, String cause) {
            if (isStopped(this.number)) {
                return new CellOutcome(number, CellOutcome.State.STOPPED, List.of(), Set.of());
            }
            return new CellOutcome(number, CellOutcome.State.FAILED, List.of(new Output.Problem(cell.headLine(), number,
                    "the calculation process ended while this cell was worked: " + cause
                            + ". The sheet is unharmed; change the cell and run again.")), Set.of());
        }
    }
}

package fieldwright.app;

import fieldwright.output.CellOutcome;
import fieldwright.output.Output;
import fieldwright.output.RunOutcome;
import java.util.ArrayList;
import java.util.List;
import java.util.Queue;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CompletionException;
import java.util.concurrent.ConcurrentLinkedQueue;
import java.util.concurrent.Executor;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.function.Supplier;

/**
 * Hands the desk's text to the calculation and brings back what it gives. At most one order is under way; an edit
 * meanwhile stops it and asks again. All methods are called on one thread, the one the executor leads back to.
 */
final class Workbench implements AutoCloseable {

    /** Asked before a text that was not made here runs for the first time. */
    interface Consent {
        boolean mayRun();
    }

    private final SheetDesk desk;
    private final Supplier<Calculator> start;
    private final Consent consent;
    private final Executor home;
    private final Runnable changed;
    private CompletableFuture<Calculator> calculator;
    private boolean allowed;
    private boolean busy;
    private boolean again;
    private boolean stopping;
    private boolean closed;
    private int reached;
    private String underWay = "";

    /**
     * @param start   starts a calculation; may take its time, is called elsewhere
     * @param home    leads back to the thread of the desk
     * @param changed told when the state changes
     */
    Workbench(SheetDesk desk, Supplier<Calculator> start, Consent consent, Executor home, Runnable changed) {
        this.desk = desk;
        this.start = start;
        this.consent = consent;
        this.home = home;
        this.changed = changed;
    }

    /** Gets the calculation ready, so that the first order need not wait. Runs nothing of the sheet. */
    void warmUp() {
        calculator();
    }

    private CompletableFuture<Calculator> calculator() {
        if (calculator == null || calculator.isCompletedExceptionally()) {
            calculator = CompletableFuture.supplyAsync(start);
        }
        return calculator;
    }

    /** Works the sheet out; asks first where it must. */
    void workOut() {
        if (!allowed) {
            allowed = consent.mayRun();
        }
        if (allowed) {
            order();
        }
    }

    /** The text changed. It is worked out again at once if it was worked out before. */
    void edited() {
        if (allowed && (desk.wasWorked() || busy)) {
            order();
        }
    }

    /** Stops what is under way. */
    void stop() {
        if (busy) {
            again = false;
            stopping = true;
            calculator().thenAccept(Calculator::stop);
            changed.run();
        }
    }

    private void order() {
        if (busy && !stopping && !again && desk.sheet().write().equals(underWay)) {
            return;
        }
        if (busy) {
            again = true;
            calculator().thenAccept(Calculator::stop);
            return;
        }
        busy = true;
        stopping = false;
        reached = 0;
        SheetDesk.Order order = desk.order();
        underWay = order.text();
        changed.run();
        calculator().thenCompose(c -> c.work(order.text(), listener(order)))
                .whenComplete((run, fault) -> home.execute(() -> end(order, run, fault)));
    }

    private Calculator.Listener listener(SheetDesk.Order order) {
        return new Calculator.Listener() {
            private final Queue<CellOutcome> arrived = new ConcurrentLinkedQueue<>();
            private final AtomicBoolean told = new AtomicBoolean();
            private volatile int at;

            @Override
            public void reached(int step) {
                at = step;
                tell();
            }

            @Override
            public void gave(CellOutcome outcome) {
                arrived.add(outcome);
                tell();
            }

            /** News that come faster than the window can show them are taken together. */
            private void tell() {
                if (told.compareAndSet(false, true)) {
                    home.execute(() -> {
                        told.set(false);
                        hear();
                    });
                }
            }

            private void hear() {
                List<CellOutcome> now = new ArrayList<>();
                for (CellOutcome outcome = arrived.poll(); outcome != null; outcome = arrived.poll()) {
                    now.add(outcome);
                }
                if (busy && !closed && order.text().equals(underWay)) {
                    reached = at;
                    desk.take(order, now);
                    changed.run();
                }
            }
        };
    }

    private void end(SheetDesk.Order order, RunOutcome run, Throwable fault) {
        if (closed) {
            return;
        }
        busy = false;
        reached = 0;
        if (again) {
            // Superseded: what its steps gave still counts, its complaints about being stopped do not.
            again = false;
            if (run != null) {
                desk.take(order, run.cells());
            }
            order();
            return;
        }
        desk.take(order, fault == null ? run : new RunOutcome(List.of(), List.of(new Output.Problem(0, 0,
                "the calculation ended: " + reason(fault) + " The text is safe. Work out again starts a new one."))));
        changed.run();
    }

    private static String reason(Throwable fault) {
        Throwable cause = fault instanceof CompletionException && fault.getCause() != null ? fault.getCause() : fault;
        String message = cause.getMessage() == null ? cause.getClass().getSimpleName() : cause.getMessage();
        return message.endsWith(".") ? message : message + ".";
    }

    boolean isBusy() {
        return busy;
    }

    boolean isStopping() {
        return stopping && busy;
    }

    /** The step being worked, 1-based; 0 when none is. */
    int reached() {
        return reached;
    }

    @Override
    public void close() {
        closed = true;
        if (calculator != null) {
            calculator.thenAccept(c -> {
                c.stop();
                c.close();
            });
        }
    }
}

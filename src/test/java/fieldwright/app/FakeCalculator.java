package fieldwright.app;

import fieldwright.output.CellOutcome;
import fieldwright.output.RunOutcome;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Set;
import java.util.concurrent.CompletableFuture;
import java.util.concurrent.CountDownLatch;
import java.util.function.Function;

/** A calculation that answers from a function, in a thread of its own, and can be held until it is let go or stopped. */
final class FakeCalculator implements Calculator {
    final List<String> orders = Collections.synchronizedList(new ArrayList<>());
    private final Function<String, RunOutcome> answer;
    private volatile CountDownLatch held = new CountDownLatch(0);
    private volatile boolean stopped;
    volatile boolean closed;

    FakeCalculator(Function<String, RunOutcome> answer) {
        this.answer = answer;
    }

    /** Orders wait from now on. */
    void hold() {
        held = new CountDownLatch(1);
    }

    void letGo() {
        held.countDown();
    }

    @Override
    public CompletableFuture<RunOutcome> work(String text, Listener listener) {
        orders.add(text);
        stopped = false;
        return CompletableFuture.supplyAsync(() -> {
            listener.reached(1);
            try {
                held.await();
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
            }
            RunOutcome run = answer.apply(text);
            return stopped ? new RunOutcome(run.cells().stream().map(c -> new CellOutcome(c.cell(),
                    c.cell() == 1 ? CellOutcome.State.STOPPED : CellOutcome.State.NOT_REACHED, List.of(), Set.of())).toList(), List.of()) : run;
        });
    }

    @Override
    public void stop() {
        stopped = true;
        held.countDown();
    }

    @Override
    public void close() {
        closed = true;
        held.countDown();
    }
}

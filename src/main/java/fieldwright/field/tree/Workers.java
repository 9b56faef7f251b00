package fieldwright.field.tree;

import fieldwright.quantity.Stop;
import fieldwright.quantity.StoppedException;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.concurrent.atomic.AtomicReference;
import java.util.function.DoubleConsumer;
import java.util.function.Supplier;

/**
 * Independent tasks shared among threads. Which thread takes which task changes nothing: a task writes to its own places only, and of
 * several that fail the one of lowest number is thrown in the caller. A stop request or an interrupt of the calling thread ends all.
 */
public final class Workers {
    private final int threads;
    private final DoubleConsumer progress;

    /** @param progress told by the calling thread how much is done, 0 to 1 */
    public Workers(int threads, DoubleConsumer progress) {
        this.threads = threads;
        this.progress = progress;
    }

    /** One thread for each processor. */
    public static Workers all() {
        return new Workers(Runtime.getRuntime().availableProcessors(), part -> { });
    }

    /** The same threads for one part of the work: its progress runs from one number to the other. */
    Workers part(double from, double to) {
        return new Workers(threads, part -> progress.accept(from + (to - from) * part));
    }

    /** One of the tasks 0 … n − 1, with what its thread keeps for itself. */
    public interface Task<T> {
        void work(T own, int number);
    }

    private record Failure(int number, Throwable thrown) {
        static Failure first(Failure a, Failure b) {
            return a == null || b.number < a.number ? b : a;
        }
    }

    /** Works tasks 0 … n − 1; each thread makes its own tools once. */
    public <T> void each(int n, Supplier<T> tools, Task<T> task) {
        AtomicInteger next = new AtomicInteger();
        AtomicReference<Failure> failure = new AtomicReference<>();
        List<Thread> helpers = new ArrayList<>();
        for (int k = 1; k < Math.min(threads, n); k++) {
            Thread helper = new Thread(() -> loop(n, tools, task, next, failure, part -> { }), "fieldwright-worker-" + k);
            helper.setDaemon(true);
            helpers.add(helper);
            helper.start();
        }
        loop(n, tools, task, next, failure, progress);
        await(helpers, failure);
        if (failure.get() != null) {
            if (failure.get().thrown() instanceof Error error) {
                throw error;
            }
            throw (RuntimeException) failure.get().thrown();
        }
    }

    private static <T> void loop(int n, Supplier<T> tools, Task<T> task, AtomicInteger next, AtomicReference<Failure> failure,
        DoubleConsumer progress) {
        int number = -1;
        try {
            T own = tools.get();
            for (int i = next.getAndIncrement(); i < n && failure.get() == null; i = next.getAndIncrement()) {
                number = -1;
                Stop.check();
                number = i;
                task.work(own, i);
                progress.accept((double) Math.min(n, next.get()) / n);
            }
        } catch (StoppedException e) {
            failure.accumulateAndGet(new Failure(-1, e), Failure::first);
        } catch (RuntimeException | Error e) {
            failure.accumulateAndGet(new Failure(number, e), Failure::first);
        }
    }

    /** Waits for the helpers to end; a stop is passed on to them. The caller's interrupt flag is kept. */
    private static void await(List<Thread> helpers, AtomicReference<Failure> failure) {
        boolean interrupted = false;
        for (Thread helper : helpers) {
            while (helper.isAlive()) {
                try {
                    Failure found = failure.get();
                    if (interrupted || found != null && found.number() < 0) {
                        helper.interrupt();
                    }
                    helper.join(20);
                } catch (InterruptedException e) {
                    interrupted = true;
                    failure.accumulateAndGet(new Failure(-1, new StoppedException()), Failure::first);
                }
            }
        }
        if (interrupted) {
            Thread.currentThread().interrupt();
        }
    }
}

package fieldwright.app;

import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assertions.fail;

import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.FutureTask;
import java.util.concurrent.TimeUnit;
import java.util.concurrent.TimeoutException;
import java.util.function.BooleanSupplier;
import javafx.application.Platform;

/** The window toolkit in tests: started once per JVM and never ended; every wait is timed. */
final class Fx {
    private static final long PATIENCE = 60;   // seconds
    private static boolean started;

    private Fx() { }

    static synchronized void start() {
        if (started) {
            return;
        }
        CountDownLatch up = new CountDownLatch(1);
        Platform.startup(up::countDown);
        Platform.setImplicitExit(false);
        try {
            assertTrue(up.await(PATIENCE, TimeUnit.SECONDS), "the toolkit did not start");
        } catch (InterruptedException e) {
            fail(e);
        }
        started = true;
    }

    /** Does something in the window's thread and gives what it gives. */
    static <T> T get(Callable<T> task) {
        FutureTask<T> future = new FutureTask<>(task);
        Platform.runLater(future);
        try {
            return future.get(PATIENCE, TimeUnit.SECONDS);
        } catch (ExecutionException e) {
            if (e.getCause() instanceof Error error) {
                throw error;
            }
            return fail(e.getCause());
        } catch (InterruptedException | TimeoutException e) {
            return fail("the window's thread did not answer", e);
        }
    }

    static void run(Runnable task) {
        get(() -> {
            task.run();
            return null;
        });
    }

    /** Waits until something holds in the window's thread. */
    static void until(String what, BooleanSupplier holds) {
        until(what, holds, PATIENCE);
    }

    static void until(String what, BooleanSupplier holds, long seconds) {
        long end = System.nanoTime() + TimeUnit.SECONDS.toNanos(seconds);
        while (!get(holds::getAsBoolean)) {
            if (System.nanoTime() > end) {
                fail("waited in vain: " + what);
            }
            try {
                Thread.sleep(5);
            } catch (InterruptedException e) {
                fail(e);
            }
        }
    }
}

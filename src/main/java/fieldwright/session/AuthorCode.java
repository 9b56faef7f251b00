package fieldwright.session;

import fieldwright.quantity.Stop;
import java.lang.reflect.InvocationTargetException;
import java.util.concurrent.Callable;

/**
 * Marks the part of a run in which the author's code is at work, so that a stop from another thread interrupts that and
 * nothing else. A compiler that is interrupted loses its files; it is short, so it is waited for.
 */
final class AuthorCode {
    private Thread running;

    /** Runs something that may be interrupted. On return the thread is not marked as interrupted. */
    <T> T run(Callable<T> code) throws Exception {
        enter();
        try {
            return code.call();
        } finally {
            leave();
        }
    }

    private synchronized void enter() {
        Stop.check();
        running = Thread.currentThread();
    }

    private synchronized void leave() {
        running = null;
        Thread.interrupted();
    }

    /** Asks for a stop: by the flag that our own loops poll, and by an interrupt for whatever waits. */
    synchronized void stop() {
        Stop.request();
        if (running != null) {
            running.interrupt();
        }
    }

    /**
     * Throws {@code ThreadDeath} into the author's code, on the Java versions that still can. What the thread was doing
     * is then anybody's guess: whoever catches it must throw away what it worked on.
     */
    synchronized void stopHard() {
        if (running == null) {
            return;
        }
        try {
            Thread.class.getMethod("stop").invoke(running);
        } catch (NoSuchMethodException | IllegalAccessException | InvocationTargetException e) {
            // newer Java: the parent will kill this process
        }
    }
}

package fieldwright.session;

import fieldwright.output.RunOutcome;
import fieldwright.quantity.Stop;
import java.io.BufferedInputStream;
import java.io.BufferedOutputStream;
import java.io.EOFException;
import java.io.FileDescriptor;
import java.io.FileInputStream;
import java.io.FileOutputStream;
import java.io.IOException;
import java.io.InputStream;
import java.io.Serializable;
import java.util.concurrent.BlockingQueue;
import java.util.concurrent.LinkedBlockingQueue;

/**
 * The child process in which sheets are worked. It takes {@link Request}s on its standard input and sends
 * {@link Reply}s on its standard output; one thread reads, so that a stop is heard while another works. It ends when its
 * input ends, so it never outlives its parent.
 */
public final class CalculationProcess {
    /** From the polite stop to the hard one; the parent kills the process later still. */
    private static final long HARD_STOP_MILLIS = 300;
    private static final long STACK_BYTES = 8 << 20;

    private final Pipe pipe;
    private final Printing printing;
    private final AuthorCode authorCode = new AuthorCode();
    private final BlockingQueue<Request.Work> waiting = new LinkedBlockingQueue<>();
    private long current;
    private long stopped;

    private CalculationProcess(Pipe pipe, Printing printing) {
        this.pipe = pipe;
        this.printing = printing;
    }

    public static void main(String[] arguments) {
        Pipe pipe = new Pipe(new BufferedInputStream(new FileInputStream(FileDescriptor.in)),
                new BufferedOutputStream(new FileOutputStream(FileDescriptor.out)));
        System.setIn(InputStream.nullInputStream());
        new CalculationProcess(pipe, Printing.install()).serve();
    }

    private void serve() {
        Runtime.getRuntime().addShutdownHook(new Thread(this::sayWhyItEnds));
        Thread worker = new Thread(null, this::work, "worker", STACK_BYTES);
        worker.setDaemon(true);
        worker.start();
        Thread warming = new Thread(WarmUp::run, "warming up");
        warming.setDaemon(true);
        warming.start();
        try {
            pipe.send(new Reply.Ready());
            while (true) {
                take(pipe.receive(Request.class));
            }
        } catch (EOFException e) {
            Runtime.getRuntime().halt(0);
        } catch (IOException e) {
            Runtime.getRuntime().halt(1);
        }
    }

    private void take(Request request) {
        if (request instanceof Request.Work work) {
            waiting.add(work);
        } else if (request instanceof Request.Stop stop) {
            stop(stop.run());
        }
    }

    private void work() {
        SheetRunner runner = new SheetRunner(printing, authorCode);
        while (true) {
            try {
                Request.Work work = waiting.take();
                RunOutcome outcome = work(runner, work);
                if (outcome == null) {
                    runner.close();
                    runner = new SheetRunner(printing, authorCode);
                }
                send(new Reply.Done(work.run(), outcome));
            } catch (InterruptedException e) {
                // a late stop; there is nothing to stop any more
            }
        }
    }

    /** Null when the author's code had to be stopped hard. */
    private RunOutcome work(SheetRunner runner, Request.Work work) {
        begin(work.run());
        try {
            return runner.work(work.text(), work.options(), news -> send(new Reply.News(work.run(), news)));
        } catch (ThreadDeath e) {
            return null;
        } finally {
            end();
        }
    }

    private synchronized void begin(long run) {
        current = run;
        Stop.clear();
        if (run <= stopped) {
            Stop.request();
        }
    }

    private synchronized void end() {
        current = 0;
        Thread.interrupted();
    }

    private synchronized void stop(long run) {
        stopped = Math.max(stopped, run);
        if (current != run) {
            return;
        }
        authorCode.stop();
        Thread hard = new Thread(() -> stopHard(run), "hard stop");
        hard.setDaemon(true);
        hard.start();
    }

    private void stopHard(long run) {
        try {
            Thread.sleep(HARD_STOP_MILLIS);
        } catch (InterruptedException e) {
            return;
        }
        synchronized (this) {
            if (current == run) {
                authorCode.stopHard();
            }
        }
    }

    private void send(Serializable message) {
        try {
            pipe.send(message);
        } catch (IOException e) {
            Runtime.getRuntime().halt(1);
        }
    }

    /** Runs when something in this process calls {@code System.exit}; an orderly end is a halt and does not come here. */
    private void sayWhyItEnds() {
        boolean signal = Thread.getAllStackTraces().values().stream().flatMap(java.util.Arrays::stream)
                .anyMatch(frame -> frame.getClassName().startsWith("java.lang.Terminator"));
        send(new Reply.Ending(signal ? "it was told to end from outside" : "the cell called System.exit"));
    }
}

package fieldwright.app;

import fieldwright.output.RunOutcome;
import fieldwright.session.Progress;
import fieldwright.session.Session;
import fieldwright.session.WorkOptions;
import java.util.concurrent.CompletableFuture;

/** The calculation process as the pad sees it. */
final class SessionCalculator implements Calculator {
    private final Session session;

    private SessionCalculator(Session session) {
        this.session = session;
    }

    /** Starts a calculation process; it is made ready in the background. */
    static Calculator start() {
        return new SessionCalculator(Session.start());
    }

    @Override
    public CompletableFuture<RunOutcome> work(String text, Listener listener) {
        return session.work(text, WorkOptions.FULL, progress -> {
            if (progress instanceof Progress.Started started) {
                listener.reached(started.cell());
            } else if (progress instanceof Progress.Finished finished) {
                listener.gave(finished.outcome());
            } else if (progress instanceof Progress.Tolerances) {
                listener.reached(0);
            }
        });
    }

    @Override
    public void stop() {
        session.stop();
    }

    @Override
    public void close() {
        session.close();
    }
}

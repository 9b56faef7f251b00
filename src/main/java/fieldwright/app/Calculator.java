package fieldwright.app;

import fieldwright.output.CellOutcome;
import fieldwright.output.RunOutcome;
import java.util.concurrent.CompletableFuture;

/** Works sheets out somewhere else than in the window's thread. One order at a time. */
interface Calculator extends AutoCloseable {

    /** Told on the way, from any thread. */
    interface Listener {
        /** This step, 1-based, is being worked now; 0 when all results stand and only their tolerances are worked. */
        void reached(int step);

        /** This is what a step gave; told again when tolerances are known. */
        void gave(CellOutcome outcome);
    }

    /** Works out a text from top to bottom, reusing what did not change. Never blocks the caller. */
    CompletableFuture<RunOutcome> work(String text, Listener listener);

    /** Asks what is being worked to end; its future then completes with what was reached. */
    void stop();

    @Override
    void close();
}

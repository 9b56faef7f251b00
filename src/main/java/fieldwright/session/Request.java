package fieldwright.session;

import java.io.Serializable;

/** What the parent sends to the calculation process. */
sealed interface Request extends Serializable {

    /** Work this sheet. One at a time. */
    record Work(long run, String text, WorkOptions options) implements Request { }

    /** Give up that run. */
    record Stop(long run) implements Request { }
}

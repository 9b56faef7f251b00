package fieldwright.session;

import fieldwright.output.RunOutcome;
import java.io.Serializable;

/** What the calculation process sends to the parent. */
sealed interface Reply extends Serializable {

    /** The process is there and takes requests. */
    record Ready() implements Reply { }

    record News(long run, Progress progress) implements Reply { }

    record Done(long run, RunOutcome outcome) implements Reply { }

    /** The process ends of itself, for this reason. */
    record Ending(String reason) implements Reply { }
}

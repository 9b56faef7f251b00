package fieldwright.session;

import fieldwright.output.RunOutcome;
import java.io.Serializable;

/** What the calculation process sends to the parent. */
sealed interface Reply extends Serializable {

    /** The process is there and takes requests. */
    record Ready() implements Reply { }

    record News(long run, Progress progress) implements Reply { }

    /** @param outcome null when the author's code had to be stopped hard: the parent knows what had been worked by then */
    record Done(long run, RunOutcome outcome) implements Reply { }

    /** The process ends of itself, for this reason. */
    record Ending(String reason) implements Reply { }
}

package fieldwright.session;

import fieldwright.output.CellOutcome;
import java.io.Serializable;

/** What a run tells while it goes on. Cells are counted from 1. */
public sealed interface Progress extends Serializable {

    /** Work on this cell begins. */
    record Started(int cell) implements Progress { }

    /** A cell is finished. It may come a second time, with tolerances filled in; the later one counts. */
    record Finished(CellOutcome outcome) implements Progress { }

    /** All results stand; now the inputs' tolerances are worked. */
    record Tolerances() implements Progress { }
}

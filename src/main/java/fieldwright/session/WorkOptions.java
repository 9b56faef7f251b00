package fieldwright.session;

import java.io.Serializable;

/**
 * What a run is to give.
 *
 * @param tolerances true to work the sheet again for the inputs' tolerances and the worst cases of assessments, once
 *                   the results stand
 */
public record WorkOptions(boolean tolerances) implements Serializable {
    /** Everything. */
    public static final WorkOptions FULL = new WorkOptions(true);
    /** Results with their numerical errors only. */
    public static final WorkOptions RESULTS = new WorkOptions(false);
}

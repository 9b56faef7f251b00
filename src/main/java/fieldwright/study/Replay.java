package fieldwright.study;

import java.util.Map;

/**
 * A sheet as a function of its inputs. The session implements it over the snippets of a finished run.
 */
public interface Replay {

    /**
     * Works the whole sheet with some inputs changed.
     *
     * @param changed input name to value in SI; every other input keeps its stated value. Empty: the sheet as it stands.
     * @return what the sheet then gives. A result or assessment that could not be worked is missing from it: a
     *     failing cell is no exception here. Same inputs, same outcome, whatever was asked before.
     */
    Outcome with(Map<String, Double> changed);

    /**
     * @param results a sheet result by its name
     * @param assessed an assessment by its label
     */
    record Outcome(Map<String, Reading> results, Map<String, Assessed> assessed) {
        public Outcome {
            results = Map.copyOf(results);
            assessed = Map.copyOf(assessed);
        }
    }
}

package fieldwright.session;

import fieldwright.field.Accuracy;
import fieldwright.words.Desk;
import java.util.Map;

/**
 * What one working of a sheet is asked for beside the sheet's cells.
 *
 * @param mode    for its outputs, or only for its numbers
 * @param changed inputs that do not have their stated value, SI
 */
record Setting(Accuracy accuracy, Desk.Mode mode, Map<String, Double> changed) {

    Setting {
        changed = Map.copyOf(changed);
    }

    boolean isReplay() {
        return mode == Desk.Mode.REPLAY;
    }

    Setting replay(Map<String, Double> newValues) {
        return new Setting(accuracy, Desk.Mode.REPLAY, newValues);
    }
}

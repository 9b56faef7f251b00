package fieldwright.session;

import fieldwright.field.Accuracy;
import fieldwright.words.Desk;
import java.util.List;
import java.util.Map;

/**
 * What one working of a sheet is asked for beside the sheet's cells.
 *
 * @param mode      for its outputs, or only for its numbers
 * @param libraries the library sheets it uses
 * @param changed   inputs that do not have their stated value, SI
 */
record Setting(Accuracy accuracy, Desk.Mode mode, List<Library> libraries, Map<String, Double> changed) {

    Setting {
        libraries = List.copyOf(libraries);
        changed = Map.copyOf(changed);
    }

    boolean isReplay() {
        return mode == Desk.Mode.REPLAY;
    }

    Setting replay(Map<String, Double> newValues) {
        return new Setting(accuracy, Desk.Mode.REPLAY, libraries, newValues);
    }
}

package fieldwright.session;

import fieldwright.quantity.Amount;
import java.util.AbstractMap;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;

/** The columns of a table input by their names, in their order. Cannot be changed. */
final class Columns extends AbstractMap<String, List<Amount>> {
    private final Map<String, List<Amount>> columns;

    Columns(Map<String, List<Amount>> columns) {
        this.columns = Collections.unmodifiableMap(new LinkedHashMap<>(columns));
    }

    @Override
    public Set<Entry<String, List<Amount>>> entrySet() {
        return columns.entrySet();
    }
}

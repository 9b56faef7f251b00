package fieldwright.session;

import fieldwright.session.snippet.Declaration;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.Map;

/** The names of a sheet, from the top down to the cell that is worked. A name stands here once. */
final class NameTable {
    private final Map<String, SheetName> names = new LinkedHashMap<>();
    private final Map<String, Declaration> declarations = new LinkedHashMap<>();

    /** Null when nothing above writes it. */
    SheetName get(String name) {
        return names.get(name);
    }

    void put(SheetName name) {
        names.put(name.name(), name);
        if (name.declares() != null) {
            declarations.put(name.declares().name(), name.declares());
        }
    }

    /** Notes for objects that may change that a cell has had them in hand. */
    void touch(CellRun run) {
        for (String read : run.reads().found()) {
            SheetName name = names.get(read);
            if (name != null && !Constancy.isConstant(name.value())) {
                names.put(read, name.touchedBy(run));
            }
        }
    }

    Collection<SheetName> all() {
        return names.values();
    }

    /** What Java code below may name. */
    Map<String, Declaration> declarations() {
        return declarations;
    }
}

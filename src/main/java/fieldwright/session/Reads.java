package fieldwright.session;

import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.ConcurrentHashMap;

/** What a cell has really read of the names above it, those it looked for in vain included. */
final class Reads {
    private final Map<String, Optional<SheetName>> seen = new ConcurrentHashMap<>();

    void add(String name, SheetName found) {
        seen.putIfAbsent(name, Optional.ofNullable(found));
    }

    /** True when it would read the same in this table. */
    boolean meanSameIn(NameTable table) {
        return seen.entrySet().stream().allMatch(read -> isSame(read.getValue().orElse(null), table.get(read.getKey())));
    }

    private static boolean isSame(SheetName before, SheetName now) {
        return before == null || now == null ? before == now : before.meansSame(now);
    }

    /** The names that were found. */
    Set<String> found() {
        Set<String> found = new TreeSet<>();
        seen.forEach((name, what) -> what.ifPresent(there -> found.add(name)));
        return found;
    }
}

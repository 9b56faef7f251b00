package fieldwright.session.snippet;

import java.util.Map;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;
import java.util.stream.Collectors;

/** The bytes of every class compiled from snippets, by binary name. JShell gives a name again only to the same bytes. */
final class ClassStore {
    private final Map<String, byte[]> bytes = new ConcurrentHashMap<>();

    void add(String name, byte[] classBytes) {
        bytes.put(name, classBytes);
    }

    /** The names of a class and of all classes within it. */
    Set<String> within(String outer) {
        return bytes.keySet().stream().filter(name -> name.equals(outer) || name.startsWith(outer + "$"))
                .collect(Collectors.toSet());
    }

    /** Null when no snippet has this class. */
    byte[] bytes(String name) {
        return bytes.get(name);
    }
}
